/** Choices that several sections offer: an estimate or something given, one value or one for each name. */
import * as z from 'zod';
import { addFault, delegate, describeValue, isMap, wordOr } from './leaves.js';

/** A map with free keys; each value by one schema, all faults kept. */
export function mapOf<Value>(
  schema: z.ZodType<Value>,
  description: string,
): z.ZodType<Record<string, Value>> {
  return z
    .unknown()
    .transform((value, context): Record<string, Value> => {
      if (!isMap(value)) {
        addFault(context, {
          code: 'wrong_type',
          found: describeValue(value),
          expected: 'a map with a value for each name',
        });
        return z.NEVER;
      }
      const result = Object.create(null) as Record<string, Value>;
      for (const [key, entry] of Object.entries(value as Record<string, unknown>)) {
        result[key] = delegate(schema, entry, context, [key]);
      }
      return result;
    })
    .meta({ description });
}

/** One value for all, or a value for each by name. */
export type OneOrEach<Value> =
  | { readonly kind: 'one'; readonly value: Value }
  | { readonly kind: 'each'; readonly values: Readonly<Record<string, Value>> };

/** A plain union would report both branches' faults. */
export function oneOrEach<Value>(one: z.ZodType<Value>, description: string): z.ZodType<OneOrEach<Value>> {
  const map = mapOf(one, description);
  return z
    .unknown()
    .transform((value, context): OneOrEach<Value> =>
      isMap(value)
        ? { kind: 'each', values: delegate(map, value, context) }
        : { kind: 'one', value: delegate(one, value, context) },
    )
    .meta({ description, or: 'one value, or one for each name' });
}

/** `estimate`, or what a schema reads. */
export function estimateOr<Value>(
  schema: z.ZodType<Value>,
  description: string,
): z.ZodType<'estimate' | Value> {
  return wordOr(
    ['estimate'] as const,
    [],
    schema,
    (value) => value !== 'estimate',
    'a value or a formula in T and P',
    description,
  );
}
