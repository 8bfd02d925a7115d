import { Matrix, solve } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import {
  elementGrid,
  singlePolynomialGrid,
  type DiffusionGrid,
} from '../../../src/numerics/diffusion/diffusion-grid.js';
import { createResolutionLadder, finestRung } from '../../../src/numerics/diffusion/resolution-ladder.js';

/** ψ for a given source on the grid. */
function apply(grid: DiffusionGrid, source: (x: number) => number): Float64Array {
  const { unknownCount, green, positions } = grid;
  return Float64Array.from({ length: unknownCount }, (_, n) => {
    let sum = 0;
    for (let m = 0; m < unknownCount; m++) sum += green[n * unknownCount + m]! * source(positions[m]!);
    return sum;
  });
}

function average(grid: DiffusionGrid, value: (x: number) => number): number {
  return grid.weights.reduce((sum, weight, m) => sum + weight * value(grid.positions[m]!), 0);
}

const exponents = [0, 0.5, 1, 2, 3.2];

describe.each(exponents)('diffusion grids, shape exponent %f', (sigma) => {
  const grids: [string, DiffusionGrid][] = [
    ['one polynomial', singlePolynomialGrid(sigma, 6)],
    ['elements', elementGrid(sigma, [0.7, 0.93], 6)],
  ];

  it.each(grids)('%s: a manufactured solution comes back exactly', (_name, grid) => {
    // ψ = 1 - x⁶: -∇²ψ = 6 (σ+5) x⁴
    const psi = apply(grid, (x) => 6 * (sigma + 5) * x ** 4);
    psi.forEach((value, n) => expect(value).toBeCloseTo(1 - grid.positions[n]! ** 6, 11));
    for (const x of [0, 0.1, 0.5, 0.85, 0.97, 1]) {
      const value = grid.interpolationAt(x).reduce((sum, c, n) => sum + c * psi[n]!, 0);
      expect(value).toBeCloseTo(1 - x ** 6, 10);
    }
  });

  it.each(grids)('%s: volume averages of even powers are exact', (_name, grid) => {
    for (const power of [0, 2, 4, 8]) {
      expect(average(grid, (x) => x ** power)).toBeCloseTo(
        (sigma + 1) / (sigma + 1 + power),
        _name === 'elements' ? 8 : 12,
      );
    }
  });
});

describe('resolution ladder', () => {
  /** First-order effectiveness on a grid at R-modulus `phi`. */
  function effectiveness(grid: DiffusionGrid, phi: number): number {
    const n = grid.unknownCount;
    const matrix = Matrix.eye(n, n);
    const right = Matrix.zeros(n, 1);
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        const entry = phi * phi * grid.green[i * n + j]!;
        matrix.set(i, j, matrix.get(i, j) + entry);
        right.set(i, 0, right.get(i, 0) + entry);
      }
    }
    const psi = solve(matrix, right);
    return grid.weights.reduce((sum, weight, m) => sum + weight * (1 - (m < n ? psi.get(m, 0) : 0)), 0);
  }

  it('converges faster than any power: at most three nodes more square the error (slab, Φ = 10, closed form tanh Φ / Φ)', () => {
    const exact = Math.tanh(10) / 10;
    const errors = [4, 7, 10].map((nodes) =>
      Math.abs(effectiveness(singlePolynomialGrid(0, nodes), 10) / exact - 1),
    );
    expect(errors[1]!).toBeLessThan(errors[0]! ** 2 * 10);
    expect(errors[2]!).toBeLessThan(1e-13);
  });

  it.each([
    [0, 2000, Math.tanh(2000) / 2000],
    [2, 6000, (3 / 6000) * (1 / Math.tanh(6000) - 1 / 6000)],
  ])(
    'its finest rungs resolve a zone of a few thousandths of a percent (σ = %i, φ = %i)',
    (sigma, phi, exact) => {
      const grid = createResolutionLadder(sigma).grid(finestRung);
      expect(Math.abs(effectiveness(grid, phi) / exact - 1)).toBeLessThan(1e-7);
    },
  );

  it('refuses rungs that are not there', () => {
    expect(() => createResolutionLadder(2).grid(finestRung + 1)).toThrow(RangeError);
  });
});
