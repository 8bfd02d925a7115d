import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Fault } from '../../src/diagnostics/problem.js';
import { parseAnyQuantity, parseQuantity } from '../../src/quantities/parse-quantity.js';
import { quantityKinds, type QuantityKindName } from '../../src/quantities/quantity-kinds.js';

function read(
  text: string,
  ...kinds: QuantityKindName[]
): { value: number | undefined; kind: string | undefined; faults: Fault[] } {
  const faults: Fault[] = [];
  const result = parseQuantity(
    text,
    kinds.map((kind) => quantityKinds[kind]),
    (fault) => faults.push(fault),
  );
  return { value: result?.value, kind: result?.kind.id, faults };
}

const close = (value: number | undefined, expected: number): void => {
  expect(value).toBeDefined();
  expect(Math.abs(value! - expected)).toBeLessThanOrEqual(1e-13 * Math.abs(expected));
};

describe('parseQuantity', () => {
  // Expected values by the definitions of the units.
  it.each([
    ['12 mm', 'length', 0.012],
    ['12mm', 'length', 0.012],
    ['  12   mm  ', 'length', 0.012],
    ['.5 m', 'length', 0.5],
    ['5. m', 'length', 5],
    ['+5 m', 'length', 5],
    ['1e-3 m', 'length', 1e-3],
    ['1E3 mm', 'length', 1],
    ['0 m', 'length', 0],
    ['1 inch', 'length', 0.0254],
    ['640 K', 'temperature', 640],
    ['350 degC', 'temperature', 623.15],
    ['350 °C', 'temperature', 623.15],
    ['-40 degC', 'temperature', 233.15],
    ['-40 degF', 'temperature', 233.15], // the two scales meet at -40
    ['32 degF', 'temperature', 273.15], // ice
    ['212 degF', 'temperature', 373.15], // steam
    ['671.67 degR', 'temperature', 373.15],
    ['1.6 bar', 'pressure', 1.6e5],
    ['2 atm', 'pressure', 202650],
    ['3.6 t/h', 'massFlow', 1],
    ['36 kmol/h', 'molarFlow', 10],
    ['1.3 kg/(m^2 s)', 'massFlux', 1.3],
    ['1.3 kg/m^2/s', 'massFlux', 1.3],
    ['1.3 kg m^-2 s^-1', 'massFlux', 1.3],
    ['1.3 kg·m⁻²·s⁻¹', 'massFlux', 1.3],
    ['2 in', 'length', 0.0508],
    ['950 hPa', 'pressure', 95000],
    ['120 W/(m² K)', 'heatTransferCoefficient', 120],
    ['1800 kg/m³', 'density', 1800],
    ['3000 1/h', 'spaceVelocity', 3000 / 3600],
    ['3000 h^-1', 'spaceVelocity', 3000 / 3600],
    ['42 %', 'fraction', 0.42],
    ['42%', 'fraction', 0.42],
    ['0.42', 'fraction', 0.42],
    ['400 ppm', 'fraction', 4e-4],
    ['-41.2 kJ/mol', 'molarEnergy', -41200],
    ['10 kcal/mol', 'molarEnergy', 41840],
    ['10 cP', 'viscosity', 0.01],
  ] as const)('reads %j as a %s', (text, kind, expected) => {
    const { value, faults } = read(text, kind);
    expect(faults).toEqual([]);
    close(value, expected);
  });

  it('returns the kind that fits where several may be meant', () => {
    expect(read('2 kg/s', 'molarFlow', 'massFlow').kind).toBe('mass_flow');
    expect(read('2 mol/s', 'molarFlow', 'massFlow').kind).toBe('molar_flow');
    expect(read('0.5', 'length', 'fraction').kind).toBe('fraction');
  });

  it('reads its own examples of every kind', () => {
    for (const name of Object.keys(quantityKinds) as QuantityKindName[]) {
      const { example, units, id } = quantityKinds[name];
      expect(read(example, name)).toMatchObject({ kind: id, faults: [] });
      for (const unit of units.filter((text) => text !== 'none')) {
        expect(read(`2 ${unit}`, name), unit).toMatchObject({ kind: id, faults: [] });
      }
    }
  });

  /** The part of the text that the fault points at, between the marks « and ». */
  it.each([
    ['«»', 'bad_quantity'],
    ['«  »', 'bad_quantity'],
    ['«mm»', 'bad_quantity'],
    ['«abc 12 mm»', 'bad_quantity'],
    ['«--5 m»', 'bad_quantity'],
    ['«NaN m»', 'bad_quantity'],
    ['«Infinity m»', 'bad_quantity'],
    ['«1e301 m»', 'bad_quantity'],
    ['«1e999 m»', 'bad_quantity'],
    ['«-1e999 m»', 'bad_quantity'],
    ['«1e-301 m»', 'bad_quantity'],
    ['«1e-999 m»', 'bad_quantity'],
    ['«12»', 'missing_unit'],
    ['« 12 »', 'missing_unit'],
    ['12 «kg»', 'wrong_dimension'],
    ['12 «furlong»', 'unknown_unit'],
    ['12 «M»', 'unknown_unit'],
    ['12 «MM»', 'unknown_unit'],
    ['12 «m3»', 'unknown_unit'],
    ['12 m*«s2»', 'unknown_unit'],
    ['0«x»10 m', 'unknown_unit'],
    ['1«,»5 m', 'bad_quantity'],
    ['1 m«*»', 'unknown_unit'],
    ['1 m «/»', 'unknown_unit'],
    ['1 «(»', 'unknown_unit'],
    ['1 «/»', 'unknown_unit'],
    ['1 m«/s m»', 'bad_quantity'],
    ['1 m«/s*m»', 'bad_quantity'],
    ['1 m«/s·m»', 'bad_quantity'],
    ['1 m/«2»', 'unknown_unit'],
    ['1 m^1/«2»', 'unknown_unit'],
    ['1 m«^»', 'bad_quantity'],
    ['1 m«^»s', 'bad_quantity'],
    ['1 m^«13»', 'bad_quantity'],
    ['1 m^2«^»2', 'bad_quantity'],
    ['1 m²«^»2', 'bad_quantity'],
    ['1 «(»m', 'bad_quantity'],
    ['1 m«)»', 'bad_quantity'],
    ['1 «m⁻¹»', 'wrong_dimension'],
    ['1 m«⁻»', 'bad_quantity'],
    ['1 m^2«²»', 'bad_quantity'],
    ['1 «000» mm', 'unknown_unit'],
    ['1 m «#» note', 'bad_quantity'],
    ['1 m«;»', 'bad_quantity'],
    ['1 «mm2»', 'unknown_unit'],
  ] as const)('refuses %s where a length is due: %s', (marked, code) => {
    const text = marked.replace(/[«»]/g, '');
    const { value, faults } = read(text, 'length');
    expect(value).toBeUndefined();
    expect(faults).toHaveLength(1);
    const { code: got, span } = faults[0]!;
    expect(got).toBe(code);
    const start = marked.indexOf('«');
    expect(span).toEqual({ start, end: Math.max(marked.indexOf('»') - 1, start + 1) });
  });

  it('shows both readings of a slash before a product', () => {
    const [fault] = read('8.3 J/mol K', 'molarEntropy').faults;
    expect(fault).toMatchObject({ code: 'bad_quantity', span: { start: 5, end: 11 } });
    expect(fault!.mend).toContain('J/(mol K)');
    expect(fault!.mend).toContain('J/mol/K');
  });

  it('proposes the power where an exponent lacks its mark', () => {
    expect(read('1 m3', 'length').faults[0]!.mend).toContain('`m^3`');
    expect(read('1 kg/m3', 'density').faults[0]).toMatchObject({ span: { start: 5, end: 7 } });
  });

  it.each(['barg', 'psig', 'kPag', 'MPag', 'mbarg', 'atg', 'atü'])(
    'refuses the gauge pressure %s and says how to mend it',
    (unit) => {
      const { value, faults } = read(`3 ${unit}`, 'pressure');
      expect(value).toBeUndefined();
      expect(faults).toHaveLength(1);
      expect(faults[0]).toMatchObject({ code: 'bad_quantity', span: { start: 2, end: 2 + unit.length } });
      expect(faults[0]!.expected).toContain('absolute');
    },
  );

  it.each(['bar(g)', 'psi (g)', 'kPa(gauge)', 'bar(a)', 'psi(abs)'])(
    'does not take what stands behind the pressure in %s for a unit',
    (unit) => {
      for (const text of [`3 ${unit}`, `3 1/${unit}`]) {
        const faults: Fault[] = [];
        expect(parseAnyQuantity(text, (fault) => faults.push(fault))).toBeUndefined();
        expect(faults).toHaveLength(1);
        expect(text.slice(faults[0]!.span.start, faults[0]!.span.end)).toBe(unit);
        expect(`${faults[0]!.expected} ${faults[0]!.mend!}`).toContain('absolute');
      }
    },
  );

  it.each([
    ['kelvin', 'K'],
    ['KJ', 'kJ'],
    ['sec', 's'],
    ['Kmol', 'kmol'],
    ['kgmol', 'kmol'],
    ['psia', 'psi'],
    ['celsius', 'degC'],
    ['barr', 'bar'],
    ['torrr', 'torr'],
  ])('proposes for %s the unit %s', (unit, nearest) => {
    expect(read(`3 ${unit}`, 'length').faults[0]!.mend).toBe(`did you mean \`${nearest}\`?`);
  });

  it('proposes nothing where capitals leave two readings, and mends marks inside numbers', () => {
    expect(read('3 mw', 'length').faults[0]!.mend).toBeUndefined();
    expect(read('12,5 mm', 'length').faults[0]!.mend).toContain('dot');
    expect(read('1 000 mm', 'length').faults[0]!.mend).toContain('without spaces');
  });

  it.each([
    ['120 W/(m^2 degC)', 'heatTransferCoefficient', 11, 15],
    ['120 W/m^2/°C', 'heatTransferCoefficient', 10, 12],
    ['1 degC^2', 'temperature', 2, 6],
    ['1 (degC)', 'temperature', 3, 7],
    ['1 degF m', 'length', 2, 6],
  ] as const)('refuses the temperature scale inside %s', (text, kind, start, end) => {
    const { value, faults } = read(text, kind);
    expect(value).toBeUndefined();
    expect(faults).toHaveLength(1);
    expect(faults[0]).toMatchObject({ code: 'bad_quantity', span: { start, end } });
  });

  it('refuses a temperature scale for a kind that is no temperature on a scale', () => {
    const faults: Fault[] = [];
    const { id, dimension, noun, example, units } = quantityKinds.temperature;
    const kind = { id, dimension, noun, example, units };
    expect(parseQuantity('5 degC', [kind], (fault) => faults.push(fault))).toBeUndefined();
    expect(faults).toMatchObject([{ code: 'bad_quantity', span: { start: 2, end: 6 } }]);
    expect(parseQuantity('5 K', [kind], (fault) => faults.push(fault))?.value).toBe(5);
  });

  it('refuses a text of 201 characters and reads one of 200', () => {
    const long = `1${' '.repeat(198)}m`;
    expect(long).toHaveLength(200);
    expect(read(long, 'length').value).toBe(1);
    expect(read(`${long} `, 'length').faults).toMatchObject([
      { code: 'bad_quantity', span: { start: 0, end: 201 } },
    ]);
  });

  it('never throws and reports exactly one fault for what it does not read', () => {
    const pieces = [
      ...'0123456789.eE+-*/^() \t\n'.split(''),
      'm',
      'kg',
      'degC',
      'bar',
      'barg',
      'Nm3',
      '²',
      '·',
      '%',
      'µ',
      '\u200b',
      '𝐤',
      '\ud800',
    ];
    fc.assert(
      fc.property(fc.array(fc.constantFrom(...pieces), { maxLength: 25 }), (parts) => {
        const text = parts.join('');
        const { value, faults } = read(text, 'length', 'fraction', 'temperature');
        expect(faults).toHaveLength(value === undefined ? 1 : 0);
        for (const { span } of faults) {
          expect(span.start).toBeGreaterThanOrEqual(0);
          expect(span.end).toBeGreaterThan(span.start);
          expect(span.end).toBeLessThanOrEqual(Math.max(1, text.length));
        }
      }),
      { numRuns: 3000 },
    );
  });
});

