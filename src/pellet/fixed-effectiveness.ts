import type { PelletModelInput } from './pellet-model.js';
import type { SurfaceLaw } from './lumped-pellet.js';

/**
 * Rates at bulk conditions times given factors; 1 for every reaction where the pellet offers no resistance.
 *
 * @param effectiveness - one per reaction, > 0
 */
export function createFixedLaw(input: PelletModelInput, effectiveness: readonly number[]): SurfaceLaw {
  const { rates, rateFactors, speciesCount } = input;
  const columns = speciesCount + 2;
  const factors = effectiveness.map((value, j) => value * rateFactors[j]!);
  return (concentrations, temperature, pressure, averageRates, gradient) => {
    if (gradient) {
      rates.evaluateWithGradient(concentrations, 0, temperature, pressure, averageRates, 0, gradient, 0);
      gradient.forEach((value, index) => {
        gradient[index] = value * factors[Math.floor(index / columns)]!;
      });
    } else {
      rates.evaluate(concentrations, 0, temperature, pressure, averageRates, 0);
    }
    factors.forEach((factor, j) => (averageRates[j]! *= factor));
  };
}
