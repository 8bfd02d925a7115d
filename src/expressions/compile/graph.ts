/**
 * Expressions as a graph in which equal parts are one node: what is common to several laws is computed once. Built bottom-up with
 * simplification, so that derivatives do not carry products with zero and one.
 */

/** Node of the graph: an index into it. */
export type NodeId = number;

/** A number, an argument of the generated function, or an operation on other nodes. */
export type GraphNode =
  | { readonly kind: 'number'; readonly value: number }
  /** Argument of the generated function, by its text: one of the fixed names of the emitter. */
  | { readonly kind: 'input'; readonly name: string }
  | {
      readonly kind: 'operation';
      readonly operation: Operation;
      readonly operands: readonly NodeId[];
    };

/**
 * - `guarded_power`: a^b, 0 where a ≤ 0, whatever b: powers with a fixed fractional exponent above 0, and the slopes of powers. Rates of
 *   fractional order then end at zero concentration instead of leaving the real numbers.
 * - `varying_power`: a^b with an exponent that varies; 0 where a ≤ 0 and b > 0
 * - `guarded_log`: logarithm, 0 where a ≤ 0: beside a varying power, which is 0 there too
 * - `sqrt`: 0 where the operand is below 0
 * - `step`: 1 where the first operand is at most the second, else 0
 * - `equilibrium`, `equilibrium_slope`: supplied functions of temperature; the operand is a number, the reaction's index
 */
export type Operation =
  | 'add'
  | 'subtract'
  | 'multiply'
  | 'divide'
  | 'negate'
  | 'power'
  | 'guarded_power'
  | 'varying_power'
  | 'exp'
  | 'log'
  | 'guarded_log'
  | 'log10'
  | 'sqrt'
  | 'abs'
  | 'sign'
  | 'min'
  | 'max'
  | 'step'
  | 'equilibrium'
  | 'equilibrium_slope';

/** The graph under construction; nodes are only ever added, operands before what they belong to. */
export class Graph {
  readonly nodes: GraphNode[] = [];
  private readonly known = new Map<string, NodeId>();

  number(value: number): NodeId {
    return this.intern(`n${Object.is(value, -0) ? 0 : value}`, {
      kind: 'number',
      value: Object.is(value, -0) ? 0 : value,
    });
  }

  input(name: string): NodeId {
    return this.intern(`i${name}`, { kind: 'input', name });
  }

  /** Value of a node that is a plain number. */
  numberAt(id: NodeId): number | undefined {
    const node = this.nodes[id]!;
    return node.kind === 'number' ? node.value : undefined;
  }

  add(a: NodeId, b: NodeId): NodeId {
    const [x, y] = [this.numberAt(a), this.numberAt(b)];
    if (x !== undefined && y !== undefined) return this.number(x + y);
    if (x === 0) return b;
    if (y === 0) return a;
    return this.operation('add', ...sorted(a, b));
  }

  subtract(a: NodeId, b: NodeId): NodeId {
    const [x, y] = [this.numberAt(a), this.numberAt(b)];
    if (x !== undefined && y !== undefined) return this.number(x - y);
    if (y === 0) return a;
    if (x === 0) return this.negate(b);
    if (a === b) return this.number(0);
    return this.operation('subtract', a, b);
  }

  multiply(a: NodeId, b: NodeId): NodeId {
    const [x, y] = [this.numberAt(a), this.numberAt(b)];
    if (x !== undefined && y !== undefined) return this.number(x * y);
    if (x === 0 || y === 0) return this.number(0);
    if (x === 1) return b;
    if (y === 1) return a;
    if (x === -1) return this.negate(b);
    if (y === -1) return this.negate(a);
    return this.operation('multiply', ...sorted(a, b));
  }

  divide(a: NodeId, b: NodeId): NodeId {
    const [x, y] = [this.numberAt(a), this.numberAt(b)];
    if (x !== undefined && y !== undefined) return this.number(x / y);
    if (x === 0) return this.number(0);
    if (y === 1) return a;
    // A division costs more than a product, and 1/y is exact to rounding.
    if (y !== undefined && y !== 0 && Number.isFinite(1 / y)) return this.multiply(a, this.number(1 / y));
    return this.operation('divide', a, b);
  }

  negate(a: NodeId): NodeId {
    const x = this.numberAt(a);
    if (x !== undefined) return this.number(-x);
    const node = this.nodes[a]!;
    if (node.kind === 'operation' && node.operation === 'negate') return node.operands[0]!;
    return this.operation('negate', a);
  }

  power(a: NodeId, b: NodeId): NodeId {
    const [x, y] = [this.numberAt(a), this.numberAt(b)];
    if (x !== undefined && y !== undefined) return this.number(x ** y);
    // A base that is a number above 0 needs no guard.
    if (y === undefined) return this.operation(x !== undefined && x > 0 ? 'power' : 'varying_power', a, b);
    if (y === 0) return this.number(1);
    if (y === 1) return a;
    if (Number.isInteger(y) && Math.abs(y) <= 8) {
      const whole = this.wholePower(a, Math.abs(y));
      return y > 0 ? whole : this.divide(this.number(1), whole);
    }
    return this.operation(Number.isInteger(y) || y < 0 ? 'power' : 'guarded_power', a, b);
  }

  /** a^b where a > 0, else 0, whatever the sign of the exponent: derivatives of guarded and varying powers. */
  guardedPower(a: NodeId, b: NodeId): NodeId {
    const exponent = this.numberAt(b);
    if (exponent === 0) return this.number(1);
    if (exponent === 1) return a;
    return this.operation('guarded_power', a, b);
  }

  operation(operation: Operation, ...operands: readonly NodeId[]): NodeId {
    return this.intern(`${operation}(${operands.join(',')})`, { kind: 'operation', operation, operands });
  }

  /** Square-and-multiply, so that powers of one base share their squares. */
  private wholePower(a: NodeId, exponent: number): NodeId {
    if (exponent === 1) return a;
    const half = this.wholePower(a, Math.floor(exponent / 2));
    const square = this.multiply(half, half);
    return exponent % 2 === 0 ? square : this.multiply(square, a);
  }

  private intern(key: string, node: GraphNode): NodeId {
    const known = this.known.get(key);
    if (known !== undefined) return known;
    this.nodes.push(node);
    this.known.set(key, this.nodes.length - 1);
    return this.nodes.length - 1;
  }
}

/** Sums and products commute: one order for both. */
function sorted(a: NodeId, b: NodeId): [NodeId, NodeId] {
  return a <= b ? [a, b] : [b, a];
}
