import type { SpeciesRecord } from '../species-record.js';
import type { MissingFields } from './pure-gas-property.js';

/** What the record lacks for a diffusivity in a gas. */
export function missingForDiffusivity(record: SpeciesRecord): MissingFields {
  return record.diffusionVolume === undefined ? ['diffusionVolume'] : [];
}

/**
 * Coefficients K_ij of binary gas diffusivities, D_ij = K_ij T^1.75/P in m²/s with T in K and P in Pa; row-major, symmetric, the
 * diagonal for self-diffusion.
 *
 *   D = 1.43e-7 T^1.75 / (p M_AB^½ (v_A^⅓ + v_B^⅓)²),  p in bar, M_AB = 2/(1/M_A + 1/M_B) in g/mol
 *
 * @throws RangeError where {@link missingForDiffusivity} names anything
 * @source Fuller, Schettler & Giddings (1966), Ind. Eng. Chem. 58(5), 18; diffusion volumes Fuller, Ensley & Giddings (1969), J. Phys. Chem. 73, 3679
 * @range low to moderate pressure; average error about 4 %
 */
export function binaryDiffusivityCoefficients(records: readonly SpeciesRecord[]): Float64Array {
  const roots = records.map((record) => {
    if (record.diffusionVolume === undefined) throw new RangeError(`${record.id} has no diffusion volume`);
    return Math.cbrt(record.diffusionVolume);
  });
  return Float64Array.from(
    records.flatMap((one, i) =>
      records.map((other, j) => {
        const pairMass = 2e3 / (1 / one.molarMass + 1 / other.molarMass);
        return 1.43e-2 / (Math.sqrt(pairMass) * (roots[i]! + roots[j]!) ** 2);
      }),
    ),
  );
}
