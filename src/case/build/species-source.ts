/** Where the records of a case's species come from, by id. */
import type { SpeciesRecord } from '../../properties/species-record.js';
import { findLibrarySpecies, librarySpeciesIds } from '../../properties/species/library.js';

/** Libraries of a case: those of its own files first, then the built-in one. */
export interface SpeciesLibraries {
  readonly find: (id: string) => FoundSpecies | undefined;
  readonly ids: readonly string[];
}

export interface FoundSpecies {
  readonly record: SpeciesRecord;
  /** As it is to be named: `the species library`, or a file. */
  readonly library: string;
  /** Whether another library holds the id too. */
  readonly hides?: string;
}

const builtIn = 'the species library';

/** @param files - records by id, by the name of their file; the first that holds an id wins */
export function createSpeciesLibraries(
  files: ReadonlyMap<string, ReadonlyMap<string, SpeciesRecord>>,
): SpeciesLibraries {
  return {
    ids: [
      ...new Set([...[...files.values()].flatMap((records) => [...records.keys()]), ...librarySpeciesIds()]),
    ],
    find(id) {
      const found: FoundSpecies[] = [];
      for (const [library, records] of files) {
        const record = records.get(id);
        if (record) found.push({ record, library });
      }
      const own = findLibrarySpecies(id);
      if (own) found.push({ record: own, library: builtIn });
      const [first, second] = found;
      return first && (second ? { ...first, hides: second.library } : first);
    },
  };
}

/** `source` of a record that the case itself gives; those of species files and of changed records begin with it too. */
export const ownRecordSource = 'own record';

/** Whether the user, not the built-in library, answers for a record. */
export function isOwnRecord({ source }: SpeciesRecord): boolean {
  return source.startsWith(ownRecordSource);
}
