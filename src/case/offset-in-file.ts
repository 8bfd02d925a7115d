import type { CaseScalar } from './case-node.js';

/**
 * Where a character of a value's text stands in the file. A text that runs over several lines is folded when it is read: its blanks and line
 * breaks change, its letters do not, so the letters are counted.
 *
 * @param source - the whole file
 * @param node - the value
 * @param offset - within the value's text
 * @returns offset in the file; undefined where the text stands there in another form (escapes, doubled quotes)
 */
export function offsetInFile(source: string, node: CaseScalar, offset: number): number | undefined {
  const text = String(node.value);
  if (source.startsWith(text, node.textStart)) return node.textStart + offset;
  let at = node.textStart;
  const end = Math.max(node.span.end, node.textStart);
  for (let k = 0; k <= Math.min(offset, text.length - 1); k++) {
    if (isBlank(text[k]!)) continue;
    while (at < end && isBlank(source[at]!)) at++;
    if (at >= end || source[at] !== text[k]) return undefined;
    at++;
  }
  // A fault at a blank or behind the text stands behind the last letter.
  return offset < text.length && !isBlank(text[offset]!) ? at - 1 : at;
}

function isBlank(character: string): boolean {
  return character === ' ' || character === '\t' || character === '\n' || character === '\r';
}
