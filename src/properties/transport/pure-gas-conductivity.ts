import { gasConstant } from '../../quantities/constants.js';
import { createPropertyFunction } from '../fluid-property.js';
import type { SpeciesRecord } from '../species-record.js';
import type { MissingFields, PureGasProperty } from './pure-gas-property.js';
import { missingForViscosity } from './pure-gas-viscosity.js';

const lowPressure = 101_325;
/** β of a polar substance for which no value of its own is known. @source Chung et al. (1984) */
const polarBeta = 1 / 1.32;
/** C m; weaker dipoles (carbon monoxide, nitrogen oxides) count as none. */
const smallestDipole = 1.6e-30;

/** What the record lacks for a thermal conductivity; empty where there is one. */
export function missingForConductivity(record: SpeciesRecord): MissingFields {
  if (record.thermalConductivity) return [];
  const own = (['criticalTemperature', 'acentricFactor', 'heatCapacity'] as const).filter(
    (field) => record[field] === undefined,
  );
  return [...new Set([...missingForViscosity(record), ...own])];
}

export interface GasConductivity extends PureGasProperty {
  /** W/(m K), where the viscosity at that temperature, Pa s, is known already. */
  readonly fromViscosity: (temperature: number, viscosity: number) => number;
}

/**
 * Thermal conductivity of a pure gas at low pressure, λ M/(η Cv) = 3.75 Ψ/(Cv/R).
 *
 * @param heatCapacity - ideal gas, J/(mol K), of temperature in K
 * @param viscosity - of the same gas, Pa s
 * @returns W/(m K) as a function of temperature
 * @throws RangeError where {@link missingForConductivity} names anything
 * @source Chung, Lee & Starling (1984), Ind. Eng. Chem. Fundam. 23, 8
 * @range dilute gases; average error a few per cent non-polar, 5 to 10 % and more polar
 */
export function createGasConductivity(
  record: SpeciesRecord,
  heatCapacity: (temperature: number) => number,
  viscosity: PureGasProperty,
): GasConductivity {
  if (record.thermalConductivity) {
    const { value } = createPropertyFunction(record.thermalConductivity);
    const given = (temperature: number): number => value(temperature, lowPressure);
    return { value: given, fromViscosity: given, method: 'given' };
  }
  const missing = missingForConductivity(record);
  if (missing.length > 0) throw new RangeError(`${record.id} has no ${missing.join(', ')}`);
  const criticalTemperature = record.criticalTemperature!;
  const omega = record.acentricFactor!;
  const isPolar = (record.dipoleMoment ?? 0) > smallestDipole;
  const beta = isPolar ? polarBeta : 0.7862 - 0.7109 * omega + 1.3168 * omega * omega;
  const factor = (3.75 * gasConstant) / record.molarMass;
  const fromViscosity = (temperature: number, known: number): number => {
    const alpha = heatCapacity(temperature) / gasConstant - 2.5;
    const reduced = temperature / criticalTemperature;
    const z = 2 + 10.5 * reduced * reduced;
    const psi =
      1 +
      (alpha * (0.215 + 0.28288 * alpha - 1.061 * beta + 0.26665 * z)) /
        (0.6366 + beta * z + 1.061 * alpha * beta);
    return factor * psi * known;
  };
  return {
    value: (temperature) => fromViscosity(temperature, viscosity.value(temperature)),
    fromViscosity,
    method: 'chungConductivity',
  };
}
