import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { gravest } from '../../src/cli/exit-status.js';
import { casesFolder, cooledCase, quickCase, run, runOn, version } from './in-process.js';

let folder = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'bedwright-test-'));
});
afterEach(() => {
  rmSync(folder, { recursive: true, force: true });
});

/** A case of the given text in the folder of the test. */
function write(name: string, text: string): string {
  const path = join(folder, name);
  writeFileSync(path, text);
  return path;
}
const quick = readFileSync(quickCase, 'utf8');

describe('help and version', () => {
  it('teach: commands, units, where results go, exit statuses, the caution', async () => {
    for (const words of [['--help'], ['-h']]) {
      const { status, out, error } = await run(...words);
      expect({ status, error }).toEqual({ status: 0, error: '' });
      for (const part of [
        'run <cases..>',
        'check <cases..>',
        'completion',
        '350 degC',
        'out/NAME',
        '--out',
        '0 done; 2 the case or the command line is at fault',
        '3 the run\nstopped short',
        '1 anything else',
        'qualified engineers',
      ]) {
        expect(out).toContain(part);
      }
      for (const line of out.split('\n')) expect(line.length).toBeLessThanOrEqual(100);
    }
  });

  it('of a command list its options with examples', async () => {
    const { status, out } = await run('run', '--help');
    expect(status).toBe(0);
    for (const part of ['--out', '--no-charts', '--quiet', '--json', '--debug', 'Examples:', 'study/a']) {
      expect(out).toContain(part);
    }
    expect((await run('check', '--help')).out).not.toContain('--out');
  });

  it('speak English whatever the language of the terminal', async () => {
    const before = process.env['LC_ALL'];
    process.env['LC_ALL'] = 'de_DE.UTF-8';
    try {
      expect((await run('--help')).out).toContain('Commands:');
      expect((await run('run')).error).toContain('Name at least one case file.');
    } finally {
      if (before === undefined) delete process.env['LC_ALL'];
      else process.env['LC_ALL'] = before;
    }
  });

  it('the version is that of the package', async () => {
    expect(await run('--version')).toEqual({ status: 0, out: `${version}\n`, error: '' });
  });

  it('completion prints a script', async () => {
    const { status, out } = await run('completion');
    expect(status).toBe(0);
    expect(out).toContain('bedwright');
    expect(out).toContain('--get-yargs-completions');
  });
});

describe('a command line at fault: status 2, one word to the error stream, nothing done', () => {
  it.each<[string[], string]>([
    [[], 'Say what to do: `bedwright run CASE`'],
    [['rum', 'x.yaml'], 'Unknown command: rum; did you mean `run`?'],
    [['chek', 'x.yaml'], 'Unknown command: chek; did you mean `check`?'],
    [['simulate'], 'Unknown command: simulate\n'],
    [['run'], 'Name at least one case file.'],
    [['check'], 'Name at least one case file.'],
    [['run', 'CASE', '--chart'], 'Unknown argument: --chart; did you mean `--charts`?'],
    [
      ['run', 'CASE', '--jsn', '--debugg'],
      'Unknown argument: --jsn; did you mean `--json`?\nUnknown argument: --debugg;',
    ],
    [['run', 'CASE', '--out-dir', 'x'], 'Unknown argument: --out-dir\n'],
    [['check', 'CASE', '--no-charts'], 'Unknown argument: --charts\n'],
    [['run', 'CASE', '-q'], 'Unknown argument: -q\n'],
    [['run', 'CASE', '--out'], 'Not enough arguments following: out'],
    [['run', 'CASE', '--out='], '--out names no folder.'],
    [['run', 'CASE', '--out', 'a', '--out', 'b'], 'Give --out once.'],
    [['run', 'CASE', '--\u001b[31mred'], 'Unknown argument: --<U+001B>[31mred'],
  ])('%j', async (words, message) => {
    const before = process.cwd();
    process.chdir(folder);
    try {
      const { status, out, error } = await run(...words.map((word) => (word === 'CASE' ? quickCase : word)));
      expect(status).toBe(2);
      expect(error).toContain(message);
      expect(error).toContain('bedwright --help');
      expect(error).not.toMatch(/\n\s+at /);
      expect(out).toBe('');
      expect(readdirSync('.')).toEqual([]);
    } finally {
      process.chdir(before);
    }
  });

  it('words behind `--` are case files, even with a dash in front', async () => {
    const { status, error } = await run('check', '--quiet', '--', '--odd.yaml');
    expect(status).toBe(2);
    expect(error).toContain('--odd.yaml\n  found no such file');
    expect((await run('check', '--quiet', '--', quickCase)).status).toBe(0);
  });
});

