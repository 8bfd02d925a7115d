/** Every unit symbol against an independent table: mathjs where it knows the unit, NIST SP 811 or the unit's definition elsewhere. */
import { unit } from 'mathjs';
import { describe, expect, it } from 'vitest';
import { parseUnit, type ParsedUnit } from '../../src/quantities/parse-unit.js';
import { findUnit, unitSymbols } from '../../src/quantities/units.js';

/** Symbols that mathjs knows under the same name and with the same meaning. */
const sameName = [
  ...[
    'kg',
    'g',
    't',
    'lb',
    'm',
    'angstrom',
    'ft',
    'inch',
    'in',
    's',
    'min',
    'h',
    'hr',
    'day',
    'year',
    'mol',
    'K',
  ],
  ...['degC', 'degF', 'degR', 'L', 'l', 'cc', 'N', 'lbf', 'Pa', 'bar', 'atm', 'J', 'BTU', 'Wh', 'W'],
  // With prefixes, which both work out.
  ...[
    'mg',
    'ug',
    'km',
    'cm',
    'mm',
    'um',
    'nm',
    'ms',
    'kmol',
    'mmol',
    'mL',
    'mN',
    'kN',
    'kPa',
    'MPa',
    'hPa',
    'mbar',
  ],
  ...['kJ', 'MJ', 'GJ', 'kW', 'MW', 'mW', 'kWh'],
];

/** Symbols that mathjs knows under another name. */
const otherName: Readonly<Record<string, string>> = {
  d: 'day',
  a: 'year',
  Torr: 'torr',
  '°C': 'degC',
  '°F': 'degF',
  Å: 'angstrom',
  µm: 'um',
  μm: 'um',
  Btu: 'BTU',
};

interface Reference {
  readonly symbol: string;
  readonly value: number;
  readonly source: string;
  /** Relative; half a unit of the last printed digit, or rounding where the value is exact. */
  readonly tolerance: number;
}

const exact = 1e-14;
const appendixB = 'NIST SP 811 (2008), Appendix B.8';

/** Typed by hand from the source named. */
const typed: readonly Reference[] = [
  { symbol: 'psi', value: 6.894757e3, source: appendixB, tolerance: 1e-7 },
  // mathjs 15 prints 6894.75729276459, which differs from the definition in the eleventh digit.
  {
    symbol: 'psi',
    value: 4.4482216152605 / 0.0254 ** 2,
    source: 'definition: lbf/in², both exact',
    tolerance: exact,
  },
  {
    symbol: 'Btu',
    value: 1.05505585262e3,
    source: `${appendixB}, footnote 9: International Table, exact`,
    tolerance: exact,
  },
  { symbol: 'cal', value: 4.184, source: `${appendixB}: thermochemical, exact`, tolerance: exact },
  { symbol: 'kcal', value: 4.184e3, source: `${appendixB}: thermochemical, exact`, tolerance: exact },
  { symbol: 'lbf', value: 4.4482216152605, source: `${appendixB}, footnote 24: exact`, tolerance: exact },
  { symbol: 'mmHg', value: 1.333224e2, source: `${appendixB}: conventional`, tolerance: 4e-7 },
  { symbol: 'torr', value: 1.333224e2, source: appendixB, tolerance: 4e-7 },
  { symbol: 'ft', value: 3.048e-1, source: `${appendixB}: exact`, tolerance: exact },
  { symbol: 'inch', value: 2.54e-2, source: `${appendixB}: exact`, tolerance: exact },
  { symbol: 'lb', value: 4.5359237e-1, source: `${appendixB}, footnote 22: exact`, tolerance: exact },
  { symbol: 'atm', value: 1.01325e5, source: `${appendixB}: exact`, tolerance: exact },
  { symbol: 'at', value: 9.80665e4, source: `${appendixB}: technical atmosphere, exact`, tolerance: exact },
  { symbol: 'cP', value: 1e-3, source: `${appendixB}: exact`, tolerance: exact },
  { symbol: 'P', value: 1e-1, source: `${appendixB}: exact`, tolerance: exact },
  { symbol: 'poise', value: 1e-1, source: `${appendixB}: exact`, tolerance: exact },
  { symbol: 'degR', value: 5 / 9, source: `${appendixB}: exact`, tolerance: exact },
  { symbol: 'Torr', value: 101325 / 760, source: 'definition', tolerance: exact },
  // A column of 1 mm of density 13 595.1 kg/m³ under standard gravity.
  {
    symbol: 'mmHg',
    value: 13595.1 * 9.80665 * 1e-3,
    source: 'definition of the conventional unit',
    tolerance: exact,
  },
  // Kilopound of substance as pounds are to kilograms: lb in g, times mol.
  { symbol: 'lbmol', value: 453.59237, source: 'definition: lb/g', tolerance: exact },
  // n = P V / (R T): 101 325 Pa, 1 m³, 8.314 462 618 J/(mol K), 273.15 K; CODATA 2018 gives 22.413 969 54 L/mol.
  {
    symbol: 'Nm3',
    value: 1 / 22.41396954e-3,
    source: 'CODATA 2018, molar volume at 273.15 K, 101.325 kPa',
    tolerance: 3e-10,
  },
  { symbol: '%', value: 0.01, source: 'ISO 80000-1', tolerance: exact },
  { symbol: 'ppm', value: 1e-6, source: 'ISO 80000-1', tolerance: exact },
  { symbol: 'ppb', value: 1e-9, source: 'common practice: short scale', tolerance: exact },
  { symbol: 'd', value: 8.64e4, source: `${appendixB}: exact`, tolerance: exact },
];

