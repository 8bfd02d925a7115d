/** Three rate laws with all derivatives: compiled, against mathjs interpreting the same laws and their symbolic derivatives. */
import { compile, derivative } from 'mathjs';
import { bench, describe } from 'vitest';
import type { Expression } from '../../src/expressions/expression.js';
import { parseFormula, type FormulaScope } from '../../src/expressions/parse-formula.js';
import { compileRates } from '../../src/kinetics/compile-rates.js';
import { dimensionless } from '../../src/quantities/dimension.js';

const gasConstant = 8.314462618;
const species = ['A', 'O2', 'P', 'CO', 'H2O'];
const sites = '(1 + 2.4e-6 * exp(3900 / T) * p.A + sqrt(1.1e-5 * p.O2))';
/** A partial oxidation with two total oxidations, in pure numbers of SI. */
const laws = [
  `3.1e-2 * exp(-9800 / T) * p.A * p.O2 / ${sites}^2`,
  `0.8 * exp(-12100 / T) * p.A * p.O2^0.7 / ${sites}^2`,
  '2.2e-3 * exp(-10400 / T) * p.P * p.O2^0.5 / (1 + 4e-5 * p.H2O)',
];
const concentrations = [0.31, 4.1, 0.12, 0.05, 0.6];
const [temperature, pressure] = [640, 1.6e5];

const scope: FormulaScope = {
  constants: new Map(),
  speciesIds: species,
  allowsTemperature: true,
  allowsPressure: true,
  writtenIn: {
    pressure: 1,
    concentration: 1,
    temperature: 1,
    result: { factor: 1, dimension: dimensionless },
  },
};

function read(text: string): Expression {
  const formula = parseFormula(text, scope, ({ found }) => {
    throw new Error(found);
  });
  return formula!.expression;
}

const width = species.length + 2;
const evaluator = compileRates(
  laws.map((law) => read(law)),
  species.length,
  () => {
    throw new Error('no equilibrium here');
  },
);
const state = new Float64Array(concentrations);
const rates = new Float64Array(laws.length);
const gradient = new Float64Array(laws.length * width);

const spelledOut = laws.map((law) => law.replace(/p\.(\w+)/g, '(c_$1 * R * T)'));
const names = [...species.map((id) => `c_${id}`), 'T', 'P'];
const values = new Map<string, number>([
  ...species.map((id, i): [string, number] => [`c_${id}`, concentrations[i]!]),
  ['R', gasConstant],
  ['T', temperature],
  ['P', pressure],
]);
const interpretedLaws = spelledOut.map((law) => compile(law));
const interpretedDerivatives = spelledOut.flatMap((law) =>
  names.map((name) => compile(derivative(law, name).toString())),
);
const interpretedRates = new Float64Array(laws.length);
const interpretedGradient = new Float64Array(laws.length * width);

function runCompiled(): void {
  evaluator.evaluateWithGradient(state, 0, temperature, pressure, rates, 0, gradient, 0);
}

function interpretLaws(): void {
  interpretedLaws.forEach((law, j) => (interpretedRates[j] = law.evaluate(values) as number));
}

function runInterpreted(): void {
  interpretLaws();
  interpretedDerivatives.forEach((code, k) => (interpretedGradient[k] = code.evaluate(values) as number));
}

/** A race between different answers means nothing. */
function requireSame(ours: Float64Array, theirs: Float64Array): void {
  ours.forEach((value, k) => {
    if (!(Math.abs(value - theirs[k]!) <= 1e-12 * Math.abs(theirs[k]!))) {
      throw new Error(`entry ${k}: ${value}, interpreted ${theirs[k]!}`);
    }
  });
}

runCompiled();
runInterpreted();
if (!rates.every((rate) => rate > 0)) throw new Error('rates that are not positive prove nothing');
requireSame(rates, interpretedRates);
requireSame(gradient, interpretedGradient);

describe('three rate laws with their gradient', () => {
  bench('compiled', runCompiled);
  bench('interpreted by mathjs', runInterpreted);
});

describe('three rate laws alone', () => {
  bench('compiled', () => {
    evaluator.evaluate(state, 0, temperature, pressure, rates, 0);
  });
  bench('interpreted by mathjs', interpretLaws);
});
