import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { knudsenCoefficient } from '../../../src/pellet/pores/knudsen.js';
import { createPoreDiffusion } from '../../../src/pellet/pores/pore-diffusion.js';
import type { PoreStructure } from '../../../src/pellet/pores/pore-structure.js';
import { readReference } from '../../reference/read-reference.js';

const molarMass = 28.01e-3;
const temperature = 600;
const molecular = 3e-5;
const base: PoreStructure = {
  porosity: 0.45,
  tortuosity: 3,
  pores: [{ radius: 8e-9, fraction: 1 }],
  model: 'parallel',
  hindrance: 'none',
};
const macro = 5e-7;
const micro = 4e-9;
const bimodal = (macroShare: number, changes: Partial<PoreStructure> = {}): PoreStructure => ({
  ...base,
  pores: [
    { radius: micro, fraction: 1 - macroShare },
    { radius: macro, fraction: macroShare },
  ],
  ...changes,
});

/** Of one species of 28 g/mol. */
function effective(
  structure: PoreStructure,
  { inMixture = molecular, at = temperature, diameter }: Options = {},
) {
  const target = new Float64Array(1);
  createPoreDiffusion(structure, [molarMass], [diameter]).effectiveInto(
    Float64Array.of(inMixture),
    at,
    target,
  );
  return target[0]!;
}

interface Options {
  readonly inMixture?: number;
  readonly at?: number;
  readonly diameter?: number;
}

/** (2 r/3) √(8 R T/(π M)) with R of CODATA 2018 written out. */
const knudsen = (radius: number): number =>
  ((2 * radius) / 3) * Math.sqrt((8 * 8.314462618 * temperature) / (Math.PI * molarMass));
const inSeries = (one: number, other: number): number => (one * other) / (one + other);
const relative = (value: number, expected: number): number => Math.abs(value / expected - 1);

describe('Knudsen diffusivity', () => {
  it('is what follows from flights between walls that reflect by the cosine law', () => {
    const { diffusivityOverRadiusAndMeanSpeed } = readReference('knudsen-flights.json') as {
      diffusivityOverRadiusAndMeanSpeed: number;
    };
    const meanSpeed = Math.sqrt((8 * 8.314462618 * temperature) / (Math.PI * molarMass));
    const obtained = knudsenCoefficient(micro, molarMass) * Math.sqrt(temperature);
    expect(relative(obtained, diffusivityOverRadiusAndMeanSpeed * micro * meanSpeed)).toBeLessThan(1e-9);
  });
});

describe('pores in parallel', () => {
  it('of one size follow Bosanquet times porosity over tortuosity', () => {
    expect(relative(effective(base), (0.45 / 3) * inSeries(knudsen(8e-9), molecular))).toBeLessThan(1e-14);
  });

  it('come to molecular diffusion where they are wide and to Knudsen diffusion where they are narrow', () => {
    const width = (radius: number): PoreStructure => ({ ...base, pores: [{ radius, fraction: 1 }] });
    expect(relative(effective(width(1)), 0.15 * molecular)).toBeLessThan(1e-6);
    expect(relative(effective(width(1e-13)), 0.15 * knudsen(1e-13))).toBeLessThan(1e-5);
  });

  it('without molecular resistance are Knudsen diffusion alone', () => {
    expect(relative(effective(base, { inMixture: Infinity }), 0.15 * knudsen(8e-9))).toBeLessThan(1e-14);
  });

  it('of several sizes count by their share, in any order and however finely divided', () => {
    const expected =
      0.15 * (0.3 * inSeries(knudsen(macro), molecular) + 0.7 * inSeries(knudsen(micro), molecular));
    expect(relative(effective(bimodal(0.3)), expected)).toBeLessThan(1e-14);
    const divided = bimodal(0.3, {
      pores: [
        { radius: macro, fraction: 0.1 },
        { radius: micro, fraction: 0.7 },
        { radius: macro, fraction: 0.2 },
      ],
    });
    expect(relative(effective(divided), expected)).toBeLessThan(1e-14);
  });

  it('let more through the wider, hotter or less resisted they are', () => {
    const positive = (low: number, high: number): fc.Arbitrary<number> =>
      fc.double({ min: Math.log(low), max: Math.log(high), noNaN: true }).map(Math.exp);
    fc.assert(
      fc.property(
        positive(1e-9, 1e-5),
        positive(1e-7, 1e-3),
        positive(200, 1500),
        positive(1.01, 3),
        (radius, inMixture, at, factor) => {
          const sized = (size: number): PoreStructure => ({
            ...base,
            pores: [{ radius: size, fraction: 1 }],
          });
          const value = effective(sized(radius), { inMixture, at });
          expect(effective(sized(radius * factor), { inMixture, at })).toBeGreaterThan(value);
          expect(effective(sized(radius), { inMixture: inMixture * factor, at })).toBeGreaterThan(value);
          expect(effective(sized(radius), { inMixture, at: at * factor })).toBeGreaterThan(value);
        },
      ),
    );
  });

  it('treat every species with its own molar mass and diffusivity', () => {
    const target = new Float64Array(2);
    const { effectiveInto } = createPoreDiffusion(bimodal(0.3), [2e-3, molarMass], [undefined, undefined]);
    effectiveInto(Float64Array.of(1e-4, molecular), temperature, target);
    expect(target[1]).toBe(effective(bimodal(0.3)));
    expect(target[0]).toBeGreaterThan(target[1]!);
    effectiveInto(Float64Array.of(Infinity, Infinity), temperature, target);
    expect(relative(target[0]! / target[1]!, Math.sqrt(molarMass / 2e-3))).toBeLessThan(1e-14);
  });
});

