import { describe, expect, it } from 'vitest';
import { createPelletModel } from '../../src/pellet/create-pellet-model.js';
import { bulkOf, powerLaw, singlePellet, type HandLaw, type SinglePelletOptions } from './single-pellet.js';

/** Closed forms on Φ = (V/S) √(k/De): Thiele (1939); Aris (1957). The cylinder's Bessel ratio by its power series. */
const closedForms: Record<number, (modulus: number) => number> = {
  0: (modulus) => Math.tanh(modulus) / modulus,
  1: (modulus) => besselRatio(2 * modulus) / modulus,
  2: (modulus) => (1 / Math.tanh(3 * modulus) - 1 / (3 * modulus)) / modulus,
};

/** I_1(x)/I_0(x): power series (Abramowitz & Stegun 9.6.10) to x = 30, asymptotic expansion (9.7.1) beyond. */
function besselRatio(x: number): number {
  if (x > 30) {
    const series = (order: number): number => {
      let term = 1;
      let sum = 1;
      for (let k = 1; k < 15; k++) {
        term *= -(4 * order ** 2 - (2 * k - 1) ** 2) / (k * 8 * x);
        sum += term;
      }
      return sum;
    };
    return series(1) / series(0);
  }
  let zero = 0;
  let one = 0;
  let term = 1;
  for (let k = 0; k < 80; k++) {
    zero += term;
    one += (term * x) / 2 / (k + 1);
    term *= (x * x) / 4 / (k + 1) ** 2;
  }
  return one / zero;
}

const diffusionLength = 8e-4;
const diffusivity = 2e-6;

function firstOrder(shapeExponent: number, modulus: number, biot: number): SinglePelletOptions {
  const k = (modulus / diffusionLength) ** 2 * diffusivity;
  return {
    shapeExponent,
    diffusionLength,
    diffusivities: [diffusivity, diffusivity],
    stoichiometry: [[-1, 1]],
    laws: [powerLaw(k, 1, 2)],
    massTransfer: [(biot * diffusivity) / diffusionLength, Infinity],
  };
}

const moduli = [0.05, 0.1, 0.3, 1, 2, 5, 10, 20, 50, 100, 200];
const biots = [0.5, 2, 10, 100, Infinity];

describe.each([0, 1, 2])(
  'first order with film, shape exponent %i, against the closed form',
  (shapeExponent) => {
    it.each(moduli)('modulus %f', (modulus) => {
      for (const biot of biots) {
        const model = createPelletModel(singlePellet(firstOrder(shapeExponent, modulus, biot)));
        const bulk = bulkOf([7, 0], 500);
        expect(model.differentiate(bulk)).toBe('converged');
        model.reviewResolution(bulk);
        expect(model.differentiate(bulk)).toBe('converged');
        const inner = closedForms[shapeExponent]!(modulus);
        // Film in series: 1/η = 1/η_inner + Φ²/Bi
        const exact = 1 / (1 / inner + modulus ** 2 / biot);
        const k = (modulus / diffusionLength) ** 2 * diffusivity;
        expect(Math.abs(model.averageRates[0]! / (k * 7 * exact) - 1)).toBeLessThan(1e-7);
        // Linear in the concentration: the derivative is the rate over it.
        expect(Math.abs(model.gradient[0]! / (k * exact) - 1)).toBeLessThan(1e-6);
      }
    });
  },
);

describe('interior', () => {
  it('concentration at mid-depth of a slab: Coulson & Richardson vol. 1, 6th ed., Example 10.13', () => {
    // L = 2.5 mm, k = 14.4 1/s, De = 1e-5 m²/s; at half depth 0.035 kmol/m³ of 0.15 (recomputed 0.035049)
    const model = createPelletModel(
      singlePellet({
        shapeExponent: 0,
        diffusionLength: 2.5e-3,
        diffusivities: [1e-5, 1e-5],
        stoichiometry: [[-1, 1]],
        laws: [powerLaw(14.4, 1, 2)],
      }),
    );
    model.reviewResolution(bulkOf([150, 0], 300));
    const inside = model.interior(Float64Array.of(0, 0.5, 1));
    expect(Math.abs(inside.concentrations[0]![1]! / 35.049 - 1)).toBeLessThan(1e-4);
    expect(inside.concentrations[0]![2]!).toBeCloseTo(150, 10);
    expect(inside.concentrations[1]![1]!).toBeCloseTo(150 - inside.concentrations[0]![1]!, 8);
  });

  it('largest temperature rise is (-ΔH) De c / λ when the reactant is used up: Prater (1958)', () => {
    const heats = [-8e4];
    const model = createPelletModel(
      singlePellet({
        ...firstOrder(2, 30, Infinity),
        thermalConductivity: 0.4,
        heats,
      }),
    );
    model.reviewResolution(bulkOf([7, 0], 500, heats));
    const rise = (8e4 * diffusivity * 7) / 0.4;
    // As much as a chart or a table of the inside can show: the dead core is one element.
    expect(Math.abs((model.interior(Float64Array.of(0)).temperatures[0]! - 500) / rise - 1)).toBeLessThan(
      1e-4,
    );
    // The centre alone is taken from the coarser grid that the averages need.
    expect(Math.abs((model.centreTemperature() - 500) / rise - 1)).toBeLessThan(1e-3);
    expect(model.surfaceTemperature()).toBe(500);
  });
});

