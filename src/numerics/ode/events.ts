import { findRoot } from '../scalar-root.js';
import type { EventFunction, LocatedEvent } from './problem.js';

/** What the locator needs to know of a finished step. */
export interface FinishedStep {
  readonly start: number;
  readonly end: number;
  /** Writes the state at x into the target. */
  readonly stateAt: (x: number, target: Float64Array) => void;
  /** Writes f(x, y); false where it cannot be computed. */
  readonly derivativeAt: (x: number, y: Float64Array, target: Float64Array) => boolean;
  readonly size: number;
}

/** True when an event of this direction lies between two values of its function. */
export function crosses(before: number, after: number, direction: -1 | 0 | 1): boolean {
  if (Number.isNaN(before) || Number.isNaN(after)) return false;
  const rises = before < 0 && after >= 0;
  const falls = before > 0 && after <= 0;
  return (direction >= 0 && rises) || (direction <= 0 && falls);
}

/**
 * Positions within a step at which events happen, ascending.
 *
 * @param before - event values at the start of the step
 * @param after - event values at its end
 */
export function locateEvents(
  events: readonly EventFunction[],
  before: Float64Array,
  after: Float64Array,
  step: FinishedStep,
): LocatedEvent[] {
  const located: LocatedEvent[] = [];
  const state = new Float64Array(step.size);
  const derivative = new Float64Array(step.size);
  events.forEach((event, eventIndex) => {
    if (!crosses(before[eventIndex]!, after[eventIndex]!, event.direction)) return;
    const tolerance = 1e-12 * Math.max(Math.abs(step.end), step.end - step.start);
    const valueAt = (x: number): number => {
      if (x === step.start) return before[eventIndex]!;
      if (x === step.end) return after[eventIndex]!;
      step.stateAt(x, state);
      step.derivativeAt(x, state, derivative);
      return event.evaluate(x, state, derivative);
    };
    const { root } = findRoot(valueAt, step.start, step.end, tolerance);
    const stateThere = new Float64Array(step.size);
    step.stateAt(root, stateThere);
    located.push({ eventIndex, position: root, state: stateThere });
  });
  return located.sort((a, b) => a.position - b.position);
}
