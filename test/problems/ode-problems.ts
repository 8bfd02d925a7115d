import type { OdeProblem } from '../../src/numerics/ode/problem.js';

/** An initial-value problem with exact Jacobian and exact solution. */
export interface SolvedOde {
  readonly name: string;
  readonly source: string;
  readonly problem: OdeProblem;
  readonly interval: readonly [number, number];
  readonly initialState: readonly number[];
  readonly exact: (x: number) => readonly number[];
}

export const solvedOdes: readonly SolvedOde[] = [
  {
    name: 'Prothero–Robinson, stiff',
    source: "Prothero & Robinson (1974), Math. Comp. 28, 145: y' = λ(y - cos x) - sin x, λ = -10⁴",
    problem: {
      size: 1,
      evaluate: (x, y, f) => {
        f[0] = -1e4 * (y[0]! - Math.cos(x)) - Math.sin(x);
        return true;
      },
      evaluateJacobian: (_x, _y, j) => {
        j[0] = -1e4;
        return true;
      },
    },
    interval: [0, 3],
    initialState: [1],
    exact: (x) => [Math.cos(x)],
  },
  {
    name: 'logistic growth',
    source: "closed form: y' = y(1 - y), y(0) = 1/10",
    problem: {
      size: 1,
      evaluate: (_x, y, f) => {
        f[0] = y[0]! * (1 - y[0]!);
        return true;
      },
      evaluateJacobian: (_x, y, j) => {
        j[0] = 1 - 2 * y[0]!;
        return true;
      },
    },
    interval: [0, 8],
    initialState: [0.1],
    exact: (x) => [1 / (1 + 9 * Math.exp(-x))],
  },
  {
    name: 'consecutive first-order reactions, stiff',
    source: 'closed form: A → B → C with k1 = 1, k2 = 1000',
    problem: {
      size: 2,
      evaluate: (_x, y, f) => {
        f[0] = -y[0]!;
        f[1] = y[0]! - 1000 * y[1]!;
        return true;
      },
      evaluateJacobian: (_x, _y, j) => {
        j.set([-1, 0, 1, -1000]);
        return true;
      },
    },
    interval: [0, 5],
    initialState: [1, 0],
    exact: (x) => [Math.exp(-x), (Math.exp(-x) - Math.exp(-1000 * x)) / 999],
  },
];
