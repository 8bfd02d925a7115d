/** The built command as a process of its own. */
import { execFileSync, spawn, spawnSync } from 'node:child_process';
import { once } from 'node:events';
import {
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  truncateSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { cooledCase, quickCase, version } from './in-process.js';

const root = fileURLToPath(new URL('../../', import.meta.url));
const built = join(root, 'dist/cli/main.js');

/** Latest change of any file of a folder, ms. */
function latestChange(path: string): number {
  const files = readdirSync(path, { recursive: true, withFileTypes: true }).filter((entry) => entry.isFile());
  return Math.max(...files.map((entry) => statSync(join(entry.parentPath, entry.name)).mtimeMs));
}

beforeAll(() => {
  const isFresh =
    statSync(built, { throwIfNoEntry: false }) !== undefined &&
    statSync(built).mtimeMs >
      Math.max(latestChange(join(root, 'src')), statSync(join(root, 'package.json')).mtimeMs);
  if (!isFresh) execFileSync(process.execPath, [join(root, 'scripts/build.js')], { stdio: 'inherit' });
}, 120_000);

let folder = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'bedwright-test-'));
});
afterEach(() => {
  rmSync(folder, { recursive: true, force: true });
});

interface Ended {
  readonly status: number | null;
  readonly signal: NodeJS.Signals | null;
  readonly stdout: string;
  readonly stderr: string;
}
function command(...words: string[]): Ended {
  return spawnSync(process.execPath, [built, ...words], { encoding: 'utf8', cwd: folder, timeout: 20_000 });
}
/** The same through a shell, which knows the command as `B` and the case as `$CASE`. */
function shell(script: string, env: Readonly<Record<string, string>> = {}): Ended {
  return spawnSync(
    'bash',
    ['-c', `set -o pipefail; B() { "${process.execPath}" "${built}" "$@"; }; ${script}`],
    {
      encoding: 'utf8',
      cwd: folder,
      timeout: 20_000,
      env: { ...process.env, CASE: quickCase, ...env },
    },
  );
}

