/**
 * The kinds of value a case is made of, as zod schemas that yield SI numbers and checked formulas. Faults travel as `params` of zod's
 * custom issues and are placed in the file afterwards. Every leaf carries its description and what it accepts as metadata.
 */
import * as z from 'zod';
import { didYouMean } from '../../diagnostics/nearest-name.js';
import type { Fault } from '../../diagnostics/problem.js';
import type { CheckedFormula } from '../../expressions/expression.js';
import { parseFormula } from '../../expressions/parse-formula.js';
import {
  formatDimension,
  isDimensionless,
  sameDimension,
  type Dimension,
} from '../../quantities/dimension.js';
import { missingUnit, nouns, parseAnyQuantity, parseQuantity } from '../../quantities/parse-quantity.js';
import { quantityKinds, type QuantityKind, type QuantityKindName } from '../../quantities/quantity-kinds.js';

/** A fault whose span may be left out: then it points at the whole value. */
export type LooseFault = Omit<Fault, 'span' | 'severity'> & Partial<Pick<Fault, 'span' | 'severity'>>;

type Context = z.core.$RefinementCtx;

/** Hands a fault to zod; `faultOf` takes it out again. */
export function addFault(context: Context, fault: LooseFault): void {
  context.addIssue({ code: 'custom', message: fault.found, params: { fault } });
}

export function faultOf(issue: z.core.$ZodIssue): LooseFault | undefined {
  if (issue.code !== 'custom') return undefined;
  return (issue.params as { fault?: LooseFault } | undefined)?.fault;
}

/** What a value is, in words for the reader. */
export function describeValue(value: unknown): string {
  if (value === null || value === undefined) return 'nothing';
  if (Array.isArray(value)) return 'a list';
  if (typeof value === 'object') return 'a map';
  if (typeof value === 'string') return value.length > 60 ? `\`${value.slice(0, 57)}…\`` : `\`${value}\``;
  return typeof value === 'number' || typeof value === 'boolean' ? String(value) : 'something else';
}

interface Bounds {
  /** Smallest value allowed, SI. */
  readonly atLeast?: number;
  readonly above?: number;
  readonly atMost?: number;
  readonly below?: number;
}

const boundTests: readonly (readonly [keyof Bounds, (value: number, bound: number) => boolean, string])[] = [
  ['atLeast', (value, bound) => value >= bound, 'at least'],
  ['above', (value, bound) => value > bound, 'above'],
  ['atMost', (value, bound) => value <= bound, 'at most'],
  ['below', (value, bound) => value < bound, 'below'],
];

/** @param kind - of the value; undefined for a plain number */
function checkBounds(
  value: number,
  found: string,
  bounds: Bounds,
  context: Context,
  kind?: QuantityKind,
): boolean {
  for (const [key, test, words] of boundTests) {
    const bound = bounds[key];
    if (bound !== undefined && !test(value, bound)) {
      addFault(context, {
        code: 'out_of_range',
        found: `\`${found}\``,
        expected: `${kind?.noun ?? 'a number'} ${words} ${bound}${unitOfBound(bound, kind)}`,
      });
      return false;
    }
  }
  return true;
}

/** Zero needs no unit, and a number has none. */
function unitOfBound(bound: number, kind: QuantityKind | undefined): string {
  if (bound === 0 || kind === undefined || isDimensionless(kind.dimension)) return '';
  return ` ${formatDimension(kind.dimension)}`;
}

const kindsOf = (names: QuantityKindName | readonly QuantityKindName[]): readonly QuantityKind[] =>
  (typeof names === 'string' ? [names] : names).map((name) => quantityKinds[name]);

/** Reads text with a unit; zod's context receives the fault. */
function readQuantity(
  value: unknown,
  kinds: readonly QuantityKind[],
  context: Context,
): { value: number; kind: QuantityKind } | undefined {
  const acceptsNumber = kinds.some(({ id }) => id === 'fraction');
  if (typeof value === 'number' && !acceptsNumber) {
    addFault(context, missingUnit(String(value), kinds));
    return undefined;
  }
  if (typeof value === 'number') return { value, kind: kinds.find(({ id }) => id === 'fraction')! };
  if (typeof value !== 'string') {
    addFault(context, {
      code: 'wrong_type',
      found: describeValue(value),
      expected: `${nouns(kinds)}, for example \`${kinds[0]!.example}\``,
    });
    return undefined;
  }
  return parseQuantity(value, kinds, (fault) => addFault(context, fault));
}

/** A value with a unit, in SI. */
export function quantity(
  names: QuantityKindName | readonly QuantityKindName[],
  description: string,
  bounds: Bounds = {},
): z.ZodType<number> {
  const kinds = kindsOf(names);
  return z
    .unknown()
    .transform((value, context): number => {
      const read = readQuantity(value, kinds, context);
      if (!read || !checkBounds(read.value, String(value), bounds, context, read.kind)) return z.NEVER;
      return read.value;
    })
    .meta({ description, quantity: kinds.map(({ id }) => id), examples: [kinds[0]!.example] });
}

