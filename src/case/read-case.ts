/**
 * A case file's text to the plain specification of a reactor. Every section is read on its own; one that is at fault leaves a hole that
 * silences what depends on it, so that one reading reports all faults of the file.
 */
import type { Assumption, ReactorSpecification } from '../bed/reactor-specification.js';
import { CaseError } from '../diagnostics/case-error.js';
import type { Problem } from '../diagnostics/problem.js';
import type { ReactionRecord } from '../kinetics/reaction-record.js';
import { buildMolarFlows } from './build/build-feed.js';
import { buildPellet } from './build/build-pellet.js';
import {
  buildBed,
  buildFluid,
  buildHeat,
  buildOutput,
  buildTargets,
  checkHeatData,
} from './build/build-plant.js';
import { buildCaseConstants, buildReactions } from './build/build-reactions.js';
import { buildSpecies } from './build/build-species.js';
import { checkEquilibrium } from './build/check-equilibrium.js';
import { locate, problemAt, type CaseContext } from './case-context.js';
import { readSection, reportUnknownKey } from './read-section.js';
import {
  bedSchema,
  heatSchema,
  limitsSchema,
  numericsSchema,
  outputSchema,
  targetsSchema,
} from './schema/bed-schema.js';
import { feedSchema, fluidSchema } from './schema/feed-schema.js';
import { later, text, word } from './schema/leaves.js';
import { pelletSchema } from './schema/pellet-schema.js';
import { readYamlDocument } from './yaml-document.js';

const requiredKeys = ['bedwright', 'species', 'reactions', 'feed', 'pellet', 'bed', 'heat'] as const;
const optionalKeys = [
  'title',
  'notes',
  'constants',
  'fluid',
  'limits',
  'targets',
  'output',
  'numerics',
  'start',
  'studies',
  'species_files',
] as const;
const formatVersion = 1;
const defaultTolerance = 1e-6;

export interface ReadCase {
  readonly specification: ReactorSpecification;
  readonly warnings: readonly Problem[];
}

/**
 * @param source - the whole text of the file
 * @param fileName - as it is to appear in messages
 * @throws CaseError with every problem of the file, warnings included, when any of them is an error
 */
export function readCase(source: string, fileName: string): ReadCase {
  const problems: Problem[] = [];
  const report = (problem: Problem): void => {
    problems.push(problem);
  };
  const root = readYamlDocument(source, report);
  const specification = root && readRoot({ root, report });
  if (problems.some(({ severity }) => severity === 'error') || !specification) {
    if (problems.length === 0) throw new Error('a case came to nothing without a reported problem');
    throw new CaseError(fileName, source, problems);
  }
  return { specification, warnings: problems };
}

