/** Atoms that an equation makes (positive) or loses (negative), by element; only elements that do not balance. */
export function elementImbalance(
  stoichiometry: readonly number[],
  elements: readonly Readonly<Record<string, number>>[],
): ReadonlyMap<string, number> {
  const sums = new Map<string, { sum: number; scale: number }>();
  stoichiometry.forEach((coefficient, i) => {
    if (coefficient === 0) return;
    for (const [element, count] of Object.entries(elements[i]!)) {
      const entry = sums.get(element) ?? { sum: 0, scale: 0 };
      entry.sum += coefficient * count;
      entry.scale += Math.abs(coefficient * count);
      sums.set(element, entry);
    }
  });
  // Coefficients such as 1/3 leave rounding.
  return new Map(
    [...sums].flatMap(([element, { sum, scale }]) =>
      Math.abs(sum) > 1e-9 * scale ? [[element, sum] as const] : [],
    ),
  );
}
