import { createBalances } from './balances.js';
import { inletGroups } from './inlet-groups.js';
import { collectAssumptions } from './model-assumptions.js';
import { createReactorModel } from './reactor-model.js';
import type { Assumption, ReactorSpecification } from './reactor-specification.js';
import type { DimensionlessGroup } from './run-result.js';

export interface Inspection {
  readonly groups: readonly DimensionlessGroup[];
  readonly assumptions: readonly Assumption[];
}

/** Everything short of integrating: compiles the laws, sets up the balances and looks at the inlet. */
export function inspectReactor(specification: ReactorSpecification): Inspection {
  const model = createReactorModel(specification);
  return {
    groups: inletGroups(model, createBalances(model)),
    assumptions: collectAssumptions(specification),
  };
}
