import { createBalances, type Balances } from './balances.js';
import { createBedEvents, type BedEvent } from './bed-events.js';
import { bedWarnings } from './bed-warnings.js';
import { closures } from './closures.js';
import { equilibriumLine } from './equilibrium-line.js';
import { inletGroups } from './inlet-groups.js';
import { integrateBed, stopReason } from './integrate-bed.js';
import { collectAssumptions } from './model-assumptions.js';
import { createReactorModel, type ReactorModel } from './reactor-model.js';
import type { ReactorSpecification } from './reactor-specification.js';
import type { EffectivenessSummary, PelletProfile, RunEvent, RunResult, RunStop } from './run-result.js';
import { stopMessages } from './stop-messages.js';
import { transportReport } from './transport-report.js';
import { pelletProfile, tabulate, type BedStates, type Tabulation } from './tabulate.js';

export interface SolveOptions {
  /** Whether equilibrium is worked out beside the profile of reversible reactions; it takes about as long as the bed itself. */
  readonly withEquilibrium?: boolean;
}

/**
 * Solves a reactor from inlet to outlet, or to where the physics ends it.
 *
 * @param specification - whole reactor, SI, as made by the case reader; its data are taken to be consistent
 * @param options - what may be left out to save time
 * @returns plain data; `status` tells whether the end of the bed was reached
 * @throws only on a defect of the program: what a case can do to itself ends in `status: 'stopped'`
 */
export function solveReactor(
  specification: ReactorSpecification,
  { withEquilibrium = true }: SolveOptions = {},
): RunResult {
  const model = createReactorModel(specification);
  const balances = createBalances(model);
  const groups = inletGroups(model, balances);
  const events = createBedEvents(model, balances);
  const positions = wantedPositions(specification);
  const integration = integrateBed(model, balances, events, positions.all);
  const reason = stopReason(integration, balances, events);

  const size = balances.initialState.length;
  const stateOf = (row: number): Float64Array => integration.outputs.subarray(row * size, (row + 1) * size);
  const tableRows = positions.tableRows.filter((row) => row < integration.reachedOutputs);
  const lastIsEnd = positions.all[tableRows.at(-1) ?? -1] === integration.position;
  const rows = tableRows.map((row) => ({ position: positions.all[row]!, state: stateOf(row) }));
  if (!lastIsEnd) rows.push({ position: integration.position, state: integration.state });
  const states: BedStates = {
    positions: Float64Array.from(rows, ({ position }) => position),
    states: Float64Array.from(rows.flatMap(({ state }) => [...state])),
  };

  const peak = findPeak(events, integration.events, balances, rows);
  const runEvents = describeEvents(events, integration.events, balances);
  const stop: RunStop | undefined = reason && {
    reason,
    position: integration.position,
    message: stopMessages[reason],
  };
  if (stop && !runEvents.some(({ kind }) => kind === stop.reason)) {
    runEvents.push({ kind: stop.reason, position: stop.position, message: stop.message });
  }
  const tabulation = tabulate(model, balances, states);
  const pellets = interiors(model, balances, positions, integration, peak, rows);
  const closure = closures(model, balances, states);
  const outlet = outletOf(model, balances, integration.position, integration.state);
  const conversions = conversionsOf(model, outlet.molarFlows);
  const equilibrium = withEquilibrium
    ? equilibriumLine(
        model,
        balances,
        states,
        conversions.map(({ speciesIndex }) => speciesIndex),
      )
    : undefined;
  const { work } = model.pellet;
  return {
    status: stop ? 'stopped' : 'complete',
    ...(stop && { stop }),
    speciesIds: specification.species.map(({ id }) => id),
    reactionNames: specification.reactions.map(({ name }) => name),
    profile: tabulation.profile,
    pellets,
    transport: [
      ...transportReport('inlet', 0, balances.initialState, model, balances),
      ...transportReport('outlet', integration.position, integration.state, model, balances),
    ],
    ...(equilibrium && { equilibrium }),
    outlet,
    conversions,
    selectivities: selectivitiesOf(model, outlet.molarFlows),
    peak: { temperature: peak.temperature, position: peak.position },
    pressureDrop: specification.feed.pressure - outlet.pressure,
    heatRemoved: heatRemoved(model, balances, integration.state),
    catalystMass:
      model.crossSection *
      integration.position *
      model.solidFraction *
      specification.pellet.density *
      specification.bed.tubes,
    effectiveness: effectivenessSummaries(tabulation),
    balances: closure,
    groups,
    events: runEvents,
    warnings: bedWarnings(model, balances, tabulation, closure, peak.temperature),
    assumptions: collectAssumptions(specification),
    work: {
      steps: integration.work.steps,
      rejectedSteps: integration.work.rejectedSteps,
      rightHandSides: integration.work.rightHandSides,
      jacobians: integration.work.jacobians,
      pelletSolves: work.solves,
      pelletIterations: work.iterations,
      pelletFactorisations: work.factorisations,
      rateEvaluations: work.rateEvaluations,
      largestPelletPoints: work.largestNodeCount,
    },
  };
}

interface WantedPositions {
  /** Ascending, without repeats. */
  readonly all: Float64Array;
  /** Rows of `all` that belong to the profile. */
  readonly tableRows: readonly number[];
  /** Rows of `all` at which a pellet was asked for. */
  readonly pelletRows: readonly number[];
}

