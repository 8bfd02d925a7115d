import {
  existsSync,
  mkdtempSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { commandLine } from '../../src/cli/command-line.js';
import { gravest } from '../../src/cli/exit-status.js';
import { folderNameOf } from '../../src/cli/result-folder.js';

const cases = fileURLToPath(new URL('../../cases/', import.meta.url));
const demo = join(cases, 'salt-cooled-oxidation.yaml');
let folder = '';

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'bedwright-test-'));
});
afterEach(() => {
  rmSync(folder, { recursive: true, force: true });
});

async function run(...words: string[]): Promise<{ status: number; out: string; error: string }> {
  let out = '';
  let error = '';
  const status = await commandLine(words, {
    out: (text) => (out += text),
    error: (text) => (error += text),
    useColour: false,
  });
  return { status, out, error };
}

describe('the command line', () => {
  it('teaches: commands, options, units, exit statuses, the caution', async () => {
    const { status, out } = await run('--help');
    expect(status).toBe(0);
    for (const words of [
      'run <cases..>',
      'check <cases..>',
      'completion',
      '350 degC',
      'Exit status',
      'qualified engineers',
    ]) {
      expect(out).toContain(words);
    }
    expect((await run('run', '--help')).out).toContain('--no-charts');
  });

  it('says its version', async () => {
    const manifest = JSON.parse(readFileSync(new URL('../../package.json', import.meta.url), 'utf8')) as {
      version: string;
    };
    expect((await run('--version')).out.trim()).toBe(manifest.version);
  });

  it.each([
    [[], /Say what to do/],
    [['rum', 'x.yaml'], /Did you mean run\?/],
    [['run'], /Name at least one case file/],
    [['run', 'x.yaml', '--chart'], /Unknown argument: chart/],
    [['run', join(cases, 'no-such.yaml')], /no such file/],
    [['run', cases], /a folder/],
  ])('%j is a fault of the command line: status 2 and a word', async (words, message) => {
    const { status, out, error } = await run(...words);
    expect(status).toBe(2);
    expect(error).toMatch(message);
    expect(out).toBe('');
    expect(error).not.toMatch(/\n\s+at /);
  });

  it('writes a completion script', async () => {
    const { status, out } = await run('completion');
    expect(status).toBe(0);
    expect(out).toContain('bedwright');
  });

  it('ends with the gravest of several statuses', () => {
    expect(gravest([0, 3, 2, 0])).toBe(2);
    expect(gravest([0, 3])).toBe(3);
    expect(gravest([0, 1, 2])).toBe(1);
    expect(gravest([])).toBe(0);
  });
});

