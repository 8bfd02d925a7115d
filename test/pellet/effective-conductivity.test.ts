import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  conductivityBounds,
  geometricMeanConductivity,
  typicalSolidConductivity,
} from '../../src/pellet/effective-conductivity.js';

const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);
const share = fc.double({ min: 0.02, max: 0.98, noNaN: true });
const conductivity = fc.double({ min: -2, max: 2, noNaN: true }).map((power) => 10 ** power);

describe('geometric mean', () => {
  it('comes to each phase where there is only that, and is linear in logarithms between', () => {
    expect(geometricMeanConductivity(0, 2, 0.05)).toBe(2);
    expect(geometricMeanConductivity(1, 2, 0.05)).toBe(0.05);
    expect(relative(geometricMeanConductivity(0.5, 4, 0.04), 0.4)).toBeLessThan(1e-14);
  });

  it('lies within the bounds where the solid conducts ten times better or more, and just below them otherwise', () => {
    for (const porosity of [0.05, 0.3, 0.4, 0.5, 0.6, 0.7, 0.95]) {
      for (const ratio of [10, 30, 100, 300]) {
        const { lower, upper } = conductivityBounds(porosity, 0.04 * ratio, 0.04);
        const mean = geometricMeanConductivity(porosity, 0.04 * ratio, 0.04);
        expect(mean, `${porosity}, ${ratio}`).toBeGreaterThan(lower);
        expect(mean, `${porosity}, ${ratio}`).toBeLessThan(upper);
      }
    }
    for (const porosity of [0.3, 0.5, 0.7]) {
      for (const ratio of [1.5, 2, 3, 5]) {
        const { lower, upper } = conductivityBounds(porosity, 0.04 * ratio, 0.04);
        const mean = geometricMeanConductivity(porosity, 0.04 * ratio, 0.04);
        expect(mean, `${porosity}, ${ratio}`).toBeGreaterThan(0.98 * lower);
        expect(mean, `${porosity}, ${ratio}`).toBeLessThan(upper);
      }
    }
  });
});

describe('bounds', () => {
  it('lie between phases in series and side by side, and include the symmetric effective medium', () => {
    fc.assert(
      fc.property(share, conductivity, conductivity, (porosity, solid, gas) => {
        fc.pre(Math.abs(Math.log(solid / gas)) > 0.01);
        const { lower, upper } = conductivityBounds(porosity, solid, gas);
        const series = 1 / ((1 - porosity) / solid + porosity / gas);
        const parallel = (1 - porosity) * solid + porosity * gas;
        expect(lower).toBeGreaterThan(series);
        expect(upper).toBeLessThan(parallel);
        // Bruggeman (1935): Σ f (k_i - k)/(k_i + 2 k) = 0, the positive root of 2 k² - b k - k_s k_g = 0.
        const b = (3 * (1 - porosity) - 1) * solid + (3 * porosity - 1) * gas;
        const effectiveMedium = (b + Math.sqrt(b * b + 8 * solid * gas)) / 4;
        expect(effectiveMedium).toBeGreaterThan(lower * (1 - 1e-9));
        expect(effectiveMedium).toBeLessThan(upper * (1 + 1e-9));
      }),
    );
  });

  it('do not mind which phase conducts better', () => {
    const one = conductivityBounds(0.3, 2, 0.1);
    const other = conductivityBounds(0.7, 0.1, 2);
    expect(relative(one.lower, other.lower)).toBeLessThan(1e-14);
    expect(relative(one.upper, other.upper)).toBeLessThan(1e-14);
  });

  it('come to dilute spheres and to holes that do not conduct', () => {
    // Maxwell (1873): a few holes in a solid take 3/2 of their volume; spheres that conduct without resistance add three times theirs.
    expect(relative(1 - conductivityBounds(1e-4, 1, 1e-12).upper, 1.5e-4)).toBeLessThan(1e-3);
    expect(relative(conductivityBounds(1 - 1e-4, 1e12, 1).lower - 1, 3e-4)).toBeLessThan(1e-3);
    // (1 - φ)/(1 + φ/2) with φ = 0.4 is one half.
    expect(relative(conductivityBounds(0.4, 1, 1e-13).upper, 0.5)).toBeLessThan(1e-12);
  });

  it('meet where the phases are alike', () => {
    const { lower, upper } = conductivityBounds(0.4, 0.3, 0.3);
    expect(relative(lower, 0.3)).toBeLessThan(1e-14);
    expect(relative(upper, 0.3)).toBeLessThan(1e-14);
  });
});

describe('typical solid', () => {
  it('gives pellets in ordinary gases the conductivity that is usually measured', () => {
    // 0.1 to 0.6 W/(m K), Satterfield (1970), ch. 4 (from memory); vapours and air at 400 to 900 K.
    for (const porosity of [0.4, 0.5, 0.6]) {
      for (const gas of [0.03, 0.06]) {
        const value = geometricMeanConductivity(porosity, typicalSolidConductivity.value, gas);
        expect(value).toBeGreaterThan(0.1);
        expect(value).toBeLessThan(0.6);
      }
    }
    expect(typicalSolidConductivity.source).toMatch(/common practice/);
  });
});
