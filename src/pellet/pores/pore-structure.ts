/** Pores of one size. */
export interface PoreClass {
  /** m, > 0 */
  readonly radius: number;
  /** Share of the pore volume, above 0; the classes of a structure sum to 1. */
  readonly fraction: number;
}

/**
 * Pores of a pellet as diffusion sees them; plain data.
 *
 * - `parallel`: the classes lie side by side, each with its own Knudsen and molecular diffusion
 * - `random`: micropores and macropores cross at random; exactly two classes, no tortuosity
 */
export interface PoreStructure {
  /** Pore volume over pellet volume, between 0 and 1. */
  readonly porosity: number;
  /** 1 or more. */
  readonly tortuosity: number;
  readonly pores: readonly PoreClass[];
  readonly model: 'parallel' | 'random';
  /** Whether molecules not small against a pore are slowed by its walls. */
  readonly hindrance: 'none' | 'renkin';
}