function readRoot(context: CaseContext): ReactorSpecification | undefined {
  const { root } = context;
  if (root.kind !== 'map') {
    problemAt(context, [], {
      code: 'wrong_type',
      found: root.kind === 'list' ? 'a list' : 'a single value',
      expected: 'a case: keys such as `species`, `reactions`, `feed`',
    });
    return undefined;
  }
  checkKeys(context);
  const assumptions: Assumption[] = [];
  const title = readSection(context, ['title'], text('title', 200)) ?? 'untitled case';
  const notes = readSection(context, ['notes'], text('notes', 20_000)) ?? '';
  readSection(context, ['start'], word(['cold'], 'branch where several pellet states exist', ['hot']));
  readSection(context, ['studies'], later('`studies`'));
  readSection(context, ['species_files'], later('`species_files`'));
  const species = buildSpecies(context, assumptions);
  const reactions = buildReactions(context, species, buildCaseConstants(context));
  const bedInput = readSection(context, ['bed'], bedSchema);
  const feedInput = readSection(context, ['feed'], feedSchema);
  const molarFlows = feedInput && species && buildMolarFlows(context, feedInput, species, bedInput);
  const heatInput = readSection(context, ['heat'], heatSchema);
  const heat = heatInput && buildHeat(context, heatInput);
  const hasFluid = locate(context.root, ['fluid']).isExact;
  const fluidInput = hasFluid ? readSection(context, ['fluid'], fluidSchema) : {};
  const fluid = fluidInput && buildFluid(context, fluidInput, bedInput, assumptions);
  const limits = readSection(context, ['limits'], limitsSchema) ?? {};
  const targets = readSection(context, ['targets'], targetsSchema);
  const output = readSection(context, ['output'], outputSchema) ?? {};
  const numerics = readSection(context, ['numerics'], numericsSchema) ?? {};
  const pelletInput = readSection(context, ['pellet'], pelletSchema);

  const knownReactions = (reactions ?? []).filter((entry): entry is ReactionRecord => entry !== undefined);
  const allReactions = complete(reactions);
  const records = complete(species?.records);
  const pellet =
    pelletInput &&
    species &&
    allReactions &&
    buildPellet(context, pelletInput, {
      speciesIds: species.ids,
      reactionNames: allReactions.map(({ name }) => name),
      isActive: species.ids.map((_id, i) => allReactions.some(({ stoichiometry }) => stoichiometry[i] !== 0)),
      heat: heatInput,
      assumptions,
    });
  const targetList = species ? (buildTargets(context, targets ?? {}, species.ids, molarFlows) ?? []) : [];
  const outputSpecification = buildOutput(
    context,
    output,
    species?.ids ?? [],
    knownReactions,
    bedInput?.length,
  );
  if (numerics.tolerance === undefined) {
    assumptions.push({
      about: 'numerics.tolerance',
      statement: `results to a relative tolerance of ${defaultTolerance}`,
      source: 'default',
    });
  }
  if (!records || !allReactions) return undefined;
  if (!molarFlows || !fluid || !heat || !pellet || !bedInput) return undefined;
  const specification: ReactorSpecification = {
    title,
    notes,
    species: records,
    reactions: allReactions,
    feed: { temperature: feedInput.temperature, pressure: feedInput.pressure, molarFlows },
    fluid,
    pellet,
    bed: buildBed(bedInput, assumptions),
    heat,
    limits: {
      ...(limits.temperature !== undefined && { temperature: limits.temperature }),
      ...(limits.pressure_drop !== undefined && { pressureDrop: limits.pressure_drop }),
    },
    targets: targetList,
    output: outputSpecification,
    numerics: { tolerance: numerics.tolerance ?? defaultTolerance },
    assumptions,
  };
  if (heat.mode !== 'isothermal' && !checkHeatData(context, specification)) return undefined;
  return checkEquilibrium(context, specification) ? specification : undefined;
}

function checkKeys(context: CaseContext): void {
  if (context.root.kind !== 'map') return;
  const known = [...requiredKeys, ...optionalKeys];
  for (const key of context.root.entries.keys()) {
    if (!(known as readonly string[]).includes(key)) reportUnknownKey(context, [], key, known);
  }
  for (const key of requiredKeys) {
    if (context.root.entries.has(key)) continue;
    problemAt(context, [], {
      code: 'missing_key',
      found: `no \`${key}\``,
      expected: key === 'bedwright' ? '`bedwright: 1`, the version of the format' : `the section \`${key}\``,
    });
  }
  const version = context.root.entries.get('bedwright')?.value;
  if (version && !(version.kind === 'scalar' && version.value === formatVersion)) {
    problemAt(context, ['bedwright'], {
      code: 'wrong_value',
      found: version.kind === 'scalar' ? `version \`${String(version.value)}\`` : 'no number',
      expected: `\`bedwright: ${formatVersion}\``,
    });
  }
}

/** The list where it has no hole. */
function complete<Value>(list: readonly (Value | undefined)[] | undefined): readonly Value[] | undefined {
  return list?.every((entry) => entry !== undefined) ? list : undefined;
}
