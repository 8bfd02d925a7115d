/**
 * Composition at chemical equilibrium of given reactions, at fixed temperature and pressure or adiabatically.
 *
 * The least Gibbs energy subject to what the reactions conserve, by Newton's method on the logarithms of the amounts, so that traces are found
 * to the same relative precision as everything else:
 *
 *   μ_i + Δ ln n_i - Δ ln N = Σ_k π_k a_ki,   μ_i = G°_i/RT + ln(P/P°) + ln φ_i + ln n_i/N,
 *
 * with the potentials π of the conserved amounts and Δ ln N from the balances. The conserved amounts are those of `component-basis.ts`, chosen
 * anew at each step.
 *
 * @source Gordon & McBride (1994), NASA RP-1311, ch. 2 and 3 (equations and damping); White, Johnson & Dantzig (1958), J. Chem. Phys. 28, 751
 */
import { factoriseInPlace, solveInPlace } from '../../numerics/dense-lu.js';
import { findRoot } from '../../numerics/scalar-root.js';
import { gasConstant, standardPressure } from '../../quantities/constants.js';
import type { SpeciesThermochemistry } from '../thermochemistry.js';
import { componentBasis } from './component-basis.js';
import { reachableReactions } from './reachable-species.js';

export interface EquilibriumInput {
  /** Rows of coefficients, one per reaction that may proceed, one column per species. */
  readonly stoichiometry: readonly (readonly number[])[];
  /** One per species; those that take part need heat capacity, heat of formation and entropy. */
  readonly thermochemistry: readonly SpeciesThermochemistry[];
  /** ln φ_i of a real gas, into `target`; absent for an ideal gas. */
  readonly logFugacityCoefficients?: (
    moleFractions: Float64Array,
    temperature: number,
    pressure: number,
    target: Float64Array,
  ) => boolean;
  /** J/mol of mixture, real less ideal gas; absent for an ideal gas. */
  readonly residualEnthalpy?: (moleFractions: Float64Array, temperature: number, pressure: number) => number;
}

export interface EquilibriumState {
  /** Same unit as the amounts handed in. */
  readonly amounts: Float64Array;
  readonly moleFractions: Float64Array;
  readonly temperature: number;
  readonly pressure: number;
  readonly iterations: number;
  /** Largest |ln Q - ln K| of the reactions that can take place. */
  readonly residual: number;
}

export interface Equilibrium {
  /**
   * @param amounts - one per species, ≥ 0, not all zero
   * @param temperature - K
   * @param pressure - Pa
   * @returns undefined where the iteration does not converge
   */
  readonly atTemperature: (
    amounts: ArrayLike<number>,
    temperature: number,
    pressure: number,
  ) => EquilibriumState | undefined;
  /**
   * Equilibrium at the temperature at which the enthalpy is what it was at the feed's.
   *
   * @returns undefined where there is none between the ends of the species' data, or the iteration does not converge
   */
  readonly adiabatic: (
    amounts: ArrayLike<number>,
    feedTemperature: number,
    pressure: number,
  ) => EquilibriumState | undefined;
}

const mostIterations = 300;
const convergedChange = 1e-11;
/** |ln Q - ln K| beyond this is no equilibrium. */
const residualBound = 1e-8;
/** Mole fractions above this hold the step of the logarithms back. */
const majorFraction = 1e-8;
/** Amount that an absent species starts with, relative to all. */
const seed = 1e-4;
/** ln of what is left of a species that has vanished: e^-690 is still a number. */
const lowestLogAmount = -690;
const temperatureTolerance = 1e-12;

