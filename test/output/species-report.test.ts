/** Species of the library as text, JSON, CSV and charts. */
import { describe, expect, it } from 'vitest';
import { speciesCharts } from '../../src/output/charts/species-charts.js';
import { propertyCsv, speciesJson, speciesList, speciesReport } from '../../src/output/species-report.js';
import { propertyTable } from '../../src/properties/property-table.js';
import { findLibrarySpecies } from '../../src/properties/species/library.js';
import { allSpeciesFacts, speciesFacts } from '../../src/properties/species/species-facts.js';

const nitrogen = speciesFacts('N2')!;
const temperatures = [298.15, 300, 500, 1000];
const table = propertyTable(findLibrarySpecies('N2')!, temperatures);
const escape = '\u001b';

/**
 * NIST-JANAF tables, 4th ed. (1998), N2 (from memory): Cp and S in J/(mol K), H-H298 in kJ/mol; printed to 0.001. The polynomials of 2002
 * were fitted to other spectroscopic constants: 0.1 % in Cp, 0.03 kJ/mol.
 */
const janaf = [
  { temperature: 298.15, heatCapacity: 29.124, enthalpy: 0, entropy: 191.609 },
  { temperature: 300, heatCapacity: 29.125, enthalpy: 0.054, entropy: 191.789 },
  { temperature: 500, heatCapacity: 29.58, enthalpy: 5.911, entropy: 206.739 },
  { temperature: 1000, heatCapacity: 32.697, enthalpy: 21.463, entropy: 228.17 },
];

describe('the property table of a species', () => {
  it.each(janaf)('agrees with printed tables at $temperature K', ({ temperature, ...printed }) => {
    const row = temperatures.indexOf(temperature);
    expect(Math.abs(table.heatCapacities[row]! / printed.heatCapacity - 1)).toBeLessThan(1e-3);
    expect(Math.abs(table.enthalpies[row]! / 1e3 - printed.enthalpy)).toBeLessThan(0.03);
    expect(Math.abs(table.entropies[row]! - printed.entropy)).toBeLessThan(0.03);
    // Of an element, H counts from itself: G = (H - H298) - T S.
    const gibbs = printed.enthalpy - (temperature * printed.entropy) / 1e3;
    expect(Math.abs(table.gibbsEnergies[row]! / 1e3 - gibbs)).toBeLessThan(0.06);
  });

  it('has viscosity and conductivity of the dilute gas', () => {
    // Lemmon & Jacobsen (2004), Int. J. Thermophys. 25, 21: 17.89 µPa s and 25.9 mW/(m K) at 300 K, 0.1 MPa (from memory); estimates, 3 and 5 %.
    expect(Math.abs(table.viscosities[1]! / 17.89e-6 - 1)).toBeLessThan(0.03);
    expect(Math.abs(table.thermalConductivities[1]! / 25.9e-3 - 1)).toBeLessThan(0.05);
    expect([table.viscosityMethod, table.conductivityMethod]).toEqual(['chung', 'chungConductivity']);
  });

  it('leaves empty what the record does not tell', () => {
    const bare = propertyTable({ id: 'X', molarMass: 0.03, source: 'test' }, [300]);
    for (const column of [bare.heatCapacities, bare.viscosities, bare.thermalConductivities]) {
      expect(Array.from(column)).toEqual([Number.NaN]);
    }
    expect(bare.viscosityMethod).toBeUndefined();
    expect(speciesCharts(nitrogen, bare)).toEqual([]);
    expect(propertyCsv(bare).split('\r\n')[1]).toBe('300,,,,,,');
  });
});

