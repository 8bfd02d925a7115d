/** What mixing rules and pressure corrections must do whatever the gases. */
import { describe, expect, it } from 'vitest';
import { findLibrarySpecies } from '../../../src/properties/species/library.js';
import { createSpeciesThermochemistry } from '../../../src/properties/thermochemistry.js';
import { binaryDiffusivityCoefficients } from '../../../src/properties/transport/binary-diffusivity.js';
import { createGasTransport, type GasTransport } from '../../../src/properties/transport/gas-transport.js';
import {
  blancRule,
  fluxRatioRule,
  wilkeRule,
  type MixingRule,
} from '../../../src/properties/transport/mixture-diffusivity.js';
import {
  lucasPressureFactor,
  stielThodosExcess,
  takahashiFactor,
} from '../../../src/properties/transport/pressure-corrections.js';
import {
  createGasConductivity,
  missingForConductivity,
} from '../../../src/properties/transport/pure-gas-conductivity.js';
import {
  createGasViscosity,
  missingForViscosity,
} from '../../../src/properties/transport/pure-gas-viscosity.js';

const recordsOf = (ids: readonly string[]): NonNullable<ReturnType<typeof findLibrarySpecies>>[] =>
  ids.map((id) => findLibrarySpecies(id)!);

function transportOf(
  ids: readonly string[],
  isCorrected = false,
  mixing: MixingRule = wilkeRule,
): GasTransport {
  const records = recordsOf(ids);
  return createGasTransport({
    records,
    heatCapacities: records.map((record) => createSpeciesThermochemistry(record).heatCapacity),
    mixing,
    isCorrected,
    wants: { viscosity: true, conductivity: true, diffusivity: true },
  });
}

const mixed = (rule: MixingRule, fractions: readonly number[], coefficients: readonly number[]): number[] => {
  const target = new Float64Array(fractions.length);
  rule(Float64Array.from(fractions), Float64Array.from(coefficients), 1, target);
  return [...target];
};

describe('viscosity and conductivity of mixtures', () => {
  it('a pure gas is itself, whatever else could be there', () => {
    const [nitrogen] = recordsOf(['N2']);
    const viscosity = createGasViscosity(nitrogen!);
    const { heatCapacity } = createSpeciesThermochemistry(nitrogen!);
    const conductivity = createGasConductivity(nitrogen!, heatCapacity, viscosity);
    const transport = transportOf(['H2', 'N2', 'CO2']);
    const pure = Float64Array.of(0, 1, 0);
    expect(transport.viscosity(pure, 500, 1e5)).toBeCloseTo(viscosity.value(500), 18);
    expect(transport.conductivity(pure, 500, 1e5, 24)).toBeCloseTo(conductivity.value(500), 14);
  });

  it('a gas under two names is one gas', () => {
    const one = transportOf(['N2', 'CO2']);
    const two = transportOf(['N2', 'CO2', 'N2']);
    const [a, b] = [Float64Array.of(0.7, 0.3), Float64Array.of(0.2, 0.3, 0.5)];
    expect(two.viscosity(b, 600, 1e5) / one.viscosity(a, 600, 1e5)).toBeCloseTo(1, 13);
    expect(two.conductivity(b, 600, 1e5, 20) / one.conductivity(a, 600, 1e5, 20)).toBeCloseTo(1, 13);
  });

  it('follow composition and temperature from one call to the next', () => {
    const transport = transportOf(['H2', 'N2']);
    const lean = Float64Array.of(0.1, 0.9);
    const rich = Float64Array.of(0.9, 0.1);
    const first = transport.conductivity(lean, 400, 1e5, 30);
    expect(transport.conductivity(rich, 400, 1e5, 30)).toBeGreaterThan(2 * first);
    expect(transport.viscosity(lean, 800, 1e5)).toBeGreaterThan(1.4 * transport.viscosity(lean, 400, 1e5));
    expect(transport.conductivity(lean, 400, 1e5, 30)).toBe(first);
  });
});

