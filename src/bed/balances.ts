/**
 * Axial balances of one tube, steady plug flow:
 *
 *   dξ_j/dz = A (1-ε) <r_j>        dQ/dz = U π D (T - Tc)        d(P²)/dz = -2 P (a μ G + b G²)/ρ
 *
 * State: extents ξ_j (mol/s), heat given to the coolant Q (W; absent in an isothermal bed), P² (Pa²; absent without friction). Temperature
 * follows from Q and the extents (`heat-content.ts`), flows from the extents, so that atoms and energy balance to rounding. P² rather
 * than P, since for a gas it falls almost linearly and reaches zero without a singularity.
 *
 * Neglects axial and radial dispersion and accumulation; the fluid is an ideal gas.
 */
import type { OdeProblem } from '../numerics/ode/problem.js';
import type { PelletBulk, PelletStatus } from '../pellet/pellet-model.js';
import { gasConstant } from '../quantities/constants.js';
import type { ReactorModel } from './reactor-model.js';

/** Why the right side could not be computed, and where. */
export interface BalanceFailure {
  readonly position: number;
  readonly kind: Exclude<PelletStatus, 'converged'> | 'temperature';
}

/** Conditions at one position, filled by `unpack`. */
export interface BedConditions extends PelletBulk {
  /** mol/s per tube, one per species */
  readonly flows: Float64Array;
  totalFlow: number;
}

export interface Balances {
  readonly problem: OdeProblem;
  readonly initialState: Float64Array;
  /** Absolute tolerances per component for a relative tolerance of 1. */
  readonly stateScales: Float64Array;
  /** Index of Q and of P² in the state, -1 where absent. */
  readonly heatIndex: number;
  readonly pressureIndex: number;
  /** Fills `conditions` from a state; false where no temperature fits. */
  readonly unpack: (state: Float64Array) => boolean;
  readonly conditions: BedConditions;
  /** dT/dz from a state's derivative, at the conditions last unpacked. */
  readonly temperatureSlope: (derivative: Float64Array) => number;
  readonly failure: () => BalanceFailure | undefined;
}

/** Pressure below this fraction of the feed's is not followed: the run has ended by then (`pressureFloorFraction` in the events). */
const pressureFloor = 1e-3;
const temperatureIterations = 50;

