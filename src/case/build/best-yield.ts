interface Conversion {
  readonly stoichiometry: readonly number[];
  readonly isReversible: boolean;
}

/**
 * Moles of product that one mole of reactant can make at best along the shortest chain of reactions that leads there; among chains of one
 * length the one that makes most. For A -> B -> 2 C it is 2 for C from A.
 *
 * @param reactions - a reversible one counts in both directions
 * @returns undefined where no chain leads from the reactant to the product
 */
export function findBestYield(
  reactions: readonly Conversion[],
  productIndex: number,
  reactantIndex: number,
): number | undefined {
  const directed = reactions.flatMap(({ stoichiometry, isReversible }) =>
    isReversible ? [stoichiometry, stoichiometry.map((coefficient) => -coefficient)] : [stoichiometry],
  );
  const reached = new Set([reactantIndex]);
  let front = new Map([[reactantIndex, 1]]);
  while (front.size > 0) {
    const next = new Map<number, number>();
    for (const [species, made] of front) {
      for (const stoichiometry of directed) {
        const consumed = -stoichiometry[species]!;
        if (consumed <= 0) continue;
        stoichiometry.forEach((coefficient, i) => {
          if (coefficient <= 0 || reached.has(i)) return;
          next.set(i, Math.max(next.get(i) ?? 0, (made * coefficient) / consumed));
        });
      }
    }
    const found = next.get(productIndex);
    if (found !== undefined) return found;
    for (const species of next.keys()) reached.add(species);
    front = next;
  }
  return undefined;
}
