import { Matrix, solve } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { factoriseComplexInPlace, solveComplexInPlace } from '../../src/numerics/complex-lu.js';
import { factoriseInPlace, solveInPlace, solveTransposedInPlace } from '../../src/numerics/dense-lu.js';

/** Small linear congruential generator, so that the matrices are the same in every run. */
function randomNumbers(seed: number): () => number {
  let state = seed;
  return () => {
    state = (1664525 * state + 1013904223) % 4294967296;
    return state / 4294967296 - 0.5;
  };
}

describe('dense LU', () => {
  it.each([1, 2, 5, 12, 30])('solves as ml-matrix does, plain and transposed, size %i', (size) => {
    const next = randomNumbers(size);
    const entries = Float64Array.from({ length: size * size }, next);
    const right = Float64Array.from({ length: size }, next);
    const matrix = Matrix.from1DArray(size, size, entries);
    const factors = entries.slice();
    const pivots = new Int32Array(size);
    expect(factoriseInPlace(factors, size, pivots)).toBe(true);
    for (const transposed of [false, true]) {
      const expected = solve(
        transposed ? matrix.transpose() : matrix,
        Matrix.columnVector(right),
      ).to1DArray();
      const obtained = right.slice();
      (transposed ? solveTransposedInPlace : solveInPlace)(factors, size, pivots, obtained);
      const scale = Math.max(...expected.map(Math.abs));
      obtained.forEach((value, i) => expect(Math.abs(value - expected[i]!)).toBeLessThan(1e-11 * scale));
    }
  });

  it('works on a part of a longer vector', () => {
    const factors = Float64Array.of(0, 2, 4, 0);
    const pivots = new Int32Array(2);
    factoriseInPlace(factors, 2, pivots);
    const vector = Float64Array.of(7, 6, 8, 9);
    solveInPlace(factors, 2, pivots, vector, 1);
    expect([...vector]).toEqual([7, 2, 3, 9]);
  });

  it('reports singular and non-finite matrices', () => {
    const pivots = new Int32Array(2);
    expect(factoriseInPlace(Float64Array.of(1, 2, 2, 4), 2, pivots)).toBe(false);
    expect(factoriseInPlace(Float64Array.of(Number.NaN, 2, 2, 4), 2, pivots)).toBe(false);
  });
});

describe('complex LU', () => {
  it.each([1, 3, 8])('leaves no residual, size %i', (size) => {
    const next = randomNumbers(100 + size);
    const real = Float64Array.from({ length: size * size }, next);
    const imaginary = Float64Array.from({ length: size * size }, next);
    const rightReal = Float64Array.from({ length: size }, next);
    const rightImaginary = Float64Array.from({ length: size }, next);
    const [fr, fi, xr, xi] = [real.slice(), imaginary.slice(), rightReal.slice(), rightImaginary.slice()];
    const pivots = new Int32Array(size);
    expect(factoriseComplexInPlace(fr, fi, size, pivots)).toBe(true);
    solveComplexInPlace(fr, fi, size, pivots, xr, xi);
    for (let i = 0; i < size; i++) {
      let a = -rightReal[i]!;
      let b = -rightImaginary[i]!;
      for (let j = 0; j < size; j++) {
        a += real[i * size + j]! * xr[j]! - imaginary[i * size + j]! * xi[j]!;
        b += real[i * size + j]! * xi[j]! + imaginary[i * size + j]! * xr[j]!;
      }
      expect(Math.hypot(a, b)).toBeLessThan(1e-12);
    }
  });
});
