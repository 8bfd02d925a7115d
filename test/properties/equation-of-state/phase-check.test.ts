import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { CubicKind } from '../../../src/properties/equation-of-state/cubic-root.js';
import { createDewPointCheck } from '../../../src/properties/equation-of-state/phase-check.js';
import type { SpeciesRecord } from '../../../src/properties/species-record.js';
import { readReference } from '../../reference/read-reference.js';
import { criticalRecord, cubicKinds, libraryRecords, zeroInteraction } from './fluid-fixtures.js';

interface ReferenceFile {
  readonly species: readonly {
    readonly id: string;
    readonly criticalTemperature: number;
    readonly criticalPressure: number;
    readonly acentricFactor: number;
  }[];
  readonly dewPoints: readonly {
    readonly name: string;
    readonly equation: CubicKind;
    readonly species: readonly string[];
    readonly moleFractions: readonly number[];
    readonly pressure: number;
    readonly binaryInteraction: readonly (readonly number[])[];
    readonly dewTemperature: number;
    readonly residual: number;
  }[];
}

const reference = readReference('cubic-dew.json') as ReferenceFile;
const recordOf = new Map(
  reference.species.map((one) => [
    one.id,
    criticalRecord(one.id, one.criticalTemperature, one.criticalPressure, one.acentricFactor),
  ]),
);

const checkOf = (
  ids: readonly string[],
  kind: CubicKind = 'peng_robinson',
): ReturnType<typeof createDewPointCheck> =>
  createDewPointCheck(libraryRecords(ids), kind, zeroInteraction(ids.length));

describe('dew temperatures from equal fugacities, solved by general-purpose methods', () => {
  it.each(reference.dewPoints)('$name, $equation, $pressure Pa', (point) => {
    expect(point.residual).toBeLessThan(1e-12);
    const records = point.species.map((id) => recordOf.get(id)!);
    const check = createDewPointCheck(records, point.equation, point.binaryInteraction);
    const fractions = Float64Array.from(point.moleFractions);
    const found = check.dewTemperature(fractions, point.pressure)!;
    expect(Math.abs(found / point.dewTemperature - 1)).toBeLessThan(1e-8);
    expect(check.liquidExcess(fractions, point.dewTemperature * (1 - 1e-5), point.pressure)).toBeGreaterThan(
      0,
    );
    expect(check.liquidExcess(fractions, point.dewTemperature * (1 + 1e-5), point.pressure)).toBeLessThan(0);
  });
});

it('rises, at the saturation of a pure species, with the gas’s less the liquid’s compressibility factor per logarithm of pressure', () => {
  const check = checkOf(['n_C4H10']);
  const one = Float64Array.of(1);
  const saturation = 5e5;
  const temperature = check.dewTemperature(one, saturation)!;
  const step = 1e-4;
  const above = check.liquidExcess(one, temperature, saturation * Math.exp(step));
  const below = check.liquidExcess(one, temperature, saturation * Math.exp(-step));
  // d ln f/d ln p = Z. Saturated n-butane at 5 bar: gas 4.7 L/mol at 323 K, so 0.87; liquid 0.11 L/mol, so 0.02 (property tables; from
  // memory). Volumes of the equation are good to 2 %.
  expect((above - below) / (2 * step)).toBeGreaterThan(0.83);
  expect((above - below) / (2 * step)).toBeLessThan(0.88);
});

/** K, Pa: normal boiling points and vapour pressures, NIST Chemistry WebBook (from memory). */
const boilingPoints = [
  ['n_C4H10', 272.66, 101325],
  ['C3H8', 231.04, 101325],
  ['benzene', 353.23, 101325],
  ['toluene', 383.75, 101325],
  ['NH3', 239.82, 101325],
  ['NH3', 298.15, 1.003e6],
  ['C3H8', 300, 9.978e5],
  ['CH4', 111.67, 101325],
  ['H2O', 453.03, 1e6],
] as const;

it.each(boilingPoints)('%s boils at %f K under %f Pa', (id, temperature, pressure) => {
  // Vapour pressures of these equations are good to 5 % (common experience), and by Trouton's rule 10.5 % in pressure are 1 % in temperature.
  for (const kind of cubicKinds) {
    const found = checkOf([id], kind).dewTemperature(Float64Array.of(1), pressure)!;
    expect(Math.abs(found / temperature - 1)).toBeLessThan(0.005);
  }
});

