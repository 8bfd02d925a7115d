import type { SpeciesRecord } from '../../properties/species-record.js';

/**
 * What the walls of a pore leave of a molecule's diffusion: the share of the cross-section its centre can reach times the drag of the walls.
 *
 * @param ratio - molecule diameter over pore diameter, 0 to 1; from 1 on nothing enters
 * @source Renkin (1954), J. Gen. Physiol. 38, 225
 * @range ratio below about 0.6, molecules in liquids; for gases an order of magnitude
 */
export function renkinFactor(ratio: number): number {
  if (ratio >= 1) return 0;
  const steric = (1 - ratio) ** 2;
  return steric * (1 - 2.104 * ratio + 2.09 * ratio ** 3 - 0.95 * ratio ** 5);
}

/** Its collision diameter where it has one, else from the critical volume; m, undefined where neither is known. */
export function moleculeDiameter({ lennardJones, criticalVolume }: SpeciesRecord): number | undefined {
  if (lennardJones) return lennardJones.collisionDiameter;
  return criticalVolume === undefined ? undefined : diameterFromCriticalVolume(criticalVolume);
}

/**
 * Diameter of a molecule from its critical volume, m: σ = 0.841 Vc^⅓ in Å with Vc in cm³/mol.
 *
 * @param criticalVolume - m³/mol
 * @source Bird, Stewart & Lightfoot, Transport Phenomena (2002), eq. 1.4-11
 */
export function diameterFromCriticalVolume(criticalVolume: number): number {
  return 0.841e-10 * Math.cbrt(criticalVolume * 1e6);
}
