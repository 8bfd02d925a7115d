import { compileProperty } from '../expressions/compile-property.js';
import type { CheckedFormula } from '../expressions/expression.js';

/** A property of the fluid: a number, or a formula in temperature and pressure, SI. */
export type FluidProperty =
  | { readonly kind: 'constant'; readonly value: number }
  | { readonly kind: 'formula'; readonly formula: CheckedFormula };

/** A fluid property and its exact derivatives, as functions of temperature in K and pressure in Pa. */
export interface FluidPropertyFunction {
  readonly isConstant: boolean;
  readonly value: (temperature: number, pressure: number) => number;
  /** Per K, pressure held. */
  readonly temperatureDerivative: (temperature: number, pressure: number) => number;
  /** Per Pa, temperature held. */
  readonly pressureDerivative: (temperature: number, pressure: number) => number;
}

/** Compiles a fluid property; its unit is that of the data, SI. */
export function createPropertyFunction(property: FluidProperty): FluidPropertyFunction {
  if (property.kind === 'constant') {
    const { value } = property;
    const zero = (): number => 0;
    return { isConstant: true, value: () => value, temperatureDerivative: zero, pressureDerivative: zero };
  }
  const { evaluate, temperatureDerivative, pressureDerivative } = compileProperty(property.formula);
  return { isConstant: false, value: evaluate, temperatureDerivative, pressureDerivative };
}