export function createBalances(model: ReactorModel): Balances {
  const { speciesCount, reactionCount, stoichiometry, moleChanges, specification, heatContent, pellet } =
    model;
  const { feed, heat, bed } = specification;
  const isIsothermal = heat.mode === 'isothermal';
  const heatIndex = isIsothermal ? -1 : reactionCount;
  const pressureIndex = model.friction ? reactionCount + (isIsothermal ? 0 : 1) : -1;
  const size = reactionCount + (isIsothermal ? 0 : 1) + (model.friction ? 1 : 0);
  const solidArea = model.crossSection * model.solidFraction;
  const wallConductance = heat.mode === 'cooled' ? heat.overallCoefficient * Math.PI * bed.tubeDiameter : 0;
  const coolantTemperature = heat.mode === 'cooled' ? heat.coolantTemperature : 0;
  const lowestPressure = pressureFloor * feed.pressure;

  const conditions: BedConditions = {
    flows: new Float64Array(speciesCount),
    totalFlow: 0,
    concentrations: new Float64Array(speciesCount),
    temperature: feed.temperature,
    pressure: feed.pressure,
    reactionHeats: new Float64Array(reactionCount),
    reactionHeatSlopes: new Float64Array(reactionCount),
  };
  let capacityFlow = 0;
  let failure: BalanceFailure | undefined;

  /** Newton on S(ξ, T) = -Q - Σ ξ ΔH_ref, from the last temperature. */
  const findTemperature = (state: Float64Array): boolean => {
    if (!heatContent || isIsothermal) return true;
    let target = -state[heatIndex]!;
    for (let j = 0; j < reactionCount; j++) target -= state[j]! * heatContent.referenceHeats[j]!;
    let temperature = conditions.temperature;
    for (let iteration = 0; iteration < temperatureIterations; iteration++) {
      capacityFlow = heatContent.capacityFlow(conditions.flows, temperature);
      const correction = (heatContent.sensible(conditions.flows, temperature) - target) / capacityFlow;
      // Never below half of the last value: a trial state of the integrator may be far off.
      const next = Math.max(temperature - correction, temperature / 2);
      if (!Number.isFinite(next)) break;
      if (Math.abs(next - temperature) <= 4 * Number.EPSILON * temperature) {
        conditions.temperature = next;
        return next > 1;
      }
      temperature = next;
      // Rounding may keep the last digit moving.
      if (iteration > 8 && Math.abs(correction) < 1e-12 * temperature) {
        conditions.temperature = temperature;
        return temperature > 1;
      }
    }
    conditions.temperature = feed.temperature;
    return false;
  };

  const unpack = (state: Float64Array): boolean => {
    const { flows, concentrations } = conditions;
    let total = 0;
    for (let i = 0; i < speciesCount; i++) {
      let flow = model.feedFlows[i]!;
      for (let j = 0; j < reactionCount; j++) flow += stoichiometry[j]![i]! * state[j]!;
      flows[i] = flow;
      total += flow;
    }
    conditions.totalFlow = total;
    if (!findTemperature(state)) return false;
    if (pressureIndex >= 0)
      conditions.pressure = Math.sqrt(Math.max(state[pressureIndex]!, lowestPressure * lowestPressure));
    const density = conditions.pressure / (gasConstant * conditions.temperature);
    for (let i = 0; i < speciesCount; i++) concentrations[i] = (flows[i]! / total) * density;
    heatContent?.reactionHeatsInto(
      conditions.temperature,
      conditions.reactionHeats,
      conditions.reactionHeatSlopes,
    );
    return true;
  };

  /** d(P²)/dz and its derivative with respect to temperature (at fixed flows). */
  const friction = { slope: 0, byTemperature: 0, byPressure: 0 };
  const evaluateFriction = (): void => {
    if (!model.friction || !model.viscosity) return;
    const { temperature, pressure, totalFlow } = conditions;
    const { massFlux, massFlow } = model;
    const volumePerMass = (totalFlow * gasConstant * temperature) / massFlow; // P/ρ
    const viscousFlux = model.friction.viscous * massFlux;
    const group =
      viscousFlux * model.viscosity.value(temperature, pressure) +
      model.friction.inertial * massFlux * massFlux;
    friction.slope = -2 * group * volumePerMass;
    friction.byTemperature =
      friction.slope / temperature -
      2 * volumePerMass * viscousFlux * model.viscosity.temperatureDerivative(temperature, pressure);
    friction.byPressure =
      -2 * volumePerMass * viscousFlux * model.viscosity.pressureDerivative(temperature, pressure);
  };

  const fail = (position: number, kind: BalanceFailure['kind']): false => {
    failure = { position, kind };
    return false;
  };

  const evaluate = (position: number, state: Float64Array, derivative: Float64Array): boolean => {
    if (!unpack(state)) return fail(position, 'temperature');
    const status = pellet.solve(conditions);
    if (status !== 'converged') return fail(position, status);
    for (let j = 0; j < reactionCount; j++) derivative[j] = solidArea * pellet.averageRates[j]!;
    if (heatIndex >= 0) {
      derivative[heatIndex] = wallConductance * (conditions.temperature - coolantTemperature);
    }
    if (pressureIndex >= 0) {
      evaluateFriction();
      derivative[pressureIndex] = friction.slope;
    }
    return true;
  };

  const byTemperature = new Float64Array(size); // dT/dy
  const byPressure = new Float64Array(size); // dP/dy
  const evaluateJacobian = (position: number, state: Float64Array, jacobian: Float64Array): boolean => {
    if (!unpack(state)) return fail(position, 'temperature');
    const status = pellet.differentiate(conditions);
    if (status !== 'converged') return fail(position, status);
    const { temperature, pressure, flows, totalFlow, concentrations } = conditions;
    byTemperature.fill(0);
    byPressure.fill(0);
    if (heatIndex >= 0) {
      for (let l = 0; l < reactionCount; l++) byTemperature[l] = -conditions.reactionHeats[l]! / capacityFlow;
      byTemperature[heatIndex] = -1 / capacityFlow;
    }
    if (pressureIndex >= 0) byPressure[pressureIndex] = 1 / (2 * pressure);
    const columns = speciesCount + 2;
    const density = pressure / (gasConstant * temperature);
    for (let j = 0; j < reactionCount; j++) {
      const from = j * columns;
      const { gradient } = pellet;
      // Heating and expanding thin all concentrations alike.
      let byScaling = 0;
      for (let i = 0; i < speciesCount; i++) byScaling += gradient[from + i]! * concentrations[i]!;
      for (let v = 0; v < size; v++) {
        let sum =
          (gradient[from + speciesCount]! - byScaling / temperature) * byTemperature[v]! +
          (gradient[from + speciesCount + 1]! + byScaling / pressure) * byPressure[v]!;
        if (v < reactionCount) {
          for (let i = 0; i < speciesCount; i++) {
            const change = stoichiometry[v]![i]! - (flows[i]! * moleChanges[v]!) / totalFlow;
            sum += (gradient[from + i]! * change * density) / totalFlow;
          }
        }
        jacobian[j * size + v] = solidArea * sum;
      }
    }
    if (heatIndex >= 0) {
      for (let v = 0; v < size; v++) jacobian[heatIndex * size + v] = wallConductance * byTemperature[v]!;
    }
    if (pressureIndex >= 0) {
      evaluateFriction();
      for (let v = 0; v < size; v++) {
        let sum = friction.byTemperature * byTemperature[v]! + friction.byPressure * byPressure[v]!;
        if (v < reactionCount) sum += (friction.slope * moleChanges[v]!) / totalFlow;
        jacobian[pressureIndex * size + v] = sum;
      }
    }
    return true;
  };

  const initialState = new Float64Array(size);
  if (pressureIndex >= 0) initialState[pressureIndex] = feed.pressure ** 2;
  unpack(initialState);

  return {
    problem: { size, evaluate, evaluateJacobian },
    initialState,
    stateScales: stateScales(model, size, heatIndex, pressureIndex),
    heatIndex,
    pressureIndex,
    unpack,
    conditions,
    temperatureSlope(derivative) {
      if (heatIndex < 0) return 0;
      let sum = -derivative[heatIndex]!;
      for (let j = 0; j < reactionCount; j++) sum -= conditions.reactionHeats[j]! * derivative[j]!;
      return sum / capacityFlow;
    },
    failure: () => failure,
  };
}

/**
 * Size of each unknown that matters: an extent is measured by what its scarcest fed reactant allows, heat by what changes the temperature by
 * one kelvin, P² by its feed value.
 */
function stateScales(
  model: ReactorModel,
  size: number,
  heatIndex: number,
  pressureIndex: number,
): Float64Array {
  const { stoichiometry, feedFlows, heatContent, specification } = model;
  const scales = new Float64Array(size);
  const largestFlow = Math.max(...feedFlows);
  stoichiometry.forEach((row, j) => {
    const allowed = row.flatMap((coefficient, i) =>
      coefficient < 0 && feedFlows[i]! > 0 ? [feedFlows[i]! / -coefficient] : [],
    );
    scales[j] = allowed.length > 0 ? Math.min(...allowed) : largestFlow * 1e-3;
  });
  if (heatIndex >= 0 && heatContent) {
    scales[heatIndex] = heatContent.capacityFlow(feedFlows, specification.feed.temperature);
  }
  if (pressureIndex >= 0) scales[pressureIndex] = specification.feed.pressure ** 2;
  return scales;
}
