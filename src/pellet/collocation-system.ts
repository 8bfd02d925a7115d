/**
 * The collocation equations of one pellet and what follows from their linearisation:
 *
 *   φ_kn - R² Σ_m green_nm q_km = 0,     <q_k> - Σ_m weights_m q_km = 0,
 *
 * with R the radius of the one-dimensional body. The second set stands only where there is a film.
 */
import type { DiffusionGrid } from '../numerics/diffusion/diffusion-grid.js';
import type { FieldBasis } from './field-basis.js';
import type { PelletNodes } from './pellet-nodes.js';

/** What the equations are made of; fixed for one pellet on one grid. */
export interface CollocationSystem {
  readonly grid: DiffusionGrid;
  readonly basis: FieldBasis;
  readonly nodes: PelletNodes;
  readonly reactionCount: number;
  readonly speciesCount: number;
  /** Each law's own basis into mol/(m³ pellet s). */
  readonly rateFactors: readonly number[];
  /** R², m² */
  readonly radiusSquared: number;
  /** Number of unknowns. */
  readonly size: number;
}

/** Residual at the sources last evaluated; `target` has length `size`. */
export function residualInto(
  system: CollocationSystem,
  unknowns: Float64Array,
  growth: number,
  target: Float64Array,
): void {
  const { unknownCount, nodeCount, green, weights } = system.grid;
  const { fieldCount, hasFilm } = system.basis;
  const { sources } = system.nodes;
  const scale = growth * growth * system.radiusSquared;
  for (let k = 0; k < fieldCount; k++) {
    const source = k * nodeCount;
    for (let n = 0; n < unknownCount; n++) {
      let sum = 0;
      const row = n * unknownCount;
      for (let m = 0; m < unknownCount; m++) sum += green[row + m]! * sources[source + m]!;
      target[k * unknownCount + n] = unknowns[k * unknownCount + n]! - scale * sum;
    }
    if (hasFilm) {
      const at = fieldCount * unknownCount + k;
      target[at] = unknowns[at]! - weightedSum(weights, sources, source);
    }
  }
}

/** Jacobian of the residual from the nodes' derivatives; `target` is row-major `size × size`. */
export function jacobianInto(system: CollocationSystem, growth: number, target: Float64Array): void {
  const { size, reactionCount } = system;
  const { unknownCount, nodeCount, green, weights } = system.grid;
  const { fieldCount, combination, hasFilm } = system.basis;
  const { byPotential, byAverage } = system.nodes;
  const scale = growth * growth * system.radiusSquared;
  const filmStart = fieldCount * unknownCount;
  target.fill(0);
  for (let m = 0; m < nodeCount; m++) {
    for (let l = 0; l < fieldCount; l++) {
      const at = (m * fieldCount + l) * reactionCount;
      for (let k = 0; k < fieldCount; k++) {
        let potential = 0;
        let average = 0;
        for (let j = 0; j < reactionCount; j++) {
          const part = combination[k * reactionCount + j]!;
          potential += part * byPotential[at + j]!;
          average += part * byAverage[at + j]!;
        }
        if (m < unknownCount) {
          for (let n = 0; n < unknownCount; n++) {
            const row = (k * unknownCount + n) * size;
            const entry = scale * green[n * unknownCount + m]!;
            target[row + l * unknownCount + m]! -= entry * potential;
            if (hasFilm) target[row + filmStart + l]! -= entry * average;
          }
        }
        if (hasFilm) {
          const row = (filmStart + k) * size;
          if (m < unknownCount) target[row + l * unknownCount + m]! -= weights[m]! * potential;
          target[row + filmStart + l]! -= weights[m]! * average;
        }
      }
    }
  }
  for (let n = 0; n < size; n++) target[n * size + n]! += 1;
}

/**
 * Derivative of one averaged rate with respect to bulk concentrations, temperature and pressure, by the adjoint of the equations.
 *
 * @param reaction - whose average
 * @param solveAdjoint - replaces a right side of length `size` by the solution with the transposed Jacobian
 * @param temperatureShifts - dT_node/dT_bulk at fixed unknowns, one per node
 * @param target - `speciesCount + 2` entries from `targetOffset` are written
 */
export function averageGradientInto(
  system: CollocationSystem,
  reaction: number,
  solveAdjoint: (vector: Float64Array) => void,
  temperatureShifts: Float64Array,
  adjoint: Float64Array,
  target: Float64Array,
  targetOffset: number,
): void {
  const { speciesCount, reactionCount, radiusSquared, rateFactors } = system;
  const { nodeCount, unknownCount, green, weights } = system.grid;
  const { fieldCount, combination, hasFilm } = system.basis;
  const { byPotential, byAverage, rateGradient } = system.nodes;
  const columns = speciesCount + 2;
  const filmStart = fieldCount * unknownCount;
  adjoint.fill(0);
  for (let k = 0; k < fieldCount; k++) {
    for (let m = 0; m < nodeCount; m++) {
      const at = (m * fieldCount + k) * reactionCount + reaction;
      if (m < unknownCount) adjoint[k * unknownCount + m] = weights[m]! * byPotential[at]!;
      if (hasFilm) adjoint[filmStart + k]! += weights[m]! * byAverage[at]!;
    }
  }
  solveAdjoint(adjoint);
  target.fill(0, targetOffset, targetOffset + columns);
  for (let m = 0; m < nodeCount; m++) {
    for (let j = 0; j < reactionCount; j++) {
      // How much the average moves with rate j at node m: directly, and through every field that the rate feeds.
      let weight = j === reaction ? weights[m]! : 0;
      for (let k = 0; k < fieldCount; k++) {
        const part = combination[k * reactionCount + j]!;
        if (part === 0) continue;
        let influence = hasFilm ? adjoint[filmStart + k]! * weights[m]! : 0;
        if (m < unknownCount) {
          let sum = 0;
          for (let n = 0; n < unknownCount; n++) {
            sum += adjoint[k * unknownCount + n]! * green[n * unknownCount + m]!;
          }
          influence += radiusSquared * sum;
        }
        weight += influence * part;
      }
      if (weight === 0) continue;
      weight *= rateFactors[j]!;
      const from = (m * reactionCount + j) * columns;
      for (let column = 0; column < columns; column++) {
        const shift = column === speciesCount ? temperatureShifts[m]! : 1;
        target[targetOffset + column]! += weight * shift * rateGradient[from + column]!;
      }
    }
  }
}

/** Σ weights[m] values[offset + m] */
export function weightedSum(weights: Float64Array, values: Float64Array, offset: number): number {
  let sum = 0;
  for (let m = 0; m < weights.length; m++) sum += weights[m]! * values[offset + m]!;
  return sum;
}
