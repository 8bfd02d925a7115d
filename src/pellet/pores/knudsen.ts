import { gasConstant } from '../../quantities/constants.js';

/**
 * Knudsen diffusivity in a long round pore over √T, m²/(s K^½): D_K = (2 r/3) √(8 R T/(π M)).
 *
 * @param radius - m
 * @param molarMass - kg/mol
 * @source Knudsen (1909), Ann. Phys. 333, 75; kinetic theory with diffuse reflection
 * @range pores small against the mean free path and large against the molecule
 */
export function knudsenCoefficient(radius: number, molarMass: number): number {
  return ((2 * radius) / 3) * Math.sqrt((8 * gasConstant) / (Math.PI * molarMass));
}
