/** Bed, heat, limits, targets and output: sections whose values need little more than taking over. */
import type {
  Assumption,
  ConversionTarget,
  HeatSpecification,
  PressureDropSpecification,
  ReactorSpecification,
  SelectivityRequest,
} from '../../bed/reactor-specification.js';
import type { ReactionRecord } from '../../kinetics/reaction-record.js';
import type * as z from 'zod';
import { didYouMean } from '../../diagnostics/nearest-name.js';
import { listNames } from '../../diagnostics/list-names.js';
import { problemAt, type CaseContext } from '../case-context.js';
import type { SectionReading } from '../read-section.js';
import type { BedInput, HeatInput, outputSchema, targetsSchema } from '../schema/bed-schema.js';
import { findBestYield } from './best-yield.js';
import { checkSpeciesKeys } from './build-feed.js';
import { complete } from './holes.js';

/** The bed; its schema has checked all of it. */
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

/** How heat leaves the bed; what a mode needs is asked for, and what it has no use for is refused. */
export function buildHeat(
  context: CaseContext,
  { values, isGiven, isSound }: SectionReading<HeatInput>,
): HeatSpecification | undefined {
  const { mode, overall_coefficient, coolant } = values;
  if (mode === undefined) return undefined;
  if (mode !== 'cooled') {
    for (const key of ['overall_coefficient', 'coolant'] as const) {
      if (!isGiven(key)) continue;
      problemAt(context, ['heat', key], {
        code: 'inconsistent',
        found: `\`${key}\` in a bed that is ${mode}`,
        expected: '`mode: cooled`, or no such key',
      });
    }
    return isSound ? { mode } : undefined;
  }
  const examples = {
    overall_coefficient: 'overall_coefficient: 110 W/(m^2 K)',
    coolant: 'coolant: {temperature: 640 K}',
  } as const;
  for (const key of ['overall_coefficient', 'coolant'] as const) {
    if (isGiven(key)) continue;
    problemAt(context, ['heat'], {
      code: 'missing_key',
      found: `no \`${key}\` in \`heat\``,
      expected: 'it, since the bed is cooled',
      mend: `add \`${examples[key]}\``,
    });
  }
  if (!isSound || overall_coefficient === undefined || !coolant) return undefined;
  return {
    mode,
    overallCoefficient: overall_coefficient,
    coolantTemperature: coolant.temperature,
  };
}

/** Conversions whose first position is reported. */
export function buildTargets(
  context: CaseContext,
  input: z.output<typeof targetsSchema>,
  ids: readonly string[],
  molarFlows: readonly number[] | undefined,
): ConversionTarget[] {
  const wanted = input.conversion ?? {};
  if (!checkSpeciesKeys(context, ['targets', 'conversion'], Object.keys(wanted), ids)) return [];
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

/** What is to be written besides the usual; where species, reactions or bed are at fault, nothing is held against them. */
export function buildOutput(
  context: CaseContext,
  input: z.output<typeof outputSchema>,
  ids: readonly string[] | undefined,
  reactions: readonly (ReactionRecord | undefined)[] | undefined,
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
    if (!ids) return [];
    const [productIndex, reactantIndex] = [ids.indexOf(request.of), ids.indexOf(request.from)];
    const path = ['output', 'selectivity', index];
    for (const key of ['of', 'from'] as const) {
      if (ids.includes(request[key])) continue;
      const mend = didYouMean(request[key], ids);
      problemAt(context, [...path, key], {
        code: 'unknown_name',
        found: `\`${request[key]}\`, which is no species of this case`,
        expected: `one of ${listNames(ids)}`,
        ...(mend !== undefined && { mend }),
      });
    }
    const known = reactions && complete(reactions);
    if (!known || productIndex < 0 || reactantIndex < 0) return [];
    const productPerReactant = findBestYield(known, productIndex, reactantIndex);
    if (productPerReactant === undefined) {
      problemAt(context, path, {
        code: 'inconsistent',
        found: `no reaction, nor a chain of them, that makes ${request.of} from ${request.from}`,
        expected: 'a product and the reactant it comes from',
      });
      return [];
    }
    return [{ productIndex, reactantIndex, productPerReactant }];
  });
  return { points: input.points ?? 101, pelletPositions, selectivities };
}
