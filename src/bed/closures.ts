import type { Balances } from './balances.js';
import type { ReactorModel } from './reactor-model.js';
import type { RunResult } from './run-result.js';
import type { BedStates } from './tabulate.js';

/**
 * How well mass, each element and energy close between the feed and every row of the profile: the worst |in - out| over what is in.
 *
 * Mass uses the molar masses and elements the formulas, neither of which the integration uses, so that a wrong molar mass or formula
 * shows here. Energy compares the heat content at the temperature found with the heat given away, relative to the larger of the
 * heat released and one kelvin's worth of the feed's heat capacity.
 */
export function closures(
  model: ReactorModel,
  balances: Balances,
  { positions, states }: BedStates,
): RunResult['balances'] {
  const { feedFlows, massFlow, molarMasses, specification, heatContent } = model;
  const { species } = specification;
  const size = balances.initialState.length;
  const elementNames = new Set(species.flatMap((record) => Object.keys(record.elements ?? {})));
  const areElementsKnown = species.every((record, i) => record.elements !== undefined || feedFlows[i] === 0);
  const perElement = areElementsKnown ? [...elementNames].sort() : [];
  const contentOf = (flows: Float64Array, element: string): number =>
    flows.reduce((sum, flow, i) => sum + flow * (species[i]!.elements?.[element] ?? 0), 0);
  const fedElements = perElement.map((element) => contentOf(feedFlows, element));
  const elements = Object.fromEntries(perElement.map((element) => [element, 0]));
  balances.unpack(balances.initialState);
  const feedResidual = balances.conditions.residualEnthalpyFlow;
  let mass = 0;
  let energy = 0;
  for (let row = 0; row < positions.length; row++) {
    const state = states.subarray(row * size, (row + 1) * size);
    if (!balances.unpack(state)) continue;
    const { flows, temperature } = balances.conditions;
    const massThere = flows.reduce((sum, flow, i) => sum + flow * molarMasses[i]!, 0);
    mass = Math.max(mass, Math.abs(massThere - massFlow) / massFlow);
    perElement.forEach((element, e) => {
      if (fedElements[e]! === 0) return;
      const off = Math.abs(contentOf(flows, element) - fedElements[e]!) / fedElements[e]!;
      elements[element] = Math.max(elements[element]!, off);
    });
    if (heatContent && balances.heatIndex >= 0) {
      const sensible =
        heatContent.sensible(flows, temperature) + balances.conditions.residualEnthalpyFlow - feedResidual;
      const reacted = heatContent.referenceHeats.reduce((sum, heat, j) => sum + heat * state[j]!, 0);
      const removed = state[balances.heatIndex]!;
      const scale = Math.max(Math.abs(reacted), heatContent.capacityFlow(flows, temperature));
      energy = Math.max(energy, Math.abs(sensible + reacted + removed) / scale);
    }
  }
  return { mass, elements, energy };
}
