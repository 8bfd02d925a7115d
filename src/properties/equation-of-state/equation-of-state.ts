/** What an equation of state says of a mixture of given composition, temperature and pressure. */

export type EquationOfStateKind = 'ideal' | 'peng_robinson' | 'soave_redlich_kwong' | 'constant_density';

/** Volumetric and residual properties; one object is filled again and again. Arrays have one entry per species. */
export interface FluidState {
  /** m³/mol of mixture */
  molarVolume: number;
  /** m³/(mol K), pressure and composition held */
  volumeByTemperature: number;
  /** m³/(mol Pa), temperature and composition held; negative, or zero of what cannot be compressed */
  volumeByPressure: number;
  /** m³/mol; their mole-fraction mean is the molar volume */
  readonly partialMolarVolumes: Float64Array;
  /** J/mol of mixture: real fluid minus ideal gas at the same temperature, pressure and composition */
  residualEnthalpy: number;
  /** J/(mol K): change of the residual enthalpy with temperature, pressure and composition held */
  residualHeatCapacity: number;
  /** J/mol; their mole-fraction mean is the residual enthalpy */
  readonly partialResidualEnthalpies: Float64Array;
  /** ln φ_i, dimensionless */
  readonly logFugacityCoefficients: Float64Array;
}

export interface EquationOfState {
  readonly kind: EquationOfStateKind;
  readonly isIdealGas: boolean;
  /**
   * @param moleFractions - sum 1; slightly negative entries, as an integrator's trial states have them, are harmless
   * @param temperature - K, > 0
   * @param pressure - Pa, > 0
   * @param state - written
   * @returns false where the equation has no fluid of this kind
   */
  readonly evaluate: (
    moleFractions: Float64Array,
    temperature: number,
    pressure: number,
    state: FluidState,
  ) => boolean;
}

export function createFluidState(speciesCount: number): FluidState {
  return {
    molarVolume: 0,
    volumeByTemperature: 0,
    volumeByPressure: 0,
    partialMolarVolumes: new Float64Array(speciesCount),
    residualEnthalpy: 0,
    residualHeatCapacity: 0,
    partialResidualEnthalpies: new Float64Array(speciesCount),
    logFugacityCoefficients: new Float64Array(speciesCount),
  };
}
