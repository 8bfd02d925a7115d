/**
 * All rate laws of a case to two generated functions: rates, and rates with their exact derivatives. One graph for all laws, so that what they
 * share is computed once; straight-line code, since interpreted laws and derivatives cost some 80 times more (test/bench/rates.bench.ts).
 */
import { differentiate } from '../expressions/compile/differentiate.js';
import { emitStatements, type Assignment } from '../expressions/compile/emit.js';
import { Graph } from '../expressions/compile/graph.js';
import { instantiate, type ThermalFunction } from '../expressions/compile/instantiate.js';
import { fluidLeaf, lower } from '../expressions/compile/lower.js';
import type { Expression } from '../expressions/expression.js';
import type { RateEvaluator, RateFunction, RateGradientFunction } from './rate-evaluator.js';

/** A reaction's equilibrium constant (standard pressure 1 bar) and its temperature derivative. */
export interface EquilibriumConstantFunction {
  readonly value: (temperature: number) => number;
  readonly derivative: (temperature: number) => number;
}

/**
 * @param rates - one expression per reaction
 * @param equilibriumConstants - asked only for reactions whose law names `K_eq`
 * @param lawFactors - compressibility factor, then the fugacity coefficient of each species, read anew at each evaluation; absent in an
 *   ideal gas. The derivatives hold them fixed.
 */
export function compileRates(
  rates: readonly Expression[],
  speciesCount: number,
  equilibriumConstants: (reactionIndex: number) => EquilibriumConstantFunction,
  lawFactors?: Float64Array,
): RateEvaluator {
  const graph = new Graph();
  const concentrations = Array.from({ length: speciesCount }, (_, i) => graph.input(`c[o + ${i}]`));
  const leaf = fluidLeaf(
    graph,
    (speciesIndex) => concentrations[speciesIndex]!,
    lawFactors && ((index) => graph.input(`w[${index}]`)),
  );
  const results = rates.map((rate) => lower(graph, rate, leaf));
  const inputs = [...concentrations, graph.input('T'), graph.input('P')];
  const values = results.map((node, j): Assignment => ({ target: `r[q + ${j}] =`, node }));
  const zero = graph.number(0);
  const derivatives = results.flatMap((node, j) =>
    differentiate(graph, node, inputs).flatMap((derivative, column): Assignment[] =>
      derivative === zero ? [] : [{ target: `g[h + ${j * inputs.length + column}] =`, node: derivative }],
    ),
  );
  const functions = new Map<number, EquilibriumConstantFunction>();
  const functionOf = (reactionIndex: number): EquilibriumConstantFunction => {
    let made = functions.get(reactionIndex);
    if (!made) {
      made = equilibriumConstants(reactionIndex);
      functions.set(reactionIndex, made);
    }
    return made;
  };
  const equilibrium: ThermalFunction = (reaction, temperature) => functionOf(reaction).value(temperature);
  const slope: ThermalFunction = (reaction, temperature) => functionOf(reaction).derivative(temperature);
  const make = (parameters: readonly string[], assignments: readonly Assignment[]): unknown =>
    instantiate(parameters, emitStatements(graph, assignments), equilibrium, slope, lawFactors);
  return {
    reactionCount: rates.length,
    speciesCount,
    evaluate: make(['c', 'o', 'T', 'P', 'r', 'q'], values) as RateFunction,
    evaluateWithGradient: make(
      ['c', 'o', 'T', 'P', 'r', 'q', 'g', 'h'],
      [...values, ...derivatives],
    ) as RateGradientFunction,
  };
}
