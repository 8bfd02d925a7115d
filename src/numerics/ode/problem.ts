/**
 * An initial-value problem dy/dx = f(x, y) as the integrator sees it.
 * Both functions fill their last argument and return false where they cannot be computed; the integrator then tries a
 * shorter step and, when none is short enough, ends with the status `evaluation_failed`.
 */
export interface OdeProblem {
  readonly size: number;
  /** Writes f(x, y), length `size`. `y` is not changed. */
  readonly evaluate: (x: number, y: Float64Array, derivative: Float64Array) => boolean;
  /** Writes the exact df/dy, row-major `size × size` (row: equation). */
  readonly evaluateJacobian: (x: number, y: Float64Array, jacobian: Float64Array) => boolean;
}

/** A scalar function of the solution whose sign changes are located. */
export interface EventFunction {
  /** `derivative` is f(x, y). NaN means: no event here. */
  readonly evaluate: (x: number, y: Float64Array, derivative: Float64Array) => number;
  /** Which sign change counts: +1 from negative to positive, -1 the other way, 0 both. */
  readonly direction: -1 | 0 | 1;
  /** Ends the integration where it first happens. */
  readonly isTerminal: boolean;
}

/**
 * Called after a step has met its tolerance and before it is accepted. `repeat` discards the step and takes it anew with the same
 * length: for problems whose own inner resolution turned out too coarse and has been raised meanwhile.
 */
export type StepMonitor = (start: number, end: number, y: Float64Array) => 'accept' | 'repeat';

export interface IntegrationOptions {
  /** > 0; the local error of component i is held below relativeTolerance * |y_i| + absoluteTolerances[i]. */
  readonly relativeTolerance: number;
  /** One per component, ≥ 0, in the component's unit. */
  readonly absoluteTolerances: Float64Array;
  /** Longest step, > 0. */
  readonly maximumStep: number;
  /** Accepted plus rejected steps before giving up. */
  readonly maximumSteps: number;
  /** Ascending positions within the interval at which the solution is wanted. */
  readonly outputPositions: Float64Array;
  readonly events: readonly EventFunction[];
  readonly monitor?: StepMonitor;
}

export type IntegrationStatus = 'complete' | 'terminal_event' | 'evaluation_failed' | 'step_limit';

export interface LocatedEvent {
  /** Index into `events` of the options. */
  readonly eventIndex: number;
  readonly position: number;
  /** Solution there, from the dense output. */
  readonly state: Float64Array;
}

export interface IntegrationWork {
  steps: number;
  rejectedSteps: number;
  rightHandSides: number;
  jacobians: number;
  factorisations: number;
  newtonIterations: number;
}

export interface IntegrationResult {
  readonly status: IntegrationStatus;
  /** Where the integration ended and the state there. */
  readonly position: number;
  readonly state: Float64Array;
  /** Row-major, `reachedOutputs × size`: the states at the output positions that were reached. */
  readonly outputs: Float64Array;
  readonly reachedOutputs: number;
  readonly events: readonly LocatedEvent[];
  readonly work: IntegrationWork;
}
