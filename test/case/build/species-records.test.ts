/** Own records, records that change one of the library, and species files beside the case. */
import { describe, expect, it } from 'vitest';
import { readCase, type ReadCase } from '../../../src/case/read-case.js';
import { CaseError } from '../../../src/diagnostics/case-error.js';
import type { SpeciesRecord } from '../../../src/properties/species-record.js';
import { findLibrarySpecies } from '../../../src/properties/species/library.js';
import { createSpeciesThermochemistry } from '../../../src/properties/thermochemistry.js';

const caseWith = (species: string, more = ''): string => `bedwright: 1
${more}species: ${species}
reactions: [{name: r, equation: A -> B, rate: k * c.A, per: pellet_volume, constants: {k: 1 1/s}, heat: -10 kJ/mol}]
feed: {temperature: 500 K, pressure: 2 bar, velocity: 1 m/s, mole_fractions: {A: 1}}
pellet: {shape: {sphere: {diameter: 3 mm}}, density: 1500 kg/m^3, method: intrinsic}
bed: {tube_diameter: 40 mm, length: 1 m, void_fraction: 0.4, pressure_drop: none}
heat: {mode: isothermal}
`;

const reads = (text: string, files: Readonly<Record<string, string>> = {}): ReadCase =>
  readCase(text, 'case.yaml', { readSpeciesFile: (name) => ({ fileName: name, source: files[name]! }) });
const firstSpecies = (species: string, files?: Readonly<Record<string, string>>): SpeciesRecord =>
  reads(caseWith(species, files ? `species_files: [${Object.keys(files).join(', ')}]\n` : ''), files)
    .specification.species[0]!;

function faults(text: string, files: Readonly<Record<string, string>> = {}): CaseError {
  try {
    reads(text, files);
  } catch (error) {
    if (error instanceof CaseError) return error;
    throw error;
  }
  throw new Error('the case was accepted');
}

describe('own records', () => {
  it('take every property in its unit', () => {
    const record =
      firstSpecies(`{A: {formula: C2H4O2, critical_temperature: 319 degC, critical_pressure: 57.9 bar,
      critical_volume: 171 cm^3/mol, acentric_factor: 0.46, dipole_moment: 1.74 debye, association_factor: 0.0916,
      diffusion_volume: 51.9, collision_diameter: 4.3 angstrom, well_depth: 430 K,
      viscosity: 1.3e-5 Pa s * (T / 400 K)^0.9, thermal_conductivity: 25 mW/(m K)}, B: {formula: C2H4O2}}`);
    expect(record.criticalTemperature).toBeCloseTo(592.15, 10);
    expect(record.criticalPressure).toBeCloseTo(5.79e6, 3);
    expect(record.criticalVolume).toBeCloseTo(1.71e-4, 14);
    expect(record.acentricFactor).toBe(0.46);
    // 1 debye = 3.33564e-30 C m.
    expect(record.dipoleMoment! / (1.74 * 3.33564e-30)).toBeCloseTo(1, 12);
    expect(record.associationFactor).toBe(0.0916);
    expect(record.diffusionVolume).toBe(51.9);
    expect(record.lennardJones!.collisionDiameter).toBeCloseTo(4.3e-10, 20);
    expect(record.lennardJones!.wellDepth).toBe(430);
    expect(record.viscosity!.kind).toBe('formula');
    expect(record.thermalConductivity).toEqual({ kind: 'constant', value: 0.025 });
  });

  it('one Lennard-Jones constant alone is a fault', () => {
    const { problems } = faults(caseWith('{A: {formula: C2H4, well_depth: 300 K}, B: {formula: C2H4}}'));
    expect(problems.map(({ code, path }) => `${code} ${path}`)).toEqual(['missing_property species.A']);
  });

  it.each(['1.5', '-1 debye', '25 debye', '1.5 D', '[1.5 debye]'])(
    'a dipole moment of %s is refused',
    (text) => {
      const { problems } = faults(
        caseWith(`{A: {formula: C2H4, dipole_moment: ${text}}, B: {formula: C2H4}}`),
      );
      expect(problems.map(({ path }) => path)).toEqual(['species.A.dipole_moment']);
      expect(problems[0]!.expected).toContain('debye');
    },
  );

  it.each([
    ['a viscosity in the unit of a diffusivity', 'viscosity: 1e-5 m^2/s', 'wrong_dimension', 'viscosity'],
    ['a critical pressure without unit', 'critical_pressure: 50', 'missing_unit', 'critical_pressure'],
    ['a critical temperature of zero', 'critical_temperature: 0 K', 'out_of_range', 'critical_temperature'],
    ['a critical volume per mass', 'critical_volume: 3 cm^3/g', 'wrong_dimension', 'critical_volume'],
    [
      'a well depth in joules',
      'well_depth: 3e-21 J, collision_diameter: 4 angstrom',
      'wrong_dimension',
      'well_depth',
    ],
    ['an acentric factor with a unit', 'acentric_factor: 0.3 K', 'wrong_type', 'acentric_factor'],
    [
      'a conductivity formula in other units',
      'thermal_conductivity: 1 W/m * T',
      'wrong_dimension',
      'thermal_conductivity',
    ],
    ['a formula that names a species', 'viscosity: 1e-5 Pa s * T / 300 K * y.A', 'bad_formula', 'viscosity'],
  ])('%s is refused', (_what, text, code, key) => {
    const { problems } = faults(caseWith(`{A: {formula: C2H4, ${text}}, B: {formula: C2H4}}`));
    expect(problems.map((problem) => `${problem.code} ${problem.path}`)).toEqual([
      `${code} species.A.${key}`,
    ]);
  });
});

