import type { SpeciesRecord } from '../../properties/species-record.js';

/** Keys of a species in the case file by the fields of its record. */
export const recordKeys: Readonly<Record<keyof SpeciesRecord, string>> = {
  id: 'id',
  name: 'name',
  molarMass: 'molar_mass',
  elements: 'formula',
  heatCapacity: 'heat_capacity',
  enthalpyOfFormation: 'heat_of_formation',
  standardEntropy: 'entropy',
  criticalTemperature: 'critical_temperature',
  criticalPressure: 'critical_pressure',
  criticalVolume: 'critical_volume',
  acentricFactor: 'acentric_factor',
  dipoleMoment: 'dipole_moment',
  associationFactor: 'association_factor',
  lennardJones: 'collision_diameter',
  diffusionVolume: 'diffusion_volume',
  viscosity: 'viscosity',
  thermalConductivity: 'thermal_conductivity',
  source: 'source',
};
