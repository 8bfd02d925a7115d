/** Viscosity, thermal conductivity and diffusivities of a gas mixture at given composition, temperature and pressure. */
import type { SpeciesRecord } from '../species-record.js';
import { binaryDiffusivityCoefficients } from './binary-diffusivity.js';
import type { MixingRule } from './mixture-diffusivity.js';
import { lucasPressureFactor, stielThodosExcess, takahashiFactor } from './pressure-corrections.js';
import { createPseudoCritical } from './pseudo-critical.js';
import { createGasConductivity } from './pure-gas-conductivity.js';
import { createGasViscosity } from './pure-gas-viscosity.js';
import { mixWithFactors, WilkeFactors } from './wilke-factors.js';

export interface GasTransportOptions {
  readonly records: readonly SpeciesRecord[];
  /** Ideal-gas heat capacities, J/(mol K), one per species; read where conductivity is wanted. */
  readonly heatCapacities: readonly ((temperature: number) => number)[];
  readonly mixing: MixingRule;
  /** Whether the values are corrected for pressure. */
  readonly isCorrected: boolean;
  /** What is going to be asked for; the records need to hold data for no more. */
  readonly wants: {
    readonly viscosity: boolean;
    readonly conductivity: boolean;
    readonly diffusivity: boolean;
  };
}

/** All three read mole fractions (sum 1), K and Pa. What was not wanted throws. */
export interface GasTransport {
  /** Pa s */
  readonly viscosity: (moleFractions: Float64Array, temperature: number, pressure: number) => number;
  /** W/(m K). @param molarDensity - mol/m³, for the correction at pressure */
  readonly conductivity: (
    moleFractions: Float64Array,
    temperature: number,
    pressure: number,
    molarDensity: number,
  ) => number;
  /** m²/s in the mixture, one per species, into `target`; false where a value is not positive. */
  readonly diffusivitiesInto: (
    moleFractions: Float64Array,
    temperature: number,
    pressure: number,
    target: Float64Array,
  ) => boolean;
}

/**
 * @throws RangeError where a record lacks what is wanted
 * @source mixtures of viscosity Wilke (1950), of conductivity Wassiljewa (1904) with Mason & Saxena (1958); pure gases, pairs and pressure as
 *   their modules say
 */
export function createGasTransport(options: GasTransportOptions): GasTransport {
  const { records, heatCapacities, mixing, isCorrected, wants } = options;
  const count = records.length;
  const wantsViscosity = wants.viscosity || wants.conductivity;
  const viscosityOf = wantsViscosity ? records.map(createGasViscosity) : [];
  const conductivityOf = wants.conductivity
    ? records.map((record, i) => createGasConductivity(record, heatCapacities[i]!, viscosityOf[i]!))
    : [];
  const coefficients = wants.diffusivity ? binaryDiffusivityCoefficients(records) : new Float64Array(0);
  const pseudoCritical = isCorrected ? createPseudoCritical(records) : undefined;
  const factors = new WilkeFactors(records.map(({ molarMass }) => molarMass));
  const viscosities = new Float64Array(count);
  const conductivities = new Float64Array(count);
  let preparedTemperature = Number.NaN;
  const preparedFractions = new Float64Array(count).fill(Number.NaN);
  let denominators: Float64Array = new Float64Array(count);

  /** Viscosities of the gases and what mixing needs, which viscosity and conductivity share. */
  const prepare = (moleFractions: Float64Array, temperature: number): void => {
    let isPrepared = temperature === preparedTemperature;
    if (!isPrepared) {
      preparedTemperature = temperature;
      for (let i = 0; i < count; i++) viscosities[i] = viscosityOf[i]!.value(temperature);
    }
    for (let i = 0; i < count; i++) {
      isPrepared = isPrepared && moleFractions[i] === preparedFractions[i];
      preparedFractions[i] = moleFractions[i]!;
    }
    if (!isPrepared) denominators = factors.denominatorsAt(moleFractions, viscosities);
  };

  return {
    viscosity(moleFractions, temperature, pressure) {
      prepare(moleFractions, temperature);
      const dilute = mixWithFactors(moleFractions, viscosities, denominators);
      if (!pseudoCritical) return dilute;
      const critical = pseudoCritical(moleFractions);
      return (
        dilute *
        lucasPressureFactor(
          temperature / critical.temperature,
          pressure / critical.pressure,
          critical.polarFactor,
        )
      );
    },
    conductivity(moleFractions, temperature, _pressure, molarDensity) {
      prepare(moleFractions, temperature);
      for (let i = 0; i < count; i++) {
        conductivities[i] = conductivityOf[i]!.fromViscosity(temperature, viscosities[i]!);
      }
      const dilute = mixWithFactors(moleFractions, conductivities, denominators);
      return pseudoCritical
        ? dilute + stielThodosExcess(molarDensity, pseudoCritical(moleFractions))
        : dilute;
    },
    diffusivitiesInto(moleFractions, temperature, pressure, target) {
      let scale = temperature ** 1.75 / pressure;
      if (pseudoCritical) {
        const critical = pseudoCritical(moleFractions);
        scale *= takahashiFactor(temperature / critical.temperature, pressure / critical.pressure);
      }
      return mixing(moleFractions, coefficients, scale, target);
    },
  };
}
