import { distance } from 'fastest-levenshtein';

/** The known name that a mistyped one most likely means; undefined where none is near enough (one slip in three letters, case aside; none in one). */
export function nearestName(name: string, known: Iterable<string>): string | undefined {
  const allowed = name.length < 2 ? 0 : Math.max(1, Math.floor(name.length / 3));
  let best: string | undefined;
  let least = allowed + 1;
  for (const candidate of known) {
    if (Math.abs(candidate.length - name.length) >= least) continue;
    const far = distance(candidate.toLowerCase(), name.toLowerCase());
    if (far < least) {
      least = far;
      best = candidate;
    }
  }
  return best;
}

/** `did you mean …?` for the nearest name, or nothing. */
export function didYouMean(name: string, known: Iterable<string>): string | undefined {
  const nearest = nearestName(name, known);
  return nearest === undefined ? undefined : `did you mean \`${nearest}\`?`;
}
