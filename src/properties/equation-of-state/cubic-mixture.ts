/**
 * Attraction and size of a mixture by one-fluid mixing,
 *
 *   a = Σ Σ y_i y_j √(a_i a_j) (1 - k_ij),   b = Σ y_i b_i,   √a_i = √a_i(Tc) (1 + m_i (1 - √(T/Tc_i))),
 *
 * with the temperature derivatives of a, and the fugacity coefficients at a given compressibility factor.
 *
 * √a_i keeps its sign, so that a is smooth in temperature at any height: a pure species follows the published form exactly, also above
 * T/Tc = (1 + 1/m)², where that form lets the attraction grow again (nitrogen: 1390 K; hydrogen: beyond 50 000 K). Helium, whose m is
 * negative, is given attraction that grows with temperature; what it amounts to is small.
 *
 * @source van der Waals mixing as in Soave (1972), Chem. Eng. Sci. 27, 1197 and Peng & Robinson (1976), Ind. Eng. Chem. Fundam. 15, 59;
 *   fugacities as in Michelsen & Mollerup, Thermodynamic Models: Fundamentals & Computational Aspects, ch. 3 (from memory)
 */
import { gasConstant } from '../../quantities/constants.js';
import type { SpeciesRecord } from '../species-record.js';
import { compressibilityFactor, cubicForms, type CubicForm, type CubicKind } from './cubic-root.js';

/** Workspace of one cubic equation: holds what was mixed last. Arrays have one entry per species. */
export class CubicMixture {
  readonly form: CubicForm;
  readonly speciesCount: number;
  /** b_i, m³/mol */
  readonly sizes: Float64Array;
  /** √a_i, its first and second derivative by temperature; √(J m³)/mol */
  readonly roots: Float64Array;
  readonly rootSlopes: Float64Array;
  readonly rootCurvatures: Float64Array;
  /** Σ_j y_j √a_j (1 - k_ij) and its derivative by temperature. */
  readonly fields: Float64Array;
  readonly fieldSlopes: Float64Array;
  temperature = Number.NaN;
  /** a, J m³/mol², and its derivatives by temperature */
  attraction = 0;
  attractionSlope = 0;
  attractionCurvature = 0;
  /** b, m³/mol */
  size = 0;
  private readonly criticalRoots: Float64Array; // √Tc
  private readonly strengths: Float64Array; // √a_i at Tc
  private readonly slopes: Float64Array; // m_i
  private readonly pairFactors: Float64Array; // 1 - k_ij, row-major

  /**
   * @param records - one per species, with critical temperature, critical pressure and acentric factor
   * @param binaryInteraction - k_ij, symmetric with zero diagonal
   * @throws RangeError where a record lacks one of them; the case asks for them before
   */
  constructor(
    kind: CubicKind,
    records: readonly SpeciesRecord[],
    binaryInteraction: readonly (readonly number[])[],
  ) {
    const form = cubicForms[kind];
    const count = records.length;
    this.form = form;
    this.speciesCount = count;
    this.sizes = new Float64Array(count);
    this.roots = new Float64Array(count);
    this.rootSlopes = new Float64Array(count);
    this.rootCurvatures = new Float64Array(count);
    this.fields = new Float64Array(count);
    this.fieldSlopes = new Float64Array(count);
    this.criticalRoots = new Float64Array(count);
    this.strengths = new Float64Array(count);
    this.slopes = new Float64Array(count);
    this.pairFactors = Float64Array.from(binaryInteraction.flatMap((row) => row.map((k) => 1 - k)));
    records.forEach(({ id, criticalTemperature, criticalPressure, acentricFactor }, i) => {
      if (criticalTemperature === undefined || criticalPressure === undefined || acentricFactor === undefined)
        throw new RangeError(`${id} has no critical data`);
      const thermal = gasConstant * criticalTemperature;
      this.criticalRoots[i] = Math.sqrt(criticalTemperature);
      this.strengths[i] = thermal * Math.sqrt(form.attraction / criticalPressure);
      this.slopes[i] = form.slope(acentricFactor);
      this.sizes[i] = (form.size * thermal) / criticalPressure;
    });
  }

