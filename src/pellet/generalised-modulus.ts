/**
 * Effectiveness from the generalised modulus: each reaction alone, isothermal at the surface temperature, with all its species following
 * its own stoichiometry inwards:
 *
 *   Φ = L r_s / √(2 ∫ r dψ),   c_i = c_i,s + ν_i ψ / De_i,
 *
 * the integral taken until the reaction stops, at equilibrium or where a reactant is used up. For first order this is L √(k/De); for order
 * n, L √((n+1)/2 k c^(n-1)/De); for a reversible first-order reaction it holds the sum of both constants. η follows from Φ by the
 * first-order closed form of the pellet's shape: exact for first order, within 8 % between orders 1/2 and 3, exact again at large Φ.
 *
 * Does not see other reactions that compete for the same species inside the pellet, nor temperature differences inside it.
 *
 * @source Bischoff (1965), AIChE J. 11, 351; Aris (1965), Ind. Eng. Chem. Fundam. 4, 227; Petersen (1965), Chem. Eng. Sci. 20, 587
 */
import { gaussLegendre } from '../numerics/quadrature.js';
import { findRoot } from '../numerics/scalar-root.js';
import { firstOrderEffectiveness } from './closed-form-effectiveness.js';
import type { SurfaceLaw } from './lumped-pellet.js';
import type { PelletModelInput } from './pellet-model.js';

/** Points along ψ; with the substitution below exact for powers of a reactant up to about 15, halves included. */
const pathPointCount = 16;

export function createGeneralisedModulusLaw(input: PelletModelInput): SurfaceLaw {
  const { rates, rateFactors, speciesCount, stoichiometry, pellet, transport } = input;
  const { effectiveDiffusivities } = transport;
  const { diffusionLength, shapeExponent } = pellet.geometry;
  const columns = speciesCount + 2;
  const reactionCount = stoichiometry.length;
  const path = gaussLegendre(pathPointCount);
  const inside = new Float64Array(speciesCount);
  const surfaceRates = new Float64Array(reactionCount);
  const surfaceGradient = new Float64Array(reactionCount * columns);
  const pathRates = new Float64Array(reactionCount);
  const pathGradient = new Float64Array(reactionCount * columns);

  return (concentrations, temperature, pressure, averageRates, gradient) => {
    const rateOf = (j: number, potential: number): number => {
      placeInside(concentrations, stoichiometry[j]!, effectiveDiffusivities, potential, inside);
      rates.evaluate(inside, 0, temperature, pressure, pathRates, 0);
      return pathRates[j]!;
    };
    rates.evaluateWithGradient(concentrations, 0, temperature, pressure, surfaceRates, 0, surfaceGradient, 0);
    gradient?.fill(0);
    for (let j = 0; j < reactionCount; j++) {
      const row = stoichiometry[j]!;
      const surfaceRate = surfaceRates[j]!;
      const end = pathEnd(j, row, concentrations, effectiveDiffusivities, surfaceRate, rateOf);
      if (surfaceRate === 0 || end.potential === 0 || !Number.isFinite(surfaceRate)) {
        averageRates[j] = rateFactors[j]! * surfaceRate;
        for (let column = 0; gradient && column < columns; column++) {
          gradient[j * columns + column] = rateFactors[j]! * surfaceGradient[j * columns + column]!;
        }
        continue;
      }
      // ψ = end (1 - v²): a rate that ends like a fractional power of what is left becomes smooth in v.
      let integral = 0;
      const integralGradient = new Float64Array(columns);
      path.points.forEach((v, q) => {
        const weight = 2 * v * end.potential * path.weights[q]!;
        placeInside(concentrations, row, effectiveDiffusivities, end.potential * (1 - v * v), inside);
        if (gradient) {
          rates.evaluateWithGradient(inside, 0, temperature, pressure, pathRates, 0, pathGradient, 0);
          for (let column = 0; column < columns; column++) {
            integralGradient[column]! += weight * pathGradient[j * columns + column]!;
          }
        } else {
          rates.evaluate(inside, 0, temperature, pressure, pathRates, 0);
        }
        integral += weight * pathRates[j]!;
      });
      if (end.limitingSpecies >= 0) {
        const reach = Math.abs(effectiveDiffusivities[end.limitingSpecies]! / row[end.limitingSpecies]!);
        integralGradient[end.limitingSpecies]! += rateOf(j, end.potential) * reach * Math.sign(end.potential);
      }
      const modulus =
        (diffusionLength * Math.abs(surfaceRate) * Math.sqrt(rateFactors[j]!)) /
        Math.sqrt(2 * Math.abs(integral));
      const { effectiveness, slope } = firstOrderEffectiveness(modulus, shapeExponent);
      averageRates[j] = rateFactors[j]! * effectiveness * surfaceRate;
      for (let column = 0; gradient && column < columns; column++) {
        gradient[j * columns + column] =
          rateFactors[j]! *
          ((effectiveness + slope * modulus) * surfaceGradient[j * columns + column]! -
            (surfaceRate * slope * modulus * integralGradient[column]!) / (2 * integral));
      }
    }
  };
}

/** Concentrations where the reaction has advanced by `potential` (mol/(m s)) from the surface. */
function placeInside(
  surface: Float64Array,
  row: readonly number[],
  diffusivities: Float64Array,
  potential: number,
  target: Float64Array,
): void {
  for (let i = 0; i < target.length; i++) {
    target[i] = Math.max(0, surface[i]! + (row[i]! === 0 ? 0 : (row[i]! * potential) / diffusivities[i]!));
  }
}

/** Where the reaction stops on its way inwards: at equilibrium (no limiting species) or where a species is used up. */
function pathEnd(
  j: number,
  row: readonly number[],
  surface: Float64Array,
  diffusivities: Float64Array,
  surfaceRate: number,
  rateOf: (j: number, potential: number) => number,
): { potential: number; limitingSpecies: number } {
  const direction = Math.sign(surfaceRate);
  let limit = Infinity;
  let limitingSpecies = -1;
  row.forEach((coefficient, i) => {
    if (coefficient * direction >= 0) return;
    const reach = Math.max(0, (surface[i]! * diffusivities[i]!) / Math.abs(coefficient));
    if (reach < limit) {
      limit = reach;
      limitingSpecies = i;
    }
  });
  if (direction === 0 || limitingSpecies < 0 || limit === 0 || limit === Infinity)
    return { potential: 0, limitingSpecies: -1 };
  const potential = direction * limit;
  if (rateOf(j, potential) * surfaceRate >= 0) return { potential, limitingSpecies };
  const { root } = findRoot((p) => rateOf(j, p), 0, potential, limit * 1e-14);
  return { potential: root, limitingSpecies: -1 };
}
