import { createHash } from 'node:crypto';
import { readFileSync, statSync } from 'node:fs';
import { basename } from 'node:path';
import { decodeCase, largestCaseBytes } from '../case/decode-case.js';
import { readCase, type ReadCase } from '../case/read-case.js';
import { CaseError } from '../diagnostics/case-error.js';

export interface LoadedCase extends ReadCase {
  readonly fileName: string;
  /** The file as it is. */
  readonly bytes: Uint8Array;
  readonly source: string;
  /** SHA-256 of the file's bytes. */
  readonly hash: string;
}

/** @throws CaseError where the file cannot be read or is at fault */
export function loadCase(path: string): LoadedCase {
  const bytes = readBytes(path);
  const source = decodeCase(bytes, path);
  const hash = createHash('sha256').update(bytes).digest('hex');
  return { ...readCase(source, path), fileName: basename(path), bytes, source, hash };
}

function readBytes(path: string): Uint8Array {
  const refuse = (found: string, expected: string): never => {
    throw new CaseError(path, '', [
      { code: 'file_unreadable', severity: 'error', path: '', span: { start: 0, end: 0 }, found, expected },
    ]);
  };
  try {
    const status = statSync(path);
    if (!status.isFile()) return refuse(status.isDirectory() ? 'a folder' : 'no plain file', 'a case file');
    // A file over the limit is refused by its size, without being read.
    if (status.size > largestCaseBytes) {
      throw new CaseError(path, '', [
        {
          code: 'file_too_large',
          severity: 'error',
          path: '',
          span: { start: 0, end: 0 },
          found: `a file of ${(status.size / 1e6).toFixed(1)} MB`,
          expected: `a case of at most ${largestCaseBytes / 1e6} MB`,
        },
      ]);
    }
    return readFileSync(path);
  } catch (error) {
    if (error instanceof CaseError) throw error;
    const code = (error as NodeJS.ErrnoException).code;
    if (code === 'ENOENT') return refuse('no such file', 'the path of a case file');
    if (code === 'EACCES' || code === 'EPERM')
      return refuse('a file that may not be read', 'read permission');
    return refuse(`a file that cannot be read (${code ?? 'unknown reason'})`, 'a readable case file');
  }
}
