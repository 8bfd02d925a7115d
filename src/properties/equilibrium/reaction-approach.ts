/** How far one reaction is from its equilibrium at a given composition. */
import { findRoot } from '../../numerics/scalar-root.js';
import { standardPressure } from '../../quantities/constants.js';
import type { EquilibriumConstant } from '../reaction-equilibrium.js';

/**
 * ln Q of one reaction with fugacities over 1 bar.
 *
 * @param stoichiometry - one per species
 * @param moleFractions - one per species
 * @param pressure - Pa
 * @param logFugacityCoefficients - ln φ_i, one per species
 * @returns -Infinity where a product is absent, Infinity where a reactant is, NaN where both are
 */
export function logReactionQuotient(
  stoichiometry: readonly number[],
  moleFractions: ArrayLike<number>,
  pressure: number,
  logFugacityCoefficients: ArrayLike<number>,
): number {
  const logPressure = Math.log(pressure / standardPressure);
  return stoichiometry.reduce(
    (sum, coefficient, i) =>
      coefficient === 0
        ? sum
        : sum +
          coefficient *
            (Math.log(Math.max(moleFractions[i]!, 0)) + logPressure + logFugacityCoefficients[i]!),
    0,
  );
}

/**
 * Temperature at which a composition would be at the equilibrium of one reaction. The temperature of the gas less this one is what the trade
 * calls the temperature approach.
 *
 * @param logQuotient - ln Q at the composition
 * @param range - K, in which the constant holds
 * @returns K; NaN where the constant does not take this value in the range
 */
export function equilibriumTemperature(
  logQuotient: number,
  constant: EquilibriumConstant,
  [lowest, highest]: readonly [number, number],
): number {
  if (!Number.isFinite(logQuotient)) return Number.NaN;
  // ln K is nearly straight over 1/T.
  const excess = (inverse: number): number => constant.logarithm(1 / inverse) - logQuotient;
  const [atLowest, atHighest] = [excess(1 / lowest), excess(1 / highest)];
  if (!(atLowest * atHighest <= 0)) return Number.NaN;
  const { root } = findRoot(excess, 1 / highest, 1 / lowest, 1e-13 / highest);
  return 1 / root;
}
