import { differentiate } from './compile/differentiate.js';
import { emitStatements } from './compile/emit.js';
import { Graph } from './compile/graph.js';
import { instantiate } from './compile/instantiate.js';
import { lower } from './compile/lower.js';
import type { CheckedFormula } from './expression.js';

type PropertyOf = (temperature: number, pressure: number) => number;

/** A formula in temperature (K) and pressure (Pa), compiled, with its exact derivatives. */
export interface CompiledProperty {
  readonly evaluate: PropertyOf;
  readonly temperatureDerivative: PropertyOf;
  readonly pressureDerivative: PropertyOf;
}

const noEquilibrium = (): number => {
  throw new Error('a property formula has no equilibrium constant');
};

/** @param formula - in T and P only, as its scope allowed */
export function compileProperty(formula: CheckedFormula): CompiledProperty {
  const graph = new Graph();
  const inputs = [graph.input('T'), graph.input('P')] as const;
  const value = lower(graph, formula.expression, (variable) => {
    if (variable.kind === 'temperature') return inputs[0];
    if (variable.kind === 'pressure') return inputs[1];
    throw new Error(`a property formula does not know ${variable.kind}`);
  });
  const [byTemperature, byPressure] = differentiate(graph, value, inputs);
  const make = (node: number): PropertyOf =>
    instantiate(
      ['T', 'P'],
      emitStatements(graph, [{ target: 'return', node }]),
      noEquilibrium,
      noEquilibrium,
    ) as PropertyOf;
  return {
    evaluate: make(value),
    temperatureDerivative: make(byTemperature!),
    pressureDerivative: make(byPressure!),
  };
}
