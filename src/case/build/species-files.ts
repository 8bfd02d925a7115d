/** Species libraries of the user's own: files beside the case with records like those of a case. */
import { CaseError } from '../../diagnostics/case-error.js';
import type { Problem } from '../../diagnostics/problem.js';
import type { SpeciesRecord } from '../../properties/species-record.js';
import { problemAt, type CaseContext } from '../case-context.js';
import { readSection, reportUnknownKey } from '../read-section.js';
import { speciesFilesSchema } from '../schema/species-schema.js';
import { readYamlDocument } from '../yaml-document.js';
import { buildSpecies } from './build-species.js';
import { complete } from './holes.js';
import { createSpeciesLibraries, ownRecordSource, type SpeciesLibraries } from './species-source.js';

/**
 * Text of a file beside the case, by its plain name; the caller guards where it reads.
 *
 * @throws CaseError where there is no such file or it may not be read
 */
export type ReadSpeciesFile = (name: string) => string;

const formatVersion = 1;
const knownKeys = ['bedwright_species', 'species', 'notes'] as const;

/** The libraries of a case, those of its own files first; a name at fault is reported and left out. */
export function readSpeciesLibraries(
  context: CaseContext,
  readFile: ReadSpeciesFile | undefined,
): SpeciesLibraries {
  const names = readSection(context, ['species_files'], speciesFilesSchema) ?? [];
  const files = new Map<string, ReadonlyMap<string, SpeciesRecord>>();
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
    files.set(name, readSpeciesFile(name, readFile(name)));
  });
  return createSpeciesLibraries(files);
}

/**
 * All records of one file.
 *
 * @throws CaseError with every problem of that file, when any of them is an error
 */
export function readSpeciesFile(name: string, source: string): ReadonlyMap<string, SpeciesRecord> {
  const problems: Problem[] = [];
  const report = (problem: Problem): void => {
    problems.push(problem);
  };
  const root = readYamlDocument(source, report);
  const section = root && readRecords({ source, root, report }, name);
  if (problems.some(({ severity }) => severity === 'error') || !section) {
    throw new CaseError(name, source, problems);
  }
  return section;
}

function readRecords(context: CaseContext, name: string): Map<string, SpeciesRecord> | undefined {
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
  // The files of one case do not see each other; what a record takes from the built-in library is said where it is used.
  const section = buildSpecies(
    context,
    createSpeciesLibraries(new Map()),
    `${ownRecordSource} in ${name}`,
    [],
  );
  const records = section && complete(section.records);
  return records && new Map(section.ids.map((id, index) => [id, records[index]!]));
}