const ownToSi = (parsed: ParsedUnit, value: number): number => (value + (parsed.offset ?? 0)) * parsed.factor;

function parsed(text: string): ParsedUnit {
  return parseUnit(text, ({ found }) => {
    throw new Error(found);
  })!;
}

/** mathjs' base dimensions, in its own order, as exponents of kg, m, s, mol, K. */
function independentDimension(name: string): number[] {
  const { dimensions } = unit(1, name) as unknown as { dimensions: readonly number[] };
  const [mass, length, time, , temperature, , amount] = dimensions;
  return [mass!, length!, time!, amount!, temperature!];
}

describe('units', () => {
  const pairs = [
    ...sameName.map((symbol) => [symbol, symbol] as const),
    ...Object.entries(otherName).filter(([symbol]) => symbol !== 'Torr'),
  ];

  it.each(pairs)('%s has the SI value and dimension of mathjs (%s)', (symbol, name) => {
    const own = parsed(symbol);
    // Two values, so that an offset shows.
    for (const value of [1, 250]) {
      const reference = unit(value, name).toSI().toNumeric() as number;
      expect(Math.abs(ownToSi(own, value) / reference - 1)).toBeLessThan(1e-12);
    }
    expect(own.dimension).toEqual(independentDimension(name));
  });

  it.each(typed)('$symbol is $value in SI ($source)', ({ symbol, value, tolerance }) => {
    expect(Math.abs(parsed(symbol).factor / value - 1)).toBeLessThan(tolerance);
  });

  it('leaves no symbol of the table without an independent value', () => {
    const checked = new Set([...pairs.map(([symbol]) => symbol), ...typed.map(({ symbol }) => symbol)]);
    expect(unitSymbols.length).toBeGreaterThan(40);
    expect(unitSymbols.filter((symbol) => !checked.has(symbol))).toEqual([]);
  });

  it.each([
    ['lbmol', 'mol'],
    ['Nm3', 'mol'],
    ['at', 'Pa'],
    ['mmHg', 'Pa'],
    ['torr', 'Pa'],
    ['Torr', 'Pa'],
    ['cal', 'J'],
    ['P', 'Pa s'],
    ['poise', 'Pa s'],
    ['%', ''],
    ['ppm', ''],
    ['ppb', ''],
  ])('%s has the dimension of %s', (symbol, other) => {
    const expected = other === '' ? [0, 0, 0, 0, 0] : parsed(other).dimension;
    expect(parsed(symbol).dimension).toEqual(expected);
  });

  // BIPM, The International System of Units, 9th edition, Table 7.
  it.each([
    ['G', 1e9],
    ['M', 1e6],
    ['k', 1e3],
    ['h', 1e2],
    ['d', 1e-1],
    ['c', 1e-2],
    ['m', 1e-3],
    ['µ', 1e-6],
    ['u', 1e-6],
    ['n', 1e-9],
    ['p', 1e-12],
  ])('the prefix %s stands for %d', (prefix, factor) => {
    expect(parsed(`${prefix}m`).factor).toBe(factor);
    expect(parsed(`${prefix}Pa`).factor).toBe(factor);
  });

  it('gives no prefix where none is usual, and none twice', () => {
    for (const symbol of [
      'kmin',
      'kkg',
      'mkg',
      'kft',
      'kpsi',
      'katm',
      'mdegC',
      'kkm',
      'kNm3',
      'm%',
      'kt',
      'mmmol',
    ]) {
      expect(findUnit(symbol), symbol).toBeUndefined();
    }
  });

  it('reads symbols that a prefix could be split from as the unit of the table', () => {
    expect(parsed('min').factor).toBe(60);
    expect(parsed('ft').factor).toBe(0.3048);
    expect(parsed('Pa').factor).toBe(1);
    expect(parsed('cP').factor).toBeCloseTo(1e-3, 15);
    expect(parsed('mmol').factor).toBe(1e-3);
    expect(parsed('cc').factor).toBe(1e-6);
  });
});

