/**
 * From the integrator's state to the conditions at one position of the bed: flows from the extents, pressure, temperature from the heat
 * content, volume and fugacities from the equation of state, and the transport properties there.
 */
import { createFluidState } from '../properties/equation-of-state/equation-of-state.js';
import { gasConstant } from '../quantities/constants.js';
import type { BedConditions } from './bed-conditions.js';
import type { ReactorModel } from './reactor-model.js';

/** Where the parts of the state vector stand; -1 where absent. Extents come first. */
export interface StateLayout {
  readonly heatIndex: number;
  readonly pressureIndex: number;
  readonly size: number;
}

export interface Unpacker {
  readonly conditions: BedConditions;
  /** Fills `conditions` from a state; false where no temperature or no single fluid phase fits. */
  readonly unpack: (state: Float64Array) => boolean;
}

/** Pressure below this fraction of the feed's is not followed: the run has ended by then (`pressureFloorFraction` in the events). */
const pressureFloor = 1e-3;
const temperatureIterations = 50;

export function createUnpacker(
  model: ReactorModel,
  { heatIndex, pressureIndex, size }: StateLayout,
): Unpacker {
  const { speciesCount, reactionCount, stoichiometry, heatContent, equationOfState, lawFactors } = model;
  const { feed } = model.specification;
  const { isIdealGas } = equationOfState;
  const lowestPressure = pressureFloor * feed.pressure;
  const flows = new Float64Array(speciesCount);
  const moleFractions = new Float64Array(speciesCount);
  const concentrations = new Float64Array(speciesCount);
  const reactionHeats = new Float64Array(reactionCount);
  const reactionHeatSlopes = new Float64Array(reactionCount);
  const fluid = createFluidState(speciesCount);
  const conditions: BedConditions = {
    flows,
    totalFlow: 0,
    moleFractions,
    concentrations,
    temperature: feed.temperature,
    pressure: feed.pressure,
    reactionHeats,
    reactionHeatSlopes,
    fluid,
    capacityFlow: 0,
    residualEnthalpyFlow: 0,
    enthalpyFlowByPressure: 0,
  };
  const hasResiduals = model.countsResidualEnthalpy;
  let feedResidual = 0;

  /** Newton on S(ξ, T) + residual enthalpy = -Q - Σ ξ ΔH_ref, from the last temperature. */
  const findTemperature = (state: Float64Array): boolean => {
    if (!heatContent || heatIndex < 0) return true;
    let target = feedResidual - state[heatIndex]!;
    for (let j = 0; j < reactionCount; j++) target -= state[j]! * heatContent.referenceHeats[j]!;
    let { temperature } = conditions;
    for (let iteration = 0; iteration < temperatureIterations; iteration++) {
      let capacity = heatContent.capacityFlow(flows, temperature);
      let excess = heatContent.sensible(flows, temperature) - target;
      if (hasResiduals) {
        if (!equationOfState.evaluate(moleFractions, temperature, conditions.pressure, fluid)) break;
        capacity += conditions.totalFlow * fluid.residualHeatCapacity;
        excess += conditions.totalFlow * fluid.residualEnthalpy;
      }
      conditions.capacityFlow = capacity;
      const correction = excess / capacity;
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

  const takeReactionHeats = (): void => {
    if (!heatContent) return;
    heatContent.reactionHeatsInto(conditions.temperature, reactionHeats, reactionHeatSlopes);
    if (!hasResiduals) return;
    for (let j = 0; j < reactionCount; j++) {
      const row = stoichiometry[j]!;
      for (let i = 0; i < speciesCount; i++) {
        if (row[i]! !== 0) reactionHeats[j]! += row[i]! * fluid.partialResidualEnthalpies[i]!;
      }
    }
  };

  /** What rate laws need to turn concentrations into partial pressures and fugacities. */
  const takeLawFactors = (): void => {
    if (!lawFactors) return;
    lawFactors[0] = (conditions.pressure * fluid.molarVolume) / (gasConstant * conditions.temperature);
    for (let i = 0; i < speciesCount; i++) lawFactors[i + 1] = Math.exp(fluid.logFugacityCoefficients[i]!);
  };

  const last = new Float64Array(size).fill(Number.NaN);
  let wasFound = false;
  /** Events, monitor and tabulation look at the same state one after the other. */
  const isLast = (state: Float64Array): boolean => {
    for (let n = 0; n < size; n++) if (state[n] !== last[n]) return false;
    return true;
  };

  const unpack = (state: Float64Array): boolean => {
    if (isLast(state)) return wasFound;
    last.set(state);
    wasFound = unpackAnew(state);
    return wasFound;
  };

  const unpackAnew = (state: Float64Array): boolean => {
    let total = 0;
    for (let i = 0; i < speciesCount; i++) {
      let flow = model.feedFlows[i]!;
      for (let j = 0; j < reactionCount; j++) flow += stoichiometry[j]![i]! * state[j]!;
      flows[i] = flow;
      total += flow;
    }
    conditions.totalFlow = total;
    for (let i = 0; i < speciesCount; i++) moleFractions[i] = flows[i]! / total;
    if (pressureIndex >= 0)
      conditions.pressure = Math.sqrt(Math.max(state[pressureIndex]!, lowestPressure * lowestPressure));
    if (!findTemperature(state)) return false;
    const { temperature, pressure } = conditions;
    if (!equationOfState.evaluate(moleFractions, temperature, pressure, fluid)) return false;
    for (let i = 0; i < speciesCount; i++) concentrations[i] = moleFractions[i]! / fluid.molarVolume;
    if (!isIdealGas) {
      takeLawFactors();
      if (hasResiduals) {
        conditions.residualEnthalpyFlow = total * fluid.residualEnthalpy;
        conditions.enthalpyFlowByPressure =
          total * (fluid.molarVolume - temperature * fluid.volumeByTemperature);
      }
    }
    takeReactionHeats();
    return model.localProperties.update(conditions);
  };

  if (hasResiduals) {
    // Counted from the feed, so that the balance starts at zero.
    for (let i = 0; i < speciesCount; i++) {
      moleFractions[i] = model.feedFlows[i]! / model.feedFlows.reduce((sum, flow) => sum + flow, 0);
    }
    if (equationOfState.evaluate(moleFractions, feed.temperature, feed.pressure, fluid)) {
      feedResidual = model.feedFlows.reduce((sum, flow) => sum + flow, 0) * fluid.residualEnthalpy;
    }
  }
  return { conditions, unpack };
}
