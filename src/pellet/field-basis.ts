import { findReactionBasis } from '../kinetics/independent-reactions.js';
import type { PelletModelInput } from './pellet-model.js';

/**
 * The pellet's unknowns. With constant diffusivities every concentration and the temperature follow from one field φ_k per
 * independent reaction, ∇²φ_k = -q_k with q_k = Σ_j combination[k][j] r_j and φ_k = 0 on the surface:
 *
 *   c_i = c_i,bulk + Σ_k ν_ik (φ_k / De_i + L <q_k> / kc_i)
 *   T   = T_bulk   + Σ_k (-ΔH_k) (φ_k / λ + L <q_k> / h)
 *
 * where <q_k> is the average over the pellet and L its volume over surface. The first term in brackets is diffusion, the second the film.
 *
 * @source the linear relation between concentrations and temperature is Prater's (1958), Chem. Eng. Sci. 8, 284, taken for several reactions
 */
export interface FieldBasis {
  readonly fieldCount: number;
  /** Row-major `fieldCount × reactionCount`: sources of the fields from the reaction rates. */
  readonly combination: Float64Array;
  /** Reactions whose heats are the heats of the fields. */
  readonly independent: readonly number[];
  /** Species that take part, ascending; the others keep their bulk concentration. */
  readonly activeSpecies: Int32Array;
  /** Row-major `fieldCount × speciesCount`: ν_ik / De_i. These four follow the pellet's transport: `refreshFieldBasis`. */
  readonly diffusionCoefficients: Float64Array;
  /** Row-major `fieldCount × speciesCount`: ν_ik L / kc_i. */
  readonly filmCoefficients: Float64Array;
  /** 1/λ and L/h, multiplied by -ΔH_k where used. */
  inverseConductivity: number;
  filmHeatResistance: number;
  readonly hasFilm: boolean;
}

export function createFieldBasis(input: PelletModelInput): FieldBasis {
  const { speciesCount, stoichiometry, referenceHeats, transport } = input;
  const { independent, combination } = findReactionBasis(stoichiometry, referenceHeats);
  const fieldCount = independent.length;
  const activeSpecies: number[] = [];
  for (let i = 0; i < speciesCount; i++) {
    if (stoichiometry.some((row) => row[i] !== 0)) activeSpecies.push(i);
  }
  const isIsothermal = referenceHeats === undefined;
  const basis: FieldBasis = {
    fieldCount,
    combination,
    independent,
    activeSpecies: Int32Array.from(activeSpecies),
    diffusionCoefficients: new Float64Array(fieldCount * speciesCount),
    filmCoefficients: new Float64Array(fieldCount * speciesCount),
    inverseConductivity: 0,
    filmHeatResistance: 0,
    hasFilm:
      input.pellet.transport.film.kind === 'correlation' ||
      activeSpecies.some((i) => transport.massTransfer[i]! < Infinity) ||
      (!isIsothermal && transport.heatTransfer < Infinity),
  };
  refreshFieldBasis(basis, input);
  return basis;
}

/** Works the coefficients out anew from the transport at the present position; whether there is a film is settled at the start. */
export function refreshFieldBasis(basis: FieldBasis, input: PelletModelInput): void {
  const { speciesCount, stoichiometry, referenceHeats, transport } = input;
  const { diffusionLength } = input.pellet.geometry;
  const { fieldCount, independent, activeSpecies, diffusionCoefficients, filmCoefficients } = basis;
  for (let k = 0; k < fieldCount; k++) {
    const row = stoichiometry[independent[k]!]!;
    for (let a = 0; a < activeSpecies.length; a++) {
      const i = activeSpecies[a]!;
      const coefficient = row[i]!;
      if (coefficient === 0) continue;
      diffusionCoefficients[k * speciesCount + i] = coefficient / transport.effectiveDiffusivities[i]!;
      filmCoefficients[k * speciesCount + i] = (coefficient * diffusionLength) / transport.massTransfer[i]!;
    }
  }
  if (referenceHeats === undefined) return;
  basis.inverseConductivity = 1 / transport.thermalConductivity;
  basis.filmHeatResistance = diffusionLength / transport.heatTransfer;
}