export function createEquilibrium(input: EquilibriumInput): Equilibrium {
  const { stoichiometry, thermochemistry, logFugacityCoefficients, residualEnthalpy } = input;
  const speciesCount = thermochemistry.length;

  const atTemperature: Equilibrium['atTemperature'] = (amounts, temperature, pressure) => {
    const total = sumOf(amounts);
    const reachable = reachableReactions(stoichiometry, amounts);
    const rows = reachable.reactions.map((r) => stoichiometry[r]!);
    const active = Array.from({ length: speciesCount }, (_, i) => i).filter((i) =>
      rows.some((row) => row[i] !== 0),
    );
    const relative = Float64Array.from(amounts, (amount) => amount / total);
    const finish = (moles: Float64Array, iterations: number, residual: number): EquilibriumState => {
      const sum = sumOf(moles);
      return {
        amounts: moles.map((value) => value * total),
        moleFractions: moles.map((value) => value / sum),
        temperature,
        pressure,
        iterations,
        residual,
      };
    };
    if (active.length === 0) return finish(relative, 0, 0);

    const inert = relative.reduce((sum, value, i) => (active.includes(i) ? sum : sum + value), 0);
    const reactions = rows.map((row) => active.map((i) => row[i]!));
    const given = active.map((i) => relative[i]!);
    const logPressure = Math.log(pressure / standardPressure);
    const standard = active.map(
      (i) =>
        thermochemistry[i]!.enthalpy(temperature) / (gasConstant * temperature) -
        thermochemistry[i]!.entropy(temperature) / gasConstant +
        logPressure,
    );
    const moles = relative.slice();
    const logs = Float64Array.from(given, (amount) => Math.log(Math.max(amount, seed)));
    let logTotal = Math.log(inert + logs.reduce((sum, value) => sum + Math.exp(value), 0));
    const fugacities = new Float64Array(speciesCount);
    const takeFugacities = (): boolean => {
      if (!logFugacityCoefficients) return true;
      active.forEach((i, a) => (moles[i] = Math.exp(logs[a]!)));
      const sum = sumOf(moles);
      return logFugacityCoefficients(
        moles.map((value) => value / sum),
        temperature,
        pressure,
        fugacities,
      );
    };

    for (let iteration = 1; iteration <= mostIterations; iteration++) {
      if (!takeFugacities()) return undefined;
      const step = newtonStep(reactions, given, standard, fugacities, active, inert, logs, logTotal);
      if (!step) return undefined;
      const damping = stepLength(step.changes, step.totalChange, logs, logTotal);
      let largest = Math.abs(step.totalChange);
      for (let a = 0; a < active.length; a++) {
        logs[a] = Math.max(logs[a]! + damping * step.changes[a]!, lowestLogAmount);
        if (logs[a]! > lowestLogAmount) largest = Math.max(largest, Math.abs(step.changes[a]!));
      }
      logTotal += damping * step.totalChange;
      if (damping < 1 || largest > convergedChange) continue;
      active.forEach((i, a) => (moles[i] = Math.exp(logs[a]!)));
      if (!takeFugacities()) return undefined;
      const residual = largestResidual(reactions, standard, fugacities, active, logs, logTotal);
      return residual <= residualBound ? finish(moles, iteration, residual) : undefined;
    }
    return undefined;
  };

  const enthalpyOf = (amounts: ArrayLike<number>, temperature: number, pressure: number): number => {
    let sum = 0;
    for (let i = 0; i < speciesCount; i++) {
      if (amounts[i]! !== 0) sum += amounts[i]! * thermochemistry[i]!.enthalpy(temperature);
    }
    if (!residualEnthalpy) return sum;
    const total = sumOf(amounts);
    const fractions = Float64Array.from(amounts, (amount) => amount / total);
    return sum + total * residualEnthalpy(fractions, temperature, pressure);
  };

  return {
    atTemperature,
    adiabatic(amounts, feedTemperature, pressure) {
      const target = enthalpyOf(amounts, feedTemperature, pressure);
      const used = thermochemistry.filter(
        (_entry, i) => amounts[i]! > 0 || stoichiometry.some((row) => row[i] !== 0),
      );
      const lowest = Math.max(...used.map((entry) => entry.lowestTemperature));
      const highest = Math.min(...used.map((entry) => entry.highestTemperature));
      let failures = 0;
      const hasFailed = (): boolean => failures > 0;
      const excess = (temperature: number): number => {
        const state = atTemperature(amounts, temperature, pressure);
        if (!state) {
          failures++;
          return 0;
        }
        return enthalpyOf(state.amounts, temperature, pressure) - target;
      };
      // Enthalpy at equilibrium rises with temperature (Le Chatelier), so that one bracket holds one root.
      const atFeed = excess(feedTemperature);
      const end = atFeed > 0 ? lowest : highest;
      if (hasFailed() || !Number.isFinite(atFeed) || !Number.isFinite(end)) return undefined;
      const atEnd = excess(end);
      if (hasFailed() || !(atFeed * atEnd <= 0)) return undefined;
      const { root } = findRoot(excess, feedTemperature, end, temperatureTolerance * feedTemperature);
      return hasFailed() ? undefined : atTemperature(amounts, root, pressure);
    },
  };
}

interface NewtonStep {
  /** Of ln n, one per active species. */
  readonly changes: Float64Array;
  /** Of ln N. */
  readonly totalChange: number;
}

