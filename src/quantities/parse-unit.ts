/**
 * Unit text to a factor and a dimension: `mol/(kg s bar^2)`, `J/mol/K`, `kg m^-3`, `1/s`. Products by space, `*` or `·`, quotients by `/`,
 * exponents signed decimals behind `^` (or raised digits: `m²`, `s⁻¹`), parentheses. After a slash a product must stand in parentheses:
 * `J/mol K` is read by some as J K/mol and by others as J/(mol K), so it is refused.
 */
import type { ProblemCode, ReportFault } from '../diagnostics/problem.js';
import {
  dimensionless,
  divideDimensions,
  multiplyDimensions,
  raiseDimension,
  type Dimension,
} from './dimension.js';
import { findUnit, isGaugeUnit, isPressureUnit, nearestUnit } from './units.js';

/** A unit expression, worked out. */
export interface ParsedUnit {
  /** One of it in SI. */
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
  /\s+|(?<number>[+-]?(?:\d+\.?\d*|\.\d+))|(?<symbol>[A-Za-zµμÅ°%ü]+(?:(?<=Nm)3)?(?![A-Za-zµμÅ°]))|(?<power>[⁺⁻]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+)|(?<mark>[()*·/^])/uy;
const raisedDigits = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const deepest = 10;
const absolutePressures = 'pressures are absolute here';

/**
 * @param text - the unit alone, without the number before it
 * @param report - receives at most one fault, offsets counted from the start of `text` plus `offset`
 */
export function parseUnit(text: string, report: ReportFault, offset = 0): ParsedUnit | undefined {
  const refuse = (
    code: ProblemCode,
    start: number,
    end: number,
    found: string,
    expected: string,
    mend?: string,
  ): undefined => {
    // Where nothing stands, the last character is shown.
    const shown = Math.max(0, Math.min(start, text.length - 1));
    report({
      code,
      severity: 'error',
      span: { start: offset + shown, end: offset + Math.max(end, shown + 1) },
      found,
      expected,
      ...(mend !== undefined && { mend }),
    });
    return undefined;
  };
  const fault = refuse.bind(undefined, 'bad_quantity');
  /** Something else stands where a unit is due. */
  const noUnit = refuse.bind(undefined, 'unknown_unit');
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
        text[start] === ',' ? 'write a dot for the decimals' : undefined,
      );
    const end = tokenPattern.lastIndex;
    const groups = match.groups!;
    if (groups['number'] !== undefined) tokens.push({ kind: 'number', text: match[0], start, end });
    else if (groups['symbol'] !== undefined) tokens.push({ kind: 'symbol', text: match[0], start, end });
    else if (groups['power'] !== undefined) {
      tokens.push(
        { kind: '^', text: '^', start, end },
        { kind: 'number', text: lowered(match[0]), start, end },
      );
    } else if (groups['mark'] !== undefined) {
      const kind = match[0] === '·' ? '*' : (match[0] as Token['kind']);
      tokens.push({ kind, text: match[0], start, end });
    }
  }
  if (tokens.length === 0) return noUnit(0, text.length, 'no unit', 'a unit');

  let at = 0;
  const peek = (): Token | undefined => tokens[at];

  const primary = (depth: number): ParsedUnit | undefined => {
    const token = peek();
    if (!token) return noUnit(text.length, text.length, 'the end', 'a unit behind the operator');
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
      if (Number(token.text) !== 1) {
        const mend = at === 1 ? 'write the digits of a number without spaces' : undefined;
        return noUnit(token.start, token.end, `the number ${token.text}`, 'a unit symbol here', mend);
      }
      return { factor: 1, dimension: dimensionless };
    }
    if (token.kind !== 'symbol')
      return noUnit(token.start, token.end, `\`${token.text}\``, 'a unit symbol here');
    return symbol(token);
  };

  const symbol = (token: Token): ParsedUnit | undefined => {
    const suffix = suffixBehind(token);
    const isGauge = suffix === undefined ? isGaugeUnit(token.text) : /^g/.test(suffix.text);
    if (isGauge) {
      return fault(
        token.start,
        suffix?.end ?? token.end,
        `\`${text.slice(token.start, suffix?.end ?? token.end)}\`, a gauge pressure`,
        'an absolute pressure',
        'add the atmospheric pressure of your site and write bar, kPa or psi',
      );
    }
    if (suffix) {
      return noUnit(
        token.start,
        suffix.end,
        `\`${text.slice(token.start, suffix.end)}\``,
        'a unit that is known here',
        `write \`${token.text}\`: ${absolutePressures}`,
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
    const nearest = nearestUnit(token.text);
    return noUnit(
      token.start,
      token.end,
      `\`${token.text}\``,
      'a unit that is known here',
      nearest === undefined ? undefined : `did you mean \`${nearest}\`?`,
    );
  };

  /** What `bar(g)` or `psi(a)` says in parentheses: not grams or years, but how the pressure counts. */
  const suffixBehind = (token: Token): { text: string; end: number } | undefined => {
    const [open, name, close] = tokens.slice(at, at + 3);
    if (open?.kind !== '(' || close?.kind !== ')' || !/^(?:g|gauge|a|abs)$/.test(name!.text))
      return undefined;
    return isPressureUnit(token.text) ? { text: name!.text, end: close.end } : undefined;
  };

  const power = (depth: number): ParsedUnit | undefined => {
    const base = primary(depth);
    if (!base) return undefined;
    const next = peek();
    if (next?.kind === 'number' && tokens[at - 1]!.kind === 'symbol' && tokens[at - 1]!.end === next.start) {
      const name = tokens[at - 1]!.text;
      return noUnit(
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

/** Raised digits as plain ones. */
function lowered(raised: string): string {
  return raised.replace(/./gu, (character) => {
    if (character === '⁻') return '-';
    return character === '⁺' ? '+' : String(raisedDigits.indexOf(character));
  });
}
