import type { Graph, NodeId } from './graph.js';

const ln10 = Math.LN10;

/**
 * Exact derivatives of one node with respect to inputs, as new nodes of the same graph, by reverse accumulation: one sweep from the result
 * down gives all of them.
 *
 * Where a function has a corner (`abs` at 0, `min` and `max` at equality) the derivative of one side is taken: 0 for `abs`, the first
 * operand's for `min` and `max`.
 */
export function differentiate(graph: Graph, result: NodeId, inputs: readonly NodeId[]): NodeId[] {
  const zero = graph.number(0);
  const adjoints = new Map<NodeId, NodeId>([[result, graph.number(1)]]);
  const contribute = (to: NodeId, amount: NodeId): void => {
    const present = adjoints.get(to);
    adjoints.set(to, present === undefined ? amount : graph.add(present, amount));
  };
  const naturalLogarithm = (a: NodeId): NodeId => graph.number(Math.log(graph.numberAt(a)!));
  // Operands always have smaller indices than what they belong to.
  for (let id = result; id >= 0; id--) {
    const adjoint = adjoints.get(id);
    const node = graph.nodes[id]!;
    if (adjoint === undefined || node.kind !== 'operation' || adjoint === zero) continue;
    const [a, b] = node.operands as [NodeId, NodeId];
    const times = (factor: NodeId): NodeId => graph.multiply(adjoint, factor);
    switch (node.operation) {
      case 'add':
        contribute(a, adjoint);
        contribute(b, adjoint);
        break;
      case 'subtract':
        contribute(a, adjoint);
        contribute(b, graph.negate(adjoint));
        break;
      case 'multiply':
        contribute(a, times(b));
        contribute(b, times(a));
        break;
      case 'divide':
        contribute(a, graph.divide(adjoint, b));
        contribute(b, graph.negate(graph.divide(times(id), b)));
        break;
      case 'negate':
        contribute(a, graph.negate(adjoint));
        break;
      case 'power': {
        const exponent = graph.numberAt(b);
        // Otherwise the base is a number above 0: only the exponent varies.
        if (exponent === undefined) contribute(b, times(graph.multiply(id, naturalLogarithm(a))));
        else contribute(a, times(graph.multiply(b, graph.power(a, graph.number(exponent - 1)))));
        break;
      }
      case 'varying_power':
        contribute(a, times(graph.multiply(b, graph.guardedPower(a, graph.subtract(b, graph.number(1))))));
        contribute(b, times(graph.multiply(id, graph.operation('guarded_log', a))));
        break;
      case 'guarded_power': {
        const exponent = graph.numberAt(b)!;
        contribute(a, times(graph.multiply(b, graph.guardedPower(a, graph.number(exponent - 1)))));
        break;
      }
      case 'exp':
        contribute(a, times(id));
        break;
      case 'log':
        contribute(a, graph.divide(adjoint, a));
        break;
      case 'log10':
        contribute(a, graph.divide(adjoint, graph.multiply(a, graph.number(ln10))));
        break;
      case 'sqrt':
        contribute(a, times(graph.multiply(graph.number(0.5), graph.guardedPower(a, graph.number(-0.5)))));
        break;
      case 'abs':
        contribute(a, times(graph.operation('sign', a)));
        break;
      case 'min': {
        const takesFirst = graph.operation('step', a, b);
        contribute(a, times(takesFirst));
        contribute(b, times(graph.subtract(graph.number(1), takesFirst)));
        break;
      }
      case 'max': {
        const takesFirst = graph.operation('step', b, a);
        contribute(a, times(takesFirst));
        contribute(b, times(graph.subtract(graph.number(1), takesFirst)));
        break;
      }
      case 'equilibrium':
        // Operands: reaction index, temperature.
        contribute(b, times(graph.operation('equilibrium_slope', a, b)));
        break;
      case 'sign':
      case 'step':
      case 'guarded_log':
      case 'equilibrium_slope':
        // Constant almost everywhere, or never differentiated again.
        break;
    }
  }
  return inputs.map((input) => adjoints.get(input) ?? zero);
}
