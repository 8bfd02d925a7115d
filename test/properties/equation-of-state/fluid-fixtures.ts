import {
  createEquationOfState,
  type EquationOfStateSpecification,
} from '../../../src/properties/equation-of-state/create-equation-of-state.js';
import type { CubicKind } from '../../../src/properties/equation-of-state/cubic-root.js';
import {
  createFluidState,
  type EquationOfState,
  type FluidState,
} from '../../../src/properties/equation-of-state/equation-of-state.js';
import type { SpeciesRecord } from '../../../src/properties/species-record.js';
import { findLibrarySpecies } from '../../../src/properties/species/library.js';

export const cubicKinds: readonly CubicKind[] = ['peng_robinson', 'soave_redlich_kwong'];

/** A record of critical data alone: K, Pa, dimensionless. */
export function criticalRecord(
  id: string,
  criticalTemperature: number,
  criticalPressure: number,
  acentricFactor: number,
): SpeciesRecord {
  return {
    id,
    molarMass: 0.03,
    criticalTemperature,
    criticalPressure,
    acentricFactor,
    source: 'test',
  };
}

export function libraryRecords(ids: readonly string[]): SpeciesRecord[] {
  return ids.map((id) => findLibrarySpecies(id)!);
}

export function zeroInteraction(count: number): number[][] {
  return Array.from({ length: count }, () => new Array<number>(count).fill(0));
}

export function cubicOf(
  kind: CubicKind,
  records: readonly SpeciesRecord[],
  binaryInteraction: readonly (readonly number[])[] = zeroInteraction(records.length),
): EquationOfState {
  const specification: EquationOfStateSpecification = { kind, binaryInteraction };
  return createEquationOfState(specification, records);
}

/** A state of its own for each call. @throws Error where there is no gas */
export function evaluated(
  equation: EquationOfState,
  moleFractions: ArrayLike<number>,
  temperature: number,
  pressure: number,
): FluidState {
  const state = createFluidState(moleFractions.length);
  if (!equation.evaluate(Float64Array.from(moleFractions), temperature, pressure, state))
    throw new Error(`no gas at ${temperature} K, ${pressure} Pa`);
  return state;
}
