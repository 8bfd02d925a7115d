import { CaseError } from '../diagnostics/case-error.js';
import type { ProblemCode } from '../diagnostics/problem.js';

/** Largest case file that is read, bytes. A case of a hundred reactions takes some tens of kilobytes. */
export const largestCaseBytes = 2_000_000;

/**
 * Bytes of a case file to text.
 *
 * @throws CaseError when they are too many, not UTF-8, or no text
 */
export function decodeCase(bytes: Uint8Array, fileName: string): string {
  const refuse = (code: ProblemCode, found: string, expected: string): never => {
    throw new CaseError(fileName, '', [
      { code, severity: 'error', path: '', span: { start: 0, end: 0 }, found, expected },
    ]);
  };
  if (bytes.length > largestCaseBytes) {
    return refuse(
      'file_too_large',
      `a file of ${(bytes.length / 1e6).toFixed(1)} MB`,
      `a case of at most ${largestCaseBytes / 1e6} MB`,
    );
  }
  let text: string;
  try {
    text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return refuse('not_text', 'bytes that are no UTF-8 text', 'a text file in UTF-8');
  }
  // eslint-disable-next-line no-control-regex -- control characters are what is looked for
  const control = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f]/.exec(text);
  if (control) {
    const code = control[0].charCodeAt(0).toString(16).toUpperCase().padStart(4, '0');
    throw new CaseError(fileName, text, [
      {
        code: 'not_text',
        severity: 'error',
        path: '',
        span: { start: control.index, end: control.index + 1 },
        found: `the control character U+${code}`,
        expected: 'a text file without control characters',
      },
    ]);
  }
  return text;
}
