/**
 * Would a liquid condense from a gas? The tangent-plane test: trial liquids W with ln W_i + ln φ_i(W) = ln y_i + ln φ_i(y), sought by
 * successive substitution, sped up along its slowest direction. The gas is stable where none of them has amounts that sum to more than one.
 *
 * Trials start from the liquid that Wilson's K-values give, and from each species pure below its critical temperature (water and oil may each
 * condense alone). Not sought: phases of two dense fluids above the critical temperature of every species present.
 *
 * @source Michelsen (1982), Fluid Phase Equilib. 9, 1; K-values Wilson (1969), as in the same paper; extrapolation along the dominant
 *   eigenvector Orbach & Crowe (1971), Can. J. Chem. Eng. 49, 509 (all from memory)
 */
import { findRoot } from '../../numerics/scalar-root.js';
import { gasConstant } from '../../quantities/constants.js';
import type { SpeciesRecord } from '../species-record.js';
import { missingForCubic } from './create-equation-of-state.js';
import { CubicMixture } from './cubic-mixture.js';
import type { CubicKind } from './cubic-root.js';

export interface DewPointCheck {
  /** Ids of the species without critical temperature, pressure or acentric factor: they only dilute the others. */
  readonly leftOut: readonly string[];
  /**
   * ln of the sum of the trial liquid's amounts: positive where a liquid would condense, zero at the dew point, negative in a single gas.
   * -1 where there is no trial liquid at all, 1 where there is no gas any more. Never NaN. Allocates nothing.
   *
   * @param moleFractions - sum 1, one per species; slightly negative ones count as absent
   * @param temperature - K
   * @param pressure - Pa
   */
  readonly liquidExcess: (moleFractions: Float64Array, temperature: number, pressure: number) => number;
  /**
   * Highest temperature at which a liquid condenses, K.
   *
   * @returns undefined where nothing condenses above a fifth of the highest critical temperature
   */
  readonly dewTemperature: (moleFractions: Float64Array, pressure: number) => number | undefined;
}

const noLiquid = -1;
const noGas = 1;
const mostSubstitutions = 300;
/** On ln W; the sum is stationary in it, so that its error is of second order. */
const substitutionTolerance = 1e-9;
/** Substitutions between two extrapolations: by then the fast modes have died. */
const extrapolationInterval = 5;
/** Where a trial has come so near the gas, in composition and in volume, it is the gas. */
const trivialDistance = 1e-3;
/** Of the scan for the dew temperature, each step a share of the temperature. */
const scanRatio = 0.97;
const scanEnd = 0.2;

/**
 * @param kind - the equation of the run, or `peng_robinson` where the run's gas is ideal
 * @param binaryInteraction - k_ij of all `records`, symmetric with zero diagonal
 */
export function createDewPointCheck(
  records: readonly SpeciesRecord[],
  kind: CubicKind,
  binaryInteraction: readonly (readonly number[])[],
): DewPointCheck {
  const indices = records.flatMap((record, i) => (missingForCubic(record).length === 0 ? [i] : []));
  const kept = indices.map((i) => records[i]!);
  const check = new TangentPlaneTest(
    new CubicMixture(
      kind,
      kept,
      indices.map((i) => indices.map((j) => binaryInteraction[i]![j]!)),
    ),
    kept,
    Int32Array.from(indices),
  );
  return {
    leftOut: records.filter((record) => !kept.includes(record)).map(({ id }) => id),
    liquidExcess: (moleFractions, temperature, pressure) =>
      check.liquidExcess(moleFractions, temperature, pressure),
    dewTemperature(moleFractions, pressure) {
      const excess = (temperature: number): number =>
        check.liquidExcess(moleFractions, temperature, pressure);
      const highest = check.highestCriticalTemperature(moleFractions);
      let upper = highest;
      while (upper > scanEnd * highest) {
        const lower = scanRatio * upper;
        if (excess(lower) > 0) return findRoot(excess, lower, upper, 1e-10 * upper).root;
        upper = lower;
      }
      return undefined;
    },
  };
}

/** Holds the memory of one check. Arrays have one entry per species with critical data. */
class TangentPlaneTest {
  private readonly gas: Float64Array; // mole fractions
  private readonly potentials: Float64Array; // ln y_i + ln φ_i(y)
  private readonly trial: Float64Array; // mole fractions
  private readonly logAmounts: Float64Array; // ln W_i
  private readonly changes: Float64Array;
  private readonly logFugacities: Float64Array;
  private gasCompressibility = 0;
  private readonly mixture: CubicMixture;
  private readonly records: readonly SpeciesRecord[];
  private readonly indices: Int32Array;

  constructor(mixture: CubicMixture, records: readonly SpeciesRecord[], indices: Int32Array) {
    this.mixture = mixture;
    this.records = records;
    this.indices = indices;
    const count = indices.length;
    this.gas = new Float64Array(count);
    this.potentials = new Float64Array(count);
    this.trial = new Float64Array(count);
    this.logAmounts = new Float64Array(count);
    this.changes = new Float64Array(count);
    this.logFugacities = new Float64Array(count);
  }

