import { describe, expect, it } from 'vitest';
import type { Fault } from '../../src/diagnostics/problem.js';
import { compileProperty } from '../../src/expressions/compile-property.js';
import type { CheckedFormula, Expression } from '../../src/expressions/expression.js';
import { parseFormula, type FormulaScope } from '../../src/expressions/parse-formula.js';
import type { Dimension } from '../../src/quantities/dimension.js';
import { findUnit } from '../../src/quantities/units.js';

const pure: Dimension = [0, 0, 0, 0, 0];
const kelvin: Dimension = [0, 0, 0, 0, 1];
const pascal: Dimension = [1, -1, -2, 0, 0];
const rate: Dimension = [-1, 0, -1, 1, 0];
const gasConstant = 8.314462618;

const constant = (value: number, dimension: Dimension): { expression: Expression; dimension: Dimension } => ({
  expression: { kind: 'number', value },
  dimension,
});

const scope: FormulaScope = {
  constants: new Map([
    ['k', constant(3, [-2, 1, 1, 1, 0])], // mol/(kg s Pa)
    ['K_A', constant(2e-5, [-1, 1, 2, 0, 0])], // 1/Pa
    ['E', constant(80e3, [1, 2, -2, -1, 0])], // J/mol
    ['n', constant(0.5, pure)],
    ['h', constant(7, pure)], // named like the hour
  ]),
  speciesIds: ['A', 'O2', 'B_2'],
  allowsTemperature: true,
  allowsPressure: true,
  equilibriumReaction: 1,
};

function read(
  text: string,
  within: FormulaScope = scope,
): { formula: CheckedFormula | undefined; faults: Fault[] } {
  const faults: Fault[] = [];
  const formula = parseFormula(text, within, (fault) => faults.push(fault));
  return { formula, faults };
}

/** Value of a formula in T and P alone, through the compiler. */
function valueOf(text: string, temperature = 500, pressure = 2e5, within: FormulaScope = scope): number {
  const { formula, faults } = read(text, within);
  expect(faults).toEqual([]);
  return compileProperty(formula!).evaluate(temperature, pressure);
}

