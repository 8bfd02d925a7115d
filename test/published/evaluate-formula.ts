import { compileProperty } from '../../src/expressions/compile-property.js';
import type { CheckedFormula } from '../../src/expressions/expression.js';
import { parseFormula, type FormulaScope } from '../../src/expressions/parse-formula.js';
import { compileRates } from '../../src/kinetics/compile-rates.js';

/** A formula as a case would hold it; a fault in it fails the test. */
export function readFormula(text: string, scope: Partial<FormulaScope> = {}): CheckedFormula {
  const formula = parseFormula(
    text,
    { constants: new Map(), speciesIds: [], allowsTemperature: true, allowsPressure: true, ...scope },
    (fault) => {
      throw new Error(`${text}: ${fault.found}; expected ${fault.expected}`);
    },
  );
  return formula!;
}

/** Value of a formula in T at a temperature in K; SI unless the formula divides its unit out. */
export function evaluateAt(text: string, temperature: number): number {
  return compileProperty(readFormula(text)).evaluate(temperature, 1e5);
}

/**
 * Rates of several laws at partial pressures, in each law's SI unit.
 *
 * @param partialPressures - Pa, by species
 */
export function ratesAt(
  laws: readonly CheckedFormula[],
  partialPressures: readonly number[],
  temperature: number,
): Float64Array {
  const evaluator = compileRates(
    laws.map((law) => law.expression),
    partialPressures.length,
    () => {
      throw new Error('no law here names K_eq');
    },
  );
  const concentrations = Float64Array.from(partialPressures, (p) => p / (8.314462618 * temperature));
  const rates = new Float64Array(laws.length);
  const pressure = partialPressures.reduce((sum, p) => sum + p, 0);
  evaluator.evaluate(concentrations, 0, temperature, pressure, rates, 0);
  return rates;
}