  /** @param moleFractions - sum 1. @param temperature - K, > 0 */
  mix(moleFractions: Float64Array, temperature: number): void {
    if (temperature !== this.temperature) this.prepare(temperature);
    const { speciesCount, sizes, roots, rootSlopes, rootCurvatures, fields, fieldSlopes, pairFactors } = this;
    let attraction = 0;
    let attractionSlope = 0;
    let attractionCurvature = 0;
    let size = 0;
    for (let i = 0; i < speciesCount; i++) {
      let field = 0;
      let fieldSlope = 0;
      const row = i * speciesCount;
      for (let j = 0; j < speciesCount; j++) {
        const weight = moleFractions[j]! * pairFactors[row + j]!;
        field += weight * roots[j]!;
        fieldSlope += weight * rootSlopes[j]!;
      }
      fields[i] = field;
      fieldSlopes[i] = fieldSlope;
      const y = moleFractions[i]!;
      attraction += y * roots[i]! * field;
      attractionSlope += 2 * y * rootSlopes[i]! * field;
      attractionCurvature += 2 * y * (rootCurvatures[i]! * field + rootSlopes[i]! * fieldSlope);
      size += y * sizes[i]!;
    }
    this.attraction = attraction;
    this.attractionSlope = attractionSlope;
    this.attractionCurvature = attractionCurvature;
    this.size = size;
  }

  /** Of the mixture last mixed, at a pressure in Pa. */
  compressibilityFactor(pressure: number, phase: 'gas' | 'liquid'): number {
    const thermal = gasConstant * this.temperature;
    const A = (this.attraction * pressure) / (thermal * thermal);
    return compressibilityFactor(this.form, A, (this.size * pressure) / thermal, phase);
  }

  /**
   * Whether a molar volume lies on the dense branch of an isotherm that has two: below the critical temperature of a single fluid with
   * this attraction and size, and denser than its critical point.
   */
  isLiquidLike(molarVolume: number): boolean {
    const { form, size } = this;
    const isBelowCritical =
      this.attraction * form.size > form.attraction * size * gasConstant * this.temperature;
    return isBelowCritical && molarVolume * form.size < form.criticalCompressibility * size;
  }

  /**
   * ln φ_i of the mixture last mixed.
   *
   * @param compressibility - a root at this pressure
   * @param target - written, one entry per species
   */
  logFugacityCoefficientsInto(compressibility: number, pressure: number, target: Float64Array): void {
    const { first, second } = this.form;
    const thermal = gasConstant * this.temperature;
    const size = (this.size * pressure) / thermal;
    const logGap = Math.log(compressibility - size);
    const logRatio =
      Math.log((compressibility + first * size) / (compressibility + second * size)) /
      ((first - second) * this.size * thermal);
    for (let i = 0; i < this.speciesCount; i++) {
      const share = this.sizes[i]! / this.size;
      target[i] =
        share * (compressibility - 1) -
        logGap -
        (2 * this.roots[i]! * this.fields[i]! - this.attraction * share) * logRatio;
    }
  }

  private prepare(temperature: number): void {
    this.temperature = temperature;
    const squareRoot = Math.sqrt(temperature);
    for (let i = 0; i < this.speciesCount; i++) {
      const relative = squareRoot / this.criticalRoots[i]!;
      const slope = this.slopes[i]! * this.strengths[i]!;
      this.roots[i] = this.strengths[i]! + slope * (1 - relative);
      const derivative = (-slope * relative) / (2 * temperature);
      this.rootSlopes[i] = derivative;
      this.rootCurvatures[i] = -derivative / (2 * temperature);
    }
  }
}