function wantedPositions({ bed, output }: ReactorSpecification): WantedPositions {
  const table = Array.from({ length: output.points }, (_, k) =>
    k === output.points - 1 ? bed.length : (bed.length * k) / (output.points - 1),
  );
  const all = Float64Array.from(new Set([...table, ...output.pelletPositions])).sort();
  const rowOf = (position: number): number => all.indexOf(position);
  return { all, tableRows: table.map(rowOf), pelletRows: output.pelletPositions.map(rowOf) };
}

interface Peak {
  readonly temperature: number;
  readonly position: number;
  readonly state: Float64Array;
}

/** Hottest of the inlet, the outlet and the maxima in between. */
function findPeak(
  events: readonly BedEvent[],
  located: readonly { eventIndex: number; position: number; state: Float64Array }[],
  balances: Balances,
  rows: readonly { position: number; state: Float64Array }[],
): Peak {
  const maxima = located.filter(({ eventIndex }) => events[eventIndex]!.kind === 'peak_temperature');
  const candidates = [rows[0]!, ...maxima, rows.at(-1)!].map(({ position, state }): Peak => {
    balances.unpack(state);
    return { position, state, temperature: balances.conditions.temperature };
  });
  return candidates.reduce((best, candidate) =>
    candidate.temperature > best.temperature ? candidate : best,
  );
}

function describeEvents(
  events: readonly BedEvent[],
  located: readonly { eventIndex: number; position: number; state: Float64Array }[],
  balances: Balances,
): RunEvent[] {
  return located.map(({ eventIndex, position, state }) => {
    const event = events[eventIndex]!;
    balances.unpack(state);
    return { kind: event.kind, position, message: event.describe() };
  });
}

function interiors(
  model: ReactorModel,
  balances: Balances,
  positions: WantedPositions,
  integration: { outputs: Float64Array; reachedOutputs: number },
  peak: Peak,
  rows: readonly { position: number; state: Float64Array }[],
): PelletProfile[] {
  const size = balances.initialState.length;
  const requested = positions.pelletRows
    .filter((row) => row < integration.reachedOutputs)
    .map((row) => ({
      label: 'requested' as const,
      position: positions.all[row]!,
      state: integration.outputs.subarray(row * size, (row + 1) * size),
    }));
  const isInside = peak.position > 0 && peak.position < rows.at(-1)!.position;
  const wanted = [
    { label: 'inlet' as const, ...rows[0]! },
    ...(isInside ? [{ label: 'hottest' as const, position: peak.position, state: peak.state }] : []),
    ...requested,
    { label: 'outlet' as const, ...rows.at(-1)! },
  ];
  return wanted
    .sort((a, b) => a.position - b.position)
    .flatMap(({ label, position, state }) => {
      const profile = pelletProfile(label, position, state, balances, model.pellet);
      return profile ? [profile] : [];
    });
}

function outletOf(
  model: ReactorModel,
  balances: Balances,
  position: number,
  state: Float64Array,
): RunResult['outlet'] {
  balances.unpack(state);
  const { flows, totalFlow, temperature, pressure } = balances.conditions;
  return {
    position,
    temperature,
    pressure,
    molarFlows: Array.from(flows, (flow) => flow * model.specification.bed.tubes),
    moleFractions: Array.from(flows, (flow) => flow / totalFlow),
  };
}

function conversionsOf(model: ReactorModel, outletFlows: readonly number[]): RunResult['conversions'] {
  return model.specification.feed.molarFlows.flatMap((fed, speciesIndex) => {
    const isReactant = model.stoichiometry.some((row) => row[speciesIndex]! < 0);
    if (!isReactant || !(fed > 0) || outletFlows[speciesIndex]! > fed) return [];
    return [{ speciesIndex, value: 1 - outletFlows[speciesIndex]! / fed }];
  });
}

function selectivitiesOf(model: ReactorModel, outletFlows: readonly number[]): RunResult['selectivities'] {
  const fed = model.specification.feed.molarFlows;
  return model.specification.output.selectivities.map(
    ({ productIndex, reactantIndex, productPerReactant }) => {
      const made = (outletFlows[productIndex]! - fed[productIndex]!) / productPerReactant;
      const used = fed[reactantIndex]! - outletFlows[reactantIndex]!;
      return {
        productIndex,
        reactantIndex,
        selectivity: used > 0 ? made / used : null,
        yield: made / fed[reactantIndex]!,
      };
    },
  );
}

/** W, whole reactor; null where neither heats nor heat capacities are known. */
function heatRemoved(model: ReactorModel, balances: Balances, state: Float64Array): number | null {
  const { tubes } = model.specification.bed;
  if (balances.heatIndex >= 0) return state[balances.heatIndex]! * tubes;
  if (!model.heatContent) return null;
  return -model.heatContent.referenceHeats.reduce((sum, heat, j) => sum + heat * state[j]!, 0) * tubes;
}

function effectivenessSummaries({ profile, bulkRates, averageRates }: Tabulation): EffectivenessSummary[] {
  const finite = (value: number | undefined): number | null =>
    value !== undefined && Number.isFinite(value) ? value : null;
  return profile.effectiveness.map((column, j) => ({
    inlet: finite(column[0]),
    outlet: finite(column.at(-1)),
    mean: finite(
      trapezoid(profile.positions, averageRates[j]!) / trapezoid(profile.positions, bulkRates[j]!),
    ),
  }));
}

function trapezoid(positions: Float64Array, values: Float64Array): number {
  let sum = 0;
  for (let k = 1; k < positions.length; k++) {
    sum += ((values[k]! + values[k - 1]!) / 2) * (positions[k]! - positions[k - 1]!);
  }
  return sum;
}
