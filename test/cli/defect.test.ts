import { mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it, vi } from 'vitest';
import type * as SolveReactor from '../../src/bed/solve-reactor.js';
import type * as InspectReactor from '../../src/bed/inspect-reactor.js';
import { cooledCase, quickCase, run } from './in-process.js';

/** Fails for isothermal beds, as a defect would, and works for others. */
vi.mock('../../src/bed/solve-reactor.js', async (original) => {
  const { solveReactor } = await original<typeof SolveReactor>();
  return {
    solveReactor: (...[specification]: Parameters<typeof solveReactor>) => {
      if (specification.heat.mode === 'isothermal') throw new TypeError('injected \u001b[31mfailure');
      return solveReactor(specification);
    },
  };
});
vi.mock('../../src/bed/inspect-reactor.js', async (original) => {
  const { inspectReactor } = await original<typeof InspectReactor>();
  return {
    inspectReactor: (...[specification]: Parameters<typeof inspectReactor>) => {
      if (specification.heat.mode === 'isothermal') throw new TypeError('injected failure');
      return inspectReactor(specification);
    },
  };
});

const folder = mkdtempSync(join(tmpdir(), 'bedwright-test-'));
afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

describe('a defect', () => {
  const words = ['run', quickCase, '--no-charts', '--out', join(folder, 'r')];

  it('ends in status 1 with one line and a request to report it, no stack, nothing written', async () => {
    const { status, out, error } = await run(...words);
    expect({ status, out }).toEqual({ status: 1, out: '' });
    expect(error).toContain('A defect of bedwright: injected <U+001B>[31mfailure\n');
    expect(error).toContain('with --debug');
    expect(error).not.toMatch(/\n\s+at /);
    expect(error.trimEnd().split('\n')).toHaveLength(2);
    expect(readdirSync(folder)).toEqual([]);
  });

  it('shows its stack with --debug', async () => {
    const { status, error } = await run(...words, '--debug');
    expect(status).toBe(1);
    expect(error).toMatch(/\n\s+at .*defect\.test\.ts/);
    expect(error).not.toContain('\u001b');
  });

  it('does not keep the other cases from being run, and is an entry of --json', async () => {
    const study = join(folder, 'study');
    const { status, out, error } = await run(
      'run',
      quickCase,
      cooledCase,
      '--no-charts',
      '--json',
      '--out',
      study,
    );
    expect(status).toBe(1);
    expect(error).toContain('A defect of bedwright');
    expect(JSON.parse(out)).toMatchObject([{ exit_status: 1, folder: null }, { exit_status: 0 }]);
    expect(readdirSync(study)).toEqual(['salt-cooled-oxidation']);
  });

  it('of check ends in status 1 too', async () => {
    const { status, out, error } = await run('check', quickCase, cooledCase);
    expect(status).toBe(1);
    expect(error).toContain('A defect of bedwright: injected failure\n');
    expect(out).toContain('Taken for granted');
  });
});
