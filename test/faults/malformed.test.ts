/** Cases that are at fault: each must end in one CaseError that names what is wrong at its line and column, and in nothing else. */
import { describe, expect, it } from 'vitest';
import { decodeCase } from '../../src/case/decode-case.js';
import { readCase } from '../../src/case/read-case.js';
import { formatCaseError } from '../../src/diagnostics/format-problem.js';
import { createLineIndex } from '../../src/diagnostics/line-index.js';
import type { ProblemCode } from '../../src/diagnostics/problem.js';
import { caseText, labels, refusalOf } from '../case/case-texts.js';

const good = caseText('salt-cooled-oxidation');

/* eslint-disable no-control-regex -- control characters are what is looked for */
/** A stack, a slip of the program's own, or something that a terminal would obey. */
const unfit =
  /\n\s+at |\bError\b|undefined|NaN|\[object|[\u0000-\u0009\u000b-\u001f\u007f-\u009f\u202a-\u202e]/;
/* eslint-enable no-control-regex */

/** The good case with one piece of text replaced; `«` and `»` around part of the new text mark where the fault must be reported. */
function edited(
  search: string,
  replacement: string,
): { text: string; place: { line: number; column: number } } {
  const at = good.indexOf(search);
  if (at < 0) throw new Error(`the good case does not hold ${search}`);
  const mark = replacement.indexOf('«');
  const plain = replacement.replace(/[«»]/g, '');
  const text = good.slice(0, at) + plain + good.slice(at + search.length);
  return { text, place: createLineIndex(text)(at + Math.max(mark, 0)) };
}

type EditRow = readonly [name: string, search: string, replacement: string, code: ProblemCode, path: string];

const edits: readonly EditRow[] = [
  ['version missing', 'bedwright: 1\n', '', 'missing_key', ''],
  ['version of another kind', 'bedwright: 1', 'bedwright: «2»', 'wrong_value', 'bedwright'],
  [
    'bare number for a length',
    'diameter: 4 mm',
    'diameter: «4»',
    'missing_unit',
    'pellet.shape.sphere.diameter',
  ],
  [
    'bare number for a temperature',
    'temperature: 625 K\n',
    'temperature: «625»\n',
    'missing_unit',
    'feed.temperature',
  ],
  ['unit of another dimension', 'length: 3 m', 'length: 3 «kg»', 'wrong_dimension', 'bed.length'],
  ['unknown unit', 'length: 3 m', 'length: 3 «metres»', 'unknown_unit', 'bed.length'],
  ['unit with a digit', '1800 kg/m^3', '1800 kg/«m3»', 'unknown_unit', 'pellet.density'],
  ['unit to be read in two ways', '1060 J/(kg K)', '1060 J«/kg K»', 'bad_quantity', 'fluid.heat_capacity'],
  ['gauge pressure', '1.6 bar', '1.6 «barg»', 'bad_quantity', 'feed.pressure'],
  ['degC in a compound', '0.35 W/(m K)', '0.35 W/(m «degC»)', 'bad_quantity', 'pellet.thermal_conductivity'],
  ['negative length', 'length: 3 m', 'length: «-3 m»', 'out_of_range', 'bed.length'],
  ['zero density', '1800 kg/m^3', '«0 kg/m^3»', 'out_of_range', 'pellet.density'],
  ['void fraction of one', 'void_fraction: 0.42', 'void_fraction: «1»', 'out_of_range', 'bed.void_fraction'],
  [
    'void fraction in percent above all',
    'void_fraction: 0.42',
    'void_fraction: «142 %»',
    'out_of_range',
    'bed.void_fraction',
  ],
  ['number out of all proportion', 'length: 3 m', 'length: «1e999 m»', 'bad_quantity', 'bed.length'],
  ['denormal number', 'length: 3 m', 'length: «1e-310 m»', 'bad_quantity', 'bed.length'],
  ['hexadecimal number', 'length: 3 m', 'length: 0«x10» m', 'unknown_unit', 'bed.length'],
  ['infinity', 'void_fraction: 0.42', 'void_fraction: «.inf»', 'bad_quantity', 'bed.void_fraction'],
  ['not a number', 'void_fraction: 0.42', 'void_fraction: «.nan»', 'bad_quantity', 'bed.void_fraction'],
  [
    'a number beyond all',
    'void_fraction: 0.42',
    'void_fraction: «1e999»',
    'bad_quantity',
    'bed.void_fraction',
  ],
  ['infinity for a count', 'length: 3 m', 'tubes: «.inf»\n  length: 3 m', 'wrong_type', 'bed.tubes'],
  ['nothing where a value is due', 'length: 3 m', '«length»:', 'wrong_type', 'bed.length'],
  ['map where a value is due', 'length: 3 m', '«length»: {long: 3 m}', 'wrong_type', 'bed.length'],
  [
    'list where a map is due',
    'limits: { temperature: 700 K, pressure_drop: 0.5 bar }',
    '«limits»: [700 K]',
    'wrong_type',
    'limits',
  ],
  [
    'text where a map is due',
    'limits: { temperature: 700 K, pressure_drop: 0.5 bar }',
    'limits: «hot»',
    'wrong_type',
    'limits',
  ],
  ['unknown key at the top', 'limits:', '«limmits»:', 'unknown_key', 'limmits'],
  [
    'unknown key in a section',
    'tube_diameter: 25.4 mm',
    '«tube_diametre»: 25.4 mm\n  tube_diameter: 25.4 mm',
    'unknown_key',
    'bed.tube_diametre',
  ],
  [
    'unknown key in a record',
    'name: feed aromatic',
    '«nmae»: feed aromatic',
    'unknown_key',
    'species.A.nmae',
  ],
  [
    'unknown key in a reaction',
    'heat: -1285 kJ/mol',
    '«haet»: -1285 kJ/mol',
    'unknown_key',
    'reactions[0].haet',
  ],
  [
    'unknown key deep down',
    '{ sphere: { diameter: 4 mm } }',
    '{sphere: {diameter: 4 mm, «colour»: blue}}',
    'unknown_key',
    'pellet.shape.sphere.colour',
  ],
  [
    'section missing',
    'heat:\n  mode: cooled\n  overall_coefficient: 110 W/(m^2 K)\n  coolant: { temperature: 625 K }\n',
    '',
    'missing_key',
    '',
  ],
  ['key missing', '  length: 3 m\n', '', 'missing_key', 'bed'],
  ['key twice', 'length: 3 m', 'length: 3 m\n  «length»: 4 m', 'duplicate_key', ''],
  ['species twice', '  O2: library', '  O2: library\n  «O2»: library', 'duplicate_key', ''],
  [
    'equation that does not balance',
    'A + 3 O2 -> P + 3 H2O',
    '«A + 3 O2 -> P + 2 H2O»',
    'element_balance',
    'reactions[0].equation',
  ],
  [
    'unknown species in an equation',
    'A + 3 O2 -> P + 3 H2O',
    'A + 3 «O3» -> P + 3 H2O',
    'unknown_name',
    'reactions[0].equation',
  ],
  [
    'equation without an arrow',
    'A + 3 O2 -> P + 3 H2O',
    '«A + 3 O2, P + 3 H2O»',
    'wrong_value',
    'reactions[0].equation',
  ],
  [
    'equation with another arrow',
    'A + 3 O2 -> P + 3 H2O',
    'A + 3 O2 «=>» P + 3 H2O',
    'wrong_value',
    'reactions[0].equation',
  ],
  [
    'unknown species in a law',
    'rate: k * p.P * p.O2',
    'rate: k * p.«Q» * p.O2',
    'unknown_name',
    'reactions[2].rate',
  ],
  [
    'unknown constant',
    'rate: k * p.P * p.O2',
    'rate: «kk» * p.P * p.O2',
    'unknown_name',
    'reactions[2].rate',
  ],
  [
    'law of the wrong dimension',
    'rate: k * p.P * p.O2',
    'rate: «k * p.P»',
    'wrong_dimension',
    'reactions[2].rate',
  ],
  [
    'sum of unlike things',
    'rate: k * p.P * p.O2',
    'rate: k * («p.P + c.O2») * p.O2',
    'wrong_dimension',
    'reactions[2].rate',
  ],
  [
    'law that calls a function',
    'rate: k * p.P * p.O2',
    'rate: «sin»(k) * p.P',
    'bad_formula',
    'reactions[2].rate',
  ],
  ['law with an assignment', 'rate: k * p.P * p.O2', 'rate: k «=» 3', 'bad_formula', 'reactions[2].rate'],
  [
    'energy without its unit',
    'activation_energy: 113 kJ/mol',
    'activation_energy: «113»',
    'missing_unit',
    'reactions[0].constants.k.activation_energy',
  ],
  [
    'energy without its temperature',
    ', at: 640 K, activation',
    ', activation',
    'wrong_value',
    'reactions[0].constants.k',
  ],
  [
    'value and prefactor',
    "{ prefactor: '6.0e7",
    "{ value: 1 mol/(kg s bar^2), prefactor: '6.0e7",
    'wrong_value',
    'reactions[2].constants.k',
  ],
  [
    'reserved name of a constant',
    'rate: k * p.P * p.O2\n    constants:\n      k:',
    'rate: T * p.P * p.O2\n    constants:\n      «T»:',
    'bad_identifier',
    'reactions[2].constants.T',
  ],
  ['two reactions of one name', 'name: burn', 'name: «selective»', 'inconsistent', 'reactions[1].name'],
  [
    'name of a reaction with a blank',
    'name: burn',
    'name: «burn all»',
    'bad_identifier',
    'reactions[1].name',
  ],
  [
    'id of a species with a dash',
    '  N2: library',
    '  N2: library\n  «N-2»: library',
    'bad_identifier',
    'species.N-2',
  ],
  [
    'species that the library does not hold',
    '  N2: library',
    '  N2: library\n  Xq: «library»',
    'unknown_name',
    'species.Xq',
  ],
  ['formula of unknown elements', 'formula: C8H10', 'formula: C8«Qq»10', 'bad_formula', 'species.A.formula'],
  [
    'record without molar mass and formula',
    '{ name: feed aromatic, formula: C8H10 }',
    '{ name: feed aromatic }',
    'missing_property',
    'species.A',
  ],
  [
    'fractions above one',
    'O2: 20.8 %, N2: balance',
    'O2: 99.8 %, N2: balance',
    'fraction_sum',
    'feed.mole_fractions',
  ],
  ['fractions that do not sum to one', 'N2: balance', 'N2: 70 %', 'fraction_sum', 'feed.mole_fractions'],
  [
    'two balances',
    'O2: 20.8 %, N2: balance',
    'O2: balance, N2: «balance»',
    'inconsistent',
    'feed.mole_fractions.N2',
  ],
  ['negative fraction', 'A: 0.9 %,', 'A: «-0.9 %»,', 'out_of_range', 'feed.mole_fractions.A'],
  [
    'unknown species in the feed',
    'A: 0.9 %,',
    'A: 0.9 %, «Ar»: 1 %,',
    'unknown_name',
    'feed.mole_fractions.Ar',
  ],
  [
    'two flows',
    'mass_flux: 1.3 kg/(m^2 s)',
    'mass_flux: 1.3 kg/(m^2 s)\n  velocity: «1 m/s»',
    'inconsistent',
    'feed.velocity',
  ],
  ['no flow', '  mass_flux: 1.3 kg/(m^2 s)\n', '', 'missing_key', 'feed'],
  [
    'formula of the wrong dimension',
    'viscosity: 3.1e-5 Pa s',
    'viscosity: «2 Pa * T / 300 K»',
    'wrong_dimension',
    'fluid.viscosity',
  ],
  [
    'diffusivity of a reactant missing',
    'A: 1.3e-6 m^2/s, P:',
    'P:',
    'missing_property',
    'pellet.effective_diffusivity',
  ],
  [
    'film coefficient of a reactant missing',
    'A: 0.075 m/s, P:',
    'P:',
    'missing_property',
    'pellet.film.mass_transfer',
  ],
  ['conductivity missing', '  thermal_conductivity: 0.35 W/(m K)\n', '', 'missing_property', 'pellet'],
  [
    'shape of no kind',
    '{ sphere: { diameter: 4 mm } }',
    '{«cube»: {edge: 4 mm}}',
    'unknown_key',
    'pellet.shape.cube',
  ],
  ['method of no kind', 'method: full', 'method: «fuul»', 'wrong_value', 'pellet.method'],
  ['coolant missing', '  coolant: { temperature: 625 K }\n', '', 'missing_key', 'heat'],
  [
    'coefficient of an adiabatic bed',
    'mode: cooled\n  overall_coefficient: 110 W/(m^2 K)\n  coolant: { temperature: 625 K }',
    'mode: adiabatic\n  overall_coefficient: «110 W/(m^2 K)»',
    'inconsistent',
    'heat.overall_coefficient',
  ],
  [
    'target of a species that is not fed',
    '{ A: 80 % }',
    '{ P: «80 %» }',
    'inconsistent',
    'targets.conversion.P',
  ],
  [
    'selectivity of nothing',
    '{ of: P, from: A }',
    '{ of: «Z», from: A }',
    'unknown_name',
    'output.selectivity[0].of',
  ],
  [
    'tolerance beyond reason',
    'targets:',
    'numerics: {tolerance: «1»}\ntargets:',
    'out_of_range',
    'numerics.tolerance',
  ],
];

describe('one fault in an otherwise good case', () => {
  it.each(edits)('%s', (_name, search, replacement, code, path) => {
    const { text, place } = edited(search, replacement);
    const error = refusalOf(text);
    expect(labels(error.problems)).toEqual([`${code} ${path}`]);
    if (replacement.includes('«')) {
      expect(createLineIndex(text)(error.problems[0]!.span.start)).toEqual(place);
    }
    const shown = formatCaseError(error);
    expect(shown).toMatch(/^case\.yaml:\d+:\d+/);
    expect(shown).not.toMatch(unfit);
  });
});

/** `«` marks where the fault must be reported; files that could not be decoded have no place. */
const wholeFiles: readonly (readonly [name: string, bytes: Uint8Array | string, code: ProblemCode])[] = [
  ['empty', '', 'empty_case'],
  ['only a comment', '«# nothing here\n', 'empty_case'],
  ['only blank lines', '«\n\n\n', 'empty_case'],
  ['a lone word', '«hello', 'wrong_type'],
  ['a list', '«- 1\n- 2\n', 'wrong_type'],
  ['no YAML', '{{{«{', 'yaml_syntax'],
  ['an unclosed quote', 'title: "abc«\n', 'yaml_syntax'],
  ['an unclosed bracket', 'species: {A: library«\n', 'yaml_syntax'],
  ['a tab as indentation', 'bed:\n«\tlength: 3 m\n', 'yaml_syntax'],
  ['a wrong indentation', 'bed:\n   length: 3 m\n«  tubes: 2\n', 'yaml_syntax'],
  ['two colons in a line', 'title: «a: b\n', 'yaml_syntax'],
  ['two documents', 'bedwright: 1\n«---\nbedwright: 1\n', 'yaml_forbidden'],
  ['a directive', '«%YAML 1.1\n---\nbedwright: 1\n', 'yaml_forbidden'],
  ['an anchor', 'bedwright: &x «1\n', 'yaml_forbidden'],
  ['an alias without its anchor', 'bedwright: «*x\n', 'yaml_forbidden'],
  ['a tag that asks for code', 'title: «!!js/function "function(){}"\n', 'yaml_syntax'],
  ['a known tag', 'title: !!str «abc\n', 'yaml_forbidden'],
  ['a merge key', 'bed:\n  «<<: {length: 3 m}\n', 'yaml_forbidden'],
  ['binary', Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 0xff), 'not_text'],
  ['a NUL in text', 'title: a«\u0000b\n', 'not_text'],
  ['a terminal escape in text', 'title: "«\u001b[31mred"\n', 'not_text'],
  ['UTF-16', Uint8Array.from(Buffer.from('\ufeffbedwright: 1\n', 'utf16le')), 'not_text'],
  ['no UTF-8', Uint8Array.of(0x61, 0x3a, 0x20, 0xc3, 0x28), 'not_text'],
  ['fifty megabytes', new Uint8Array(50_000_000).fill(0x61), 'file_too_large'],
  ['brackets without end', `a: ${'['.repeat(300)}«${'['.repeat(99_700)}`, 'yaml_forbidden'],
  ['dashes without end', `«${'- '.repeat(100_000)}`, 'yaml_forbidden'],
  [
    'indentation without end',
    Array.from({ length: 500 }, (_, k) => `${' '.repeat(k)}a:`).join('\n'),
    'yaml_forbidden',
  ],
  ['entries without end', `a: [${'1,'.repeat(50_000)}1]`, 'yaml_forbidden'],
  [
    'an alias bomb',
    `a: &a «[x,x,x,x,x,x,x,x,x]\n${'bcdefghi'
      .split('')
      .map((key, k) => `${key}: &${key} [${`*${'abcdefgh'[k]!},`.repeat(8)}*${'abcdefgh'[k]!}]`)
      .join('\n')}\n`,
    'yaml_forbidden',
  ],
];

