/**
 * Unit text to a factor and a dimension: `mol/(kg s bar^2)`, `J/mol/K`, `kg m^-3`, `1/s`. Products by space, `*` or `·`, quotients by `/`,
 * exponents signed decimals behind `^` (or the superscripts ² and ³), parentheses. After a slash a product must stand in parentheses:
 * `J/mol K` is read by some as J K/mol and by others as J/(mol K), so it is refused.
 */
import { didYouMean } from '../diagnostics/nearest-name.js';
import type { ReportFault } from '../diagnostics/problem.js';
import {
  dimensionless,
  divideDimensions,
  multiplyDimensions,
  raiseDimension,
  type Dimension,
} from './dimension.js';
import { findUnit, gaugeUnits, unitSymbols } from './units.js';

export interface ParsedUnit {
  readonly factor: number;
  readonly dimension: Dimension;
  /** Only for a temperature scale standing alone: kelvin = (value + offset) * factor. */
  readonly offset?: number;
}

interface Token {
  readonly kind: 'symbol' | 'number' | '(' | ')' | '*' | '/' | '^';
  readonly text: string;
  readonly start: number;
  readonly end: number;
}

const tokenPattern =
  /\s+|(?<number>[+-]?(?:\d+\.?\d*|\.\d+))|(?<symbol>[A-Za-zµμÅ°%ü]+(?:(?<=Nm)3)?(?![A-Za-zµμÅ°]))|(?<power>[²³])|(?<mark>[()*·/^])/uy;
const deepest = 10;

/**
 * @param text - the unit alone, without the number before it
 * @param report - receives at most one fault, offsets counted from the start of `text` plus `offset`
 */
