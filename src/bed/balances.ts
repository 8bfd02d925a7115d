/**
 * Axial balances of one tube, steady plug flow:
 *
 *   dξ_j/dz = A (1-ε) <r_j>        dQ/dz = U π D (T - Tc)        d(P²)/dz = -2 P (a μ G + b G²)/ρ
 *
 * State: extents ξ_j (mol/s), heat given to the coolant Q (W; absent in an isothermal bed), P² (Pa²; absent without friction). Temperature
 * follows from Q and the extents (`unpack-state.ts`), flows from the extents, so that atoms and energy balance to rounding. P² rather
 * than P, since for a gas it falls almost linearly and reaches zero without a singularity.
 *
 * The Jacobian is exact but for one thing: how transport properties, fugacity coefficients and residual heats change along the bed is left
 * out of it. They change slowly, and an iteration that is off by so little converges to the same answer.
 *
 * Neglects axial and radial dispersion and accumulation.
 */
import type { OdeProblem } from '../numerics/ode/problem.js';
import type { PelletStatus } from '../pellet/pellet-model.js';
import type { BedConditions } from './bed-conditions.js';
import type { ReactorModel } from './reactor-model.js';
import { createUnpacker, type StateLayout } from './unpack-state.js';

/** Why the right side could not be computed, and where. */
export interface BalanceFailure {
  readonly position: number;
  readonly kind: Exclude<PelletStatus, 'converged'> | 'conditions';
}

export interface Balances extends StateLayout {
  readonly problem: OdeProblem;
  readonly initialState: Float64Array;
  /** Absolute tolerances per component for a relative tolerance of 1. */
  readonly stateScales: Float64Array;
  /** Fills `conditions` from a state; false where no temperature or no single fluid phase fits. */
  readonly unpack: (state: Float64Array) => boolean;
  readonly conditions: BedConditions;
  /** dT/dz from a state's derivative, at the conditions last unpacked. */
  readonly temperatureSlope: (derivative: Float64Array) => number;
  readonly failure: () => BalanceFailure | undefined;
}

