import { gasConstant } from '../../quantities/constants.js';
import type { SpeciesRecord } from '../species-record.js';
import type { MissingFields } from './pure-gas-property.js';

const fields = ['criticalTemperature', 'criticalPressure', 'criticalVolume'] as const;

/** What the record lacks for corrections at pressure. */
export function missingForPressureCorrection(record: SpeciesRecord): MissingFields {
  return fields.filter((field) => record[field] === undefined);
}

/** Critical constants that a mixture acts as if it had; filled at each composition. */
export interface PseudoCritical {
  /** K */
  temperature: number;
  /** Pa */
  pressure: number;
  /** m³/mol */
  volume: number;
  /** Critical compressibility factor. */
  compressibility: number;
  /** kg/mol */
  molarMass: number;
  /** Of Lucas' method at low pressure; 1 where nothing is polar. */
  polarFactor: number;
}

/**
 * How much a dipole raises a dilute gas's viscosity in Lucas' method.
 *
 * @param criticalCompressibility - Zc; the form holds below 0.292, which polar gases are
 * @param reducedDipole - 52.46 μ² Pc/Tc² in debye, bar, K
 * @source Lucas (1981), Chem. Ing. Tech. 53, 959; its slight change with temperature beyond a reduced dipole of 0.075 (1 %) is left out
 */
export function lucasPolarFactor(criticalCompressibility: number, reducedDipole: number): number {
  if (reducedDipole < 0.022) return 1;
  return 1 + 30.55 * Math.max(0, 0.292 - criticalCompressibility) ** 1.72;
}

/** C m in a debye. */
const debye = 3.33564e-30;

/**
 * Mole-fraction means of critical temperature, volume and compressibility, and the pressure that follows from them.
 *
 * @source Lucas (1984), as in Poling, Prausnitz & O'Connell, The Properties of Gases and Liquids, 5th ed. (2001), sec. 9-7
 */
export function createPseudoCritical(
  records: readonly SpeciesRecord[],
): (moleFractions: Float64Array) => PseudoCritical {
  const temperatures = Float64Array.from(records, ({ criticalTemperature }) => criticalTemperature!);
  const volumes = Float64Array.from(records, ({ criticalVolume }) => criticalVolume!);
  const factors = Float64Array.from(
    records,
    ({ criticalTemperature, criticalPressure, criticalVolume }) =>
      (criticalPressure! * criticalVolume!) / (gasConstant * criticalTemperature!),
  );
  const masses = Float64Array.from(records, ({ molarMass }) => molarMass);
  const polarFactors = Float64Array.from(records, (record, i) => {
    const dipole = (record.dipoleMoment ?? 0) / debye;
    const bar = record.criticalPressure! / 1e5;
    return lucasPolarFactor(factors[i]!, (52.46 * dipole * dipole * bar) / record.criticalTemperature! ** 2);
  });
  const mixture: PseudoCritical = {
    temperature: 0,
    pressure: 0,
    volume: 0,
    compressibility: 0,
    molarMass: 0,
    polarFactor: 1,
  };
  return (moleFractions) => {
    let [temperature, volume, compressibility, molarMass, polarFactor] = [0, 0, 0, 0, 0];
    for (let i = 0; i < temperatures.length; i++) {
      const y = moleFractions[i]!;
      temperature += y * temperatures[i]!;
      volume += y * volumes[i]!;
      compressibility += y * factors[i]!;
      molarMass += y * masses[i]!;
      polarFactor += y * polarFactors[i]!;
    }
    mixture.temperature = temperature;
    mixture.volume = volume;
    mixture.compressibility = compressibility;
    mixture.molarMass = molarMass;
    mixture.polarFactor = polarFactor;
    mixture.pressure = (compressibility * gasConstant * temperature) / volume;
    return mixture;
  };
}
