/** Fluid, bed, heat, limits, targets and output: sections whose values need little more than taking over. */
import type {
  Assumption,
  ConversionTarget,
  FluidProperty,
  HeatSpecification,
  MixtureHeatCapacity,
  PressureDropSpecification,
  ReactorSpecification,
  SelectivityRequest,
} from '../../bed/reactor-specification.js';
import type { ReactionRecord } from '../../kinetics/reaction-record.js';
import type * as z from 'zod';
import { problemAt, type CaseContext } from '../case-context.js';
import type { BedInput, HeatInput, outputSchema, targetsSchema } from '../schema/bed-schema.js';
import type { FluidInput } from '../schema/feed-schema.js';
import type { PropertyValue } from '../schema/leaves.js';
import { checkSpeciesKeys } from './build-feed.js';

export function buildFluid(
  context: CaseContext,
  input: FluidInput,
  bed: BedInput | undefined,
  assumptions: Assumption[],
): ReactorSpecification['fluid'] | undefined {
  assumptions.push({
    about: 'fluid.equation_of_state',
    statement: 'the gas is ideal',
    source: input.equation_of_state === undefined ? 'default' : 'case: fluid.equation_of_state',
  });
  const needsViscosity = bed !== undefined && bed.pressure_drop !== 'none';
  if (needsViscosity && input.viscosity === undefined) {
    problemAt(context, ['fluid'], {
      code: 'missing_property',
      found: 'no `viscosity` in `fluid`',
      expected: 'it, since the pressure drop is computed',
      mend: 'add `viscosity: 3.1e-5 Pa s` with your value, or `pressure_drop: none` under `bed`',
    });
    return undefined;
  }
  const { viscosity } = input;
  return {
    phase: 'gas',
    equationOfState: 'ideal',
    heatCapacity: toHeatCapacity(input.heat_capacity, assumptions),
    ...(viscosity !== undefined && viscosity !== 'estimate' && { viscosity: toProperty(viscosity) }),
  };
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

function toProperty(input: PropertyValue): FluidProperty {
  return input.kind === 'constant'
    ? { kind: 'constant', value: input.value }
    : { kind: 'formula', formula: input.formula };
}

export function buildBed(input: BedInput, assumptions: Assumption[]): ReactorSpecification['bed'] {
  if (input.tubes === undefined)
    assumptions.push({ about: 'bed.tubes', statement: 'one tube', source: 'default' });
  return {
    tubeDiameter: input.tube_diameter,
    tubes: input.tubes ?? 1,
    length: input.length,
    // `estimate` was refused by the schema.
    voidFraction: input.void_fraction,
    pressureDrop: toPressureDrop(input.pressure_drop),
  };
}

function toPressureDrop(input: BedInput['pressure_drop']): PressureDropSpecification {
  if (input === 'none') return { kind: 'none' };
  if (input === 'ergun') {
    return {
      kind: 'two_term',
      viscous: 150,
      inertial: 1.75,
      source: 'Ergun (1952), Chem. Eng. Prog. 48, 89',
    };
  }
  return { kind: 'two_term', ...input, source: 'case: bed.pressure_drop' };
}

export function buildHeat(context: CaseContext, input: HeatInput): HeatSpecification | undefined {
  if (input.mode !== 'cooled') {
    for (const key of ['overall_coefficient', 'coolant'] as const) {
      if (input[key] === undefined) continue;
      problemAt(context, ['heat', key], {
        code: 'inconsistent',
        found: `\`${key}\` in a bed that is ${input.mode}`,
        expected: '`mode: cooled`, or no such key',
      });
    }
    return { mode: input.mode };
  }
  let isSound = true as boolean;
  const require = (isGiven: boolean, key: string, example: string): void => {
    if (isGiven) return;
    isSound = false;
    problemAt(context, ['heat'], {
      code: 'missing_key',
      found: `no \`${key}\` in \`heat\``,
      expected: 'it, since the bed is cooled',
      mend: `add \`${example}\``,
    });
  };
  require(input.overall_coefficient !==
    undefined, 'overall_coefficient', 'overall_coefficient: 110 W/(m^2 K)');
  require(input.coolant !== undefined, 'coolant', 'coolant: {temperature: 640 K}');
  if (!isSound) return undefined;
  return {
    mode: 'cooled',
    overallCoefficient: input.overall_coefficient!,
    coolantTemperature: input.coolant!.temperature,
  };
}

/** The heat balance asks for data only where temperature can change. */
export function checkHeatData(
  context: CaseContext,
  specification: Pick<ReactorSpecification, 'species' | 'reactions' | 'fluid' | 'feed'>,
): boolean {
  const { species, reactions, fluid, feed } = specification;
  let isSound = true as boolean;
  const missing = (index: number, property: string, why: string): void => {
    isSound = false;
    const { id, source } = species[index]!;
    const isOwn = source === 'own record in the case';
    problemAt(context, ['species', id], {
      code: 'missing_property',
      found: `no \`${property}\` of ${id}${isOwn ? '' : ' in the species library'}`,
      expected: `it, since ${why}`,
      mend:
        property === 'heat_of_formation'
          ? 'add it, or give the reaction its `heat`'
          : 'add it, or give `heat_capacity` under `fluid`',
    });
  };
  const reported = new Set<string>();
  const once = (index: number, property: string, why: string): void => {
    const key = `${index} ${property}`;
    if (reported.has(key)) return;
    reported.add(key);
    missing(index, property, why);
  };
  for (const reaction of reactions) {
    if (reaction.heat) continue;
    reaction.stoichiometry.forEach((coefficient, i) => {
      if (coefficient === 0) return;
      const why = `reaction \`${reaction.name}\` has no \`heat\` and the bed is not isothermal`;
      if (species[i]!.enthalpyOfFormation === undefined && species[i]!.heatCapacity?.kind !== 'nasa') {
        once(i, 'heat_of_formation', why);
      }
      if (!species[i]!.heatCapacity) once(i, 'heat_capacity', why);
    });
  }
  if (fluid.heatCapacity.kind === 'species') {
    species.forEach((record, i) => {
      const isPresent =
        feed.molarFlows[i]! > 0 || reactions.some(({ stoichiometry }) => stoichiometry[i] !== 0);
      if (isPresent && !record.heatCapacity) {
        once(i, 'heat_capacity', 'the heat capacity of the mixture is taken from the species');
      }
    });
  }
  return isSound;
}

export function buildTargets(
  context: CaseContext,
  input: z.output<typeof targetsSchema>,
  ids: readonly string[],
  molarFlows: readonly number[] | undefined,
): ConversionTarget[] | undefined {
  const wanted = input.conversion ?? {};
  if (!checkSpeciesKeys(context, ['targets', 'conversion'], Object.keys(wanted), ids)) return undefined;
  return Object.entries(wanted).map(([id, conversion]) => {
    const speciesIndex = ids.indexOf(id);
    if (molarFlows && !(molarFlows[speciesIndex]! > 0)) {
      problemAt(context, ['targets', 'conversion', id], {
        code: 'inconsistent',
        found: `a conversion of ${id}, which is not fed`,
        expected: 'a species of the feed',
      });
    }
    return { speciesIndex, conversion };
  });
}

export function buildOutput(
  context: CaseContext,
  input: z.output<typeof outputSchema>,
  ids: readonly string[],
  reactions: readonly ReactionRecord[],
  bedLength: number | undefined,
): ReactorSpecification['output'] {
  const pelletPositions = (input.pellet_positions ?? []).filter((position, index) => {
    if (bedLength === undefined || position <= bedLength) return true;
    problemAt(context, ['output', 'pellet_positions', index], {
      code: 'out_of_range',
      found: 'a position beyond the end of the bed',
      expected: `at most ${bedLength} m`,
    });
    return false;
  });
  const selectivities = (input.selectivity ?? []).flatMap((request, index): SelectivityRequest[] => {
    const [productIndex, reactantIndex] = [ids.indexOf(request.of), ids.indexOf(request.from)];
    const path = ['output', 'selectivity', index];
    if (productIndex < 0 || reactantIndex < 0) {
      const key = productIndex < 0 ? 'of' : 'from';
      problemAt(context, [...path, key], {
        code: 'unknown_name',
        found: `\`${request[key]}\`, which is no species of this case`,
        expected: `one of ${ids.join(', ')}`,
      });
      return [];
    }
    const making = reactions.find(
      ({ stoichiometry }) => stoichiometry[productIndex]! > 0 && stoichiometry[reactantIndex]! < 0,
    );
    if (!making) {
      problemAt(context, path, {
        code: 'inconsistent',
        found: `no reaction that makes ${request.of} from ${request.from}`,
        expected: 'a product and a reactant of one reaction',
      });
      return [];
    }
    const productPerReactant = making.stoichiometry[productIndex]! / -making.stoichiometry[reactantIndex]!;
    return [{ productIndex, reactantIndex, productPerReactant }];
  });
  return { points: input.points ?? 101, pelletPositions, selectivities };
}
