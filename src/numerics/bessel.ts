/**
 * Modified Bessel functions of order 0 and 1, scaled so that they neither overflow nor vanish: e^(-x) I(x) and e^x K(x), x > 0.
 * Relative error below 1e-14; NaN for NaN.
 *
 * @source DLMF 10.25.2 (series of I), 10.40.1 (expansion of I for large x), 10.32.9 (integral of K)
 */

/** Beyond it the expansion's smallest term, about e^(-2x), is below rounding. */
const largeArgument = 20;

/** e^(-x) I_order(x). @param order - 0 or 1  @param x - ≥ 0 */
export function scaledBesselI(order: 0 | 1, x: number): number {
  return x < largeArgument
    ? Math.exp(-x) * seriesI(order, x)
    : expansionI(order, x) / Math.sqrt(2 * Math.PI * x);
}

/** All terms are positive: no cancellation. */
function seriesI(order: 0 | 1, x: number): number {
  const quarter = (x * x) / 4;
  let term = order === 0 ? 1 : x / 2;
  let sum = term;
  for (let k = 1; term > sum * 1e-17; k++) {
    term *= quarter / (k * (k + order));
    sum += term;
  }
  return sum;
}

function expansionI(order: 0 | 1, x: number): number {
  let term = 1;
  let sum = 1;
  for (let k = 1; Math.abs(term) > 1e-17; k++) {
    term *= -(4 * order - (2 * k - 1) ** 2) / (k * 8 * x);
    sum += term;
  }
  return sum;
}

/**
 * e^x K_order(x), infinite at 0. The trapezoidal rule on ∫ exp(-x (cosh t - 1)) cosh(order t) dt converges faster than any power of the
 * step, since the integrand dies away doubly exponentially and is analytic beside the real axis.
 *
 * @param order - 0 or 1
 * @param x - ≥ 0
 * @source Trefethen & Weideman (2014), SIAM Review 56, 385
 */
export function scaledBesselK(order: 0 | 1, x: number): number {
  if (x === 0) return Infinity;
  // The error is about exp(-2π²/(step² x)) for large x, exp(-π²/step) for small x: both below rounding.
  const step = Math.min(0.2, 0.6 / Math.sqrt(x));
  let sum = 0.5;
  for (let k = 1; ; k++) {
    const half = Math.sinh((k * step) / 2);
    const term = Math.exp(-2 * x * half * half) * (order === 0 ? 1 : Math.cosh(k * step));
    sum += term;
    if (!(term > sum * 1e-18)) return sum * step;
  }
}
