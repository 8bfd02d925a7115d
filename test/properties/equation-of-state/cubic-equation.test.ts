import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { missingForEquation } from '../../../src/properties/equation-of-state/create-equation-of-state.js';
import {
  createFluidState,
  type EquationOfState,
  type FluidState,
} from '../../../src/properties/equation-of-state/equation-of-state.js';
import { gasConstant } from '../../../src/quantities/constants.js';
import { criticalRecord, cubicKinds, cubicOf, evaluated, libraryRecords } from './fluid-fixtures.js';

const ids = ['CH4', 'CO2', 'H2', 'n_C4H10', 'H2O'];
const records = libraryRecords(ids);
const count = ids.length;
/** Made up; what is tested holds for any. */
const binaryInteraction = ids.map((_one, i) => ids.map((_other, j) => (i === j ? 0 : 0.03 * (i + j) - 0.08)));

const dot = (weights: ArrayLike<number>, values: ArrayLike<number>): number =>
  Array.from(weights).reduce((sum, weight, i) => sum + weight * values[i]!, 0);

const normalised = (amounts: readonly number[]): Float64Array => {
  const sum = amounts.reduce((total, one) => total + one, 0);
  return Float64Array.from(amounts, (one) => one / sum);
};

interface GasPoint {
  readonly fractions: Float64Array;
  readonly temperature: number;
  readonly pressure: number;
}

/** Gases above every critical temperature: well away from where derivatives grow without bound, so that differences tell them to 1e-6. */
const gasPoint: fc.Arbitrary<GasPoint> = fc
  .tuple(
    fc.array(fc.double({ min: 0.02, max: 1, noNaN: true }), { minLength: count, maxLength: count }),
    fc.double({ min: 700, max: 1200, noNaN: true }),
    fc.double({ min: 4.5, max: 7.5, noNaN: true }),
  )
  .map(([amounts, temperature, logPressure]) => ({
    fractions: normalised(amounts),
    temperature,
    pressure: 10 ** logPressure,
  }));

/** Relative, with a floor for values that cross zero. */
const expectClose = (found: number, wanted: number, tolerance: number, floor: number): void => {
  expect(
    Math.abs(found - wanted) / Math.max(Math.abs(wanted), floor),
    `${found} against ${wanted}`,
  ).toBeLessThan(tolerance);
};

