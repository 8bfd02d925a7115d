import { describe, expect, it } from 'vitest';
import { createPelletModel } from '../../src/pellet/create-pellet-model.js';
import { gasConstant } from '../../src/quantities/constants.js';
import { bulkOf, singlePellet, type HandLaw } from '../pellet/single-pellet.js';
import { readReference } from './read-reference.js';

interface RateTerm {
  readonly coefficient: number;
  readonly exponents: Readonly<Record<string, number>>;
  readonly activationEnergy: number;
  readonly referenceTemperature: number;
}

interface ReferenceReaction {
  readonly stoichiometry: readonly number[];
  readonly heat: number;
  readonly terms: readonly RateTerm[];
  readonly inhibition?: { readonly species: string; readonly constant: number; readonly power: number };
}

interface ReferenceCase {
  readonly id: string;
  readonly group: string;
  readonly shape: 'slab' | 'cylinder' | 'sphere';
  readonly diffusionLength: number;
  readonly species: readonly string[];
  readonly effectiveDiffusivities: readonly number[];
  readonly thermalConductivity: number | null;
  readonly bulk: { readonly concentrations: readonly number[]; readonly temperature: number };
  readonly film: { readonly massTransfer: readonly number[]; readonly heatTransfer: number } | null;
  readonly reactions: readonly ReferenceReaction[];
  readonly values: {
    readonly averageRates: readonly number[];
    readonly surface: { readonly temperature: number };
    readonly centre: { readonly concentrations: readonly number[]; readonly temperature: number };
  };
  readonly agreement: number;
}

interface ReferenceFile {
  readonly library: string;
  readonly worstAgreement: number;
  readonly cases: readonly ReferenceCase[];
}

const file = readReference('pellet-bvp.json') as ReferenceFile;
const shapeExponents = { slab: 0, cylinder: 1, sphere: 2 } as const;

/** The law of `pellet-bvp.py` by hand, with its derivatives. */
function handLaw(reaction: ReferenceReaction, species: readonly string[]): HandLaw {
  const terms = reaction.terms.map((term) => ({
    ...term,
    factors: Object.entries(term.exponents).map(([name, order]) => ({ index: species.indexOf(name), order })),
  }));
  return (c, temperature) => {
    let rate = 0;
    let byTemperature = 0;
    const byConcentration = species.map(() => 0);
    for (const { coefficient, activationEnergy, referenceTemperature, factors } of terms) {
      const exponent = (-activationEnergy / gasConstant) * (1 / temperature - 1 / referenceTemperature);
      const k = coefficient * Math.exp(exponent);
      const power = (index: number, order: number): number =>
        order === 1 ? c[index]! : Math.max(c[index]!, 0) ** order;
      const value = factors.reduce((product, { index, order }) => product * power(index, order), k);
      rate += value;
      byTemperature += (value * activationEnergy) / (gasConstant * temperature ** 2);
      for (const factor of factors) {
        const others = factors
          .filter((other) => other !== factor)
          .reduce((product, { index, order }) => product * power(index, order), k);
        const base = c[factor.index]!;
        const slope = factor.order === 1 ? 1 : base > 0 ? factor.order * base ** (factor.order - 1) : 0;
        byConcentration[factor.index]! += others * slope;
      }
    }
    if (reaction.inhibition) {
      const { constant, power } = reaction.inhibition;
      const index = species.indexOf(reaction.inhibition.species);
      const denominator = 1 + constant * c[index]!;
      const factor = denominator ** -power;
      byConcentration.forEach((value, i) => (byConcentration[i] = value * factor));
      byConcentration[index]! -= (rate * power * constant * factor) / denominator;
      byTemperature *= factor;
      rate *= factor;
    }
    return { rate, byConcentration, byTemperature };
  };
}

/** Asked of the pellet model; the answers may be a few times that off. */
const tolerance = 1e-8;
/** Of averaged rates, relative. The two reference methods agree to 1e-9; the rest is the model's share. */
const allowedError = 10 * tolerance;
/**
 * Of values inside, relative to the range they cover. Averages from collocation at Gauss-type points converge with twice the order of the values
 * at a point (de Boor & Swartz 1973, SIAM J. Numer. Anal. 10, 582), so the model's tolerance on averages leaves about its root inside.
 */
const allowedInnerError = 10 * Math.sqrt(tolerance);

it('the reference holds every kind of problem, and its two methods agree', () => {
  expect(file.library).toBe('scipy');
  expect(file.worstAgreement).toBeLessThan(1e-8);
  expect(new Set(file.cases.map((entry) => entry.group)).size).toBe(7);
});

describe.each(file.cases.map((entry) => [entry.id, entry] as const))('%s', (_id, entry) => {
  it('averaged rates, surface and centre', () => {
    const isIsothermal = entry.thermalConductivity === null;
    const heats = entry.reactions.map((reaction) => reaction.heat);
    const model = createPelletModel(
      singlePellet({
        shapeExponent: shapeExponents[entry.shape],
        diffusionLength: entry.diffusionLength,
        diffusivities: entry.effectiveDiffusivities,
        stoichiometry: entry.reactions.map((reaction) => reaction.stoichiometry),
        laws: entry.reactions.map((reaction) => handLaw(reaction, entry.species)),
        tolerance,
        ...(isIsothermal ? {} : { thermalConductivity: entry.thermalConductivity, heats }),
        ...(entry.film && {
          massTransfer: entry.film.massTransfer,
          heatTransfer: isIsothermal ? Infinity : entry.film.heatTransfer,
        }),
      }),
    );
    const bulk = bulkOf(entry.bulk.concentrations, entry.bulk.temperature, heats);
    expect(model.solve(bulk)).toBe('converged');
    // A bed reviews the resolution now and then; a pellet on its own does so until nothing changes.
    for (let review = 0; review < 10 && model.reviewResolution(bulk) === 'raised'; review++)
      model.solve(bulk);
    expect(model.solve(bulk)).toBe('converged');

    const { averageRates, surface, centre } = entry.values;
    averageRates.forEach((expected, j) => {
      expect(Math.abs(model.averageRates[j]! / expected - 1)).toBeLessThan(allowedError);
    });
    // The surface follows from the averages through the film.
    const rise = centre.temperature - entry.bulk.temperature;
    expect(Math.abs(model.surfaceTemperature() - surface.temperature)).toBeLessThanOrEqual(
      allowedError * Math.abs(rise),
    );
    expect(Math.abs(model.centreTemperature() - centre.temperature)).toBeLessThanOrEqual(
      allowedInnerError * Math.abs(rise),
    );
    const interior = model.interior(Float64Array.of(0, 1));
    const scale = Math.max(...entry.bulk.concentrations);
    centre.concentrations.forEach((expected, i) => {
      expect(Math.abs(interior.concentrations[i]![0]! - expected)).toBeLessThan(allowedInnerError * scale);
    });
  });
});
