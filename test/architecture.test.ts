import { readdirSync, readFileSync, statSync } from 'node:fs';
import { dirname, join, relative, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { importTable } from './import-table.js';

const root = resolve(dirname(fileURLToPath(import.meta.url)), '..');
const source = join(root, 'src');

function filesBelow(folder: string): string[] {
  return readdirSync(folder).flatMap((name) => {
    const path = join(folder, name);
    if (statSync(path).isDirectory()) return filesBelow(path);
    return path.endsWith('.ts') ? [path] : [];
  });
}

interface Import {
  readonly from: string;
  readonly specifier: string;
}

const importPattern =
  /(?:^|\s)(?:import|export)\s[^;]*?from\s+'([^']+)'|import\('([^']+)'\)|^import\s+'([^']+)'/gm;

function importsOf(file: string): Import[] {
  return [...readFileSync(file, 'utf8').matchAll(importPattern)].map((match) => ({
    from: file,
    specifier: (match[1] ?? match[2] ?? match[3])!,
  }));
}

const files = filesBelow(source);
const imports = files.flatMap(importsOf);
const folderOf = (file: string): string => relative(source, file).split('/')[0]!;
const rank = new Map(importTable.map(({ folder }, index) => [folder, index]));
const rules = new Map(importTable.map((rule) => [rule.folder, rule]));

describe('imports under src', () => {
  it('finds the sources', () => {
    expect(files.length).toBeGreaterThan(40);
    expect(imports.length).toBeGreaterThan(80);
  });

  it('every folder is in the table, and index.ts stands alone beside them', () => {
    const names = readdirSync(source).filter((name) => name !== 'index.ts');
    expect([...names].sort()).toEqual(importTable.map(({ folder }) => folder).sort());
  });

  it('go up the table only', () => {
    const breaches = imports
      .filter(({ specifier }) => specifier.startsWith('.'))
      .filter(({ from, specifier }) => {
        const own = folderOf(from);
        const target = folderOf(resolve(dirname(from), specifier));
        if (own === 'index.ts') return target === 'cli';
        return target === 'index.ts' || rank.get(target)! > rank.get(own)!;
      })
      .map(({ from, specifier }) => `${relative(root, from)} -> ${specifier}`);
    expect(breaches).toEqual([]);
  });

  it('of packages only those the table allows; node: modules only in cli and output', () => {
    const breaches = imports
      .filter(({ specifier }) => !specifier.startsWith('.'))
      .filter(({ from, specifier }) => {
        const folder = folderOf(from);
        if (specifier.startsWith('node:')) return folder !== 'cli' && folder !== 'output';
        const name = specifier.startsWith('@')
          ? specifier.split('/').slice(0, 2).join('/')
          : specifier.split('/')[0]!;
        return !(rules.get(folder)?.packages.includes(name) ?? false);
      })
      .map(({ from, specifier }) => `${relative(root, from)} -> ${specifier}`);
    expect(breaches).toEqual([]);
  });

  it('hold no cycle', () => {
    const graph = new Map<string, string[]>();
    for (const { from, specifier } of imports) {
      if (!specifier.startsWith('.')) continue;
      const target = resolve(dirname(from), specifier.replace(/\.js$/, '.ts'));
      graph.set(from, [...(graph.get(from) ?? []), target]);
    }
    const state = new Map<string, 'open' | 'done'>();
    const cycles: string[] = [];
    const visit = (file: string, path: readonly string[]): void => {
      if (state.get(file) === 'done') return;
      if (state.get(file) === 'open') {
        cycles.push(
          [...path.slice(path.indexOf(file)), file].map((entry) => relative(root, entry)).join(' -> '),
        );
        return;
      }
      state.set(file, 'open');
      for (const next of graph.get(file) ?? []) visit(next, [...path, file]);
      state.set(file, 'done');
    };
    files.forEach((file) => visit(file, []));
    expect(cycles).toEqual([]);
  });
});

describe('what only one folder may do', () => {
  const offenders = (pattern: RegExp, allowed: (file: string) => boolean): string[] =>
    files
      .filter((file) => !allowed(relative(source, file)))
      .filter((file) => pattern.test(stripComments(readFileSync(file, 'utf8'))))
      .map((file) => relative(root, file));

  it('process and console are touched in cli alone', () => {
    expect(offenders(/\b(process\.|console\.)/, (file) => file.startsWith('cli/'))).toEqual([]);
  });

  it('code is generated in one file of expressions, and nothing is evaluated anywhere', () => {
    const generators = offenders(/\bnew Function\b/, () => false);
    expect(generators.length).toBeLessThanOrEqual(1);
    expect(generators.every((file) => file.startsWith('src/expressions/'))).toBe(true);
    expect(offenders(/\beval\(|\.evaluate\(['"`]/, () => false)).toEqual([]);
  });
});

describe('DEVELOPERS.md', () => {
  it('repeats the table of folders', () => {
    const text = readFileSync(join(root, 'DEVELOPERS.md'), 'utf8');
    for (const { folder, holds, packages } of importTable) {
      const row = `| \`${folder}/\` | ${holds} | ${packages.map((name) => `\`${name}\``).join(', ') || '–'} |`;
      expect(text).toContain(row);
    }
  });

  it('gives a reason for every dependency', () => {
    const text = readFileSync(join(root, 'DEVELOPERS.md'), 'utf8');
    const manifest = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')) as {
      dependencies: Record<string, string>;
      devDependencies: Record<string, string>;
    };
    const missing = [...Object.keys(manifest.dependencies), ...Object.keys(manifest.devDependencies)].filter(
      (name) => !text.includes(`| \`${name}\` |`),
    );
    expect(missing).toEqual([]);
  });
});

function stripComments(text: string): string {
  return text.replace(/\/\*[\s\S]*?\*\//g, '').replace(/\/\/.*$/gm, '');
}