describe('records that change one of the library', () => {
  const library = findLibrarySpecies('methanol')!;

  it('keep what they do not state, under an id of their own', () => {
    const record = firstSpecies('{A: {from: methanol, critical_pressure: 81 bar}, B: {from: methanol}}');
    expect(record.id).toBe('A');
    expect(record.criticalPressure).toBeCloseTo(8.1e6, 3);
    expect({
      ...record,
      id: library.id,
      criticalPressure: library.criticalPressure,
      source: library.source,
    }).toEqual(library);
    expect(record.source).toContain('own record in the case');
    expect(record.source).toContain(library.source);
  });

  it('move the polynomials with a given heat of formation and entropy: values at 298.15 K as given, heat capacities as they were', () => {
    const record = firstSpecies(
      '{A: {from: methanol, heat_of_formation: -205 kJ/mol, entropy: 241 J/(mol K)}, B: {from: methanol}}',
    );
    const [changed, before] = [record, library].map(createSpeciesThermochemistry);
    expect(changed!.enthalpy(298.15)).toBeCloseTo(-205e3, 6);
    expect(changed!.entropy(298.15)).toBeCloseTo(241, 9);
    for (const temperature of [300, 700, 1200]) {
      expect(changed!.heatCapacity(temperature)).toBe(before!.heatCapacity(temperature));
      expect(changed!.enthalpy(temperature) - before!.enthalpy(temperature)).toBeCloseTo(
        -205e3 - before!.enthalpy(298.15),
        5,
      );
    }
  });

  it('stand among the assumptions with what was changed', () => {
    const { assumptions } = reads(
      caseWith('{A: {from: methanol, viscosity: 1.7e-5 Pa s}, B: {from: methanol}}'),
    ).specification;
    expect(
      assumptions.some(({ about, statement }) => about === 'species.A' && statement.includes('viscosity')),
    ).toBe(true);
  });

  it('change one Lennard-Jones constant alone where the library holds both', () => {
    const { lennardJones } = firstSpecies('{A: {from: N2, well_depth: 95 K}, B: {from: N2}}');
    expect(lennardJones).toEqual({ ...findLibrarySpecies('N2')!.lennardJones, wellDepth: 95 });
  });

  it('with polynomials of their own, leave the library’s heat of formation and entropy out', () => {
    const own =
      '{from: N2, heat_capacity: {nasa: [{from: 200 K, to: 3000 K, coefficients: [3.5, 0, 0, 0, 0, 2000, 4]}]}}';
    const record = firstSpecies(`{A: ${own}, B: {from: N2}}`);
    expect(record.enthalpyOfFormation).toBeUndefined();
    // H/R = 3.5 T + 2000 K, with the molar gas constant of the SI.
    const enthalpy = createSpeciesThermochemistry(record).enthalpy(298.15);
    expect(enthalpy / (8.31446261815324 * (3.5 * 298.15 + 2000))).toBeCloseTo(1, 10);
  });

  it('keep the library’s heat of formation beside a heat capacity of their own', () => {
    const record = firstSpecies('{A: {from: methanol, heat_capacity: 50 J/(mol K)}, B: {from: methanol}}');
    const thermochemistry = createSpeciesThermochemistry(record);
    expect(thermochemistry.enthalpy(298.15)).toBeCloseTo(library.enthalpyOfFormation!, 6);
    expect(thermochemistry.enthalpy(398.15) - thermochemistry.enthalpy(298.15)).toBeCloseTo(5000, 6);
  });

  it('an unknown id is refused with the nearest one', () => {
    const { problems } = faults(caseWith('{A: {from: methanoll}, B: {from: methanol}}'));
    expect(problems.map(({ code, path }) => `${code} ${path}`)).toEqual(['unknown_name species.A.from']);
    expect(problems[0]!.mend).toContain('methanol');
  });
});

