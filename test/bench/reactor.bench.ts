/**
 * Whole reactors in a warm process, from specification to result (profile of 101 rows included), as built: the test runner's own form of
 * modules is about 1.5 times slower. Work counts are printed beside the times.
 */
import { readFileSync } from 'node:fs';
import { bench, describe } from 'vitest';
import type { ReactorSpecification } from '../../src/index.js';

const built = new URL('../../dist/index.js', import.meta.url);
const { readCase, solveReactor } = (await import(built.href)) as typeof import('../../src/index.js');

function fromCase(name: string): ReactorSpecification {
  const url = new URL(`../../cases/${name}.yaml`, import.meta.url);
  return readCase(readFileSync(url, 'utf8'), name).specification;
}

/** A known outlet temperature in kelvin guards against timing a wrong answer. */
const reactors: readonly (readonly [name: string, outletTemperature: number])[] = [
  // test/reference/cooled-bed.json; the case computes its molar masses from formulas, which moves the outlet by less than 0.01 K.
  ['salt-cooled-oxidation', 628.138],
  // Isothermal by definition.
  ['first-order-closed-form', 500],
  ['cracking-mole-change', 780],
];

describe('reactor, warm process', () => {
  for (const [name, outletTemperature] of reactors) {
    const specification = fromCase(name);
    const result = solveReactor(specification);
    if (Math.abs(result.outlet.temperature - outletTemperature) > 0.01) {
      throw new Error(`${name} ends at ${result.outlet.temperature} K`);
    }
    console.log(name, JSON.stringify(result.work));
    bench(name, () => {
      solveReactor(specification);
    });
  }
  const shift = fromCase('adiabatic-shift');
  const result = solveReactor(shift);
  if (result.balances.energy > 1e-9) throw new Error('the shift bed does not conserve energy');
  console.log('adiabatic-shift', JSON.stringify(result.work));
  bench('adiabatic-shift', () => {
    solveReactor(shift);
  });
});
