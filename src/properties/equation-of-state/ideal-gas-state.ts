import { gasConstant } from '../../quantities/constants.js';
import type { EquationOfState } from './equation-of-state.js';

/** P v = R T: partial volumes are equal, residuals and ln φ zero. */
export const idealGasState: EquationOfState = {
  kind: 'ideal',
  isIdealGas: true,
  evaluate(_moleFractions, temperature, pressure, state) {
    const molarVolume = (gasConstant * temperature) / pressure;
    state.molarVolume = molarVolume;
    state.volumeByTemperature = gasConstant / pressure;
    state.volumeByPressure = -molarVolume / pressure;
    state.partialMolarVolumes.fill(molarVolume);
    // Residuals and ln φ are zero from the start, and nothing here writes them.
    return true;
  },
};
