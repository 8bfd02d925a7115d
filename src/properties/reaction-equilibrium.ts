/**
 * Enthalpy, entropy and equilibrium constant of a reaction from its species' ideal-gas data, standard pressure 1 bar.
 *
 *   ln K = -ΔG/(R T),  d ln K/dT = ΔH/(R T²)  (van 't Hoff, exact)
 *
 * @source Smith, Van Ness & Abbott, Introduction to Chemical Engineering Thermodynamics, ch. 13 (common practice)
 */
import { gasConstant } from '../quantities/constants.js';
import {
  combineNasaPolynomials,
  reducedEnthalpy,
  reducedGibbsEnergy,
  type NasaPolynomial,
} from './nasa-polynomial.js';
import type { SpeciesThermochemistry } from './thermochemistry.js';

/** Dimensionless, activities at 1 bar standard pressure; temperature in K. */
export interface EquilibriumConstant {
  readonly value: (temperature: number) => number;
  /** dK/dT, 1/K */
  readonly derivative: (temperature: number) => number;
  /** ln K, finite where K itself would overflow */
  readonly logarithm: (temperature: number) => number;
}

/**
 * Enthalpy change, J per mole of reaction as written; negative when exothermic.
 *
 * @param stoichiometry - one per species, negative for what is consumed
 * @param thermochemistry - one per species; those with coefficient zero may lack data
 * @param temperature - K
 * @returns NaN where a species that takes part has no heat capacity; differences from 298.15 K alone where one has no heat of formation
 */
export function enthalpyChange(
  stoichiometry: readonly number[],
  thermochemistry: readonly SpeciesThermochemistry[],
  temperature: number,
): number {
  return sumOver(stoichiometry, thermochemistry, (species) => species.enthalpy(temperature));
}

/** Entropy change at 1 bar, J/(mol K); arguments and gaps as in {@link enthalpyChange}. */
export function entropyChange(
  stoichiometry: readonly number[],
  thermochemistry: readonly SpeciesThermochemistry[],
  temperature: number,
): number {
  return sumOver(stoichiometry, thermochemistry, (species) => species.entropy(temperature));
}

function sumOver(
  stoichiometry: readonly number[],
  thermochemistry: readonly SpeciesThermochemistry[],
  property: (species: SpeciesThermochemistry) => number,
): number {
  return stoichiometry.reduce(
    (sum, coefficient, i) => (coefficient === 0 ? sum : sum + coefficient * property(thermochemistry[i]!)),
    0,
  );
}

/**
 * Equilibrium constant of one reaction.
 *
 * @param stoichiometry - one per species, negative for what is consumed
 * @param thermochemistry - one per species
 * @returns functions that are NaN where {@link hasEquilibriumConstant} is false
 */
export function createEquilibriumConstant(
  stoichiometry: readonly number[],
  thermochemistry: readonly SpeciesThermochemistry[],
): EquilibriumConstant {
  if (!hasEquilibriumConstant(stoichiometry, thermochemistry)) {
    const unknown = (): number => NaN;
    return { value: unknown, derivative: unknown, logarithm: unknown };
  }
  const polynomial = reactionPolynomial(stoichiometry, thermochemistry);
  const reducedHeat = polynomial
    ? (temperature: number): number => reducedEnthalpy(polynomial, temperature)
    : (temperature: number): number =>
        enthalpyChange(stoichiometry, thermochemistry, temperature) / gasConstant;
  const logarithm = polynomial
    ? (temperature: number): number => -reducedGibbsEnergy(polynomial, temperature)
    : (temperature: number): number =>
        entropyChange(stoichiometry, thermochemistry, temperature) / gasConstant -
        reducedHeat(temperature) / temperature;
  return {
    value: (temperature) => Math.exp(logarithm(temperature)),
    derivative: (temperature) =>
      (Math.exp(logarithm(temperature)) * reducedHeat(temperature)) / temperature ** 2,
    logarithm,
  };
}

/** Whether every species that takes part has heat capacity, heat of formation and standard entropy. */
export function hasEquilibriumConstant(
  stoichiometry: readonly number[],
  thermochemistry: readonly SpeciesThermochemistry[],
): boolean {
  return stoichiometry.every((coefficient, i) => {
    if (coefficient === 0) return true;
    const { hasHeatCapacity, hasEnthalpyOfFormation, hasStandardEntropy } = thermochemistry[i]!;
    return hasHeatCapacity && hasEnthalpyOfFormation && hasStandardEntropy;
  });
}

/** The species' polynomials summed over the reaction; undefined where one of them is a formula. */
function reactionPolynomial(
  stoichiometry: readonly number[],
  thermochemistry: readonly SpeciesThermochemistry[],
): NasaPolynomial | undefined {
  const terms: { weight: number; polynomial: NasaPolynomial }[] = [];
  for (const [i, weight] of stoichiometry.entries()) {
    if (weight === 0) continue;
    const { polynomial } = thermochemistry[i]!;
    if (!polynomial) return undefined;
    terms.push({ weight, polynomial });
  }
  return terms.length === 0 ? undefined : combineNasaPolynomials(terms);
}
