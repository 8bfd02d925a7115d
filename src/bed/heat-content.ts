/**
 * Heat content of the flowing mixture as a state function of what has reacted and of temperature, so that temperature follows from the
 * energy balance instead of being integrated beside it; energy then closes to rounding.
 *
 *   S(ξ, T) + Σ_j ξ_j ΔH_j(T_ref) = -Q
 *
 * S is sensible heat flow above T_ref (the feed temperature), ξ the extents, Q the heat given to the coolant so far. The heat of reaction
 * that belongs to it at another temperature is ΔH_j(T) = ΔH_j(T_ref) + ∂S/∂ξ_j: Kirchhoff's law for the chosen heat capacity.
 */
import { gaussLegendre } from '../numerics/quadrature.js';
import type { FluidPropertyFunction } from '../properties/fluid-property.js';
import type { SpeciesThermochemistry } from '../properties/thermochemistry.js';

export interface HeatContent {
  /** J/mol at the reference (feed) temperature, one per reaction. */
  readonly referenceHeats: readonly number[];
  /** S, W. @param flows - mol/s per species */
  readonly sensible: (flows: Float64Array, temperature: number) => number;
  /** ∂S/∂T, W/K */
  readonly capacityFlow: (flows: Float64Array, temperature: number) => number;
  /** Writes ΔH_j(T), J/mol, and its derivative, J/(mol K); one per reaction. */
  readonly reactionHeatsInto: (temperature: number, heats: Float64Array, slopes: Float64Array) => void;
}

/** Heat content from the species' own enthalpies: S = Σ F_i (h_i(T) - h_i(T_ref)). */
export function speciesHeatContent(
  thermochemistry: readonly SpeciesThermochemistry[],
  stoichiometry: readonly (readonly number[])[],
  referenceHeats: readonly number[],
  referenceTemperature: number,
): HeatContent {
  const references = thermochemistry.map((species) => species.enthalpy(referenceTemperature));
  return {
    referenceHeats,
    sensible(flows, temperature) {
      let sum = 0;
      for (let i = 0; i < flows.length; i++) {
        if (flows[i]! !== 0) sum += flows[i]! * (thermochemistry[i]!.enthalpy(temperature) - references[i]!);
      }
      return sum;
    },
    capacityFlow(flows, temperature) {
      let sum = 0;
      for (let i = 0; i < flows.length; i++) {
        if (flows[i]! !== 0) sum += flows[i]! * thermochemistry[i]!.heatCapacity(temperature);
      }
      return sum;
    },
    reactionHeatsInto(temperature, heats, slopes) {
      stoichiometry.forEach((row, j) => {
        let heat = referenceHeats[j]!;
        let slope = 0;
        for (let i = 0; i < row.length; i++) {
          if (row[i]! === 0) continue;
          heat += row[i]! * (thermochemistry[i]!.enthalpy(temperature) - references[i]!);
          slope += row[i]! * thermochemistry[i]!.heatCapacity(temperature);
        }
        heats[j] = heat;
        slopes[j] = slope;
      });
    },
  };
}

/** Enough for heat capacities that are smooth over the span: exact for polynomials of degree 31. */
const heatCapacityPoints = 16;

/**
 * Heat content from a given heat capacity of the mixture, per mass or per amount.
 *
 * @param heatCapacity - J/(kg K) or J/(mol K) as a function of temperature; taken at the feed pressure
 * @param molarMasses - kg/mol per species
 */
export function givenHeatContent(
  heatCapacity: FluidPropertyFunction,
  per: 'mass' | 'amount',
  molarMasses: readonly number[],
  stoichiometry: readonly (readonly number[])[],
  referenceHeats: readonly number[],
  referenceTemperature: number,
  pressure: number,
): HeatContent {
  const rule = gaussLegendre(heatCapacityPoints);
  const weights = per === 'mass' ? molarMasses : molarMasses.map(() => 1);
  const flowOf = (flows: Float64Array): number => {
    let sum = 0;
    for (let i = 0; i < flows.length; i++) sum += weights[i]! * flows[i]!;
    return sum;
  };
  /** ∫ cp dT from the reference temperature. */
  const integral = heatCapacity.isConstant
    ? (temperature: number): number =>
        heatCapacity.value(temperature, pressure) * (temperature - referenceTemperature)
    : (temperature: number): number => {
        const span = temperature - referenceTemperature;
        let sum = 0;
        for (let q = 0; q < heatCapacityPoints; q++) {
          sum +=
            rule.weights[q]! * heatCapacity.value(referenceTemperature + span * rule.points[q]!, pressure);
        }
        return span * sum;
      };
  // What a mole of reaction changes in the flow that carries the heat capacity: nothing where it is counted by mass.
  const changes = stoichiometry.map((row) =>
    per === 'mass' ? 0 : row.reduce((sum, coefficient) => sum + coefficient, 0),
  );
  return {
    referenceHeats,
    sensible: (flows, temperature) => flowOf(flows) * integral(temperature),
    capacityFlow: (flows, temperature) => flowOf(flows) * heatCapacity.value(temperature, pressure),
    reactionHeatsInto(temperature, heats, slopes) {
      changes.forEach((change, j) => {
        heats[j] = referenceHeats[j]! + (change === 0 ? 0 : change * integral(temperature));
        slopes[j] = change === 0 ? 0 : change * heatCapacity.value(temperature, pressure);
      });
    },
  };
}