describe('pores that cross at random', () => {
  const random = { model: 'random', tortuosity: 1 } as const;

  it('are those of compressed powder: macropores, particles, and both in turn', () => {
    // The three paths of Wakao & Smith (1962) with a particle of porosity ε_μ/(1-ε_M) and diffusivity (that)² D_μ, the path through both
    // with 2/(1/D_M + 1/D_particle); the printed formula is its limit for D_M far above D_μ.
    const [porosity, share] = [0.6, 0.4];
    const macroPorosity = porosity * share;
    const particlePorosity = (porosity * (1 - share)) / (1 - macroPorosity);
    const [inMacro, inMicro] = [1e-4, knudsen(1e-14)];
    const inParticle = particlePorosity ** 2 * inMicro;
    const threePaths =
      macroPorosity ** 2 * inMacro +
      (1 - macroPorosity) ** 2 * inParticle +
      2 * macroPorosity * (1 - macroPorosity) * 2 * inSeries(inMacro, inParticle);
    const pores = (macroRadius: number): PoreStructure['pores'] => [
      { radius: macroRadius, fraction: share },
      { radius: 1e-14, fraction: 1 - share },
    ];
    const obtained = effective({ ...base, ...random, porosity, pores: pores(1) }, { inMixture: inMacro });
    // The macropores' own part is exact and dwarfs the rest, so the rest is compared.
    const macroPart = macroPorosity ** 2 * inSeries(knudsen(1), inMacro);
    expect(relative(obtained - macroPart, threePaths - macroPorosity ** 2 * inMacro)).toBeLessThan(1e-4);
  });

  it('are too open where macropores resist like micropores, by no more than is said', () => {
    // Against the same three paths; both kinds molecular, of one diffusivity, ε_M = ε_μ = 0.4.
    const inParticle = (0.4 / 0.6) ** 2;
    const threePaths = 0.16 + 0.36 * inParticle + 2 * 0.4 * 0.6 * 2 * inSeries(1, inParticle);
    const pores = [
      { radius: 2, fraction: 0.5 },
      { radius: 1, fraction: 0.5 },
    ];
    const excess = effective({ ...base, ...random, porosity: 0.8, pores }) / molecular / threePaths - 1;
    expect(excess).toBeGreaterThan(0.2);
    expect(excess).toBeLessThan(0.22);
  });

  it('of one size in both parts come to the closed form, in either order', () => {
    const [large, small] = [0.45 * 0.4, 0.45 * 0.6];
    const expected =
      (large ** 2 + (small ** 2 * (1 + 3 * large)) / (1 - large)) * inSeries(knudsen(micro), molecular);
    const pores = [
      { radius: micro * (1 + 1e-13), fraction: 0.4 },
      { radius: micro, fraction: 0.6 },
    ];
    expect(relative(effective({ ...base, ...random, pores }), expected)).toBeLessThan(1e-12);
    expect(relative(effective({ ...base, ...random, pores: pores.toReversed() }), expected)).toBeLessThan(
      1e-12,
    );
  });

  it('come to the square of the porosity where one kind is next to nothing', () => {
    const little = 1e-9;
    const macroOnly = effective(bimodal(1 - little, random));
    expect(relative(macroOnly, 0.45 ** 2 * inSeries(knudsen(macro), molecular))).toBeLessThan(1e-8);
    const microOnly = effective(bimodal(little, random));
    expect(relative(microOnly, 0.45 ** 2 * inSeries(knudsen(micro), molecular))).toBeLessThan(1e-8);
  });

  it('have no tortuosity', () => {
    expect(effective(bimodal(0.3, { ...random, tortuosity: 5 }))).toBe(effective(bimodal(0.3, random)));
  });
});

describe('hindrance', () => {
  const hindered = { ...base, hindrance: 'renkin' } as const;

  it('takes its share of the whole diffusivity, pore by pore', () => {
    // λ = 0.1: (0.9)² (1 - 0.2104 + 0.00209 - 0.0000095), by hand.
    const free = effective(base);
    expect(relative(effective(hindered, { diameter: 1.6e-9 }) / free, 0.81 * 0.7916805)).toBeLessThan(1e-12);
    const both = effective(bimodal(0.5, { hindrance: 'renkin' }), { diameter: 2 * micro });
    // λ = 1 in the one kind and 0.008 in the other: (0.992)² (1 - 0.016832 + 0.00000107).
    const inMacropores = 0.984064 * 0.98316907;
    expect(relative(both, 0.075 * inMacropores * inSeries(knudsen(macro), molecular))).toBeLessThan(1e-7);
  });

  it('vanishes for molecules small against the pores and is total for those as wide as the pores', () => {
    expect(relative(effective(hindered, { diameter: 1e-15 }), effective(base))).toBeLessThan(1e-6);
    expect(effective(hindered, { diameter: 1.6e-8 })).toBe(0);
    expect(effective(hindered, { diameter: 3e-8 })).toBe(0);
  });

  it('asks for the diameter of every molecule', () => {
    expect(() => createPoreDiffusion(hindered, [molarMass, molarMass], [3e-10, undefined])).toThrow(
      RangeError,
    );
    expect(() => createPoreDiffusion(base, [molarMass], [undefined])).not.toThrow();
  });
});
