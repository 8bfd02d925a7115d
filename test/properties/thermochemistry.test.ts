import { describe, expect, it } from 'vitest';
import type { CheckedFormula, Expression } from '../../src/expressions/expression.js';
import { findLibrarySpecies } from '../../src/properties/species/library.js';
import { libraryEntries } from '../../src/properties/species/library-data.js';
import type { SpeciesRecord } from '../../src/properties/species-record.js';
import { createSpeciesThermochemistry } from '../../src/properties/thermochemistry.js';
import { gasConstant } from '../../src/quantities/constants.js';
import { publishedHeatCapacities } from './published-heat-capacities.js';

const library = (id: string): ReturnType<typeof createSpeciesThermochemistry> =>
  createSpeciesThermochemistry(findLibrarySpecies(id)!);

describe.each(libraryEntries.map((entry) => [entry.id, entry] as const))(
  'library data of %s',
  (id, entry) => {
    const species = library(id);

    it('heat of formation and standard entropy come out of the polynomials', () => {
      // The program's R against the data set's: 5.7 ppm of the largest heat of formation (432 kJ/mol) is 2.5 J/mol.
      expect(Math.abs(species.enthalpy(298.15) - entry.enthalpyOfFormation[0])).toBeLessThan(20);
      expect(Math.abs(species.entropy(298.15) - entry.standardEntropy[0])).toBeLessThan(0.1);
      expect(Math.abs(species.heatCapacity(298.15) - entry.standardHeatCapacity[0])).toBeLessThan(0.01);
      expect(species).toMatchObject({
        hasHeatCapacity: true,
        hasEnthalpyOfFormation: true,
        hasStandardEntropy: true,
      });
    });

    it('heat capacity, enthalpy and entropy are continuous where ranges meet', () => {
      for (const { highest } of entry.thermochemistry.ranges.slice(0, -1)) {
        const below = highest * (1 - 1e-12);
        // The published records close their joints to about 1e-6 of R; the refitted ones were made continuous.
        expect(Math.abs(species.heatCapacity(highest) - species.heatCapacity(below))).toBeLessThan(0.02);
        expect(Math.abs(species.enthalpy(highest) - species.enthalpy(below))).toBeLessThan(10);
        expect(Math.abs(species.entropy(highest) - species.entropy(below))).toBeLessThan(0.01);
      }
    });

    it('enthalpy and entropy are the integrals of the heat capacity', () => {
      for (const temperature of [320, 500, 800, 1100, 1400]) {
        const step = 1e-3 * temperature;
        const [low, high] = [temperature - step, temperature + step];
        const slope = (species.enthalpy(high) - species.enthalpy(low)) / (2 * step);
        const entropySlope = (species.entropy(high) - species.entropy(low)) / (2 * step);
        // Central differences at a relative step of 1e-3: error near 1e-6 of the curvature.
        expect(slope / species.heatCapacity(temperature)).toBeCloseTo(1, 5);
        expect((entropySlope * temperature) / species.heatCapacity(temperature)).toBeCloseTo(1, 5);
      }
    });

    it('knows its range', () => {
      expect(species.isInRange(298.15)).toBe(true);
      expect(species.isInRange(species.lowestTemperature - 0.01)).toBe(false);
      expect(species.isInRange(species.highestTemperature + 0.01)).toBe(false);
      expect(species.highestTemperature).toBeGreaterThanOrEqual(1500);
    });
  },
);

describe('against NIST-JANAF (1998), CRC and TRC tables, from memory', () => {
  it.each(publishedHeatCapacities)('$id', ({ id, at298, at1000, entropy, scatter }) => {
    const species = library(id);
    expect(Math.abs(species.heatCapacity(298.15) / at298 - 1)).toBeLessThan(scatter);
    // Twice as much at 1000 K, where the partition functions differ more.
    if (at1000 !== undefined)
      expect(Math.abs(species.heatCapacity(1000) / at1000 - 1)).toBeLessThan(2 * scatter);
    // Third-law and spectroscopic entropies of organic vapours agree to about 1 J/(mol K).
    if (entropy !== undefined)
      expect(Math.abs(species.entropy(298.15) - entropy)).toBeLessThan(100 * scatter);
  });
});

const water: SpeciesRecord = { id: 'W', molarMass: 0.018015, source: 'test' };

function formulaOf(expression: Expression): CheckedFormula {
  return { expression, dimension: [1, 2, -2, -1, -1], text: 'test' };
}

const temperature: Expression = { kind: 'variable', variable: { kind: 'temperature' } };
const number = (value: number): Expression => ({ kind: 'number', value });

