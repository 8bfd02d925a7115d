import type { RateEvaluator } from '../kinetics/rate-evaluator.js';
import type { PelletSpecification, PelletTransport } from './pellet-specification.js';

/** Conditions of the fluid around a pellet. The arrays belong to the caller and are only read. */
export interface PelletBulk {
  /** mol/m³, one per species */
  readonly concentrations: Float64Array;
  /** K */
  temperature: number;
  /** Pa */
  pressure: number;
  /** J per mole of reaction at `temperature`, negative when exothermic; one per reaction. */
  readonly reactionHeats: Float64Array;
  /** d(reactionHeats)/dT, J/(mol K) */
  readonly reactionHeatSlopes: Float64Array;
}

/**
 * - `no_state`: no steady state was found within the work allowed
 * - `overdrawn`: the state found needs negative concentrations, because a law does not vanish with its reactant
 * - `rates_not_finite`: a rate law gave no number at the bulk conditions
 */
export type PelletStatus = 'converged' | 'no_state' | 'overdrawn' | 'rates_not_finite';

export interface PelletWork {
  solves: number;
  iterations: number;
  factorisations: number;
  rateEvaluations: number;
  largestNodeCount: number;
}

/** What one pellet looks like inside; arrays over `relativeRadii`, centre first. */
export interface PelletInterior {
  readonly relativeRadii: Float64Array;
  /** mol/m³, one array per species */
  readonly concentrations: readonly Float64Array[];
  /** K */
  readonly temperatures: Float64Array;
}

/**
 * A pellet sub-model: from bulk conditions to rates averaged over the pellet, with exact derivatives. Keeps its last
 * solution as the start of the next, so use one model for one walk along a bed.
 */
export interface PelletModel {
  /** mol/(m³ pellet s), one per reaction; of the last `solve`. */
  readonly averageRates: Float64Array;
  /** Row-major `reactionCount × (speciesCount + 2)`: d(averageRates)/d(c_i, T, P) of the bulk; of the last `differentiate`. */
  readonly gradient: Float64Array;
  readonly work: PelletWork;
  solve: (bulk: PelletBulk) => PelletStatus;
  /** Solves and fills `gradient`. */
  differentiate: (bulk: PelletBulk) => PelletStatus;
  /** K, at the pellet's surface and centre; of the last `solve`. */
  surfaceTemperature: () => number;
  centreTemperature: () => number;
  interior: (relativeRadii: Float64Array) => PelletInterior;
  /** Compares with a finer resolution at these conditions; `raised` when later solutions will be finer than earlier ones. */
  reviewResolution: (bulk: PelletBulk) => 'adequate' | 'raised';
}

/** Everything a pellet model is made from. */
export interface PelletModelInput {
  readonly pellet: PelletSpecification;
  /** Read anew at each solve where `transportVaries`; its owner sets it to the bulk conditions beforehand. */
  readonly transport: PelletTransport;
  readonly transportVaries: boolean;
  readonly speciesCount: number;
  /** One row per reaction, one entry per species. */
  readonly stoichiometry: readonly (readonly number[])[];
  readonly rates: RateEvaluator;
  /** Turns each law's own basis into mol/(m³ pellet s); activity included. One per reaction. */
  readonly rateFactors: readonly number[];
  /** Heats at one reference temperature, for finding which reactions are independent; undefined in an isothermal pellet. */
  readonly referenceHeats: readonly number[] | undefined;
  /** Relative error allowed in the averaged rates. */
  readonly tolerance: number;
}

export function createPelletWork(): PelletWork {
  return { solves: 0, iterations: 0, factorisations: 0, rateEvaluations: 0, largestNodeCount: 0 };
}
