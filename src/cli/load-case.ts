import { createHash } from 'node:crypto';
import { lstatSync, readFileSync, statSync } from 'node:fs';
import { basename, dirname, join } from 'node:path';
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
  /** Species files that the case names, as they are. */
  readonly speciesFiles: readonly SpeciesFile[];
}

export interface SpeciesFile {
  /** Plain name, beside the case. */
  readonly name: string;
  readonly bytes: Uint8Array;
  /** SHA-256, hexadecimal. */
  readonly hash: string;
}

/** @throws CaseError where the file cannot be read or is at fault */
export function loadCase(path: string): LoadedCase {
  const bytes = readBytes(path);
  const source = decodeCase(bytes, path);
  const speciesFiles: SpeciesFile[] = [];
  const read = readCase(source, path, {
    // The name is a plain one, so that nothing outside the case's folder can be meant; a link out of it is refused.
    readSpeciesFile(name) {
      const beside = join(dirname(path), name);
      if (lstatSync(beside, { throwIfNoEntry: false })?.isSymbolicLink()) {
        refuse(beside, 'a symbolic link', 'a file beside the case');
      }
      const content = readBytes(beside);
      speciesFiles.push({ name, bytes: content, hash: hashOf(content) });
      return { fileName: beside, source: decodeCase(content, beside) };
    },
  });
  return { ...read, fileName: basename(path), bytes, source, hash: hashOf(bytes), speciesFiles };
}

function hashOf(bytes: Uint8Array): string {
  return createHash('sha256').update(bytes).digest('hex');
}

function refuse(path: string, found: string, expected: string): never {
  throw new CaseError(path, '', [
    { code: 'file_unreadable', severity: 'error', path: '', span: { start: 0, end: 0 }, found, expected },
  ]);
}

function readBytes(path: string): Uint8Array {
  try {
    const status = statSync(path);
    if (!status.isFile())
      return refuse(path, status.isDirectory() ? 'a folder' : 'no plain file', 'a case file');
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
    if (code === 'ENOENT') return refuse(path, 'no such file', 'the path of a case file');
    if (code === 'EACCES' || code === 'EPERM')
      return refuse(path, 'a file that may not be read', 'read permission');
    return refuse(path, `a file that cannot be read (${code ?? 'unknown reason'})`, 'a readable case file');
  }
}