describe('diffusivities', () => {
  it('of a pair are the same both ways, and those of the pair in the mixture too', () => {
    const coefficients = binaryDiffusivityCoefficients(recordsOf(['H2', 'CO2']));
    expect(coefficients[1]).toBe(coefficients[2]);
    const [first, second] = mixed(wilkeRule, [0.3, 0.7], [...coefficients]);
    expect(first! / coefficients[1]!).toBeCloseTo(1, 13);
    expect(second! / coefficients[1]!).toBeCloseTo(1, 13);
  });

  // Three species; coefficients of the pairs 1-2, 1-3, 2-3 are 2, 3 and 5, self-diffusion 7.
  const pairs = [7, 2, 3, 2, 7, 5, 3, 5, 7];

  it('Wilke and Blanc by hand', () => {
    const wilke = mixed(wilkeRule, [0.2, 0.3, 0.5], pairs);
    expect(wilke[0]).toBeCloseTo(0.8 / (0.3 / 2 + 0.5 / 3), 13);
    expect(wilke[2]).toBeCloseTo(0.5 / (0.2 / 3 + 0.3 / 5), 13);
    const blanc = mixed(blancRule, [0.2, 0.3, 0.5], pairs);
    expect(blanc[0]).toBeCloseTo(1 / (0.2 / 7 + 0.3 / 2 + 0.5 / 3), 13);
  });

  it('a trace is the same to both', () => {
    const [wilke] = mixed(wilkeRule, [0, 0.4, 0.6], pairs);
    const [blanc] = mixed(blancRule, [0, 0.4, 0.6], pairs);
    expect(wilke).toBeCloseTo(blanc!, 13);
  });

  it('are numbers in a pure gas and where a trial state is slightly negative', () => {
    for (const fractions of [
      [1, 0, 0],
      [1 + 1e-9, -1e-9, 0],
      [0, 0, 1],
    ]) {
      for (const value of mixed(wilkeRule, fractions, pairs))
        expect(value > 0 && value < Infinity).toBe(true);
    }
  });

  it('flux ratios: counter-diffusion of equal moles leaves the pair, diffusion through a stagnant gas is Stefan’s', () => {
    const pair = [9, 4, 4, 9];
    expect(mixed(fluxRatioRule([-1, 1]), [0.3, 0.7], pair)[0]).toBeCloseTo(4, 13);
    // One in, nothing out: 1/D = (1 - y)/D_AB with respect to the gradient of concentration; Stefan (1874).
    const target = new Float64Array(2);
    fluxRatioRule([-1, 0])(Float64Array.of(0.3, 0.7), Float64Array.from(pair), 1, target);
    expect(target[0]).toBeCloseTo(4 / 0.7, 13);
    // A turning into two B: the outward stream holds A back, 1/D = (1 + y)/D_AB in A alone.
    expect(mixed(fluxRatioRule([-1, 2]), [1, 0], pair)[0]).toBeCloseTo(4 / 2, 13);
  });

  it('flux ratios that give no positive number say so', () => {
    // Nitrogen in ammonia synthesis from much nitrogen: hydrogen streams faster than it.
    const target = new Float64Array(3);
    const coefficients = Float64Array.of(1, 0.2, 1, 0.2, 1, 1, 1, 1, 1);
    expect(fluxRatioRule([-1, -3, 2])(Float64Array.of(0.9, 0.1, 0), coefficients, 1, target)).toBe(false);
  });
});

describe('pressure', () => {
  it('corrects nothing where there is none, and little where there is little', () => {
    for (const t of [1.05, 1.5, 3, 15]) {
      expect(lucasPressureFactor(t, 0, 1)).toBe(1);
      expect(Math.abs(lucasPressureFactor(t, 1e-6, 1.1) - 1)).toBeLessThan(1e-5);
      expect(takahashiFactor(t, 0)).toBe(1);
      expect(Math.abs(takahashiFactor(t, 1e-6) - 1)).toBeLessThan(1e-5);
    }
    const gas = {
      temperature: 150,
      pressure: 48e5,
      volume: 75e-6,
      compressibility: 0.29,
      molarMass: 0.04,
      polarFactor: 1,
    };
    expect(stielThodosExcess(0, gas)).toBe(0);
  });

  it('slows diffusion in a dense gas and thickens it', () => {
    expect(takahashiFactor(1.1, 1.5)).toBeLessThan(0.7);
    expect(takahashiFactor(3, 1.5)).toBeGreaterThan(0.95);
    expect(lucasPressureFactor(1.1, 2, 1)).toBeGreaterThan(1.5);
  });

  it('the chart of Takahashi is continuous in reduced pressure', () => {
    for (const p of [0.1, 0.5, 1, 2, 3, 5]) {
      expect(takahashiFactor(1.4, p * (1 + 1e-9)) / takahashiFactor(1.4, p * (1 - 1e-9))).toBeCloseTo(1, 7);
    }
  });
});

describe('what is missing', () => {
  it('is named, field by field; own data need nothing', () => {
    const bare = { id: 'X', molarMass: 0.05, source: 'test' };
    expect(missingForViscosity(bare)).toEqual(['criticalTemperature', 'criticalVolume', 'acentricFactor']);
    expect(missingForConductivity(bare)).toContain('heatCapacity');
    expect(() => createGasViscosity(bare)).toThrow(RangeError);
    const given = { ...bare, viscosity: { kind: 'constant', value: 2e-5 } } as const;
    expect(missingForViscosity(given)).toEqual([]);
    expect(createGasViscosity(given).value(500)).toBe(2e-5);
  });
});