/** A positive quantity, the usual case. */
export function positive(
  names: QuantityKindName | readonly QuantityKindName[],
  description: string,
): z.ZodType<number> {
  return quantity(names, description, { above: 0 });
}

/** Absolute temperature that a bed can have. */
export function temperature(description: string): z.ZodType<number> {
  return quantity('temperature', description, { above: 50, below: 5000 });
}

/** A constant or a formula in T and P; `of` is the id of the kind of quantity that it turned out to be. */
export type PropertyValue =
  | { readonly kind: 'constant'; readonly value: number; readonly of: string }
  | { readonly kind: 'formula'; readonly formula: CheckedFormula; readonly of: string };

const mentionsState = /(?<![\w.])[TP](?![\w])/;

/**
 * A positive property of the fluid or of a species.
 *
 * @param allowsPressure - whether a formula may name P; an ideal gas's heat capacity does not depend on it
 */
export function property(
  names: QuantityKindName | readonly QuantityKindName[],
  description: string,
  allowsPressure = true,
): z.ZodType<PropertyValue> {
  const kinds = kindsOf(names);
  return z
    .unknown()
    .transform((value, context): PropertyValue => {
      if (typeof value === 'string' && mentionsState.test(value)) {
        const formula = parseFormula(
          value,
          { constants: new Map(), speciesIds: [], allowsTemperature: true, allowsPressure },
          (fault) => addFault(context, allowsPressure ? fault : withoutPressure(value, fault)),
        );
        if (!formula) return z.NEVER;
        const kind = kinds.find(({ dimension }) => sameDimension(dimension, formula.dimension));
        if (kind) return { kind: 'formula', formula, of: kind.id };
        addFault(context, {
          code: 'wrong_dimension',
          found: 'a formula that comes out in other units',
          expected: `${nouns(kinds)}, as \`${kinds[0]!.example}\``,
          mend: 'give the numbers in the formula their units, for example `0.02 J/(mol K^2) * T`',
        });
        return z.NEVER;
      }
      const read = readQuantity(value, kinds, context);
      if (!read || !checkBounds(read.value, String(value), { above: 0 }, context, read.kind)) return z.NEVER;
      return { kind: 'constant', value: read.value, of: read.kind.id };
    })
    .meta({
      description,
      quantity: kinds.map(({ id }) => id),
      acceptsFormula: true,
      examples: [kinds[0]!.example],
    });
}

/** Where P has no place it would be read as the unit poise, which is not what anyone means. */
function withoutPressure(text: string, fault: Fault): Fault {
  if (text.slice(fault.span.start, fault.span.end) !== 'P') return fault;
  const { code, severity, span } = fault;
  return { code, severity, span, found: 'the pressure `P`', expected: 'a formula in `T` alone' };
}

/** A number with any unit or none: a rate constant. */
export interface AnyQuantity {
  readonly value: number;
  readonly dimension: Dimension;
}

export function anyQuantity(description: string): z.ZodType<AnyQuantity> {
  return z
    .unknown()
    .transform((value, context): AnyQuantity => {
      if (typeof value === 'number') return { value, dimension: [0, 0, 0, 0, 0] };
      if (typeof value !== 'string') {
        addFault(context, {
          code: 'wrong_type',
          found: describeValue(value),
          expected: 'a number with its unit, for example `0.085 mol/(kg s bar^2)`',
        });
        return z.NEVER;
      }
      return parseAnyQuantity(value, (fault) => addFault(context, fault)) ?? z.NEVER;
    })
    .meta({ description, quantity: 'any' });
}

/** A plain number without a unit. */
export function plainNumber(description: string, bounds: Bounds = {}): z.ZodType<number> {
  return z
    .unknown()
    .transform((value, context): number => {
      if (typeof value !== 'number') {
        addFault(context, { code: 'wrong_type', found: describeValue(value), expected: 'a plain number' });
        return z.NEVER;
      }
      return checkBounds(value, String(value), bounds, context) ? value : z.NEVER;
    })
    .meta({ description, type: 'number' });
}

export function wholeNumber(description: string, bounds: Bounds): z.ZodType<number> {
  return z
    .unknown()
    .transform((value, context): number => {
      if (typeof value !== 'number' || !Number.isInteger(value)) {
        addFault(context, { code: 'wrong_type', found: describeValue(value), expected: 'a whole number' });
        return z.NEVER;
      }
      return checkBounds(value, String(value), bounds, context) ? value : z.NEVER;
    })
    .meta({ description, type: 'integer' });
}

/** `true` or `false`. */
export function flag(description: string): z.ZodType<boolean> {
  return z
    .unknown()
    .transform((value, context): boolean => {
      if (typeof value === 'boolean') return value;
      addFault(context, { code: 'wrong_type', found: describeValue(value), expected: '`true` or `false`' });
      return z.NEVER;
    })
    .meta({ description, type: 'boolean' });
}

