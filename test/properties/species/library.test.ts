import { describe, expect, it } from 'vitest';
import { findLibrarySpecies, librarySpeciesIds } from '../../../src/properties/species/library.js';
import { libraryEntries } from '../../../src/properties/species/library-data.js';
import { librarySources } from '../../../src/properties/species/library-sources.js';

describe('species library', () => {
  it('holds each id once, as an identifier a case can use', () => {
    const ids = librarySpeciesIds();
    expect(ids.length).toBeGreaterThanOrEqual(59);
    expect(new Set(ids).size).toBe(ids.length);
    for (const id of ids) expect(id).toMatch(/^[A-Za-z][A-Za-z0-9_]*$/);
  });

  it.each(['__proto__', 'constructor', 'toString', 'hasOwnProperty', '', 'h2o', ' H2O', 'library'])(
    'does not know %j',
    (id) => expect(findLibrarySpecies(id)).toBeUndefined(),
  );

  it('gives SI values', () => {
    // Handbook values: methane 16.04 g/mol, Tc 190.56 K, pc 45.99 bar, Vc 98.6 cm³/mol; water 1.855 D = 6.187e-30 C m (from memory).
    const methane = findLibrarySpecies('CH4')!;
    expect(methane.molarMass).toBeCloseTo(0.016043, 5);
    expect(methane.elements).toEqual({ C: 1, H: 4 });
    expect(methane.criticalTemperature).toBeCloseTo(190.56, 1);
    expect(methane.criticalPressure! / 45.99e5).toBeCloseTo(1, 3);
    expect(methane.criticalVolume! / 98.6e-6).toBeCloseTo(1, 2);
    expect(findLibrarySpecies('H2O')!.dipoleMoment! / 6.187e-30).toBeCloseTo(1, 2);
  });

  it('names a source that says what was shifted or computed', () => {
    expect(findLibrarySpecies('NH3')!.source).toContain('Active Thermochemical Tables');
    expect(findLibrarySpecies('phthalic_anhydride')!.source).toMatch(
      /computed.*heat of formation: Cox & Pilcher/,
    );
  });

  it('uses every source it lists', () => {
    const used = new Set(
      JSON.stringify(libraryEntries)
        .match(/"[A-Za-z0-9]+"/g)
        ?.map((text) => text.slice(1, -1)),
    );
    for (const key of Object.keys(librarySources)) expect(used).toContain(key);
  });
});

/** Standard atomic weights, abridged, g/mol. @source IUPAC (2021), Pure Appl. Chem. 94, 573 */
const atomicWeights: Record<string, number> = {
  H: 1.008,
  He: 4.0026,
  C: 12.011,
  N: 14.007,
  O: 15.999,
  S: 32.06,
  Cl: 35.45,
  Ar: 39.95,
};

describe.each(libraryEntries.map((entry) => [entry.id, entry] as const))('%s', (id, entry) => {
  it('molar mass follows from its atoms', () => {
    const sum = Object.entries(entry.elements).reduce(
      (mass, [symbol, count]) => mass + count * atomicWeights[symbol]!,
      0,
    );
    // Last printed digit of a molar mass in g/mol to three places; air's composition is printed to five digits.
    expect(Math.abs(1000 * entry.molarMass[0] - sum)).toBeLessThan(id === 'air' ? 2e-3 : 1e-3);
  });

  it('registry number has its check digit', () => {
    // Chemical Abstracts Service: digits weighted from the right, modulo 10.
    const digits = Array.from(entry.registryNumber.replaceAll('-', ''), Number);
    const check = digits.pop();
    const sum = digits.reverse().reduce((total, digit, index) => total + digit * (index + 1), 0);
    expect(sum % 10).toBe(check);
  });

  it('critical compressibility is that of a fluid', () => {
    // Zc lies between 0.18 (acetic acid) and 0.31 (quantum gases), Poling et al. 5th ed., ch. 2.
    const compressibility =
      (entry.criticalPressure[0] * entry.criticalVolume[0]) / (8.314462618 * entry.criticalTemperature[0]);
    expect(compressibility).toBeGreaterThan(0.18);
    expect(compressibility).toBeLessThan(0.32);
  });

  it('diffusion volume, where it is a sum of increments, is that sum', () => {
    // Fuller, Ensley & Giddings (1969): C 15.9, H 2.31, O 6.11, N 4.54, Cl 21.0, S 22.9, aromatic or heterocyclic ring -18.3.
    const increments: Record<string, number> = { C: 15.9, H: 2.31, O: 6.11, N: 4.54, Cl: 21, S: 22.9 };
    const tabulated = ['H2', 'He', 'N2', 'O2', 'Ar', 'air', 'CO', 'CO2', 'N2O', 'NH3', 'H2O', 'Cl2', 'SO2'];
    if (tabulated.includes(id)) return;
    const rings: Record<string, number> = {
      benzene: 1,
      toluene: 1,
      ethylbenzene: 1,
      styrene: 1,
      o_xylene: 1,
      m_xylene: 1,
      p_xylene: 1,
      naphthalene: 2,
      phthalic_anhydride: 2,
      maleic_anhydride: 1,
      ethylene_oxide: 1,
    };
    const sum = Object.entries(entry.elements).reduce(
      (total, [symbol, count]) => total + count * increments[symbol]!,
      0,
    );
    expect(entry.diffusionVolume[0]).toBeCloseTo(sum - 18.3 * (rings[id] ?? 0), 2);
  });
});