describe('parseFormula: what it accepts', () => {
  // Values worked out with the plain JavaScript expression beside, in SI.
  it.each<[string, number, Dimension]>([
    ['1', 1, pure],
    ['.5', 0.5, pure],
    ['2.', 2, pure],
    ['1e-3', 1e-3, pure],
    ['1.5E+2', 150, pure],
    ['1 + 2 * 3', 7, pure],
    ['(1 + 2) * 3', 9, pure],
    ['-2^2', -4, pure],
    ['2^-1', 0.5, pure],
    ['2^3^2', 512, pure],
    ['8 / 4 / 2', 1, pure],
    ['8 - 4 - 2', 2, pure],
    ['+n', 0.5, pure],
    ['--n', 0.5, pure],
    ['T', 500, kelvin],
    ['P', 2e5, pascal],
    ['R', gasConstant, [1, 2, -2, -1, -1]],
    ['exp(-E/(R*T))', Math.exp(-80e3 / (gasConstant * 500)), pure],
    ['exp(-E/R/T)', Math.exp(-80e3 / (gasConstant * 500)), pure],
    ['exp(4577.8 K / T - 4.33)', Math.exp(4577.8 / 500 - 4.33), pure],
    ['10^(3066 K / T - 10.592) * 1 bar^-2', 10 ** (3066 / 500 - 10.592) * 1e-10, [-2, 2, 4, 0, 0]],
    ['1 bar^-2', 1e-10, [-2, 2, 4, 0, 0]],
    ['1 bar^(-2)', 1e-10, [-2, 2, 4, 0, 0]],
    ['1 bar^0.5', 1e5 ** 0.5, [0.5, -0.5, -1, 0, 0]],
    ['80 kJ/mol', 80e3, [1, 2, -2, -1, 0]],
    ['80 kJ/mol/(R*T)', 80e3 / (gasConstant * 500), pure],
    ['80 kJ/mol/R/T', 80e3 / (gasConstant * 500), pure],
    ['8.314 J/mol/K', 8.314, [1, 2, -2, -1, -1]],
    ['8.314 J/(mol K)', 8.314, [1, 2, -2, -1, -1]],
    ['1/2 K', 0.5, kelvin],
    ['3 mol/(kg s)', 3, rate],
    ['36 kmol/(kg hr)', 10, rate],
    ['2 min', 120, [0, 0, 1, 0, 0]],
    ['2 m^2 s^-1', 2, [0, 2, -1, 0, 0]],
    ['T / 1 K', 500, pure],
    ['P / 1 bar', 2, pure],
    ['P / 1 bar^2 * 1 bar', 2, pure],
    ['P/(1 bar)', 2, pure],
    ['(T / 300 K)^n', (500 / 300) ** 0.5, pure],
    ['T^1.5', 500 ** 1.5, [0, 0, 0, 0, 1.5]],
    ['sqrt(P)', 2e5 ** 0.5, [0.5, -0.5, -1, 0, 0]],
    ['sqrt(P)^2', 2e5, pascal],
    ['abs(-T)', 500, kelvin],
    ['min(T, 400 K)', 400, kelvin],
    ['max(T, 400 K, 0.7 kK)', 700, kelvin],
    ['log(P / 1 Pa)', Math.log(2e5), pure],
    ['log10(P / 1 bar)', Math.log10(2), pure],
    ['2 * h', 14, pure],
    ['n T', 250, kelvin],
    ['2 T', 1000, kelvin],
    ['2 P', 4e5, pascal], // the pressure, not the poise
    ['(2) (3)', 6, pure],
    ['1 + P * K_A', 5, pure],
    ['\t1 + 1 ', 2, pure],
  ])('%j is %d', (text, expected, dimension) => {
    const value = valueOf(text);
    expect(Math.abs(value - expected)).toBeLessThanOrEqual(4e-15 * Math.abs(expected));
    const { formula } = read(text);
    formula!.dimension.forEach((exponent, i) => expect(exponent).toBeCloseTo(dimension[i]!, 12));
    expect(formula!.text).toBe(text);
  });

  it.each<[string, Dimension]>([
    ['k * p.A', rate],
    ['k p.A', rate],
    ['k * p.A * (p.O2 / 1 bar)^0.5', rate],
    ['k * p.A / (1 + K_A * p.A)^2', rate],
    ['k * (p.A - p.B_2 / K_eq)', rate],
    ['k * P * y.A', rate],
    ['k * min(p.A, p.O2)', rate],
    ['c.A * R * T', pascal],
    ['1 s^-1 * c.A', [0, -3, -1, 1, 0]],
    ['k * p.A^2 / p.A', rate],
    ['(k * p.A)^2 / (k * p.A)', rate],
    ['k*p.A*exp(-E/R*(1/T - 1/(640 K)))', rate],
  ])('%s comes out in the dimension expected', (text, dimension) => {
    const { formula, faults } = read(text);
    expect(faults).toEqual([]);
    formula!.dimension.forEach((exponent, i) => expect(exponent).toBeCloseTo(dimension[i]!, 12));
  });

  it('resolves every name to what it stands for', () => {
    expect(read('p.O2').formula!.expression).toEqual({
      kind: 'variable',
      variable: { kind: 'partial_pressure', speciesIndex: 1 },
    });
    expect(read('c.B_2').formula!.expression).toEqual({
      kind: 'variable',
      variable: { kind: 'concentration', speciesIndex: 2 },
    });
    expect(read('y.A').formula!.expression).toEqual({
      kind: 'variable',
      variable: { kind: 'mole_fraction', speciesIndex: 0 },
    });
    expect(read('K_eq').formula!.expression).toEqual({
      kind: 'variable',
      variable: { kind: 'equilibrium_constant', reactionIndex: 1 },
    });
  });

  it('lets a constant hide T, P, R and K_eq', () => {
    const hiding: FormulaScope = {
      ...scope,
      constants: new Map([
        ['R', constant(8, pure)],
        ['K_eq', constant(4, pure)],
      ]),
    };
    expect(valueOf('R * K_eq', 500, 1e5, hiding)).toBe(32);
  });
});

