import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createLineIndex } from '../../src/diagnostics/line-index.js';

describe('createLineIndex', () => {
  it('counts lines and columns from one', () => {
    const placeOf = createLineIndex('ab\n\ncd');
    expect([0, 1, 2, 3, 4, 5, 6].map(placeOf)).toEqual([
      { line: 1, column: 1 },
      { line: 1, column: 2 },
      { line: 1, column: 3 },
      { line: 2, column: 1 },
      { line: 3, column: 1 },
      { line: 3, column: 2 },
      { line: 3, column: 3 },
    ]);
  });

  it('keeps offsets outside the text to its ends', () => {
    const placeOf = createLineIndex('a\nb');
    expect(placeOf(-5)).toEqual({ line: 1, column: 1 });
    expect(placeOf(99)).toEqual({ line: 2, column: 2 });
    expect(createLineIndex('')(7)).toEqual({ line: 1, column: 1 });
  });

  it('agrees with counting by hand at every offset', () => {
    fc.assert(
      fc.property(fc.array(fc.constantFrom('a', 'é', '\n', '\r\n', ' '), { maxLength: 40 }), (parts) => {
        const text = parts.join('');
        const placeOf = createLineIndex(text);
        for (let offset = 0; offset <= text.length; offset++) {
          const lines = text.slice(0, offset).split('\n');
          expect(placeOf(offset)).toEqual({ line: lines.length, column: lines.at(-1)!.length + 1 });
        }
      }),
    );
  });
});
