import type { SpeciesRecord } from '../species-record.js';

/** A transport property of one pure gas at low pressure, and how it is known. */
export interface PureGasProperty {
  /** Pa s or W/(m K). @param temperature - K, > 0 */
  readonly value: (temperature: number) => number;
  /** Key of the method in the table of methods; `given` for the record's own data. */
  readonly method: 'given' | 'chung' | 'lennardJones' | 'chungConductivity';
}

/** Fields that a record lacks. */
export type MissingFields = readonly (keyof SpeciesRecord)[];
