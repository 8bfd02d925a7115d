import type { Dimension } from '../quantities/dimension.js';

/**
 * What a formula may refer to. `speciesIndex` and `reactionIndex` count in the order of the case file.
 * - `partial_pressure`, `fugacity` Pa; `concentration` mol/m³; `mole_fraction` 1
 * - `temperature` K; `pressure` Pa
 * - `equilibrium_constant` of a reaction, dimensionless activities at 1 bar standard pressure
 * - `relative_radius` 1 (pellet centre 0, surface 1)
 */
export type Variable =
  | {
      readonly kind: 'partial_pressure' | 'concentration' | 'mole_fraction' | 'fugacity';
      readonly speciesIndex: number;
    }
  | { readonly kind: 'temperature' | 'pressure' | 'relative_radius' }
  | { readonly kind: 'equilibrium_constant'; readonly reactionIndex: number };

/** Functions of one argument. `log` is the natural logarithm. */
export type UnaryFunction = 'exp' | 'log' | 'log10' | 'sqrt' | 'abs';
/** Functions of two arguments; more are nested. */
export type BinaryFunction = 'min' | 'max';
/** Arithmetic between two operands. */
export type Operator = 'add' | 'subtract' | 'multiply' | 'divide' | 'power';

/**
 * A checked formula: plain data, every number in SI, every name resolved, dimensions consistent.
 * Only `parse-formula.ts` and `build-expression.ts` make one; everything downstream trusts it.
 */
export type Expression =
  | { readonly kind: 'number'; readonly value: number }
  | { readonly kind: 'variable'; readonly variable: Variable }
  | { readonly kind: 'negate'; readonly operand: Expression }
  | { readonly kind: 'unary'; readonly name: UnaryFunction; readonly operand: Expression }
  | {
      readonly kind: 'binary';
      readonly name: Operator | BinaryFunction;
      readonly left: Expression;
      readonly right: Expression;
    };

/** An expression together with the dimension it comes out in and the text the user wrote. */
export interface CheckedFormula {
  readonly expression: Expression;
  readonly dimension: Dimension;
  readonly text: string;
}
