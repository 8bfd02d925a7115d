import { knudsenCoefficient } from '../../src/pellet/pores/knudsen.js';
import { createPoreDiffusion } from '../../src/pellet/pores/pore-diffusion.js';
import { poreRegimes } from '../../src/pellet/pores/pore-regimes.js';
import type { PoreStructure } from '../../src/pellet/pores/pore-structure.js';
import type { PublishedRow } from './published-row.js';

const squareCentimetre = 1e-4;
const angstrom = 1e-10;

interface Diffusing {
  /** g/mol, as printed */
  readonly molarMass: number;
  /** K */
  readonly temperature: number;
  /** cm²/s; infinite where only Knudsen diffusion is asked for */
  readonly molecular: number;
  /** m */
  readonly diameter?: number;
}

/** cm²/s */
function effective(
  structure: Partial<PoreStructure> & Pick<PoreStructure, 'pores'>,
  { molarMass, temperature, molecular, diameter }: Diffusing,
): number {
  const target = new Float64Array(1);
  const plain = { porosity: 1, tortuosity: 1, model: 'parallel', hindrance: 'none' } as const;
  createPoreDiffusion({ ...plain, ...structure }, [molarMass / 1e3], [diameter]).effectiveInto(
    Float64Array.of(molecular * squareCentimetre),
    temperature,
    target,
  );
  return target[0]! / squareCentimetre;
}

const single = (radius: number): PoreStructure['pores'] => [{ radius, fraction: 1 }];

// Harriott 4.1: pore volume 0.29 cm³/g, surface 235 m²/g, pellet 1.41 g/cm³; mean radius 2 V/S.
const chlorineCatalyst = { porosity: 0.29 * 1.41, pores: single((2 * 0.29e-6) / 235) };
const helium: Diffusing = { molarMass: 4, temperature: 293, molecular: 0.73 * (293 / 298) ** 1.7 };
const chlorine = (temperature: number, molecular: number): Diffusing => ({
  molarMass: 70.09,
  temperature,
  molecular,
});
const measuredHelium = 0.0065;
const harriottTortuosity = (): number => effective(chlorineCatalyst, helium) / measuredHelium;

// Harriott 4.2
const bimodal = {
  porosity: 1.2 * (0.3 + 0.15),
  tortuosity: 2.5,
  pores: [
    { radius: 4e-9, fraction: 0.3 / 0.45 },
    { radius: 2e-7, fraction: 0.15 / 0.45 },
  ],
};
const bimodalSpecies: Diffusing = { molarMass: 32, temperature: 493, molecular: 0.49 };

// Benitez 1.20: hydrogen in ethane, 10 atm.
const wide = { porosity: 0.4, tortuosity: 2.5, pores: single(2e-7) };
const wideSpecies: Diffusing = { molarMass: 2.016, temperature: 373, molecular: 0.086 };

const harriott = (example: string): string => `Harriott, Chemical Reactor Design (2003), ${example}`;
const benitez = (example: string): string =>
  `Benitez, Principles and Modern Applications of Mass Transfer Operations, ${example}`;

