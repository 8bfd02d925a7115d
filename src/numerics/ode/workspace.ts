import type { IntegrationWork } from './problem.js';

/**
 * Memory of one integration. Nothing in it survives between integrations; within one, `jacobian`, the factors and the
 * stages of the last accepted step do.
 */
export interface OdeWorkspace {
  readonly size: number;
  /** Three stage differences Z_i one after another, `3 × size`. */
  readonly stages: Float64Array;
  readonly transformed: Float64Array;
  readonly stageDerivatives: Float64Array;
  readonly increments: Float64Array;
  readonly imaginaryIncrement: Float64Array;
  readonly trial: Float64Array;
  readonly derivative: Float64Array;
  readonly error: Float64Array;
  readonly scale: Float64Array;
  readonly jacobian: Float64Array;
  readonly realFactors: Float64Array;
  readonly realPivots: Int32Array;
  readonly complexFactorsReal: Float64Array;
  readonly complexFactorsImaginary: Float64Array;
  readonly complexPivots: Int32Array;
  readonly work: IntegrationWork;
}

/** Allocates everything one integration of `size` equations needs. */
export function createOdeWorkspace(size: number): OdeWorkspace {
  const vector = (): Float64Array => new Float64Array(size);
  const matrix = (): Float64Array => new Float64Array(size * size);
  return {
    size,
    stages: new Float64Array(3 * size),
    transformed: new Float64Array(3 * size),
    stageDerivatives: new Float64Array(3 * size),
    increments: new Float64Array(3 * size),
    imaginaryIncrement: vector(),
    trial: vector(),
    derivative: vector(),
    error: vector(),
    scale: vector(),
    jacobian: matrix(),
    realFactors: matrix(),
    realPivots: new Int32Array(size),
    complexFactorsReal: matrix(),
    complexFactorsImaginary: matrix(),
    complexPivots: new Int32Array(size),
    work: {
      steps: 0,
      rejectedSteps: 0,
      rightHandSides: 0,
      jacobians: 0,
      factorisations: 0,
      newtonIterations: 0,
    },
  };
}
