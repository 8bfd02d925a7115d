/** Every case of the project's folder from file to results. */
import { createHash } from 'node:crypto';
import {
  existsSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { casesFolder, cooledCase, quickCase, run, version } from './in-process.js';

interface Summary {
  readonly status: string;
  readonly outlet: { readonly position_m: number };
  readonly conversion: Readonly<Record<string, number>>;
  readonly effectiveness: Readonly<Record<string, { inlet: number; outlet: number; mean: number }>>;
  readonly balances: {
    readonly mass: number;
    readonly elements: Readonly<Record<string, number>>;
    readonly energy: number;
  };
  readonly provenance: Readonly<Record<string, unknown>>;
}

let folder = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'bedwright-test-'));
});
afterEach(() => {
  rmSync(folder, { recursive: true, force: true });
});
const summaryOf = (target: string): Summary =>
  JSON.parse(readFileSync(join(target, 'summary.json'), 'utf8')) as Summary;

describe('run', () => {
  it.each(readdirSync(casesFolder))('%s runs to the end, and its balances close', async (file) => {
    const target = join(folder, 'result');
    const { status, error } = await run('run', join(casesFolder, file), '--out', target, '--no-charts');
    expect(error).toBe('');
    expect(status).toBe(0);
    const summary = summaryOf(target);
    expect(summary.status).toBe('complete');
    const { mass, elements, energy } = summary.balances;
    for (const closure of [mass, energy, ...Object.values(elements)]) {
      expect(closure).toBeGreaterThanOrEqual(0);
      expect(closure).toBeLessThan(1e-9);
    }
    expect(Object.keys(elements).length).toBeGreaterThan(0);
  });

  it('meets the closed form of the isothermal first-order bed', async () => {
    const target = join(folder, 'result');
    await run('run', quickCase, '--out', target, '--no-charts');
    // Sphere with modulus Phi on V/S: eta = (coth 3Phi - 1/(3Phi)) / Phi; Thiele (1939), Ind. Eng. Chem. 31, 916; Aris (1957).
    // Plug flow of a first-order reaction at constant density: X = 1 - exp(-eta k (1 - void) L / u); any reaction-engineering text.
    const [k, diffusivity, diameter, voidFraction, length, velocity] = [2, 5e-7, 3e-3, 0.4, 1.5, 0.8];
    const modulus = (diameter / 6) * Math.sqrt(k / diffusivity);
    const effectiveness = (1 / Math.tanh(3 * modulus) - 1 / (3 * modulus)) / modulus;
    const conversion = 1 - Math.exp((-effectiveness * k * (1 - voidFraction) * length) / velocity);
    const summary = summaryOf(target);
    expect(Math.abs(summary.conversion['A']! - conversion)).toBeLessThan(1e-7);
    for (const value of Object.values(summary.effectiveness['isomerisation']!)) {
      expect(Math.abs(value - effectiveness)).toBeLessThan(1e-7);
    }
    expect(summary.outlet.position_m).toBe(length);
  });

  it('writes profile, pellets, summary, charts and the case, and prints a table with the caution last', async () => {
    const target = join(folder, 'result');
    const { status, out } = await run('run', cooledCase, '--out', target);
    expect(status).toBe(0);
    const names = readdirSync(target).sort();
    expect(names).toEqual(
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
    for (const name of names.filter((other) => other.endsWith('.png'))) {
      const png = readFileSync(join(target, name));
      expect(png.subarray(0, 8).toString('latin1')).toBe('\u0089PNG\r\n\u001a\n');
      expect(png.length).toBeGreaterThan(5000);
    }
    expect(readdirSync(folder)).toEqual(['result']);
    expect(out.indexOf('Warnings')).toBeGreaterThan(out.indexOf('outlet temperature'));
    expect(out.indexOf('qualified engineers')).toBeGreaterThan(out.indexOf('Warnings'));
    expect(out).not.toMatch(/NaN|undefined|Infinity/);
    const csv = readFileSync(join(target, 'profile.csv'), 'utf8');
    expect(csv.trimEnd().split('\r\n')).toHaveLength(1 + 101);
  });

  it('keeps the bytes of the case beside the results, with their hash, byte-order mark and all', async () => {
    const path = join(folder, 'marked.yaml');
    writeFileSync(path, `\ufeff${readFileSync(quickCase, 'utf8').replaceAll('\n', '\r\n')}`);
    const target = join(folder, 'result');
    expect((await run('run', path, '--out', target, '--no-charts')).status).toBe(0);
    const bytes = readFileSync(path);
    expect(readFileSync(join(target, 'case.yaml')).equals(bytes)).toBe(true);
    expect(summaryOf(target).provenance).toEqual({
      tool: 'bedwright',
      version,
      case_file: 'marked.yaml',
      case_sha256: createHash('sha256').update(bytes).digest('hex'),
      species_files: {},
      files: ['profile.csv', 'pellet.csv', 'case.yaml', 'summary.json'],
    });
  });

  it('copies species files beside the case, with their hash; a link in their place is refused', async () => {
    const path = join(folder, 'plant.yaml');
    const species = join(folder, 'own.yaml');
    const text = readFileSync(quickCase, 'utf8');
    writeFileSync(path, `${text}\nspecies_files: [own.yaml]\n`);
    writeFileSync(species, 'bedwright_species: 1\nspecies: { X: { formula: C3H8O } }\n');
    const target = join(folder, 'result');
    expect((await run('run', path, '--out', target, '--no-charts')).status).toBe(0);
    expect(readFileSync(join(target, 'own.yaml')).equals(readFileSync(species))).toBe(true);
    expect(summaryOf(target).provenance['species_files']).toEqual({
      'own.yaml': createHash('sha256').update(readFileSync(species)).digest('hex'),
    });
    // The copy runs on its own.
    const again = await run('run', join(target, 'case.yaml'), '--out', join(folder, 'again'), '--no-charts');
    expect(again.status).toBe(0);
    rmSync(species);
    symlinkSync('/etc/hostname', species);
    const refused = await run('run', path, '--out', join(folder, 'linked'), '--no-charts');
    expect(refused.status).toBe(2);
    expect(refused.error).toContain('symbolic link');
    expect(existsSync(join(folder, 'linked'))).toBe(false);
  });
});
