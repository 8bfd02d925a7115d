/**
 * The one place where text becomes code. The text comes from the emitter alone, which writes fixed templates, numbers and names of its own;
 * no part of a case file is ever copied into it. The check below holds that to its word: every statement must have one of the emitter's forms.
 */

const numeral = String.raw`\(?-?(?:\d+\.?\d*(?:e[+-]?\d+)?|Infinity|NaN)\)?`;
const operand = String.raw`(?:t\d+|[TP]|${numeral})`;
const value = String.raw`(?:${operand}|-${operand}|${operand} [-+*/] ${operand}|Math\.(?:pow|exp|log|log10|abs|sign|min|max)\(${operand}(?:, ${operand})?\)|${operand} <= 0(?: && ${operand} > 0)? \? 0 : Math\.(?:pow|sqrt|log)\(${operand}(?:, ${operand})?\)|${operand} <= ${operand} \? 1 : 0|d?k\(${operand}, ${operand}\)|c\[o \+ \d+\]|w\[\d+\])`;
const statement = new RegExp(
  String.raw`^(?:const t\d+ = ${value};|[rg]\[[qh] \+ \d+\] = ${operand};|return ${operand};)$`,
);

/** Functions of a reaction's index and temperature that the code may call: equilibrium constant and its slope. */
export type ThermalFunction = (reactionIndex: number, temperature: number) => number;

/**
 * @param parameters - names of the function's arguments
 * @param body - statements by the emitter, one a line
 * @param factors - numbers that the code reads at each call as `w[…]`; their owner may change them in between
 * @throws Error when a line is not one that the emitter writes
 */
export function instantiate(
  parameters: readonly string[],
  body: string,
  equilibrium: ThermalFunction,
  equilibriumSlope: ThermalFunction,
  factors?: Float64Array,
): unknown {
  for (const line of body.split('\n')) {
    if (line !== '' && !statement.test(line))
      throw new Error(`generated code has an unexpected line: ${line}`);
  }
  // eslint-disable-next-line @typescript-eslint/no-implied-eval, @typescript-eslint/no-unsafe-call -- checked just above
  return new Function(
    'k',
    'dk',
    'w',
    `"use strict"; return function (${parameters.join(', ')}) {\n${body}\n};`,
  )(equilibrium, equilibriumSlope, factors);
}
