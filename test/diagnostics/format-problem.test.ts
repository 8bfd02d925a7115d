import { describe, expect, it } from 'vitest';
import { CaseError } from '../../src/diagnostics/case-error.js';
import {
  formatCaseError,
  formatProblems,
  reportProblems,
  visibleText,
} from '../../src/diagnostics/format-problem.js';
import type { Problem } from '../../src/diagnostics/problem.js';

const problem = (start: number, end: number, more: Partial<Problem> = {}): Problem => ({
  code: 'wrong_value',
  severity: 'error',
  path: 'a.b',
  span: { start, end },
  found: 'this',
  expected: 'that',
  ...more,
});

describe('formatProblems', () => {
  it('place, path, what was found and expected, how to mend it, and the line with carets below the fault', () => {
    const text = 'first\nkey: value\n';
    expect(formatProblems([problem(11, 16, { mend: 'do so' })], 'tube.yaml', text)).toBe(
      [
        'tube.yaml:2:6  a.b',
        '  found this; expected that',
        '  do so',
        '  2 | key: value',
        '    |      ^^^^^',
      ].join('\n'),
    );
  });

  it('a warning says so; a fault of the whole file has no path', () => {
    const shown = formatProblems([problem(0, 1, { severity: 'warning', path: '' })], 'tube.yaml', 'x: 1');
    expect(shown.split('\n').slice(0, 2)).toEqual(['tube.yaml:1:1', '  warning: found this; expected that']);
  });

  it('a file that could not be read has no line to show', () => {
    expect(formatProblems([problem(0, 0, { path: '' })], 'tube.yaml', '')).toBe(
      'tube.yaml\n  found this; expected that',
    );
  });

  it('in the order of the file, errors before warnings at one place, whatever the order of finding', () => {
    const problems = [
      problem(8, 9, { found: 'third' }),
      problem(0, 1, { found: 'second', severity: 'warning' }),
      problem(0, 1, { found: 'first' }),
    ];
    const found = [...formatProblems(problems, 'f', 'aaaa\nbbbb\n').matchAll(/found (\w+)/g)];
    expect(found.map(([, word]) => word)).toEqual(['first', 'second', 'third']);
    expect(problems[0]!.found).toBe('third');
  });

  it('shows fifty and counts the rest; nothing is lost for machines', () => {
    const problems = Array.from({ length: 73 }, (_, k) => problem(k, k + 1));
    const text = 'x'.repeat(73);
    const shown = formatProblems(problems, 'f', text);
    expect(shown.match(/expected that/g)).toHaveLength(50);
    expect(shown.endsWith('… and 23 more')).toBe(true);
    expect(reportProblems(problems, 'f', text)).toHaveLength(73);
  });

  it('of a long line the part around the fault is shown, the caret below it', () => {
    const text = `${'a'.repeat(500)}FAULT${'b'.repeat(500)}`;
    const [, , line, caret] = formatProblems([problem(500, 505)], 'f', text).split('\n');
    expect(line!.length).toBeLessThan(120);
    expect(line).toMatch(/^ {2}1 \| …a+FAULTb+…$/);
    expect(caret!.indexOf('^')).toBe(line!.indexOf('FAULT'));
    expect(caret!.trimEnd().length).toBe(line!.indexOf('FAULT') + 5);
  });

  it('a fault that spans lines is marked on its first', () => {
    const [, , line, caret] = formatProblems([problem(3, 12)], 'f', 'a: bcd\n  efg\n').split('\n');
    expect(line).toBe('  1 | a: bcd');
    expect(caret).toBe('    |    ^^^');
  });

  it('an empty line is not shown; Windows line ends are not either', () => {
    expect(formatProblems([problem(2, 3)], 'f', 'a\n\nb')).not.toContain('|');
    expect(formatProblems([problem(0, 1)], 'f', 'a\r\nb')).toContain('1 | a\n');
  });

  it('a tab is one visible sign, and the caret keeps its column', () => {
    const [, , line, caret] = formatProblems([problem(3, 4)], 'f', 'a\t\tb').split('\n');
    expect(line).toBe('  1 | a→→b');
    expect(caret).toBe('    |    ^');
  });

  it('nothing a stranger wrote reaches the terminal as a control', () => {
    const evil = 'a\u001b[2J\u0007\u202e\u2028\u009b';
    const text = `${evil}x`;
    const shown = formatProblems(
      [problem(evil.length, evil.length + 1, { path: evil, found: evil, expected: evil, mend: evil })],
      evil,
      text,
    );
    expect(shown.replaceAll('\n', '')).not.toMatch(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}]/u);
    const lines = shown.split('\n');
    expect(lines.at(-1)!.indexOf('^')).toBe(lines.at(-2)!.lastIndexOf('x'));
  });
});

describe('visibleText', () => {
  it('names what cannot be seen and leaves the rest', () => {
    expect(visibleText('µ °C 12 mm — ok')).toBe('µ °C 12 mm — ok');
    expect(visibleText('a\u0000b\u200bc')).toBe('a<U+0000>b<U+200B>c');
  });
});

describe('reportProblems', () => {
  it('gives plain data with line and column', () => {
    expect(reportProblems([problem(5, 6)], 'tube.yaml', 'aaa\nbbb')).toEqual([
      {
        code: 'wrong_value',
        severity: 'error',
        file: 'tube.yaml',
        line: 2,
        column: 2,
        path: 'a.b',
        found: 'this',
        expected: 'that',
        mend: null,
      },
    ]);
  });
});

describe('CaseError', () => {
  it('carries all problems and is shown through them', () => {
    const error = new CaseError('tube.yaml', 'a: 1', [problem(0, 1), problem(3, 4)]);
    expect(error.message).toContain('2 problem(s)');
    expect(formatCaseError(error)).toBe(formatProblems(error.problems, 'tube.yaml', 'a: 1'));
  });
});
