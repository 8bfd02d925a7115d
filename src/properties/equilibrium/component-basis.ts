/**
 * Reactions rewritten as the formation of each scarce species from plentiful ones (the components), and the amounts that they conserve:
 *
 *   n_k + Σ_r c_rk n_r = b_k   for each component k.
 *
 * With the scarce species formed from the plentiful ones, each balance has a term of its own size: a trace is then found to full precision,
 * not as the difference of two large numbers.
 *
 * @source the choice of components by abundance: Smith & Missen (1982), Chemical Reaction Equilibrium Analysis, ch. 6
 */
export interface ComponentBasis {
  /** Species that are components, then those that are formed from them. */
  readonly components: readonly number[];
  readonly formed: readonly number[];
  /** `conserved[k][i]`: amount of component k in one mole of species i; one row per component, one column per species. */
  readonly conserved: readonly (readonly number[])[];
}

/** Coefficients smaller than this after elimination are rounding. */
const negligible = 1e-10;

/**
 * @param reactions - rows of coefficients, one column per species; they may depend on each other
 * @param abundance - one per species; the least abundant ones become the formed species
 */
export function componentBasis(
  reactions: readonly (readonly number[])[],
  abundance: ArrayLike<number>,
): ComponentBasis {
  const speciesCount = abundance.length;
  const rows = reactions.map((row) => [...row]);
  const byScarcity = Array.from({ length: speciesCount }, (_, i) => i).sort(
    (a, b) => abundance[a]! - abundance[b]! || a - b,
  );
  const formed: number[] = [];
  const pivotRows: number[][] = [];
  const free = new Set(rows.keys());
  for (const species of byScarcity) {
    if (free.size === 0) break;
    let best = -1;
    for (const r of free) {
      if (best < 0 || Math.abs(rows[r]![species]!) > Math.abs(rows[best]![species]!)) best = r;
    }
    const pivot = rows[best]!;
    if (Math.abs(pivot[species]!) < negligible) continue;
    free.delete(best);
    const scale = 1 / pivot[species]!;
    for (let i = 0; i < speciesCount; i++) pivot[i]! *= scale;
    for (const row of rows) {
      const factor = row[species]!;
      if (row === pivot || factor === 0) continue;
      for (let i = 0; i < speciesCount; i++) {
        row[i]! -= factor * pivot[i]!;
        if (Math.abs(row[i]!) < negligible) row[i] = 0;
      }
    }
    formed.push(species);
    pivotRows.push(pivot);
  }
  const isFormed = new Set(formed);
  const components = byScarcity.filter((i) => !isFormed.has(i)).sort((a, b) => a - b);
  const conserved = components.map((component) => {
    const row = new Array<number>(speciesCount).fill(0);
    row[component] = 1;
    formed.forEach((species, r) => (row[species] = -pivotRows[r]![component]!));
    return row;
  });
  return { components, formed, conserved };
}