describe('own records', () => {
  it('a constant heat capacity gives a straight enthalpy and a logarithmic entropy', () => {
    const species = createSpeciesThermochemistry({
      ...water,
      heatCapacity: { kind: 'constant', value: 36 },
      enthalpyOfFormation: -241826,
      standardEntropy: 188.83,
    });
    expect(species.heatCapacity(900)).toBeCloseTo(36, 12);
    expect(species.enthalpy(298.15)).toBeCloseTo(-241826, 8);
    expect(species.enthalpy(798.15)).toBeCloseTo(-241826 + 36 * 500, 8);
    expect(species.entropy(596.3)).toBeCloseTo(188.83 + 36 * Math.LN2, 10);
    expect(species.isInRange(5)).toBe(true);
  });

  it('a formula is integrated: a + b T against its closed form', () => {
    const [a, b] = [30, 0.012];
    const linear: Expression = {
      kind: 'binary',
      name: 'add',
      left: number(a),
      right: { kind: 'binary', name: 'multiply', left: number(b), right: temperature },
    };
    const species = createSpeciesThermochemistry({
      ...water,
      heatCapacity: { kind: 'formula', formula: formulaOf(linear) },
      enthalpyOfFormation: -1000,
      standardEntropy: 200,
    });
    for (const T of [250, 298.15, 700, 2500]) {
      expect(species.heatCapacity(T)).toBeCloseTo(a + b * T, 12);
      const rise = a * (T - 298.15) + (b / 2) * (T ** 2 - 298.15 ** 2);
      expect(species.enthalpy(T)).toBeCloseTo(-1000 + rise, 6);
      expect(species.entropy(T)).toBeCloseTo(200 + a * Math.log(T / 298.15) + b * (T - 298.15), 9);
    }
  });

  it('a formula with 1/T is integrated to nine digits up to 3000 K: 40 - 6000 K/T', () => {
    const hyperbolic: Expression = {
      kind: 'binary',
      name: 'subtract',
      left: number(40),
      right: { kind: 'binary', name: 'divide', left: number(6000), right: temperature },
    };
    const species = createSpeciesThermochemistry({
      ...water,
      heatCapacity: { kind: 'formula', formula: formulaOf(hyperbolic) },
    });
    for (const T of [200, 700, 3000]) {
      const exact = 40 * (T - 298.15) - 6000 * Math.log(T / 298.15);
      expect(Math.abs(species.enthalpy(T) / exact - 1)).toBeLessThan(1e-9);
    }
  });

  it('the seven-constant form is the nine-constant form without its negative powers', () => {
    const coefficients = [3.5, 1e-3, -2e-7, 3e-11, -1e-15];
    const range = { lowest: 200, highest: 3000, enthalpyConstant: -1000, entropyConstant: 4 };
    const seven = createSpeciesThermochemistry({
      ...water,
      heatCapacity: { kind: 'nasa', exponents: [0, 1, 2, 3, 4], ranges: [{ ...range, coefficients }] },
    });
    const nine = createSpeciesThermochemistry({
      ...water,
      heatCapacity: {
        kind: 'nasa',
        exponents: [-2, -1, 0, 1, 2, 3, 4],
        ranges: [{ ...range, coefficients: [0, 0, ...coefficients] }],
      },
    });
    const T = 900;
    const reduced = coefficients.reduce((sum, a, k) => sum + a * T ** k, 0);
    expect(seven.heatCapacity(T) / (gasConstant * reduced)).toBeCloseTo(1, 14);
    expect(seven.enthalpy(T)).toBe(nine.enthalpy(T));
    expect(seven.entropy(T)).toBe(nine.entropy(T));
  });

  it('what is unknown is flagged and not a number', () => {
    const bare = createSpeciesThermochemistry({ ...water, enthalpyOfFormation: -241826 });
    expect(bare).toMatchObject({
      hasHeatCapacity: false,
      hasEnthalpyOfFormation: true,
      hasStandardEntropy: false,
    });
    expect(bare.enthalpy(298.15)).toBeNaN();
    const relative = createSpeciesThermochemistry({
      ...water,
      heatCapacity: { kind: 'constant', value: 30 },
    });
    expect(relative.hasEnthalpyOfFormation).toBe(false);
    expect(relative.enthalpy(398.15) - relative.enthalpy(298.15)).toBeCloseTo(3000, 9);
  });

  it('refuses ranges that leave a gap and powers the form does not have', () => {
    const range = { coefficients: [1], enthalpyConstant: 0, entropyConstant: 0 };
    const make = (exponents: number[], limits: [number, number][]): unknown =>
      createSpeciesThermochemistry({
        ...water,
        heatCapacity: {
          kind: 'nasa',
          exponents,
          ranges: limits.map(([lowest, highest]) => ({ ...range, lowest, highest })),
        },
      });
    expect(() =>
      make(
        [0],
        [
          [200, 1000],
          [1100, 3000],
        ],
      ),
    ).toThrow(RangeError);
    expect(() => make([0], [[1000, 200]])).toThrow(RangeError);
    expect(() => make([0.5], [[200, 1000]])).toThrow(RangeError);
  });
});
