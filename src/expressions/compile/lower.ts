import { gasConstant } from '../../quantities/constants.js';
import type { Expression, Variable } from '../expression.js';
import type { Graph, NodeId } from './graph.js';

/** Puts an expression into the graph. @param leaf - node of a variable */
export function lower(graph: Graph, expression: Expression, leaf: (variable: Variable) => NodeId): NodeId {
  const visit = (node: Expression): NodeId => {
    switch (node.kind) {
      case 'number':
        return graph.number(node.value);
      case 'variable':
        return leaf(node.variable);
      case 'negate':
        return graph.negate(visit(node.operand));
      case 'unary':
        return graph.operation(node.name, visit(node.operand));
      case 'binary': {
        const left = visit(node.left);
        const right = visit(node.right);
        switch (node.name) {
          case 'add':
            return graph.add(left, right);
          case 'subtract':
            return graph.subtract(left, right);
          case 'multiply':
            return graph.multiply(left, right);
          case 'divide':
            return graph.divide(left, right);
          case 'power':
            return graph.power(left, right);
          case 'min':
          case 'max':
            return graph.operation(node.name, left, right);
        }
      }
    }
  };
  return visit(expression);
}

/**
 * Nodes of the variables of an ideal gas in which concentrations, temperature and total pressure are the independent ones:
 * p_i = c_i R T, y_i = p_i / P, and fugacity is partial pressure.
 */
export function idealGasLeaf(
  graph: Graph,
  concentration: (speciesIndex: number) => NodeId,
): (variable: Variable) => NodeId {
  const temperature = graph.input('T');
  const pressure = graph.input('P');
  // One product for all partial pressures.
  const thermal = graph.multiply(graph.number(gasConstant), temperature);
  return (variable) => {
    switch (variable.kind) {
      case 'concentration':
        return concentration(variable.speciesIndex);
      case 'partial_pressure':
      case 'fugacity':
        return graph.multiply(concentration(variable.speciesIndex), thermal);
      case 'mole_fraction':
        return graph.divide(graph.multiply(concentration(variable.speciesIndex), thermal), pressure);
      case 'temperature':
        return temperature;
      case 'pressure':
        return pressure;
      case 'equilibrium_constant':
        return graph.operation('equilibrium', graph.number(variable.reactionIndex), temperature);
      case 'relative_radius':
        throw new Error('a rate law does not depend on the position in the pellet');
    }
  };
}
