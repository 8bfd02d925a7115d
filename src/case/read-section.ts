import type * as z from 'zod';
import { listNames } from '../diagnostics/list-names.js';
import { didYouMean } from '../diagnostics/nearest-name.js';
import {
  formatPath,
  locate,
  plainValue,
  problemAt,
  reportAt,
  type CaseContext,
  type CasePath,
} from './case-context.js';
import { describeValue, faultOf, readWith } from './schema/leaves.js';

/**
 * Reads the value at a path with a schema and reports what is wrong with it, each fault at its place in the file.
 *
 * @returns undefined where anything was wrong or nothing stands there
 */
export function readSection<Output>(
  context: CaseContext,
  path: CasePath,
  schema: z.ZodType<Output>,
): Output | undefined {
  const { node, isExact } = locate(context.root, path);
  if (!isExact) return undefined;
  const read = readWith(schema, plainValue(node));
  if ('data' in read) return read.data;
  for (const issue of read.issues) reportIssue(context, path, issue);
  return undefined;
}

/** A section read key by key: a fault in one of them leaves a hole, and the others still count. */
export interface SectionReading<Output> {
  /** Undefined for a key that is absent or at fault. */
  readonly values: { readonly [Key in keyof Output]?: Output[Key] | undefined };
  /** Whether the key stands in the file, rightly or wrongly. */
  readonly isGiven: (key: keyof Output) => boolean;
  /** Whether every key was right, none missing and none unknown. */
  readonly isSound: boolean;
}

/**
 * Reads the map at a path, each key for itself, and reports faults, unknown keys and missing ones.
 *
 * @returns undefined where no map stands there (reported, unless nothing stands there at all)
 */
export function readKeys<Shape extends Readonly<Record<string, z.ZodType>>>(
  context: CaseContext,
  path: CasePath,
  schema: z.ZodObject<Shape, z.core.$strict>,
): SectionReading<z.output<z.ZodObject<Shape, z.core.$strict>>> | undefined {
  const { node, isExact } = locate(context.root, path);
  if (!isExact) return undefined;
  if (node.kind !== 'map') {
    problemAt(context, path, {
      code: 'wrong_type',
      found: describeValue(plainValue(node)),
      expected: 'a map of keys and values',
    });
    return undefined;
  }
  const shape: Readonly<Record<string, z.ZodType>> = schema.shape;
  const known = Object.keys(shape);
  let isSound = true;
  for (const key of node.entries.keys()) {
    if (known.includes(key)) continue;
    isSound = false;
    reportUnknownKey(context, path, key, known);
  }
  const values: Record<string, unknown> = {};
  for (const key of known) {
    const entry = node.entries.get(key);
    const read = readWith(shape[key]!, entry && plainValue(entry.value));
    if ('data' in read) {
      values[key] = read.data;
      continue;
    }
    isSound = false;
    for (const issue of read.issues) reportIssue(context, path, { ...issue, path: [key, ...issue.path] });
  }
  return {
    values: values as SectionReading<z.output<z.ZodObject<Shape, z.core.$strict>>>['values'],
    isGiven: (key) => node.entries.has(String(key)),
    isSound,
  };
}

function reportIssue(context: CaseContext, sectionPath: CasePath, issue: z.core.$ZodIssue): void {
  const path: CasePath = [...sectionPath, ...(issue.path as (string | number)[])];
  const { isExact, node } = locate(context.root, path);
  if (issue.code === 'unrecognized_keys') {
    const known = issue.message.split(',');
    for (const key of issue.keys) reportUnknownKey(context, path, key, known);
    return;
  }
  const fault = faultOf(issue);
  if (!isExact) {
    const key = String(path.at(-1));
    problemAt(context, path.slice(0, -1), {
      code: 'missing_key',
      found: `no \`${key}\` in \`${formatPath(path.slice(0, -1))}\``,
      expected: fault?.expected ?? `\`${key}\` there`,
    });
    return;
  }
  if (fault) {
    const { span, severity = 'error', ...rest } = fault;
    if (span) reportAt(context, path)({ ...rest, severity, span });
    else problemAt(context, path, { ...rest, severity });
    return;
  }
  const expected =
    issue.code === 'invalid_type' && issue.expected === 'array'
      ? 'a list'
      : issue.code === 'invalid_type' && issue.expected === 'object'
        ? 'a map of keys and values'
        : issue.code === 'too_big'
          ? `at most ${String(issue.maximum)} entries`
          : 'at least one entry';
  problemAt(context, path, { code: 'wrong_type', found: describeValue(plainValue(node)), expected });
}

/** Points at the key itself. */
export function reportUnknownKey(
  context: CaseContext,
  path: CasePath,
  key: string,
  known: readonly string[],
): void {
  const { node } = locate(context.root, path);
  const entry = node.kind === 'map' ? node.entries.get(key) : undefined;
  const mend = didYouMean(key, known);
  context.report({
    code: 'unknown_key',
    severity: 'error',
    path: formatPath([...path, key]),
    span: entry?.keySpan ?? node.span,
    found: `the key \`${key}\`, which means nothing here`,
    expected: `one of ${listNames(known)}`,
    ...(mend !== undefined && { mend }),
  });
}
