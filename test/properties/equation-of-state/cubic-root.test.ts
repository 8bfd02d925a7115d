import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compressibilityFactor, cubicForms } from '../../../src/properties/equation-of-state/cubic-root.js';
import { cubicKinds } from './fluid-fixtures.js';

describe.each(cubicKinds)('%s', (kind) => {
  const form = cubicForms[kind];
  const { first, second } = form;

  /** a p/(R T)² for which Z is a root at b p/(R T): the equation of state times v/(R T), solved for a. */
  const attractionFor = (Z: number, size: number): number =>
    (1 / (Z - size) - 1) * (Z + first * size) * (Z + second * size);

  it('the critical point is a triple root at the published compressibility factor', () => {
    // Peng & Robinson (1976): 0.307; Soave (1972): 1/3. A triple root answers to rounding by its cube root, 1e-5.
    for (const phase of ['gas', 'liquid'] as const) {
      const found = compressibilityFactor(form, form.attraction, form.size, phase);
      expect(Math.abs(found - form.criticalCompressibility)).toBeLessThan(2e-5);
    }
    expect(form.criticalCompressibility).toBeCloseTo(kind === 'peng_robinson' ? 0.307401 : 0.333333, 6);
    // p, and two derivatives of it, meet there: b/vc and a/(R Tc b) satisfy both conditions to rounding.
    const v = form.criticalCompressibility / form.size;
    const strength = form.attraction / form.size;
    const q = (v + first) * (v + second);
    const qSlope = 2 * v + first + second;
    expect(Math.abs((strength * qSlope) / q ** 2 - 1 / (v - 1) ** 2)).toBeLessThan(1e-15);
    expect(Math.abs((strength * (qSlope ** 2 / q - 1)) / q ** 2 - 1 / (v - 1) ** 3)).toBeLessThan(1e-15);
  });

  it('is 1 + B without attraction', () => {
    for (const size of [1e-9, 1e-3, 0.1, 5]) {
      for (const phase of ['gas', 'liquid'] as const) {
        expect(Math.abs(compressibilityFactor(form, 0, size, phase) / (1 + size) - 1)).toBeLessThan(1e-15);
      }
    }
  });

  it('gas and liquid are the outermost roots, and solve the equation of state to rounding', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -5, max: 0.5, noNaN: true }),
        fc.double({ min: -3, max: 1, noNaN: true }),
        (logSize, logGap) => {
          const size = 10 ** logSize;
          const root = size + 10 ** logGap;
          const attraction = attractionFor(root, size);
          fc.pre(attraction >= 0);
          const gas = compressibilityFactor(form, attraction, size, 'gas');
          const liquid = compressibilityFactor(form, attraction, size, 'liquid');
          for (const Z of [gas, liquid]) {
            const repulsion = 1 / (Z - size);
            const pull = attraction / ((Z + first * size) * (Z + second * size));
            // Judged by the terms it is the difference of, and by what one rounding of Z does to Z - B.
            const scale = (1 + repulsion + pull) * (1 + Z * repulsion);
            expect(Math.abs(repulsion - pull - 1) / scale).toBeLessThan(2e-14);
          }
          // No root lies beyond them: below by the known root, for roots apart from one another.
          expect(gas).toBeGreaterThan(root * (1 - 1e-5));
          expect(liquid).toBeLessThan(root * (1 + 1e-5));
          expect(liquid).toBeGreaterThan(size);
          expect(gas).toBeLessThanOrEqual((1 + size) * (1 + 1e-15));
        },
      ),
      { numRuns: 5000 },
    );
  });

  it('three roots: the outer two, apart from one another, to 1e-13', () => {
    // Cubic through a chosen gas root, with A from it; the other roots by deflation, in the quadratic's stable form.
    const size = 0.005;
    for (const root of [0.9, 0.95, 0.97]) {
      const attraction = attractionFor(root, size);
      const c2 = (first + second - 1) * size - 1;
      const c0 = -(attraction * size + first * second * size ** 2 * (1 + size));
      const half = -(c2 + root) / 2;
      const product = -c0 / root;
      const smaller = product / (half + Math.sqrt(half ** 2 - product));
      expect(Math.abs(compressibilityFactor(form, attraction, size, 'gas') / root - 1)).toBeLessThan(1e-13);
      expect(Math.abs(compressibilityFactor(form, attraction, size, 'liquid') / smaller - 1)).toBeLessThan(
        1e-13,
      );
    }
  });

  it('a little repulsion is followed beyond 1 + B', () => {
    const root = 1.3;
    const attraction = attractionFor(root, 0.2);
    expect(attraction).toBeLessThan(0);
    expect(Math.abs(compressibilityFactor(form, attraction, 0.2, 'gas') / root - 1)).toBeLessThan(1e-14);
  });

  it('numbers that are none give none', () => {
    expect(compressibilityFactor(form, Number.NaN, 0.1, 'gas')).toBeNaN();
    expect(compressibilityFactor(form, 0.1, Number.NaN, 'liquid')).toBeNaN();
  });
});
