/**
 * What controls diffusion of each species in each size of pore: numbers for a report, nothing is computed with them.
 *
 * Mean free path λ and diffusivities are tied by the same elementary kinetic theory, D_m = λ v̄/3 and D_K = d v̄/3 with the mean speed v̄ and
 * the pore diameter d, so that the Knudsen number λ/d is D_m/D_K: the very ratio by which Bosanquet's formula weighs the two. The mean free
 * path of hard spheres, kT/(√2 π σ² P), differs from it by a factor of up to about two.
 */
import { knudsenCoefficient } from './knudsen.js';
import type { PoreStructure } from './pore-structure.js';

export type PoreMechanism = 'molecular' | 'transition' | 'knudsen' | 'configurational';

/** One species in pores of one size. */
export interface PoreRegime {
  readonly speciesIndex: number;
  /** Of the pores, m. */
  readonly radius: number;
  /** m²/s, without hindrance */
  readonly knudsenDiffusivity: number;
  /** Distance between collisions that goes with the molecular diffusivity, m. */
  readonly meanFreePath: number;
  /** Mean free path over pore diameter, molecular over Knudsen diffusivity. */
  readonly knudsenNumber: number;
  /** Molecule diameter over pore diameter; null where the molecule's is not known. From 1 on the molecule does not enter. */
  readonly sizeRatio: number | null;
  readonly mechanism: PoreMechanism;
}

/** Knudsen numbers between which both kinds of collision count: each end leaves the lesser one a tenth. Common practice. */
const transitionRange = [0.1, 10] as const;

/**
 * Molecule over pore diameter from which the pore's walls hold the molecule all the time: 0.45 nm in a pore of 0.9 nm, the upper end of
 * zeolites. Common practice puts the bound at pore diameters of about 1 nm.
 */
export const configurationalRatio = 0.5;

/**
 * @param molarMasses - kg/mol, one per species
 * @param diameters - of the molecules, m, one per species; undefined where not known
 * @param molecular - diffusivities in the mixture, m²/s, one per species
 * @param temperature - K, > 0
 * @returns one entry for each class of pores and species, classes outermost
 * @source Weisz (1973), CHEMTECH 3, 498 for the configurational regime; bounds of the others are common practice
 */
export function poreRegimes(
  { pores }: Pick<PoreStructure, 'pores'>,
  molarMasses: readonly number[],
  diameters: readonly (number | undefined)[],
  molecular: Float64Array,
  temperature: number,
): PoreRegime[] {
  return pores.flatMap(({ radius }) =>
    molarMasses.map((molarMass, speciesIndex) => {
      const knudsenDiffusivity = knudsenCoefficient(radius, molarMass) * Math.sqrt(temperature);
      const knudsenNumber = molecular[speciesIndex]! / knudsenDiffusivity;
      const diameter = diameters[speciesIndex];
      const sizeRatio = diameter === undefined ? null : diameter / (2 * radius);
      return {
        speciesIndex,
        radius,
        knudsenDiffusivity,
        meanFreePath: 2 * radius * knudsenNumber,
        knudsenNumber,
        sizeRatio,
        mechanism: mechanism(knudsenNumber, sizeRatio),
      };
    }),
  );
}

function mechanism(knudsenNumber: number, sizeRatio: number | null): PoreMechanism {
  if (sizeRatio !== null && sizeRatio >= configurationalRatio) return 'configurational';
  if (knudsenNumber < transitionRange[0]) return 'molecular';
  return knudsenNumber > transitionRange[1] ? 'knudsen' : 'transition';
}

/**
 * Species too large for every pore, whose effective diffusivity with hindrance is therefore zero; known before anything is solved.
 *
 * @param diameters - of the molecules, m, one per species; one that is not known is taken to enter
 * @returns indices of species, ascending
 */
export function speciesShutOut(
  { pores }: Pick<PoreStructure, 'pores'>,
  diameters: readonly (number | undefined)[],
): number[] {
  const widest = 2 * Math.max(...pores.map(({ radius }) => radius));
  return diameters.flatMap((diameter, i) => (diameter !== undefined && diameter >= widest ? [i] : []));
}
