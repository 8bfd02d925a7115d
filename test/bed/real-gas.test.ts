/** Beds of real gases against an independent solution and against what thermodynamics demands of them. */
import { describe, expect, it } from 'vitest';
import { solveReactor } from '../../src/bed/solve-reactor.js';
import { readCase } from '../../src/case/read-case.js';
import { readReference } from '../reference/read-reference.js';

interface RealGasReference {
  readonly values: {
    readonly mole_fractions: readonly number[];
    readonly temperature_K: number;
    readonly pressure_drop_Pa: number;
    readonly compressibility_factor: number;
    readonly fugacity_coefficients: readonly number[];
    readonly viscosity_Pa_s: number;
  };
}

const ammoniaBed = `bedwright: 1
species: {N2: library, H2: library, NH3: library, Ar: library}
reactions:
  - name: synthesis
    equation: N2 + 3 H2 <=> 2 NH3
    rate: k * (K_eq / (1 bar)^2 * f.N2 * f.H2^1.5 / f.NH3 - f.NH3 / f.H2^1.5)
    per: bed_volume
    constants: {k: {prefactor: "0.9e15 kmol atm^0.5/(m^3 h)", activation_energy: 40765 cal/mol}}
feed:
  temperature: 653.15 K
  pressure: 150 bar
  mass_flux: 4 kg/(m^2 s)
  mole_fractions: {N2: 0.225, H2: 0.675, NH3: 0.03, Ar: 0.07}
fluid:
  equation_of_state: peng_robinson
  binary_interaction: {N2: {H2: 0.1, NH3: 0.22}}
  pressure_correction: false
pellet: {shape: {sphere: {diameter: 4 mm}}, density: 2800 kg/m^3, method: intrinsic}
bed: {tube_diameter: 2 m, length: 0.5 m, void_fraction: 0.42, pressure_drop: ergun}
heat: {mode: adiabatic}
numerics: {tolerance: 1e-8}
`;

describe('adiabatic ammonia bed, Peng–Robinson, against SciPy (test/reference/real-gas-bed.py)', () => {
  const { values } = readReference('real-gas-bed.json') as RealGasReference;
  const result = solveReactor(readCase(ammoniaBed, 'ammonia.yaml').specification);
  const outlet = result.transport.find(({ label }) => label === 'outlet')!;

  it('composition, temperature and pressure drop at the outlet', () => {
    result.outlet.moleFractions.forEach((fraction, i) => {
      expect(Math.abs(fraction - values.mole_fractions[i]!)).toBeLessThan(2e-8);
    });
    expect(Math.abs(result.outlet.temperature - values.temperature_K)).toBeLessThan(1e-5);
    expect(result.pressureDrop / values.pressure_drop_Pa - 1).toBeCloseTo(0, 6);
  });

  it('compressibility, fugacity coefficients and viscosity there', () => {
    expect(outlet.compressibilityFactor / values.compressibility_factor - 1).toBeCloseTo(0, 8);
    outlet.species.forEach(({ speciesIndex, fugacityCoefficient }) => {
      expect(fugacityCoefficient / values.fugacity_coefficients[speciesIndex]! - 1).toBeCloseTo(0, 7);
    });
    expect(outlet.viscosity! / values.viscosity_Pa_s - 1).toBeCloseTo(0, 6);
  });

  it('mass, elements and energy close, the departure from the ideal gas included', () => {
    expect(result.balances.mass).toBeLessThan(1e-12);
    expect(result.balances.energy).toBeLessThan(1e-11);
    for (const off of Object.values(result.balances.elements)) expect(off).toBeLessThan(1e-12);
  });
});
