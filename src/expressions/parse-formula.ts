/**
 * Text of a rate law or property formula to a checked expression in SI. mathjs parses; nothing of its tree is ever evaluated: a walk takes
 * over what the case format allows, resolves every name, reads numbers with units and checks dimensions on the way.
 */
import { create, parseDependencies, type MathNode } from 'mathjs/number';
import { didYouMean } from '../diagnostics/nearest-name.js';
import type { ProblemCode, ReportFault, Span } from '../diagnostics/problem.js';
import { gasConstant } from '../quantities/constants.js';
import {
  dimensionless,
  divideDimensions,
  formatDimension,
  isDimensionless,
  multiplyDimensions,
  raiseDimension,
  sameDimension,
  type Dimension,
} from '../quantities/dimension.js';
import { findUnit } from '../quantities/units.js';
import { binary, negate, number, unary, variable } from './build-expression.js';
import type { CheckedFormula, Expression, UnaryFunction, Variable } from './expression.js';
import { scanFormula, type FormulaToken } from './scan-formula.js';

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

interface Typed {
  readonly expression: Expression;
  readonly dimension: Dimension;
  readonly span: Span;
  /** A number literal, perhaps with units behind it: more units may follow. */
  readonly isLiteral: boolean;
}

const { parse } = create({ ...parseDependencies });

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
    const typed = new Walk(text, tokens, scope).whole(tree);
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

/** Carries the first fault out of the walk; never leaves this file. */
class FormulaFault extends Error {
  readonly code: ProblemCode;
  readonly span: Span;
  readonly found: string;
  readonly expected: string;
  readonly mend: string | undefined;
  constructor(code: ProblemCode, span: Span, found: string, expected: string, mend?: string) {
    super(found);
    this.code = code;
    // Often a token: only its place goes out.
    this.span = { start: span.start, end: span.end };
    this.found = found;
    this.expected = expected;
    this.mend = mend;
  }
}

class Walk {
  private readonly text: string;
  private readonly tokens: readonly FormulaToken[];
  private readonly scope: FormulaScope;
  /** Next token that has not been met: leaves are visited in the order of the text. */
  private next = 0;

  constructor(text: string, tokens: readonly FormulaToken[], scope: FormulaScope) {
    this.text = text;
    this.tokens = tokens;
    this.scope = scope;
  }

  /** The whole formula; nothing of the text may be left over, or the tree is not what the text says. */
  whole(tree: MathNode): Typed {
    const typed = this.visit(tree);
    const rest = this.nextLeaf();
    if (rest >= 0)
      throw this.unsupported(`\`${this.tokens[rest]!.text}\` there`, 'numbers and names in order');
    return typed;
  }

  private visit(node: MathNode): Typed {
    switch (node.type) {
      case 'ConstantNode':
        return this.constant();
      case 'ParenthesisNode': {
        const inner = this.visit((node as unknown as { content: MathNode }).content);
        return { ...inner, span: this.widen(inner.span, '(', ')'), isLiteral: false };
      }
      case 'SymbolNode':
        return this.name((node as unknown as { name: string }).name);
      case 'AccessorNode':
        return this.species(node as unknown as AccessorLike);
      case 'FunctionNode':
        return this.call(node as unknown as CallLike);
      case 'OperatorNode':
        return this.operator(node as unknown as OperatorLike);
      default:
        throw this.unsupported('this construction', 'numbers, names, + - * / ^ and the functions allowed');
    }
  }

  private constant(): Typed {
    const token = this.take('number');
    if (!token) throw this.unsupported('a word that is no name', 'a number');
    return {
      expression: number(Number(token.text)),
      dimension: dimensionless,
      span: token,
      isLiteral: true,
    };
  }

  private name(name: string): Typed {
    const token = this.take('name', name);
    if (!token) throw this.unsupported(`\`${name}\``, 'a name');
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

  private unknownName(name: string, token: Span): FormulaFault {
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
      didYouMean(name, names) ?? `define it under \`constants\``,
    );
  }

