/**
 * The walk over the parser's tree: takes over what the case format allows, resolves every name, reads numbers with units and checks
 * dimensions on the way. Ends with a FormulaFault at the first thing that is not allowed.
 */
import type { MathNode } from 'mathjs/number';
import { didYouMean } from '../diagnostics/nearest-name.js';
import { gasConstant } from '../quantities/constants.js';
import {
  dimensionless,
  divideDimensions,
  isDimensionless,
  multiplyDimensions,
  raiseDimension,
  type Dimension,
} from '../quantities/dimension.js';
import { findUnit } from '../quantities/units.js';
import { binary, negate, number, unary, variable } from './build-expression.js';
import type { Expression, UnaryFunction, Variable } from './expression.js';
import { powerDimension, requirePure, requireSame, type Typed } from './dimension-rules.js';
import { FormulaFault } from './formula-fault.js';
import type { FormulaScope } from './formula-scope.js';
import { mendOfUnit, requireOneReading, unitBehind } from './read-units.js';
import type { FormulaToken } from './scan-formula.js';
import { contentOf, nameOf, type AccessorLike, type CallLike, type OperatorLike } from './syntax-tree.js';
import { TokenCursor } from './token-cursor.js';

const pressureDimension: Dimension = [1, -1, -2, 0, 0];
const concentrationDimension: Dimension = [0, -3, 0, 1, 0];
const temperatureDimension: Dimension = [0, 0, 0, 0, 1];
const gasConstantDimension: Dimension = [1, 2, -2, -1, -1];

const unaryNames: ReadonlySet<string> = new Set<UnaryFunction>(['exp', 'log', 'log10', 'sqrt', 'abs']);
const manyNames: ReadonlySet<string> = new Set(['min', 'max']);
const functionNames = [...unaryNames, ...manyNames];
const mapNames: ReadonlySet<string> = new Set(['p', 'c', 'y', 'f']);

const operatorNames: ReadonlyMap<string, 'add' | 'subtract' | 'multiply' | 'divide' | 'power'> = new Map([
  ['add', 'add'],
  ['subtract', 'subtract'],
  ['multiply', 'multiply'],
  ['divide', 'divide'],
  ['pow', 'power'],
]);

/**
 * @param tree - the parser's, of `text`
 * @param tokens - of the same text
 * @throws FormulaFault
 */
export function walkFormula(
  tree: MathNode,
  text: string,
  tokens: readonly FormulaToken[],
  scope: FormulaScope,
): Typed {
  const cursor = new TokenCursor(text, tokens);
  const typed = new Walk(cursor, scope).visit(tree);
  const rest = cursor.nextToken();
  // Something left over: the tree is not what the text says.
  if (rest) throw cursor.unsupported(`\`${rest.text}\` there`, 'numbers and names in order');
  return typed;
}

class Walk {
  private readonly cursor: TokenCursor;
  private readonly scope: FormulaScope;

  constructor(cursor: TokenCursor, scope: FormulaScope) {
    this.cursor = cursor;
    this.scope = scope;
  }

  visit(node: MathNode): Typed {
    switch (node.type) {
      case 'ConstantNode':
        return this.constant();
      case 'ParenthesisNode': {
        const inner = this.visit(contentOf(node));
        return { ...inner, span: this.cursor.widen(inner.span, '(', ')'), isLiteral: false };
      }
      case 'SymbolNode':
        return this.name(nameOf(node));
      case 'AccessorNode':
        return this.species(node as unknown as AccessorLike);
      case 'FunctionNode':
        return this.call(node as unknown as CallLike);
      case 'OperatorNode':
        return this.operator(node as unknown as OperatorLike);
      default:
        throw this.cursor.unsupported(
          'this construction',
          'numbers, names, + - * / ^ and the functions allowed',
        );
    }
  }

  private constant(): Typed {
    const token = this.cursor.take('number');
    if (!token) throw this.cursor.unsupported('a word that is no name', 'a number');
    return {
      expression: number(Number(token.text)),
      dimension: dimensionless,
      span: token,
      isLiteral: true,
    };
  }

