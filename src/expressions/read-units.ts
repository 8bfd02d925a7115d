/** Units inside a formula: what stands behind a number literal, `4577.8 K`, `1 bar^-2`, `80 kJ/mol`. */
import type { MathNode } from 'mathjs/number';
import type { Span } from '../diagnostics/problem.js';
import {
  divideDimensions,
  multiplyDimensions,
  raiseDimension,
  type Dimension,
} from '../quantities/dimension.js';
import { findUnit, isGaugeUnit, nearestUnit } from '../quantities/units.js';
import { FormulaFault } from './formula-fault.js';
import type { FormulaScope } from './formula-scope.js';
import { contentOf, isPlainNumber, nameOf, symbolsOf, type OperatorLike } from './syntax-tree.js';
import type { TokenCursor } from './token-cursor.js';

/** A unit expression in a formula. */
export interface UnitInFormula {
  /** One of it in SI. */
  readonly factor: number;
  readonly dimension: Dimension;
  /** Where it ends in the text. */
  readonly end: number;
}

/** Whether the name means something besides a unit. */
function isName(name: string, scope: FormulaScope): boolean {
  return scope.constants.has(name) || ['T', 'P', 'R', 'K_eq'].includes(name);
}

/**
 * Units behind a number literal: symbols that are units and not names, their powers, products and quotients. Undefined (and nothing taken)
 * where the operand is something else.
 *
 * @param isImplicit - no sign stands between: then a name that is a constant and a unit could be either, and is refused
 */
export function unitBehind(
  node: MathNode,
  isImplicit: boolean,
  scope: FormulaScope,
  cursor: TokenCursor,
): UnitInFormula | undefined {
  const leaves = symbolsOf(node);
  if (!leaves || leaves.length === 0) return undefined;
  const known = leaves.find((name) => isName(name, scope));
  if (known !== undefined) {
    if (isImplicit && scope.constants.has(known) && findUnit(known)) {
      throw new FormulaFault(
        'bad_formula',
        cursor.ahead(known)!,
        `\`${known}\` behind a number: a unit and a constant of this reaction`,
        'one reading',
        `write \`* ${known}\` for the constant, or give the constant another name`,
      );
    }
    return undefined;
  }
  if (leaves.some((name) => !findUnit(name))) return undefined;
  const scale = leaves.find((name) => findUnit(name)!.offset !== undefined);
  if (scale !== undefined) {
    throw new FormulaFault(
      'unknown_unit',
      cursor.ahead(scale)!,
      `\`${scale}\`, a temperature scale with its own zero`,
      'kelvin in a formula',
      'convert to `K`',
    );
  }
  return readUnit(node, cursor);
}

/**
 * `k / 2 T` divides by 2 T to mathjs and by 2 to many a reader: behind a slash a product without a sign is a number with one unit, or refused.
 */
export function requireOneReading(divisor: MathNode, scope: FormulaScope, cursor: TokenCursor): void {
  const { implicit, args } = divisor as unknown as Partial<OperatorLike>;
  if (divisor.type !== 'OperatorNode' || implicit !== true || !args) return;
  const units = symbolsOf(args[1]!);
  const isNumberWithUnit =
    isPlainNumber(args[0]!) && units?.length === 1 && findUnit(units[0]!) && !isName(units[0]!, scope);
  if (isNumberWithUnit) return;
  throw new FormulaFault(
    'bad_formula',
    cursor.nextToken() ?? { start: 0, end: cursor.text.length },
    'a product without a sign behind a slash, which can be read in two ways',
    'one reading',
    'put the divisor in parentheses, or write `*` and `/`',
  );
}

/** How to mend an unknown name that stands where a unit would; undefined where it looks like none. */
export function mendOfUnit(name: string): string | undefined {
  if (isGaugeUnit(name)) return 'gauge pressure is never guessed: add the atmospheric pressure of your site';
  const [, symbol, exponent] = /^([A-Za-z]+)(\d)$/.exec(name) ?? [];
  const nearest = symbol !== undefined && findUnit(symbol) ? `${symbol}^${exponent!}` : nearestUnit(name);
  return nearest === undefined ? undefined : `did you mean \`${nearest}\`?`;
}

function readUnit(node: MathNode, cursor: TokenCursor): UnitInFormula {
  if (node.type === 'SymbolNode') {
    const name = nameOf(node);
    const token = cursor.take('name', name)!;
    const { factor, dimension } = findUnit(name)!;
    return { factor, dimension, end: token.end };
  }
  if (node.type === 'ParenthesisNode') return readUnit(contentOf(node), cursor);
  const { fn, args } = node as unknown as OperatorLike;
  const left = readUnit(args[0]!, cursor);
  if (fn === 'pow') {
    const { value, span } = readExponent(args[1]!, cursor);
    return {
      factor: left.factor ** value,
      dimension: raiseDimension(left.dimension, value),
      end: span.end,
    };
  }
  const right = readUnit(args[1]!, cursor);
  const divides = fn === 'divide';
  return {
    factor: divides ? left.factor / right.factor : left.factor * right.factor,
    dimension: (divides ? divideDimensions : multiplyDimensions)(left.dimension, right.dimension),
    end: right.end,
  };
}

/** A plain number, perhaps with a minus or in parentheses. */
function readExponent(node: MathNode, cursor: TokenCursor): { value: number; span: Span } {
  if (node.type === 'ParenthesisNode') {
    const { value, span } = readExponent(contentOf(node), cursor);
    return { value, span: cursor.widen(span, '(', ')') };
  }
  if (node.type === 'OperatorNode') {
    const { value, span } = readExponent((node as unknown as OperatorLike).args[0]!, cursor);
    return { value: -value, span: cursor.widen(span, '-') };
  }
  const token = cursor.take('number');
  if (!token) throw cursor.unsupported('a word that is no name', 'a number');
  return { value: Number(token.text), span: token };
}
