import type { PelletBulk } from '../pellet/pellet-model.js';
import type { FluidState } from '../properties/equation-of-state/equation-of-state.js';

/** Conditions at one position, filled by `unpack`. */
export interface BedConditions extends PelletBulk {
  /** mol/s per tube, one per species */
  readonly flows: Float64Array;
  totalFlow: number;
  readonly moleFractions: Float64Array;
  readonly fluid: FluidState;
  /** W/K: enthalpy flow per kelvin at constant pressure */
  capacityFlow: number;
  /** W: real fluid minus ideal gas; zero where the energy balance does not count it */
  residualEnthalpyFlow: number;
  /** W/Pa: enthalpy flow per pascal at constant temperature; zero in an ideal gas */
  enthalpyFlowByPressure: number;
}