describe('parseAnyQuantity', () => {
  const any = (text: string): { result: ReturnType<typeof parseAnyQuantity>; faults: Fault[] } => {
    const faults: Fault[] = [];
    return { result: parseAnyQuantity(text, (fault) => faults.push(fault)), faults };
  };

  it.each([
    ['0.085 mol/(kg s bar^2)', 0.085e-10, [-3, 2, 3, 1, 0]],
    ['1.842e-4 kmol bar^0.5/(kg h)', (1.842e-4 * 1000 * Math.sqrt(1e5)) / 3600, [-0.5, -0.5, -2, 1, 0]],
    ['1.07e-3 1/bar', 1.07e-8, [-1, 1, 2, 0, 0]],
    ['5 K', 5, [0, 0, 0, 0, 1]],
    ['-4.33', -4.33, [0, 0, 0, 0, 0]],
    ['7', 7, [0, 0, 0, 0, 0]],
  ] as const)('reads %s', (text, value, dimension) => {
    const { result, faults } = any(text);
    expect(faults).toEqual([]);
    close(result?.value, value);
    expect(result!.dimension.map((exponent) => exponent + 0)).toEqual(dimension);
  });

  it('refuses a temperature scale, since a constant may mean a difference', () => {
    expect(any('25 degC')).toMatchObject({
      result: undefined,
      faults: [{ code: 'bad_quantity', span: { start: 3, end: 7 } }],
    });
  });
});
