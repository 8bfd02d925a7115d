import { describe, expect, it } from 'vitest';
import { firstOrderEffectiveness } from '../../src/pellet/closed-form-effectiveness.js';
import { createPelletModel } from '../../src/pellet/create-pellet-model.js';
import type { PelletMethod } from '../../src/pellet/pellet-specification.js';
import { bulkOf, powerLaw, singlePellet, type HandLaw, type SinglePelletOptions } from './single-pellet.js';

const diffusionLength = 1e-3;
const diffusivity = 1e-6;
const base = (laws: readonly HandLaw[], method: PelletMethod): SinglePelletOptions => ({
  shapeExponent: 2,
  diffusionLength,
  diffusivities: [diffusivity, diffusivity],
  stoichiometry: laws.map(() => [-1, 1]),
  laws,
  method,
});

describe('first-order effectiveness', () => {
  it.each([0, 1, 2, 3.2])('slope agrees with a central difference, σ = %f', (sigma) => {
    for (const modulus of [1e-3, 0.01, 0.3, 2, 30, 300]) {
      const step = modulus * 1e-3;
      const difference =
        (firstOrderEffectiveness(modulus + step, sigma).effectiveness -
          firstOrderEffectiveness(modulus - step, sigma).effectiveness) /
        (2 * step);
      const { slope } = firstOrderEffectiveness(modulus, sigma);
      expect(Math.abs(slope - difference)).toBeLessThan(4e-6 * Math.abs(slope) + 1e-12 / step);
    }
  });

  it('has no seam where the series takes over', () => {
    for (const sigma of [0, 1, 2]) {
      const [below, above] = [0.99999e-4, 1.00001e-4].map((modulus) =>
        firstOrderEffectiveness(modulus, sigma),
      );
      expect(Math.abs(below!.effectiveness - above!.effectiveness)).toBeLessThan(1e-12);
      expect(Math.abs(below!.slope / above!.slope - 1)).toBeLessThan(1e-4);
    }
  });

  it('is (coth 3Φ - 1/3Φ)/Φ for the sphere and tends to 1/Φ', () => {
    for (const modulus of [0.01, 0.5, 3, 50]) {
      const exact = (1 / Math.tanh(3 * modulus) - 1 / (3 * modulus)) / modulus;
      expect(Math.abs(firstOrderEffectiveness(modulus, 2).effectiveness / exact - 1)).toBeLessThan(1e-12);
    }
    expect(firstOrderEffectiveness(1e6, 0).effectiveness).toBeCloseTo(1e-6, 15);
  });
});

describe('method thiele', () => {
  const rateWith = (options: SinglePelletOptions, concentrations: readonly number[]): number => {
    const model = createPelletModel(singlePellet(options));
    expect(model.solve(bulkOf(concentrations, 500))).toBe('converged');
    return model.averageRates[0]!;
  };

  it.each([0.5, 1, 2, 3])('order %f: modulus L √((n+1)/2 k c^(n-1)/De), Bischoff (1965)', (order) => {
    const c = 6;
    for (const k of [0.1, 5]) {
      const modulus = diffusionLength * Math.sqrt((((order + 1) / 2) * k * c ** (order - 1)) / diffusivity);
      const exact = firstOrderEffectiveness(modulus, 2).effectiveness * k * c ** order;
      const obtained = rateWith(base([powerLaw(k, order, 2)], { kind: 'thiele' }), [c, 0]);
      expect(Math.abs(obtained / exact - 1)).toBeLessThan(1e-10);
    }
  });

  it('reversible first order: modulus L √(k(1/De_A + 1/(K De_B))), forwards and backwards', () => {
    const k = 4;
    const K = 2.5;
    const [diffusivityA, diffusivityB] = [1e-6, 0.4e-6];
    const law: HandLaw = (c) => ({
      rate: k * (c[0]! - c[1]! / K),
      byConcentration: [k, -k / K],
      byTemperature: 0,
    });
    const modulus = diffusionLength * Math.sqrt(k * (1 / diffusivityA + 1 / (K * diffusivityB)));
    const eta = firstOrderEffectiveness(modulus, 2).effectiveness;
    const options = { ...base([law], { kind: 'thiele' }), diffusivities: [diffusivityA, diffusivityB] };
    for (const c of [
      [5, 1],
      [1, 9],
    ]) {
      const exact = eta * k * (c[0]! - c[1]! / K);
      expect(Math.abs(rateWith(options, c) / exact - 1)).toBeLessThan(1e-9);
    }
  });

  it('first order with film in series: 1/η = 1/η_inner + Φ²/Bi; derivatives against differences', () => {
    const k = 9;
    const kc = 0.004;
    const gas = 8.314462618;
    const law: HandLaw = (c, temperature) => {
      const constant = k * Math.exp((-8e4 / gas) * (1 / temperature - 1 / 500));
      return {
        rate: constant * c[0]!,
        byConcentration: [constant, 0],
        byTemperature: (constant * c[0]! * 8e4) / (gas * temperature ** 2),
      };
    };
    const options = {
      ...base([law], { kind: 'thiele' }),
      massTransfer: [kc, kc],
      heatTransfer: 150,
      heats: [-3e4],
    };
    const isothermal = createPelletModel(
      singlePellet({ ...base([law], { kind: 'thiele' }), massTransfer: [kc, kc] }),
    );
    isothermal.solve(bulkOf([5, 0], 500));
    const modulus = diffusionLength * Math.sqrt(k / diffusivity);
    const inner = firstOrderEffectiveness(modulus, 2).effectiveness;
    const exact = (k * 5) / (1 / inner + (k * diffusionLength) / kc);
    expect(Math.abs(isothermal.averageRates[0]! / exact - 1)).toBeLessThan(1e-9);

    const model = createPelletModel(singlePellet(options));
    const at = [5, 0.5, 500];
    model.differentiate(bulkOf(at.slice(0, 2), at[2]!, [-3e4], [12]));
    const gradient = model.gradient.slice();
    expect(model.surfaceTemperature()).toBeGreaterThan(500);
    at.forEach((value, v) => {
      const step = value * 1e-4;
      const rates = [1, -1].map((sign) => {
        const moved = at.map((entry, k2) => (k2 === v ? entry + sign * step : entry));
        model.solve(bulkOf(moved.slice(0, 2), moved[2]!, [-3e4 + 12 * (moved[2]! - 500)], [12]));
        return model.averageRates[0]!;
      });
      const difference = (rates[0]! - rates[1]!) / (2 * step);
      expect(Math.abs(gradient[v]! - difference)).toBeLessThan(1e-5 * Math.abs(difference) + 1e-9);
    });
  });
});

describe('methods fixed and intrinsic', () => {
  it('multiply the rates at bulk conditions, film or not', () => {
    const options = {
      ...base([powerLaw(3, 2, 2)], { kind: 'fixed', effectiveness: [0.35] }),
      massTransfer: [1e-3, 1e-3],
    };
    const fixed = createPelletModel(singlePellet(options));
    fixed.differentiate(bulkOf([4, 0], 500));
    expect(fixed.averageRates[0]).toBeCloseTo(0.35 * 3 * 16, 12);
    expect(fixed.gradient[0]).toBeCloseTo(0.35 * 3 * 8, 12);
    const intrinsic = createPelletModel(singlePellet({ ...options, method: { kind: 'intrinsic' } }));
    intrinsic.solve(bulkOf([4, 0], 500));
    expect(intrinsic.averageRates[0]).toBe(48);
    expect(intrinsic.centreTemperature()).toBe(500);
  });
});
