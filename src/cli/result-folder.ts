/**
 * Result folders, written whole or not at all: everything goes into a hidden folder beside the target first, which takes the target's name
 * only when it is complete. A folder that holds something else than an earlier result is never touched.
 */
import { randomBytes } from 'node:crypto';
import {
  closeSync,
  fsyncSync,
  lstatSync,
  mkdirSync,
  openSync,
  readdirSync,
  readFileSync,
  renameSync,
  rmSync,
  writeSync,
} from 'node:fs';
import { basename, dirname, extname, join, resolve } from 'node:path';
import { UsageError } from './streams.js';

export interface ResultFile {
  /** A plain name, no folders. */
  readonly name: string;
  readonly content: string | Uint8Array;
}

/** File that every complete result holds, and by which an earlier one is recognised. */
const markerFile = 'summary.json';

/** Name for a case's folder from its file name: letters, digits, dot, dash and underscore only. */
export function folderNameOf(caseFile: string): string {
  const stem = basename(caseFile, extname(caseFile));
  const name = stem.replace(/[^A-Za-z0-9._-]+/g, '_').replace(/^[._-]+/, '');
  return name === '' ? 'case' : name.slice(0, 100);
}

/**
 * Refuses a target that could not be written or must not be replaced, before anything is computed.
 *
 * @throws UsageError
 */
export function checkTarget(target: string): void {
  const status = statusOf(target);
  if (!status) return;
  if (status.isSymbolicLink()) throw new UsageError(`${target} is a symbolic link; name the folder itself`);
  if (!status.isDirectory()) throw new UsageError(`${target} is there already and is no folder`);
  const names = readdirSync(target);
  if (names.length > 0 && !isResult(target)) {
    throw new UsageError(
      `${target} holds something else than a result of this tool; choose another folder with --out`,
    );
  }
}

function statusOf(target: string): ReturnType<typeof lstatSync> {
  try {
    return lstatSync(target, { throwIfNoEntry: false });
  } catch (error) {
    throw asUsageError(error, target);
  }
}

function isResult(folder: string): boolean {
  try {
    const summary = JSON.parse(readFileSync(join(folder, markerFile), 'utf8')) as {
      provenance?: { tool?: unknown };
    };
    return summary.provenance?.tool === 'bedwright';
  } catch {
    return false;
  }
}

/** Folders being written now; removed when the process is told to stop. */
const unfinished = new Set<string>();

/** Removes what has been begun and not finished. */
export function removeUnfinished(): void {
  for (const folder of unfinished) rmSync(folder, { recursive: true, force: true });
  unfinished.clear();
}

/**
 * Writes all files into a new folder and puts it in the target's place.
 *
 * @throws UsageError where the file system refuses; the target is then as it was
 */
export function writeResultFolder(target: string, files: readonly ResultFile[]): void {
  const absolute = resolve(target);
  const parent = dirname(absolute);
  const tag = randomBytes(6).toString('hex');
  const partial = join(parent, `.${basename(absolute)}.${tag}.partial`);
  const retired = join(parent, `.${basename(absolute)}.${tag}.old`);
  try {
    checkTarget(absolute);
    mkdirSync(parent, { recursive: true });
    unfinished.add(partial);
    mkdirSync(partial);
    for (const { name, content } of files) writeDurably(join(partial, name), content);
    const hadResult = lstatSync(absolute, { throwIfNoEntry: false }) !== undefined;
    if (hadResult) renameSync(absolute, retired);
    try {
      renameSync(partial, absolute);
    } catch (error) {
      if (hadResult) renameSync(retired, absolute);
      throw error;
    }
    if (hadResult) rmSync(retired, { recursive: true, force: true });
  } catch (error) {
    rmSync(partial, { recursive: true, force: true });
    throw asUsageError(error, target);
  } finally {
    unfinished.delete(partial);
  }
}

const reasons: Readonly<Record<string, string>> = {
  EACCES: 'no permission',
  EPERM: 'no permission',
  EROFS: 'the file system is read-only',
  ENOSPC: 'the disk is full',
  EDQUOT: 'the disk quota is used up',
  ENOTDIR: 'a part of the path is no folder',
  ENAMETOOLONG: 'the path is too long',
};

/** What the file system said, for the user; anything else is handed on as it is. */
function asUsageError(error: unknown, target: string): unknown {
  const { code, message } = error as NodeJS.ErrnoException;
  if (error instanceof UsageError || code === undefined) return error;
  return new UsageError(`the results cannot be written to ${target}: ${reasons[code] ?? message}`);
}

/** Exclusive creation, so that nothing that appeared meanwhile is followed or overwritten. */
function writeDurably(path: string, content: string | Uint8Array): void {
  const descriptor = openSync(path, 'wx', 0o644);
  try {
    const bytes = typeof content === 'string' ? Buffer.from(content, 'utf8') : content;
    for (let offset = 0; offset < bytes.length;) offset += writeSync(descriptor, bytes, offset);
    fsyncSync(descriptor);
  } finally {
    closeSync(descriptor);
  }
}
