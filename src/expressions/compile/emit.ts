import type { Graph, GraphNode, NodeId } from './graph.js';

type OperationNode = Extract<GraphNode, { kind: 'operation' }>;

/** JavaScript of each operation, from the text of its operands. The guards let what is no number pass: the solver reports it. */
const templates: Readonly<Record<OperationNode['operation'], (a: string, b: string) => string>> = {
  add: (a, b) => `${a} + ${b}`,
  subtract: (a, b) => `${a} - ${b}`,
  multiply: (a, b) => `${a} * ${b}`,
  divide: (a, b) => `${a} / ${b}`,
  negate: (a) => `-${a}`,
  power: (a, b) => `Math.pow(${a}, ${b})`,
  guarded_power: (a, b) => `${a} <= 0 ? 0 : Math.pow(${a}, ${b})`,
  varying_power: (a, b) => `${a} <= 0 && ${b} > 0 ? 0 : Math.pow(${a}, ${b})`,
  exp: (a) => `Math.exp(${a})`,
  log: (a) => `Math.log(${a})`,
  guarded_log: (a) => `${a} <= 0 ? 0 : Math.log(${a})`,
  log10: (a) => `Math.log10(${a})`,
  sqrt: (a) => `${a} <= 0 ? 0 : Math.sqrt(${a})`,
  abs: (a) => `Math.abs(${a})`,
  sign: (a) => `Math.sign(${a})`,
  min: (a, b) => `Math.min(${a}, ${b})`,
  max: (a, b) => `Math.max(${a}, ${b})`,
  step: (a, b) => `${a} <= ${b} ? 1 : 0`,
  equilibrium: (a, b) => `k(${a}, ${b})`,
  equilibrium_slope: (a, b) => `dk(${a}, ${b})`,
};

/** A statement at the end of the generated body: what stands before the value is text of our own making, `r[q + 2] =` or `return`. */
export interface Assignment {
  readonly target: string;
  readonly node: NodeId;
}

/**
 * Straight-line statements that compute the assigned nodes, each needed node once, in order of dependence: everything that hangs on
 * temperature alone first.
 */
export function emitStatements(graph: Graph, assignments: readonly Assignment[]): string {
  const needed = new Set<NodeId>();
  const visit = (id: NodeId): void => {
    if (needed.has(id)) return;
    needed.add(id);
    const node = graph.nodes[id]!;
    if (node.kind === 'operation') node.operands.forEach(visit);
  };
  assignments.forEach(({ node }) => visit(node));
  const order = [...needed].sort((a, b) => a - b);
  const isThermal = new Map<NodeId, boolean>();
  for (const id of order) {
    const node = graph.nodes[id]!;
    isThermal.set(
      id,
      node.kind === 'number' ||
        (node.kind === 'input'
          ? node.name === 'T'
          : node.operands.every((operand) => isThermal.get(operand)!)),
    );
  }
  const operand = (id: NodeId): string => {
    const node = graph.nodes[id]!;
    if (node.kind === 'number') return node.value < 0 ? `(${String(node.value)})` : String(node.value);
    return node.kind === 'input' && node.name.length === 1 ? node.name : `t${id}`;
  };
  const statement = (id: NodeId): string[] => {
    const node = graph.nodes[id]!;
    if (node.kind === 'number' || (node.kind === 'input' && node.name.length === 1)) return [];
    if (node.kind === 'input') return [`const t${id} = ${node.name};`];
    const [a, b] = node.operands.map(operand);
    return [`const t${id} = ${templates[node.operation](a!, b ?? '')};`];
  };
  const [thermal, rest] = [order.filter((id) => isThermal.get(id)), order.filter((id) => !isThermal.get(id))];
  return [
    ...thermal.flatMap(statement),
    ...rest.flatMap(statement),
    ...assignments.map(({ target, node }) => `${target} ${operand(node)};`),
  ].join('\n');
}
