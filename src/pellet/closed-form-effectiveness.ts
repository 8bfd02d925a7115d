/** Effectiveness of a first-order reaction and its derivative with respect to the modulus. */
export interface EffectivenessValue {
  readonly effectiveness: number;
  readonly slope: number;
}

/**
 * First-order, isothermal effectiveness η = I_{v+1}(x) / (Φ I_v(x)), v = (σ-1)/2, x = (σ+1)Φ: tanh(Φ)/Φ for the slab,
 * I_1(2Φ)/(Φ I_0(2Φ)) for the long cylinder, (coth(3Φ) - 1/(3Φ))/Φ for the sphere, and in between for other exponents.
 *
 * @param modulus - Φ = (V/S) √(k/De), ≥ 0
 * @param shapeExponent - σ > -1: 0 slab, 1 long cylinder, 2 sphere
 * @source Thiele (1939), Ind. Eng. Chem. 31, 916; Aris (1957), Chem. Eng. Sci. 6, 262; for general σ Datta & Leung (1985), Chem. Eng. Commun. 39, 155
 */
export function firstOrderEffectiveness(modulus: number, shapeExponent: number): EffectivenessValue {
  const order = (shapeExponent - 1) / 2;
  if (modulus < 1e-4) {
    // Series: η = 1 - γ Φ² + O(Φ⁴) with γ = (σ+1)/(σ+3); the next term is below 1e-16 here.
    const gamma = (shapeExponent + 1) / (shapeExponent + 3);
    return { effectiveness: 1 - gamma * modulus * modulus, slope: -2 * gamma * modulus };
  }
  const x = (shapeExponent + 1) * modulus;
  const ratio = besselRatio(order, x);
  const effectiveness = ratio / modulus;
  // d(ratio)/dx = 1 - ratio² - (2v+1) ratio / x
  const ratioSlope = 1 - ratio * ratio - ((2 * order + 1) * ratio) / x;
  return {
    effectiveness,
    slope: ((shapeExponent + 1) * ratioSlope - effectiveness) / modulus,
  };
}

/** Beyond this argument the large-argument expansion is exact to rounding and the fraction would need too many terms. */
const largeArgument = 300;

/**
 * I_{v+1}(x)/I_v(x) for x > 0, v > -1, by Gauss's continued fraction (backward, more terms than x needs) or, for large x, by the
 * asymptotic expansions of both functions.
 *
 * @source DLMF 10.33.1 (continued fraction), 10.40.1 (expansion)
 */
function besselRatio(order: number, x: number): number {
  if (x > largeArgument) return largeArgumentSeries(order + 1, x) / largeArgumentSeries(order, x);
  const terms = Math.ceil(x) + 40;
  let ratio = 0;
  for (let k = terms; k >= 1; k--) ratio = x / (2 * (order + k) + x * ratio);
  return ratio;
}

/** √(2πx) e^(-x) I_v(x) for large x. */
function largeArgumentSeries(order: number, x: number): number {
  let term = 1;
  let sum = 1;
  for (let k = 1; k <= 12; k++) {
    term *= -(4 * order * order - (2 * k - 1) ** 2) / (k * 8 * x);
    sum += term;
  }
  return sum;
}