/** One Newton step of the minimisation; undefined where the balances are singular. */
function newtonStep(
  reactions: readonly (readonly number[])[],
  given: readonly number[],
  standard: readonly number[],
  fugacities: Float64Array,
  active: readonly number[],
  inert: number,
  logs: Float64Array,
  logTotal: number,
): NewtonStep | undefined {
  const { conserved } = componentBasis(reactions, logs);
  const count = active.length;
  const size = conserved.length + 1;
  const moles = logs.map(Math.exp);
  const potentials = Float64Array.from(active, (i, a) => standard[a]! + fugacities[i]! + logs[a]! - logTotal);
  const matrix = new Float64Array(size * size);
  const right = new Float64Array(size);
  const total = Math.exp(logTotal);
  const last = size - 1;
  let sum = inert;
  let energy = 0;
  for (let a = 0; a < count; a++) {
    sum += moles[a]!;
    energy += moles[a]! * potentials[a]!;
  }
  conserved.forEach((row, k) => {
    let deficit = 0;
    let content = 0;
    for (let a = 0; a < count; a++) {
      const share = row[a]! * moles[a]!;
      deficit += row[a]! * (given[a]! - moles[a]!);
      content += share;
      right[k]! += share * potentials[a]!;
      if (share === 0) continue;
      for (let l = 0; l < last; l++) matrix[k * size + l]! += share * conserved[l]![a]!;
    }
    right[k]! += deficit;
    matrix[k * size + last] = content;
    matrix[last * size + k] = content;
  });
  matrix[last * size + last] = sum - inert - total;
  right[last] = total - sum + energy;
  // Rows and columns each in their own unit: a component may be a trace.
  const scales = Float64Array.from({ length: size }, (_, k) =>
    k === last ? 1 / Math.sqrt(total) : 1 / Math.sqrt(matrix[k * size + k]!),
  );
  for (let k = 0; k < size; k++) {
    for (let l = 0; l < size; l++) matrix[k * size + l]! *= scales[k]! * scales[l]!;
    right[k]! *= scales[k]!;
  }
  const pivots = new Int32Array(size);
  if (!factoriseInPlace(matrix, size, pivots)) return undefined;
  solveInPlace(matrix, size, pivots, right);
  const totalChange = right[last] * scales[last]!;
  const changes = new Float64Array(count);
  for (let a = 0; a < count; a++) {
    let value = totalChange - potentials[a]!;
    for (let k = 0; k < last; k++) value += conserved[k]![a]! * right[k]! * scales[k]!;
    changes[a] = value;
  }
  return changes.every(Number.isFinite) && Number.isFinite(totalChange)
    ? { changes, totalChange }
    : undefined;
}

/** The part of a Newton step that is taken. @source Gordon & McBride (1994), NASA RP-1311, eqs 3.1 to 3.3 */
function stepLength(
  changes: Float64Array,
  totalChange: number,
  logs: Float64Array,
  logTotal: number,
): number {
  let largest = 5 * Math.abs(totalChange);
  let length = 1;
  for (let a = 0; a < changes.length; a++) {
    const logFraction = logs[a]! - logTotal;
    if (logFraction > Math.log(majorFraction)) largest = Math.max(largest, Math.abs(changes[a]!));
    else if (changes[a]! > 0) {
      // A trace may grow to a ten-thousandth of the mixture at once.
      const reach = Math.abs((-logFraction - 9.2103404) / (changes[a]! - totalChange));
      length = Math.min(length, reach);
    }
  }
  return Math.min(length, largest > 2 ? 2 / largest : 1);
}

function largestResidual(
  reactions: readonly (readonly number[])[],
  standard: readonly number[],
  fugacities: Float64Array,
  active: readonly number[],
  logs: Float64Array,
  logTotal: number,
): number {
  let largest = 0;
  for (const row of reactions) {
    let sum = 0;
    let size = 0;
    let isVanished = false as boolean;
    row.forEach((coefficient, a) => {
      if (coefficient === 0) return;
      if (logs[a]! <= lowestLogAmount) isVanished = true;
      sum += coefficient * (standard[a]! + fugacities[active[a]!]! + logs[a]! - logTotal);
      size += Math.abs(coefficient * (standard[a]! + logs[a]! - logTotal));
    });
    // Where a species is less than can be held, there is nothing to compare.
    if (!isVanished) largest = Math.max(largest, Math.abs(sum) / Math.max(1, size * 1e-3));
  }
  return largest;
}

function sumOf(values: ArrayLike<number>): number {
  let sum = 0;
  for (let i = 0; i < values.length; i++) sum += values[i]!;
  return sum;
}
