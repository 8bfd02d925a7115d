import type { SpeciesRecord } from './species-record.js';
import { createSpeciesThermochemistry, referenceTemperature } from './thermochemistry.js';
import { createGasConductivity, missingForConductivity } from './transport/pure-gas-conductivity.js';
import type { PureGasProperty } from './transport/pure-gas-property.js';
import { createGasViscosity, missingForViscosity } from './transport/pure-gas-viscosity.js';

/** Properties of a pure ideal gas over temperature; one entry per temperature, NaN where the record does not tell. */
export interface PropertyTable {
  /** K */
  readonly temperatures: Float64Array;
  /** J/(mol K) */
  readonly heatCapacities: Float64Array;
  /** J/mol above 298.15 K */
  readonly enthalpies: Float64Array;
  /** J/(mol K) at 1 bar */
  readonly entropies: Float64Array;
  /** J/mol at 1 bar, counted from the elements at 298.15 K: H - T S */
  readonly gibbsEnergies: Float64Array;
  /** Pa s, at low pressure */
  readonly viscosities: Float64Array;
  /** W/(m K), at low pressure */
  readonly thermalConductivities: Float64Array;
  /** How the two are known; undefined where they are not. */
  readonly viscosityMethod: PureGasProperty['method'] | undefined;
  readonly conductivityMethod: PureGasProperty['method'] | undefined;
}

/** @param temperatures - K, > 0 */
export function propertyTable(record: SpeciesRecord, temperatures: readonly number[]): PropertyTable {
  const thermochemistry = createSpeciesThermochemistry(record);
  const reference = thermochemistry.enthalpy(referenceTemperature);
  const viscosity = missingForViscosity(record).length === 0 ? createGasViscosity(record) : undefined;
  const conductivity =
    viscosity && missingForConductivity(record).length === 0
      ? createGasConductivity(record, thermochemistry.heatCapacity, viscosity)
      : undefined;
  const column = (of: (temperature: number) => number): Float64Array => Float64Array.from(temperatures, of);
  return {
    temperatures: Float64Array.from(temperatures),
    heatCapacities: column(thermochemistry.heatCapacity),
    enthalpies: column((temperature) => thermochemistry.enthalpy(temperature) - reference),
    entropies: column(thermochemistry.entropy),
    gibbsEnergies: column(
      (temperature) =>
        thermochemistry.enthalpy(temperature) - temperature * thermochemistry.entropy(temperature),
    ),
    viscosities: column((temperature) => viscosity?.value(temperature) ?? Number.NaN),
    thermalConductivities: column((temperature) => conductivity?.value(temperature) ?? Number.NaN),
    viscosityMethod: viscosity?.method,
    conductivityMethod: conductivity?.method,
  };
}
