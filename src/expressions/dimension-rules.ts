/** What dimensions may meet in a formula, and the faults where they may not. `text` is the formula's, for what the faults show. */
import type { Span } from '../diagnostics/problem.js';
import { describeDimension } from '../quantities/describe-dimension.js';
import {
  dimensionless,
  isDimensionless,
  raiseDimension,
  sameDimension,
  type Dimension,
} from '../quantities/dimension.js';
import type { Expression } from './expression.js';
import { FormulaFault } from './formula-fault.js';

/** An expression read so far, with its dimension and place. */
export interface Typed {
  readonly expression: Expression;
  readonly dimension: Dimension;
  readonly span: Span;
  /** A number literal, perhaps with units behind it: more units may follow. */
  readonly isLiteral: boolean;
}

/** Sums, differences, least and greatest values need one dimension. @param how - `added to`, `less`: stands between the two */
export function requireSame(left: Typed, right: Typed, how: string, text: string): void {
  if (sameDimension(left.dimension, right.dimension)) return;
  const bare = [left, right].find(({ isLiteral, dimension }) => isLiteral && isDimensionless(dimension));
  throw new FormulaFault(
    'wrong_dimension',
    { start: left.span.start, end: right.span.end },
    `${describe(left, text)}, ${how} ${describe(right, text)}`,
    'two quantities of the same kind',
    bare ? `give \`${textOf(bare, text)}\` its unit` : 'check the units of the constants',
  );
}

/** Exponentials and logarithms need pure numbers. @param how - such as `as an exponent`: what it is used for */
export function requirePure(typed: Typed, how: string, text: string): void {
  if (isDimensionless(typed.dimension)) return;
  throw new FormulaFault(
    'wrong_dimension',
    typed.span,
    `${describe(typed, text)}, ${how}`,
    'a pure number there',
    'divide it by a quantity of the same kind',
  );
}

/** Dimension of a power: exponents are pure numbers, and fixed ones where the base has a dimension. */
export function powerDimension(base: Typed, exponent: Typed, text: string): Dimension {
  requirePure(exponent, 'as an exponent', text);
  if (isDimensionless(base.dimension)) return dimensionless;
  if (exponent.expression.kind !== 'number') {
    throw new FormulaFault(
      'wrong_dimension',
      { start: base.span.start, end: exponent.span.end },
      `${describe(base, text)}, to a power that varies`,
      'a fixed number as exponent of a quantity with a dimension',
      'divide the base by a reference quantity of its kind',
    );
  }
  return raiseDimension(base.dimension, exponent.expression.value);
}

function textOf({ span }: Typed, text: string): string {
  return text.slice(span.start, span.end);
}

/** `p.A`, a pressure (kg m^-1 s^-2) */
function describe(typed: Typed, text: string): string {
  const whole = textOf(typed, text);
  const shown = whole.length > 40 ? `${whole.slice(0, 37)}…` : whole;
  return `\`${shown}\`, ${describeDimension(typed.dimension)}`;
}