describe('species files', () => {
  const plant = `bedwright_species: 1
species:
  A: {formula: C3H8O, heat_of_formation: -272 kJ/mol}
  N2: {from: library, heat_of_formation: 1 J/mol}
`;

  it('serve `library` before the built-in one, and the case says whose data it uses', () => {
    const { specification } = reads(
      caseWith('{A: library, B: {formula: C3H8O}, N2: library}', 'species_files: [plant.yaml]\n'),
      { 'plant.yaml': plant },
    );
    expect(specification.species[0]!.enthalpyOfFormation).toBe(-272e3);
    expect(specification.species[2]!.enthalpyOfFormation).toBe(1);
    const about = (id: string): string =>
      specification.assumptions.find((entry) => entry.about === `species.${id}`)!.statement;
    expect(about('A')).toBe('data of A from plant.yaml');
    expect(about('N2')).toBe('data of N2 from plant.yaml, not those of the species library');
  });

  it('the first file that holds an id wins', () => {
    const record = firstSpecies('{A: library, B: {formula: C3H8O}}', {
      'one.yaml': plant,
      'two.yaml': plant.replace('-272', '-300'),
    });
    expect(record.enthalpyOfFormation).toBe(-272e3);
  });

  it('bring their assumptions along, under the id of the case', () => {
    const { assumptions } = reads(
      caseWith('{A: {from: N2}, B: {from: N2}}', 'species_files: [plant.yaml]\n'),
      { 'plant.yaml': plant },
    ).specification;
    const statements = assumptions
      .filter(({ about }) => about === 'species.A')
      .map(({ statement }) => statement);
    expect(statements).toContain(
      'in plant.yaml, heat_of_formation of N2 as given, in place of the library’s',
    );
  });

  it('bring their warnings along, at their name in the case', () => {
    const { warnings } = reads(
      caseWith('{A: library, B: {formula: C3H8O}}', 'species_files: [plant.yaml]\n'),
      { 'plant.yaml': plant.replace('C3H8O,', 'C3H8O, molar_mass: 61 g/mol,') },
    );
    expect(warnings.map(({ code, path }) => `${code} ${path}`)).toEqual(['inconsistent species_files[0]']);
    expect(warnings[0]!.found).toMatch(/^in plant\.yaml, species\.A\.molar_mass, /);
  });

  it.each([
    '../plant.yaml',
    '/etc/plant.yaml',
    'sub/plant.yaml',
    'plant.txt',
    'case.yaml',
    'CASE.YAML',
    '.hidden.yaml',
    'a\\b.yaml',
  ])('a name such as %s is refused', (name) => {
    const { problems, fileName } = faults(
      caseWith('{A: {formula: C3H8O}, B: {formula: C3H8O}}', `species_files: ['${name}']\n`),
    );
    expect(fileName).toBe('case.yaml');
    expect(problems.map(({ code, path }) => `${code} ${path}`)).toEqual(['wrong_value species_files[0]']);
  });

  it('the same file twice is a fault', () => {
    const { problems } = faults(
      caseWith('{A: library, B: {formula: C3H8O}}', 'species_files: [plant.yaml, plant.yaml]\n'),
      { 'plant.yaml': plant },
    );
    expect(problems.map(({ path }) => path)).toEqual(['species_files[1]']);
  });

  it('without a way to read files a case that names one is refused', () => {
    expect(() =>
      readCase(caseWith('{A: library, B: {formula: C3H8O}}', 'species_files: [plant.yaml]\n'), 'c'),
    ).toThrow(CaseError);
  });
});