  private name(name: string): Typed {
    const token = this.cursor.take('name', name);
    if (!token) throw this.cursor.unsupported(`\`${name}\``, 'a name');
    const { scope } = this;
    const known = scope.constants.get(name);
    const leaf = (expression: Expression, dimension: Dimension): Typed => ({
      expression,
      dimension,
      span: token,
      isLiteral: false,
    });
    if (known) return leaf(known.expression, known.dimension);
    if (name === 'T' && scope.allowsTemperature) {
      return this.read(
        leaf(variable({ kind: 'temperature' }), temperatureDimension),
        scope.writtenIn?.temperature,
      );
    }
    if (name === 'P' && scope.allowsPressure) {
      return this.read(leaf(variable({ kind: 'pressure' }), pressureDimension), scope.writtenIn?.pressure);
    }
    if (name === 'R') return leaf(number(gasConstant), gasConstantDimension);
    if (name === 'K_eq' && scope.equilibriumReaction !== undefined) {
      return leaf(
        variable({ kind: 'equilibrium_constant', reactionIndex: scope.equilibriumReaction }),
        dimensionless,
      );
    }
    throw this.unknownName(name, token);
  }

  private unknownName(name: string, token: FormulaToken): FormulaFault {
    const isMap = mapNames.has(name) && this.scope.speciesIds.length > 0;
    if (isMap) {
      return new FormulaFault(
        'bad_formula',
        token,
        `\`${name}\` alone`,
        `a species behind it: \`${name}.${this.scope.speciesIds[0]!}\``,
      );
    }
    if (functionNames.includes(name)) {
      return new FormulaFault('bad_formula', token, `\`${name}\` without its argument`, `\`${name}(…)\``);
    }
    if (findUnit(name)) {
      return new FormulaFault(
        'unknown_name',
        token,
        `\`${name}\`, which is a unit but follows no number, and no constant of that name`,
        'a unit directly behind a number, or a name that is known here',
        `define \`${name}\` under \`constants\`, or write a number before it`,
      );
    }
    const names = [
      ...this.scope.constants.keys(),
      ...(this.scope.allowsTemperature ? ['T'] : []),
      ...(this.scope.allowsPressure ? ['P'] : []),
      'R',
      ...(this.scope.equilibriumReaction !== undefined ? ['K_eq'] : []),
    ];
    return new FormulaFault(
      'unknown_name',
      token,
      `\`${name}\`, which is not defined`,
      `one of ${names.map((entry) => `\`${entry}\``).join(', ')}`,
      (this.cursor.isBehindNumber(token) ? mendOfUnit(name) : undefined) ??
        didYouMean(name, names) ??
        `define it under \`constants\``,
    );
  }

  /** `p.A` and its like. */
  private species(node: AccessorLike): Typed {
    const mapName = node.object.type === 'SymbolNode' ? node.object.name : undefined;
    const property = node.index?.dotNotation === true ? node.index.dimensions?.[0]?.value : undefined;
    const mapToken = mapName === undefined ? undefined : this.cursor.take('name', mapName);
    if (mapName === undefined || !mapToken || typeof property !== 'string') {
      throw this.cursor.unsupported(
        'a dot behind something that is no map of species',
        '`p.A`, `c.A` or `y.A`',
      );
    }
    const token = this.cursor.take('name', property);
    const span = { start: mapToken.start, end: token?.end ?? mapToken.end };
    if (!mapNames.has(mapName) || !token || this.scope.speciesIds.length === 0) {
      throw new FormulaFault(
        'bad_formula',
        span,
        `\`${mapName}.${property}\``,
        this.scope.speciesIds.length === 0
          ? 'no composition in this formula'
          : 'a dot only behind p, c, y or f',
      );
    }
    const speciesIndex = this.scope.speciesIds.indexOf(property);
    if (speciesIndex < 0) {
      throw new FormulaFault(
        'unknown_name',
        token,
        `\`${property}\`, which is no species of this case`,
        `one of ${this.scope.speciesIds.join(', ')}`,
        didYouMean(property, this.scope.speciesIds),
      );
    }
    const leaf = (
      kind: Extract<Variable, { speciesIndex: number }>['kind'],
      dimension: Dimension,
    ): Typed => ({
      expression: variable({ kind, speciesIndex }),
      dimension,
      span,
      isLiteral: false,
    });
    const { writtenIn } = this.scope;
    if (mapName === 'p') return this.read(leaf('partial_pressure', pressureDimension), writtenIn?.pressure);
    if (mapName === 'f') return this.read(leaf('fugacity', pressureDimension), writtenIn?.pressure);
    if (mapName === 'c')
      return this.read(leaf('concentration', concentrationDimension), writtenIn?.concentration);
    return leaf('mole_fraction', dimensionless);
  }

  /** A variable as a pure number of the units the law is written in. */
  private read(typed: Typed, unit: number | undefined): Typed {
    if (!this.scope.writtenIn) return typed;
    if (unit === undefined) {
      throw new FormulaFault(
        'bad_formula',
        typed.span,
        `\`${this.cursor.text.slice(typed.span.start, typed.span.end)}\``,
        'a unit for it under `written_in`, since the law is empirical',
      );
    }
    return {
      ...typed,
      expression: binary('divide', typed.expression, number(unit)),
      dimension: dimensionless,
    };
  }

  private call(node: CallLike): Typed {
    const name = node.fn.type === 'SymbolNode' ? node.fn.name : undefined;
    const token = name === undefined ? undefined : this.cursor.take('name', name);
    if (name === undefined || !token)
      throw this.cursor.unsupported(
        'a call of something that is no function',
        `one of ${functionNames.join(', ')}`,
      );
    const { text } = this.cursor;
    const isUnary = unaryNames.has(name);
    if (!isUnary && !manyNames.has(name)) {
      const isConstant = this.scope.constants.has(name) || name === 'T' || name === 'P' || name === 'R';
      throw new FormulaFault(
        'bad_formula',
        token,
        `\`${name}(…)\``,
        `one of the functions ${functionNames.join(', ')}`,
        isConstant || findUnit(name)
          ? `write \`${name} * (…)\` for a product`
          : didYouMean(name, functionNames),
      );
    }
    const operands = node.args.map((argument) => this.visit(argument));
    const span = this.cursor.widen(
      { start: token.start, end: operands.at(-1)?.span.end ?? token.end },
      '',
      ')',
    );
    if (isUnary ? operands.length !== 1 : operands.length < 2) {
      throw new FormulaFault(
        'bad_formula',
        span,
        `\`${name}\` with ${operands.length} arguments`,
        isUnary ? 'exactly one' : 'two or more',
      );
    }
    const first = operands[0]!;
    if (!isUnary) {
      const folded = operands.slice(1).reduce((left, right): Typed => {
        requireSame(left, right, `compared by \`${name}\` with`, text);
        return {
          ...left,
          expression: binary(name as 'min' | 'max', left.expression, right.expression),
          span: { start: left.span.start, end: right.span.end },
        };
      }, first);
      return { ...folded, span, isLiteral: false };
    }
    const result = (dimension: Dimension): Typed => ({
      expression: unary(name as UnaryFunction, first.expression),
      dimension,
      span,
      isLiteral: false,
    });
    if (name === 'abs') return result(first.dimension);
    if (name === 'sqrt') return result(raiseDimension(first.dimension, 0.5));
    requirePure(first, `as the argument of \`${name}\``, text);
    return result(dimensionless);
  }

  private operator(node: OperatorLike): Typed {
    if (node.fn === 'unaryMinus' || node.fn === 'unaryPlus') {
      const operand = this.visit(node.args[0]!);
      const span = this.cursor.widen(operand.span, node.op);
      return node.fn === 'unaryPlus'
        ? { ...operand, span }
        : { ...operand, span, expression: negate(operand.expression) };
    }
    const name = operatorNames.get(node.fn);
    if (!name || node.args.length !== 2)
      throw this.cursor.unsupported(`the operator \`${node.op}\``, '+ - * / ^');
    const left = this.visit(node.args[0]!);
    if (name === 'divide') requireOneReading(node.args[1]!, this.scope, this.cursor);
    // Behind a bare number a unit needs no sign between; behind a number with a unit more may follow: `80 kJ/mol`.
    const takesUnit = node.implicit === true || !isDimensionless(left.dimension);
    if ((name === 'multiply' || name === 'divide') && left.isLiteral && takesUnit) {
      const unit = unitBehind(node.args[1]!, node.implicit === true, this.scope, this.cursor);
      if (unit) {
        const factor = name === 'divide' ? 1 / unit.factor : unit.factor;
        return {
          expression: binary('multiply', left.expression, number(factor)),
          dimension: (name === 'divide' ? divideDimensions : multiplyDimensions)(
            left.dimension,
            unit.dimension,
          ),
          span: { start: left.span.start, end: unit.end },
          isLiteral: true,
        };
      }
    }
    const right = this.visit(node.args[1]!);
    const span = { start: left.span.start, end: right.span.end };
    const result = (dimension: Dimension): Typed => ({
      expression: binary(name, left.expression, right.expression),
      dimension,
      span,
      // `1/2 K` is half a kelvin to mathjs and to the reader.
      isLiteral: name === 'divide' && left.isLiteral && right.isLiteral && isDimensionless(left.dimension),
    });
    switch (name) {
      case 'add':
      case 'subtract':
        requireSame(left, right, name === 'add' ? 'added to' : 'less', this.cursor.text);
        return result(left.dimension);
      case 'multiply':
        return result(multiplyDimensions(left.dimension, right.dimension));
      case 'divide':
        return result(divideDimensions(left.dimension, right.dimension));
      case 'power':
        return result(powerDimension(left, right, this.cursor.text));
    }
  }
}
