/**
 * Equilibrium beside the profile: how near each reversible reaction comes to its own, what conversion all of them together allow at the
 * temperature and pressure of each position, and where an adiabatic bed without end would lead.
 */
import {
  createEquilibrium,
  type Equilibrium,
  type EquilibriumState,
} from '../properties/equilibrium/equilibrium-composition.js';
import { equilibriumTemperature, logReactionQuotient } from '../properties/equilibrium/reaction-approach.js';
import { createFluidState } from '../properties/equation-of-state/equation-of-state.js';
import {
  createEquilibriumConstant,
  hasEquilibriumConstant,
  type EquilibriumConstant,
} from '../properties/reaction-equilibrium.js';
import type { Balances } from './balances.js';
import type { ReactorModel } from './reactor-model.js';
import type { EquilibriumLine, ReactionApproach } from './run-result.js';
import type { BedStates } from './tabulate.js';

/** What one reaction's approach is worked out from. */
interface Approach extends ReactionApproach {
  readonly coefficients: readonly number[];
  readonly constant: EquilibriumConstant;
  /** K */
  readonly range: readonly [number, number];
}

/** Undefined where no reaction is written as reversible with a constant that follows from the species. */
export function equilibriumLine(
  model: ReactorModel,
  balances: Balances,
  { positions, states }: BedStates,
  keySpecies: readonly number[],
): EquilibriumLine | undefined {
  const { specification, stoichiometry, thermochemistry, feedFlows } = model;
  const reversible = specification.reactions.flatMap(({ isReversible }, j) =>
    isReversible && hasEquilibriumConstant(stoichiometry[j]!, thermochemistry) ? [j] : [],
  );
  if (reversible.length === 0) return undefined;
  const rows = positions.length;
  const approaches = reversible.map((reactionIndex): Approach => {
    const coefficients = stoichiometry[reactionIndex]!;
    const used = thermochemistry.filter((_entry, i) => coefficients[i] !== 0);
    return {
      reactionIndex,
      coefficients,
      constant: createEquilibriumConstant(coefficients, thermochemistry),
      range: [
        Math.max(...used.map((entry) => entry.lowestTemperature)),
        Math.min(...used.map((entry) => entry.highestTemperature)),
      ],
      quotientRatios: new Float64Array(rows).fill(Number.NaN),
      temperatureApproaches: new Float64Array(rows).fill(Number.NaN),
    };
  });
  const equilibrium = createModelEquilibrium(model, reversible);
  const shown = keySpecies.filter((i) => reversible.some((j) => stoichiometry[j]![i]! < 0));
  const conversions = shown.map((speciesIndex) => ({
    speciesIndex,
    values: new Float64Array(rows).fill(Number.NaN),
  }));
  const size = balances.initialState.length;
  for (let row = 0; row < rows; row++) {
    if (!balances.unpack(states.subarray(row * size, (row + 1) * size))) continue;
    const { flows, moleFractions, temperature, pressure, fluid } = balances.conditions;
    for (const { coefficients, constant, range, quotientRatios, temperatureApproaches } of approaches) {
      const quotient = logReactionQuotient(
        coefficients,
        moleFractions,
        pressure,
        fluid.logFugacityCoefficients,
      );
      quotientRatios[row] = Math.exp(quotient - constant.logarithm(temperature));
      temperatureApproaches[row] = temperature - equilibriumTemperature(quotient, constant, range);
    }
    const state = equilibrium.atTemperature(Float64Array.from(flows, atLeastNothing), temperature, pressure);
    for (const { speciesIndex, values } of conversions) {
      if (state) values[row] = 1 - state.amounts[speciesIndex]! / feedFlows[speciesIndex]!;
    }
  }
  const { temperature, pressure } = specification.feed;
  const adiabatic = equilibrium.adiabatic(feedFlows, temperature, pressure);
  return {
    approaches: approaches.map(({ reactionIndex, quotientRatios, temperatureApproaches }) => ({
      reactionIndex,
      quotientRatios,
      temperatureApproaches,
    })),
    conversions,
    ...(adiabatic && { adiabatic: describe(adiabatic, feedFlows, shown) }),
  };
}

/** Only what the reversible reactions can do; a real gas by the run's equation of state. */
function createModelEquilibrium(model: ReactorModel, reversible: readonly number[]): Equilibrium {
  const { equationOfState, thermochemistry, stoichiometry, speciesCount } = model;
  const state = createFluidState(speciesCount);
  return createEquilibrium({
    stoichiometry: reversible.map((j) => stoichiometry[j]!),
    thermochemistry,
    ...(!equationOfState.isIdealGas && {
      logFugacityCoefficients(moleFractions, temperature, pressure, target) {
        const isFound = equationOfState.evaluate(moleFractions, temperature, pressure, state);
        target.set(state.logFugacityCoefficients);
        return isFound;
      },
      residualEnthalpy(moleFractions, temperature, pressure) {
        equationOfState.evaluate(moleFractions, temperature, pressure, state);
        return state.residualEnthalpy;
      },
    }),
  });
}

function describe(
  { temperature, moleFractions, amounts }: EquilibriumState,
  feedFlows: Float64Array,
  keySpecies: readonly number[],
): NonNullable<EquilibriumLine['adiabatic']> {
  return {
    temperature,
    moleFractions: [...moleFractions],
    conversions: keySpecies.map((speciesIndex) => ({
      speciesIndex,
      value: 1 - amounts[speciesIndex]! / feedFlows[speciesIndex]!,
    })),
  };
}

/** Rounding may leave a used-up species slightly below zero. */
function atLeastNothing(flow: number): number {
  return Math.max(flow, 0);
}
