import type { CheckedFormula } from '../expressions/expression.js';

/** To what a rate law's amount per time refers. */
export type RateBasis = 'catalyst_mass' | 'pellet_volume' | 'bed_volume';

/** One reaction with its rate law: plain data, SI. */
export interface ReactionRecord {
  readonly name: string;
  /** As the user wrote it. */
  readonly equation: string;
  readonly isReversible: boolean;
  /** One per species in case order; negative for what is consumed. */
  readonly stoichiometry: readonly number[];
  /** SI: mol/(kg s) for `catalyst_mass`, mol/(m³ s) for the two volumes. Constants are already substituted. */
  readonly rate: CheckedFormula;
  readonly basis: RateBasis;
  /**
   * Heat of reaction as given by the user, J per mole of reaction as written, negative when exothermic;
   * absent: from the species' enthalpies.
   */
  readonly heat?: {
    readonly value: number;
    /** K; absent: holds at the feed temperature. */ readonly temperature?: number;
  };
}
