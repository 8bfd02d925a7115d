import type { Dimension } from '../quantities/dimension.js';
import type { Expression } from './expression.js';

/** Units in which a purely empirical law is to be read: its variables then count as pure numbers in these units, and so does its result. */
export interface WrittenIn {
  /** SI value of one unit. */
  readonly pressure?: number;
  readonly concentration?: number;
  readonly temperature?: number;
  readonly result: { readonly factor: number; readonly dimension: Dimension };
}

/** What a formula may refer to. */
export interface FormulaScope {
  readonly constants: ReadonlyMap<string, { readonly expression: Expression; readonly dimension: Dimension }>;
  /** Species behind `p.`, `c.`, `y.`; in case order. Empty where a formula has no composition to refer to. */
  readonly speciesIds: readonly string[];
  readonly allowsTemperature: boolean;
  readonly allowsPressure: boolean;
  /** Index of the reaction whose `K_eq` may be used. */
  readonly equilibriumReaction?: number;
  readonly writtenIn?: WrittenIn;
}
