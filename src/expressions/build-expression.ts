/** Constructors of expressions with constant folding, and the forms in which the case file gives temperature-dependent constants. */
import { gasConstant } from '../quantities/constants.js';
import type { Expression, UnaryFunction, Variable } from './expression.js';

type Binary = Extract<Expression, { kind: 'binary' }>['name'];

const unaryFunctions: Readonly<Record<UnaryFunction, (x: number) => number>> = {
  exp: Math.exp,
  log: Math.log,
  log10: Math.log10,
  sqrt: Math.sqrt,
  abs: Math.abs,
};

const binaryFunctions: Readonly<Record<Binary, (a: number, b: number) => number>> = {
  add: (a, b) => a + b,
  subtract: (a, b) => a - b,
  multiply: (a, b) => a * b,
  divide: (a, b) => a / b,
  power: (a, b) => a ** b,
  min: Math.min,
  max: Math.max,
};

/** A number, SI. */
export function number(value: number): Expression {
  return { kind: 'number', value };
}

/** A variable. */
export function variable(of: Variable): Expression {
  return { kind: 'variable', variable: of };
}

/** -operand, worked out where it is a number. */
export function negate(operand: Expression): Expression {
  return operand.kind === 'number' ? number(-operand.value) : { kind: 'negate', operand };
}

/** A function of one argument, worked out where that is a number. */
export function unary(name: UnaryFunction, operand: Expression): Expression {
  return operand.kind === 'number'
    ? number(unaryFunctions[name](operand.value))
    : { kind: 'unary', name, operand };
}

/** An operation on two operands, worked out where both are numbers. */
export function binary(name: Binary, left: Expression, right: Expression): Expression {
  if (left.kind === 'number' && right.kind === 'number') {
    return number(binaryFunctions[name](left.value, right.value));
  }
  return { kind: 'binary', name, left, right };
}

const temperature = variable({ kind: 'temperature' });

/** How a constant of a rate law depends on temperature; every number in SI, `energy` J/mol. */
export type ConstantDefinition =
  | { readonly kind: 'value'; readonly value: number }
  | {
      /** value · exp(-(E/R)(1/T - 1/at)) */
      readonly kind: 'referenced';
      readonly value: number;
      readonly at: number;
      readonly energy: number;
    }
  | {
      /** prefactor · (T / 1 K)^temperatureExponent · exp(-E/(R T)) */
      readonly kind: 'arrhenius';
      readonly prefactor: number;
      readonly energy: number;
      readonly temperatureExponent: number;
    };

/** The constant as an expression in T. For adsorption and equilibrium constants the energy is the enthalpy change. */
export function constantExpression(definition: ConstantDefinition): Expression {
  switch (definition.kind) {
    case 'value':
      return number(definition.value);
    case 'referenced': {
      const over = binary('subtract', binary('divide', number(1), temperature), number(1 / definition.at));
      return scaled(definition.value, boltzmann(definition.energy, over));
    }
    case 'arrhenius': {
      const factor = boltzmann(definition.energy, binary('divide', number(1), temperature));
      const { temperatureExponent } = definition;
      if (temperatureExponent === 0) return scaled(definition.prefactor, factor);
      const power = binary('power', temperature, number(temperatureExponent));
      return scaled(definition.prefactor, binary('multiply', power, factor));
    }
  }
}

/** exp(-(E/R) x) */
function boltzmann(energy: number, x: Expression): Expression {
  if (energy === 0) return number(1);
  return unary('exp', binary('multiply', number(-energy / gasConstant), x));
}

function scaled(factor: number, expression: Expression): Expression {
  return binary('multiply', number(factor), expression);
}
