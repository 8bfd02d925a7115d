/**
 * Diffusion where pore and molecule are of one size: gas molecules that jump from cage to cage over a barrier,
 *
 *   D = (1/z) a √(8 R T/(π M)) exp(-E/(R T)).
 *
 * Neither Knudsen's formula nor any other gives the barrier from pore and molecule alone, and a barrier off by R T changes the result by e: the
 * numbers must be given, and the result is an order of magnitude at best. Nothing is put in their place.
 */
import { gasConstant } from '../../quantities/constants.js';

export interface ConfigurationalJump {
  /** Between neighbouring sites, m, > 0. */
  readonly length: number;
  /** Neighbouring sites of a site, 1 or more; 4 in zeolites of crossing channels. */
  readonly coordination: number;
  /** Barrier between sites, J/mol, 0 or more. */
  readonly activationEnergy: number;
}

/** A diffusivity of which only the order of magnitude means anything. */
export interface ConfigurationalDiffusivity {
  /** m²/s */
  readonly value: number;
  readonly isOrderOfMagnitude: true;
  /** Whether the value lies among those measured in zeolites. */
  readonly isInObservedBand: boolean;
}

/** Diffusivities measured where pore and molecule are of one size, m²/s. @source Weisz (1973), CHEMTECH 3, 498 (from memory) */
export const observedBand = { lower: 1e-14, upper: 1e-8 } as const;

/**
 * @param molarMass - kg/mol, > 0
 * @param temperature - K, > 0
 * @source Xiao & Wei (1992), Chem. Eng. Sci. 47, 1123 (from memory)
 * @range molecule over pore diameter from about one half to one
 */
export function configurationalDiffusivity(
  { length, coordination, activationEnergy }: ConfigurationalJump,
  molarMass: number,
  temperature: number,
): ConfigurationalDiffusivity {
  const speed = Math.sqrt((8 * gasConstant * temperature) / (Math.PI * molarMass));
  const value = ((length * speed) / coordination) * Math.exp(-activationEnergy / (gasConstant * temperature));
  return {
    value,
    isOrderOfMagnitude: true,
    isInObservedBand: value >= observedBand.lower && value <= observedBand.upper,
  };
}

/** For a list of a run's assumptions. */
export const configurationalMethod = {
  statement:
    'diffusion in pores of the size of the molecules: jumps over a given barrier; the order of magnitude at best',
  source: 'Xiao & Wei (1992), Chem. Eng. Sci. 47, 1123; Weisz (1973), CHEMTECH 3, 498',
} as const;
