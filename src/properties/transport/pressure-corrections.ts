/** What pressure does to transport properties known at low pressure. All tend to no correction as pressure tends to zero. */
import type { PseudoCritical } from './pseudo-critical.js';

/**
 * Viscosity at pressure over viscosity at low pressure.
 *
 * @param reducedTemperature - T/Tc of the mixture; below 1 the value at 1 is taken, the method's form for subcooled vapour being another
 * @param reducedPressure - P/Pc, 0 to 100
 * @param polarFactor - of the mixture at low pressure, 1 where nothing is polar
 * @source Lucas (1980, 1981), Chem. Ing. Tech. 53, 959; as in Poling, Prausnitz & O'Connell, 5th ed. (2001), sec. 9-6; without the factor for quantum
 *   gases at pressure, which is within 1 % of one
 * @range 1 < Tr < 40, Pr < 100; about 5 % non-polar, 10 % polar
 */
export function lucasPressureFactor(
  reducedTemperature: number,
  reducedPressure: number,
  polarFactor: number,
): number {
  if (!(reducedPressure > 0)) return 1;
  const t = Math.max(reducedTemperature, 1);
  const p = reducedPressure;
  const a = (1.245e-3 / t) * Math.exp(5.1726 * t ** -0.3286);
  const b = a * (1.6553 * t - 1.2723);
  const c = (0.4489 / t) * Math.exp(3.0578 * t ** -37.7332);
  const d = (1.7368 / t) * Math.exp(2.231 * t ** -7.6351);
  const f = 0.9425 * Math.exp(-0.1853 * t ** 0.4489);
  const plain = 1 + (a * p ** 1.3088) / (b * p ** f + 1 / (1 + c * p ** d));
  return (plain * (1 + (polarFactor - 1) / plain ** 3)) / polarFactor;
}

/**
 * Thermal conductivity at pressure less that at low pressure, W/(m K).
 *
 * @param molarDensity - mol/m³
 * @source Stiel & Thodos (1964), AIChE J. 10, 26; as in Poling, Prausnitz & O'Connell, 5th ed. (2001), sec. 10-5
 * @range reduced density below 2.8, non-polar gases; 10 to 20 %
 */
export function stielThodosExcess(molarDensity: number, mixture: PseudoCritical): number {
  const { temperature, pressure, volume, compressibility, molarMass } = mixture;
  const density = molarDensity * volume;
  const inverse = 210 * ((temperature * (molarMass * 1e3) ** 3) / (pressure / 1e5) ** 4) ** (1 / 6);
  let excess: number;
  if (density < 0.5) excess = 1.22e-2 * Math.expm1(0.535 * density);
  else if (density < 2) excess = 1.14e-2 * (Math.exp(0.67 * density) - 1.069);
  else excess = 2.6e-3 * (Math.exp(1.155 * density) + 2.016);
  return excess / (inverse * compressibility ** 5);
}

/** Pr, then R, A, B, C, E of D P/(D P)° = R (1 - A Tr^-B) (1 - C Tr^-E). */
const takahashiRows: readonly (readonly [number, number, number, number, number, number])[] = [
  [0, 1, 0, 1, 0, 1],
  [0.1, 1.01, 0.038042, 1.52267, 0, 1],
  [0.2, 1.01, 0.067433, 2.16794, 0, 1],
  [0.3, 1.01, 0.098317, 2.4291, 0, 1],
  [0.4, 1.01, 0.13761, 2.77605, 0, 1],
  [0.5, 1.01, 0.175081, 2.98256, 0, 1],
  [0.6, 1.01, 0.216376, 3.11384, 0, 1],
  [0.8, 1.01, 0.314051, 3.50264, 0, 1],
  [1, 1.02, 0.385736, 3.07773, 0.141211, 13.45454],
  [1.2, 1.02, 0.514553, 3.54744, 0.278407, 14],
  [1.4, 1.02, 0.599184, 3.61216, 0.372683, 10.009],
  [1.6, 1.02, 0.557725, 3.41882, 0.504894, 8.57519],
  [1.8, 1.02, 0.593007, 3.18415, 0.678469, 10.37483],
  [2, 1.02, 0.696001, 3.3766, 0.665702, 11.21674],
  [2.5, 1.02, 0.79077, 3.27984, 0, 1],
  [3, 1.02, 0.5021, 2.39031, 0.602907, 6.19043],
  [4, 1.02, 0.837452, 3.23513, 0, 1],
  [5, 1.02, 0.89039, 3.13001, 0, 1],
];

/**
 * D P at pressure over D P at low pressure; between the rows of the chart linear in reduced pressure.
 *
 * @param reducedTemperature - 0.9 and above; below, the value at 0.9
 * @param reducedPressure - up to 5; beyond, the value at 5
 * @source Takahashi (1974), J. Chem. Eng. Japan 7, 417; constants fitted to his chart, from memory
 */
export function takahashiFactor(reducedTemperature: number, reducedPressure: number): number {
  const t = Math.max(reducedTemperature, 0.9);
  const at = (row: number): number => {
    const [, r, a, b, c, e] = takahashiRows[row]!;
    return r * (1 - a * t ** -b) * (1 - c * t ** -e);
  };
  const last = takahashiRows.length - 1;
  if (!(reducedPressure < takahashiRows[last]![0])) return at(last);
  let row = 0;
  while (takahashiRows[row + 1]![0] <= reducedPressure) row++;
  const [lower] = takahashiRows[row]!;
  const [upper] = takahashiRows[row + 1]!;
  const share = (reducedPressure - lower) / (upper - lower);
  return (1 - share) * at(row) + share * at(row + 1);
}