/** Arrhenius first order on species 0, second order on 1 and 2: three reactions of which the third is the sum of the first two. */
function threeReactions(): SinglePelletOptions {
  const arrhenius = (k: number, energy: number, species: number, partner: number): HandLaw => {
    const gas = 8.314462618;
    return (c, temperature) => {
      const constant = k * Math.exp((-energy / gas) * (1 / temperature - 1 / 600));
      const byConcentration = [0, 0, 0, 0];
      byConcentration[species] = constant * c[partner]!;
      byConcentration[partner]! += constant * c[species]!;
      const rate = constant * c[species]! * c[partner]!;
      return { rate, byConcentration, byTemperature: (rate * energy) / (gas * temperature ** 2) };
    };
  };
  return {
    shapeExponent: 2,
    diffusionLength: 7e-4,
    diffusivities: [1.3e-6, 3e-6, 1.1e-6, 2e-6],
    // A + 3 O -> P, A + 10 O -> 8 C, P + 7 O -> 8 C
    stoichiometry: [
      [-1, -3, 1, 0],
      [-1, -10, 0, 8],
      [0, -7, -1, 8],
    ],
    laws: [arrhenius(0.5, 1.1e5, 0, 1), arrhenius(0.12, 1.2e5, 0, 1), arrhenius(0.2, 1e5, 2, 1)],
    massTransfer: [0.07, 0.12, 0.06, 0.1],
    heatTransfer: 190,
    thermalConductivity: 0.35,
    heats: [-1.2e6, -4.5e6, -3.3e6],
  };
}

describe('several reactions', () => {
  const bulkHeats = [-1.2e6, -4.5e6, -3.3e6];
  const slopes = [20, 50, 30];
  const bulk = (c: readonly number[], temperature: number): ReturnType<typeof bulkOf> =>
    bulkOf(
      c,
      temperature,
      bulkHeats.map((heat, j) => heat + slopes[j]! * (temperature - 620)),
      slopes,
    );

  it('one that the others add up to needs no field of its own, and changes nothing', () => {
    const dependent = createPelletModel(singlePellet(threeReactions()));
    // The same pellet with heats that do not quite add up: three fields instead of two.
    const options = threeReactions();
    const nudged = [-1.2e6, -4.5e6, -3.3e6 * (1 + 1e-8)];
    const independent = createPelletModel(singlePellet({ ...options, heats: nudged }));
    for (const model of [dependent, independent]) model.reviewResolution(bulk([0.27, 6.2, 0.02, 0.1], 620));
    dependent.averageRates.forEach((rate, j) =>
      expect(Math.abs(rate / independent.averageRates[j]! - 1)).toBeLessThan(1e-7),
    );
  });

  it('derivatives of the averages agree with central differences', () => {
    const model = createPelletModel(singlePellet({ ...threeReactions(), tolerance: 1e-10 }));
    const at = [0.27, 6.2, 0.02, 0.1, 620];
    model.reviewResolution(bulk(at.slice(0, 4), 620));
    model.differentiate(bulk(at.slice(0, 4), 620));
    const exact = model.gradient.slice();
    for (let v = 0; v < 5; v++) {
      const step = Math.max(at[v]! * 1e-4, 1e-6);
      const rates = [1, -1].map((sign) => {
        const moved = at.map((value, k) => (k === v ? value + sign * step : value));
        model.solve(bulk(moved.slice(0, 4), moved[4]!));
        return [...model.averageRates];
      });
      for (let j = 0; j < 3; j++) {
        const difference = (rates[0]![j]! - rates[1]![j]!) / (2 * step);
        const scale = Math.max(Math.abs(difference), 1e-3 * Math.abs(rates[0]![j]! / at[v]!));
        expect(Math.abs(exact[j * 6 + v]! - difference) / scale).toBeLessThan(1e-5);
      }
    }
  });

  it('reordering reactions and species permutes the answer and changes nothing else', () => {
    const options = threeReactions();
    const order = [2, 0, 1];
    const permuted: SinglePelletOptions = {
      ...options,
      stoichiometry: order.map((j) => options.stoichiometry[j]!),
      laws: order.map((j) => options.laws[j]!),
      heats: order.map((j) => options.heats![j]!),
    };
    const first = createPelletModel(singlePellet(options));
    const second = createPelletModel(singlePellet(permuted));
    first.reviewResolution(bulkOf([0.27, 6.2, 0.02, 0.1], 620, bulkHeats));
    second.reviewResolution(
      bulkOf(
        [0.27, 6.2, 0.02, 0.1],
        620,
        order.map((j) => bulkHeats[j]!),
      ),
    );
    order.forEach((j, position) =>
      expect(Math.abs(second.averageRates[position]! / first.averageRates[j]! - 1)).toBeLessThan(1e-8),
    );
  });
});

describe('what cannot be solved is said', () => {
  it('a law that goes on without its reactant is overdrawn', () => {
    const zeroOrder: HandLaw = () => ({ rate: 5e4, byConcentration: [0, 0], byTemperature: 0 });
    const model = createPelletModel(singlePellet({ ...firstOrder(2, 1, Infinity), laws: [zeroOrder] }));
    expect(model.solve(bulkOf([7, 0], 500))).toBe('overdrawn');
  });

  it('a law without a finite value is reported', () => {
    const broken: HandLaw = () => ({ rate: Number.NaN, byConcentration: [0, 0], byTemperature: 0 });
    const model = createPelletModel(singlePellet({ ...firstOrder(2, 1, Infinity), laws: [broken] }));
    expect(model.solve(bulkOf([7, 0], 500))).toBe('rates_not_finite');
  });
});