describe('files that are no case at all', () => {
  it.each(wholeFiles)('%s', (_name, marked, code) => {
    const mark = typeof marked === 'string' ? marked.indexOf('«') : -1;
    const file = typeof marked === 'string' ? marked.replace('«', '') : marked;
    const error = refusalOf(file);
    const { problems } = error;
    expect(new Set(problems.map((problem) => problem.code))).toEqual(new Set([code]));
    expect(problems.every(({ path }) => path === '')).toBe(true);
    if (mark >= 0) {
      const placeOf = createLineIndex(file as string);
      expect(placeOf(problems[0]!.span.start)).toEqual(placeOf(mark));
    }
    expect(formatCaseError(error)).not.toMatch(unfit);
  });

  it('a byte-order mark is no fault', () => {
    const text = decodeCase(Buffer.concat([Buffer.of(0xef, 0xbb, 0xbf), Buffer.from(good)]), 'case.yaml');
    expect(readCase(text, 'case.yaml').specification.title).toMatch(/^Salt-cooled/);
  });
});

describe('names of JavaScript’s own', () => {
  it.each(['__proto__', 'constructor', 'toString', 'hasOwnProperty'])('%s as a top-level key', (name) => {
    const { problems } = refusalOf(`${good}\n${name}: {polluted: true}\n`);
    expect(problems.map(({ code, path }) => `${code} ${path}`)).toContain(`unknown_key ${name}`);
    expect(({} as Record<string, unknown>)['polluted']).toBeUndefined();
  });

  it.each(['constructor', 'toString', 'valueOf'])('%s is an ordinary id of a species', (name) => {
    const text = good
      .replace('  N2: library', `  ${name}: {formula: N2}`)
      .replace('N2: balance', `${name}: balance`);
    expect(readCase(text, 'case.yaml').specification.species.map(({ id }) => id)).toContain(name);
  });

  it.each(['__proto__', 'constructor'])('%s is no species of the library', (name) => {
    const { problems } = refusalOf(good.replace('  N2: library', `  N2: library\n  ${name}: library`));
    expect(problems[0]!.code).toMatch(/unknown_name|bad_identifier/);
  });
});