describe('parseFormula: what it refuses', () => {
  /** The fault points at the part between « and ». */
  it.each([
    // Dimensions.
    ['«1 + T»', 'wrong_dimension'],
    ['«T - P»', 'wrong_dimension'],
    ['2 * («T + 5»)', 'wrong_dimension'],
    ['«1 K + 2 m»', 'wrong_dimension'],
    ['exp(«T»)', 'wrong_dimension'],
    ['exp(«-E/T»)', 'wrong_dimension'],
    ['log(«P»)', 'wrong_dimension'],
    ['log10(«5 bar»)', 'wrong_dimension'],
    ['2^«T»', 'wrong_dimension'],
    ['T^«P»', 'wrong_dimension'],
    ['«p.A^y.A»', 'wrong_dimension'],
    ['«T^(T/300 K)»', 'wrong_dimension'],
    ['min(«T, P»)', 'wrong_dimension'],
    ['max(«T, 400 K, 3»)', 'wrong_dimension'],
    ['k * («p.A - p.O2 * p.B_2 / K_eq»)', 'wrong_dimension'],
    ['«1 + p.A»', 'wrong_dimension'],
    ['k * p.A / («1 + K_A * p.A * p.O2»)', 'wrong_dimension'],
    // Names.
    ['«q» * p.A', 'unknown_name'],
    ['«t»', 'unknown_name'],
    ['k * p.«C»', 'unknown_name'],
    ['k * p.«a»', 'unknown_name'],
    ['k * «p»', 'bad_formula'],
    ['«x.A»', 'bad_formula'],
    ['«T.A»', 'bad_formula'],
    ['k * «sin»(T)', 'bad_formula'],
    ['«ln»(T / 1 K)', 'bad_formula'],
    ['«k»(2)', 'bad_formula'],
    ['2 * «exp»', 'bad_formula'],
    ['«exp(1, 2)»', 'bad_formula'],
    ['«min(1)»', 'bad_formula'],
    // Units.
    ['5 * «bar»', 'unknown_name'],
    ['«K» / T', 'unknown_name'],
    ['(5) «K»', 'unknown_name'],
    ['5 «furlong»', 'unknown_name'],
    ['25 «degC»', 'unknown_unit'],
    ['77 «degF» / T', 'unknown_unit'],
    ['3 «h»', 'bad_formula'],
    // Two readings.
    ['8.314 J/«mol» K', 'bad_formula'],
    ['k/«2» T', 'bad_formula'],
    ['T/«2» n', 'bad_formula'],
    ['1/«2»/3 K', 'bad_formula'],
    ['P/«2» bar s', 'bad_formula'],
    ['T/«n» P', 'bad_formula'],
    // Numbers.
    ['«1 / 0»', 'bad_formula'],
    ['«T / 0»', 'bad_formula'],
    ['«1e308 * 10»', 'bad_formula'],
    ['«0^-1»', 'bad_formula'],
    ['«1e999»', 'bad_formula'],
    ['«1e-400» * T', 'bad_formula'],
    ['«0x»10', 'bad_formula'],
    // Characters and shape.
    ['«»', 'bad_formula'],
    ['k «·» p.A', 'bad_formula'],
    ['k «×» p.A', 'bad_formula'],
    ['p.A«²»', 'bad_formula'],
    ['1 «−» 2', 'bad_formula'],
    ['5 «%»', 'bad_formula'],
    ['k «=» 3', 'bad_formula'],
    ['1 «,» 2', 'bad_formula'],
    ['1 + «)»', 'bad_formula'],
    ['1 +«*» 2', 'bad_formula'],
  ] as const)('%s: %s', (marked, code) => {
    const text = marked.replace(/[«»]/g, '');
    const { formula, faults } = read(text);
    expect(formula).toBeUndefined();
    expect(faults.map((fault) => fault.code)).toEqual([code]);
    const start = marked.indexOf('«');
    const end = Math.max(marked.indexOf('»') - 1, start + 1);
    const { span } = faults[0]!;
    expect(text.slice(span.start, span.end)).toBe(text.slice(start, end));
    expect(span).toEqual({ start, end });
  });

  it('says that a constant named like a unit and the unit are two readings', () => {
    expect(findUnit('h')).toBeDefined();
    expect(read('3 h').faults).toMatchObject([{ code: 'bad_formula', span: { start: 2, end: 3 } }]);
    expect(read('3 h').faults[0]!.mend).toContain('* h');
    // With a sign it is the constant; behind other units too.
    expect(valueOf('3 * h')).toBe(21);
    expect(valueOf('3 s * h')).toBe(21);
    // Where no constant takes the name it is the hour.
    expect(valueOf('3 h', 500, 1e5, { ...scope, constants: new Map() })).toBe(10800);
  });

  it('suggests a near name', () => {
    expect(read('K_a * p.A').faults[0]!.mend).toContain('K_A');
    expect(read('k * p.o2').faults[0]!.mend).toContain('O2');
    expect(read('expp(1)').faults[0]!.mend).toContain('exp');
  });

  it.each([
    ['3 m3', '`m^3`'],
    ['3 barg', 'gauge'],
    ['3 Kelvin', '`K`'],
    ['3 KJ/mol', '`kJ`'],
    ['3 + q', 'constants'],
  ])('says for %s how a unit is written', (text, mend) => {
    expect(read(text).faults).toMatchObject([{ code: 'unknown_name' }]);
    expect(read(text).faults[0]!.mend).toContain(mend);
  });

  it('does not read 5 bar(g) as five bar grams', () => {
    expect(read('5 bar(g)').faults).toMatchObject([{ code: 'bad_formula', span: { start: 2, end: 5 } }]);
  });

  it('names quantities and their units in faults of dimension', () => {
    const [fault] = read('p.A + c.O2').faults;
    expect(fault!.found).toBe(
      '`p.A`, a pressure (kg m^-1 s^-2), added to `c.O2`, an amount per volume (m^-3 mol)',
    );
    expect(read('T - 273.15').faults[0]).toMatchObject({
      found: '`T`, a temperature (K), less `273.15`, a pure number',
      mend: 'give `273.15` its unit',
    });
    expect(read('exp(p.A)').faults[0]!.found).toBe(
      '`p.A`, a pressure (kg m^-1 s^-2), as the argument of `exp`',
    );
    expect(read('1 + k').faults[0]!.found).toBe('`1`, a pure number, added to `k`, kg^-2 m s mol in SI');
  });

  it('knows no temperature, pressure, species or K_eq where the scope has none', () => {
    const bare: FormulaScope = {
      constants: new Map(),
      speciesIds: [],
      allowsTemperature: false,
      allowsPressure: false,
    };
    for (const text of ['T', 'P', 'K_eq', 'p'])
      expect(read(text, bare).faults.map(({ code }) => code)).toEqual(['unknown_name']);
    expect(read('p.A', bare).faults).toMatchObject([{ code: 'bad_formula', span: { start: 0, end: 3 } }]);
    expect(read('R', bare).faults).toEqual([]);
  });
});

