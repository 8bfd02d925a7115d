/**
 * Integration of dy/dx = f(x, y) over an interval with the three-stage Radau IIA method: adaptive steps, exact Jacobian reused
 * while Newton contracts well, dense output at given positions, events located on the dense output.
 *
 * Assumes f smooth within a step. Does not restart at discontinuities by itself: integrate piece by piece, or use the monitor.
 *
 * @source Hairer & Wanner, Solving Ordinary Differential Equations II, 2nd ed. (1996), sec. IV.8
 */
import { interpolateInto } from './dense-output.js';
import { locateEvents } from './events.js';
import type {
  EventFunction,
  IntegrationOptions,
  IntegrationResult,
  IntegrationStatus,
  LocatedEvent,
  OdeProblem,
} from './problem.js';
import { factoriseStageSystem, solveStages } from './stages.js';
import { estimateError, scaledRms, stepFactor, type StepHistory } from './step-control.js';
import { stagePositions } from './tableau.js';
import { createOdeWorkspace, type OdeWorkspace } from './workspace.js';

/** A Newton contraction below this keeps the Jacobian for the next step. */
const goodContraction = 1e-3;
/** Step changes within this band are not worth new factors. */
const keepStepBand: readonly [number, number] = [1, 1.2];
/** Shrinking after a failed stage solution or a right side that could not be computed. */
const failureShrink = 0.25;
/** Steps shorter than this fraction of the interval end the integration: the place is then known well enough for anyone. */
const shortestStepFraction = 1e-10;

/**
 * @param problem - right side and Jacobian
 * @param interval - [start, end], start < end
 * @param initialState - y(start), length `problem.size`; not changed
 * @returns states at the output positions that were reached, events in order, and how it ended
 */
export function integrate(
  problem: OdeProblem,
  interval: readonly [number, number],
  initialState: Float64Array,
  options: IntegrationOptions,
): IntegrationResult {
  const size = problem.size;
  const [start, end] = interval;
  const length = end - start;
  const workspace = createOdeWorkspace(size);
  const { work } = workspace;
  // A stage solution is good when its error is well below that of the step.
  const newtonTolerance = Math.max(
    (10 * Number.EPSILON) / options.relativeTolerance,
    Math.min(0.03, Math.sqrt(options.relativeTolerance)),
  );

  let x = start;
  let state: Float64Array = Float64Array.from(initialState);
  let nextState: Float64Array = new Float64Array(size);
  let derivative: Float64Array = new Float64Array(size);
  let nextDerivative: Float64Array = new Float64Array(size);
  const collector = createCollector(options, size);

  const finish = (status: IntegrationStatus): IntegrationResult => ({
    status,
    position: x,
    state: Float64Array.from(state),
    outputs: collector.outputs.slice(0, collector.reached() * size),
    reachedOutputs: collector.reached(),
    events: collector.events,
    work,
  });

  work.rightHandSides++;
  if (!problem.evaluate(x, state, derivative)) return finish('evaluation_failed');
  collector.begin(x, state, derivative);
  if (size === 0 || length <= 0) {
    collector.passWithoutStep(end, state);
    x = end;
    return finish('complete');
  }

  let step = Math.min(options.maximumStep, firstStep(derivative, state, length, options));
  let history: StepHistory | undefined;
  let previousStep = 0; // > 0 when `workspace.stages` holds the last accepted step
  let jacobianIsCurrent = false;
  let needsJacobian = true;
  let factorsStep = 0; // step length the factors belong to
  let afterRejection = true; // the first step counts as one

  while (x < end) {
    if (work.steps + work.rejectedSteps >= options.maximumSteps) return finish('step_limit');
    if (step < shortestStepFraction * length) return finish('evaluation_failed');
    // Stretch or halve rather than leave a sliver at the end.
    if (x + step * 1.0001 >= end) step = end - x;
    else if (x + step * 1.6 > end) step = (end - x) / 2;

    if (needsJacobian) {
      work.jacobians++;
      if (!problem.evaluateJacobian(x, state, workspace.jacobian)) return finish('evaluation_failed');
      needsJacobian = false;
      jacobianIsCurrent = true;
      factorsStep = 0;
    }
    if (factorsStep !== step) {
      if (!factoriseStageSystem(workspace, step)) {
        step *= 0.5;
        work.rejectedSteps++;
        continue;
      }
      factorsStep = step;
    }

    for (let i = 0; i < size; i++) {
      workspace.scale[i] =
        options.absoluteTolerances[i]! + options.relativeTolerance * Math.abs(state[i]!) || Number.MIN_VALUE;
    }
    guessStages(workspace, collector.lastStart, state, previousStep, step);
    const outcome = solveStages(problem, x, step, state, newtonTolerance, workspace);
    if (outcome.status !== 'converged') {
      work.rejectedSteps++;
      previousStep = 0;
      afterRejection = true;
      if (outcome.status === 'diverged' && !jacobianIsCurrent) needsJacobian = true;
      else step *= outcome.status === 'diverged' ? 0.5 : failureShrink;
      continue;
    }

    for (let i = 0; i < size; i++) nextState[i] = state[i]! + workspace.stages[2 * size + i]!;
    const error = estimateError(problem, x, step, state, derivative, afterRejection, workspace);
    if (!(error < 1)) {
      work.rejectedSteps++;
      previousStep = 0;
      afterRejection = true;
      step *= Number.isNaN(error)
        ? failureShrink
        : stepFactor(error, step, outcome.iterations, false, history);
      continue;
    }

    const nextX = step === end - x ? end : x + step;
    if (options.monitor?.(x, nextX, nextState) === 'repeat') {
      work.rejectedSteps++;
      previousStep = 0;
      work.rightHandSides++;
      if (!problem.evaluate(x, state, derivative)) return finish('evaluation_failed');
      needsJacobian = true;
      continue;
    }
    work.rightHandSides++;
    if (!problem.evaluate(nextX, nextState, nextDerivative)) {
      work.rejectedSteps++;
      previousStep = 0;
      afterRejection = true;
      step *= failureShrink;
      continue;
    }

    work.steps++;
    const factor = stepFactor(error, step, outcome.iterations, true, history);
    history = { step, error: Math.max(error, 1e-2) };
    const ending = collector.passStep(problem, x, nextX, state, nextState, nextDerivative, workspace);
    if (ending) {
      x = ending.position;
      state = ending.state;
      return finish('terminal_event');
    }
    previousStep = step;
    x = nextX;
    [state, nextState] = [nextState, state];
    [derivative, nextDerivative] = [nextDerivative, derivative];
    afterRejection = false;
    jacobianIsCurrent = false;
    needsJacobian = outcome.rate > goodContraction;
    const keepsStep = !needsJacobian && factor >= keepStepBand[0] && factor <= keepStepBand[1];
    if (!keepsStep) step = Math.min(options.maximumStep, step * factor);
  }
  return finish('complete');
}