const later: readonly (readonly [search: string, replacement: string, path: string])[] = [
  ['start', 'title: S', 'start: hot\ntitle: S'] as const,
  ['studies', 'title: S', 'studies: {size: {}}\ntitle: S'] as const,
].map(([path, search, replacement]): readonly [string, string, string] => [search, replacement, path]);

const laterKeys: readonly (readonly [search: string, replacement: string, path: string])[] = [
  ...later,
  ['  method: full', '  transport: dusty_gas\n  method: full', 'pellet.transport'],
  ...['ring', 'holed_cylinder', 'lobed', 'custom'].map((shape): readonly [string, string, string] => [
    '{ sphere: { diameter: 4 mm } }',
    `{${shape}: {length: 4 mm}}`,
    `pellet.shape.${shape}`,
  ]),
  [
    '{ sphere: { diameter: 4 mm } }',
    '{cylinder: {diameter: 4 mm, length: 4 mm}}',
    'pellet.shape.cylinder.length',
  ],
  ['method: full', 'method: full\n  activity: {shell: 0.1}', 'pellet.activity'],
  ['viscosity: 3.1e-5 Pa s', 'viscosity: 3.1e-5 Pa s\n  phase: liquid', 'fluid.phase'],
  [
    'viscosity: 3.1e-5 Pa s',
    'viscosity: 3.1e-5 Pa s\n  equation_of_state: constant_density',
    'fluid.equation_of_state',
  ],
  ['void_fraction: 0.42', 'void_fraction: estimate', 'bed.void_fraction'],
  ['pressure_drop: ergun', 'pressure_drop: carman', 'bed.pressure_drop'],
  ['pressure_drop: ergun', 'pressure_drop: ergun\n  zones: []', 'bed.zones'],
  ['overall_coefficient: 110 W/(m^2 K)', 'overall_coefficient: estimate', 'heat.overall_coefficient'],
  ['mode: cooled', 'mode: cooled\n  radial: 8', 'heat.radial'],
  ['{ temperature: 625 K }', '{temperature: 625 K, mass_flow: 1 kg/s}', 'heat.coolant.mass_flow'],
  ['{ temperature: 625 K }', '{temperature: 625 K, direction: with_flow}', 'heat.coolant.direction'],
  ['{ temperature: 625 K }', '{temperature: 625 K, heat_capacity: 1 J/(kg K)}', 'heat.coolant.heat_capacity'],
];

