import type { RateEvaluator } from '../../src/kinetics/rate-evaluator.js';
import type { PelletBulk, PelletModelInput } from '../../src/pellet/pellet-model.js';
import type { PelletMethod } from '../../src/pellet/pellet-specification.js';
import { givenTransport, transportNumbers } from './given-transport.js';

/** One rate law by hand: value and its derivatives with respect to the concentrations and temperature. */
export type HandLaw = (
  c: readonly number[],
  temperature: number,
) => { rate: number; byConcentration: readonly number[]; byTemperature: number };

/** A rate evaluator from laws written by hand, so that pellet tests do not rest on the law compiler. */
export function handRates(laws: readonly HandLaw[], speciesCount: number): RateEvaluator {
  const columns = speciesCount + 2;
  const read = (c: Float64Array, offset: number): number[] => [...c.subarray(offset, offset + speciesCount)];
  return {
    reactionCount: laws.length,
    speciesCount,
    evaluate(c, offset, temperature, _pressure, rates, rateOffset) {
      const values = read(c, offset);
      laws.forEach((law, j) => (rates[rateOffset + j] = law(values, temperature).rate));
    },
    evaluateWithGradient(c, offset, temperature, _pressure, rates, rateOffset, gradient, gradientOffset) {
      const values = read(c, offset);
      laws.forEach((law, j) => {
        const { rate, byConcentration, byTemperature } = law(values, temperature);
        rates[rateOffset + j] = rate;
        byConcentration.forEach((value, i) => (gradient[gradientOffset + j * columns + i] = value));
        gradient[gradientOffset + j * columns + speciesCount] = byTemperature;
      });
    },
  };
}

export interface SinglePelletOptions {
  readonly shapeExponent: number;
  /** V/S, m */
  readonly diffusionLength: number;
  readonly diffusivities: readonly number[];
  readonly stoichiometry: readonly (readonly number[])[];
  readonly laws: readonly HandLaw[];
  readonly massTransfer?: readonly number[];
  readonly heatTransfer?: number;
  readonly thermalConductivity?: number;
  /** J/mol; absent: isothermal pellet. */
  readonly heats?: readonly number[];
  readonly method?: PelletMethod;
  readonly tolerance?: number;
}

/** A pellet model's input from a few numbers; rates are per pellet volume. */
export function singlePellet(options: SinglePelletOptions): PelletModelInput {
  const speciesCount = options.diffusivities.length;
  return {
    pellet: {
      geometry: {
        diffusionLength: options.diffusionLength,
        shapeExponent: options.shapeExponent,
        sauterDiameter: 6 * options.diffusionLength,
        description: 'test pellet',
      },
      method: options.method ?? { kind: 'full' },
      density: 1000,
      activity: 1,
      transport: givenTransport(options),
    },
    transport: transportNumbers(options),
    transportVaries: false,
    speciesCount,
    stoichiometry: options.stoichiometry,
    rates: handRates(options.laws, speciesCount),
    rateFactors: options.laws.map(() => 1),
    referenceHeats: options.heats,
    tolerance: options.tolerance ?? 1e-8,
  };
}

export function bulkOf(
  concentrations: readonly number[],
  temperature: number,
  heats: readonly number[] = [0],
  heatSlopes: readonly number[] = heats.map(() => 0),
): PelletBulk {
  return {
    concentrations: Float64Array.from(concentrations),
    temperature,
    pressure: 1e5,
    reactionHeats: Float64Array.from(heats),
    reactionHeatSlopes: Float64Array.from(heatSlopes),
  };
}

/** k c_0^order, isothermal. */
export function powerLaw(k: number, order: number, speciesCount: number): HandLaw {
  return (c) => {
    const base = c[0]!;
    const byConcentration = new Array<number>(speciesCount).fill(0);
    byConcentration[0] = base > 0 ? k * order * base ** (order - 1) : order === 1 ? k : 0;
    return {
      rate: base > 0 ? k * base ** order : order === 1 ? k * base : 0,
      byConcentration,
      byTemperature: 0,
    };
  };
}
