/** Whole processes of the built command: `npm run build` first. */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, bench, describe } from 'vitest';

const root = fileURLToPath(new URL('../..', import.meta.url));
const command = join(root, 'dist/cli/main.js');
const demo = join(root, 'cases/salt-cooled-oxidation.yaml');
const folder = mkdtempSync(join(tmpdir(), 'bedwright-bench-'));
afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

function run(...words: string[]): string {
  return execFileSync(process.execPath, [command, ...words], { encoding: 'utf8' });
}

if (!run('--help').includes('run <cases..>')) throw new Error('the help does not look right');

const options = { iterations: 5, time: 0, warmupIterations: 1, warmupTime: 0 };
describe('whole process', () => {
  bench('node alone', () => void execFileSync(process.execPath, ['-e', '0']), options);
  bench('--help', () => void run('--help'), options);
  bench('check', () => void run('check', demo), options);
  bench(
    'run without charts',
    () => void run('run', demo, '--no-charts', '--out', join(folder, 'plain')),
    options,
  );
  bench('run with charts', () => void run('run', demo, '--out', join(folder, 'charts')), options);
});
