/** One pellet of three reactions, not isothermal, with film: cold, warm, and warm with derivatives. */
import { bench, describe } from 'vitest';
import { createBalances } from '../../src/bed/balances.js';
import { createReactorModel } from '../../src/bed/reactor-model.js';
import { createPelletModel } from '../../src/pellet/create-pellet-model.js';
import { cooledOxidation } from '../bed/cooled-oxidation.js';
import { readReference } from '../reference/read-reference.js';

const model = createReactorModel(cooledOxidation());
const balances = createBalances(model);
const { conditions } = balances;
balances.unpack(balances.initialState);
model.pellet.reviewResolution(conditions);
model.pellet.solve(conditions);

const bulk = new Float64Array(3);
model.rates.evaluate(conditions.concentrations, 0, conditions.temperature, conditions.pressure, bulk, 0);
const effectiveness = model.pellet.averageRates[0]! / (bulk[0]! * model.rateFactors[0]!);
const reference = readReference('cooled-bed.json') as { values: { effectiveness_inlet: number[] } };
if (Math.abs(effectiveness / reference.values.effectiveness_inlet[0]! - 1) > 1e-6) {
  throw new Error(`effectiveness at the inlet is ${effectiveness}`);
}

/** Alternates between two temperatures a tenth of a kelvin apart, as the stages of an axial step do. */
let turn = 0;
function nudge(): void {
  turn = 1 - turn;
  conditions.temperature = 625 + 0.1 * turn;
}

describe('pellet: three reactions, not isothermal, film', () => {
  bench('warm solution', () => {
    nudge();
    model.pellet.solve(conditions);
  });
  bench('warm solution with derivatives', () => {
    nudge();
    model.pellet.differentiate(conditions);
  });
  bench('new model, cold solution', () => {
    const input = {
      pellet: model.specification.pellet,
      transport: model.localProperties.transport,
      transportVaries: false,
      speciesCount: model.speciesCount,
      stoichiometry: model.stoichiometry,
      rates: model.rates,
      rateFactors: model.rateFactors,
      referenceHeats: model.heatContent!.referenceHeats,
      tolerance: 1e-7,
    };
    createPelletModel(input).solve(conditions);
  });
});