describe('parseUnit', () => {
  // Worked by hand from the definitions of the factors.
  it.each([
    ['mol/(kg s bar^2)', 1e-10, [-3, 2, 3, 1, 0]],
    ['kmol/(kg h atm^2)', 1000 / 3600 / 101325 ** 2, [-3, 2, 3, 1, 0]],
    ['J/mol/K', 1, [1, 2, -2, -1, -1]],
    ['J/(mol K)', 1, [1, 2, -2, -1, -1]],
    ['J/(mol*K)', 1, [1, 2, -2, -1, -1]],
    ['J/(mol·K)', 1, [1, 2, -2, -1, -1]],
    ['kg m^-3', 1, [1, -3, 0, 0, 0]],
    ['kg·m^-3', 1, [1, -3, 0, 0, 0]],
    ['1/s', 1, [0, 0, -1, 0, 0]],
    ['1/h', 1 / 3600, [0, 0, -1, 0, 0]],
    ['bar^-0.5', 1e5 ** -0.5, [-0.5, 0.5, 1, 0, 0]],
    ['bar^(-0.5)', 1e5 ** -0.5, [-0.5, 0.5, 1, 0, 0]],
    ['kmol bar^0.5/(kg h)', (1000 * 1e5 ** 0.5) / 3600, [-0.5, -0.5, -2, 1, 0]],
    ['W/m²/K', 1, [1, 0, -3, 0, -1]],
    ['W m⁻² K⁻¹', 1, [1, 0, -3, 0, -1]],
    ['mol·s⁻¹', 1, [0, 0, -1, 1, 0]],
    ['m⁺¹²', 1, [0, 12, 0, 0, 0]],
    ['bar (m)', 1e5, [1, 0, -2, 0, 0]],
    ['g/cm³', 1000, [1, -3, 0, 0, 0]],
    ['Nm3/h', 101325 / (8.314462618 * 273.15) / 3600, [0, 0, -1, 1, 0]],
    ['(mol)', 1, [0, 0, 0, 1, 0]],
    ['m/(s/(m/s))', 1, [0, 2, -2, 0, 0]],
  ] as const)('reads %s', (text, factor, dimension) => {
    const unitRead = parsed(text);
    expect(Math.abs(unitRead.factor / factor - 1)).toBeLessThan(1e-13);
    expect(unitRead.dimension.map((exponent) => exponent + 0)).toEqual(dimension);
  });

  // NIST SP 811 (2008), Appendix B.8, seven digits printed.
  it.each([
    ['Btu/(ft^2 h degR)', 5.678263],
    ['Btu/(lb degR)', 4.1868e3],
    ['lb/ft^3', 1.601846e1],
    ['lb/(ft h)', 4.133789e-4],
    ['ft^2/h', 2.58064e-5],
    ['ft^3/min', 4.719474e-4],
    ['Btu/h', 2.930711e-1],
  ])('%s is %d in SI', (text, value) => {
    expect(Math.abs(parsed(text).factor / value - 1)).toBeLessThan(4e-7);
  });
});
