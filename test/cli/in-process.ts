import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { commandLine } from '../../src/cli/command-line.js';

export const casesFolder: string = fileURLToPath(new URL('../../cases/', import.meta.url));
/** The quickest of the cases: isothermal, first order. */
export const quickCase: string = join(casesFolder, 'first-order-closed-form.yaml');
export const cooledCase: string = join(casesFolder, 'salt-cooled-oxidation.yaml');
export const version: string = (
  JSON.parse(readFileSync(new URL('../../package.json', import.meta.url), 'utf8')) as { version: string }
).version;

export interface Outcome {
  readonly status: number;
  readonly out: string;
  readonly error: string;
}

/** One command line without a process of its own. */
export async function run(...words: string[]): Promise<Outcome> {
  return runOn(false, ...words);
}

export async function runOn(useColour: boolean, ...words: string[]): Promise<Outcome> {
  let out = '';
  let error = '';
  const status = await commandLine(words, {
    out: (text) => (out += text),
    error: (text) => (error += text),
    useColour,
  });
  return { status, out, error };
}
