import { describe, expect, it } from 'vitest';
import { createConstantDensity } from '../../../src/properties/equation-of-state/constant-density.js';
import {
  createEquationOfState,
  missingForEquation,
} from '../../../src/properties/equation-of-state/create-equation-of-state.js';
import { createFluidState } from '../../../src/properties/equation-of-state/equation-of-state.js';
import { evaluated, libraryRecords } from './fluid-fixtures.js';

const within = (found: number, wanted: number, relative: number): void => {
  expect(Math.abs(found / wanted - 1)).toBeLessThan(relative);
};

describe('ideal gas', () => {
  const equation = createEquationOfState({ kind: 'ideal' }, libraryRecords(['N2', 'H2O']));

  it('one mole at 273.15 K and 1 bar takes up 22.710 954 64 L: molar volume of the ideal gas, CODATA 2018', () => {
    const state = evaluated(equation, [0.3, 0.7], 273.15, 1e5);
    within(state.molarVolume, 22.71095464e-3, 1e-9);
    expect([...state.partialMolarVolumes]).toEqual([state.molarVolume, state.molarVolume]);
    // ∂v/∂T = v/T, ∂v/∂p = -v/p.
    within(state.volumeByTemperature * 273.15, state.molarVolume, 1e-14);
    within(state.volumeByPressure * -1e5, state.molarVolume, 1e-14);
    expect(equation.isIdealGas).toBe(true);
  });

  it('has no residuals', () => {
    const state = evaluated(equation, [0.3, 0.7], 600, 1e7);
    expect([state.residualEnthalpy, state.residualHeatCapacity]).toEqual([0, 0]);
    expect([...state.partialResidualEnthalpies, ...state.logFugacityCoefficients]).toEqual([0, 0, 0, 0]);
  });
});

describe('liquid of given density', () => {
  it('a mole of water at 998.2 kg/m³ takes up 18.05 cm³, and species share the volume by mass', () => {
    // 18.015 g/mol over the density of water at 20 °C, CRC Handbook (from memory).
    const specification = {
      kind: 'constant_density',
      density: { kind: 'constant', value: 998.2 },
    } as const;
    const records = libraryRecords(['H2O', 'methanol']);
    const equation = createEquationOfState(specification, records);
    within(evaluated(equation, [1, 0], 293.15, 1e5).molarVolume, 18.048e-6, 1e-4);
    const state = evaluated(equation, [0.4, 0.6], 293.15, 1e5);
    within(
      state.partialMolarVolumes[1]! / state.partialMolarVolumes[0]!,
      records[1]!.molarMass / records[0]!.molarMass,
      1e-14,
    );
    within(
      0.4 * state.partialMolarVolumes[0]! + 0.6 * state.partialMolarVolumes[1]!,
      state.molarVolume,
      1e-14,
    );
    expect(state.volumeByTemperature).toBeCloseTo(0, 30);
    expect(state.volumeByPressure).toBeCloseTo(0, 30);
    expect([state.residualEnthalpy, state.residualHeatCapacity]).toEqual([0, 0]);
    expect([...state.partialResidualEnthalpies, ...state.logFugacityCoefficients]).toEqual([0, 0, 0, 0]);
    expect(equation.isIdealGas).toBe(false);
    expect(missingForEquation(specification, { id: 'X', molarMass: 0.03, source: 'test' })).toEqual([]);
  });

  /** 1000 - 0.5 (T - 300) + 4e-7 p, in K and Pa: expands by 5e-4 per K, gives 4e-10 per Pa. */
  const soft = createConstantDensity(
    {
      isConstant: false,
      value: (temperature, pressure) => 1000 - 0.5 * (temperature - 300) + 4e-7 * pressure,
      temperatureDerivative: () => -0.5,
      pressureDerivative: () => 4e-7,
    },
    [0.02, 0.05],
  );

  it('a density of temperature and pressure gives expansion and compression', () => {
    const state = evaluated(soft, [0.5, 0.5], 300, 0);
    within(state.molarVolume, 0.035 / 1000, 1e-14);
    within(state.volumeByTemperature / state.molarVolume, 5e-4, 1e-12);
    within(state.volumeByPressure / state.molarVolume, -4e-10, 1e-12);
  });

  it('is refused where the density is none', () => {
    const state = createFluidState(2);
    const fractions = Float64Array.of(0.5, 0.5);
    expect(soft.evaluate(fractions, 2300, 0, state)).toBe(false);
    expect(soft.evaluate(fractions, 2400, 1e5, state)).toBe(false);
    expect(soft.evaluate(fractions, Number.NaN, 1e5, state)).toBe(false);
    expect(soft.evaluate(Float64Array.of(Number.NaN, 0.5), 300, 1e5, state)).toBe(false);
  });
});
