import { describe, expect, it } from 'vitest';
import type { SpeciesRecord } from '../../src/properties/species-record.js';
import {
  createEquilibriumConstant,
  enthalpyChange,
  entropyChange,
  hasEquilibriumConstant,
} from '../../src/properties/reaction-equilibrium.js';
import { findLibrarySpecies } from '../../src/properties/species/library.js';
import {
  createSpeciesThermochemistry,
  type SpeciesThermochemistry,
} from '../../src/properties/thermochemistry.js';
import { gasConstant } from '../../src/quantities/constants.js';

const library = (id: string): SpeciesThermochemistry => createSpeciesThermochemistry(findLibrarySpecies(id)!);

const reactions = [
  { name: 'CO + H2O = CO2 + H2', ids: ['CO', 'H2O', 'CO2', 'H2'], stoichiometry: [-1, -1, 1, 1] },
  { name: 'CH4 + H2O = CO + 3 H2', ids: ['CH4', 'H2O', 'CO', 'H2'], stoichiometry: [-1, -1, 1, 3] },
  { name: 'o-xylene = m-xylene (ranges to 2000 K)', ids: ['o_xylene', 'm_xylene'], stoichiometry: [-1, 1] },
  { name: 'a spectator without data', ids: ['N2', 'H2', 'NH3', 'X'], stoichiometry: [-0.5, -1.5, 1, 0] },
] as const;

const unknown = createSpeciesThermochemistry({ id: 'X', molarMass: 0.05, source: 'test' });

describe.each(reactions)('$name', ({ ids, stoichiometry }) => {
  const species = ids.map((id) => (id === 'X' ? unknown : library(id)));
  const constant = createEquilibriumConstant(stoichiometry, species);

  it('ln K is -ΔG/(RT), from the species one by one', () => {
    for (const T of [300, 650, 999.99, 1000.01, 1400]) {
      const gibbs = enthalpyChange(stoichiometry, species, T) - T * entropyChange(stoichiometry, species, T);
      expect(constant.logarithm(T)).toBeCloseTo(-gibbs / (gasConstant * T), 9);
      expect(Math.log(constant.value(T))).toBeCloseTo(constant.logarithm(T), 9);
    }
  });

  it("derivative is van 't Hoff's, as the difference says", () => {
    for (const T of [320, 650, 1200]) {
      const step = 1e-3;
      const difference = (constant.value(T + step) - constant.value(T - step)) / (2 * step);
      expect(constant.derivative(T) / difference).toBeCloseTo(1, 6);
    }
  });
});

it('reversing a reaction inverts its constant; adding two multiplies theirs', () => {
  const species = ['CH4', 'H2O', 'CO', 'H2', 'CO2'].map(library);
  const K = (row: readonly number[]): number => createEquilibriumConstant(row, species).value(900);
  const reforming = [-1, -1, 1, 3, 0];
  const shift = [0, -1, -1, 1, 1];
  expect(K(reforming) * K(reforming.map((value) => -value))).toBeCloseTo(1, 10);
  expect((K(reforming) * K(shift)) / K([-1, -2, 0, 4, 1])).toBeCloseTo(1, 10);
});

it('polynomial and formula data give the same constant', () => {
  // The same constant heat capacities once as numbers and once as formulas, which take the path without polynomials.
  const base: SpeciesRecord = {
    id: 'A',
    molarMass: 0.02,
    enthalpyOfFormation: -5e4,
    standardEntropy: 190,
    source: 'test',
  };
  const other: SpeciesRecord = { ...base, id: 'B', enthalpyOfFormation: -9e4, standardEntropy: 170 };
  const asNumber = (record: SpeciesRecord, value: number): SpeciesThermochemistry =>
    createSpeciesThermochemistry({ ...record, heatCapacity: { kind: 'constant', value } });
  const asFormula = (record: SpeciesRecord, value: number): SpeciesThermochemistry =>
    createSpeciesThermochemistry({
      ...record,
      heatCapacity: {
        kind: 'formula',
        formula: {
          expression: { kind: 'number', value },
          dimension: [1, 2, -2, -1, -1],
          text: String(value),
        },
      },
    });
  const one = createEquilibriumConstant([-1, 1], [asNumber(base, 40), asNumber(other, 55)]);
  const two = createEquilibriumConstant([-1, 1], [asFormula(base, 40), asFormula(other, 55)]);
  for (const T of [280, 600, 1500]) {
    expect(two.value(T) / one.value(T)).toBeCloseTo(1, 10);
    expect(two.derivative(T) / one.derivative(T)).toBeCloseTo(1, 10);
  }
});

it('a species that lacks data leaves no constant', () => {
  expect(hasEquilibriumConstant([-1, 1], [library('CO'), unknown])).toBe(false);
  expect(createEquilibriumConstant([-1, 1], [library('CO'), unknown]).value(500)).toBeNaN();
});
