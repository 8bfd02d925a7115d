import { describe, expect, it } from 'vitest';
import {
  filmCorrelations,
  type FilmCorrelation,
  type FilmGeometry,
} from '../../../src/pellet/film/film-correlations.js';
import { createFilmTransfer, type FilmSizes } from '../../../src/pellet/film/film-transfer.js';

const sphere = (diameter: number): FilmSizes => ({
  volumeDiameter: diameter,
  sauterDiameter: diameter,
  surfaceDiameter: diameter,
  sphericity: 1,
});
/** As long as wide: volume π D³/4, surface 3 π D²/2. */
const cylinder = (diameter: number): FilmSizes => ({
  volumeDiameter: diameter * Math.cbrt(1.5),
  sauterDiameter: diameter,
  surfaceDiameter: diameter * Math.sqrt(1.5),
  sphericity: 1 / Math.cbrt(1.5),
});
const spheres: FilmGeometry = { voidFraction: 0.4, sphericity: 1 };
const air = { massFlux: 1.2, density: 1.2, viscosity: 1.8e-5 };
const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);
const names = Object.keys(filmCorrelations) as (keyof typeof filmCorrelations)[];
const all: readonly (readonly [string, FilmCorrelation])[] = names.map((name) => [
  name,
  filmCorrelations[name],
]);

describe('film correlations', () => {
  it.each([
    // The printed formulas by an independent program: air-like, 5 mm, void fraction 0.4, Re 333.33, Sc = Pr = 0.7; no published values.
    ['wakao_funazkri', 33.88],
    ['thoenes_kramers', 31.39],
    ['petrovic_thodos', 32.82],
    ['dwivedi_upadhyay', 33.52],
    ['gnielinski', 39.24],
  ] as const)('%s comes to its formula', (name, expected) => {
    expect(Math.abs(filmCorrelations[name].sherwood(1000 / 3, 0.7, spheres) - expected)).toBeLessThan(0.006);
  });

  it('agree with each other about gases within their scatter, heat in a bed of spheres excepted', () => {
    for (const reynolds of [50, 200, 1000, 1900]) {
      const values = names
        .filter((name) => name !== 'gnielinski')
        .map((name) => filmCorrelations[name].sherwood(reynolds, 1, spheres));
      expect(Math.max(...values) / Math.min(...values), `Re ${reynolds}`).toBeLessThan(1.5);
    }
  });

  it.each(all)('%s gives more for more flow and for a larger Schmidt number', (_name, { sherwood }) => {
    for (const reynolds of [30, 100, 1000, 2500]) {
      for (const schmidt of [0.6, 1, 3, 1000]) {
        const value = sherwood(reynolds, schmidt, spheres);
        expect(sherwood(1.1 * reynolds, schmidt, spheres)).toBeGreaterThan(value);
        expect(sherwood(reynolds, 1.1 * schmidt, spheres)).toBeGreaterThan(value);
      }
    }
  });

  it('keep the sphere that conducts into fluid at rest where they are made to: two, times crowding in a bed', () => {
    const still = 1e-12;
    expect(filmCorrelations.wakao_funazkri.sherwood(still, 1, spheres)).toBeCloseTo(2, 5);
    expect(filmCorrelations.gnielinski.sherwood(still, 1, { voidFraction: 1, sphericity: 1 })).toBeCloseTo(
      2,
      5,
    );
    expect(filmCorrelations.gnielinski.sherwood(still, 1, spheres)).toBeCloseTo(1.9 * 2, 5);
  });

  it('gnielinski at Prandtl number one is the root of a laminar and a turbulent plate', () => {
    // The turbulent part's denominator is one there; Re/ε = 1000: 0.664 √1000 = 20.9975, 0.037 · 1000^0.8 = 9.2939.
    const expected = 1.9 * (2 + Math.hypot(20.9975, 9.2939));
    expect(relative(filmCorrelations.gnielinski.sherwood(400, 1, spheres), expected)).toBeLessThan(1e-5);
  });

  it('petrovic_thodos and dwivedi_upadhyay give a transfer factor that knows no Schmidt number', () => {
    for (const { sherwood } of [filmCorrelations.petrovic_thodos, filmCorrelations.dwivedi_upadhyay]) {
      const factor = (schmidt: number): number => sherwood(100, schmidt, spheres) / Math.cbrt(schmidt);
      expect(relative(factor(1000), factor(0.7))).toBeLessThan(1e-13);
      const wider = sherwood(100, 1, { voidFraction: 0.8, sphericity: 1 });
      expect(relative(wider, sherwood(100, 1, spheres) / 2)).toBeLessThan(1e-13);
    }
  });

  it.each(all)('%s states one range, in whichever number', (_name, { reynoldsRange, ownReynolds }) => {
    expect(reynoldsRange[0]).toBeLessThan(reynoldsRange[1]);
    if (!ownReynolds) return;
    reynoldsRange.forEach((end, k) => {
      expect(relative(ownReynolds.of(end, spheres), ownReynolds.range[k]!)).toBeLessThan(1e-12);
    });
  });

  it.each(all)('%s tells its source and scatter', (_name, { name, source, scatter }) => {
    expect(name).not.toBe('');
    expect(source).toMatch(/\(19\d\d\)/);
    expect(scatter).toMatch(/^\d+ %$/);
  });
});