describe('what the format knows and this version does not reach is refused, never ignored', () => {
  it.each(laterKeys)('%s → %s', (search, replacement, path) => {
    const { problems } = refusalOf(edited(search, replacement).text);
    expect(problems.map((problem) => `${problem.code} ${problem.path}`)).toContain(
      `not_supported_yet ${path}`,
    );
  });
});

describe('several faults in one file', () => {
  it('are all reported, in the order of the file', () => {
    const text = good
      .replace('diameter: 4 mm', 'diameter: 4')
      .replace('length: 3 m', 'length: -3 m')
      .replace('A + 3 O2 -> P + 3 H2O', 'A + 3 O2 -> P + 2 H2O')
      .replace('pressure: 1.6 bar', 'pressure: 1.6 barg')
      .replace('rate: k * p.P * p.O2', 'rate: k * p.P')
      .replace('limits:', 'limmits:');
    const error = refusalOf(text);
    const places = [...formatCaseError(error).matchAll(/^case\.yaml:(\d+):(\d+) {2}(\S+)$/gm)];
    expect(places.map(([, , , path]) => path)).toEqual([
      'reactions[0].equation',
      'reactions[2].rate',
      'feed.pressure',
      'pellet.shape.sphere.diameter',
      'bed.length',
      'limmits',
    ]);
    const lines = places.map(([, line]) => Number(line));
    expect(lines).toEqual([...lines].sort((a, b) => a - b));
  });
});