describe('the built command', () => {
  it('can be executed as it stands, and says its version', () => {
    expect(statSync(built).mode & 0o111).toBe(0o111);
    expect(readFileSync(built, 'utf8')).toMatch(/^#!\/usr\/bin\/env node\n/);
    expect(command('--version')).toMatchObject({ status: 0, stdout: `${version}\n`, stderr: '' });
  });

  it('ends with 0 when done: plain text, no colour, results in out/', () => {
    const { status, stdout, stderr } = command('run', quickCase);
    expect({ status, stderr }).toEqual({ status: 0, stderr: '' });
    expect(stdout).not.toContain('\u001b');
    expect(stdout).toContain('Results are in out/first-order-closed-form');
    expect(readdirSync(join(folder, 'out/first-order-closed-form'))).toContain('conversion.png');
  });

  it('ends with 2 for faults, each with its line and column, and writes nothing', () => {
    const text = readFileSync(quickCase, 'utf8');
    /** Line and column, both from 1, of the end of some text in the case. */
    const endOf = (part: string): string => {
      const before = text.slice(0, text.indexOf(part) + part.length).split('\n');
      return `${before.length}:${before.at(-1)!.length + 1}`;
    };
    const faulty = text
      .replace('temperature: 500 K', 'temperature: 500')
      .replace('diameter: 3 mm', 'diameter: 3 s')
      .replace('void_fraction: 40 %', 'void_fraction: 400 %');
    writeFileSync(join(folder, 'bad.yaml'), faulty);
    const { status, stdout, stderr } = command('run', 'bad.yaml');
    expect({ status, stdout }).toEqual({ status: 2, stdout: '' });
    expect(stderr).toContain(`bad.yaml:${endOf('feed:\n  temperature: ')}  feed.temperature\n`);
    // It is the unit that is wrong, hence the place of the unit.
    expect(stderr).toContain(`bad.yaml:${endOf('diameter: 3 ')}  pellet.shape.sphere.diameter\n`);
    expect(stderr).toContain(`bad.yaml:${endOf('void_fraction: ')}  bed.void_fraction\n`);
    expect(stderr.match(/^bad\.yaml:\d+:\d+/gm)).toHaveLength(3);
    expect(readdirSync(folder)).toEqual(['bad.yaml']);
  });

  it('ends with 3 for a run that stopped short, and writes what it has', () => {
    const long = readFileSync(cooledCase, 'utf8').replace('length: 3 m', 'length: 60 m');
    writeFileSync(join(folder, 'long.yaml'), long);
    const { status, stdout } = command('run', 'long.yaml', '--no-charts');
    expect(status).toBe(3);
    expect(stdout).toContain('The pressure is used up');
    expect(readdirSync(join(folder, 'out/long'))).toContain('summary.json');
  });

  it('ends with 2 without a command', () => {
    expect(command()).toMatchObject({ status: 2, stdout: '' });
  });

  it('ends quietly when its reader stops reading, and still writes the results of all cases', () => {
    const { status, stdout, stderr } = shell(
      'cp "$CASE" a.yaml; cp "$CASE" b.yaml; B run a.yaml b.yaml --no-charts | head -1; exit ${PIPESTATUS[0]}',
    );
    expect({ status, stderr }).toEqual({ status: 0, stderr: '' });
    expect(stdout.split('\n')).toHaveLength(2);
    expect(readdirSync(join(folder, 'out')).sort()).toEqual(['a', 'b']);
    const closed = shell('B check "$CASE" "$CASE" | true; exit ${PIPESTATUS[0]}');
    expect(closed).toMatchObject({ status: 0, stderr: '' });
  });

  it.runIf(process.platform === 'linux')('says in one line that its output cannot be written', () => {
    const { status, stderr } = shell('B --help > /dev/full');
    expect(status).toBe(2);
    expect(stderr).toMatch(/^The output cannot be printed: .*no space left.*\n$/);
  });

  it('colours a terminal, but not with NO_COLOR, and never a file', () => {
    const words = 'run "$CASE" --no-charts --out r';
    // A terminal of its own, as `script` gives one; where that is not installed there is nothing to try.
    const onTerminal = `script -qec '"${process.execPath}" "${built}" ${words.replace('"$CASE"', `"${quickCase}"`)}' /dev/null`;
    if (shell('command -v script').status === 0) {
      expect(shell(onTerminal, { NO_COLOR: '', TERM: 'xterm' }).stdout).toContain('\u001b[1m');
      expect(shell(onTerminal, { NO_COLOR: '1', TERM: 'xterm' }).stdout).not.toContain('\u001b[1m');
    }
    expect(shell(`B ${words}`, { FORCE_COLOR: '1', CI: '1' }).stdout).not.toContain('\u001b');
  });

  it('refuses a case of 50 MB by its size, at once', () => {
    const path = join(folder, 'large.yaml');
    writeFileSync(path, 'bedwright: 1\n');
    truncateSync(path, 50_000_000);
    const begin = performance.now();
    const { status, stderr } = command('check', 'large.yaml');
    expect(performance.now() - begin).toBeLessThan(2000);
    expect(status).toBe(2);
    expect(stderr).toContain('found a file of 50.0 MB; expected a case of at most 2 MB');
  });
});

describe('told to stop in the middle of a run', () => {
  /** Computes for many seconds: many rows, a tolerance far below what is needed. */
  const slow = `${readFileSync(cooledCase, 'utf8').replace('output:\n', 'output:\n  points: 5000\n')}\nnumerics: { tolerance: 1e-10 }\n`;

  it.each(['SIGTERM', 'SIGINT'] as const)(
    '%s ends it at once; nothing is left, an earlier result stays',
    async (signal) => {
      writeFileSync(join(folder, 'slow.yaml'), slow);
      expect(command('run', quickCase, '--out', 'r', '--no-charts').status).toBe(0);
      const before = readFileSync(join(folder, 'r/summary.json'), 'utf8');
      const child = spawn(process.execPath, [built, 'run', 'slow.yaml', '--out', 'r', '--no-charts'], {
        cwd: folder,
      });
      const ended = once(child, 'exit');
      await delay(800);
      expect(child.exitCode).toBe(null);
      const begin = performance.now();
      child.kill(signal);
      expect(await ended).toEqual([null, signal]);
      expect(performance.now() - begin).toBeLessThan(1000);
      expect(readdirSync(folder).sort()).toEqual(['r', 'slow.yaml']);
      expect(readFileSync(join(folder, 'r/summary.json'), 'utf8')).toBe(before);
    },
  );
});
