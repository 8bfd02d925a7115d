import type { Dimension } from './dimension.js';

/** A kind of quantity that a key of the case file asks for. */
export interface QuantityKind {
  readonly id: string;
  readonly dimension: Dimension;
  /** With article, for messages: `a length`. */
  readonly noun: string;
  /** A value as a user would write it. */
  readonly example: string;
  /** Units that fit, most usual first. */
  readonly units: readonly string[];
  /** Temperatures on a scale take degC; differences do not. */
  readonly isTemperature?: true;
}

function kind(
  id: string,
  dimension: Dimension,
  noun: string,
  example: string,
  units: readonly string[],
  isTemperature?: true,
): QuantityKind {
  return { id, dimension, noun, example, units, ...(isTemperature && { isTemperature }) };
}

/** Names under which the case reader asks for them. */
export type QuantityKindName =
  | 'length'
  | 'temperature'
  | 'temperatureDifference'
  | 'pressure'
  | 'pressureDifference'
  | 'molarFlow'
  | 'massFlow'
  | 'massFlux'
  | 'velocity'
  | 'volumetricFlow'
  | 'spaceVelocity'
  | 'density'
  | 'viscosity'
  | 'thermalConductivity'
  | 'heatCapacityPerMass'
  | 'heatCapacityPerAmount'
  | 'diffusivity'
  | 'massTransferCoefficient'
  | 'heatTransferCoefficient'
  | 'molarMass'
  | 'molarVolume'
  | 'molarEnergy'
  | 'molarEntropy'
  | 'fraction';

/** The kinds by name; one dimension may belong to several. */
export const quantityKinds: Readonly<Record<QuantityKindName, QuantityKind>> = {
  length: kind('length', [0, 1, 0, 0, 0], 'a length', '4 mm', ['m', 'mm', 'cm', 'inch', 'ft']),
  temperature: kind('temperature', [0, 0, 0, 0, 1], 'a temperature', '640 K', ['K', 'degC', 'degF'], true),
  temperatureDifference: kind('temperature_difference', [0, 0, 0, 0, 1], 'a temperature difference', '25 K', [
    'K',
  ]),
  pressure: kind('pressure', [1, -1, -2, 0, 0], 'an absolute pressure', '1.6 bar', [
    'bar',
    'Pa',
    'kPa',
    'atm',
    'psi',
  ]),
  pressureDifference: kind('pressure_difference', [1, -1, -2, 0, 0], 'a pressure difference', '0.5 bar', [
    'bar',
    'Pa',
    'kPa',
    'psi',
  ]),
  molarFlow: kind('molar_flow', [0, 0, -1, 1, 0], 'a molar flow', '12 mol/s', ['mol/s', 'kmol/h', 'Nm3/h']),
  massFlow: kind('mass_flow', [1, 0, -1, 0, 0], 'a mass flow', '0.4 kg/s', ['kg/s', 'kg/h', 't/h']),
  massFlux: kind('mass_flux', [1, -2, -1, 0, 0], 'a mass flux', '1.3 kg/(m^2 s)', [
    'kg/(m^2 s)',
    'kg/(m^2 h)',
  ]),
  velocity: kind('velocity', [0, 1, -1, 0, 0], 'a velocity', '0.8 m/s', ['m/s', 'cm/s', 'ft/s']),
  volumetricFlow: kind('volumetric_flow', [0, 3, -1, 0, 0], 'a volumetric flow', '25 m^3/h', [
    'm^3/s',
    'm^3/h',
    'L/min',
  ]),
  spaceVelocity: kind('space_velocity', [0, 0, -1, 0, 0], 'a space velocity', '3000 1/h', ['1/h', '1/s']),
  density: kind('density', [1, -3, 0, 0, 0], 'a density', '1800 kg/m^3', ['kg/m^3', 'g/cm^3']),
  viscosity: kind('viscosity', [1, -1, -1, 0, 0], 'a dynamic viscosity', '3.1e-5 Pa s', [
    'Pa s',
    'mPa s',
    'cP',
  ]),
  thermalConductivity: kind(
    'thermal_conductivity',
    [1, 1, -3, 0, -1],
    'a thermal conductivity',
    '0.35 W/(m K)',
    ['W/(m K)', 'mW/(m K)'],
  ),
  heatCapacityPerMass: kind(
    'heat_capacity_per_mass',
    [0, 2, -2, 0, -1],
    'a heat capacity per mass',
    '1060 J/(kg K)',
    ['J/(kg K)', 'kJ/(kg K)', 'kcal/(kg K)'],
  ),
  heatCapacityPerAmount: kind(
    'heat_capacity_per_amount',
    [1, 2, -2, -1, -1],
    'a molar heat capacity',
    '31 J/(mol K)',
    ['J/(mol K)', 'kJ/(kmol K)', 'cal/(mol K)'],
  ),
  diffusivity: kind('diffusivity', [0, 2, -1, 0, 0], 'a diffusivity', '1.3e-6 m^2/s', ['m^2/s', 'cm^2/s']),
  massTransferCoefficient: kind(
    'mass_transfer_coefficient',
    [0, 1, -1, 0, 0],
    'a mass transfer coefficient',
    '0.075 m/s',
    ['m/s', 'cm/s'],
  ),
  heatTransferCoefficient: kind(
    'heat_transfer_coefficient',
    [1, 0, -3, 0, -1],
    'a heat transfer coefficient',
    '190 W/(m^2 K)',
    ['W/(m^2 K)', 'kcal/(m^2 h K)'],
  ),
  molarMass: kind('molar_mass', [1, 0, 0, -1, 0], 'a molar mass', '44.01 g/mol', [
    'g/mol',
    'kg/kmol',
    'kg/mol',
  ]),
  molarVolume: kind('molar_volume', [0, 3, 0, -1, 0], 'a volume per amount', '94.1 cm^3/mol', [
    'cm^3/mol',
    'm^3/mol',
  ]),
  molarEnergy: kind('molar_energy', [1, 2, -2, -1, 0], 'an energy per amount', '-41.2 kJ/mol', [
    'kJ/mol',
    'J/mol',
    'kcal/mol',
  ]),
  molarEntropy: kind('molar_entropy', [1, 2, -2, -1, -1], 'an entropy per amount', '197.7 J/(mol K)', [
    'J/(mol K)',
    'cal/(mol K)',
  ]),
  fraction: kind('fraction', [0, 0, 0, 0, 0], 'a fraction', '42 %', ['%', 'ppm', 'none']),
};
