/**
 * All rate laws of a case, compiled to straight-line code. Concentrations are read from `concentrations[offset + i]`.
 *
 * @param concentrations - mol/m³, species in case order
 * @param offset - index of the first species' concentration
 * @param temperature - K
 * @param pressure - Pa, of the bulk; only laws that name `P` or `y.X` use it
 * @param rates - written: one per reaction from `rateOffset`, in each law's own basis, mol/(kg s) or mol/(m³ s)
 */
export type RateFunction = (
  concentrations: Float64Array,
  offset: number,
  temperature: number,
  pressure: number,
  rates: Float64Array,
  rateOffset: number,
) => void;

/**
 * As {@link RateFunction}, and exact derivatives: row-major `reactionCount × (speciesCount + 2)` from `gradientOffset`,
 * columns d/dc_i (temperature and pressure held), then d/dT (concentrations held), then d/dP.
 * Only entries that can differ from zero are written: the caller hands in zeroed memory.
 */
export type RateGradientFunction = (
  concentrations: Float64Array,
  offset: number,
  temperature: number,
  pressure: number,
  rates: Float64Array,
  rateOffset: number,
  gradient: Float64Array,
  gradientOffset: number,
) => void;

export interface RateEvaluator {
  readonly reactionCount: number;
  readonly speciesCount: number;
  readonly evaluate: RateFunction;
  readonly evaluateWithGradient: RateGradientFunction;
}
