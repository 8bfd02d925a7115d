/** Reference, JSON Schema and explanations can come from the schemas that read a case only if every key describes itself. */
import { describe, expect, it } from 'vitest';
import {
  bedSchema,
  heatSchema,
  limitsSchema,
  numericsSchema,
  outputSchema,
  targetsSchema,
} from '../../src/case/schema/bed-schema.js';
import { feedSchema, fluidSchema } from '../../src/case/schema/feed-schema.js';
import { pelletSchema } from '../../src/case/schema/pellet-schema.js';
import { reactionSchema } from '../../src/case/schema/reaction-schema.js';
import { speciesRecordSchema } from '../../src/case/schema/species-schema.js';
import { parseQuantity } from '../../src/quantities/parse-quantity.js';
import { quantityKinds } from '../../src/quantities/quantity-kinds.js';

const sections = {
  species: speciesRecordSchema,
  reactions: reactionSchema,
  feed: feedSchema,
  fluid: fluidSchema,
  pellet: pelletSchema,
  bed: bedSchema,
  heat: heatSchema,
  limits: limitsSchema,
  targets: targetsSchema,
  output: outputSchema,
  numerics: numericsSchema,
};

interface KeyMeta {
  readonly description?: string;
  readonly quantity?: unknown;
  readonly examples?: unknown;
}
interface Described {
  readonly meta: () => KeyMeta | undefined;
  readonly unwrap?: () => Described;
}

/** Metadata may stand on the key or on what an optional key wraps. */
const metaOf = (schema: Described): KeyMeta =>
  schema.meta() ?? (schema.unwrap ? metaOf(schema.unwrap()) : {});

const keys = Object.entries(sections).flatMap(([section, schema]) =>
  Object.entries(schema.shape).map(
    ([key, value]) => [`${section}.${key}`, metaOf(value as unknown as Described)] as const,
  ),
);

describe('keys of the case file', () => {
  it('are found', () => {
    expect(keys.length).toBeGreaterThan(60);
  });

  it.each(keys)('%s says what it is', (_name, meta) => {
    expect(meta.description ?? '').not.toBe('');
  });

  it.each(keys.filter(([, meta]) => Array.isArray(meta.examples)))(
    'the example of %s can be read',
    (_name, meta) => {
      const ids = meta.quantity as readonly string[];
      const kinds = Object.values(quantityKinds).filter(({ id }) => ids.includes(id));
      expect(kinds.length).toBeGreaterThan(0);
      for (const example of meta.examples as readonly string[]) {
        expect(parseQuantity(example, kinds, (fault) => expect.fail(fault.found))).toBeDefined();
      }
    },
  );
});