it('dew point of moist combustion gas: partial pressure of water equals its vapour pressure', () => {
  // 12 % water at 1 atm: 12.16 kPa, at which water boils at 322.6 K (steam tables: 49.4 °C at 12 kPa; from memory). Low vapour pressures of
  // water come out 10 % low by the equation: 2 K.
  const found = checkOf(['H2O', 'N2', 'CO2']).dewTemperature(Float64Array.of(0.12, 0.75, 0.13), 101325)!;
  expect(Math.abs(found - 322.6)).toBeLessThan(3);
});

describe('which side', () => {
  it('a subcooled liquid that has no gas root left counts as liquid', () => {
    expect(checkOf(['H2O']).liquidExcess(Float64Array.of(1), 450, 1e7)).toBeGreaterThan(0);
  });

  it('above the highest critical temperature of what is present nothing condenses', () => {
    const check = checkOf(['H2O', 'N2', 'H2']);
    expect(check.liquidExcess(Float64Array.of(0.3, 0.2, 0.5), 648, 3e7)).toBeLessThan(0);
    // Water is not present: nitrogen's 126 K counts.
    expect(check.liquidExcess(Float64Array.of(0, 0.3, 0.7), 300, 3e7)).toBeLessThan(0);
    expect(check.liquidExcess(Float64Array.of(-1e-12, 0.3, 0.7), 300, 3e7)).toBeLessThan(0);
    expect(check.dewTemperature(new Float64Array(3), 3e7)).toBeUndefined();
  });

  it('a pure species above its critical pressure turns from gas to liquid at its critical temperature', () => {
    const [water] = libraryRecords(['H2O']);
    const found = checkOf(['H2O']).dewTemperature(Float64Array.of(1), 2 * water!.criticalPressure!)!;
    expect(Math.abs(found / water!.criticalTemperature! - 1)).toBeLessThan(1e-8);
  });

  it('a dew point does not depend on the order of species, nor on ones that are absent', () => {
    const [one, other, more] = [
      checkOf(['H2', 'methanol', 'H2O']).dewTemperature(Float64Array.of(0.8, 0.15, 0.05), 6e6)!,
      checkOf(['H2O', 'H2', 'methanol']).dewTemperature(Float64Array.of(0.05, 0.8, 0.15), 6e6)!,
      checkOf(['H2', 'methanol', 'toluene', 'H2O']).dewTemperature(Float64Array.of(0.8, 0.15, 0, 0.05), 6e6)!,
    ];
    expect(Math.abs(other / one - 1)).toBeLessThan(1e-9);
    expect(Math.abs(more / one - 1)).toBeLessThan(1e-9);
  });
});

describe('species without critical data', () => {
  const unknown: SpeciesRecord = { id: 'tar', molarMass: 0.2, source: 'test' };

  it('are named, and dilute the others', () => {
    const check = createDewPointCheck(
      [unknown, ...libraryRecords(['H2O'])],
      'peng_robinson',
      zeroInteraction(2),
    );
    expect(check.leftOut).toEqual(['tar']);
    const diluted = check.dewTemperature(Float64Array.of(0.5, 0.5), 2e5)!;
    expect(Math.abs(diluted / checkOf(['H2O']).dewTemperature(Float64Array.of(1), 1e5)! - 1)).toBeLessThan(
      1e-9,
    );
  });

  it('alone leave nothing to condense', () => {
    const check = createDewPointCheck([unknown], 'peng_robinson', zeroInteraction(1));
    expect(check.liquidExcess(Float64Array.of(1), 300, 1e5)).toBe(-1);
    expect(check.dewTemperature(Float64Array.of(1), 1e5)).toBeUndefined();
  });
});

it('answers with a number whatever the state', () => {
  const check = checkOf(['H2', 'CO2', 'methanol', 'H2O', 'n_C4H10']);
  const fraction = fc.double({ min: -1e-9, max: 1, noNaN: true });
  fc.assert(
    fc.property(
      fc.array(fraction, { minLength: 5, maxLength: 5 }),
      fc.double({ min: 1, max: 3000, noNaN: true }),
      fc.double({ min: -3, max: 9, noNaN: true }),
      (amounts, temperature, logPressure) => {
        const sum = amounts.reduce((total, one) => total + one, 0);
        const fractions = Float64Array.from(amounts, (one) => one / sum);
        expect(check.liquidExcess(fractions, temperature, 10 ** logPressure)).not.toBeNaN();
      },
    ),
    { numRuns: 500 },
  );
  const equal = new Float64Array(5).fill(0.2);
  for (const [temperature, pressure] of [
    [NaN, 1e5],
    [300, NaN],
    [0, 1e5],
    [300, 0],
    [-1, -1],
  ] as const) {
    expect(check.liquidExcess(equal, temperature, pressure)).toBe(-1);
  }
  expect(check.liquidExcess(new Float64Array(5), 300, 1e5)).toBe(-1);
});
