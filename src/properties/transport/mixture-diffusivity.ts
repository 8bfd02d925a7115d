/**
 * Diffusivity of one species in a mixture from those of its pairs. All three rules take D_ij as `coefficients · scale`, so that temperature
 * and pressure enter once.
 *
 * @returns false where a value is not positive, which only ratios of fluxes can bring about
 */
export type MixingRule = (
  moleFractions: Float64Array,
  coefficients: Float64Array,
  scale: number,
  target: Float64Array,
) => boolean;

/** A mole fraction this close to one: what the rest is made of no longer shows. */
const nearlyPure = 1e-9;

/**
 * D_i = (1 - y_i)/Σ_{j≠i} y_j/D_ij: each species through the others, which stand still. In the pure species the limit for equal traces of all
 * others is taken.
 *
 * @source Wilke (1950), Chem. Eng. Prog. 46, 95
 */
export const wilkeRule: MixingRule = (moleFractions, coefficients, scale, target) => {
  const count = moleFractions.length;
  for (let i = 0; i < count; i++) {
    let sum = 0;
    let others = 0;
    for (let j = 0; j < count; j++) {
      if (j === i) continue;
      const y = Math.max(moleFractions[j]!, 0);
      others += y;
      sum += y / coefficients[i * count + j]!;
    }
    target[i] = others > nearlyPure ? (scale * others) / sum : scale * harmonicMean(coefficients, i, count);
  }
  return true;
};

/**
 * 1/D_i = Σ_j y_j/D_ij, the species itself with its self-diffusivity: a tagged trace in the whole mixture.
 *
 * @source Blanc (1908), J. Phys. Theor. Appl. 7, 825
 */
export const blancRule: MixingRule = (moleFractions, coefficients, scale, target) => {
  const count = moleFractions.length;
  for (let i = 0; i < count; i++) {
    let sum = 0;
    for (let j = 0; j < count; j++) {
      const y = Math.max(moleFractions[j]!, 0);
      sum += y / coefficients[i * count + j]!;
    }
    target[i] = scale / sum;
  }
  return true;
};

/**
 * 1/D_i = Σ_{j≠i} (y_j - y_i ν_j/ν_i)/D_ij: fluxes in the ratio of one reaction's coefficients, driven by the gradient of concentration at
 * constant pressure; drift is inside. Species that do not react keep Wilke's value.
 *
 * @param stoichiometry - of the one reaction, one per species
 * @source Maxwell–Stefan equations with N_j/N_i = ν_j/ν_i; Jackson (1977), Transport in Porous Catalysts, ch. 2 and 11
 */
export function fluxRatioRule(stoichiometry: readonly number[]): MixingRule {
  return (moleFractions, coefficients, scale, target) => {
    wilkeRule(moleFractions, coefficients, scale, target);
    const count = moleFractions.length;
    let isSound = true;
    for (let i = 0; i < count; i++) {
      const own = stoichiometry[i]!;
      if (own === 0) continue;
      let sum = 0;
      for (let j = 0; j < count; j++) {
        if (j === i) continue;
        sum +=
          (moleFractions[j]! - (moleFractions[i]! * stoichiometry[j]!) / own) / coefficients[i * count + j]!;
      }
      if (sum > 0) target[i] = scale / sum;
      else isSound = false;
    }
    return isSound;
  };
}

function harmonicMean(coefficients: Float64Array, i: number, count: number): number {
  let sum = 0;
  for (let j = 0; j < count; j++) if (j !== i) sum += 1 / coefficients[i * count + j]!;
  return count > 1 ? (count - 1) / sum : coefficients[i * count + i]!;
}
