import { createPropertyFunction, type FluidProperty } from '../../properties/fluid-property.js';
import type { PelletTransport } from '../../pellet/pellet-specification.js';
import type { BedConditions } from '../bed-conditions.js';
import type { ReactorSpecification } from '../reactor-specification.js';

/** Properties at one position as numbers; NaN where nothing needs them. */
export interface LocalValues {
  /** Pa s */
  viscosity: number;
  /** W/(m K) */
  thermalConductivity: number;
  /** m²/s, of each species in the mixture */
  readonly diffusivities: Float64Array;
  readonly transport: PelletTransport;
}

/** Sets something from the conditions; false where it comes to no positive number. */
export type LocalStep = (conditions: BedConditions) => boolean;

/** Writes a given property: a number now and for good, a formula at each position. */
export function givenSteps(
  property: FluidProperty,
  { temperature, pressure }: ReactorSpecification['feed'],
  write: (value: number) => void,
): LocalStep[] {
  const { isConstant, value } = createPropertyFunction(property);
  write(value(temperature, pressure));
  if (isConstant) return [];
  return [
    (conditions) => {
      const local = value(conditions.temperature, conditions.pressure);
      write(local);
      return local > 0;
    },
  ];
}
