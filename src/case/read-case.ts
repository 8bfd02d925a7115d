/**
 * A case file's text to the plain specification of a reactor. Every section is read on its own; one that is at fault leaves a hole that
 * silences what depends on it, so that one reading reports all faults of the file.
 */
import type { Assumption, ReactorSpecification } from '../bed/reactor-specification.js';
import { CaseError } from '../diagnostics/case-error.js';
import type { Problem } from '../diagnostics/problem.js';
import { buildMolarFlows } from './build/build-feed.js';
import { buildFluid } from './build/build-fluid.js';
import { createMolarDensity } from './build/molar-density.js';
import { buildPellet } from './build/build-pellet.js';
import { buildBed, buildHeat, buildOutput, buildTargets } from './build/build-plant.js';
import { readConstants } from './build/build-constants.js';
import { buildReactions } from './build/build-reactions.js';
import { buildSpecies } from './build/build-species.js';
import { checkDataRange } from './build/check-data-range.js';
import { checkEquilibrium } from './build/check-equilibrium.js';
import { checkEstimates } from './build/check-estimates.js';
import { checkPhase } from './build/check-phase.js';
import { checkPores } from './build/check-pores.js';
import { checkSpeciesData } from './build/check-species-data.js';
import { complete } from './build/holes.js';
import { readSpeciesLibraries, type ReadSpeciesFile } from './build/species-files.js';
import { ownRecordSource } from './build/species-source.js';
import { problemAt, type CaseContext } from './case-context.js';
import { readKeys, readSection, reportUnknownKey } from './read-section.js';
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

export interface ReadOptions {
  /** Text of a species file that the case names; without it such a case is refused. */
  readonly readSpeciesFile?: ReadSpeciesFile;
}

export interface ReadCase {
  readonly specification: ReactorSpecification;
  readonly warnings: readonly Problem[];
}

/**
 * @param source - the whole text of the file
 * @param fileName - as it is to appear in messages
 * @param options - how files beside the case are read
 * @throws CaseError with every problem of the file, warnings included, when any of them is an error
 */
export function readCase(source: string, fileName: string, options: ReadOptions = {}): ReadCase {
  const problems: Problem[] = [];
  const report = (problem: Problem): void => {
    problems.push(problem);
  };
  const root = readYamlDocument(source, report);
  const specification = root && readRoot({ source, root, report }, options);
  if (problems.some(({ severity }) => severity === 'error') || !specification) {
    if (problems.length === 0) throw new Error('a case came to nothing without a reported problem');
    throw new CaseError(fileName, source, problems);
  }
  return { specification, warnings: problems };
}

function readRoot(context: CaseContext, options: ReadOptions): ReactorSpecification | undefined {
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

  const libraries = readSpeciesLibraries(context, options.readSpeciesFile);
  const species = buildSpecies(context, libraries, `${ownRecordSource} in the case`, assumptions);
  const reactions = buildReactions(context, species, readConstants(context, ['constants'], new Map()));
  const bedInput = readSection(context, ['bed'], bedSchema);
  const feed = readKeys(context, ['feed'], feedSchema);
  const heatReading = readKeys(context, ['heat'], heatSchema);
  const heat = heatReading && buildHeat(context, heatReading);
  const heatMode = heatReading?.values.mode;
  const fluidReading = readKeys(context, ['fluid'], fluidSchema);
  const isFluidRead = fluidReading !== undefined || !root.entries.has('fluid');
  const reactionCount = reactions?.records.length ?? 1;
  const fluid =
    isFluidRead && species
      ? buildFluid(context, fluidReading, species.ids, reactionCount, feed?.values.pressure, assumptions)
      : undefined;
  const molarDensity = createMolarDensity(context, fluid?.equationOfState, species);
  const molarFlows = feed && species && buildMolarFlows(context, feed, species, bedInput, molarDensity);
  const limits = readSection(context, ['limits'], limitsSchema) ?? {};
  const targets = readSection(context, ['targets'], targetsSchema) ?? {};
  const output = readSection(context, ['output'], outputSchema) ?? {};
  const numerics = readSection(context, ['numerics'], numericsSchema) ?? {};
  const pelletReading = readKeys(context, ['pellet'], pelletSchema);

  const stoichiometries = reactions?.stoichiometries ?? [];
  const pellet =
    pelletReading &&
    species &&
    buildPellet(context, pelletReading, {
      speciesIds: species.ids,
      reactionNames: reactions?.names ?? [undefined],
      isActive: species.ids.map((_id, i) => stoichiometries.some((row) => row !== undefined && row[i] !== 0)),
      heatMode,
      assumptions,
    });
  const targetList = species ? buildTargets(context, targets, species.ids, molarFlows) : [];
  const outputSpecification = buildOutput(
    context,
    output,
    species?.ids,
    reactions?.records,
    bedInput?.length,
  );
  if (numerics.tolerance === undefined) {
    assumptions.push({
      about: 'numerics.tolerance',
      statement: `results to a relative tolerance of ${defaultTolerance}`,
      source: 'default',
    });
  }
  const { temperature, pressure } = feed?.values ?? {};
  if (!species || !reactions) return undefined;
  const parts = { species, ...reactions, molarFlows, fluid, heatMode, temperature, pressure };
  const isSound = checkSpeciesData(context, { ...parts, reactions: reactions.records });
  const records = complete(species.records);
  const allReactions = complete(reactions.records);
  if (!isSound || !records || !allReactions || !molarFlows || !fluid || !heat || !pellet) return undefined;
  if (!bedInput || temperature === undefined || pressure === undefined) return undefined;
  const specification: ReactorSpecification = {
    title,
    notes,
    species: records,
    reactions: allReactions,
    feed: { temperature, pressure, molarFlows },
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
  if (!checkEstimates(context, specification, assumptions)) return undefined;
  const findings = [
    checkDataRange(context, specification),
    checkPores(context, specification),
    checkPhase(context, specification, assumptions),
    checkEquilibrium(context, specification),
  ];
  return findings.every(Boolean) ? specification : undefined;
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
