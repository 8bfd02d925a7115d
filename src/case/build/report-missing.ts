import type { SpeciesRecord } from '../../properties/species-record.js';
import { problemAt, type CaseContext } from '../case-context.js';
import { recordKeys } from './record-keys.js';
import { isOwnRecord } from './species-source.js';

/**
 * Says that a species lacks a property, and what needs it.
 *
 * @param what - that is estimated: `the viscosity of the mixture`
 * @param mend - a way around it, after `add it to the species, or`
 */
export function reportMissing(
  context: CaseContext,
  record: SpeciesRecord,
  field: keyof SpeciesRecord,
  what: string,
  mend: string,
): void {
  const where = isOwnRecord(record) ? '' : ' in the species library';
  problemAt(context, ['species', record.id], {
    code: 'missing_property',
    found: `no \`${recordKeys[field]}\` of ${record.id}${where}`,
    expected: `it, since ${what} is estimated`,
    mend: `add it to the species, or ${mend}`,
  });
}

/** What the gas's equation of state is called where it lacks data. */
export const equationEstimate = {
  what: 'the gas, by its equation of state,',
  mend: 'take `equation_of_state: ideal`',
} as const;
