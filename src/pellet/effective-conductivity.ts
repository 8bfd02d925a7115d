/** Thermal conductivity of a porous pellet from those of its solid and of the gas in its pores. */

/**
 * Geometric mean of the phases by volume, W/(m K). Between Maxwell's bounds where the solid conducts ten times better than the gas or more;
 * below the lower one, by 2 % at most at porosities of 0.3 to 0.7, where it conducts less than that.
 *
 * @param porosity - between 0 and 1
 * @param solid - conductivity of the solid, W/(m K), > 0
 * @param gas - conductivity of the gas, W/(m K), > 0
 * @source Woodside & Messmer (1961), J. Appl. Phys. 32, 1688
 * @range consolidated porous solids, solid over gas up to about 100; scatter of 30 % and more
 */
export function geometricMeanConductivity(porosity: number, solid: number, gas: number): number {
  return solid ** (1 - porosity) * gas ** porosity;
}

/**
 * The band in which the conductivity of any isotropic two-phase solid lies, W/(m K): `lower` has the solid dispersed in the gas, `upper`
 * the gas in the solid.
 *
 * @source Maxwell (1873); that these are bounds: Hashin & Shtrikman (1962), J. Appl. Phys. 33, 3125
 */
export function conductivityBounds(
  porosity: number,
  solid: number,
  gas: number,
): { readonly lower: number; readonly upper: number } {
  const dispersed = (matrix: number, inclusion: number, share: number): number =>
    (matrix * (2 * matrix + inclusion - 2 * share * (matrix - inclusion))) /
    (2 * matrix + inclusion + share * (matrix - inclusion));
  const solidInGas = dispersed(gas, solid, 1 - porosity);
  const gasInSolid = dispersed(solid, gas, porosity);
  return { lower: Math.min(solidInGas, gasInSolid), upper: Math.max(solidInGas, gasInSolid) };
}

/**
 * Conductivity of a compressed oxide carrier without its large pores, W/(m K): what the geometric mean needs so that pellets of porosity
 * 0.4 to 0.6 come out at the 0.1 to 0.6 W/(m K) usually measured in gases other than hydrogen and helium, in which they come out higher. A
 * guess, good to a factor of about three.
 */
export const typicalSolidConductivity = {
  value: 1.5,
  source: 'common practice; pellets measured by Satterfield (1970), Mass Transfer in Heterogeneous Catalysis',
} as const;