/** Free text; numbers count as text, since `title: 2024` is one. */
export function text(description: string, longest = 2000): z.ZodType<string> {
  return z
    .unknown()
    .transform((value, context): string => {
      const isText = typeof value === 'string' || typeof value === 'number' || typeof value === 'boolean';
      const written = isText ? String(value) : undefined;
      if (written === undefined || written.length > longest) {
        addFault(context, {
          code: 'wrong_type',
          found: written === undefined ? describeValue(value) : `a text of ${written.length} characters`,
          expected: `a text of at most ${longest} characters`,
        });
        return z.NEVER;
      }
      return written;
    })
    .meta({ description, type: 'string' });
}

/** One of a few words; `later` are words of the format that this version does not reach. */
export function word<Words extends string>(
  words: readonly Words[],
  description: string,
  later: readonly string[] = [],
): z.ZodType<Words> {
  return z
    .unknown()
    .transform((value, context): Words => {
      const found = words.find((entry) => entry === value);
      if (found !== undefined) return found;
      addFault(context, wordFault(value, words, later));
      return z.NEVER;
    })
    .meta({ description, enum: [...words, ...later] });
}

function wordFault(value: unknown, words: readonly string[], later: readonly string[]): LooseFault {
  if (typeof value === 'string' && later.includes(value)) return notSupported(`\`${value}\``);
  const mend = typeof value === 'string' ? didYouMean(value, [...words, ...later]) : undefined;
  return {
    code: 'wrong_value',
    found: describeValue(value),
    expected: `one of ${words.map((entry) => `\`${entry}\``).join(', ')}`,
    ...(mend !== undefined && { mend }),
  };
}

function notSupported(what: string): LooseFault {
  return {
    code: 'not_supported_yet',
    found: `${what}, which belongs to the case format`,
    expected: 'something this version can do: not supported yet',
    mend: 'remove it, or give the value itself where one can be given',
  };
}

/** A key of the format that this version does not reach: refused whatever stands there. */
export function later(what: string): z.ZodOptional<z.ZodType<undefined>> {
  return z
    .unknown()
    .transform((value, context): undefined => {
      if (value !== undefined) addFault(context, notSupported(what));
      return undefined;
    })
    .meta({ description: `${what} (not supported yet)`, later: true })
    .optional();
}

/**
 * Either one of a few words, or what a schema reads: `film: none` or `film: {mass_transfer: …}`.
 *
 * @param words - accepted words
 * @param laterWords - words of the format that this version does not reach
 */
export function wordOr<Words extends string, Other>(
  words: readonly Words[],
  laterWords: readonly string[],
  schema: z.ZodType<Other>,
  isOther: (value: unknown) => boolean,
  expectedOther: string,
  description: string,
): z.ZodType<Words | Other> {
  return z
    .unknown()
    .transform((value, context): Words | Other => {
      const found = words.find((entry) => entry === value);
      if (found !== undefined) return found;
      if (typeof value === 'string' && laterWords.includes(value)) {
        addFault(context, notSupported(`\`${value}\``));
        return z.NEVER;
      }
      if (isOther(value)) return delegate(schema, value, context);
      const fault = wordFault(value, words, laterWords);
      addFault(context, {
        ...fault,
        expected: [...words.map((entry) => `\`${entry}\``), expectedOther].join(' or '),
      });
      return z.NEVER;
    })
    .meta({ description, enum: [...words, ...laterWords], or: expectedOther });
}

/**
 * zod's own issues say too little: unknown keys need the known ones beside them for a suggestion. They travel in the message, which no user
 * ever sees.
 */
const keepKnownKeys: z.core.$ZodErrorMap = (issue) => {
  if (issue.code !== 'unrecognized_keys') return undefined;
  const { shape } = (issue.inst as unknown as { def: { shape: Record<string, unknown> } }).def;
  return Object.keys(shape).join(',');
};

/** Reads a value with a schema; every section and every nested choice goes through here. */
export function readWith<Output>(
  schema: z.ZodType<Output>,
  value: unknown,
): { readonly data: Output } | { readonly issues: readonly z.core.$ZodIssue[] } {
  const result = schema.safeParse(value, { error: keepKnownKeys });
  return result.success ? { data: result.data } : { issues: result.error.issues };
}

/** Reads with another schema inside a transform, its issues kept with their paths. */
export function delegate<Output>(
  schema: z.ZodType<Output>,
  value: unknown,
  context: Context,
  path: readonly (string | number)[] = [],
): Output {
  const read = readWith(schema, value);
  if ('data' in read) return read.data;
  for (const issue of read.issues) {
    context.issues.push({ ...issue, path: [...path, ...issue.path] } as z.core.$ZodRawIssue);
  }
  return z.NEVER;
}

export function isMap(value: unknown): boolean {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}
