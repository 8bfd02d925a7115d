import { mentions } from '../expressions/mentions.js';
import type { SpeciesThermochemistry } from '../properties/thermochemistry.js';
import { activeSpecies, neededProperties } from './needed-properties.js';
import type { ReactorSpecification } from './reactor-specification.js';

/** Temperatures between which the species' heat capacities, enthalpies and entropies hold, as far as a reactor uses them; K. */
export interface DataRange {
  readonly lowest: number;
  readonly highest: number;
  /** Ids of the species that set the two ends. */
  readonly lowestSpecies?: string;
  readonly highestSpecies?: string;
}

/** Zero to infinity where nothing is taken from the species. */
export function dataRange(
  specification: ReactorSpecification,
  thermochemistry: readonly SpeciesThermochemistry[],
): DataRange {
  const isUsed = usedSpecies(specification);
  let range: DataRange = { lowest: 0, highest: Infinity };
  thermochemistry.forEach(({ lowestTemperature, highestTemperature }, i) => {
    if (!isUsed[i]) return;
    const { id } = specification.species[i]!;
    if (lowestTemperature > range.lowest) range = { ...range, lowest: lowestTemperature, lowestSpecies: id };
    if (highestTemperature < range.highest)
      range = { ...range, highest: highestTemperature, highestSpecies: id };
  });
  return range;
}

/** Whose data the heat balance, an equilibrium constant or an estimated conductivity rests on. */
function usedSpecies(specification: ReactorSpecification): boolean[] {
  const { species, reactions, feed, fluid, heat } = specification;
  const isActive = activeSpecies(specification);
  const isPresent = species.map((_record, i) => isActive[i]! || feed.molarFlows[i]! > 0);
  const needed = neededProperties({ ...specification, isActive });
  const needsAll =
    (heat.mode !== 'isothermal' && fluid.heatCapacity.kind === 'species') ||
    (needed.thermalConductivity && fluid.thermalConductivity.kind === 'estimate');
  return species.map(
    (_record, i) =>
      (needsAll && isPresent[i]!) ||
      reactions.some(
        ({ stoichiometry, rate, heat: given }) =>
          stoichiometry[i] !== 0 &&
          (mentions(rate.expression, 'equilibrium_constant') ||
            (heat.mode !== 'isothermal' && given === undefined)),
      ),
  );
}
