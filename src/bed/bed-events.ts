import type { EventFunction } from '../numerics/ode/problem.js';
import type { Balances } from './balances.js';
import type { ReactorModel } from './reactor-model.js';
import type { RunEventKind } from './run-result.js';

/** An event of the bed: when it happens, and what to call it. */
export interface BedEvent {
  readonly kind: RunEventKind;
  readonly function: EventFunction;
  /** For the user, at the conditions where it happened. */
  readonly describe: () => string;
}

/**
 * Below this fraction of the feed pressure it counts as used up. Long before, the gas is near the speed of sound and the friction law
 * has ended; the figure only says that no pressure is left to speak of.
 */
const pressureFloorFraction = 0.01;
/** A flow this far below zero, relative to the largest feed flow, is not the integrator's rounding. */
const overdrawnFraction = 1e-5;

export function createBedEvents(model: ReactorModel, balances: Balances): BedEvent[] {
  const { specification } = model;
  const { feed, limits, targets, heat, species } = specification;
  const { conditions } = balances;
  const events: BedEvent[] = [];
  const add = (
    kind: RunEventKind,
    direction: EventFunction['direction'],
    isTerminal: boolean,
    value: (derivative: Float64Array) => number,
    describe: () => string,
  ): void => {
    events.push({
      kind,
      describe,
      function: {
        direction,
        isTerminal,
        evaluate: (_x, state, derivative) => (balances.unpack(state) ? value(derivative) : Number.NaN),
      },
    });
  };

  if (heat.mode !== 'isothermal') {
    add(
      'peak_temperature',
      -1,
      false,
      (derivative) => balances.temperatureSlope(derivative),
      () => `temperature peaks at ${kelvin(conditions.temperature)}`,
    );
    const limit = limits.temperature;
    if (limit !== undefined) {
      add(
        'temperature_limit_crossed',
        1,
        false,
        () => conditions.temperature - limit,
        () => `temperature rises above the limit you set, ${kelvin(limit)}`,
      );
    }
    const { lowest, highest } = model.dataRange;
    if (lowest > 0 || highest < Infinity) {
      add(
        'property_range_left',
        -1,
        true,
        () =>
          Math.min(
            conditions.temperature - lowest,
            highest < Infinity ? highest - conditions.temperature : Infinity,
          ),
        () => `temperature leaves the range of the species data, ${kelvin(conditions.temperature)}`,
      );
    }
  }
  if (balances.pressureIndex >= 0) {
    add(
      'pressure_used_up',
      -1,
      true,
      () => conditions.pressure - pressureFloorFraction * feed.pressure,
      () => `pressure falls below ${pressureFloorFraction * 100} % of the feed's`,
    );
    const limit = limits.pressureDrop;
    if (limit !== undefined) {
      add(
        'pressure_drop_limit_crossed',
        1,
        false,
        () => feed.pressure - conditions.pressure - limit,
        () => `pressure drop exceeds the limit you set, ${bar(limit)}`,
      );
    }
  }
  add(
    'condensation',
    1,
    true,
    () => model.condensation.excess(conditions.moleFractions, conditions.temperature, conditions.pressure),
    () => 'the gas reaches its dew point',
  );
  for (const target of targets) {
    const fed = model.feedFlows[target.speciesIndex]!;
    add(
      'target_conversion_reached',
      1,
      false,
      () => 1 - conditions.flows[target.speciesIndex]! / fed - target.conversion,
      () =>
        `conversion of ${species[target.speciesIndex]!.id} reaches ${Number((100 * target.conversion).toPrecision(6))} %`,
    );
  }
  const lowestFlow = -overdrawnFraction * Math.max(...model.feedFlows);
  add(
    'reactant_overdrawn',
    -1,
    true,
    () => smallest(conditions.flows) - lowestFlow,
    () => 'a species is used up while its reaction goes on',
  );
  return events;
}

function smallest(values: Float64Array): number {
  let least = Infinity;
  for (let i = 0; i < values.length; i++) least = Math.min(least, values[i]!);
  return least;
}

function kelvin(temperature: number): string {
  return `${temperature.toFixed(1)} K`;
}

function bar(pressure: number): string {
  return `${Number((pressure / 1e5).toPrecision(4))} bar`;
}
