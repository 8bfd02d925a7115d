/**
 * Text of a rate law or property formula to a checked expression in SI. mathjs parses; nothing of its tree is ever evaluated: a walk takes
 * over what the case format allows, resolves every name, reads numbers with units and checks dimensions on the way.
 */
import { create, parseDependencies, type MathNode } from 'mathjs/number';
import type { ReportFault } from '../diagnostics/problem.js';
import { formatDimension, isDimensionless } from '../quantities/dimension.js';
import { binary, number } from './build-expression.js';
import type { CheckedFormula, Expression } from './expression.js';
import { FormulaFault } from './formula-fault.js';
import type { FormulaScope } from './formula-scope.js';
import { scanFormula, type FormulaToken } from './scan-formula.js';
import { walkFormula } from './walk-formula.js';

export type { FormulaScope, WrittenIn } from './formula-scope.js';

const { parse } = create({ ...parseDependencies });

/**
 * @param text - one line; see the README, "Rate laws"
 * @param report - receives the faults, offsets within `text`; the first fault of a formula ends its reading
 */
export function parseFormula(
  text: string,
  scope: FormulaScope,
  report: ReportFault,
): CheckedFormula | undefined {
  const tokens = scanFormula(text, report);
  if (!tokens) return undefined;
  let tree: MathNode;
  try {
    tree = parse(text);
  } catch (error) {
    reportSyntax(text, tokens, error, report);
    return undefined;
  }
  try {
    const typed = walkFormula(tree, text, tokens, scope);
    if (!isFinite(typed.expression)) {
      throw new FormulaFault(
        'bad_formula',
        { start: 0, end: text.length },
        'a division by zero or a number without bounds',
        'finite numbers',
      );
    }
    const { writtenIn } = scope;
    if (!writtenIn) return { expression: typed.expression, dimension: typed.dimension, text };
    if (!isDimensionless(typed.dimension)) {
      throw new FormulaFault(
        'wrong_dimension',
        { start: 0, end: text.length },
        `a law whose numbers come out in ${formatDimension(typed.dimension)}`,
        'a pure number, since `written_in` says in what units to read it',
        'give its constants without units, or leave `written_in` out',
      );
    }
    return {
      expression: binary('multiply', number(writtenIn.result.factor), typed.expression),
      dimension: writtenIn.result.dimension,
      text,
    };
  } catch (error) {
    if (!(error instanceof FormulaFault)) throw error;
    const { code, span, found, expected, mend } = error;
    report({ code, severity: 'error', span, found, expected, ...(mend !== undefined && { mend }) });
    return undefined;
  }
}

function isFinite(expression: Expression): boolean {
  switch (expression.kind) {
    case 'number':
      return Number.isFinite(expression.value);
    case 'variable':
      return true;
    case 'negate':
    case 'unary':
      return isFinite(expression.operand);
    case 'binary': {
      const { name, left, right } = expression;
      const dividesByZero = name === 'divide' && right.kind === 'number' && right.value === 0;
      return !dividesByZero && isFinite(left) && isFinite(right);
    }
  }
}

function reportSyntax(
  text: string,
  tokens: readonly FormulaToken[],
  error: unknown,
  report: ReportFault,
): void {
  const place = (error as { char?: number }).char;
  const at = typeof place === 'number' ? Math.min(Math.max(place - 1, 0), text.length) : text.length;
  const token = tokens.find(({ end }) => end > at);
  report({
    code: 'bad_formula',
    severity: 'error',
    span: token
      ? { start: token.start, end: token.end }
      : { start: Math.max(0, text.length - 1), end: text.length },
    found: token ? `\`${token.text}\` where the formula cannot go on so` : 'an end where more is due',
    expected: 'an expression of numbers, names, + - * / ^ and parentheses in pairs',
  });
}
