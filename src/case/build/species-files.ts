/** Species libraries of the user's own: files beside the case with records like those of a case. */
import { CaseError } from '../../diagnostics/case-error.js';
import type { Problem } from '../../diagnostics/problem.js';
import type { Assumption } from '../../bed/reactor-specification.js';
import { problemAt, type CaseContext } from '../case-context.js';
import { readSection, reportUnknownKey } from '../read-section.js';
import { speciesFilesSchema } from '../schema/species-schema.js';
import { readYamlDocument } from '../yaml-document.js';
import { buildSpecies } from './build-species.js';
import { complete } from './holes.js';
import {
  createSpeciesLibraries,
  ownRecordSource,
  type FileSpecies,
  type SpeciesLibraries,
} from './species-source.js';

/** Text of a species file, and its name as it is to appear in messages. */
export interface SpeciesFileText {
  readonly fileName: string;
  readonly source: string;
}

/**
 * Finds a file beside the case by its plain name; the caller guards where it reads.
 *
 * @throws CaseError where there is no such file or it may not be read
 */
export type ReadSpeciesFile = (name: string) => SpeciesFileText;

const formatVersion = 1;
const knownKeys = ['bedwright_species', 'species', 'notes'] as const;

/** The libraries of a case, those of its own files first; a name at fault is reported and left out. */
export function readSpeciesLibraries(
  context: CaseContext,
  readFile: ReadSpeciesFile | undefined,
): SpeciesLibraries {
  const names = readSection(context, ['species_files'], speciesFilesSchema) ?? [];
  const files = new Map<string, ReadonlyMap<string, FileSpecies>>();
  names.forEach((name, index) => {
    if (files.has(name)) {
      problemAt(context, ['species_files', index], {
        code: 'inconsistent',
        found: `\`${name}\` a second time`,
        expected: 'each file once',
      });
      return;
    }
    if (!readFile) {
      problemAt(context, ['species_files', index], {
        code: 'file_unreadable',
        found: `\`${name}\`, which this program may not read`,
        expected: 'a way to read files beside the case',
      });
      return;
    }
    const { records, warnings } = readSpeciesFile(name, readFile(name));
    files.set(name, records);
    for (const { code, path, found, expected, mend } of warnings) {
      problemAt(context, ['species_files', index], {
        code,
        severity: 'warning',
        found: `in ${name}, ${path}, ${found}`,
        expected,
        ...(mend !== undefined && { mend }),
      });
    }
  });
  return createSpeciesLibraries(files);
}

interface ReadFile {
  readonly records: ReadonlyMap<string, FileSpecies>;
  readonly warnings: readonly Problem[];
}

/**
 * All records of one file.
 *
 * @throws CaseError with every problem of that file, when any of them is an error
 */
function readSpeciesFile(name: string, { fileName, source }: SpeciesFileText): ReadFile {
  const problems: Problem[] = [];
  const report = (problem: Problem): void => {
    problems.push(problem);
  };
  const root = readYamlDocument(source, report);
  const records = root && readRecords({ source, root, report }, name);
  if (problems.some(({ severity }) => severity === 'error') || !records) {
    throw new CaseError(fileName, source, problems);
  }
  return { records, warnings: problems };
}

function readRecords(context: CaseContext, name: string): Map<string, FileSpecies> | undefined {
  const { root } = context;
  if (root.kind !== 'map') {
    problemAt(context, [], {
      code: 'wrong_type',
      found: root.kind === 'list' ? 'a list' : 'a single value',
      expected: 'a library of species: `bedwright_species: 1` and `species`',
    });
    return undefined;
  }
  for (const key of root.entries.keys()) {
    if (!(knownKeys as readonly string[]).includes(key)) reportUnknownKey(context, [], key, knownKeys);
  }
  const version = root.entries.get('bedwright_species')?.value;
  if (!(version?.kind === 'scalar' && version.value === formatVersion)) {
    problemAt(context, version ? ['bedwright_species'] : [], {
      code: version ? 'wrong_value' : 'missing_key',
      found: version ? 'another version of the format' : 'no `bedwright_species`',
      expected: `\`bedwright_species: ${formatVersion}\``,
    });
  }
  if (!root.entries.has('species')) {
    problemAt(context, [], { code: 'missing_key', found: 'no `species`', expected: 'the section `species`' });
    return undefined;
  }
  const assumptions: Assumption[] = [];
  // The files of one case do not see each other.
  const section = buildSpecies(
    context,
    createSpeciesLibraries(new Map()),
    `${ownRecordSource} in ${name}`,
    assumptions,
  );
  const records = section && complete(section.records);
  return (
    records &&
    new Map(
      section.ids.map((id, index) => [
        id,
        { record: records[index]!, assumptions: assumptions.filter(({ about }) => isAbout(about, id)) },
      ]),
    )
  );
}

/** Whether an assumption is one about a species or a property of it. */
function isAbout(about: string, id: string): boolean {
  return about === `species.${id}` || about.startsWith(`species.${id}.`);
}
