/**
 * Ideal-gas heat capacity, enthalpy and entropy as polynomials in temperature, in one form for every kind of data that is one:
 *
 *   Cp/R = Σ a_k T^(k-2), k = 0..6;  H/R and S/R are its integrals with the constants b1 (K) and b2.
 *
 * The seven-constant form has the same powers from 0 to 4, a constant heat capacity the power 0 alone. Sums of such polynomials
 * over a reaction are polynomials again, which is what makes an equilibrium constant cheap.
 *
 * @source McBride, Zehe & Gordon, NASA/TP-2002-211556 (2002), eqs. 1-3
 */
import type { NasaRange } from './species-record.js';

const lowestExponent = -2;
const coefficientCount = 7;
/** Offset of b1 and b2 within one range's numbers, and how many numbers a range takes. */
const enthalpyConstantAt = coefficientCount;
const entropyConstantAt = coefficientCount + 1;
const stride = coefficientCount + 2;

/** Piecewise polynomial in one layout for all forms; numbers belong to R = 1. */
export interface NasaPolynomial {
  /** K, ascending; one more than ranges. */
  readonly limits: Float64Array;
  /** `rangeCount × 9`, row-major: seven coefficients of T^-2..T^4, then b1 and b2. */
  readonly constants: Float64Array;
}

/**
 * Brings a record's ranges into the common layout.
 *
 * @param exponents - whole powers of T from -2 to 4, as long as each range's coefficients
 * @param ranges - ascending, each beginning where the one before ends
 * @throws RangeError for another power, or for ranges out of order; the case is checked before
 */
export function createNasaPolynomial(
  exponents: readonly number[],
  ranges: readonly NasaRange[],
): NasaPolynomial {
  const constants = new Float64Array(ranges.length * stride);
  ranges.forEach((range, index) => {
    const previous = ranges[index - 1];
    if (!(range.lowest < range.highest) || (previous && previous.highest !== range.lowest)) {
      throw new RangeError('temperature ranges of a polynomial must follow one another');
    }
    exponents.forEach((exponent, k) => {
      const place = exponent - lowestExponent;
      if (!Number.isInteger(place) || place < 0 || place >= coefficientCount) {
        throw new RangeError(`no power ${exponent} of temperature in this form`);
      }
      constants[index * stride + place] = range.coefficients[k]!;
    });
    constants[index * stride + enthalpyConstantAt] = range.enthalpyConstant;
    constants[index * stride + entropyConstantAt] = range.entropyConstant;
  });
  return { limits: Float64Array.of(ranges[0]!.lowest, ...ranges.map((range) => range.highest)), constants };
}

/** Σ weight · polynomial, over the union of all break points and between the narrowest outer limits. */
export function combineNasaPolynomials(
  terms: readonly { readonly weight: number; readonly polynomial: NasaPolynomial }[],
): NasaPolynomial {
  const lowest = Math.max(...terms.map(({ polynomial }) => polynomial.limits[0]!));
  const highest = Math.min(...terms.map(({ polynomial }) => polynomial.limits.at(-1)!));
  const inner = terms.flatMap(({ polynomial }) => [...polynomial.limits.subarray(1, -1)]);
  const breaks = [...new Set(inner)].filter((limit) => limit > lowest && limit < highest);
  const limits = Float64Array.of(lowest, ...breaks.sort((a, b) => a - b), highest);
  const constants = new Float64Array((limits.length - 1) * stride);
  for (let range = 0; range + 1 < limits.length; range++) {
    for (const { weight, polynomial } of terms) {
      const from = rangeOffset(polynomial, limits[range]!);
      for (let k = 0; k < stride; k++)
        constants[range * stride + k]! += weight * polynomial.constants[from + k]!;
    }
  }
  return { limits, constants };
}

/** Offset into `constants` of the range that holds at a temperature; the nearest one outside. A break belongs to the range above it. */
function rangeOffset({ limits }: NasaPolynomial, temperature: number): number {
  let range = 0;
  while (range + 2 < limits.length && temperature >= limits[range + 1]!) range++;
  return range * stride;
}

/** Cp/R, dimensionless. Outside the limits the nearest range is continued. @param temperature - K */
export function reducedHeatCapacity(polynomial: NasaPolynomial, temperature: number): number {
  const a = polynomial.constants;
  const o = rangeOffset(polynomial, temperature);
  const T = temperature;
  const negative = (a[o]! / T + a[o + 1]!) / T;
  return negative + a[o + 2]! + T * (a[o + 3]! + T * (a[o + 4]! + T * (a[o + 5]! + T * a[o + 6]!)));
}

/** H/R, K. Outside the limits the nearest range is continued. @param temperature - K */
export function reducedEnthalpy(polynomial: NasaPolynomial, temperature: number): number {
  const a = polynomial.constants;
  const o = rangeOffset(polynomial, temperature);
  const T = temperature;
  const positive =
    T * (a[o + 2]! + T * (a[o + 3]! / 2 + T * (a[o + 4]! / 3 + T * (a[o + 5]! / 4 + (T * a[o + 6]!) / 5))));
  return positive - a[o]! / T + a[o + 1]! * Math.log(T) + a[o + enthalpyConstantAt]!;
}

/** S/R at the standard pressure, dimensionless. Outside the limits the nearest range is continued. @param temperature - K */
export function reducedEntropy(polynomial: NasaPolynomial, temperature: number): number {
  const a = polynomial.constants;
  const o = rangeOffset(polynomial, temperature);
  const T = temperature;
  const positive = T * (a[o + 3]! + T * (a[o + 4]! / 2 + T * (a[o + 5]! / 3 + (T * a[o + 6]!) / 4)));
  const negative = (-a[o]! / (2 * T) - a[o + 1]!) / T;
  return positive + negative + a[o + 2]! * Math.log(T) + a[o + entropyConstantAt]!;
}

/** G/(RT) at the standard pressure, dimensionless, with one logarithm. @param temperature - K */
export function reducedGibbsEnergy(polynomial: NasaPolynomial, temperature: number): number {
  const a = polynomial.constants;
  const o = rangeOffset(polynomial, temperature);
  const T = temperature;
  const logT = Math.log(T);
  const positive = -T * (a[o + 3]! / 2 + T * (a[o + 4]! / 6 + T * (a[o + 5]! / 12 + (T * a[o + 6]!) / 20)));
  const negative = (-a[o]! / (2 * T) + a[o + 1]! * (logT + 1) + a[o + enthalpyConstantAt]!) / T;
  return positive + negative + a[o + 2]! * (1 - logT) - a[o + entropyConstantAt]!;
}
