import { factoriseComplexInPlace, solveComplexInPlace } from '../complex-lu.js';
import { factoriseInPlace, solveInPlace } from '../dense-lu.js';
import type { OdeProblem } from './problem.js';
import { complexEigenvalue, inverseTransform, realEigenvalue, stagePositions, transform } from './tableau.js';
import type { OdeWorkspace } from './workspace.js';

/** Iterations before a stage solution is given up and the step shortened. */
const maximumIterations = 7;

/** Factors (μ/h I - J) for the real and the complex eigenvalue; false when singular. */
export function factoriseStageSystem(workspace: OdeWorkspace, step: number): boolean {
  const { size, jacobian, realFactors, complexFactorsReal, complexFactorsImaginary } = workspace;
  for (let k = 0; k < size * size; k++) {
    realFactors[k] = -jacobian[k]!;
    complexFactorsReal[k] = -jacobian[k]!;
    complexFactorsImaginary[k] = 0;
  }
  for (let i = 0; i < size; i++) {
    realFactors[i * size + i]! += realEigenvalue / step;
    complexFactorsReal[i * size + i]! += complexEigenvalue.realPart / step;
    complexFactorsImaginary[i * size + i]! += complexEigenvalue.imaginaryPart / step;
  }
  workspace.work.factorisations++;
  return (
    factoriseInPlace(realFactors, size, workspace.realPivots) &&
    factoriseComplexInPlace(complexFactorsReal, complexFactorsImaginary, size, workspace.complexPivots)
  );
}

export interface StageOutcome {
  readonly status: 'converged' | 'diverged' | 'evaluation_failed';
  readonly iterations: number;
  /** Contraction of the last iterations; small means that the Jacobian is still good. */
  readonly rate: number;
}

/**
 * Solves the stage system by simplified Newton iterations in the transformed variables, from the guess in `workspace.stages`, which
 * receives the solution. Stops when the estimated remaining error, in units of `workspace.scale`, is below `tolerance`.
 *
 * @source Hairer & Wanner II, sec. IV.8: transformation (8.5), stopping rule (8.10)
 */
export function solveStages(
  problem: OdeProblem,
  x: number,
  step: number,
  state: Float64Array,
  tolerance: number,
  workspace: OdeWorkspace,
): StageOutcome {
  const { size, stages, transformed, stageDerivatives, increments, trial, work } = workspace;
  applyTransform(inverseTransform, stages, transformed, size);
  let previousNorm = Infinity;
  let rate = 0;
  for (let iteration = 1; iteration <= maximumIterations; iteration++) {
    for (let stage = 0; stage < 3; stage++) {
      for (let i = 0; i < size; i++) trial[i] = state[i]! + stages[stage * size + i]!;
      work.rightHandSides++;
      if (!problem.evaluate(x + stagePositions[stage]! * step, trial, workspace.derivative))
        return { status: 'evaluation_failed', iterations: iteration, rate };
      stageDerivatives.set(workspace.derivative, stage * size);
    }
    work.newtonIterations++;
    solveIncrements(step, workspace);
    const norm = scaledNorm(increments, workspace.scale, size);
    if (!Number.isFinite(norm)) return { status: 'diverged', iterations: iteration, rate };
    if (iteration > 1) {
      rate = norm / previousNorm;
      const remaining = maximumIterations - iteration;
      if (rate >= 1 || (rate ** remaining / (1 - rate)) * norm > tolerance)
        return { status: 'diverged', iterations: iteration, rate };
    }
    for (let k = 0; k < 3 * size; k++) transformed[k]! += increments[k]!;
    applyTransform(transform, transformed, stages, size);
    if (norm === 0 || (iteration > 1 && (rate / (1 - rate)) * norm <= tolerance))
      return { status: 'converged', iterations: iteration, rate };
    previousNorm = norm;
  }
  return { status: 'diverged', iterations: maximumIterations, rate };
}

/** Right side T⁻¹F - Λ W / h and one solve with each factorisation; leaves ΔW in `increments`. */
function solveIncrements(step: number, workspace: OdeWorkspace): void {
  const { size, transformed, stageDerivatives, increments, imaginaryIncrement } = workspace;
  applyTransform(inverseTransform, stageDerivatives, increments, size);
  const mu = realEigenvalue / step;
  const alpha = complexEigenvalue.realPart / step;
  const beta = complexEigenvalue.imaginaryPart / step;
  for (let i = 0; i < size; i++) {
    const w2 = transformed[size + i]!;
    const w3 = transformed[2 * size + i]!;
    increments[i]! -= mu * transformed[i]!;
    increments[size + i]! -= alpha * w2 + beta * w3;
    increments[2 * size + i]! -= alpha * w3 - beta * w2;
  }
  solveInPlace(workspace.realFactors, size, workspace.realPivots, increments, 0);
  // The pair is one complex unknown W_2 - i W_3 with the eigenvalue alpha + i beta.
  const realPart = workspace.error; // free at this point
  for (let i = 0; i < size; i++) {
    realPart[i] = increments[size + i]!;
    imaginaryIncrement[i] = -increments[2 * size + i]!;
  }
  solveComplexInPlace(
    workspace.complexFactorsReal,
    workspace.complexFactorsImaginary,
    size,
    workspace.complexPivots,
    realPart,
    imaginaryIncrement,
  );
  for (let i = 0; i < size; i++) {
    increments[size + i] = realPart[i]!;
    increments[2 * size + i] = -imaginaryIncrement[i]!;
  }
}

/** target = (matrix ⊗ I) source for three blocks of length `size`. */
function applyTransform(
  matrix: readonly (readonly [number, number, number])[],
  source: Float64Array,
  target: Float64Array,
  size: number,
): void {
  for (let block = 0; block < 3; block++) {
    const [a, b, c] = matrix[block]!;
    for (let i = 0; i < size; i++) {
      target[block * size + i] = a * source[i]! + b * source[size + i]! + c * source[2 * size + i]!;
    }
  }
}

/** Root mean square over the three blocks, each component in units of its scale. */
function scaledNorm(values: Float64Array, scale: Float64Array, size: number): number {
  let sum = 0;
  for (let block = 0; block < 3; block++) {
    for (let i = 0; i < size; i++) {
      const ratio = values[block * size + i]! / scale[i]!;
      sum += ratio * ratio;
    }
  }
  return Math.sqrt(sum / (3 * size));
}
