import type {
  Assumption,
  MixtureHeatCapacity,
  ReactorSpecification,
} from '../../bed/reactor-specification.js';
import type { LocalProperty } from '../../pellet/pellet-specification.js';
import type { EquationOfStateSpecification } from '../../properties/equation-of-state/create-equation-of-state.js';
import { problemAt, type CaseContext } from '../case-context.js';
import type { SectionReading } from '../read-section.js';
import type { FluidInput } from '../schema/feed-schema.js';
import { checkSpeciesKeys, perSpecies } from './build-feed.js';
import { toProperty } from './to-property.js';

const equationNames = {
  ideal: 'the gas is ideal',
  peng_robinson: 'the gas follows the Peng–Robinson equation of state (1976)',
  soave_redlich_kwong: 'the gas follows the Soave–Redlich–Kwong equation of state (1972)',
} as const;

/** Pa; below, corrections of transport properties for pressure are within the scatter of the properties. */
const correctedAbove = 1e6;

/**
 * The fluid; what is not given is to be estimated.
 *
 * @param reading - undefined where the case has no such section
 * @param reactionCount - of reactions that could be read
 * @param feedPressure - Pa; undefined where it could not be read
 */
export function buildFluid(
  context: CaseContext,
  reading: SectionReading<FluidInput> | undefined,
  ids: readonly string[],
  reactionCount: number,
  feedPressure: number | undefined,
  assumptions: Assumption[],
): ReactorSpecification['fluid'] | undefined {
  const values = reading?.values ?? {};
  const equationOfState = toEquationOfState(context, values, ids, assumptions);
  const diffusivities = toDiffusivities(context, values.diffusivity, ids);
  const mixing = values.diffusivity_mixing ?? 'wilke';
  if (mixing === 'flux_ratios' && reactionCount > 1) {
    problemAt(context, ['fluid', 'diffusivity_mixing'], {
      code: 'inconsistent',
      found: `\`flux_ratios\` with ${reactionCount} reactions`,
      expected: 'a single reaction, whose stoichiometry sets the ratio of all fluxes',
      mend: 'write `wilke`',
    });
    return undefined;
  }
  if ((reading && !reading.isSound) || !equationOfState || !diffusivities) return undefined;
  return {
    phase: 'gas',
    equationOfState,
    viscosity: toLocal(values.viscosity),
    thermalConductivity: toLocal(values.thermal_conductivity),
    diffusivities,
    diffusivityMixing: mixing,
    isCorrectedForPressure: values.pressure_correction ?? (feedPressure ?? 0) > correctedAbove,
    heatCapacity: toHeatCapacity(values.heat_capacity, assumptions),
  };
}

function toLocal(input: FluidInput['viscosity']): LocalProperty {
  return input === undefined || input === 'estimate' ? { kind: 'estimate' } : toProperty(input);
}

function toDiffusivities(
  context: CaseContext,
  input: FluidInput['diffusivity'],
  ids: readonly string[],
): LocalProperty[] | undefined {
  if (input === undefined || input === 'estimate') return ids.map(() => ({ kind: 'estimate' }));
  return perSpecies(context, ['fluid', 'diffusivity'], input, ids)?.map(toLocal);
}

function toEquationOfState(
  context: CaseContext,
  values: Partial<FluidInput>,
  ids: readonly string[],
  assumptions: Assumption[],
): EquationOfStateSpecification | undefined {
  const kind = values.equation_of_state ?? 'ideal';
  const given = values.binary_interaction;
  assumptions.push({
    about: 'fluid.equation_of_state',
    statement: equationNames[kind],
    source: values.equation_of_state === undefined ? 'default' : 'case: fluid.equation_of_state',
  });
  if (kind === 'ideal') {
    if (given === undefined) return { kind };
    problemAt(context, ['fluid', 'binary_interaction'], {
      code: 'inconsistent',
      found: '`binary_interaction` of an ideal gas',
      expected: 'an equation of state that has such parameters, or no such key',
    });
    return undefined;
  }
  const binaryInteraction = ids.map(() => ids.map(() => 0));
  if (given === undefined) {
    assumptions.push({
      about: 'fluid.binary_interaction',
      statement: 'binary interaction parameters of the equation of state are zero',
      source: 'default',
    });
    return { kind, binaryInteraction };
  }
  const path = ['fluid', 'binary_interaction'];
  let isSound = checkSpeciesKeys(context, path, Object.keys(given), ids);
  const seen = new Set<string>();
  for (const [one, others] of Object.entries(given)) {
    isSound = checkSpeciesKeys(context, [...path, one], Object.keys(others), ids) && isSound;
    for (const [other, value] of Object.entries(others)) {
      const [i, j] = [ids.indexOf(one), ids.indexOf(other)];
      if (i < 0 || j < 0) continue;
      const pair = [i, j].sort((a, b) => a - b).join(' ');
      if (i === j || seen.has(pair)) {
        isSound = false;
        problemAt(context, [...path, one, other], {
          code: 'inconsistent',
          found: i === j ? `a parameter of ${one} with itself` : `the pair ${one}, ${other} a second time`,
          expected: 'each pair of two species once',
        });
      }
      seen.add(pair);
      binaryInteraction[i]![j] = value;
      binaryInteraction[j]![i] = value;
    }
  }
  return isSound ? { kind, binaryInteraction } : undefined;
}

function toHeatCapacity(input: FluidInput['heat_capacity'], assumptions: Assumption[]): MixtureHeatCapacity {
  if (input === undefined || input === 'estimate') {
    assumptions.push({
      about: 'fluid.heat_capacity',
      statement: 'heat capacity of the mixture: the species’ own, weighted by mole fraction',
      source: input === undefined ? 'default; ideal gas mixture' : 'ideal gas mixture',
    });
    return { kind: 'species' };
  }
  return {
    kind: 'given',
    per: input.of === 'heat_capacity_per_mass' ? 'mass' : 'amount',
    property: toProperty(input),
  };
}
