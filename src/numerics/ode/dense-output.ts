import { stagePositions } from './tableau.js';

const [c1, c2] = stagePositions;

/** Values at `s` of the cubic Lagrange polynomials on 0, c1, c2, 1 that belong to the three stages (the one at 0 multiplies zero). */
export function stagePolynomials(s: number): [number, number, number] {
  return [
    (s * (s - c2) * (s - 1)) / (c1 * (c1 - c2) * (c1 - 1)),
    (s * (s - c1) * (s - 1)) / (c2 * (c2 - c1) * (c2 - 1)),
    (s * (s - c1) * (s - c2)) / ((1 - c1) * (1 - c2)),
  ];
}

/**
 * Collocation polynomial of a step: y(x0 + s h) for s in [0, 1] (error O(h⁴), as the error estimate that controls the step).
 *
 * @param startState - y at the start of the step, length n
 * @param stages - stage differences of the step, `3 × n`
 * @param s - relative position in the step; values above 1 extrapolate
 * @param target - written, length n
 */
export function interpolateInto(
  startState: Float64Array,
  stages: Float64Array,
  s: number,
  target: Float64Array,
): void {
  const size = startState.length;
  const [p1, p2, p3] = stagePolynomials(s);
  for (let i = 0; i < size; i++) {
    target[i] = startState[i]! + p1 * stages[i]! + p2 * stages[size + i]! + p3 * stages[2 * size + i]!;
  }
}
