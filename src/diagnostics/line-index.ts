/** Where something stands in a text, as an editor would say it. */
export interface LinePlace {
  /** From 1. */
  readonly line: number;
  /** From 1, in characters (UTF-16 units, as editors count). */
  readonly column: number;
}

/**
 * Makes the function that turns offsets of one text into lines and columns, by bisection in the list of its line starts: a file can have
 * thousands of faults.
 *
 * @returns for any offset; those before or behind the text count as its first and last place
 */
export function createLineIndex(text: string): (offset: number) => LinePlace {
  const starts = [0];
  for (let at = text.indexOf('\n'); at >= 0; at = text.indexOf('\n', at + 1)) starts.push(at + 1);
  return (offset) => {
    const bounded = Math.max(0, Math.min(offset, text.length));
    let low = 0;
    let high = starts.length - 1;
    while (low < high) {
      const middle = Math.ceil((low + high) / 2);
      if (starts[middle]! <= bounded) low = middle;
      else high = middle - 1;
    }
    return { line: low + 1, column: bounded - starts[low]! + 1 };
  };
}