describe('case files that cannot be read', () => {
  it.each<[string, (path: string) => void, RegExp]>([
    ['missing', () => undefined, /found no such file; expected the path of a case file/],
    ['a folder', (path) => mkdirSync(path), /found a folder; expected a case file/],
    [
      'below a file',
      (path) => {
        writeFileSync(join(path, '..', 'file'), '');
      },
      /no such file/,
    ],
    [
      'empty',
      (path) => {
        writeFileSync(path, '');
      },
      /found/,
    ],
    [
      'binary',
      (path) => {
        writeFileSync(path, Uint8Array.of(0x62, 0xff, 0xfe));
      },
      /no UTF-8 text/,
    ],
    [
      'too large',
      (path) => {
        writeFileSync(path, '#'.repeat(2_000_001));
      },
      /a file of 2\.0 MB; expected a case of at most 2 MB/,
    ],
  ])('%s: status 2 and what was found', async (_name, make, message) => {
    const path = join(folder, 'x.yaml');
    make(path);
    for (const command of ['check', 'run']) {
      const { status, out, error } = await run(
        command,
        path,
        ...(command === 'run' ? ['--out', join(folder, 'r')] : []),
      );
      expect(status).toBe(2);
      expect(out).toBe('');
      expect(error).toMatch(message);
    }
    expect(readdirSync(folder)).not.toContain('r');
  });

  it('a device is refused without reading it', async () => {
    const { status, error } = await run('check', '/dev/zero');
    expect(status).toBe(2);
    expect(error).toContain('no plain file');
  });

  it('shows control characters of a file name instead of sending them', async () => {
    const { error } = await run('check', join(folder, 'a\u001b[2Jb.yaml'));
    expect(error).toContain('a<U+001B>[2Jb.yaml');
    const refused = await run('run', quickCase, '--out', `${quickCase}/\u001b[2J`);
    expect(refused.status).toBe(2);
    expect(refused.error).toContain('<U+001B>[2J');
    expect(refused.error).not.toContain('\u001b');
  });
});

describe('several cases', () => {
  it('are each done; the gravest status counts: 1, then 2, then 3', async () => {
    expect(gravest([0, 3, 2, 0])).toBe(2);
    expect(gravest([0, 3])).toBe(3);
    expect(gravest([0, 1, 2])).toBe(1);
    expect(gravest([])).toBe(0);
    const bad = write('bad.yaml', 'bedwright: 1\n');
    const study = join(folder, 'study');
    const { status, error } = await run(
      'run',
      bad,
      join(folder, 'none.yaml'),
      quickCase,
      '--out',
      study,
      '--no-charts',
      '--quiet',
    );
    expect(status).toBe(2);
    expect(error).toContain('bad.yaml:1:1');
    expect(error).toContain('no such file');
    expect(readdirSync(study)).toEqual(['first-order-closed-form']);
  });

  it('of one folder name are refused before anything runs', async () => {
    mkdirSync(join(folder, 'sub'));
    const one = write('tube.yaml', quick);
    const other = write('sub/tube.yml', quick);
    const { status, error } = await run('run', one, other, '--out', join(folder, 'study'));
    expect(status).toBe(2);
    expect(error).toMatch(/two cases would write to .*study\/tube/);
    expect(readdirSync(folder).sort()).toEqual(['sub', 'tube.yaml']);
  });
});

