import { describe, expect, it } from 'vitest';
import type { CubicKind } from '../../../src/properties/equation-of-state/cubic-root.js';
import type { FluidState } from '../../../src/properties/equation-of-state/equation-of-state.js';
import { readReference } from '../../reference/read-reference.js';
import { criticalRecord, cubicOf, evaluated } from './fluid-fixtures.js';

interface ReferenceFile {
  readonly species: readonly {
    readonly id: string;
    readonly criticalTemperature: number;
    readonly criticalPressure: number;
    readonly acentricFactor: number;
  }[];
  readonly binaryInteraction: readonly (readonly number[])[];
  readonly states: readonly ({
    readonly equation: CubicKind;
    readonly moleFractions: readonly number[];
    readonly temperature: number;
    readonly pressure: number;
    readonly agreement: number;
  } & Readonly<Record<keyof FluidState, number | readonly number[]>>)[];
}

const reference = readReference('cubic-fluid.json') as ReferenceFile;
const records = reference.species.map((one) =>
  criticalRecord(one.id, one.criticalTemperature, one.criticalPressure, one.acentricFactor),
);

const properties = [
  'molarVolume',
  'volumeByTemperature',
  'volumeByPressure',
  'partialMolarVolumes',
  'residualEnthalpy',
  'residualHeatCapacity',
  'partialResidualEnthalpies',
  'logFugacityCoefficients',
] as const satisfies readonly (keyof FluidState)[];

describe('integrals over pressure of p(n, V, T) alone', () => {
  it.each(
    reference.states.map((state) => ({ ...state, title: `${state.temperature} K, ${state.pressure} Pa` })),
  )('$equation at $title', (state) => {
    expect(state.agreement).toBeLessThan(1e-12);
    const equation = cubicOf(state.equation, records, reference.binaryInteraction);
    const found = evaluated(equation, state.moleFractions, state.temperature, state.pressure);
    for (const property of properties) {
      const wanted = [state[property]].flat();
      const got = typeof found[property] === 'number' ? [found[property]] : [...found[property]];
      expect(got).toHaveLength(wanted.length);
      // Near zero a value is judged by the largest of its kind.
      const floor = 1e-3 * Math.max(...wanted.map(Math.abs));
      got.forEach((value, i) => {
        const error = Math.abs(value - wanted[i]!) / Math.max(Math.abs(wanted[i]!), floor);
        expect(error, `${property} ${i}`).toBeLessThan(1e-9);
      });
    }
  });
});