  /** Of the species present, K; 0 where there are none. */
  highestCriticalTemperature(moleFractions: Float64Array): number {
    let highest = 0;
    for (let i = 0; i < this.indices.length; i++) {
      if (moleFractions[this.indices[i]!]! > 0)
        highest = Math.max(highest, this.records[i]!.criticalTemperature!);
    }
    return highest;
  }

  liquidExcess(moleFractions: Float64Array, temperature: number, totalPressure: number): number {
    if (!(temperature > 0 && temperature < this.highestCriticalTemperature(moleFractions))) return noLiquid;
    const pressure = totalPressure * this.takeGas(moleFractions);
    if (!(pressure > 0)) return noLiquid;
    const { gas, potentials, trial, records, mixture } = this;

    mixture.mix(gas, temperature);
    const compressibility = mixture.compressibilityFactor(pressure, 'gas');
    this.gasCompressibility = compressibility;
    if (mixture.isLiquidLike((compressibility * gasConstant * temperature) / pressure)) return noGas;
    mixture.logFugacityCoefficientsInto(compressibility, pressure, potentials);
    for (let i = 0; i < gas.length; i++) potentials[i]! += Math.log(gas[i]!);

    this.startFromWilson(temperature);
    let highest = this.followTrial(temperature, pressure);
    for (let pure = 0; pure < gas.length; pure++) {
      if (!(gas[pure]! > 0 && temperature < records[pure]!.criticalTemperature!)) continue;
      trial.fill(0);
      trial[pure] = 1;
      highest = Math.max(highest, this.followTrial(temperature, pressure));
    }
    return highest === Number.NEGATIVE_INFINITY ? noLiquid : highest;
  }

  /** Mole fractions among the species that can be judged. @returns their share of all that is there */
  private takeGas(moleFractions: Float64Array): number {
    const { gas, indices } = this;
    let all = 0;
    for (let i = 0; i < moleFractions.length; i++) all += Math.max(moleFractions[i]!, 0);
    let sum = 0;
    for (let i = 0; i < gas.length; i++) {
      gas[i] = Math.max(moleFractions[indices[i]!]!, 0);
      sum += gas[i]!;
    }
    for (let i = 0; i < gas.length; i++) gas[i]! /= sum;
    return sum / all;
  }

  private startFromWilson(temperature: number): void {
    const { gas, trial, records } = this;
    let sum = 0;
    for (let i = 0; i < gas.length; i++) {
      const { criticalTemperature, criticalPressure, acentricFactor } = records[i]!;
      const logVapourPressure = 5.373 * (1 + acentricFactor!) * (1 - criticalTemperature! / temperature);
      trial[i] = gas[i]! / (criticalPressure! * Math.exp(logVapourPressure));
      sum += trial[i]!;
    }
    for (let i = 0; i < gas.length; i++) trial[i]! /= sum;
  }

  /**
   * From the mole fractions in `trial`. One that still moves after all substitutions is close to critical, where the sum hardly moves with it:
   * it counts as it stands.
   *
   * @returns ln Σ W, or -Infinity where the trial ends at the gas itself or nowhere
   */
  private followTrial(temperature: number, pressure: number): number {
    const { gas, potentials, trial, logAmounts, changes, logFugacities, mixture, gasCompressibility } = this;
    const count = gas.length;
    let logSum = Number.NEGATIVE_INFINITY;
    let lastSquare = 0;
    for (let step = 0; step < mostSubstitutions; step++) {
      mixture.mix(trial, temperature);
      const compressibility = mixture.compressibilityFactor(pressure, 'liquid');
      mixture.logFugacityCoefficientsInto(compressibility, pressure, logFugacities);
      let distance = 0;
      let largest = 0;
      let square = 0;
      let product = 0;
      for (let i = 0; i < count; i++) {
        if (gas[i] === 0) continue;
        const logAmount = potentials[i]! - logFugacities[i]!;
        const change = step === 0 ? 1 : logAmount - logAmounts[i]!;
        distance = Math.max(distance, Math.abs(logAmount - Math.log(gas[i]!)));
        largest = Math.max(largest, Math.abs(change));
        square += change * change;
        product += change * changes[i]!;
        logAmounts[i] = logAmount;
        changes[i] = change;
      }
      if (!Number.isFinite(square)) return Number.NEGATIVE_INFINITY;
      const isSameVolume = Math.abs(compressibility / gasCompressibility - 1) < trivialDistance;
      if (isSameVolume && distance < trivialDistance) return Number.NEGATIVE_INFINITY;

      const ratio = product / lastSquare;
      lastSquare = square;
      const extrapolates = step % extrapolationInterval === extrapolationInterval - 1 && Math.abs(ratio) < 1;
      const reach = extrapolates ? ratio / (1 - ratio) : 0;
      let highest = Number.NEGATIVE_INFINITY;
      for (let i = 0; i < count; i++) {
        if (gas[i] === 0) continue;
        logAmounts[i]! += reach * changes[i]!;
        highest = Math.max(highest, logAmounts[i]!);
      }
      let sum = 0;
      for (let i = 0; i < count; i++) {
        trial[i] = gas[i] === 0 ? 0 : Math.exp(logAmounts[i]! - highest);
        sum += trial[i]!;
      }
      for (let i = 0; i < count; i++) trial[i]! /= sum;
      logSum = highest + Math.log(sum);
      if (largest < substitutionTolerance) return logSum;
    }
    return logSum;
  }
}
