/**
 * Wilke's interaction factors φ_ij of a mixture, from the viscosities of its gases:
 *
 *   φ_ij = (1 + (η_i/η_j)^½ (M_j/M_i)^¼)² / √(8 (1 + M_i/M_j))
 *
 * @source Wilke (1950), J. Chem. Phys. 18, 517; they are also the factors of Mason & Saxena (1958), Phys. Fluids 1, 361, for conductivity
 */
export class WilkeFactors {
  private readonly count: number;
  /** M_i^¼ and 1/√(8 (1 + M_i/M_j)), row-major. */
  private readonly massRoots: Float64Array;
  private readonly scales: Float64Array;
  private readonly roots: Float64Array;
  private readonly inverseRoots: Float64Array;
  private readonly denominators: Float64Array;

  /** @param molarMasses - one per species, any unit */
  constructor(molarMasses: readonly number[]) {
    this.count = molarMasses.length;
    this.massRoots = Float64Array.from(molarMasses, (mass) => mass ** 0.25);
    this.scales = Float64Array.from(
      molarMasses.flatMap((one) => molarMasses.map((other) => 1 / Math.sqrt(8 * (1 + one / other)))),
    );
    this.roots = new Float64Array(this.count);
    this.inverseRoots = new Float64Array(this.count);
    this.denominators = new Float64Array(this.count);
  }

  /**
   * Σ_j y_j φ_ij for each species.
   *
   * @param viscosities - of the pure gases, one per species
   * @returns scratch that the next call overwrites
   */
  denominatorsAt(moleFractions: Float64Array, viscosities: Float64Array): Float64Array {
    const { count, massRoots, scales, roots, inverseRoots, denominators } = this;
    for (let i = 0; i < count; i++) {
      const root = Math.sqrt(viscosities[i]!) / massRoots[i]!;
      roots[i] = root;
      inverseRoots[i] = 1 / root;
    }
    for (let i = 0; i < count; i++) {
      let sum = 0;
      const root = roots[i]!;
      const row = i * count;
      for (let j = 0; j < count; j++) {
        const term = 1 + root * inverseRoots[j]!;
        sum += moleFractions[j]! * term * term * scales[row + j]!;
      }
      denominators[i] = sum;
    }
    return denominators;
  }
}

/** Σ_i y_i x_i / Σ_j y_j φ_ij: the property of the mixture from those of its gases. */
export function mixWithFactors(
  moleFractions: Float64Array,
  values: Float64Array,
  denominators: Float64Array,
): number {
  let sum = 0;
  for (let i = 0; i < values.length; i++) sum += (moleFractions[i]! * values[i]!) / denominators[i]!;
  return sum;
}