describe('run', () => {
  it.each(readdirSync(cases))('%s runs to the end, and its balances close', async (file) => {
    const out = join(folder, 'result');
    const { status, error } = await run('run', join(cases, file), '--out', out, '--no-charts');
    expect(error).toBe('');
    expect(status).toBe(0);
    const summary = JSON.parse(readFileSync(join(out, 'summary.json'), 'utf8')) as {
      balances: { mass: number; elements: Record<string, number>; energy: number };
    };
    const { mass, elements, energy } = summary.balances;
    for (const closure of [mass, energy, ...Object.values(elements)]) expect(closure).toBeLessThan(1e-9);
    expect(Object.keys(elements).length).toBeGreaterThan(0);
  });

  it('writes profile, pellets, summary, charts and the case, and prints a table with the caution last', async () => {
    const out = join(folder, 'result');
    const { status, out: printed } = await run('run', demo, '--out', out);
    expect(status).toBe(0);
    expect(readdirSync(out).sort()).toEqual(
      [
        'case.yaml',
        'conversion.png',
        'effectiveness.png',
        'mole-fractions.png',
        'pellet-interior.png',
        'pellet-temperature.png',
        'pellet.csv',
        'pressure.png',
        'profile.csv',
        'summary.json',
        'temperature.png',
      ].sort(),
    );
    expect(readdirSync(folder)).toEqual(['result']);
    expect(printed).toMatch(/peak temperature +672\.8 K/);
    expect(printed.indexOf('Warnings')).toBeLessThan(printed.indexOf('qualified engineers'));
    expect(printed).not.toMatch(/NaN|undefined/);
    expect(printed).not.toContain('\u001b');
    const csv = readFileSync(join(out, 'profile.csv'), 'utf8');
    expect(csv).toMatch(/^z_m,T_K,P_Pa,coolant_T_K,F_A_mol_s,.*\r\n/);
    expect(csv.trimEnd().split('\r\n')).toHaveLength(102);
    expect(csv).not.toMatch(/NaN|Infinity/);
    expect(readFileSync(join(out, 'summary.json'), 'utf8')).not.toMatch(/NaN|Infinity/);
  });

  it('stops short with status 3, and what was computed is written', async () => {
    const path = join(folder, 'long.yaml');
    writeFileSync(path, readFileSync(demo, 'utf8').replace('length: 3 m', 'length: 60 m'));
    const { status, out } = await run('run', path, '--out', join(folder, 'result'), '--no-charts');
    expect(status).toBe(3);
    expect(out).toMatch(/Stopped at 9\.\d+ m: The pressure is used up/);
    const summary = JSON.parse(readFileSync(join(folder, 'result/summary.json'), 'utf8')) as {
      stop: { reason: string };
    };
    expect(summary.stop.reason).toBe('pressure_used_up');
  });

  it('a case at fault writes nothing, and does not keep the others from running', async () => {
    const bad = join(folder, 'bad.yaml');
    writeFileSync(bad, 'bedwright: 1\n');
    const { status, error } = await run(
      'run',
      bad,
      demo,
      '--out',
      join(folder, 'study'),
      '--no-charts',
      '--quiet',
    );
    expect(status).toBe(2);
    expect(error).toContain('bad.yaml:1:1');
    expect(readdirSync(join(folder, 'study'))).toEqual(['salt-cooled-oxidation']);
  });

  it('--json prints one valid document with problems, places and summaries', async () => {
    const bad = join(folder, 'bad.yaml');
    writeFileSync(bad, readFileSync(demo, 'utf8').replace('diameter: 4 mm', 'diameter: 4'));
    const { out, error } = await run(
      'run',
      bad,
      demo,
      '--json',
      '--no-charts',
      '--out',
      join(folder, 'study'),
    );
    expect(error).toBe('');
    const [first, second] = JSON.parse(out) as [
      { exit_status: number; problems: { code: string; line: number; column: number }[] },
      { exit_status: number; summary: { conversion: { A: number } } },
    ];
    expect(first.exit_status).toBe(2);
    expect(first.problems[0]).toMatchObject({ code: 'missing_unit', line: 47 });
    expect(second.summary.conversion.A).toBeCloseTo(0.857, 3);
  });

  it('shows control characters of a title instead of sending them to the terminal', async () => {
    const path = join(folder, 'title.yaml');
    writeFileSync(path, readFileSync(demo, 'utf8').replace(/title: .*/, 'title: "a\\e[31mred\\u202eb"'));
    const { out } = await run('run', path, '--out', join(folder, 'result'), '--no-charts');
    expect(out).toContain('a<U+001B>[31mred<U+202E>b');
  });

  it('check finds no fault, shows groups and assumptions, and writes nothing', async () => {
    const { status, out } = await run('check', demo);
    expect(status).toBe(0);
    expect(out).toMatch(/Thiele modulus, selective \(A\) +0\.737/);
    expect(out).toContain('Taken for granted');
    expect(readdirSync(folder)).toEqual([]);
  });
});

describe('result folders', () => {
  const write = async (target: string): Promise<{ status: number; error: string }> =>
    run('run', demo, '--out', target, '--no-charts', '--quiet');

  it('an earlier result is replaced, something else never', async () => {
    const target = join(folder, 'result');
    expect((await write(target)).status).toBe(0);
    writeFileSync(join(target, 'old.txt'), 'x');
    expect((await write(target)).status).toBe(0);
    expect(existsSync(join(target, 'old.txt'))).toBe(false);
    const foreign = join(folder, 'foreign');
    mkdirSync(foreign);
    writeFileSync(join(foreign, 'thesis.doc'), 'x');
    const refused = await write(foreign);
    expect(refused.status).toBe(2);
    expect(refused.error).toMatch(/holds something else/);
    expect(readdirSync(foreign)).toEqual(['thesis.doc']);
  });

  it('a file, a link and a path below a file are refused, and nothing is left behind', async () => {
    const file = join(folder, 'file');
    writeFileSync(file, 'x');
    symlinkSync(folder, join(folder, 'link'));
    symlinkSync(join(folder, 'nowhere'), join(folder, 'dangling'));
    for (const target of [file, join(folder, 'link'), join(folder, 'dangling'), join(file, 'below')]) {
      const { status, error } = await write(target);
      expect(status).toBe(2);
      expect(error).not.toMatch(/\n\s+at /);
    }
    expect(readFileSync(file, 'utf8')).toBe('x');
    expect(readdirSync(folder).sort()).toEqual(['dangling', 'file', 'link']);
  });

  it.each([
    ['tube.yaml', 'tube'],
    ['../../etc/passwd', 'passwd'],
    ['..', 'case'],
    ['.hidden.yaml', 'hidden'],
    ['a b;rm -rf.yml', 'a_b_rm_-rf'],
    ['röhre.yaml', 'r_hre'],
    [`${'x'.repeat(300)}.yaml`, 'x'.repeat(100)],
  ])('the folder of %s is named %s', (file, name) => {
    expect(folderNameOf(file)).toBe(name);
  });

  it('two cases of one name are refused before anything runs', async () => {
    const { status, error } = await run('run', demo, demo, '--out', folder);
    expect(status).toBe(2);
    expect(error).toMatch(/two cases would write to/);
    expect(readdirSync(folder)).toEqual([]);
  });
});
