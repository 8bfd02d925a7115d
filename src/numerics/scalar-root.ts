export interface RootResult {
  /** End of the final bracket with the smaller |f|. */
  readonly root: number;
  readonly evaluations: number;
}

const maximumEvaluations = 200;

/**
 * Root of a continuous function in a bracket: false position with the Anderson–Björck weighting of the retained end, and a
 * bisection whenever three steps in a row have not halved the bracket. The bracket never leaves the sign change.
 *
 * @param f - function of one variable; f(lower) and f(upper) of opposite sign, or zero
 * @param tolerance - > 0, absolute, on the root
 * @throws RangeError when the bracket holds no sign change (NaN included)
 * @source Anderson & Björck (1973), BIT 13, 253
 */
export function findRoot(
  f: (x: number) => number,
  lower: number,
  upper: number,
  tolerance: number,
): RootResult {
  let kept = { x: lower, f: f(lower) };
  let latest = { x: upper, f: f(upper) };
  let evaluations = 2;
  if (!(kept.f * latest.f <= 0)) throw new RangeError('findRoot: no sign change in the bracket');
  let keptWeight = 1;
  let widthToBeat = Math.abs(upper - lower) / 2;
  let slowSteps = 0;
  while (latest.f !== 0 && kept.f !== 0 && evaluations < maximumEvaluations) {
    const width = Math.abs(latest.x - kept.x);
    if (width <= tolerance + 2 * Number.EPSILON * Math.abs(latest.x)) break;
    const secant = latest.x - (latest.f * (latest.x - kept.x)) / (latest.f - keptWeight * kept.f);
    const bisects = slowSteps >= 3;
    // A step below the tolerance would leave the bracket's far end where it is: overshoot by half of it instead.
    const nudge = Math.sign(kept.x - latest.x) * (tolerance / 2);
    const near = Math.abs(secant - latest.x) < tolerance / 2 ? latest.x + nudge : secant;
    const x = bisects ? (latest.x + kept.x) / 2 : near;
    const value = f(x);
    evaluations++;
    if (value * latest.f < 0) {
      kept = latest;
      keptWeight = 1;
    } else {
      const ratio = 1 - value / latest.f;
      keptWeight *= ratio > 0 ? ratio : 0.5;
    }
    latest = { x, f: value };
    if (Math.abs(latest.x - kept.x) <= widthToBeat) {
      widthToBeat = Math.abs(latest.x - kept.x) / 2;
      slowSteps = 0;
    } else {
      slowSteps = bisects ? 0 : slowSteps + 1;
    }
  }
  return { root: Math.abs(kept.f) < Math.abs(latest.f) ? kept.x : latest.x, evaluations };
}
