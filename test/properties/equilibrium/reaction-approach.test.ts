import { describe, expect, it } from 'vitest';
import { createEquilibrium } from '../../../src/properties/equilibrium/equilibrium-composition.js';
import {
  equilibriumTemperature,
  logReactionQuotient,
} from '../../../src/properties/equilibrium/reaction-approach.js';
import { createEquilibriumConstant } from '../../../src/properties/reaction-equilibrium.js';
import { findLibrarySpecies } from '../../../src/properties/species/library.js';
import { createSpeciesThermochemistry } from '../../../src/properties/thermochemistry.js';

const shift = [-1, -1, 1, 1];
const thermochemistry = ['CO', 'H2O', 'CO2', 'H2'].map((id) =>
  createSpeciesThermochemistry(findLibrarySpecies(id)!),
);
const none = new Float64Array(4);

describe('approach of one reaction to equilibrium', () => {
  it('a mixture at equilibrium has the temperature at which it was made', () => {
    const constant = createEquilibriumConstant(shift, thermochemistry);
    const { moleFractions } = createEquilibrium({ stoichiometry: [shift], thermochemistry }).atTemperature(
      [0.3, 0.5, 0.05, 0.15],
      712,
      8e5,
    )!;
    const quotient = logReactionQuotient(shift, moleFractions, 8e5, none);
    expect(quotient).toBeCloseTo(constant.logarithm(712), 10);
    expect(equilibriumTemperature(quotient, constant, [300, 2000])).toBeCloseTo(712, 8);
  });

  it('absent species make the quotient nothing or all', () => {
    expect(logReactionQuotient(shift, [0.5, 0.5, 0, 0], 1e5, none)).toBe(-Infinity);
    expect(logReactionQuotient(shift, [0, 0.5, 0.2, 0.3], 1e5, none)).toBe(Infinity);
    expect(logReactionQuotient(shift, [0, 0.5, 0, 0.5], 1e5, none)).toBeNaN();
    expect(
      equilibriumTemperature(-Infinity, createEquilibriumConstant(shift, thermochemistry), [300, 2000]),
    ).toBeNaN();
  });

  it('counts fugacity coefficients and pressure: ammonia by hand', () => {
    // ln Q = 2 ln(φ y P) - ln(φ y P) - 3 ln(φ y P), pressures in bar.
    const quotient = logReactionQuotient(
      [-1, -3, 2],
      [0.2, 0.6, 0.2],
      100e5,
      [0.1, 0.05, -0.2].map((x) => x),
    );
    const by = (y: number, phi: number): number => Math.log(100 * y) + phi;
    expect(quotient).toBeCloseTo(2 * by(0.2, -0.2) - by(0.2, 0.1) - 3 * by(0.6, 0.05), 12);
  });
});
