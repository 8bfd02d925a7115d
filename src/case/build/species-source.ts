/** Where the records of a case's species come from, by id. */
import type { Assumption } from '../../bed/reactor-specification.js';
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
  /** The library further down that holds the id too. */
  readonly hides?: string;
  /** What was taken for granted when the record was made. */
  readonly assumptions: readonly Assumption[];
}

/** A record of a species file. */
export interface FileSpecies {
  readonly record: SpeciesRecord;
  readonly assumptions: readonly Assumption[];
}

const builtIn = 'the species library';

/** @param files - records by id, by the name of their file; the first that holds an id wins */
export function createSpeciesLibraries(
  files: ReadonlyMap<string, ReadonlyMap<string, FileSpecies>>,
): SpeciesLibraries {
  return {
    ids: [
      ...new Set([...[...files.values()].flatMap((records) => [...records.keys()]), ...librarySpeciesIds()]),
    ],
    find(id) {
      const found: FoundSpecies[] = [];
      for (const [library, records] of files) {
        const species = records.get(id);
        if (species) found.push({ ...species, library });
      }
      const own = findLibrarySpecies(id);
      if (own) found.push({ record: own, library: builtIn, assumptions: [] });
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
