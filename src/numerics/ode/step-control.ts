import { solveInPlace } from '../dense-lu.js';
import type { OdeProblem } from './problem.js';
import { errorWeights } from './tableau.js';
import type { OdeWorkspace } from './workspace.js';

const safety = 0.9;
const strongestShrink = 0.2;
const strongestGrowth = 8;
/** The estimate is O(h⁴). */
const errorExponent = 1 / 4;

/** State of the step-size controller: what the last accepted step was like. */
export interface StepHistory {
  step: number;
  error: number;
}

/**
 * Scaled size of the local error of the step whose stages stand in the workspace; below 1 is acceptable.
 *
 * @param startDerivative - f(x0, y0)
 * @param refine - filter a too large estimate once more through the factors: for the first step and after a rejection, where stiff
 *   components make the plain estimate far too large
 * @source Hairer & Wanner II, (8.19) and (8.20)
 */
export function estimateError(
  problem: OdeProblem,
  x: number,
  step: number,
  state: Float64Array,
  startDerivative: Float64Array,
  refine: boolean,
  workspace: OdeWorkspace,
): number {
  const { size, stages, error, realFactors, realPivots, trial, work } = workspace;
  const [e1, e2, e3] = errorWeights;
  const combination = workspace.imaginaryIncrement; // free at this point
  for (let i = 0; i < size; i++) {
    combination[i] = (e1 * stages[i]! + e2 * stages[size + i]! + e3 * stages[2 * size + i]!) / step;
    error[i] = startDerivative[i]! + combination[i]!;
  }
  solveInPlace(realFactors, size, realPivots, error);
  const plain = scaledRms(error, workspace.scale);
  if (plain < 1 || !refine) return plain;
  for (let i = 0; i < size; i++) trial[i] = state[i]! + error[i]!;
  work.rightHandSides++;
  if (!problem.evaluate(x, trial, workspace.derivative)) return plain;
  for (let i = 0; i < size; i++) error[i] = workspace.derivative[i]! + combination[i]!;
  solveInPlace(realFactors, size, realPivots, error);
  return scaledRms(error, workspace.scale);
}

/**
 * Factor by which the next step should differ from this one.
 *
 * @param error - scaled error of this step
 * @param iterations - Newton iterations it took: many make the controller more careful
 * @param history - last accepted step; undefined for the first
 * @source Gustafsson (1994), ACM TOMS 20, 496: predictive controller, as in Hairer & Wanner II, (8.25)
 */
export function stepFactor(
  error: number,
  step: number,
  iterations: number,
  isAccepted: boolean,
  history: StepHistory | undefined,
): number {
  const bounded = Math.max(error, 1e-8);
  const care = (safety * (2 * 7 + 1)) / (2 * 7 + iterations);
  let factor = care * bounded ** -errorExponent;
  if (isAccepted && history) {
    const predicted = care * (step / history.step) * (history.error / bounded ** 2) ** errorExponent;
    factor = Math.min(factor, predicted);
  }
  return Math.min(strongestGrowth, Math.max(strongestShrink, factor));
}

/** Root mean square of the components, each in units of its scale. */
export function scaledRms(values: Float64Array, scale: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < values.length; i++) {
    const ratio = values[i]! / scale[i]!;
    sum += ratio * ratio;
  }
  return Math.sqrt(sum / values.length);
}
