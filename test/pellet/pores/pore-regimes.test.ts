import { describe, expect, it } from 'vitest';
import { poreRegimes, speciesShutOut } from '../../../src/pellet/pores/pore-regimes.js';

const hydrogen = 2.016e-3;
const nitrogen = 28.014e-3;
const poresOf = (...radii: number[]) => ({
  pores: radii.map((radius) => ({ radius, fraction: 1 / radii.length })),
});

describe('poreRegimes', () => {
  it('ties mean free path and diffusivities by one kinetic theory', () => {
    const molecular = Float64Array.of(7e-5, 2e-5);
    const regimes = poreRegimes(
      poresOf(5e-9, 4e-7),
      [hydrogen, nitrogen],
      [undefined, 3.8e-10],
      molecular,
      400,
    );
    expect(regimes.map(({ radius, speciesIndex }) => [radius, speciesIndex])).toEqual([
      [5e-9, 0],
      [5e-9, 1],
      [4e-7, 0],
      [4e-7, 1],
    ]);
    for (const { radius, speciesIndex, knudsenDiffusivity, meanFreePath, knudsenNumber } of regimes) {
      // λ = 3 D/v̄, with R of CODATA 2018 written out.
      const molarMass = [hydrogen, nitrogen][speciesIndex]!;
      const speed = Math.sqrt((8 * 8.314462618 * 400) / (Math.PI * molarMass));
      expect(meanFreePath / ((3 * molecular[speciesIndex]!) / speed)).toBeCloseTo(1, 12);
      expect(knudsenDiffusivity / ((2 * radius * speed) / 3)).toBeCloseTo(1, 12);
      expect(knudsenNumber / (meanFreePath / (2 * radius))).toBeCloseTo(1, 12);
    }
  });

  it('names the mechanism: bulk above 1 µm, both about 0.1 µm, Knudsen below 10 nm, for air at 300 K and 1 atm', () => {
    // Orders of magnitude of the textbooks, e.g. Satterfield (1970), ch. 1 (from memory); D of N2 in air 0.2 cm²/s; the
    // narrowest are the windows of zeolite CaA, 0.43 nm.
    const regimes = poreRegimes(
      poresOf(1e-6, 7e-8, 2e-9, 2.15e-10),
      [nitrogen],
      [3.8e-10],
      Float64Array.of(2e-5),
      300,
    );
    expect(regimes.map((regime) => regime.mechanism)).toEqual([
      'molecular',
      'transition',
      'knudsen',
      'configurational',
    ]);
  });

  it('comes within a factor of two of the hard spheres of a worked example, and to the same regime', () => {
    // Benitez, Principles and Modern Applications of Mass Transfer Operations, example 1.20: hydrogen and ethane, Kn = 0.022.
    const [regime] = poreRegimes(poresOf(2e-7), [hydrogen], [2.827e-10], Float64Array.of(8.6e-6), 373);
    expect(regime!.knudsenNumber / 0.022).toBeGreaterThan(0.5);
    expect(regime!.knudsenNumber / 0.022).toBeLessThan(2);
    expect(regime!.mechanism).toBe('molecular');
  });

  it('says nothing of the size of a molecule that is not known', () => {
    const [regime] = poreRegimes(poresOf(4e-10), [nitrogen], [undefined], Float64Array.of(2e-5), 300);
    expect(regime!.sizeRatio).toBeNull();
    expect(regime!.mechanism).toBe('knudsen');
  });
});

describe('speciesShutOut', () => {
  it('names those as wide as the widest pore, or wider', () => {
    const diameters = [3e-10, 8e-10, undefined, 1e-9, 7.99e-10];
    expect(speciesShutOut(poresOf(2e-10, 4e-10), diameters)).toEqual([1, 3]);
    expect(speciesShutOut(poresOf(1e-8), diameters)).toEqual([]);
  });
});
