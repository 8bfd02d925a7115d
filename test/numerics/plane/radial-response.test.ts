import { describe, expect, it } from 'vitest';
import { annulusResponse, discResponse } from '../../../src/numerics/plane/radial-response.js';
import { prismDeficit, slabDeficit } from '../../../src/numerics/plane/section-response.js';

const relative = (obtained: number, expected: number): number => Math.abs(obtained / expected - 1);

describe('disc and annulus', () => {
  it('mean of ψ: R²/8 for the disc, the torsion of a tube for the annulus (Timoshenko & Goodier), d²/12 for a thin wall', () => {
    expect(relative(discResponse(3).meanDeficit(0), 9 / 8)).toBeLessThan(1e-15);
    // b = 2, a = 1: (5 - 3/ln 2)/8
    expect(relative(annulusResponse(1, 2).meanDeficit(0), (5 - 3 / Math.LN2) / 8)).toBeLessThan(1e-12);
    expect(relative(annulusResponse(1, 1 + 1e-5).meanDeficit(0), 1e-10 / 12)).toBeLessThan(1e-10);
    expect(relative(annulusResponse(1, 1.001).meanDeficit(0), 1e-6 / 12)).toBeLessThan(1e-6);
  });

  it('series and formula meet where one takes over from the other', () => {
    for (const [response, at] of [
      [discResponse(1), 9e-6],
      [annulusResponse(0.2, 1), (1e-3 / 0.8) ** 2],
      [annulusResponse(0.9, 1), (1e-3 / 0.1) ** 2],
    ] as const) {
      const below = response.meanDeficit(at * (1 - 1e-9));
      const above = response.meanDeficit(at * (1 + 1e-9));
      // Rounding over (1 - <f>) of 1e-7 on one side, the next term of the series on the other.
      expect(relative(below, above)).toBeLessThan(5e-8);
    }
    expect(relative(slabDeficit(1, 0.99e-6), slabDeficit(1, 1.01e-6))).toBeLessThan(1e-8);
  });

  it('at large s only the edges count: <f> tends to perimeter/(area √s)', () => {
    // Curvature of both signs cancels in the annulus, so that the next term falls as 1/s^(3/2).
    const annulus = annulusResponse(0.5, 1);
    const s = 1e6;
    const mean = 1 - s * annulus.meanDeficit(s);
    expect(relative(mean, annulus.perimeter / annulus.area / Math.sqrt(s))).toBeLessThan(1e-6);
  });

  it('annulus satisfies its differential equation in the mean: flux through both edges is s times the mean of f', () => {
    // By finite differences on a fine radial grid, independent of Bessel functions.
    for (const s of [0.3, 10, 300]) {
      const count = 4000;
      const [inner, outer] = [0.3, 1];
      const step = (outer - inner) / count;
      const values = tridiagonalAnnulus(inner, step, count, s);
      let weighted = 0;
      values.forEach((value, k) => {
        const end = k === 0 || k === count ? 0.5 : 1;
        weighted += end * value * (inner + k * step) * step;
      });
      const mean = (2 * weighted) / (outer ** 2 - inner ** 2);
      // Second order: s (step)² / 12 of the profile.
      expect(relative(annulusResponse(inner, outer).meanDeficit(s), (1 - mean) / s)).toBeLessThan(2e-6);
    }
  });
});

describe('prismDeficit', () => {
  it('between two plates far apart the section decides, between two close ones the slab', () => {
    const disc = discResponse(1);
    // The ends cost a length: <ψ> = <ψ of the section>(1 - O(R/H)).
    expect(relative(prismDeficit(disc, 4000, 0), 1 / 8)).toBeLessThan(5e-4);
    expect(relative(prismDeficit(disc, 1e-3, 0), 1e-6 / 12)).toBeLessThan(2e-3);
    expect(relative(prismDeficit(disc, 1e-3, 0), 1e-6 / 12)).toBeGreaterThan(1e-5);
  });

  it('square prism of square section: the cube’s mean of ψ by the triple sine series', () => {
    // The section by its own sine series, the cube's by another sum altogether.
    const odd = Array.from({ length: 150 }, (_, k) => 2 * k + 1);
    const weight = (n: number): number => 8 / (n * n * Math.PI ** 2);
    const section = {
      area: 1,
      perimeter: 4,
      meanDeficit: (s: number): number =>
        odd.reduce((sum, n) => sum + weight(n) * slabDeficit(0.5, s + (n * Math.PI) ** 2), 0),
    };
    let cube = 0;
    for (const l of odd) {
      for (const m of odd) {
        for (const n of odd) {
          cube += (weight(l) * weight(m) * weight(n)) / (Math.PI ** 2 * (l * l + m * m + n * n));
        }
      }
    }
    expect(relative(prismDeficit(section, 1, 0), cube)).toBeLessThan(1e-6);
  });
});

/** f at nodes inner + k step of (r f')' = s r f, f = 1 at both ends, second order. */
function tridiagonalAnnulus(inner: number, step: number, count: number, s: number): number[] {
  const upper: number[] = [0];
  const right: number[] = [1];
  for (let k = 1; k < count; k++) {
    const r = inner + k * step;
    const [lower, above] = [(r - step / 2) / step ** 2, (r + step / 2) / step ** 2];
    const pivot = lower + above + s * r - lower * upper[k - 1]!;
    upper.push(above / pivot);
    right.push((lower * right[k - 1]!) / pivot);
  }
  const values = new Array<number>(count + 1).fill(1);
  for (let k = count - 1; k > 0; k--) values[k] = right[k]! + upper[k]! * values[k + 1]!;
  return values;
}
