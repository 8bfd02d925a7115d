import { describe, expect, it } from 'vitest';
import { findRoot } from '../../src/numerics/scalar-root.js';

describe('findRoot', () => {
  it.each<[string, (x: number) => number, number, number, number]>([
    ['a cubic', (x) => x ** 3 - 2, 0, 5, Math.cbrt(2)],
    ['a transcendental function', (x) => Math.cos(x) - x, 0, 1, 0.7390851332151607],
    ['a ninefold root', (x) => (x - 1) ** 9, 0, 3, 1],
    ['a steep exponential', (x) => Math.exp(40 * x) - 2, -1, 2, Math.log(2) / 40],
    ['a jump', (x) => (x < 0.3 ? -1 : 1), 0, 1, 0.3],
  ])('finds the root of %s', (_name, f, lower, upper, exact) => {
    const { root, evaluations } = findRoot(f, lower, upper, 1e-12);
    // A ninefold root is flat to rounding over 1e-2 around it.
    expect(Math.abs(root - exact)).toBeLessThan(_name.includes('ninefold') ? 2e-2 : 2e-12);
    // At worst every fourth step is a bisection: 4 log2(3 / 1e-12) = 166.
    expect(evaluations).toBeLessThan(170);
  });

  it('takes a root that lies on an end of the bracket', () => {
    expect(findRoot((x) => x, 0, 1, 1e-12).root).toBe(0);
    expect(findRoot((x) => x - 1, 0, 1, 1e-12).root).toBe(1);
  });

  it('refuses a bracket without a sign change', () => {
    expect(() => findRoot((x) => x * x + 1, -1, 1, 1e-12)).toThrow(RangeError);
    expect(() => findRoot(() => Number.NaN, -1, 1, 1e-12)).toThrow(RangeError);
  });
});
