import type { ReportFault, Span } from '../diagnostics/problem.js';
import { describeDimension } from './describe-dimension.js';
import { dimensionless, sameDimension, type Dimension } from './dimension.js';
import { parseUnit, type ParsedUnit } from './parse-unit.js';
import type { QuantityKind } from './quantity-kinds.js';

const longest = 200;
const numberPattern = /^\s*(?<number>[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?)/;
/** Anything larger or (but for zero) smaller in magnitude is a slip of the pen, and would end in infinities. */
const largest = 1e300;
const smallest = 1e-300;

interface Split {
  readonly number: number;
  readonly unitText: string;
  readonly unitOffset: number;
}

/**
 * Reads a number with its unit and converts it to SI.
 *
 * @param text - such as `12 mm`, `350 degC`, `42 %`
 * @param kinds - what may be meant; the one whose dimension fits is returned with the value
 * @param report - receives one fault where it is none of them; offsets within `text`
 */
export function parseQuantity<Kind extends QuantityKind>(
  text: string,
  kinds: readonly Kind[],
  report: ReportFault,
): { readonly value: number; readonly kind: Kind } | undefined {
  const first = kinds[0]!;
  const split = splitNumber(text, report, `${nouns(kinds)}, for example \`${first.example}\``);
  if (!split) return undefined;
  const whole = { start: 0, end: text.length };
  const unitSpan = { start: split.unitOffset, end: text.length };
  if (split.unitText === '') {
    const plain = kinds.find(({ dimension }) => sameDimension(dimension, dimensionless));
    if (plain) return { value: split.number, kind: plain };
    report({ ...missingUnit(text.trim(), kinds), span: whole });
    return undefined;
  }
  const unit = parseUnit(split.unitText, report, split.unitOffset);
  if (!unit) return undefined;
  const kind = kinds.find(({ dimension }) => sameDimension(dimension, unit.dimension));
  if (!kind) {
    report({
      code: 'wrong_dimension',
      severity: 'error',
      span: unitSpan,
      found: `\`${split.unitText.trim()}\`, which is ${describeDimension(unit.dimension)}`,
      expected: `${nouns(kinds)}, for example \`${first.example}\``,
      mend: `units that fit: ${kinds.flatMap(({ units }) => units).join(', ')}`,
    });
    return undefined;
  }
  if (unit.offset !== undefined && !kind.isTemperature) {
    reportScale(split.unitText, unitSpan, report);
    return undefined;
  }
  return { value: toSi(split.number, unit), kind };
}

/** Reads a number with any unit, or none: a rate constant. A temperature scale (degC) is refused. */
export function parseAnyQuantity(
  text: string,
  report: ReportFault,
): { readonly value: number; readonly dimension: Dimension } | undefined {
  const split = splitNumber(text, report, 'a number with its unit, for example `0.085 mol/(kg s bar^2)`');
  if (!split) return undefined;
  if (split.unitText === '') return { value: split.number, dimension: dimensionless };
  const unit = parseUnit(split.unitText, report, split.unitOffset);
  if (!unit) return undefined;
  if (unit.offset !== undefined) {
    reportScale(split.unitText, { start: split.unitOffset, end: text.length }, report);
    return undefined;
  }
  return { value: toSi(split.number, unit), dimension: unit.dimension };
}

/** A temperature scale where a difference or a constant may be meant. */
function reportScale(unitText: string, span: Span, report: ReportFault): void {
  report({
    code: 'bad_quantity',
    severity: 'error',
    span,
    found: `\`${unitText.trim()}\`, a temperature scale with its own zero`,
    expected: 'kelvin there',
    mend: 'convert to `K`',
  });
}

/** The fault of a bare number where a dimension is due; the caller sets the span. */
export function missingUnit(
  number: string,
  kinds: readonly QuantityKind[],
): { code: 'missing_unit'; severity: 'error'; found: string; expected: string; mend: string } {
  const units = kinds.flatMap((kind) => kind.units);
  return {
    code: 'missing_unit',
    severity: 'error',
    found: `${number}, a bare number`,
    expected: `${nouns(kinds)} with its unit, for example \`${kinds[0]!.example}\``,
    mend: `units that fit: ${units.join(', ')}`,
  };
}

/** `a length or a temperature` */
export function nouns(kinds: readonly QuantityKind[]): string {
  return kinds.map(({ noun }) => noun).join(' or ');
}

function splitNumber(text: string, report: ReportFault, expected: string): Split | undefined {
  const refuse = (found: string): undefined => {
    report({
      code: 'bad_quantity',
      severity: 'error',
      span: { start: 0, end: Math.max(1, text.length) },
      found,
      expected,
    });
    return undefined;
  };
  if (text.length > longest) return refuse(`a text of ${text.length} characters`);
  const match = numberPattern.exec(text);
  if (!match) return refuse(text.trim() === '' ? 'nothing' : `\`${text.trim()}\``);
  const number = Number(match.groups!['number']);
  const magnitude = Math.abs(number);
  if (!(magnitude <= largest) || (magnitude < smallest && /[1-9]/.test(mantissa(match.groups!['number']!)))) {
    return refuse(`the number ${match.groups!['number']!}, which is out of all proportion`);
  }
  const rest = text.slice(match[0].length);
  const unitText = rest.trim();
  return { number, unitText, unitOffset: match[0].length + Math.max(0, rest.indexOf(unitText)) };
}

function mantissa(number: string): string {
  return number.split(/[eE]/)[0]!;
}

function toSi(number: number, unit: ParsedUnit): number {
  return unit.offset === undefined ? number * unit.factor : (number + unit.offset) * unit.factor;
}
