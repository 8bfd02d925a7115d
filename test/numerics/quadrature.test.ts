import { describe, expect, it } from 'vitest';
import { gaussJacobi, gaussLegendre } from '../../src/numerics/quadrature.js';

/** B(a, b) for positive arguments with a or b a whole number, by the recurrence of the gamma function. */
function betaRatio(p: number, power: number, q: number): number {
  // ∫ u^(p+power) (1-u)^q / ∫ u^p (1-u)^q = Π_{k<power} (p+1+k)/(p+q+2+k)
  let product = 1;
  for (let k = 0; k < power; k++) product *= (p + 1 + k) / (p + q + 2 + k);
  return product;
}

describe('Gauss–Jacobi quadrature on [0, 1]', () => {
  it.each([
    [3, -0.5, 0],
    [3, -0.5, 1],
    [6, 0, 1],
    [10, 0.5, 1],
    [20, 0.5, 0],
    [7, 1.3, 0],
  ])('%i points integrate every power up to 2n-1 exactly for weight u^%f (1-u)^%f', (count, lower, upper) => {
    const { points, weights } = gaussJacobi(count, lower, upper);
    for (let power = 0; power < 2 * count; power++) {
      const obtained = points.reduce((sum, u, k) => sum + weights[k]! * u ** power, 0);
      const exact = betaRatio(lower, power, upper);
      expect(Math.abs(obtained / exact - 1)).toBeLessThan(5e-13);
    }
  });

  it('has the tabulated five-point Legendre nodes (Abramowitz & Stegun, Table 25.4)', () => {
    const { points, weights } = gaussLegendre(5);
    expect(2 * points[4]! - 1).toBeCloseTo(0.906179845938664, 14);
    expect(2 * points[3]! - 1).toBeCloseTo(0.538469310105683, 14);
    expect(2 * weights[4]!).toBeCloseTo(0.236926885056189, 14);
    expect(2 * weights[2]!).toBeCloseTo(0.568888888888889, 14);
  });
});
