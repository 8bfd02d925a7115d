/**
 * Viscosity of a pure gas at low pressure: the record's own, else kinetic theory. Corresponding states with polar and association
 * corrections serve all gases but the quantum gases hydrogen and helium, whose own force constants do better.
 */
import { createPropertyFunction } from '../fluid-property.js';
import type { SpeciesRecord } from '../species-record.js';
import type { MissingFields, PureGasProperty } from './pure-gas-property.js';

/** C m in a debye. */
const debye = 3.33564e-30;
const angstrom = 1e-10;
/** K: gases with a lower critical temperature (hydrogen, helium) do not follow corresponding states. */
const quantumCriticalTemperature = 40;
/** Low-pressure data as given hold at any pressure of a formula: one atmosphere. */
const lowPressure = 101_325;

/**
 * Collision integral for viscosity.
 *
 * @param reducedTemperature - T over the well depth, 0.3 to 100
 * @source Neufeld, Janzen & Aziz (1972), J. Chem. Phys. 57, 1100
 */
export function viscosityCollisionIntegral(reducedTemperature: number): number {
  return (
    1.16145 * reducedTemperature ** -0.14874 +
    0.52487 * Math.exp(-0.7732 * reducedTemperature) +
    2.16178 * Math.exp(-2.43787 * reducedTemperature)
  );
}

const chungFields = [
  'criticalTemperature',
  'criticalVolume',
  'acentricFactor',
] as const satisfies readonly (keyof SpeciesRecord)[];

/** What the record lacks for a viscosity; empty where there is one. */
export function missingForViscosity(record: SpeciesRecord): MissingFields {
  if (record.viscosity || usesLennardJones(record)) return [];
  return chungFields.filter((field) => record[field] === undefined);
}

/**
 * @returns Pa s as a function of temperature
 * @throws RangeError where {@link missingForViscosity} names anything
 * @source Chung, Ajlan, Lee & Starling (1988), Ind. Eng. Chem. Res. 27, 671; Chapman & Enskog with Lennard-Jones constants for H2 and He
 * @range dilute gases, about 0.7 Tc upwards; average error 1.5 % non-polar, a few per cent polar
 */
export function createGasViscosity(record: SpeciesRecord): PureGasProperty {
  if (record.viscosity) {
    const { value } = createPropertyFunction(record.viscosity);
    return { value: (temperature) => value(temperature, lowPressure), method: 'given' };
  }
  const molarMass = record.molarMass * 1e3; // g/mol
  if (usesLennardJones(record)) {
    const { collisionDiameter, wellDepth } = record.lennardJones!;
    const factor = (26.69e-7 * Math.sqrt(molarMass)) / (collisionDiameter / angstrom) ** 2;
    return {
      value: (temperature) =>
        (factor * Math.sqrt(temperature)) / viscosityCollisionIntegral(temperature / wellDepth),
      method: 'lennardJones',
    };
  }
  const missing = missingForViscosity(record);
  if (missing.length > 0) throw new RangeError(`${record.id} has no ${missing.join(', ')}`);
  const criticalTemperature = record.criticalTemperature!;
  const criticalVolume = record.criticalVolume! * 1e6; // cm³/mol
  const reducedDipole =
    (131.3 * (record.dipoleMoment ?? 0)) / debye / Math.sqrt(criticalVolume * criticalTemperature);
  const shapeFactor =
    1 - 0.2756 * record.acentricFactor! + 0.059035 * reducedDipole ** 4 + (record.associationFactor ?? 0);
  const factor = (40.785e-7 * shapeFactor * Math.sqrt(molarMass)) / criticalVolume ** (2 / 3);
  const reduce = 1.2593 / criticalTemperature;
  return {
    value: (temperature) =>
      (factor * Math.sqrt(temperature)) / viscosityCollisionIntegral(reduce * temperature),
    method: 'chung',
  };
}

function usesLennardJones({ criticalTemperature, lennardJones }: SpeciesRecord): boolean {
  return (
    lennardJones !== undefined &&
    criticalTemperature !== undefined &&
    criticalTemperature < quantumCriticalTemperature
  );
}
