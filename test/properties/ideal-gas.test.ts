import { expect, it } from 'vitest';
import { idealGasConcentration, idealGasDensity, meanMolarMass } from '../../src/properties/ideal-gas.js';
import { findLibrarySpecies } from '../../src/properties/species/library.js';

it('one mole at 273.15 K and 101325 Pa takes up 22.413 969 54 L: molar volume of the ideal gas, CODATA 2018', () => {
  expect(1000 / idealGasConcentration(273.15, 101325)).toBeCloseTo(22.41396954, 7);
});

it('dry air of its main components has the tabulated molar mass and density', () => {
  // Mole fractions of the U.S. Standard Atmosphere (1976), whose molar mass is 28.9644 g/mol and whose density at 288.15 K, 101325 Pa is 1.2250 kg/m³.
  const ids = ['N2', 'O2', 'Ar', 'CO2'];
  const fractions = [0.78084, 0.209476, 0.00934, 0.000314];
  const masses = ids.map((id) => findLibrarySpecies(id)!.molarMass);
  const mean = meanMolarMass(fractions, masses);
  // Atomic weights have moved in the fifth digit since 1976.
  expect(Math.abs(mean / 0.0289644 - 1)).toBeLessThan(5e-5);
  expect(idealGasDensity(288.15, 101325, mean)).toBeCloseTo(1.225, 4);
});

it('mean molar mass does not depend on the unit of the amounts', () => {
  expect(meanMolarMass([3, 1], [0.002, 0.028])).toBe(meanMolarMass([0.75, 0.25], [0.002, 0.028]));
  expect(meanMolarMass([0, 0], [0.002, 0.028])).toBeNaN();
});
