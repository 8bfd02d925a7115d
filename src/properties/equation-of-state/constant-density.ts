import type { FluidPropertyFunction } from '../fluid-property.js';
import type { EquationOfState } from './equation-of-state.js';

/**
 * A liquid of given density: v = Σ y_i M_i/ρ(T), whatever the composition. Its heat is that of its species alone (residuals zero), its
 * fugacity coefficients are one: rate laws of liquids are written in concentrations.
 *
 * @param density - kg/m³, > 0; may depend on temperature and pressure. Evaluation fails where it is not positive.
 * @param molarMasses - kg/mol, one per species
 * @source definition; partial volumes M_i/ρ are those of an ideal mixture of liquids of equal density
 */
export function createConstantDensity(
  density: FluidPropertyFunction,
  molarMasses: readonly number[],
): EquationOfState {
  const count = molarMasses.length;
  return {
    kind: 'constant_density',
    isIdealGas: false,
    evaluate(moleFractions, temperature, pressure, state) {
      const rho = density.value(temperature, pressure);
      let molarMass = 0;
      for (let i = 0; i < count; i++) {
        molarMass += moleFractions[i]! * molarMasses[i]!;
        state.partialMolarVolumes[i] = molarMasses[i]! / rho;
      }
      const volume = molarMass / rho;
      state.molarVolume = volume;
      state.volumeByTemperature = (-volume / rho) * density.temperatureDerivative(temperature, pressure);
      state.volumeByPressure = (-volume / rho) * density.pressureDerivative(temperature, pressure);
      // Residuals and ln φ are zero from the start, and nothing here writes them.
      return rho > 0 && volume > 0 && Number.isFinite(volume);
    },
  };
}
