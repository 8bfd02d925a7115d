import { describe, expect, it } from 'vitest';
import type { CaseNode } from '../../src/case/case-node.js';
import { readYamlDocument } from '../../src/case/yaml-document.js';
import type { Problem } from '../../src/diagnostics/problem.js';

function read(text: string): { root: CaseNode | undefined; problems: Problem[] } {
  const problems: Problem[] = [];
  const root = readYamlDocument(text, (problem) => problems.push(problem));
  return { root, problems };
}

/** Where the first problem points, as the text there. */
function pointedAt(text: string): string {
  const { problems } = read(text);
  const { start, end } = problems[0]!.span;
  return text.slice(start, end);
}

function valueOf(text: string): unknown {
  const { root, problems } = read(text);
  expect(problems).toEqual([]);
  if (root?.kind !== 'map') throw new Error('no map');
  const node = root.entries.get('a')!.value;
  return node.kind === 'scalar' ? node.value : node.kind;
}

describe('plain values after the core schema of YAML 1.2 (yaml.org/spec/1.2.2, 10.3.2)', () => {
  it.each([
    ['a: 12', 12],
    ['a: -1.5e3', -1500],
    ['a: .5', 0.5],
    ['a: 0o17', 15],
    ['a: true', true],
    ['a: ~', null],
    ['a: null', null],
    ['a: no', 'no'],
    ['a: yes', 'yes'],
    ['a: off', 'off'],
    ['a: 12:30', '12:30'],
    ['a: 1_000', '1_000'],
    ['a: 2001-01-01', '2001-01-01'],
    ['a: "12"', '12'],
    ["a: 'it''s'", "it's"],
    ['a: "x\\ty"', 'x\ty'],
    ['a: >-\n  b\n  c', 'b c'],
    ['a: |\n  b\n  c\n', 'b\nc\n'],
    ['a: b # comment', 'b'],
    // Of the core schema these are numbers; no key of a case takes them, so they stay text and are refused as such.
    ['a: .inf', '.inf'],
    ['a: -.Inf', '-.Inf'],
    ['a: .NaN', '.NaN'],
    ['a: 1e999', '1e999'],
  ])('%j', (text, value) => {
    expect(valueOf(text)).toBe(value);
  });
});

describe('positions', () => {
  it('of keys, of values and of the text inside quotes', () => {
    const text = "a:\n  key: '12 mm'\n";
    const { root } = read(text);
    if (root?.kind !== 'map') throw new Error('no map');
    const inner = root.entries.get('a')!.value;
    if (inner.kind !== 'map') throw new Error('no map');
    const { keySpan, value } = inner.entries.get('key')!;
    expect(text.slice(keySpan.start, keySpan.end)).toBe('key');
    expect(text.slice(value.span.start, value.span.end)).toBe("'12 mm'");
    expect(value.kind === 'scalar' && text.slice(value.textStart, value.textStart + 5)).toBe('12 mm');
  });

  it('a key without a value stands for its value', () => {
    const text = 'a: 1\nlength:\n';
    const { root } = read(text);
    const entry = root?.kind === 'map' ? root.entries.get('length') : undefined;
    expect(entry?.value).toMatchObject({ kind: 'scalar', value: null, span: entry?.keySpan });
  });
});

describe('what a case has no use for is refused where it stands', () => {
  it.each([
    ['an anchor', 'a: &x 1\n', '1'],
    ['an alias', 'a: &x 1\nb: *x\n', '1'],
    ['a tag', 'a: !!str 1\n', '1'],
    ['a merge key', 'a: 1\n<<: {b: 1}\n', '<<'],
    ['a key twice', 'a: 1\nb: 2\na: 3\n', 'a'],
    ['a key that is a list', '? [x, y]\n: 1\n', '[x, y]'],
    ['a directive', '# first\n%YAML 1.1\n---\na: 1\n', '%YAML 1.1'],
    ['a second document', 'a: 1\n---\nb: 2\n', '---'],
  ])('%s', (_name, text, place) => {
    const { problems } = read(text);
    expect(problems.length).toBeGreaterThan(0);
    expect(pointedAt(text)).toContain(place);
  });

  it('a key twice is pointed at the second time', () => {
    expect(read('a: 1\nb: 2\na: 3\n').problems[0]!.span).toEqual({ start: 10, end: 11 });
  });

  it('one document between its marks is one document', () => {
    expect(read('---\na: 1\n').problems).toEqual([]);
    expect(read('---\na: 1\n...\n').problems).toEqual([]);
  });
});

describe('bounds', () => {
  const nested = (depth: number): string => `a: ${'['.repeat(depth)}${']'.repeat(depth)}`;

  it('twenty levels are fine, forty are not', () => {
    expect(read(nested(20)).problems).toEqual([]);
    expect(read(nested(40)).problems.map(({ code }) => code)).toEqual(['yaml_forbidden']);
  });

  it('brackets that only stand in a comment or a text do not count as levels', () => {
    expect(read(`# ${'[0, 1) '.repeat(40)}\na: "${'[0, 1) '.repeat(40)}"\n`).problems).toEqual([]);
  });

  // Each of these kept the parser busy for seconds, or ended its stack, before they were looked for.
  it.each([
    ['dashes', '- '.repeat(900_000)],
    ['question marks', '? '.repeat(900_000)],
    ['brackets', '['.repeat(1_900_000)],
    ['braces', '{a: '.repeat(400_000)],
    ['indentation', Array.from({ length: 1500 }, (_, k) => `${' '.repeat(k)}a:`).join('\n')],
  ])(
    '%s without end are refused, and soon',
    (_name, text) => {
      const { root, problems } = read(text);
      expect(root).toBeUndefined();
      expect(problems).toHaveLength(1);
      expect(['yaml_forbidden', 'yaml_syntax']).toContain(problems[0]!.code);
    },
    3000,
  );

  it('many entries are refused', () => {
    const text = Array.from({ length: 21_000 }, (_, k) => `k${k}: 1`).join('\n');
    expect(read(text).problems.map(({ code }) => code)).toEqual(['yaml_forbidden']);
  });
});
