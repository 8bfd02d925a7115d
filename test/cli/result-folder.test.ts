import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import type * as FileSystem from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import {
  checkTarget,
  folderNameOf,
  writeResultFolder,
  type ResultFile,
} from '../../src/cli/result-folder.js';
import { uninterrupted } from '../../src/cli/uninterrupted.js';
import { quickCase, run } from './in-process.js';

/** What the file system is to refuse: the n-th call (from 1) of a function, with an error code. It writes a megabyte at a time at most. */
const failure = vi.hoisted(() => ({ of: '', call: 0, code: '', calls: 0 }));
vi.mock('node:fs', async (original) => {
  const real = await original<typeof FileSystem>();
  const refusing =
    <Arguments extends unknown[], Value>(name: string, call: (...words: Arguments) => Value) =>
    (...words: Arguments): Value => {
      if (failure.of === name && ++failure.calls === failure.call) {
        throw Object.assign(new Error(`${failure.code}: ${name}`), { code: failure.code, errno: -1 });
      }
      return call(...words);
    };
  return {
    ...real,
    writeSync: refusing('writeSync', (file: number, bytes: Uint8Array, offset: number) =>
      real.writeSync(file, bytes, offset, Math.min(bytes.length - offset, 1_000_000)),
    ),
    fsyncSync: refusing('fsyncSync', real.fsyncSync),
    renameSync: refusing('renameSync', real.renameSync),
    mkdirSync: refusing('mkdirSync', real.mkdirSync),
    readdirSync: refusing('readdirSync', (path: string) => real.readdirSync(path)),
  };
});
function refuse(of: string, call: number, code: string): void {
  Object.assign(failure, { of, call, code, calls: 0 });
}

let folder = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'bedwright-test-'));
});
afterEach(() => {
  refuse('', 0, '');
  rmSync(folder, { recursive: true, force: true });
});

/** The least that is recognised as a result. */
function resultFiles(profile: string): ResultFile[] {
  const provenance = { tool: 'bedwright', files: ['profile.csv', 'summary.json'] };
  return [
    { name: 'profile.csv', content: profile },
    { name: 'summary.json', content: JSON.stringify({ provenance }) },
  ];
}

describe('the target', () => {
  const refusal = (target: string): string => {
    try {
      checkTarget(target);
    } catch (error) {
      return (error as Error).message;
    }
    return '';
  };

  it('may be missing, in missing folders, or empty', () => {
    mkdirSync(join(folder, 'empty'));
    for (const target of ['empty', 'missing', 'missing/below'])
      expect(refusal(join(folder, target))).toBe('');
    writeResultFolder(join(folder, 'missing/below'), resultFiles('x'));
    writeResultFolder(join(folder, 'empty'), resultFiles('x'));
    expect(readdirSync(join(folder, 'missing'))).toEqual(['below']);
    expect(readdirSync(join(folder, 'empty')).sort()).toEqual(['profile.csv', 'summary.json']);
  });

  it('may not be a file, a device, a symbolic link, below a file, or a folder that holds something else', () => {
    writeFileSync(join(folder, 'file'), 'x');
    mkdirSync(join(folder, 'real'));
    symlinkSync(join(folder, 'real'), join(folder, 'link'));
    symlinkSync(join(folder, 'nowhere'), join(folder, 'dangling'));
    mkdirSync(join(folder, 'foreign'));
    writeFileSync(join(folder, 'foreign/summary.json'), '{"provenance":{"tool":"another"}}');
    mkdirSync(join(folder, 'broken'));
    writeFileSync(join(folder, 'broken/summary.json'), '{');
    expect(refusal(join(folder, 'file'))).toContain('is there already and is no folder');
    expect(refusal('/dev/null')).toContain('is there already and is no folder');
    expect(refusal(join(folder, 'link'))).toContain('is a symbolic link');
    expect(refusal(join(folder, 'link/'))).toContain('is a symbolic link');
    expect(refusal(join(folder, 'dangling'))).toContain('is a symbolic link');
    expect(refusal(join(folder, 'file/below'))).toContain('a part of the path is no folder');
    expect(refusal(join(folder, 'foreign'))).toContain('something else than a result of this tool');
    expect(refusal(join(folder, 'broken'))).toContain('something else than a result of this tool');
    expect(refusal(folder)).toContain('something else than a result of this tool');
    refuse('readdirSync', 1, 'EACCES');
    expect(refusal(join(folder, 'foreign'))).toContain('no permission');
    // A system error of a defect, not of the file system, stays what it is.
    expect(() => checkTarget(3 as unknown as string)).toThrow(TypeError);
  });

  it('is refused by the command before anything is computed, and left as it was', async () => {
    writeFileSync(join(folder, 'file'), 'x');
    symlinkSync(folder, join(folder, 'link'));
    symlinkSync(join(folder, 'nowhere'), join(folder, 'dangling'));
    for (const name of ['file', 'link', 'dangling', 'file/below']) {
      const words = ['--out', join(folder, name), '--no-charts', '--quiet'];
      const { status, out, error } = await run('run', quickCase, ...words);
      expect({ status, out }).toEqual({ status: 2, out: '' });
      expect(error.trimEnd().split('\n')).toHaveLength(1);
    }
    expect(readFileSync(join(folder, 'file'), 'utf8')).toBe('x');
    expect(readdirSync(folder).sort()).toEqual(['dangling', 'file', 'link']);
  });

  it('an earlier result is replaced; files that someone put beside it are not lost', async () => {
    const target = join(folder, 'result');
    const words = ['run', quickCase, '--out', target, '--no-charts', '--quiet'];
    expect(await run(...words)).toEqual({ status: 0, out: '', error: '' });
    writeFileSync(join(target, 'profile.csv'), 'old');
    expect(await run(...words)).toEqual({ status: 0, out: '', error: '' });
    expect(readFileSync(join(target, 'profile.csv'), 'utf8')).toMatch(/^z_m,/);
    writeFileSync(join(target, 'thesis.doc'), 'x');
    const { status, error } = await run(...words);
    expect(status).toBe(2);
    expect(error).toContain('holds thesis.doc beside an earlier result');
    expect(readFileSync(join(target, 'thesis.doc'), 'utf8')).toBe('x');
    expect(readdirSync(folder)).toEqual(['result']);
  });
});

