/**
 * Diffusivity of a dilute solute in a liquid, m²/s:  D = 7.4e-8 (φ M_B)^½ T/(η V_A^0.6) in cm²/s with η in cP, V in cm³/mol.
 *
 * @param temperature - K
 * @param solventMolarMass - kg/mol
 * @param solventViscosity - Pa s
 * @param soluteVolume - molar volume of the solute at its boiling point, m³/mol
 * @param association - φ of the solvent: 2.6 water, 1.9 methanol, 1.5 ethanol, 1 where it does not associate
 * @source Wilke & Chang (1955), AIChE J. 1, 264
 * @range dilute solutions in thin liquids; 10 % on average, large molecules in viscous solvents worse
 */
export function wilkeChangDiffusivity(
  temperature: number,
  solventMolarMass: number,
  solventViscosity: number,
  soluteVolume: number,
  association: number,
): number {
  const numerator = 7.4e-12 * Math.sqrt(association * solventMolarMass * 1e3) * temperature;
  return numerator / (solventViscosity * 1e3 * (soluteVolume * 1e6) ** 0.6);
}

/**
 * Molar volume at the normal boiling point, m³/mol:  V = 0.285 Vc^1.048 in cm³/mol.
 *
 * @param criticalVolume - m³/mol
 * @source Tyn & Calus (1975), Processing 21(4), 16
 * @range 3 % on average; not for hydrogen, water and other small molecules
 */
export function boilingPointVolume(criticalVolume: number): number {
  return 0.285e-6 * (criticalVolume * 1e6) ** 1.048;
}