export function parseUnit(text: string, report: ReportFault, offset = 0): ParsedUnit | undefined {
  const fault = (start: number, end: number, found: string, expected: string, mend?: string): undefined => {
    // Where nothing stands, the last character is shown.
    const shown = Math.max(0, Math.min(start, text.length - 1));
    const isUnknown = expected.startsWith('a unit');
    report({
      code: isUnknown ? 'unknown_unit' : 'bad_quantity',
      severity: 'error',
      span: { start: offset + shown, end: offset + Math.max(end, shown + 1) },
      found,
      expected,
      ...(mend !== undefined && { mend }),
    });
    return undefined;
  };
  const tokens: Token[] = [];
  tokenPattern.lastIndex = 0;
  while (tokenPattern.lastIndex < text.length) {
    const start = tokenPattern.lastIndex;
    const match = tokenPattern.exec(text);
    if (!match)
      return fault(
        start,
        start + 1,
        `the character \`${text[start]!}\``,
        'unit symbols with * / ^ and parentheses',
      );
    const end = tokenPattern.lastIndex;
    const groups = match.groups!;
    if (groups['number'] !== undefined) tokens.push({ kind: 'number', text: match[0], start, end });
    else if (groups['symbol'] !== undefined) tokens.push({ kind: 'symbol', text: match[0], start, end });
    else if (groups['power'] !== undefined) {
      tokens.push(
        { kind: '^', text: '^', start, end },
        { kind: 'number', text: match[0] === '²' ? '2' : '3', start, end },
      );
    } else if (groups['mark'] !== undefined) {
      const kind = match[0] === '·' ? '*' : (match[0] as Token['kind']);
      tokens.push({ kind, text: match[0], start, end });
    }
  }
  if (tokens.length === 0) return fault(0, text.length, 'no unit', 'a unit');

  let at = 0;
  const peek = (): Token | undefined => tokens[at];

  const primary = (depth: number): ParsedUnit | undefined => {
    const token = peek();
    if (!token) return fault(text.length, text.length, 'the end', 'a unit behind the operator');
    at++;
    if (token.kind === '(') {
      if (depth > deepest)
        return fault(token.start, token.end, 'parentheses nested too deep', 'a plain unit');
      const inner = product(depth + 1);
      if (!inner) return undefined;
      if (peek()?.kind !== ')')
        return fault(token.start, token.end, 'an open parenthesis', 'one that is closed');
      at++;
      return inner;
    }
    if (token.kind === 'number') {
      if (Number(token.text) !== 1)
        return fault(token.start, token.end, `the number ${token.text}`, 'a unit symbol here');
      return { factor: 1, dimension: dimensionless };
    }
    if (token.kind !== 'symbol')
      return fault(token.start, token.end, `\`${token.text}\``, 'a unit symbol here');
    return symbol(token);
  };

  const symbol = (token: Token): ParsedUnit | undefined => {
    if (gaugeUnits.has(token.text)) {
      return fault(
        token.start,
        token.end,
        `\`${token.text}\`, a gauge pressure`,
        'an absolute pressure',
        'add the atmospheric pressure of your site and write bar, kPa or psi',
      );
    }
    const unit = findUnit(token.text);
    if (unit) {
      return {
        factor: unit.factor,
        dimension: unit.dimension,
        ...(unit.offset !== undefined && { offset: unit.offset }),
      };
    }
    return fault(
      token.start,
      token.end,
      `\`${token.text}\``,
      'a unit that is known here',
      didYouMean(token.text, unitSymbols),
    );
  };

  const power = (depth: number): ParsedUnit | undefined => {
    const base = primary(depth);
    if (!base) return undefined;
    const next = peek();
    if (next?.kind === 'number' && tokens[at - 1]!.kind === 'symbol' && tokens[at - 1]!.end === next.start) {
      const name = tokens[at - 1]!.text;
      return fault(
        tokens[at - 1]!.start,
        next.end,
        `\`${name}${next.text}\``,
        'a unit that is known here',
        `did you mean \`${name}^${next.text}\`?`,
      );
    }
    if (next?.kind !== '^') return base;
    at++;
    let exponent = peek();
    const isParenthesised = exponent?.kind === '(';
    if (isParenthesised) {
      at++;
      exponent = peek();
    }
    if (exponent?.kind !== 'number')
      return fault(next.start, next.end, '`^` without a number', 'a number behind it, such as ^2 or ^-0.5');
    at++;
    if (isParenthesised) {
      if (peek()?.kind !== ')')
        return fault(next.start, exponent.end, 'an open parenthesis', 'one that is closed');
      at++;
    }
    const value = Number(exponent.text);
    if (Math.abs(value) > 12)
      return fault(exponent.start, exponent.end, `the exponent ${exponent.text}`, 'one between -12 and 12');
    if (base.offset !== undefined) return base; // reported below as a scale that does not stand alone
    return { factor: base.factor ** value, dimension: raiseDimension(base.dimension, value) };
  };

  const product = (depth: number): ParsedUnit | undefined => {
    let result = power(depth);
    let quotient: Token | undefined;
    while (result) {
      const token = peek();
      if (!token || token.kind === ')') break;
      const divides = token.kind === '/';
      if (divides || token.kind === '*') at++;
      else if (token.kind === '^') return fault(token.start, token.end, '`^`', 'one exponent to a unit');
      if (quotient && !divides) {
        const [left, right] = [text.slice(0, quotient.start).trim(), text.slice(quotient.end).trim()];
        return fault(
          quotient.start,
          text.length,
          `\`${text.trim()}\`, which can be read in two ways`,
          'a product behind a slash in parentheses',
          `write \`${left}/(${right})\`, or \`${left}/${right.replace(/[\s*·]+/u, '/')}\`, which means the same`,
        );
      }
      if (divides) quotient = token;
      const next = power(depth);
      if (!next) return undefined;
      result = {
        factor: divides ? result.factor / next.factor : result.factor * next.factor,
        dimension: (divides ? divideDimensions : multiplyDimensions)(result.dimension, next.dimension),
      };
    }
    return result;
  };

  const result = product(0);
  if (!result) return undefined;
  const rest = peek();
  if (rest) return fault(rest.start, rest.end, `\`${rest.text}\``, 'parentheses in pairs');
  const scale = tokens.find(
    ({ kind, text: name }) => kind === 'symbol' && findUnit(name)?.offset !== undefined,
  );
  if (scale && tokens.length > 1) {
    return fault(
      scale.start,
      scale.end,
      `\`${scale.text}\` inside a compound unit`,
      'kelvin there: a difference of temperatures has no zero point',
      'write `K`',
    );
  }
  return result;
}
