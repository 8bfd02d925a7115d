/**
 * Which reactions can take place at all from a mixture, forwards or backwards, and so which species can be there at equilibrium.
 *
 * @param reactions - rows of coefficients, one column per species
 * @param amounts - one per species; zero or less is absent
 */
export function reachableReactions(
  reactions: readonly (readonly number[])[],
  amounts: ArrayLike<number>,
): { readonly reactions: number[]; readonly isPresent: boolean[] } {
  const isPresent = Array.from(amounts, (amount) => amount > 0);
  const open = new Set(reactions.keys());
  const running: number[] = [];
  let hasGrown = true;
  while (hasGrown) {
    hasGrown = false;
    for (const r of open) {
      const row = reactions[r]!;
      const canRun = (direction: number): boolean =>
        row.every((coefficient, i) => coefficient * direction >= 0 || isPresent[i]!);
      if (!row.some((coefficient) => coefficient !== 0) || !(canRun(1) || canRun(-1))) continue;
      row.forEach((coefficient, i) => {
        if (coefficient !== 0) isPresent[i] = true;
      });
      open.delete(r);
      running.push(r);
      hasGrown = true;
    }
  }
  return { reactions: running.sort((a, b) => a - b), isPresent };
}
