import type { Assumption } from '../../bed/reactor-specification.js';
import type { SpeciesRecord } from '../../properties/species-record.js';
import { keyProblemAt, locate, problemAt, type CaseContext } from '../case-context.js';
import { buildSpeciesRecord, type RecordBuilder } from './build-species-record.js';
import type { SpeciesLibraries } from './species-source.js';

const identifier = /^[A-Za-z][A-Za-z0-9_]*$/;
/** Pellet and bed are dense in the species; far fewer make a model that anyone can check. */
const mostSpecies = 200;

/** Species of a case; a record that could not be read leaves `undefined` in `records`, so that its id is still known. */
export interface SpeciesSection {
  readonly ids: readonly string[];
  readonly records: readonly (SpeciesRecord | undefined)[];
}

/** Whether a text can name a species, a reaction or a constant. */
export function isIdentifier(text: string): boolean {
  return identifier.test(text) && text.length <= 60;
}

/**
 * Reads the section `species` of a case or of a species file; undefined where there is none or it is no map.
 *
 * @param origin - how own records are to be named as a source, `own record in the case`
 */
export function buildSpecies(
  context: CaseContext,
  libraries: SpeciesLibraries,
  origin: string,
  assumptions: Assumption[],
): SpeciesSection | undefined {
  const { node, isExact } = locate(context.root, ['species']);
  if (!isExact) return undefined;
  if (node.kind !== 'map' || node.entries.size === 0) {
    problemAt(context, ['species'], {
      code: 'wrong_type',
      found: node.kind === 'map' ? 'no species' : 'no map',
      expected: 'species by id: `{CO: library, A: {formula: C8H10}}`',
    });
    return undefined;
  }
  const ids: string[] = [];
  const records: (SpeciesRecord | undefined)[] = [];
  if (node.entries.size > mostSpecies) {
    problemAt(context, ['species'], {
      code: 'out_of_range',
      found: `${node.entries.size} species`,
      expected: `at most ${mostSpecies}`,
    });
    return undefined;
  }
  const builder: RecordBuilder = { context, libraries, origin, assumptions };
  for (const id of node.entries.keys()) {
    if (!isIdentifier(id)) {
      keyProblemAt(context, ['species', id], {
        code: 'bad_identifier',
        found: `\`${id}\` as the id of a species`,
        expected: 'a letter, then letters, digits and underscores',
      });
      continue;
    }
    ids.push(id);
    records.push(buildSpeciesRecord(builder, id));
  }
  return { ids, records };
}
