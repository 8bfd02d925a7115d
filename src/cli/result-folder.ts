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
  // Without a slash at the end, behind which a symbolic link would pass for its folder.
  const absolute = resolve(target);
  const status = refusedAs(target, () => lstatSync(absolute, { throwIfNoEntry: false }));
  if (!status) return;
  if (status.isSymbolicLink()) throw new UsageError(`${target} is a symbolic link; name the folder itself`);
  if (!status.isDirectory()) throw new UsageError(`${target} is there already and is no folder`);
  const names = refusedAs(target, () => readdirSync(absolute));
  if (names.length === 0) return;
  const own = filesOfResult(absolute);
  if (own === undefined) {
    throw new UsageError(
      `${target} holds something else than a result of this tool; choose another folder with --out`,
    );
  }
  const foreign = names.find((name) => !own.includes(name));
  if (foreign !== undefined) {
    throw new UsageError(
      `${target} holds ${foreign} beside an earlier result; move it away, or choose another folder with --out`,
    );
  }
}

function refusedAs<Value>(target: string, look: () => Value): Value {
  try {
    return look();
  } catch (error) {
    throw asUsageError(error, target);
  }
}

/** Names of the files of an earlier result; undefined where a folder holds none. */
function filesOfResult(folder: string): readonly unknown[] | undefined {
  try {
    const { provenance } = JSON.parse(readFileSync(join(folder, markerFile), 'utf8')) as {
      provenance?: { tool?: unknown; files?: unknown };
    };
    const files: unknown = provenance?.files;
    return provenance?.tool === 'bedwright' && Array.isArray(files) ? files : undefined;
  } catch {
    return undefined;
  }
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
  const partial = join(parent, `.bedwright-${tag}.partial`);
  const retired = join(parent, `.bedwright-${tag}.old`);
  try {
    checkTarget(absolute);
    mkdirSync(parent, { recursive: true });
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
    if (hadResult) removeRetired(retired, target);
  } catch (error) {
    rmSync(partial, { recursive: true, force: true });
    throw asUsageError(error, target);
  }
}

function removeRetired(retired: string, target: string): void {
  try {
    rmSync(retired, { recursive: true, force: true });
  } catch (error) {
    const { message } = error as Error;
    throw new UsageError(`the results are in ${target}, but the earlier ones stay in ${retired}: ${message}`);
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
  const { code, errno, message } = error as NodeJS.ErrnoException;
  if (code === undefined || errno === undefined) return error;
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
