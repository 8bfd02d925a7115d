import { integrate } from '../numerics/ode/integrate.js';
import type { IntegrationResult } from '../numerics/ode/problem.js';
import type { BalanceFailure, Balances } from './balances.js';
import type { BedEvent } from './bed-events.js';
import type { ReactorModel } from './reactor-model.js';
import type { StopReason } from './run-result.js';

/**
 * Absolute part of the integrator's tolerance, as a fraction of the run's tolerance on each unknown's scale: results near zero (a conversion
 * of a millionth) are then still good to a percent of the tolerance asked.
 */
const absoluteShare = 0.1;
/**
 * The integrator's local tolerance over the tolerance asked of the results. Measured on a first-order bed and a cooled tube with a hot spot: with
 * a factor of 5 exit flows, peak and profile are within half of the tolerance asked to twice that (peak position).
 */
const localToleranceFactor = 5;
const maximumSteps = 20_000;

/** Walks down the bed. The pellet's resolution is reviewed at the inlet and at the end of every step. */
export function integrateBed(
  model: ReactorModel,
  balances: Balances,
  events: readonly BedEvent[],
  outputPositions: Float64Array,
): IntegrationResult {
  const tolerance = localToleranceFactor * model.specification.numerics.tolerance;
  const { length } = model.specification.bed;
  if (balances.unpack(balances.initialState)) model.pellet.reviewResolution(balances.conditions);
  return integrate(balances.problem, [0, length], balances.initialState, {
    relativeTolerance: tolerance,
    absoluteTolerances: balances.stateScales.map((scale) => scale * tolerance * absoluteShare),
    maximumStep: length,
    maximumSteps,
    outputPositions,
    events: events.map((event) => event.function),
    monitor(_start, _end, state) {
      if (!balances.unpack(state)) return 'accept';
      return model.pellet.reviewResolution(balances.conditions) === 'raised' ? 'repeat' : 'accept';
    },
  });
}

const reasonOfFailure: Record<BalanceFailure['kind'], StopReason> = {
  no_state: 'no_pellet_state',
  overdrawn: 'reactant_overdrawn',
  rates_not_finite: 'rate_not_finite',
  conditions: 'property_range_left',
};

/** Why an integration did not reach the end of the bed; undefined when it did. */
export function stopReason(
  result: IntegrationResult,
  balances: Balances,
  events: readonly BedEvent[],
): StopReason | undefined {
  switch (result.status) {
    case 'complete':
      return undefined;
    case 'step_limit':
      return 'step_limit';
    case 'terminal_event': {
      const last = result.events.at(-1)!;
      return events[last.eventIndex]!.kind as StopReason;
    }
    case 'evaluation_failed':
      return reasonOfFailure[balances.failure()?.kind ?? 'no_state'];
  }
}
