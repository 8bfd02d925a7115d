import { dataRange } from '../../bed/data-range.js';
import type { ReactorSpecification } from '../../bed/reactor-specification.js';
import { createSpeciesThermochemistry } from '../../properties/thermochemistry.js';
import { problemAt, type CaseContext } from '../case-context.js';

/** False where the feed lies outside the temperatures for which the species' data hold; along the bed an event watches over them. */
export function checkDataRange(context: CaseContext, specification: ReactorSpecification): boolean {
  const { temperature } = specification.feed;
  const range = dataRange(specification, specification.species.map(createSpeciesThermochemistry));
  const isBelow = temperature < range.lowest;
  if (!isBelow && temperature <= range.highest) return true;
  problemAt(context, ['feed', 'temperature'], {
    code: 'out_of_range',
    found: `${temperature} K, where the data of ${(isBelow ? range.lowestSpecies : range.highestSpecies)!} do not hold`,
    expected: isBelow ? `at least ${range.lowest} K` : `at most ${range.highest} K`,
    mend: 'give the species a heat capacity that covers the temperature',
  });
  return false;
}
