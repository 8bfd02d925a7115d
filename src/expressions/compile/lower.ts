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
 * Nodes of the variables of a fluid in which concentrations, temperature and total pressure are the independent ones:
 * p_i = Z c_i R T, y_i = p_i / P, f_i = φ_i p_i. In an ideal gas Z and φ_i are one.
 *
 * @param factor - node of Z (index 0) and of φ of species i (index i + 1); absent for an ideal gas
 */
export function fluidLeaf(
  graph: Graph,
  concentration: (speciesIndex: number) => NodeId,
  factor?: (index: number) => NodeId,
): (variable: Variable) => NodeId {
  const temperature = graph.input('T');
  const pressure = graph.input('P');
  // One product for all partial pressures.
  const ideal = graph.multiply(graph.number(gasConstant), temperature);
  const thermal = factor ? graph.multiply(factor(0), ideal) : ideal;
  return (variable) => {
    switch (variable.kind) {
      case 'concentration':
        return concentration(variable.speciesIndex);
      case 'partial_pressure':
        return graph.multiply(concentration(variable.speciesIndex), thermal);
      case 'fugacity': {
        const partialPressure = graph.multiply(concentration(variable.speciesIndex), thermal);
        return factor ? graph.multiply(factor(variable.speciesIndex + 1), partialPressure) : partialPressure;
      }
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
