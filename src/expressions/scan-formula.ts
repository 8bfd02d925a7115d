/**
 * First look at a formula's text, before any parser sees it: only the characters, numbers, names and marks of ordinary arithmetic, within
 * bounds on length, depth and size. What passes holds no quotes, brackets, assignments, separators or control characters.
 */
import type { ReportFault } from '../diagnostics/problem.js';

/** A word of a formula and where it stands. */
export interface FormulaToken {
  readonly kind: 'number' | 'name' | 'mark';
  readonly text: string;
  readonly start: number;
  readonly end: number;
}

const longest = 4000;
const mostTokens = 1500;
const deepest = 60;

const tokenPattern =
  /[ \t]+|(?<number>(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?)|(?<name>[A-Za-z][A-Za-z0-9_]*)|(?<mark>[-+*/^(),.])/y;

/** What is often typed and never allowed, with the reason. */
const hints: Readonly<Record<string, string>> = {
  '=': 'a rate is an expression: no assignments, comparisons or definitions',
  '[': 'species stand behind a dot: `p.A`',
  '{': 'only arithmetic is allowed',
  '"': 'no texts: species stand behind a dot, `p.A`',
  "'": 'no texts: species stand behind a dot, `p.A`',
  '`': 'no texts',
  ';': 'one expression only',
  '\n': "one line only (fold long laws with YAML's `>-`)",
  '\r': 'one line only',
  '#': 'comments belong behind the value, outside the quotes',
  '%': 'write 0.42 or 42/100',
  '!': 'no factorials',
  '?': 'no conditions; `min` and `max` may serve',
  ':': 'no ranges or conditions',
  '<': 'no comparisons; `min` and `max` may serve',
  '>': 'no comparisons; `min` and `max` may serve',
  '&': 'no logic',
  '|': 'no logic; `abs(x)` is the magnitude',
  '·': 'write `*` for a product',
  '×': 'write `*` for a product',
  '−': 'write the plain minus `-`',
  '²': 'write `^2`',
  '³': 'write `^3`',
  _: 'names begin with a letter',
};

/** Words that the parser behind takes for operators or values of its own: never names here, except for species behind a dot. */
const keptWords: ReadonlyMap<string, string | undefined> = new Map([
  ['in', 'write `inch` for the unit'],
  ['to', undefined],
  ['mod', undefined],
  ['not', undefined],
  ['and', undefined],
  ['or', undefined],
  ['xor', undefined],
  ['end', undefined],
  ['true', undefined],
  ['false', undefined],
  ['null', undefined],
  ['undefined', undefined],
  ['NaN', undefined],
  ['Infinity', undefined],
]);

/** Tokens in order; undefined (and one fault) where the text cannot be a formula. */
export function scanFormula(text: string, report: ReportFault): FormulaToken[] | undefined {
  const refuse = (start: number, end: number, found: string, expected: string, mend?: string): undefined => {
    report({
      code: 'bad_formula',
      severity: 'error',
      span: { start, end },
      found,
      expected,
      ...(mend !== undefined && { mend }),
    });
    return undefined;
  };
  if (text.length > longest) {
    return refuse(
      0,
      longest,
      `a formula of ${text.length} characters`,
      `at most ${longest}`,
      'name parts of it under `constants`',
    );
  }
  const tokens: FormulaToken[] = [];
  let depth = 0;
  tokenPattern.lastIndex = 0;
  while (tokenPattern.lastIndex < text.length) {
    const start = tokenPattern.lastIndex;
    const match = tokenPattern.exec(text);
    if (!match) {
      const character = String.fromCodePoint(text.codePointAt(start)!);
      return refuse(
        start,
        start + character.length,
        `the character ${showCharacter(character)}`,
        'numbers, names, + - * / ^ and parentheses',
        hints[character],
      );
    }
    const end = tokenPattern.lastIndex;
    const groups = match.groups!;
    const kind = (['number', 'name', 'mark'] as const).find((name) => groups[name] !== undefined);
    if (!kind) continue;
    if (kind === 'number') {
      const value = Number(match[0]);
      const isLost = value === 0 && /[1-9]/.test(match[0].split(/[eE]/)[0]!);
      if (!Number.isFinite(value) || isLost) {
        return refuse(start, end, `the number ${match[0]}`, 'a number that a computer can hold');
      }
      // The parser behind would take these for hexadecimal, binary and octal numbers.
      if (match[0] === '0' && /[xbo]/i.test(text.slice(end, end + 1))) {
        return refuse(start, end + 1, `\`${text.slice(start, end + 1)}\``, 'decimal numbers');
      }
    }
    if (kind === 'name' && keptWords.has(match[0]) && tokens.at(-1)?.text !== '.') {
      return refuse(
        start,
        end,
        `the word \`${match[0]}\``,
        'a name that has no meaning of its own in formulas',
        keptWords.get(match[0]),
      );
    }
    if (match[0] === '(' && ++depth > deepest) {
      return refuse(
        start,
        end,
        `parentheses nested deeper than ${deepest}`,
        'a plainer formula',
        'name parts of it under `constants`',
      );
    }
    if (match[0] === ')') depth--;
    tokens.push({ kind, text: match[0], start, end });
    if (tokens.length > mostTokens) {
      return refuse(
        start,
        text.length,
        `more than ${mostTokens} terms and operators`,
        'a plainer formula',
        'name parts of it under `constants`',
      );
    }
  }
  if (tokens.length === 0) return refuse(0, Math.max(1, text.length), 'an empty formula', 'an expression');
  return tokens;
}

function showCharacter(character: string): string {
  const code = character.codePointAt(0)!;
  const name = `U+${code.toString(16).toUpperCase().padStart(4, '0')}`;
  if (character === '\n') return 'line break';
  return code < 0x20 || (code >= 0x7f && code < 0xa0) || code > 0xff ? name : `\`${character}\``;
}
