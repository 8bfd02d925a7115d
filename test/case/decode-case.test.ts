import { describe, expect, it } from 'vitest';
import { decodeCase, largestCaseBytes } from '../../src/case/decode-case.js';
import { CaseError } from '../../src/diagnostics/case-error.js';

const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);

function codeOf(input: Uint8Array): string {
  try {
    decodeCase(input, 'case.yaml');
  } catch (error) {
    if (error instanceof CaseError) return error.problems.map(({ code }) => code).join(' ');
    throw error;
  }
  return 'read';
}

describe('decodeCase', () => {
  it('returns text as it stands, line ends and letters beyond ASCII included', () => {
    expect(decodeCase(bytes('title: Füllkörper µ\r\n# °C\n'), 'case.yaml')).toBe(
      'title: Füllkörper µ\r\n# °C\n',
    );
  });

  it('drops a byte-order mark', () => {
    expect(decodeCase(Uint8Array.of(0xef, 0xbb, 0xbf, 0x61), 'case.yaml')).toBe('a');
  });

  it('takes a file of exactly the largest size and refuses one byte more', () => {
    expect(codeOf(new Uint8Array(largestCaseBytes).fill(0x61))).toBe('read');
    expect(codeOf(new Uint8Array(largestCaseBytes + 1).fill(0x61))).toBe('file_too_large');
  });

  it.each([
    ['a lone continuation byte', Uint8Array.of(0x61, 0x80)],
    ['an overlong slash', Uint8Array.of(0xc0, 0xaf)],
    ['half a surrogate pair', Uint8Array.of(0xed, 0xa0, 0x80)],
    ['a cut-off character', Uint8Array.of(0x61, 0xe2, 0x82)],
  ])('%s is no UTF-8', (_name, input) => {
    expect(codeOf(input)).toBe('not_text');
  });

  it.each([0x00, 0x07, 0x08, 0x0b, 0x0c, 0x1b, 0x7f])(
    'control character %i is refused at its place',
    (code) => {
      try {
        decodeCase(Uint8Array.of(0x61, 0x0a, 0x62, code), 'case.yaml');
        expect.unreachable();
      } catch (error) {
        expect(error).toBeInstanceOf(CaseError);
        expect((error as CaseError).problems[0]).toMatchObject({
          code: 'not_text',
          span: { start: 3, end: 4 },
        });
      }
    },
  );

  it.each([0x09, 0x0a, 0x0d])('white space %i is let through', (code) => {
    expect(codeOf(Uint8Array.of(0x61, code))).toBe('read');
  });
});