  /** `p.A` and its like. */
  private species(node: AccessorLike): Typed {
    const mapName = node.object.type === 'SymbolNode' ? node.object.name : undefined;
    const property = node.index?.dotNotation === true ? node.index.dimensions?.[0]?.value : undefined;
    const mapToken = mapName === undefined ? undefined : this.take('name', mapName);
    if (mapName === undefined || !mapToken || typeof property !== 'string') {
      throw this.unsupported('a dot behind something that is no map of species', '`p.A`, `c.A` or `y.A`');
    }
    const token = this.take('name', property);
    const span = { start: mapToken.start, end: token?.end ?? mapToken.end };
    if (!mapNames.has(mapName) || !token || this.scope.speciesIds.length === 0) {
      throw new FormulaFault(
        'bad_formula',
        span,
        `\`${mapName}.${property}\``,
        this.scope.speciesIds.length === 0 ? 'no composition in this formula' : 'a dot only behind p, c or y',
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
    if (mapName === 'f') {
      throw new FormulaFault(
        'not_supported_yet',
        span,
        `\`f.${property}\`, a fugacity`,
        'partial pressures: not supported yet',
        `write \`p.${property}\``,
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
        `\`${this.text.slice(typed.span.start, typed.span.end)}\``,
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
    const token = name === undefined ? undefined : this.take('name', name);
    if (name === undefined || !token)
      throw this.unsupported('a call of something that is no function', `one of ${functionNames.join(', ')}`);
    const isUnary = unaryNames.has(name);
    if (!isUnary && !manyNames.has(name)) {
      const isConstant = this.scope.constants.has(name) || name === 'T' || name === 'P' || name === 'R';
      throw new FormulaFault(
        'bad_formula',
        token,
        `\`${name}(…)\``,
        `one of the functions ${functionNames.join(', ')}`,
        isConstant ? `write \`${name} * (…)\` for a product` : didYouMean(name, functionNames),
      );
    }
    const operands = node.args.map((argument) => this.visit(argument));
    const span = this.widen({ start: token.start, end: operands.at(-1)?.span.end ?? token.end }, '', ')');
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
        this.requireSame(left, right, `compared by \`${name}\``);
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
    if (!isDimensionless(first.dimension)) {
      throw new FormulaFault(
        'wrong_dimension',
        first.span,
        `${this.describe(first)} as the argument of \`${name}\``,
        'a pure number there',
        'divide it by a quantity of the same kind',
      );
    }
    return result(dimensionless);
  }

  private operator(node: OperatorLike): Typed {
    if (node.fn === 'unaryMinus' || node.fn === 'unaryPlus') {
      const operand = this.visit(node.args[0]!);
      const span = this.widen(operand.span, node.op);
      return node.fn === 'unaryPlus'
        ? { ...operand, span }
        : { ...operand, span, expression: negate(operand.expression) };
    }
    const name = operatorNames.get(node.fn);
    if (!name || node.args.length !== 2) throw this.unsupported(`the operator \`${node.op}\``, '+ - * / ^');
    const left = this.visit(node.args[0]!);
    if (name === 'divide') this.requireOneReading(node.args[1]!);
    // Behind a bare number a unit needs no sign between; behind a number with a unit more may follow: `80 kJ/mol`.
    const takesUnit = node.implicit === true || !isDimensionless(left.dimension);
    if ((name === 'multiply' || name === 'divide') && left.isLiteral && takesUnit) {
      const unit = this.unitBehind(node.args[1]!, node.implicit === true);
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
        this.requireSame(left, right, name === 'add' ? 'added' : 'subtracted');
        return result(left.dimension);
      case 'multiply':
        return result(multiplyDimensions(left.dimension, right.dimension));
      case 'divide':
        return result(divideDimensions(left.dimension, right.dimension));
      case 'power':
        return result(this.powerDimension(left, right));
    }
  }

  private powerDimension(base: Typed, exponent: Typed): Dimension {
    if (!isDimensionless(exponent.dimension)) {
      throw new FormulaFault(
        'wrong_dimension',
        exponent.span,
        `${this.describe(exponent)} as an exponent`,
        'a pure number there',
      );
    }
    if (isDimensionless(base.dimension)) return dimensionless;
    if (exponent.expression.kind !== 'number') {
      throw new FormulaFault(
        'wrong_dimension',
        { start: base.span.start, end: exponent.span.end },
        `${this.describe(base)} to a power that varies`,
        'a fixed number as exponent of a quantity with a dimension',
        'divide the base by a reference quantity of its kind',
      );
    }
    return raiseDimension(base.dimension, exponent.expression.value);
  }

  /**
   * Units behind a number literal: symbols that are units and not names, their powers, products and quotients. Undefined (and nothing taken)
   * where the operand is something else.
   */
  private unitBehind(
    node: MathNode,
    isImplicit: boolean,
  ): { factor: number; dimension: Dimension; end: number } | undefined {
    const leaves = symbolsOf(node);
    if (!leaves || leaves.length === 0) return undefined;
    const known = leaves.find((name) => this.isName(name));
    if (known !== undefined) {
      if (isImplicit && this.scope.constants.has(known) && findUnit(known)) {
        const token = this.tokens.slice(this.next).find(({ text }) => text === known)!;
        throw new FormulaFault(
          'bad_formula',
          token,
          `\`${known}\` behind a number: a unit and a constant of this reaction`,
          'one reading',
          `write \`* ${known}\` for the constant, or give the constant another name`,
        );
      }
      return undefined;
    }
    const strange = leaves.find((name) => !findUnit(name));
    if (strange !== undefined) return undefined;
    const scale = leaves.find((name) => findUnit(name)!.offset !== undefined);
    if (scale !== undefined) {
      const token = this.tokens.slice(this.next).find(({ text }) => text === scale) ?? {
        start: 0,
        end: this.text.length,
      };
      throw new FormulaFault(
        'unknown_unit',
        token,
        `\`${scale}\`, a temperature scale with its own zero`,
        'kelvin in a formula',
        'convert to `K`',
      );
    }
    return this.unit(node);
  }

  /** Whether the name means something besides a unit. */
  private isName(name: string): boolean {
    return this.scope.constants.has(name) || ['T', 'P', 'R', 'K_eq'].includes(name);
  }

  private unit(node: MathNode): { factor: number; dimension: Dimension; end: number } {
    if (node.type === 'SymbolNode') {
      const { name } = node as unknown as { name: string };
      const token = this.take('name', name)!;
      const unit = findUnit(name)!;
      return { factor: unit.factor, dimension: unit.dimension, end: token.end };
    }
    if (node.type === 'ParenthesisNode') return this.unit((node as unknown as { content: MathNode }).content);
    const { fn, args } = node as unknown as OperatorLike;
    const left = this.unit(args[0]!);
    if (fn === 'pow') {
      const exponent = this.visit(args[1]!);
      const value = exponent.expression.kind === 'number' ? exponent.expression.value : Number.NaN;
      return {
        factor: left.factor ** value,
        dimension: raiseDimension(left.dimension, value),
        end: exponent.span.end,
      };
    }
    const right = this.unit(args[1]!);
    const divides = fn === 'divide';
    return {
      factor: divides ? left.factor / right.factor : left.factor * right.factor,
      dimension: (divides ? divideDimensions : multiplyDimensions)(left.dimension, right.dimension),
      end: right.end,
    };
  }

  /**
   * `k / 2 T` divides by 2 T to mathjs and by 2 to many a reader: behind a slash a product without a sign is a number with one unit, or refused.
   */
  private requireOneReading(divisor: MathNode): void {
    const { implicit, args } = divisor as unknown as Partial<OperatorLike>;
    if (divisor.type !== 'OperatorNode' || implicit !== true || !args) return;
    const units = symbolsOf(args[1]!);
    const isNumberWithUnit =
      isPlainNumber(args[0]!) && units?.length === 1 && findUnit(units[0]!) && !this.isName(units[0]!);
    if (isNumberWithUnit) return;
    throw new FormulaFault(
      'bad_formula',
      this.tokens[this.nextLeaf()] ?? { start: 0, end: this.text.length },
      'a product without a sign behind a slash, which can be read in two ways',
      'one reading',
      'put the divisor in parentheses, or write `*` and `/`',
    );
  }

  private requireSame(left: Typed, right: Typed, how: string): void {
    if (sameDimension(left.dimension, right.dimension)) return;
    throw new FormulaFault(
      'wrong_dimension',
      { start: left.span.start, end: right.span.end },
      `${this.describe(left)} and ${this.describe(right)}, ${how}`,
      'two quantities of the same kind',
      'check the units of the constants',
    );
  }

  private describe(typed: Typed): string {
    const text = this.text.slice(typed.span.start, typed.span.end);
    const shown = text.length > 40 ? `${text.slice(0, 37)}…` : text;
    return `\`${shown}\` (${isDimensionless(typed.dimension) ? 'a pure number' : formatDimension(typed.dimension)})`;
  }

  /** A span with the marks just before and behind it, where they are the ones named. */
  private widen(span: Span, before: string, after = ''): Span {
    const previous = this.tokens.findLast(({ end }) => end <= span.start);
    const following = this.tokens.find(({ start }) => start >= span.end);
    return {
      start: previous?.text === before ? previous.start : span.start,
      end: following?.text === after ? following.end : span.end,
    };
  }

  /** The next number or name, if it is the one asked for: a tree that leaves any out was not read as the text stands. */
  private take(kind: FormulaToken['kind'], text?: string): FormulaToken | undefined {
    const at = this.nextLeaf();
    const token = this.tokens[at];
    if (token?.kind !== kind || (text !== undefined && token.text !== text)) return undefined;
    this.next = at + 1;
    return token;
  }

  /** Index of the next number or name; -1 when there is none. */
  private nextLeaf(): number {
    for (let at = this.next; at < this.tokens.length; at++) {
      if (this.tokens[at]!.kind !== 'mark') return at;
    }
    return -1;
  }

  private unsupported(found: string, expected: string): FormulaFault {
    return new FormulaFault(
      'bad_formula',
      this.tokens[this.nextLeaf()] ?? this.tokens.at(-1)!,
      found,
      expected,
    );
  }
}

interface OperatorLike {
  readonly op: string;
  readonly fn: string;
  readonly args: readonly MathNode[];
  readonly implicit?: boolean;
}
interface CallLike {
  readonly fn: { readonly type: string; readonly name: string };
  readonly args: readonly MathNode[];
}
interface AccessorLike {
  readonly object: { readonly type: string; readonly name: string };
  readonly index?: {
    readonly dotNotation?: boolean;
    readonly dimensions?: readonly { readonly value?: unknown }[];
  };
}

/** Names in what may be a unit expression (products, quotients, numeric powers of names); undefined where it holds anything else. */
function symbolsOf(node: MathNode): string[] | undefined {
  if (node.type === 'SymbolNode') return [(node as unknown as { name: string }).name];
  if (node.type === 'ParenthesisNode') return symbolsOf((node as unknown as { content: MathNode }).content);
  if (node.type !== 'OperatorNode') return undefined;
  const { fn, args } = node as unknown as OperatorLike;
  const left = args[0] && symbolsOf(args[0]);
  if (!left) return undefined;
  if (fn === 'pow') return isPlainNumber(args[1]!) ? left : undefined;
  if (fn !== 'multiply' && fn !== 'divide') return undefined;
  const right = symbolsOf(args[1]!);
  return right && [...left, ...right];
}

function isPlainNumber(node: MathNode): boolean {
  if (node.type === 'ConstantNode') return true;
  if (node.type === 'ParenthesisNode')
    return isPlainNumber((node as unknown as { content: MathNode }).content);
  const { fn, args } = node as unknown as OperatorLike;
  return node.type === 'OperatorNode' && fn === 'unaryMinus' && isPlainNumber(args[0]!);
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
