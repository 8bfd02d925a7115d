import type { Expression, Variable } from './expression.js';

/** Whether a formula refers to a variable of this kind anywhere. */
export function mentions(expression: Expression, kind: Variable['kind']): boolean {
  switch (expression.kind) {
    case 'number':
      return false;
    case 'variable':
      return expression.variable.kind === kind;
    case 'negate':
    case 'unary':
      return mentions(expression.operand, kind);
    case 'binary':
      return mentions(expression.left, kind) || mentions(expression.right, kind);
  }
}