describe('parseFormula: written_in', () => {
  const writtenIn = {
    pressure: 101325,
    concentration: 1000,
    temperature: 1,
    result: { factor: 1000 / 3600, dimension: rate },
  };
  const empirical: FormulaScope = { ...scope, constants: new Map([['a', constant(2, pure)]]), writtenIn };

  it('reads variables as pure numbers in the units named, and the result in its own', () => {
    // T in K, P in atm, result in kmol/(kg h).
    expect(valueOf('a * P * exp(-1000 / T)', 500, 3 * 101325, empirical)).toBeCloseTo(
      (6 * Math.exp(-2) * 1000) / 3600,
      12,
    );
    expect(read('a * p.A * c.O2 * y.A', empirical).formula!.dimension).toEqual(rate);
  });

  it('refuses a variable for which no unit is named', () => {
    const { concentration, temperature, result } = writtenIn;
    const without: FormulaScope = { ...empirical, writtenIn: { concentration, temperature, result } };
    expect(read('a * p.A', without).faults).toMatchObject([
      { code: 'bad_formula', span: { start: 4, end: 7 } },
    ]);
    expect(read('a * P', without).faults).toMatchObject([
      { code: 'bad_formula', span: { start: 4, end: 5 } },
    ]);
    expect(read('a * c.A', without).faults).toEqual([]);
  });

  it('refuses a law that still comes out with a dimension', () => {
    expect(read('a * p.A * 3 K', empirical).faults).toMatchObject([
      { code: 'wrong_dimension', span: { start: 0, end: 13 } },
    ]);
    expect(read('p.A * R', empirical).faults).toMatchObject([{ code: 'wrong_dimension' }]);
  });
});
