/**
 * What a law says at equilibrium, before anything runs: `K_eq` must be computable where it is used, and a reversible law should vanish where the
 * species' thermochemistry says that the reaction stops.
 */
import type { ReactorSpecification } from '../../bed/reactor-specification.js';
import { mentions } from '../../expressions/mentions.js';
import { compileRates } from '../../kinetics/compile-rates.js';
import { findRoot } from '../../numerics/scalar-root.js';
import { createEquilibriumConstant, hasEquilibriumConstant } from '../../properties/reaction-equilibrium.js';
import { createSpeciesThermochemistry } from '../../properties/thermochemistry.js';
import { gasConstant, standardPressure } from '../../quantities/constants.js';
import { problemAt, type CaseContext } from '../case-context.js';

/** Published laws and tables disagree by up to about a third (methanol synthesis); more than this factor deserves a word. */
const alarmingFactor = 1.5;

/** False where a law uses `K_eq` without the data for it. */
export function checkEquilibrium(context: CaseContext, specification: ReactorSpecification): boolean {
  const { species, reactions } = specification;
  const thermochemistry = species.map(createSpeciesThermochemistry);
  let isSound = true;
  reactions.forEach((reaction, index) => {
    const isKnown = hasEquilibriumConstant(reaction.stoichiometry, thermochemistry);
    if (mentions(reaction.rate.expression, 'equilibrium_constant') && !isKnown) {
      isSound = false;
      problemAt(context, ['reactions', index, 'rate'], {
        code: 'missing_property',
        found: '`K_eq` without the data it follows from',
        expected: '`heat_capacity`, `heat_of_formation` and `entropy` of every species of the reaction',
        mend: 'take the species from the library, or define the constant under `constants`',
      });
    }
    if (reaction.isReversible && isKnown && isSound) compareWithLaw(context, specification, index);
  });
  return isSound;
}

/**
 * Walks along the reaction's own stoichiometry at feed temperature and pressure, from a mixture of all its species, to where the law changes
 * sign, and compares the reaction quotient there with `K_eq`.
 */
function compareWithLaw(context: CaseContext, specification: ReactorSpecification, index: number): void {
  const { species, reactions, feed } = specification;
  const reaction = reactions[index]!;
  const thermochemistry = species.map(createSpeciesThermochemistry);
  const constant = createEquilibriumConstant(reaction.stoichiometry, thermochemistry);
  const rates = compileRates(
    reactions.map(({ rate }) => rate.expression),
    species.length,
    (other) => createEquilibriumConstant(reactions[other]!.stoichiometry, thermochemistry),
  );
  const { temperature, pressure } = feed;
  const { stoichiometry } = reaction;
  // Unit amounts of what stands in the equation; a little of everything else, so that inhibition terms stay finite.
  const amountsAt = (extent: number): number[] =>
    stoichiometry.map((coefficient) =>
      coefficient === 0 ? 1e-3 : Math.abs(coefficient) + coefficient * extent,
    );
  const concentrations = new Float64Array(species.length);
  const values = new Float64Array(reactions.length);
  const rateAt = (extent: number): number => {
    const amounts = amountsAt(extent);
    const total = amounts.reduce((sum, amount) => sum + amount, 0);
    amounts.forEach((amount, i) => {
      concentrations[i] = ((amount / total) * pressure) / (gasConstant * temperature);
    });
    rates.evaluate(concentrations, 0, temperature, pressure, values, 0);
    return values[index]!;
  };
  const [lower, upper] = [-1 + 1e-9, 1 - 1e-9];
  const warn = (found: string): void => {
    problemAt(context, ['reactions', index, 'rate'], {
      code: 'thermodynamic_disagreement',
      severity: 'warning',
      found,
      expected: `a law that vanishes at equilibrium, K = ${constant.value(temperature).toPrecision(3)} (standard pressure 1 bar) at ${temperature} K by the species' data`,
    });
  };
  const [atReactants, atProducts] = [rateAt(lower), rateAt(upper)];
  if (!Number.isFinite(atReactants) || !Number.isFinite(atProducts)) return;
  if (!(atReactants > 0 && atProducts < 0)) {
    // Near the ends equilibrium can lie closer than the walk goes.
    const logarithm = Math.abs(Math.log10(constant.value(temperature)));
    if (logarithm < 6) warn('a reversible law that does not change sign between reactants and products');
    return;
  }
  const { root } = findRoot(rateAt, lower, upper, 1e-14);
  const amounts = amountsAt(root);
  const total = amounts.reduce((sum, amount) => sum + amount, 0);
  const quotient = Math.exp(
    stoichiometry.reduce(
      (sum, coefficient, i) =>
        coefficient === 0
          ? sum
          : sum + coefficient * Math.log(((amounts[i]! / total) * pressure) / standardPressure),
      0,
    ),
  );
  const ratio = quotient / constant.value(temperature);
  if (Math.abs(Math.log(ratio)) > Math.log(alarmingFactor)) {
    warn(
      `a law that vanishes at a reaction quotient of ${quotient.toPrecision(3)}, ${ratio.toPrecision(2)} times the equilibrium constant`,
    );
  }
}
