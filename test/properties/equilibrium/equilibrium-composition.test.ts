/** Equilibrium compositions against an independent minimisation, closed forms and what equilibrium must do. */
import { describe, expect, it } from 'vitest';
import {
  createEquilibrium,
  type Equilibrium,
} from '../../../src/properties/equilibrium/equilibrium-composition.js';
import { reachableReactions } from '../../../src/properties/equilibrium/reachable-species.js';
import { findLibrarySpecies } from '../../../src/properties/species/library.js';
import { createSpeciesThermochemistry } from '../../../src/properties/thermochemistry.js';
import { createEquilibriumConstant } from '../../../src/properties/reaction-equilibrium.js';
import { readReference } from '../../reference/read-reference.js';

const thermochemistryOf = (ids: readonly string[]): ReturnType<typeof createSpeciesThermochemistry>[] =>
  ids.map((id) => createSpeciesThermochemistry(findLibrarySpecies(id)!));
const equilibriumOf = (ids: readonly string[], stoichiometry: readonly (readonly number[])[]): Equilibrium =>
  createEquilibrium({ stoichiometry, thermochemistry: thermochemistryOf(ids) });
const totalOf = (values: ArrayLike<number>): number =>
  Array.from(values).reduce((sum, value) => sum + value, 0);

interface ReferenceSystem {
  readonly name: string;
  readonly species: readonly string[];
  readonly feed: readonly number[];
  readonly temperature_K: number;
  readonly pressure_Pa: number;
  readonly mole_fractions: readonly number[];
  readonly adiabatic_temperature_K: number;
  readonly adiabatic_mole_fractions: readonly number[];
}

/** Reactions of the systems of the reference, species in its order. */
const reactionsOf: Readonly<Record<string, readonly (readonly number[])[]>> = {
  'water-gas shift of a reformer gas': [[-1, -1, 1, 1, 0]],
  'ammonia synthesis': [[-1, -3, 2]],
  'steam reforming of methane with shift': [
    [-1, -1, 1, 3, 0],
    [0, -1, -1, 1, 1],
  ],
  'oxidation of sulfur dioxide': [[-1, -0.5, 1, 0]],
};

describe('against minimisation by SciPy (test/reference/equilibrium-composition.py)', () => {
  const { systems } = readReference('equilibrium-composition.json') as {
    readonly systems: readonly ReferenceSystem[];
  };

  it.each(systems)('$name', (system) => {
    const equilibrium = equilibriumOf(system.species, reactionsOf[system.name]!);
    const isothermal = equilibrium.atTemperature(system.feed, system.temperature_K, system.pressure_Pa)!;
    system.mole_fractions.forEach((fraction, i) => {
      expect(Math.abs(isothermal.moleFractions[i]! - fraction)).toBeLessThan(1e-10);
    });
    const adiabatic = equilibrium.adiabatic(system.feed, system.temperature_K, system.pressure_Pa)!;
    expect(Math.abs(adiabatic.temperature - system.adiabatic_temperature_K)).toBeLessThan(1e-6);
    system.adiabatic_mole_fractions.forEach((fraction, i) => {
      expect(Math.abs(adiabatic.moleFractions[i]! - fraction)).toBeLessThan(1e-9);
    });
  });
});

describe('closed form: dissociation A = 2 B', () => {
  // With one mole of A: K p°/P (1 - ξ)(1 + ξ) = 4 ξ², ξ = √(κ/(4 + κ)), κ = K p°/P.
  it.each([300, 700, 1500, 3000, 5500])(
    'nitrogen tetroxide’s kin: O2-like K over many decades at %d K',
    (temperature) => {
      const ids = ['H2O', 'H2', 'O2'];
      const pressure = 3e4;
      const constant = createEquilibriumConstant([-1, 1, 0.5], thermochemistryOf(ids));
      const state = equilibriumOf(ids, [[-1, 1, 0.5]]).atTemperature([1, 0, 0], temperature, pressure)!;
      const [water, hydrogen, oxygen] = state.moleFractions as unknown as [number, number, number];
      // Q = K to the last digits, hydrogen twice the oxygen, however small both are.
      const logQuotient = Math.log(hydrogen) + 0.5 * Math.log((oxygen * pressure) / 1e5) - Math.log(water);
      expect(Math.abs(logQuotient - constant.logarithm(temperature))).toBeLessThan(1e-9);
      expect(Math.abs(hydrogen / oxygen - 2)).toBeLessThan(1e-9);
      expect(Math.abs(totalOf(state.moleFractions) - 1)).toBeLessThan(1e-12);
    },
  );
});