describe('the report', () => {
  it('names a source for every value, and every source it numbers', () => {
    for (const species of allSpeciesFacts()) {
      const properties = propertyTable(findLibrarySpecies(species.id)!, [500]);
      const text = speciesReport(species, properties, false);
      const used = new Set(Array.from(text.matchAll(/ {2}\[(\d+)\]/g), ([, mark]) => mark));
      const listed = Array.from(text.matchAll(/^ {2}- \[(\d+)\] \S/gm), ([, mark]) => mark);
      expect(listed.length).toBeGreaterThan(3);
      expect([...used].sort()).toEqual([...listed].sort());
      for (const caution of species.cautions) {
        expect(text.replace(/\s+/g, ' ')).toContain(caution.replace(/\s+/g, ' '));
      }
      expect(text).not.toMatch(/undefined|NaN|\[object/);
    }
  });

  it('marks what is no measurement read in print', () => {
    const text = speciesReport(
      speciesFacts('phthalic_anhydride')!,
      propertyTable(findLibrarySpecies('phthalic_anhydride')!, [500]),
      false,
    );
    expect(text).toMatch(/critical temperature +791 K {2}\[\d+\] estimated/);
    expect(text).toMatch(/molar mass +148\.117 g\/mol {2}\[\d+\] from memory/);
  });

  it('prints a temperature that is no whole number with its decimals', () => {
    expect(speciesReport(nitrogen, table, false)).toMatch(/^ +298\.15 +29\.12 /m);
  });

  it('says by what viscosity and conductivity are known', () => {
    const of = (id: string): string =>
      speciesReport(speciesFacts(id)!, propertyTable(findLibrarySpecies(id)!, [500]), false);
    expect(of('N2')).toMatch(/viscosity: estimate after Chung/);
    expect(of('H2')).toMatch(/viscosity: kinetic theory/);
    expect(of('H2O')).toMatch(/viscosity: IAPWS/);
  });

  it('keeps prose within a hundred columns', () => {
    const prose = speciesReport(nitrogen, table, false)
      .split('\n')
      .filter((line) => line.startsWith('  - '));
    expect(prose.length).toBeGreaterThan(5);
    for (const line of prose) expect(line.length).toBeLessThanOrEqual(100);
  });

  it('has no colour where none is wanted', () => {
    expect(speciesReport(nitrogen, table, false)).not.toContain(escape);
    expect(speciesList([nitrogen], false)).not.toContain(escape);
    expect(speciesReport(nitrogen, table, true)).toContain(escape);
    expect(speciesList([nitrogen], true)).toContain(escape);
  });
});

describe('for machines', () => {
  it('the JSON has units in its keys, SI, and null for what is not known', () => {
    const json = JSON.parse(JSON.stringify(speciesJson(nitrogen, table))) as {
      values: Record<string, { value: number; source: string; quality: string | null }>;
      properties: Record<string, (number | null)[]>;
    };
    // Span et al. (2000), J. Phys. Chem. Ref. Data 29, 1361: 126.192 K, 3.3958 MPa.
    expect(json.values['critical_temperature_K']!.value).toBeCloseTo(126.192, 3);
    expect(json.values['critical_pressure_Pa']!.value / 3.3958e6).toBeCloseTo(1, 4);
    expect(json.properties['T_K']).toEqual(temperatures);
    expect(Object.keys(json.properties)).toEqual(propertyCsv(table).split('\r\n')[0]!.split(','));
  });

  it('the CSV has a row per temperature in full precision', () => {
    const lines = propertyCsv(table).trimEnd().split('\r\n');
    expect(lines).toHaveLength(1 + temperatures.length);
    expect(Number(lines[4]!.split(',')[1])).toBe(table.heatCapacities[3]);
  });
});

describe('the charts', () => {
  it('name quantity and unit on both axes and draw the values in that unit', () => {
    const charts = speciesCharts(nitrogen, table);
    const titles = charts.map(({ configuration }) => {
      const { x, y } = configuration.options!.scales as Record<'x' | 'y', { title: { text: string } }>;
      return `${x.title.text}; ${y.title.text}`;
    });
    expect(titles).toEqual([
      'Temperature / K; Heat capacity / J/(mol K)',
      'Temperature / K; Viscosity / µPa s',
      'Temperature / K; Thermal conductivity / mW/(m K)',
    ]);
    const viscosities = charts[1]!.configuration.data.datasets[0]!.data as { x: number; y: number }[];
    expect(viscosities[1]!.x).toBe(300);
    expect(Math.abs(viscosities[1]!.y / 17.89 - 1)).toBeLessThan(0.03);
  });
});
