/** The command `species`: list, search, one species with its table, and what it refuses. */
import { existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { librarySpeciesIds } from '../../src/properties/species/library.js';
import { quickCase, run } from './in-process.js';

let folder = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'bedwright-test-'));
});
afterEach(() => {
  rmSync(folder, { recursive: true, force: true });
});

interface SpeciesJson {
  readonly id: string;
  readonly cas_number: string;
  readonly values: Readonly<Record<string, { value: number; source: string; quality: string | null }>>;
  readonly properties?: Readonly<Record<string, readonly (number | null)[]>>;
}

describe('species', () => {
  it('lists the whole library, at least fifty, a line each', async () => {
    const { status, out: output } = await run('species');
    expect(status).toBe(0);
    const ids = librarySpeciesIds();
    expect(ids.length).toBeGreaterThanOrEqual(50);
    const lines = output.split('\n').map((line) => line.trim().split(/ {2,}/)[0]);
    for (const id of ids) expect(lines).toContain(id);
  });

  it.each([
    ['the id', 'NH3'],
    ['the name', 'ammonia'],
    ['the name in capitals', 'AMMONIA'],
    ['the registry number', '7664-41-7'],
  ])('finds one species by %s', async (_what, query) => {
    const { status, out: output } = await run('species', query, '--json');
    expect(status).toBe(0);
    expect((JSON.parse(output) as SpeciesJson).id).toBe('NH3');
  });

  it('lists what a part of a name fits', async () => {
    const { out: output } = await run('species', 'xylene', '--json');
    expect((JSON.parse(output) as SpeciesJson[]).map(({ id }) => id)).toEqual([
      'o_xylene',
      'm_xylene',
      'p_xylene',
    ]);
  });

  it('shows values with their sources, and properties over temperature as tabulated elsewhere', async () => {
    const { out: output } = await run(
      'species',
      'NH3',
      '--from',
      '400 K',
      '--to',
      '800 K',
      '--step',
      '400 K',
      '--json',
    );
    const { values, properties } = JSON.parse(output) as SpeciesJson;
    // Tc and Pc of ammonia: 405.4 K and 113.3 bar in most tables; R717.
    expect(Math.abs(values['critical_temperature_K']!.value - 405.5)).toBeLessThan(0.5);
    expect(Math.abs(values['critical_pressure_Pa']!.value / 1.133e7 - 1)).toBeLessThan(5e-3);
    for (const { source } of Object.values(values)) expect(source.length).toBeGreaterThan(10);
    expect(properties!['T_K']).toEqual([400, 800]);
    // NIST-JANAF tables, 4th ed. (1998), NH3: Cp 38.716 and 51.235 J/(mol K), H-H298 3.781 kJ/mol at 400 K (from memory).
    expect(properties!['heat_capacity_J_mol_K']![0]! / 38.716).toBeCloseTo(1, 2);
    expect(properties!['heat_capacity_J_mol_K']![1]! / 51.235).toBeCloseTo(1, 2);
    expect(Math.abs(properties!['enthalpy_above_298_K_J_mol']![0]! - 3781)).toBeLessThan(40);
  });

  it('writes table, charts and values of one species into a folder', async () => {
    const target = join(folder, 'steam');
    expect((await run('species', 'H2O', '--out', target)).status).toBe(0);
    const csv = readFileSync(join(target, 'properties.csv'), 'utf8').split('\r\n');
    expect(csv[0]!.split(',')).toContain('viscosity_Pa_s');
    expect(csv).toHaveLength(10);
    for (const name of ['heat-capacity.png', 'viscosity.png', 'thermal-conductivity.png']) {
      expect(readFileSync(join(target, name)).subarray(1, 4).toString()).toBe('PNG');
    }
    // An earlier result of its own is replaced.
    expect((await run('species', 'H2O', '--out', target)).status).toBe(0);
  });

  it.each([
    ['an unknown name, with the nearest one', ['metanol'], 'methanol'],
    ['a folder for more than one', ['xylene', '--out', 'x'], 'one species'],
    ['a temperature without unit', ['NH3', '--to', '700'], 'bare number'],
    ['a step on a temperature scale', ['NH3', '--step', '50 degC'], 'degC'],
    ['a step of zero', ['NH3', '--step', '0 K'], 'rising'],
    ['a length for a temperature', ['NH3', '--to', '7 m'], 'a length'],
    ['an empty query', [''], 'nothing called'],
    ['a range beyond the data', ['NH3', '--to', '9000 K'], 'outside the data'],
    ['a falling range', ['NH3', '--from', '700 K', '--to', '400 K'], 'rising'],
    ['a table without end', ['NH3', '--step', '0.0001 K'], 'rows'],
    ['an option given twice', ['NH3', '--to', '700 K', '--to', '800 K'], 'once'],
    ['an unknown option', ['NH3', '--form', '400 K'], '--from'],
  ])('refuses %s', async (_what, words, expected) => {
    const { status, error } = await run('species', ...words);
    expect(status).toBe(2);
    expect(error).toContain(expected);
    expect(error).not.toMatch(/ at .*:\d+:\d+/);
  });

  it('refuses a folder that holds other things, and leaves it alone', async () => {
    const { status } = await run('species', 'H2O', '--out', join(folder, '..'));
    expect(status).toBe(2);
    expect(existsSync(folder)).toBe(true);
  });
});

describe('species files of a case', () => {
  const good = 'bedwright_species: 1\nspecies: { X: { formula: C3H8O } }\n';
  const check = async (content: string | undefined): Promise<{ status: number; error: string }> => {
    const path = join(folder, 'plant.yaml');
    writeFileSync(path, `${readFileSync(quickCase, 'utf8')}\nspecies_files: [own.yaml]\n`);
    if (content !== undefined) writeFileSync(join(folder, 'own.yaml'), content);
    return run('check', path);
  };

  it('are found beside the case, wherever the program was started', async () => {
    expect(await check(good)).toMatchObject({ status: 0, error: '' });
  });

  it('at fault are named with their own path, line and column, and the line is shown', async () => {
    const { status, error } = await check(good.replace('C3H8O', 'C3H8Zz'));
    expect(status).toBe(2);
    expect(error).toContain(`${join(folder, 'own.yaml')}:2:30  species.X.formula`);
    expect(error).toContain('  2 | species: { X: { formula: C3H8Zz } }');
  });

  it('that are not there, a folder, or larger than any library, are refused by name', async () => {
    const missing = await check(undefined);
    expect(missing.status).toBe(2);
    expect(missing.error).toContain(`${join(folder, 'own.yaml')}\n`);
    expect(missing.error).toContain('no such file');
    const large = await check(`${good}#${'x'.repeat(3_000_000)}\n`);
    expect(large.status).toBe(2);
    expect(large.error).toContain('3.0 MB');
    rmSync(join(folder, 'own.yaml'));
    mkdirSync(join(folder, 'own.yaml'));
    const directory = await check(undefined);
    expect(directory.status).toBe(2);
    expect(directory.error).toContain('a folder');
  });
});