export function createBalances(model: ReactorModel): Balances {
  const { speciesCount, reactionCount, stoichiometry, specification, pellet, localProperties } = model;
  const { feed, heat, bed } = specification;
  const layout = stateLayout(model);
  const { heatIndex, pressureIndex, size } = layout;
  const { conditions, unpack } = createUnpacker(model, layout);
  const solidArea = model.crossSection * model.solidFraction;
  const wallConductance = heat.mode === 'cooled' ? heat.overallCoefficient * Math.PI * bed.tubeDiameter : 0;
  const coolantTemperature = heat.mode === 'cooled' ? heat.coolantTemperature : 0;
  let failure: BalanceFailure | undefined;

  /** d(P²)/dz at the conditions unpacked. */
  const frictionSlope = (): number => {
    if (!model.friction) return 0;
    const { massFlux, massFlow } = model;
    const group =
      model.friction.viscous * massFlux * localProperties.viscosity +
      model.friction.inertial * massFlux * massFlux;
    return -2 * group * pressureOverDensity(conditions, massFlow);
  };

  const fail = (position: number, kind: BalanceFailure['kind']): false => {
    failure = { position, kind };
    return false;
  };

  const evaluate = (position: number, state: Float64Array, derivative: Float64Array): boolean => {
    if (!unpack(state)) return fail(position, 'conditions');
    const status = pellet.solve(conditions);
    if (status !== 'converged') return fail(position, status);
    for (let j = 0; j < reactionCount; j++) derivative[j] = solidArea * pellet.averageRates[j]!;
    if (heatIndex >= 0) {
      derivative[heatIndex] = wallConductance * (conditions.temperature - coolantTemperature);
    }
    if (pressureIndex >= 0) derivative[pressureIndex] = frictionSlope();
    return true;
  };

  const byTemperature = new Float64Array(size); // dT/dy
  const byPressure = new Float64Array(size); // dP/dy
  const viscositySlopes = { byTemperature: 0, byPressure: 0 };
  const byVolume = new Float64Array(size); // d ln(volume flow)/dy
  const takeConditionSlopes = (): void => {
    const { pressure, totalFlow, fluid, capacityFlow, reactionHeats } = conditions;
    byTemperature.fill(0);
    byPressure.fill(0);
    if (pressureIndex >= 0) byPressure[pressureIndex] = 1 / (2 * pressure);
    if (heatIndex >= 0) {
      for (let l = 0; l < reactionCount; l++) byTemperature[l] = -reactionHeats[l]! / capacityFlow;
      byTemperature[heatIndex] = -1 / capacityFlow;
      if (pressureIndex >= 0) {
        byTemperature[pressureIndex] =
          (-conditions.enthalpyFlowByPressure * byPressure[pressureIndex]!) / capacityFlow;
      }
    }
    const volumeFlow = totalFlow * fluid.molarVolume;
    const expansion = fluid.volumeByTemperature / fluid.molarVolume;
    const compression = fluid.volumeByPressure / fluid.molarVolume;
    for (let v = 0; v < size; v++) {
      let change = expansion * byTemperature[v]! + compression * byPressure[v]!;
      if (v < reactionCount) {
        const row = stoichiometry[v]!;
        let volume = 0;
        for (let i = 0; i < speciesCount; i++) volume += row[i]! * fluid.partialMolarVolumes[i]!;
        change += volume / volumeFlow;
      }
      byVolume[v] = change;
    }
    if (pressureIndex >= 0) localProperties.viscositySlopesInto(conditions, viscositySlopes);
  };

  const evaluateJacobian = (position: number, state: Float64Array, jacobian: Float64Array): boolean => {
    if (!unpack(state)) return fail(position, 'conditions');
    const status = pellet.differentiate(conditions);
    if (status !== 'converged') return fail(position, status);
    takeConditionSlopes();
    const { totalFlow, concentrations, fluid, pressure } = conditions;
    const columns = speciesCount + 2;
    const volumeFlow = totalFlow * fluid.molarVolume;
    for (let j = 0; j < reactionCount; j++) {
      const from = j * columns;
      const { gradient } = pellet;
      // Whatever widens the volume thins all concentrations alike.
      let byScaling = 0;
      for (let i = 0; i < speciesCount; i++) byScaling += gradient[from + i]! * concentrations[i]!;
      for (let v = 0; v < size; v++) {
        let sum =
          gradient[from + speciesCount]! * byTemperature[v]! +
          gradient[from + speciesCount + 1]! * byPressure[v]! -
          byScaling * byVolume[v]!;
        if (v < reactionCount) {
          const row = stoichiometry[v]!;
          let made = 0;
          for (let i = 0; i < speciesCount; i++) made += gradient[from + i]! * row[i]!;
          sum += made / volumeFlow;
        }
        jacobian[j * size + v] = solidArea * sum;
      }
    }
    if (heatIndex >= 0) {
      for (let v = 0; v < size; v++) jacobian[heatIndex * size + v] = wallConductance * byTemperature[v]!;
    }
    if (pressureIndex >= 0 && model.friction) {
      const slope = frictionSlope();
      const viscous =
        -2 * pressureOverDensity(conditions, model.massFlow) * model.friction.viscous * model.massFlux;
      for (let v = 0; v < size; v++) {
        jacobian[pressureIndex * size + v] =
          slope * (byPressure[v]! / pressure + byVolume[v]!) +
          viscous *
            (viscositySlopes.byTemperature * byTemperature[v]! + viscositySlopes.byPressure * byPressure[v]!);
      }
    }
    return true;
  };

  const initialState = new Float64Array(size);
  if (pressureIndex >= 0) initialState[pressureIndex] = feed.pressure ** 2;
  unpack(initialState);

  return {
    ...layout,
    problem: { size, evaluate, evaluateJacobian },
    initialState,
    stateScales: stateScales(model, layout),
    unpack,
    conditions,
    temperatureSlope(derivative) {
      if (heatIndex < 0) return 0;
      let sum = -derivative[heatIndex]!;
      for (let j = 0; j < reactionCount; j++) sum -= conditions.reactionHeats[j]! * derivative[j]!;
      if (pressureIndex >= 0) {
        sum -= (conditions.enthalpyFlowByPressure * derivative[pressureIndex]!) / (2 * conditions.pressure);
      }
      return sum / conditions.capacityFlow;
    },
    failure: () => failure,
  };
}

function stateLayout({ reactionCount, friction, specification }: ReactorModel): StateLayout {
  const heatCount = specification.heat.mode === 'isothermal' ? 0 : 1;
  return {
    heatIndex: heatCount === 0 ? -1 : reactionCount,
    pressureIndex: friction ? reactionCount + heatCount : -1,
    size: reactionCount + heatCount + (friction ? 1 : 0),
  };
}

/** P/ρ, m²/s² */
function pressureOverDensity({ pressure, totalFlow, fluid }: BedConditions, massFlow: number): number {
  return (pressure * totalFlow * fluid.molarVolume) / massFlow;
}

/**
 * Size of each unknown that matters: an extent is measured by what its scarcest fed reactant allows, heat by what changes the temperature by
 * one kelvin, P² by its feed value.
 */
function stateScales(model: ReactorModel, { size, heatIndex, pressureIndex }: StateLayout): Float64Array {
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