describe('written whole or not at all', () => {
  it.each([
    ['writeSync', 1, 'ENOSPC', 'the disk is full'],
    ['writeSync', 2, 'EDQUOT', 'the disk quota is used up'],
    ['fsyncSync', 2, 'EIO', 'EIO'],
    ['mkdirSync', 1, 'EACCES', 'no permission'],
    ['mkdirSync', 2, 'EROFS', 'the file system is read-only'],
    ['renameSync', 1, 'EPERM', 'no permission'],
    ['renameSync', 2, 'EIO', 'EIO'],
  ])(
    '%s refused at call %d with %s: the earlier result stays, nothing else is left',
    (of, call, code, reason) => {
      const target = join(folder, 'result');
      writeResultFolder(target, resultFiles('earlier'));
      refuse(of, call, code);
      expect(() => writeResultFolder(target, resultFiles('later'))).toThrow(reason);
      expect(failure.calls).toBeGreaterThanOrEqual(call);
      refuse('', 0, '');
      expect(readdirSync(folder)).toEqual(['result']);
      expect(readFileSync(join(target, 'profile.csv'), 'utf8')).toBe('earlier');
    },
  );

  it('a full disk ends the command with status 2 and no folder', async () => {
    refuse('writeSync', 2, 'ENOSPC');
    const target = join(folder, 'result');
    const { status, out, error } = await run('run', quickCase, '--out', target, '--no-charts');
    expect({ status, out }).toEqual({ status: 2, out: '' });
    expect(error).toBe(`${quickCase}: the results cannot be written to ${target}: the disk is full\n`);
    expect(readdirSync(folder)).toEqual([]);
  });

  it('bytes that the system takes in pieces all arrive', () => {
    const target = join(folder, 'result');
    const content = Uint8Array.from({ length: 3_000_000 }, (_, i) => i % 251);
    writeResultFolder(target, [{ name: 'large.bin', content }]);
    expect(readFileSync(join(target, 'large.bin')).equals(content)).toBe(true);
  });

  it('a path that is too long is said to be so', () => {
    expect(() => writeResultFolder(join(folder, 'x'.repeat(300)), resultFiles(''))).toThrow(
      'the path is too long',
    );
    const longest = join(folder, 'x'.repeat(255));
    writeResultFolder(longest, resultFiles(''));
    expect(existsSync(join(longest, 'summary.json'))).toBe(true);
  });

  it('a signal that arrives meanwhile takes effect when the work is done', async () => {
    const before = process.listenerCount('SIGTERM');
    let isDone = false;
    const kill = vi.spyOn(process, 'kill');
    try {
      await uninterrupted(() => {
        process.kill(process.pid, 'SIGTERM');
        kill.mockImplementation(() => true);
        isDone = true;
      });
      expect(isDone).toBe(true);
      expect(kill.mock.calls).toEqual([
        [process.pid, 'SIGTERM'],
        [process.pid, 'SIGTERM'],
      ]);
      expect(process.listenerCount('SIGTERM')).toBe(before);
    } finally {
      kill.mockRestore();
    }
  });
});

describe('the folder of a case', () => {
  it.each([
    ['tube.yaml', 'tube'],
    ['cases/tube.v2.yaml', 'tube.v2'],
    ['../../etc/passwd', 'passwd'],
    ['a/../../b.yaml', 'b'],
    ['..', 'case'],
    ['...yaml', 'case'],
    ['.hidden.yaml', 'hidden'],
    ['-rf.yaml', 'rf'],
    ['a b;rm -rf.yml', 'a_b_rm_-rf'],
    ['a\\..\\b.yaml', 'a_.._b'],
    ['tube\u0000\u001b[2J.yaml', 'tube_2J'],
    ['röhre.yaml', 'r_hre'],
    ['反応器.yaml', 'case'],
    ['\u202egnp.yaml', 'gnp'],
    [`${'x'.repeat(300)}.yaml`, 'x'.repeat(100)],
  ])('%j is named %s', (file, name) => {
    expect(folderNameOf(file)).toBe(name);
  });

  it('lies in out/ of the working folder, whatever the path of the case', async () => {
    mkdirSync(join(folder, 'work/deep'), { recursive: true });
    writeFileSync(join(folder, '.odd name.yaml'), readFileSync(quickCase));
    const before = process.cwd();
    process.chdir(join(folder, 'work/deep'));
    try {
      const { status, out } = await run('run', '../deep/../../.odd name.yaml', '--no-charts');
      expect(status).toBe(0);
      expect(out).toContain('Results are in out/odd_name\n');
      expect(readdirSync('.')).toEqual(['out']);
      expect(readdirSync('out')).toEqual(['odd_name']);
    } finally {
      process.chdir(before);
    }
  });
});
