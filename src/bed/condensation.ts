import { missingForCubic } from '../properties/equation-of-state/create-equation-of-state.js';
import { createDewPointCheck } from '../properties/equation-of-state/phase-check.js';
import type { ReactorSpecification } from './reactor-specification.js';

/** Whether a liquid would condense from the gas. */
export interface CondensationWatch {
  /** Positive where a liquid would condense, negative in a gas; the logarithm of how far off that is, roughly. */
  readonly excess: (moleFractions: Float64Array, temperature: number, pressure: number) => number;
  /** K; undefined where nothing condenses at any temperature of interest. */
  readonly dewTemperature: (moleFractions: Float64Array, pressure: number) => number | undefined;
  /** Ids of present species whose critical data are not known: they are taken not to condense. */
  readonly leftOut: readonly string[];
}

/**
 * Where the pressures of all species add up to less than this share of their vapour pressures, the test by equation of state is spared: no
 * mixture is so far from ideal.
 */
const farBelowSaturation = 0.1;

/** By the run's equation of state, or by Peng and Robinson's where the gas is ideal. */
export function createCondensationWatch({
  fluid,
  species,
  feed,
  reactions,
}: ReactorSpecification): CondensationWatch {
  const { equationOfState } = fluid;
  const isCubic = 'binaryInteraction' in equationOfState;
  const check = createDewPointCheck(
    species,
    isCubic ? equationOfState.kind : 'peng_robinson',
    isCubic ? equationOfState.binaryInteraction : species.map(() => species.map(() => 0)),
  );
  const judged = species.flatMap((record, i) =>
    missingForCubic(record).length === 0 ? [{ record, i }] : [],
  );
  const indices = Int32Array.from(judged, ({ i }) => i);
  const criticalTemperatures = Float64Array.from(judged, ({ record }) => record.criticalTemperature!);
  const criticalPressures = Float64Array.from(judged, ({ record }) => record.criticalPressure!);
  const slopes = Float64Array.from(judged, ({ record }) => 5.373 * (1 + record.acentricFactor!));
  /** Σ p_i/p_i° with Wilson's (1969) vapour pressures, of those below their critical temperature. */
  const saturation = (moleFractions: Float64Array, temperature: number, pressure: number): number => {
    let sum = 0;
    for (let k = 0; k < indices.length; k++) {
      const ratio = criticalTemperatures[k]! / temperature;
      const y = moleFractions[indices[k]!]!;
      if (ratio > 1 && y > 0)
        sum += (y * pressure) / (criticalPressures[k]! * Math.exp(slopes[k]! * (1 - ratio)));
    }
    return sum;
  };
  const isPresent = species.map(
    (_record, i) => feed.molarFlows[i]! > 0 || reactions.some(({ stoichiometry }) => stoichiometry[i] !== 0),
  );
  return {
    excess(moleFractions, temperature, pressure) {
      const share = saturation(moleFractions, temperature, pressure);
      if (share < farBelowSaturation) return share > 0 ? Math.log(share) : Number.NEGATIVE_INFINITY;
      return check.liquidExcess(moleFractions, temperature, pressure);
    },
    dewTemperature: check.dewTemperature,
    leftOut: species.flatMap(({ id }, i) => (isPresent[i] && check.leftOut.includes(id) ? [id] : [])),
  };
}
