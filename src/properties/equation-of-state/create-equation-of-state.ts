import { createPropertyFunction, type FluidProperty } from '../fluid-property.js';
import type { SpeciesRecord } from '../species-record.js';
import { createConstantDensity } from './constant-density.js';
import { createCubicEquation } from './cubic-equation.js';
import type { EquationOfState } from './equation-of-state.js';
import { idealGasState } from './ideal-gas-state.js';

/** An equation of state as the case asks for it; plain data, SI. */
export type EquationOfStateSpecification =
  | { readonly kind: 'ideal' }
  | {
      readonly kind: 'constant_density';
      /** kg/m³ */
      readonly density: FluidProperty;
    }
  | {
      readonly kind: 'peng_robinson' | 'soave_redlich_kwong';
      /** k_ij, symmetric with zero diagonal; rows and columns one per species. */
      readonly binaryInteraction: readonly (readonly number[])[];
    };

/** What a record lacks for an equation of state. */
export function missingForEquation(
  { kind }: EquationOfStateSpecification,
  record: SpeciesRecord,
): readonly (keyof SpeciesRecord)[] {
  return kind === 'ideal' || kind === 'constant_density' ? [] : missingForCubic(record);
}

/** What a record lacks for a cubic equation, and for the phase check. */
export function missingForCubic(record: SpeciesRecord): readonly (keyof SpeciesRecord)[] {
  const needed = ['criticalTemperature', 'criticalPressure', 'acentricFactor'] as const;
  return needed.filter((key) => record[key] === undefined);
}

/** @param records - one per species; those of a cubic equation with critical temperature, critical pressure and acentric factor */
export function createEquationOfState(
  specification: EquationOfStateSpecification,
  records: readonly SpeciesRecord[],
): EquationOfState {
  if (specification.kind === 'ideal') return idealGasState;
  if (specification.kind === 'constant_density')
    return createConstantDensity(
      createPropertyFunction(specification.density),
      records.map(({ molarMass }) => molarMass),
    );
  return createCubicEquation(specification.kind, records, specification.binaryInteraction);
}