export const poreDiffusionRows: readonly PublishedRow[] = [
  {
    id: 'knudsen-geankoplis hydrogen in a pore of 60 Å',
    source: 'Geankoplis, Transport Processes and Unit Operations, 3rd ed., example 7.6-1, p. 463',
    status: 'checked',
    inputs: 'r = 60 Å, T = 373 K, M = 2.016 g/mol',
    expected: 7.92e-6,
    unit: 'm²/s',
    tolerance: { relative: 0.003, reason: 'three digits printed; its factor 97.0 is rounded' },
    obtain: () => knudsenCoefficient(60 * angstrom, 2.016e-3) * Math.sqrt(373),
  },
  {
    id: 'deff-harriott-4-1 chlorine from helium, Knudsen alone',
    source: harriott('example 4.1 (a), p. 135'),
    status: 'checked',
    inputs: 'De(He) = 0.0065 cm²/s at 293 K; M = 4 and, as printed, 70.09; 573 K',
    expected: 0.00217,
    unit: 'cm²/s',
    tolerance: { relative: 0.005, reason: 'three digits printed' },
    obtain: () =>
      (measuredHelium * effective(chlorineCatalyst, chlorine(573, Infinity))) /
      effective(chlorineCatalyst, { ...helium, molecular: Infinity }),
  },
  {
    id: 'deff-harriott-4-1 tortuosity',
    source: harriott('example 4.1 (b), p. 135'),
    status: 'checked',
    inputs:
      'S = 235 m²/g, V = 0.29 cm³/g, 1.41 g/cm³; De(He) = 0.0065 cm²/s at 293 K; D(He, N2) = 0.73 cm²/s at 298 K, exponent 1.7',
    expected: 1.25,
    unit: '1',
    tolerance: { relative: 0.005, reason: 'three digits printed' },
    obtain: harriottTortuosity,
  },
  {
    id: 'deff-harriott-4-1 chlorine at 573 K and 15 atm',
    source: harriott('example 4.1 (c), p. 135'),
    status: 'checked',
    inputs: 'as (b); D(Cl2, CH4) = 0.15 cm²/s at 293 K and 1 atm, exponent 1.7',
    expected: 0.00183,
    unit: 'cm²/s',
    tolerance: { relative: 0.01, reason: 'three digits printed, from rounded intermediate values' },
    obtain: () =>
      effective(chlorineCatalyst, chlorine(573, (0.15 * (573 / 293) ** 1.7) / 15)) / harriottTortuosity(),
  },
  {
    id: 'deff-harriott-4-2 micropores and macropores in parallel',
    source: harriott('example 4.2, p. 140'),
    status: 'checked',
    inputs:
      'V = 0.3 and 0.15 cm³/g at r = 40 and 2000 Å, 1.2 g/cm³, τ = 2.5, D = 0.49 cm²/s, M = 32 g/mol, 493 K',
    expected: 0.0236,
    unit: 'cm²/s',
    tolerance: { relative: 0.005, reason: 'three digits printed' },
    obtain: () => effective(bimodal, bimodalSpecies),
  },
  {
    id: 'deff-harriott-4-2 diffusivity in pores of the mean radius',
    source: harriott('example 4.2, p. 140'),
    status: 'checked',
    inputs: 'r = 60 Å, D = 0.49 cm²/s, M = 32 g/mol, 493 K',
    expected: 0.0218,
    unit: 'cm²/s',
    tolerance: { relative: 0.005, reason: 'three digits printed' },
    obtain: () => effective({ pores: single(60 * angstrom) }, bimodalSpecies),
  },
  {
    id: 'deff-harriott-4-2 tortuosity below one with the mean radius',
    source: harriott('example 4.2, p. 140'),
    status: 'checked',
    inputs: 'as the two above',
    expected: 0.5,
    unit: '1',
    tolerance: { relative: 0.01, reason: 'one digit printed; 0.4996 recomputed' },
    obtain: () =>
      (bimodal.porosity * effective({ pores: single(60 * angstrom) }, bimodalSpecies)) /
      effective(bimodal, bimodalSpecies),
  },
  {
    id: 'knudsen-number-benitez-1-20 wide pores',
    source: benitez('example 1.20, p. 58'),
    status: 'recomputed',
    inputs: 'hydrogen in ethane, 373 K, 10 atm, d = 0.4 µm, ε = 0.4, τ = 2.5, D = 0.86 cm²/s at 1 atm',
    expected: 0.01376,
    unit: 'cm²/s',
    tolerance: {
      relative: 0.035,
      reason: 'the example leaves out Knudsen diffusion at a Knudsen number of 0.02 to 0.03',
    },
    obtain: () => effective(wide, wideSpecies),
  },
  {
    id: 'knudsen-number-benitez-1-20 wide pores, Knudsen diffusion taken out again',
    source: benitez('example 1.20, p. 58'),
    status: 'recomputed',
    inputs: 'as above, times one plus the Knudsen number',
    expected: 0.01376,
    unit: 'cm²/s',
    tolerance: { relative: 1e-3, reason: 'four digits recomputed' },
    obtain: () => {
      const { molarMass, temperature, molecular } = wideSpecies;
      const diffusivities = Float64Array.of(molecular * squareCentimetre);
      const [regime] = poreRegimes(wide, [molarMass / 1e3], [undefined], diffusivities, temperature);
      return effective(wide, wideSpecies) * (1 + regime!.knudsenNumber);
    },
  },
  {
    id: 'hindered-benitez-1-23 β-dextrin in narrow pores',
    source: benitez('example 1.23, p. 62'),
    status: 'checked',
    inputs: 'pore 88.8 Å, molecule 17.96 Å, ε = 0.0233, τ = 1.1, D = 3.22e-6 cm²/s; printed with (1 - λ)⁴',
    expected: 2.76e-8,
    unit: 'cm²/s',
    tolerance: { relative: 0.08, reason: 'its (1 - λ)⁴ is 7 % above Renkin’s product at λ = 0.2' },
    obtain: () => betaDextrin(),
  },
  {
    id: 'hindered-benitez-1-23 with Renkin’s product',
    source: benitez('example 1.23, p. 62, with Renkin (1954) in place of (1 - λ)⁴'),
    status: 'recomputed',
    inputs: 'as above',
    expected: 2.5668e-8,
    unit: 'cm²/s',
    tolerance: {
      relative: 3e-4,
      reason: 'recomputed with 2.1044 for the first constant of the drag, which Renkin prints as 2.104',
    },
    obtain: () => betaDextrin(),
  },
];

/** In a liquid nothing flies from wall to wall; so light a molecule that Knudsen diffusion offers no resistance stands for that. */
function betaDextrin(): number {
  return effective(
    { porosity: 0.0233, tortuosity: 1.1, pores: single(44.4 * angstrom), hindrance: 'renkin' },
    { molarMass: 1e-9, temperature: 298, molecular: 3.22e-6, diameter: 17.96 * angstrom },
  );
}
