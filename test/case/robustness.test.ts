/** Whatever is done to a case, reading it ends in a specification or in a CaseError whose problems have a place and can be shown. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decodeCase } from '../../src/case/decode-case.js';
import { readCase } from '../../src/case/read-case.js';
import { CaseError } from '../../src/diagnostics/case-error.js';
import { formatCaseError } from '../../src/diagnostics/format-problem.js';
import { caseText, smallCase } from './case-texts.js';

const texts = [
  smallCase,
  ...['salt-cooled-oxidation', 'adiabatic-shift', 'cracking-mole-change'].map(caseText),
];

const debris = fc.constantFrom(
  ...['', '0', '-1', '1e308', '~', 'true', '{}', '[]', '{a: 1}', 'K', ' bar', '-', ': ', '#', '"', "'", '{'],
  ...[']', ',', '&a', '*a', '!t', '|', '>', '%', '@', '`', '\t', '\r', '\u2028', '\u202e', 'é', '💥'],
  ...[
    '__proto__',
    'constructor',
    'balance',
    'estimate',
    'none',
    'library',
    '<=>',
    '->',
    'p.A',
    'K_eq',
    'exp(',
  ],
  ...['^', '0 K', '.inf', '.nan', 'hot'],
);

interface Damage {
  readonly at: number;
  readonly length: number;
  readonly piece: string;
  readonly isLine: boolean;
}
const damage: fc.Arbitrary<Damage> = fc.record({
  at: fc.nat(),
  length: fc.nat({ max: 3 }),
  piece: debris,
  isLine: fc.boolean(),
});

function damaged(text: string, { at, length, piece, isLine }: Damage): string {
  const parts = isLine ? text.split(/(?<=\n)/) : text.split(/(\s+|[{}[\],:])/);
  parts.splice(at % parts.length, length, piece);
  return parts.join('');
}

/* eslint-disable no-control-regex -- control characters are what is looked for */
const invisible = /[\u0000-\u0009\u000b-\u001f\u007f-\u009f\u202a-\u202e\u2028]/;
/* eslint-enable no-control-regex */

function expectShowable(error: CaseError, length: number): void {
  expect(error.problems.length).toBeGreaterThan(0);
  for (const { span, found, expected } of error.problems) {
    expect(span.start).toBeGreaterThanOrEqual(0);
    expect(span.start).toBeLessThanOrEqual(length);
    expect(span.end).toBeGreaterThanOrEqual(span.start);
    expect(found).not.toBe('');
    expect(expected).not.toBe('');
  }
  expect(formatCaseError(error)).not.toMatch(invisible);
}

describe('a case with random damage', () => {
  it('is read or refused, never more', () => {
    const some = fc.array(damage, { minLength: 1, maxLength: 3 });
    fc.assert(
      fc.property(fc.constantFrom(...texts), some, (text, pieces) => {
        const result = pieces.reduce(damaged, text);
        try {
          readCase(decodeCase(Buffer.from(result), 'case.yaml'), 'case.yaml');
        } catch (error) {
          if (!(error instanceof CaseError)) throw error;
          expectShowable(error, result.length);
        }
      }),
      { numRuns: 600 },
    );
  }, 60_000);

  it('random bytes are refused', () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 200 }), (bytes) => {
        expect(() => readCase(decodeCase(bytes, 'case.yaml'), 'case.yaml')).toThrow(CaseError);
      }),
    );
  });
});
