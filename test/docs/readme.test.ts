import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { solveReactor } from '../../src/bed/solve-reactor.js';
import { readCase } from '../../src/case/read-case.js';
import { CaseError } from '../../src/diagnostics/case-error.js';
import { formatCaseError } from '../../src/diagnostics/format-problem.js';
import { profileCsv } from '../../src/output/profile-csv.js';

const readme = readFileSync(new URL('../../README.md', import.meta.url), 'utf8');
const block = (language: string): string =>
  new RegExp(`\`\`\`${language}\n([\\s\\S]*?)\`\`\``).exec(readme)![1]!;

describe('README', () => {
  it('its example case reads without a problem and runs to the end of the bed', () => {
    const { specification, warnings } = readCase(block('yaml'), 'example.yaml');
    expect(warnings).toEqual([]);
    const result = solveReactor(specification);
    expect(result.status).toBe('complete');
    expect(result.warnings.some((warning) => warning.includes('closes'))).toBe(false);
  });

  it('the fault it shows is the fault one gets', () => {
    const shown = block('text').trimEnd();
    const [, , , source] = shown.split('\n');
    const line = source!.replace(/^ {2}27 \| /, '');
    const text = `bedwright: 1\n${'#\n'.repeat(24)}pellet:\n${line}\n`;
    let message = '';
    try {
      readCase(text, 'tube.yaml');
    } catch (error) {
      if (!(error instanceof CaseError)) throw error;
      message = formatCaseError(error);
    }
    expect(message).toContain(shown);
  });

  it('the columns it names are those of profile.csv', () => {
    const { specification } = readCase(block('yaml'), 'example.yaml');
    const header = profileCsv(solveReactor(specification)).split('\r\n')[0]!.split(',');
    const named = /`profile\.csv`: a row per position, `([^`]+)`/.exec(readme)![1]!.split(', ');
    const pattern = (name: string): RegExp =>
      new RegExp(`^${name.replace('<id>', '\\w+').replace('<reaction>', '\\w+')}$`);
    for (const column of header) expect(named.some((name) => pattern(name).test(column))).toBe(true);
    for (const name of named) expect(header.some((column) => pattern(name).test(column))).toBe(true);
  });

  it('the pictures and files it points to are there', () => {
    for (const [, path] of readme.matchAll(/\]\(([^)]+)\)/g)) {
      expect(readFileSync(new URL(`../../${path!}`, import.meta.url)).length).toBeGreaterThan(0);
    }
  });
});