describe('what equilibrium must do', () => {
  const ids = ['CH4', 'H2O', 'CO', 'H2', 'CO2', 'N2'];
  const reforming = [-1, -1, 1, 3, 0, 0];
  const shift = [0, -1, -1, 1, 1, 0];
  const total = [-1, -2, 0, 4, 1, 0];
  const feed = [1, 2.7, 0.1, 0.4, 0.2, 0.6];

  it('stays where it is', () => {
    const equilibrium = equilibriumOf(ids, [reforming, shift]);
    const once = equilibrium.atTemperature(feed, 1100, 15e5)!;
    const twice = equilibrium.atTemperature(once.amounts, 1100, 15e5)!;
    once.amounts.forEach((amount, i) => {
      expect(Math.abs(twice.amounts[i]! / amount - 1)).toBeLessThan(1e-10);
    });
  });

  it('does not mind order, scale or dependence of the reactions', () => {
    const plain = equilibriumOf(ids, [reforming, shift]).atTemperature(feed, 1000, 10e5)!;
    for (const rows of [
      [shift, reforming],
      [reforming, total],
      [total, shift, reforming],
      [reforming.map((c) => -3 * c), shift],
    ]) {
      const other = equilibriumOf(ids, rows).atTemperature(feed, 1000, 10e5)!;
      plain.amounts.forEach((amount, i) => {
        expect(Math.abs(other.amounts[i]! / amount - 1)).toBeLessThan(1e-9);
      });
    }
  });

  it('keeps every element', () => {
    const { amounts } = equilibriumOf(ids, [reforming, shift]).atTemperature(feed, 900, 30e5)!;
    for (const element of ['C', 'H', 'O', 'N']) {
      const content = (of: ArrayLike<number>): number =>
        ids.reduce((sum, id, i) => sum + of[i]! * (findLibrarySpecies(id)!.elements![element] ?? 0), 0);
      expect(content(amounts) / content(feed)).toBeCloseTo(1, 12);
    }
  });

  it('leaves alone what cannot react', () => {
    const state = equilibriumOf(ids, [reforming, shift]).atTemperature([1, 0, 0, 0, 0, 2], 900, 1e5)!;
    expect([...state.amounts]).toEqual([1, 0, 0, 0, 0, 2]);
    expect(reachableReactions([reforming, shift], [1, 0, 0, 0, 0, 2]).reactions).toEqual([]);
  });

  it('starts a reaction from its products, and one that another one feeds', () => {
    expect(reachableReactions([shift, reforming], [1, 1, 0, 0, 0, 0]).reactions).toEqual([0, 1]);
    expect(reachableReactions([reforming], [0, 0, 1, 1, 0, 0]).reactions).toEqual([0]);
  });

  it('is reached from two hundred random mixtures over wide ranges, each quotient equal to its constant', () => {
    const equilibrium = equilibriumOf(ids, [reforming, shift]);
    const constants = [reforming, shift].map((row) => createEquilibriumConstant(row, thermochemistryOf(ids)));
    // A fixed sequence; the golden ratio spreads it.
    const spread = (k: number, n: number): number => ((k + 1) * 0.6180339887498949 * (n + 1.37)) % 1;
    for (let k = 0; k < 200; k++) {
      const amounts = ids.map((_id, i) => 10 ** (-8 * spread(k, i)));
      const temperature = 250 + 2500 * spread(k, 7);
      const pressure = 10 ** (3 + 4.5 * spread(k, 9));
      const state = equilibrium.atTemperature(amounts, temperature, pressure);
      expect(state, `mixture ${k}`).toBeDefined();
      [reforming, shift].forEach((row, r) => {
        const quotient = row.reduce(
          (sum, coefficient, i) =>
            coefficient === 0
              ? sum
              : sum + coefficient * Math.log((state!.moleFractions[i]! * pressure) / 1e5),
          0,
        );
        expect(Math.abs(quotient - constants[r]!.logarithm(temperature)), `mixture ${k}`).toBeLessThan(1e-7);
      });
    }
  });

  it('has no adiabatic end where that lies beyond the data', () => {
    const burn = [-1, -1, 1, 1];
    const equilibrium = equilibriumOf(['C3H6', 'O2', 'acrolein', 'H2O'], [burn]);
    expect(equilibrium.adiabatic([0.02, 0.4, 0, 1], 600, 1e5)).toBeDefined();
    // Undiluted it would pass 1500 K, where the data of acrolein end.
    expect(equilibrium.adiabatic([1, 1, 0, 0], 900, 1e5)).toBeUndefined();
  });
});