/**
 * First step from the size of f alone: a hundredth of the time in which the solution would change by its own scale.
 * The error estimate corrects it within a step or two.
 */
function firstStep(
  derivative: Float64Array,
  state: Float64Array,
  length: number,
  options: IntegrationOptions,
): number {
  const scale = state.map(
    (value, i) =>
      options.absoluteTolerances[i]! + options.relativeTolerance * Math.abs(value) || Number.MIN_VALUE,
  );
  const speed = scaledRms(derivative, scale);
  const accurate = speed > 0 ? 1 / (speed * options.relativeTolerance ** 0.25) : Infinity;
  return Math.min(length / 10, Math.max(accurate, length * 1e-10));
}

/** Starting values of the stages: the last step's polynomial continued, or zero where there is none. */
function guessStages(
  workspace: OdeWorkspace,
  lastStart: Float64Array,
  state: Float64Array,
  previousStep: number,
  step: number,
): void {
  const { size, stages, trial, transformed } = workspace;
  if (previousStep === 0) {
    stages.fill(0);
    return;
  }
  for (let stage = 0; stage < 3; stage++) {
    interpolateInto(lastStart, stages, 1 + (stagePositions[stage]! * step) / previousStep, trial);
    for (let i = 0; i < size; i++) transformed[stage * size + i] = trial[i]! - state[i]!;
  }
  stages.set(transformed);
}

interface Ending {
  readonly position: number;
  readonly state: Float64Array;
}

interface Collector {
  readonly outputs: Float64Array;
  readonly events: LocatedEvent[];
  /** State at the start of the last accepted step, to which its stages belong. */
  readonly lastStart: Float64Array;
  reached: () => number;
  begin: (x: number, state: Float64Array, derivative: Float64Array) => void;
  passWithoutStep: (end: number, state: Float64Array) => void;
  passStep: (
    problem: OdeProblem,
    start: number,
    end: number,
    startState: Float64Array,
    endState: Float64Array,
    endDerivative: Float64Array,
    workspace: OdeWorkspace,
  ) => Ending | undefined;
}

/** Gathers outputs and events as steps are accepted; the stepping itself knows of neither. */
function createCollector(options: IntegrationOptions, size: number): Collector {
  const positions = options.outputPositions;
  const outputs = new Float64Array(positions.length * size);
  const events: LocatedEvent[] = [];
  const lastStart = new Float64Array(size);
  const before = new Float64Array(options.events.length);
  const after = new Float64Array(options.events.length);
  const scratch = new Float64Array(size);
  let reached = 0;
  const record = (state: Float64Array): void => {
    outputs.set(state, reached * size);
    reached++;
  };
  const evaluateEvents = (
    x: number,
    state: Float64Array,
    derivative: Float64Array,
    target: Float64Array,
  ): void => {
    options.events.forEach((event: EventFunction, k) => (target[k] = event.evaluate(x, state, derivative)));
  };
  return {
    outputs,
    events,
    lastStart,
    reached: () => reached,
    begin(x, state, derivative) {
      evaluateEvents(x, state, derivative, before);
      while (reached < positions.length && positions[reached]! <= x) record(state);
    },
    passWithoutStep(end, state) {
      while (reached < positions.length && positions[reached]! <= end) record(state);
    },
    passStep(problem, start, end, startState, endState, endDerivative, workspace) {
      lastStart.set(startState);
      const length = end - start;
      const stateAt = (x: number, target: Float64Array): void => {
        if (x === end) target.set(endState);
        else interpolateInto(lastStart, workspace.stages, (x - start) / length, target);
      };
      evaluateEvents(end, endState, endDerivative, after);
      const located = locateEvents(options.events, before, after, {
        start,
        end,
        size,
        stateAt,
        derivativeAt: (x, y, target) => {
          workspace.work.rightHandSides++;
          return problem.evaluate(x, y, target);
        },
      });
      before.set(after);
      const terminal = located.find(({ eventIndex }) => options.events[eventIndex]!.isTerminal);
      const last = terminal ? terminal.position : end;
      events.push(...located.filter(({ position }) => position <= last));
      while (reached < positions.length && positions[reached]! <= last) {
        stateAt(positions[reached]!, scratch);
        record(scratch);
      }
      return terminal && { position: terminal.position, state: terminal.state };
    },
  };
}
