/**
 * Ideal-gas enthalpy, entropy and heat capacity of one species, from whichever data its record has.
 *
 * Assumptions: ideal gas; reference 298.15 K and 1 bar. Outside the data's temperature range the nearest polynomial is continued, and
 * `isInRange` says so: stopping there is the caller's decision. What the record does not hold is NaN and flagged; nothing is estimated.
 */
import { compileProperty } from '../expressions/compile-property.js';
import { gaussLegendre, type QuadratureRule } from '../numerics/quadrature.js';
import { gasConstant } from '../quantities/constants.js';
import {
  createNasaPolynomial,
  reducedEnthalpy,
  reducedEntropy,
  reducedHeatCapacity,
  type NasaPolynomial,
} from './nasa-polynomial.js';
import type { HeatCapacityData, SpeciesRecord } from './species-record.js';

/** K, at which heats of formation and standard entropies are tabulated. @source IUPAC (1982); common practice */
export const referenceTemperature = 298.15;

/** Thermochemistry of one species as functions of temperature in K, > 0. */
export interface SpeciesThermochemistry {
  readonly hasHeatCapacity: boolean;
  readonly hasEnthalpyOfFormation: boolean;
  readonly hasStandardEntropy: boolean;
  /** J/(mol K); NaN where the heat capacity is unknown. */
  readonly heatCapacity: (temperature: number) => number;
  /**
   * J/mol, counted from the elements at 298.15 K where the heat of formation is known, else from the species itself at 298.15 K
   * (differences over temperature then still hold); NaN where the heat capacity is unknown.
   */
  readonly enthalpy: (temperature: number) => number;
  /** J/(mol K) at 1 bar, counted likewise (zero at 298.15 K where the standard entropy is unknown). */
  readonly entropy: (temperature: number) => number;
  /** K, of the data */
  readonly lowestTemperature: number;
  readonly highestTemperature: number;
  readonly isInRange: (temperature: number) => boolean;
  /** The same functions as a polynomial, where they are one. */
  readonly polynomial?: NasaPolynomial;
}

/** Enough for a smooth heat capacity over any span of temperature met here: exact for polynomials of degree 31. */
const quadraturePointCount = 16;

/**
 * Thermochemistry of one species from its record.
 *
 * @throws RangeError where a polynomial's ranges leave a gap or its powers are not whole numbers from -2 to 4; the case checks both before
 */
export function createSpeciesThermochemistry(record: SpeciesRecord): SpeciesThermochemistry {
  const { heatCapacity, enthalpyOfFormation, standardEntropy } = record;
  if (!heatCapacity) {
    const unknown = (): number => NaN;
    return {
      hasHeatCapacity: false,
      hasEnthalpyOfFormation: enthalpyOfFormation !== undefined,
      hasStandardEntropy: standardEntropy !== undefined,
      heatCapacity: unknown,
      enthalpy: unknown,
      entropy: unknown,
      ...everyTemperature,
    };
  }
  switch (heatCapacity.kind) {
    case 'nasa':
      return fromPolynomial(createNasaPolynomial(heatCapacity.exponents, heatCapacity.ranges), true, true);
    case 'constant':
      return fromPolynomial(
        constantPolynomial(heatCapacity.value, enthalpyOfFormation ?? 0, standardEntropy ?? 0),
        enthalpyOfFormation !== undefined,
        standardEntropy !== undefined,
      );
    case 'formula':
      return fromFormula(heatCapacity.formula, enthalpyOfFormation, standardEntropy);
  }
}

const everyTemperature = {
  lowestTemperature: 0,
  highestTemperature: Infinity,
  isInRange: (): boolean => true,
} as const;

function fromPolynomial(
  polynomial: NasaPolynomial,
  hasEnthalpyOfFormation: boolean,
  hasStandardEntropy: boolean,
): SpeciesThermochemistry {
  const lowestTemperature = polynomial.limits[0]!;
  const highestTemperature = polynomial.limits.at(-1)!;
  return {
    hasHeatCapacity: true,
    hasEnthalpyOfFormation,
    hasStandardEntropy,
    heatCapacity: (temperature) => gasConstant * reducedHeatCapacity(polynomial, temperature),
    enthalpy: (temperature) => gasConstant * reducedEnthalpy(polynomial, temperature),
    entropy: (temperature) => gasConstant * reducedEntropy(polynomial, temperature),
    lowestTemperature,
    highestTemperature,
    isInRange: (temperature) => temperature >= lowestTemperature && temperature <= highestTemperature,
    polynomial,
  };
}

/** Cp in J/(mol K), H in J/mol and S in J/(mol K) at 298.15 K, as a polynomial that holds at every temperature. */
function constantPolynomial(heatCapacity: number, enthalpy: number, entropy: number): NasaPolynomial {
  const reduced = heatCapacity / gasConstant;
  return createNasaPolynomial(
    [0],
    [
      {
        lowest: 0,
        highest: Infinity,
        coefficients: [reduced],
        enthalpyConstant: enthalpy / gasConstant - reduced * referenceTemperature,
        entropyConstant: entropy / gasConstant - reduced * Math.log(referenceTemperature),
      },
    ],
  );
}

function fromFormula(
  formula: Extract<HeatCapacityData, { kind: 'formula' }>['formula'],
  enthalpyOfFormation: number | undefined,
  standardEntropy: number | undefined,
): SpeciesThermochemistry {
  const property = compileProperty(formula);
  // A heat capacity of the ideal gas does not depend on pressure; the case refuses a formula that names it.
  const heatCapacity = (temperature: number): number => property.evaluate(temperature, NaN);
  const rule = gaussLegendre(quadraturePointCount);
  return {
    hasHeatCapacity: true,
    hasEnthalpyOfFormation: enthalpyOfFormation !== undefined,
    hasStandardEntropy: standardEntropy !== undefined,
    heatCapacity,
    enthalpy: (temperature) =>
      (enthalpyOfFormation ?? 0) + integrate(rule, heatCapacity, referenceTemperature, temperature),
    // ∫ Cp/T dT = ∫ Cp d(ln T), which is the smoother integrand.
    entropy: (temperature) =>
      (standardEntropy ?? 0) +
      integrate(
        rule,
        (log) => heatCapacity(Math.exp(log)),
        Math.log(referenceTemperature),
        Math.log(temperature),
      ),
    ...everyTemperature,
  };
}

function integrate(rule: QuadratureRule, integrand: (x: number) => number, from: number, to: number): number {
  const span = to - from;
  let sum = 0;
  for (let q = 0; q < rule.points.length; q++)
    sum += rule.weights[q]! * integrand(from + span * rule.points[q]!);
  return span * sum;
}