describe.each(cubicKinds)('%s', (kind) => {
  const equation = cubicOf(kind, records, binaryInteraction);
  const runs = { numRuns: 150 };

  const at = (point: GasPoint, temperature = point.temperature, pressure = point.pressure): FluidState =>
    evaluated(equation, point.fractions, temperature, pressure);

  /** An extensive property of amounts, and its derivative by the amount of one species. */
  const derivativeByAmount = (
    point: GasPoint,
    species: number,
    property: (state: FluidState, total: number) => number,
  ): number => {
    const step = 1e-5;
    const along = (shift: number): number => {
      const amounts = Float64Array.from(point.fractions);
      amounts[species]! += shift;
      const fractions = normalised([...amounts]);
      return property(evaluated(equation, fractions, point.temperature, point.pressure), 1 + shift);
    };
    return (along(step) - along(-step)) / (2 * step);
  };

  it('partial molar properties add up to those of the mixture (Euler)', () => {
    fc.assert(
      fc.property(gasPoint, (point) => {
        const state = at(point);
        expectClose(dot(point.fractions, state.partialMolarVolumes), state.molarVolume, 1e-12, 0);
        expectClose(
          dot(point.fractions, state.partialResidualEnthalpies),
          state.residualEnthalpy,
          1e-11,
          gasConstant * point.temperature * 0.01,
        );
      }),
      runs,
    );
  });

  it('partial molar volumes and enthalpies are derivatives by amount', () => {
    fc.assert(
      fc.property(gasPoint, (point) => {
        const state = at(point);
        for (let i = 0; i < count; i++) {
          expectClose(
            derivativeByAmount(point, i, ({ molarVolume }, total) => total * molarVolume),
            state.partialMolarVolumes[i]!,
            1e-6,
            state.molarVolume,
          );
          expectClose(
            derivativeByAmount(point, i, ({ residualEnthalpy }, total) => total * residualEnthalpy),
            state.partialResidualEnthalpies[i]!,
            1e-6,
            gasConstant * point.temperature,
          );
        }
      }),
      runs,
    );
  });

  it('ln φ of the species is the derivative of n ln φ of the mixture, and satisfies Gibbs and Duhem', () => {
    fc.assert(
      fc.property(gasPoint, (point) => {
        const state = at(point);
        for (let i = 0; i < count; i++) {
          const mixtureDerivative = derivativeByAmount(
            point,
            i,
            ({ logFugacityCoefficients: logs }, total) => {
              const amounts = Float64Array.from(point.fractions);
              amounts[i]! += total - 1;
              return dot(amounts, logs);
            },
          );
          expectClose(mixtureDerivative, state.logFugacityCoefficients[i]!, 1e-6, 1);
          let sum = 0;
          for (let j = 0; j < count; j++) {
            sum +=
              point.fractions[j]! *
              derivativeByAmount(point, i, ({ logFugacityCoefficients: logs }) => logs[j]!);
          }
          expect(Math.abs(sum)).toBeLessThan(1e-6);
        }
      }),
      runs,
    );
  });

  it('∂ ln φ_i/∂p = v_i/(R T) - 1/p and ∂ ln φ_i/∂T = -h_i/(R T²)', () => {
    fc.assert(
      fc.property(gasPoint, (point) => {
        const { temperature, pressure } = point;
        const state = at(point);
        const [pressureStep, temperatureStep] = [1e-4 * pressure, 1e-4 * temperature];
        const above = at(point, temperature, pressure + pressureStep);
        const below = at(point, temperature, pressure - pressureStep);
        const hotter = at(point, temperature + temperatureStep);
        const colder = at(point, temperature - temperatureStep);
        for (let i = 0; i < count; i++) {
          const byPressure =
            (above.logFugacityCoefficients[i]! - below.logFugacityCoefficients[i]!) / (2 * pressureStep);
          expectClose(
            byPressure,
            state.partialMolarVolumes[i]! / (gasConstant * temperature) - 1 / pressure,
            1e-6,
            1 / pressure,
          );
          const byTemperature =
            (hotter.logFugacityCoefficients[i]! - colder.logFugacityCoefficients[i]!) / (2 * temperatureStep);
          expectClose(
            byTemperature,
            -state.partialResidualEnthalpies[i]! / (gasConstant * temperature ** 2),
            1e-6,
            1 / temperature,
          );
        }
      }),
      runs,
    );
  });

  it('derivatives of volume and residual enthalpy are those found by differences', () => {
    fc.assert(
      fc.property(gasPoint, (point) => {
        const { temperature, pressure } = point;
        const state = at(point);
        const [pressureStep, temperatureStep] = [1e-4 * pressure, 1e-4 * temperature];
        const above = at(point, temperature, pressure + pressureStep);
        const below = at(point, temperature, pressure - pressureStep);
        const hotter = at(point, temperature + temperatureStep);
        const colder = at(point, temperature - temperatureStep);
        expectClose(
          (above.molarVolume - below.molarVolume) / (2 * pressureStep),
          state.volumeByPressure,
          1e-6,
          0,
        );
        expectClose(
          (hotter.molarVolume - colder.molarVolume) / (2 * temperatureStep),
          state.volumeByTemperature,
          1e-6,
          0,
        );
        expectClose(
          (hotter.residualEnthalpy - colder.residualEnthalpy) / (2 * temperatureStep),
          state.residualHeatCapacity,
          1e-6,
          gasConstant,
        );
        // ∂h/∂p = v - T ∂v/∂T, of the real less the ideal gas, for which it is zero.
        expectClose(
          (above.residualEnthalpy - below.residualEnthalpy) / (2 * pressureStep),
          state.molarVolume - temperature * state.volumeByTemperature,
          1e-6,
          state.molarVolume,
        );
      }),
      runs,
    );
  });

  it('an ideal gas is the limit at low pressure, with the second virial coefficient b - a/(R T)', () => {
    // At T = Tc: b and a from the critical point alone, α = 1.
    const [Tc, pc] = [400, 4e6];
    const numbers = kind === 'peng_robinson' ? { a: 0.45724, b: 0.0778 } : { a: 0.42748, b: 0.08664 };
    const virial = ((numbers.b - numbers.a) * gasConstant * Tc) / pc;
    const single = cubicOf(kind, [criticalRecord('one', Tc, pc, 0.3)]);
    const state = evaluated(single, [1], Tc, 1e3);
    // Printed to four or five digits; the third virial coefficient is 1e-4 of it at this pressure.
    expectClose(state.molarVolume - (gasConstant * Tc) / 1e3, virial, 5e-4, 0);
    expectClose((state.logFugacityCoefficients[0]! * gasConstant * Tc) / 1e3, virial, 5e-4, 0);
  });

  it('a species entered twice is one species', () => {
    const twice = cubicOf(kind, [...libraryRecords(['CO2', 'CO2', 'H2'])]);
    const once = cubicOf(kind, libraryRecords(['CO2', 'H2']));
    const split = evaluated(twice, [0.1, 0.5, 0.4], 400, 8e6);
    const whole = evaluated(once, [0.6, 0.4], 400, 8e6);
    expectClose(split.molarVolume, whole.molarVolume, 1e-13, 0);
    expectClose(split.residualHeatCapacity, whole.residualHeatCapacity, 1e-11, 0);
    for (const [i, j] of [
      [0, 0],
      [1, 0],
      [2, 1],
    ] as const) {
      expectClose(split.partialMolarVolumes[i]!, whole.partialMolarVolumes[j]!, 1e-11, 0);
      expectClose(split.logFugacityCoefficients[i]!, whole.logFugacityCoefficients[j]!, 1e-11, 0.1);
      expectClose(split.partialResidualEnthalpies[i]!, whole.partialResidualEnthalpies[j]!, 1e-11, 100);
    }
  });

  it('volume and enthalpy stay smooth where √α of a species passes zero', () => {
    // √α of nitrogen is zero at T = Tc (1 + 1/m)²: 1390 K by Peng and Robinson, 1170 K by Soave. A kink in it would be a jump in the
    // enthalpy of a mixture.
    const pair = cubicOf(kind, libraryRecords(['N2', 'CO2']));
    const [nitrogen] = libraryRecords(['N2']);
    const omega = nitrogen!.acentricFactor!;
    const m =
      kind === 'peng_robinson'
        ? 0.37464 + 1.54226 * omega - 0.26992 * omega ** 2
        : 0.48 + 1.574 * omega - 0.176 * omega ** 2;
    const zero = nitrogen!.criticalTemperature! * (1 + 1 / m) ** 2;
    const enthalpy = (temperature: number): FluidState => evaluated(pair, [0.5, 0.5], temperature, 1e7);
    const step = 1e-3;
    const [below, above] = [enthalpy(zero - step), enthalpy(zero + step)];
    expectClose(
      above.residualEnthalpy - below.residualEnthalpy,
      2 * step * enthalpy(zero).residualHeatCapacity,
      1e-4,
      0,
    );
  });

  describe('what it refuses', () => {
    const evaluates = (
      one: EquationOfState,
      fractions: readonly number[],
      temperature: number,
      pressure: number,
    ): boolean =>
      one.evaluate(Float64Array.from(fractions), temperature, pressure, createFluidState(fractions.length));
    const water = cubicOf(kind, libraryRecords(['H2O']));

    it('a liquid far below its boiling point under pressure, but not the vapour at low pressure', () => {
      expect(evaluates(water, [1], 450, 1e7)).toBe(false);
      expect(evaluates(water, [1], 450, 1e5)).toBe(true);
    });

    it('nothing above the critical temperature, however dense', () => {
      expect(evaluates(water, [1], 660, 1e5)).toBe(true);
      expect(evaluates(water, [1], 660, 1e8)).toBe(true);
    });

    it('numbers that are none, and states that do not exist', () => {
      const fractions = [0.2, 0.2, 0.2, 0.2, 0.2];
      expect(evaluates(equation, fractions, Number.NaN, 1e5)).toBe(false);
      expect(evaluates(equation, fractions, 600, Number.NaN)).toBe(false);
      expect(evaluates(equation, [Number.NaN, 0.2, 0.2, 0.2, 0.2], 600, 1e5)).toBe(false);
      expect(evaluates(equation, fractions, -1, 1e5)).toBe(false);
      expect(evaluates(equation, fractions, 600, 0)).toBe(false);
      expect(evaluates(equation, fractions, 600, -1e5)).toBe(false);
    });
  });

  it('slightly negative mole fractions change little', () => {
    const clean = evaluated(equation, [0.3, 0.3, 0.3, 0, 0.1], 700, 1e7);
    const trial = evaluated(equation, [0.3, 0.3, 0.3, -1e-9, 0.1 + 1e-9], 700, 1e7);
    expectClose(trial.molarVolume, clean.molarVolume, 1e-8, 0);
    for (let i = 0; i < count; i++) {
      expectClose(trial.logFugacityCoefficients[i]!, clean.logFugacityCoefficients[i]!, 1e-7, 0.1);
      expectClose(trial.partialMolarVolumes[i]!, clean.partialMolarVolumes[i]!, 1e-7, 0);
    }
  });

  it('what was asked before leaves no trace', () => {
    const fractions = [0.2, 0.2, 0.2, 0.2, 0.2];
    const fresh = evaluated(equation, fractions, 700, 1e7);
    evaluated(equation, [0.9, 0.1, 0, 0, 0], 900, 2e5);
    evaluated(equation, fractions, 700, 1e5);
    expect(evaluated(equation, fractions, 700, 1e7)).toEqual(fresh);
  });

  it('asks for critical temperature, critical pressure and acentric factor', () => {
    const bare = { id: 'X', molarMass: 0.03, criticalTemperature: 300, source: 'test' };
    expect(missingForEquation({ kind, binaryInteraction: [[0]] }, bare)).toEqual([
      'criticalPressure',
      'acentricFactor',
    ]);
    expect(missingForEquation({ kind: 'ideal' }, bare)).toEqual([]);
    expect(() => cubicOf(kind, [bare])).toThrow(RangeError);
  });
});
