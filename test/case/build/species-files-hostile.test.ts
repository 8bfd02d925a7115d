/** Species files at fault or hostile: each ends in one CaseError that names its own file, line and column, and nothing is taken from it. */
import { describe, expect, it } from 'vitest';
import { decodeCase, largestCaseBytes } from '../../../src/case/decode-case.js';
import { readCase } from '../../../src/case/read-case.js';
import { CaseError } from '../../../src/diagnostics/case-error.js';
import { createLineIndex } from '../../../src/diagnostics/line-index.js';
import type { ProblemCode } from '../../../src/diagnostics/problem.js';

const caseText = `bedwright: 1
species_files: [plant.yaml]
species: {A: library, B: {formula: C3H8O}}
reactions: [{name: r, equation: A -> B, rate: k * c.A, per: pellet_volume, constants: {k: 1 1/s}, heat: -10 kJ/mol}]
feed: {temperature: 500 K, pressure: 2 bar, velocity: 1 m/s, mole_fractions: {A: 1}}
pellet: {shape: {sphere: {diameter: 3 mm}}, density: 1500 kg/m^3, method: intrinsic}
bed: {tube_diameter: 40 mm, length: 1 m, void_fraction: 0.4, pressure_drop: none}
heat: {mode: isothermal}
`;

const plant = `bedwright_species: 1
species:
  A: {formula: C3H8O, heat_of_formation: -272 kJ/mol}
  N2: {from: library, entropy: 191 J/(mol K)}
`;

function refusalOf(bytes: string | Uint8Array): CaseError {
  const encoded = typeof bytes === 'string' ? new TextEncoder().encode(bytes) : bytes;
  const readSpeciesFile = (name: string): { fileName: string; source: string } => ({
    fileName: `plants/${name}`,
    source: decodeCase(encoded, `plants/${name}`),
  });
  try {
    readCase(caseText, 'plants/case.yaml', { readSpeciesFile });
  } catch (error) {
    if (error instanceof CaseError) return error;
    throw error;
  }
  throw new Error('the species file was accepted');
}

/** The good file with one piece replaced; `«` in the new text marks where the fault must be reported. */
const edits: readonly (readonly [
  name: string,
  search: string,
  replacement: string,
  code: ProblemCode,
  path: string,
])[] = [
  ['an unknown element', 'C3H8O', 'C3H8«Zz', 'bad_formula', 'species.A.formula'],
  [
    'a typing error in a key',
    'heat_of_formation',
    '«heat_of_fromation',
    'unknown_key',
    'species.A.heat_of_fromation',
  ],
  ['a value without unit', '-272 kJ/mol', '«-272', 'missing_unit', 'species.A.heat_of_formation'],
  ['another version', '_species: 1', '_species: «7', 'wrong_value', 'bedwright_species'],
  ['no version', 'bedwright_species: 1\n', '«', 'missing_key', ''],
  ['a key of a case', 'species:\n', '«feed: 1\nspecies:\n', 'unknown_key', 'feed'],
  [
    'a record that is a number',
    '{from: library, entropy: 191 J/(mol K)}',
    '«28',
    'wrong_value',
    'species.N2',
  ],
  ['a record that is a list', '{from: library, entropy: 191 J/(mol K)}', '[1]', 'wrong_value', 'species.N2'],
  ['an id that is no identifier', 'N2:', '«N-2:', 'bad_identifier', 'species.N-2'],
  ['__proto__ as an id', 'N2:', '«__proto__:', 'bad_identifier', 'species.__proto__'],
  [
    '__proto__ as a key',
    '{from: library,',
    '{from: library, «__proto__: {molarMass: 1},',
    'unknown_key',
    'species.N2.__proto__',
  ],
  [
    'constructor as a key',
    '{from: library,',
    '{from: library, «constructor: 1,',
    'unknown_key',
    'species.N2.constructor',
  ],
  [
    'a prototype’s name to start from',
    'from: library',
    'from: «__proto__',
    'unknown_name',
    'species.N2.from',
  ],
  [
    'a prototype’s method to start from',
    'from: library',
    'from: «toString',
    'unknown_name',
    'species.N2.from',
  ],
  ['an id twice', 'N2:', '«A:', 'duplicate_key', ''],
  ['an anchor', 'N2: {', 'N2: &a «{', 'yaml_forbidden', ''],
  ['a tag', 'N2: {', 'N2: «!!js/function {', 'yaml_syntax', ''],
];

describe('a species file at fault', () => {
  it.each(edits)('%s is reported at its place', (_name, search, replacement, code, path) => {
    const at = plant.indexOf(search);
    if (at < 0) throw new Error(`the good file does not hold ${search}`);
    const text = plant.slice(0, at) + replacement.replace('«', '') + plant.slice(at + search.length);
    const { fileName, sourceText, problems } = refusalOf(text);
    expect(fileName).toBe('plants/plant.yaml');
    const [problem] = problems;
    expect(`${problem!.code} ${problem!.path}`).toBe(`${code} ${path}`);
    if (!replacement.includes('«')) return;
    const placeOf = createLineIndex(text);
    expect(createLineIndex(sourceText)(problem!.span.start)).toEqual(placeOf(at + replacement.indexOf('«')));
  });

  it('all faults of a file are reported in one go', () => {
    const { problems } = refusalOf(plant.replace('C3H8O', 'C3H8Zz').replace('191 J/(mol K)', '191 J'));
    expect(problems.map(({ path }) => path)).toEqual(['species.A.formula', 'species.N2.entropy']);
  });

  it.each<readonly [name: string, bytes: string | Uint8Array, code: ProblemCode]>([
    ['too large', `${plant}#${'x'.repeat(largestCaseBytes)}`, 'file_too_large'],
    ['no text', new Uint8Array([0xff, 0xfe, 0x00, 0x41]), 'not_text'],
    ['a control character', plant.replace('C3H8O', 'C3H8O\u0007'), 'not_text'],
    ['empty', '', 'empty_case'],
    ['a list', '- 1\n', 'wrong_type'],
    ['a single value', 'library\n', 'wrong_type'],
    ['two documents', `${plant}---\n${plant}`, 'yaml_forbidden'],
    ['without species', 'bedwright_species: 1\n', 'missing_key'],
    [
      'with too many species',
      `bedwright_species: 1\nspecies: {${Array.from({ length: 300 }, (_, k) => `S${k}: {formula: H2}`).join(', ')}}\n`,
      'out_of_range',
    ],
    ['deeply nested lists', `bedwright_species: 1\nspecies: ${'['.repeat(100_000)}`, 'yaml_forbidden'],
    [
      'deeply nested maps',
      `bedwright_species: 1\nspecies: ${'{a: '.repeat(20_000)}1${'}'.repeat(20_000)}`,
      'yaml_forbidden',
    ],
  ])('a file that is %s is refused', (_name, bytes, code) => {
    const { fileName, problems } = refusalOf(bytes);
    expect(fileName).toBe('plants/plant.yaml');
    expect(problems.map((problem) => problem.code)).toContain(code);
  });

  it('nothing of a hostile file reaches the prototype of all objects', () => {
    refusalOf(plant.replace('N2:', '__proto__:').replace('from: library', 'polluted: 1'));
    expect(({} as Record<string, unknown>)['polluted']).toBeUndefined();
    expect(Object.hasOwn(Object.prototype, 'molarMass')).toBe(false);
  });
});
