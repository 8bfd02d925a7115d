/** The numbers that make a cubic equation of state of two parameters, and its compressibility factors. */

export type CubicKind = 'peng_robinson' | 'soave_redlich_kwong';

/** p = R T/(v - b) - a(T)/((v + δ₁ b)(v + δ₂ b)) */
export interface CubicForm {
  /** δ₁ > δ₂ */
  readonly first: number;
  readonly second: number;
  /** a = attraction · R² Tc²/pc, b = size · R Tc/pc: the critical point is a triple root. */
  readonly attraction: number;
  readonly size: number;
  readonly criticalCompressibility: number;
  /** m in √α = 1 + m (1 - √(T/Tc)), by the acentric factor. */
  readonly slope: (acentricFactor: number) => number;
}

/**
 * @source Peng & Robinson (1976), Ind. Eng. Chem. Fundam. 15, 59; Soave (1972), Chem. Eng. Sci. 27, 1197. Both print the numbers of the
 *   critical point with four or five digits; here they are carried to the precision of the arithmetic.
 */
export const cubicForms: Readonly<Record<CubicKind, CubicForm>> = {
  peng_robinson: {
    first: 1 + Math.SQRT2,
    second: 1 - Math.SQRT2,
    attraction: 0.4572355289213822,
    size: 0.07779607390388846,
    criticalCompressibility: 0.30740130869870386,
    slope: (omega) => 0.37464 + omega * (1.54226 - 0.26992 * omega),
  },
  soave_redlich_kwong: {
    first: 1,
    second: 0,
    attraction: 0.4274802335403414,
    size: 0.08664034996495772,
    criticalCompressibility: 1 / 3,
    slope: (omega) => 0.48 + omega * (1.574 - 0.176 * omega),
  },
};

/** At a triple root a step leaves two thirds of the way, 90 steps from one to rounding; nowhere is it slower. */
const mostSteps = 120;

/**
 * A root of the cubic in the compressibility factor Z = p v/(R T): the gas's, or the liquid's; the only one there is where there is one.
 *
 * Newton's method from the side where value and curvature agree in sign: it comes to the root without passing it, whatever the
 * coefficients, and has arrived when a step turns back.
 *
 * @param attraction - a p/(R T)², dimensionless
 * @param size - b p/(R T), dimensionless, > 0
 * @returns Z > size; NaN where the arguments are none
 */
export function compressibilityFactor(
  { first, second }: CubicForm,
  attraction: number,
  size: number,
  phase: 'gas' | 'liquid',
): number {
  // (Z - B) Q - Q + A (Z - B) with Q = (Z + δ₁ B)(Z + δ₂ B)
  const sum = (first + second) * size;
  const product = first * second * size * size;
  const c2 = sum - size - 1;
  const c1 = attraction + product - sum * (size + 1);
  const c0 = -(attraction * size + product * (size + 1));
  const inflection = -c2 / 3;
  const valueAtInflection = ((inflection + c2) * inflection + c1) * inflection + c0;
  const spread = inflection * inflection - c1 / 3;
  let isFromAbove = valueAtInflection <= 0;
  if (spread > 0) {
    const turn = Math.sqrt(spread);
    if (phase === 'gas') {
      const minimum = inflection + turn;
      isFromAbove = ((minimum + c2) * minimum + c1) * minimum + c0 <= 0;
    } else {
      const maximum = inflection - turn;
      // A maximum at Z < B belongs to roots without a meaning.
      isFromAbove = maximum < size || ((maximum + c2) * maximum + c1) * maximum + c0 < 0;
    }
  }
  // At Z = B the cubic is negative; attraction only lowers the pressure, so that Z ≤ 1 + B.
  let z = isFromAbove ? 1 + size + Math.max(0, -2 * attraction) : size;
  for (let step = 0; step < mostSteps; step++) {
    const value = ((z + c2) * z + c1) * z + c0;
    const next = z - value / ((3 * z + 2 * c2) * z + c1);
    // The first step may start on the wrong side by rounding, or by repulsion; from then on there is but one direction.
    if (step > 0 && !(isFromAbove ? next < z : next > z)) return z;
    z = next;
  }
  return z;
}
