import { describe, expect, it } from 'vitest';
import { offsetInFile } from '../../src/case/offset-in-file.js';
import { readYamlDocument } from '../../src/case/yaml-document.js';

/** The letter of the file that stands for the first `X` in the value of `a`. */
function markOf(source: string): string | undefined {
  const root = readYamlDocument(source, (problem) => {
    throw new Error(problem.found);
  });
  const node = root?.kind === 'map' ? root.entries.get('a')?.value : undefined;
  if (node?.kind !== 'scalar') throw new Error('no value');
  const offset = offsetInFile(source, node, String(node.value).indexOf('X'));
  return offset === undefined ? undefined : `${offset}${source[offset]!}`;
}

const expected = (source: string): string => `${source.indexOf('X')}X`;

describe('offsetInFile', () => {
  it.each([
    ['plain', 'a: k * X * p'],
    ['single quotes', "a: 'k * X'"],
    ['double quotes', 'a: "k * X"'],
    ['folded', 'a: >-\n  k * p\n  * X\nb: 1\n'],
    ['folded, with an indentation mark', 'a: >2-\n  k * p\n   * X\nb: 1\n'],
    ['literal', 'a: |\n  k *\n  X\n'],
    ['plain over lines', 'a: k *\n  p *\n  X\nb: 1\n'],
    ['quotes over lines', 'a: "k *\n  p * X"\n'],
    ['Windows line ends', 'b: 1\r\na: >-\r\n  k *\r\n  X\r\n'],
  ])('finds the letter: %s', (_name, source) => {
    expect(markOf(source)).toBe(expected(source));
  });

  it.each([
    ['an escape before it', 'a: "\\x6b * X"'],
    ['a doubled quote before it', "a: 'it''s X'"],
  ])('does not guess: %s', (_name, source) => {
    expect(markOf(source)).toBeUndefined();
  });

  it('an offset behind the text stands behind its last letter', () => {
    const source = 'a: >-\n  k *\n  p\nb: 1\n';
    const root = readYamlDocument(source, () => undefined);
    const node = root?.kind === 'map' ? root.entries.get('a')?.value : undefined;
    if (node?.kind !== 'scalar') throw new Error('no value');
    expect(offsetInFile(source, node, String(node.value).length)).toBe(source.indexOf('p') + 1);
  });
});