describe('createFilmTransfer', () => {
  it('gives every species its own coefficient, k = Sh D/d', () => {
    const { reynolds, coefficientsInto } = createFilmTransfer(
      filmCorrelations.thoenes_kramers,
      sphere(5e-3),
      0.4,
    );
    expect(relative(reynolds(air), 1000 / 3)).toBeLessThan(1e-12);
    const target = new Float64Array(3);
    coefficientsInto(air, Float64Array.of(1.5e-5 / 0.7, 1e-5, 8e-5), target);
    expect(relative(target[0]!, (31.39 * 1.5e-5) / 0.7 / 5e-3)).toBeLessThan(2e-4);
    // With Sh ~ Sc^⅓ the coefficient goes with the two-thirds power of the diffusivity.
    expect(relative(target[2]! / target[1]!, 4)).toBeLessThan(1e-12);
  });

  it('leaves alone what has no diffusivity', () => {
    const { coefficientsInto } = createFilmTransfer(filmCorrelations.petrovic_thodos, sphere(5e-3), 0.4);
    const target = Float64Array.of(Infinity, 0);
    coefficientsInto(air, Float64Array.of(Number.NaN, 1e-5), target);
    expect(target[0]).toBe(Infinity);
    expect(target[1]).toBeGreaterThan(0);
  });

  it.each(all)('%s: heat and matter go alike where their diffusivities are alike', (_name, correlation) => {
    const { coefficientsInto, heatTransfer } = createFilmTransfer(correlation, cylinder(3e-3), 0.38);
    const [diffusivity, heatCapacity] = [2.5e-5, 1100];
    const target = new Float64Array(1);
    coefficientsInto(air, Float64Array.of(diffusivity), target);
    const volumetric = air.density * heatCapacity;
    const heat = heatTransfer(air, diffusivity * volumetric, heatCapacity);
    expect(relative(heat, target[0]! * volumetric)).toBeLessThan(1e-12);
  });

  it('takes the diameter that the correlation asks for', () => {
    const sizes = cylinder(3e-3);
    for (const [key, diameter] of [
      ['sauter', sizes.sauterDiameter],
      ['volume', sizes.volumeDiameter],
      ['surface', sizes.surfaceDiameter],
    ] as const) {
      const own: FilmCorrelation = { ...filmCorrelations.wakao_funazkri, diameter: key };
      const { reynolds, heatTransfer } = createFilmTransfer(own, sizes, 0.4);
      expect(relative(reynolds(air), (1.2 * diameter) / 1.8e-5)).toBeLessThan(1e-12);
      const nusselt = 2 + 1.1 * Math.cbrt((1.8e-5 * 1000) / 0.025) * ((1.2 * diameter) / 1.8e-5) ** 0.6;
      expect(relative(heatTransfer(air, 0.025, 1000), (nusselt * 0.025) / diameter)).toBeLessThan(1e-12);
    }
    expect(filmCorrelations.gnielinski.diameter).toBe('surface');
    expect(filmCorrelations.thoenes_kramers.diameter).toBe('volume');
  });

  it('knows where each correlation was measured', () => {
    const at = (correlation: FilmCorrelation, reynolds: number, voidFraction: number, sizes = sphere(1e-3)) =>
      createFilmTransfer(correlation, sizes, voidFraction).isInRange({
        massFlux: reynolds,
        density: 1,
        viscosity: 1e-3,
      });
    const { petrovic_thodos, thoenes_kramers, gnielinski } = filmCorrelations;
    expect([2.9, 3.1, 1999, 2001].map((re) => at(petrovic_thodos, re, 0.4))).toEqual([
      false,
      true,
      true,
      false,
    ]);
    // Re ψ/(1 - ε) from 40 to 4000, void fraction 0.25 to 0.5.
    expect([29, 31].map((re) => at(thoenes_kramers, re, 0.25))).toEqual([false, true]);
    expect([19.9, 20.1].map((re) => at(thoenes_kramers, re, 0.5))).toEqual([false, true]);
    expect(at(thoenes_kramers, 100, 0.51)).toBe(false);
    // A cylinder's volume diameter is its own times 1.5^⅓ and its sphericity one over that.
    expect([23.9, 24.1].map((re) => at(thoenes_kramers, re, 0.4, cylinder(1e-3)))).toEqual([false, true]);
    // Re/ε from 100.
    expect([49, 51].map((re) => at(gnielinski, re, 0.5))).toEqual([false, true]);
    expect(at(gnielinski, 1000, 0.25)).toBe(false);
  });
});