describe('what is printed', () => {
  it('--quiet: nothing where all is well, faults where not', async () => {
    const out = join(folder, 'r');
    const words = ['--out', out, '--no-charts', '--quiet'];
    expect(await run('run', quickCase, ...words)).toEqual({ status: 0, out: '', error: '' });
    expect(await run('check', quickCase, '--quiet')).toEqual({ status: 0, out: '', error: '' });
    const bad = write('bad.yaml', quick.replace('diameter: 3 mm', 'diameter: 3'));
    const { status, error } = await run('check', bad, '--quiet');
    expect(status).toBe(2);
    expect(error).toContain('pellet.shape.sphere.diameter');
  });

  it('a stopped run says where and why, with --quiet too, and writes what it has', async () => {
    const path = write('long.yaml', readFileSync(cooledCase, 'utf8').replace('length: 3 m', 'length: 60 m'));
    const out = join(folder, 'r');
    const { status, out: printed } = await run('run', path, '--out', out, '--no-charts');
    expect(status).toBe(3);
    expect(printed).toMatch(/Stopped at 9\.\d+ m: The pressure is used up/);
    const quietly = await run('run', path, '--out', out, '--no-charts', '--quiet');
    expect(quietly).toMatchObject({ status: 3, out: '' });
    expect(quietly.error).toMatch(/long\.yaml: stopped at 9\.\d+ m: The pressure is used up/);
    expect(readdirSync(out).sort()).toEqual(['case.yaml', 'pellet.csv', 'profile.csv', 'summary.json']);
    const summary = JSON.parse(readFileSync(join(out, 'summary.json'), 'utf8')) as Record<string, unknown>;
    expect(summary).toMatchObject({ status: 'stopped', stop: { reason: 'pressure_used_up' } });
  });

  it('control characters and marks of direction of a title are shown, not sent', async () => {
    const path = write('title.yaml', quick.replace(/title: .*/, 'title: "a\\e[31mred\\u202eb"'));
    const out = ['--out', join(folder, 'r'), '--no-charts'];
    for (const words of [
      ['check', path],
      ['run', path, ...out],
    ]) {
      expect((await run(...words)).out).toContain('a<U+001B>[31mred<U+202E>b');
      expect((await run(...words)).out).not.toContain('\u001b');
    }
  });

  it('is coloured when asked, plain otherwise, and otherwise alike', async () => {
    const words = ['run', quickCase, '--no-charts', '--out', join(folder, 'r')];
    const plain = await run(...words);
    const coloured = await runOn(true, ...words);
    expect(plain.out).not.toContain('\u001b');
    expect(coloured.out).toContain('\u001b[1m');
    // eslint-disable-next-line no-control-regex -- escapes are what is removed
    expect(coloured.out.replace(/\u001b\[\d+m/g, '')).toBe(plain.out);
  });

  it('check shows groups and assumptions, and writes nothing', async () => {
    const before = process.cwd();
    process.chdir(folder);
    try {
      const { status, out, error } = await run('check', quickCase, cooledCase);
      expect({ status, error }).toEqual({ status: 0, error: '' });
      // Phi = 1 by the case's own comment: (3 mm / 6) sqrt(2 / 5e-7).
      expect(out).toMatch(/Thiele modulus, isomerisation \(A\) +1\n/);
      expect(out.match(/no faults found/g)).toHaveLength(2);
      expect(out.match(/Taken for granted/g)).toHaveLength(2);
      expect(out).not.toMatch(/NaN|undefined|Infinity/);
      expect(readdirSync('.')).toEqual([]);
    } finally {
      process.chdir(before);
    }
  });
});

describe('--json', () => {
  it('run: one document; an entry a case with status, folder, problems with places, summary', async () => {
    const bad = write('bad.yaml', quick.replace('diameter: 3 mm', 'diameter: 3'));
    const study = join(folder, 'study');
    const { status, out, error } = await run('run', bad, quickCase, '--json', '--no-charts', '--out', study);
    expect({ status, error }).toEqual({ status: 2, error: '' });
    expect(out).not.toMatch(/NaN|Infinity/);
    const [first, second] = JSON.parse(out) as [Record<string, unknown>, Record<string, unknown>];
    for (const entry of [first, second]) {
      expect(Object.keys(entry).sort()).toEqual(['case', 'exit_status', 'folder', 'problems', 'summary']);
    }
    const line = quick.split('\n').findIndex((text) => text.includes('diameter: 3 mm')) + 1;
    expect(first).toMatchObject({ case: bad, exit_status: 2, folder: null, summary: null });
    expect(first['problems']).toEqual([
      {
        code: 'missing_unit',
        severity: 'error',
        file: bad,
        line,
        column: '  shape: { sphere: { diameter: '.length + 1,
        path: 'pellet.shape.sphere.diameter',
        found: expect.any(String) as string,
        expected: expect.any(String) as string,
        mend: expect.any(String) as string,
      },
    ]);
    const target = join(study, 'first-order-closed-form');
    expect(second).toMatchObject({ exit_status: 0, folder: target, problems: [] });
    expect(second['summary']).toEqual(JSON.parse(readFileSync(join(target, 'summary.json'), 'utf8')));
  });

  it('check: problems, groups, assumptions', async () => {
    const { status, out, error } = await run('check', quickCase, '--json', '--quiet');
    expect({ status, error }).toEqual({ status: 0, error: '' });
    const [entry] = JSON.parse(out) as [Record<string, Record<string, unknown>[]>];
    expect(Object.keys(entry).sort()).toEqual(['assumptions', 'case', 'exit_status', 'groups', 'problems']);
    for (const group of entry['groups']!) {
      expect(Object.keys(group).sort()).toEqual(['definition', 'name', 'of', 'source', 'unit', 'value']);
    }
    for (const assumption of entry['assumptions']!) {
      expect(Object.keys(assumption).sort()).toEqual(['about', 'source', 'statement']);
    }
    expect(entry['groups']!.length).toBeGreaterThan(3);
  });

  it('a folder that may not be written is an entry with a message', async () => {
    const { status, out, error } = await run('run', quickCase, '--json', '--out', casesFolder);
    expect({ status, error }).toEqual({ status: 2, error: '' });
    expect(JSON.parse(out)).toMatchObject([
      { exit_status: 2, folder: null, message: expect.stringMatching(/something else/) as string },
    ]);
  });
});
