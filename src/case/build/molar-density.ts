import {
  createEquationOfState,
  missingForEquation,
  type EquationOfStateSpecification,
} from '../../properties/equation-of-state/create-equation-of-state.js';
import { createFluidState } from '../../properties/equation-of-state/equation-of-state.js';
import { problemAt, type CaseContext } from '../case-context.js';
import type { MolarDensity } from './build-feed.js';
import type { SpeciesSection } from './build-species.js';
import { complete } from './holes.js';
import { equationEstimate, reportMissing } from './report-missing.js';

/** Density of the feed for flows given by volume, by the case's own equation of state. */
export function createMolarDensity(
  context: CaseContext,
  equation: EquationOfStateSpecification | undefined,
  species: SpeciesSection | undefined,
): MolarDensity {
  return (moleFractions, temperature, pressure) => {
    const records = species && complete(species.records);
    if (!equation || !records) return undefined;
    let isComplete = true;
    for (const record of records) {
      for (const field of missingForEquation(equation, record)) {
        isComplete = false;
        reportMissing(context, record, field, equationEstimate.what, equationEstimate.mend);
      }
    }
    if (!isComplete) return undefined;
    const state = createFluidState(records.length);
    const isFound = createEquationOfState(equation, records).evaluate(
      Float64Array.from(moleFractions),
      temperature,
      pressure,
      state,
    );
    if (isFound) return 1 / state.molarVolume;
    problemAt(context, ['feed'], {
      code: 'out_of_range',
      found: 'a feed that the equation of state knows no gas for',
      expected: 'a temperature and a pressure at which the feed is a gas',
    });
    return undefined;
  };
}
