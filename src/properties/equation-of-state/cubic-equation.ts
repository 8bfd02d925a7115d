/**
 * Cubic equations of state of two parameters,
 *
 *   p = R T/(v - b) - a(T)/((v + δ₁ b)(v + δ₂ b)),   a = Σ Σ y_i y_j √(a_i a_j) (1 - k_ij),   b = Σ y_i b_i,
 *
 * and everything that follows from them, all derivatives analytic. The root taken is the largest: the gas, where there is one.
 *
 * @source Peng & Robinson (1976), Ind. Eng. Chem. Fundam. 15, 59; Soave (1972), Chem. Eng. Sci. 27, 1197; one-fluid mixing after van der Waals;
 *   forms of fugacity and enthalpy as in Michelsen & Mollerup, Thermodynamic Models: Fundamentals & Computational Aspects, ch. 3
 * @range gases and their mixtures, hydrocarbons and weakly polar compounds best; fugacity coefficients to about 2 %, gas volumes to about 1 to 3 %
 */
import { gasConstant } from '../../quantities/constants.js';
import type { SpeciesRecord } from '../species-record.js';
import type { EquationOfState } from './equation-of-state.js';

export type CubicKind = 'peng_robinson' | 'soave_redlich_kwong';

interface CubicConstants {
  readonly first: number;
  readonly second: number;
  /** a = attraction · R² Tc²/pc, b = size · R Tc/pc */
  readonly attraction: number;
  readonly size: number;
  /** m in √α = 1 + m (1 - √(T/Tc)), as a polynomial in the acentric factor. */
  readonly slope: (acentricFactor: number) => number;
}

const constants: Readonly<Record<CubicKind, CubicConstants>> = {
  peng_robinson: {
    first: 1 + Math.SQRT2,
    second: 1 - Math.SQRT2,
    attraction: 0.457235528921,
    size: 0.0777960739039,
    slope: (omega) => 0.37464 + omega * (1.54226 - 0.26992 * omega),
  },
  soave_redlich_kwong: {
    first: 1,
    second: 0,
    attraction: 0.427480233540341,
    size: 0.0866403499649577,
    slope: (omega) => 0.48 + omega * (1.574 - 0.176 * omega),
  },
};

/** Newton from above converges in a handful of steps, near a double root in some dozens. */
const mostRootIterations = 100;

/** Largest real root Z of the cubic; the gas root where there is one. @returns NaN where the numbers are none */
export function largestCompressibility(kind: CubicKind, attraction: number, size: number): number {
  const { first, second } = constants[kind];
  const sum = first + second;
  const product = first * second;
  const [A, B] = [attraction, size];
  const c2 = -(1 + B - sum * B);
  const c1 = A + product * B * B - sum * B - sum * B * B;
  const c0 = -(A * B + product * B * B + product * B * B * B);
  // Attraction only lowers the pressure, so Z ≤ 1 + B; from there Newton falls onto the largest root without passing it.
  let z = 1 + B;
  for (let iteration = 0; iteration < mostRootIterations; iteration++) {
    const value = ((z + c2) * z + c1) * z + c0;
    const slope = (3 * z + 2 * c2) * z + c1;
    const next = z - value / slope;
    if (!(Math.abs(next - z) > 2 * Number.EPSILON * z)) return next;
    z = next;
  }
  return z;
}

/**
 * @param records - one per species, with critical temperature, critical pressure and acentric factor
 * @param binaryInteraction - k_ij, symmetric with zero diagonal
 * @throws RangeError where a record lacks one of them; the case asks for them before
 */
