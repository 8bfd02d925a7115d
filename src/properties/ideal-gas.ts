import { gasConstant } from '../quantities/constants.js';

/**
 * Mean molar mass of a mixture, kg/mol.
 *
 * @param moleFractions - one per species, sum 1; or amounts of any unit, which are then divided by their sum
 * @param molarMasses - kg/mol, one per species
 * @returns NaN when there is nothing
 */
export function meanMolarMass(moleFractions: ArrayLike<number>, molarMasses: ArrayLike<number>): number {
  let amount = 0;
  let mass = 0;
  for (let i = 0; i < moleFractions.length; i++) {
    amount += moleFractions[i]!;
    mass += moleFractions[i]! * molarMasses[i]!;
  }
  return mass / amount;
}

/**
 * Amount per volume of an ideal gas, mol/m³.
 *
 * @param temperature - K, > 0
 * @param pressure - Pa, absolute
 */
export function idealGasConcentration(temperature: number, pressure: number): number {
  return pressure / (gasConstant * temperature);
}

/**
 * Density of an ideal gas, kg/m³.
 *
 * @param temperature - K, > 0
 * @param pressure - Pa, absolute
 * @param molarMass - kg/mol, of the mixture
 */
export function idealGasDensity(temperature: number, pressure: number, molarMass: number): number {
  return molarMass * idealGasConcentration(temperature, pressure);
}
