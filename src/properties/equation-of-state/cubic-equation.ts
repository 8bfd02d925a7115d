/**
 * Cubic equations of state of two parameters,
 *
 *   p = R T/(v - b) - a(T)/((v + δ₁ b)(v + δ₂ b)),
 *
 * and everything that follows from them for a gas, all derivatives analytic. The root taken is the largest. Where the only root is a
 * liquid's there is no gas to describe; whether a gas that the equation has would condense is `phase-check.ts`'s to say.
 *
 * @source as `cubic-root.ts` and `cubic-mixture.ts`
 * @range gases and their mixtures, hydrocarbons and weakly polar compounds best; fugacity coefficients to about 2 %, gas volumes to about 1 to 3 %
 *   (common experience). Without interaction parameters mixtures can be further off: the ratio of fugacity coefficients of ammonia synthesis at
 *   450 °C comes out 4 % high at 100 atm, 9 % at 300 atm, against Gillespie & Beattie's as fitted by Dyson & Simon (1968)
 */
import { gasConstant } from '../../quantities/constants.js';
import type { SpeciesRecord } from '../species-record.js';
import { CubicMixture } from './cubic-mixture.js';
import type { CubicKind } from './cubic-root.js';
import type { EquationOfState } from './equation-of-state.js';

/**
 * @param records - one per species, with critical temperature, critical pressure and acentric factor
 * @param binaryInteraction - k_ij, symmetric with zero diagonal
 * @returns an equation with a workspace of its own; `evaluate` allocates nothing and returns false where the mixture has no gas root
 * @throws RangeError where a record lacks one of them; the case asks for them before
 */
export function createCubicEquation(
  kind: CubicKind,
  records: readonly SpeciesRecord[],
  binaryInteraction: readonly (readonly number[])[],
): EquationOfState {
  const mixture = new CubicMixture(kind, records, binaryInteraction);
  const { first, second } = mixture.form;
  const { sizes, roots, rootSlopes, fields, fieldSlopes } = mixture;
  const count = records.length;

  return {
    kind,
    isIdealGas: false,
    evaluate(moleFractions, temperature, pressure, state) {
      mixture.mix(moleFractions, temperature);
      const a = mixture.attraction;
      const b = mixture.size;
      const thermal = gasConstant * temperature;
      const Z = mixture.compressibilityFactor(pressure, 'gas');
      const v = (Z * thermal) / pressure;
      const gap = v - b;
      // Written so that a number that is none fails too.
      if (!(gap > 0) || !(b > 0) || mixture.isLiquidLike(v)) return false;

      const q = (v + first * b) * (v + second * b);
      const pressureByVolume = -thermal / (gap * gap) + (a * (2 * v + (first + second) * b)) / (q * q);
      const pressureByTemperature = gasConstant / gap - mixture.attractionSlope / q;
      const volumeByTemperature = -pressureByTemperature / pressureByVolume;
      // Residual enthalpy: p v - R T - D L with D = a - T a', L = ln((v + δ₁ b)/(v + δ₂ b))/((δ₁ - δ₂) b), ∂L/∂v = -1/q.
      const D = a - temperature * mixture.attractionSlope;
      const L = Math.log((v + first * b) / (v + second * b)) / ((first - second) * b);
      state.molarVolume = v;
      state.volumeByTemperature = volumeByTemperature;
      state.volumeByPressure = 1 / pressureByVolume;
      state.residualEnthalpy = pressure * v - thermal - D * L;
      state.residualHeatCapacity =
        pressure * volumeByTemperature -
        gasConstant +
        temperature * mixture.attractionCurvature * L +
        (D * volumeByTemperature) / q;

      const qBySize = (first + second) * v + 2 * first * second * b;
      for (let i = 0; i < count; i++) {
        const share = sizes[i]! / b;
        const twiceAttraction = 2 * roots[i]! * fields[i]!;
        const twiceD =
          twiceAttraction - 2 * temperature * (rootSlopes[i]! * fields[i]! + roots[i]! * fieldSlopes[i]!);
        // -(∂p/∂n_i)/(∂p/∂V) at n = 1
        const pressureByAmount =
          thermal / gap +
          (thermal * sizes[i]!) / (gap * gap) -
          twiceAttraction / q +
          (a * sizes[i]! * qBySize) / (q * q);
        const volume = -pressureByAmount / pressureByVolume;
        state.partialMolarVolumes[i] = volume;
        state.partialResidualEnthalpies[i] =
          pressure * volume - thermal - (twiceD - D * share) * L - (D * (v * share - volume)) / q;
      }
      mixture.logFugacityCoefficientsInto(Z, pressure, state.logFugacityCoefficients);
      return state.volumeByPressure < 0;
    },
  };
}