export function createCubicEquation(
  kind: CubicKind,
  records: readonly SpeciesRecord[],
  binaryInteraction: readonly (readonly number[])[],
): EquationOfState {
  const { first, second, attraction, size, slope } = constants[kind];
  const count = records.length;
  const criticalRoots = new Float64Array(count); // √Tc
  const strengths = new Float64Array(count); // √a_i at Tc
  const slopes = new Float64Array(count);
  const sizes = new Float64Array(count);
  records.forEach(({ id, criticalTemperature, criticalPressure, acentricFactor }, i) => {
    if (criticalTemperature === undefined || criticalPressure === undefined || acentricFactor === undefined)
      throw new RangeError(`${id} has no critical data`);
    const thermal = gasConstant * criticalTemperature;
    criticalRoots[i] = Math.sqrt(criticalTemperature);
    strengths[i] = thermal * Math.sqrt(attraction / criticalPressure);
    slopes[i] = slope(acentricFactor);
    sizes[i] = (size * thermal) / criticalPressure;
  });
  const pairFactors = Float64Array.from(binaryInteraction.flatMap((row) => row.map((k) => 1 - k)));

  // √a_i and its temperature derivatives, Σ_j y_j √a_j (1 - k_ij) and its derivative.
  const root = new Float64Array(count);
  const rootSlope = new Float64Array(count);
  const rootCurvature = new Float64Array(count);
  const field = new Float64Array(count);
  const fieldSlope = new Float64Array(count);
  let preparedTemperature = Number.NaN;

  const prepare = (temperature: number): void => {
    preparedTemperature = temperature;
    const squareRoot = Math.sqrt(temperature);
    for (let i = 0; i < count; i++) {
      const value = 1 + slopes[i]! * (1 - squareRoot / criticalRoots[i]!);
      // Far above the critical temperature the form would turn up again: there is no attraction left by then.
      const isLeft = value > 0;
      const derivative = isLeft ? (-slopes[i]! * strengths[i]!) / (2 * squareRoot * criticalRoots[i]!) : 0;
      root[i] = isLeft ? value * strengths[i]! : 0;
      rootSlope[i] = derivative;
      rootCurvature[i] = -derivative / (2 * temperature);
    }
  };

  return {
    kind,
    isIdealGas: false,
    evaluate(moleFractions, temperature, pressure, state) {
      if (temperature !== preparedTemperature) prepare(temperature);
      let a = 0;
      let aSlope = 0;
      let aCurvature = 0;
      let b = 0;
      for (let i = 0; i < count; i++) {
        let sum = 0;
        let sumSlope = 0;
        const row = i * count;
        for (let j = 0; j < count; j++) {
          const weight = moleFractions[j]! * pairFactors[row + j]!;
          sum += weight * root[j]!;
          sumSlope += weight * rootSlope[j]!;
        }
        field[i] = sum;
        fieldSlope[i] = sumSlope;
        const y = moleFractions[i]!;
        a += y * root[i]! * sum;
        aSlope += 2 * y * rootSlope[i]! * sum;
        aCurvature += 2 * y * (rootCurvature[i]! * sum + rootSlope[i]! * sumSlope);
        b += y * sizes[i]!;
      }
      const thermal = gasConstant * temperature;
      const Z = largestCompressibility(kind, (a * pressure) / (thermal * thermal), (b * pressure) / thermal);
      const v = (Z * thermal) / pressure;
      const gap = v - b;
      if (!(gap > 0) || !(b > 0)) return false;
      const q = (v + first * b) * (v + second * b);
      const pressureByVolume = -thermal / (gap * gap) + (a * (2 * v + (first + second) * b)) / (q * q);
      const pressureByTemperature = gasConstant / gap - aSlope / q;
      const logTerm = Math.log((v + first * b) / (v + second * b)) / (b * (first - second));
      const D = a - temperature * aSlope;
      const volumeByTemperature = -pressureByTemperature / pressureByVolume;
      state.molarVolume = v;
      state.volumeByTemperature = volumeByTemperature;
      state.volumeByPressure = 1 / pressureByVolume;
      state.residualEnthalpy = pressure * v - thermal - D * logTerm;
      state.residualHeatCapacity =
        pressure * volumeByTemperature -
        gasConstant +
        temperature * aCurvature * logTerm +
        (D * volumeByTemperature) / q;
      const logGap = Math.log((gap * pressure) / thermal);
      const qBySize = (first + second) * v + 2 * first * second * b;
      for (let i = 0; i < count; i++) {
        const share = sizes[i]! / b;
        const twiceAttraction = 2 * root[i]! * field[i]!;
        const volume =
          -(
            thermal / gap +
            (thermal * sizes[i]!) / (gap * gap) -
            twiceAttraction / q +
            (a * sizes[i]! * qBySize) / (q * q)
          ) / pressureByVolume;
        const twiceD =
          twiceAttraction - 2 * temperature * (rootSlope[i]! * field[i]! + root[i]! * fieldSlope[i]!);
        state.partialMolarVolumes[i] = volume;
        state.logFugacityCoefficients[i] =
          share * (Z - 1) - logGap - ((twiceAttraction - a * share) * logTerm) / thermal;
        state.partialResidualEnthalpies[i] =
          pressure * volume - thermal - (twiceD - D * share) * logTerm - (D * (v * share - volume)) / q;
      }
      return state.volumeByPressure < 0;
    },
  };
}
