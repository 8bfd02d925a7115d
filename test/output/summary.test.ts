import { describe, expect, it } from 'vitest';
import { caution } from '../../src/output/caution.js';
import { summarise, type Json } from '../../src/output/summary.js';
import { cooledBed, inventedResult, isothermalBed } from './invented-result.js';

const provenance = {
  tool: 'bedwright',
  version: '1.2.3',
  caseFile: 'tube.yaml',
  caseHash: 'ab'.repeat(32),
  speciesFiles: [{ name: 'plant.yaml', hash: 'cd'.repeat(32) }],
  files: ['profile.csv', 'summary.json'],
} as const;
const summary = summarise(inventedResult, cooledBed, provenance, 0.25);

/** All numbers of a document. */
function numbers(json: Json): number[] {
  if (typeof json === 'number') return [json];
  return typeof json === 'object' && json !== null ? Object.values(json).flatMap(numbers) : [];
}

describe('summary.json', () => {
  it('has the keys of the contract', () => {
    expect(Object.keys(summary)).toEqual([
      'title',
      'status',
      'stop',
      'outlet',
      'conversion',
      'selectivity',
      'yield',
      'peak',
      'pressure_drop_Pa',
      'heat_removed_W',
      'catalyst_mass_kg',
      'equilibrium',
      'effectiveness',
      'balances',
      'criteria',
      'transport',
      'events',
      'warnings',
      'assumptions',
      'work',
      'provenance',
      'caution',
    ]);
  });

  it('holds the numbers as they are, unknown ones as null', () => {
    expect(summary).toMatchObject({
      status: 'complete',
      stop: null,
      outlet: {
        position_m: 1,
        temperature_K: 601,
        pressure_Pa: 123456.78901234567,
        molar_flow_mol_s: { A: 0.25, B_2: null },
        mole_fraction: { A: 1 / 3, B_2: 2 / 3 },
      },
      conversion: { A: 0.75 },
      selectivity: { B_2_from_A: 0.9, A_from_B_2: null },
      yield: { B_2_from_A: 0.675, A_from_B_2: 0 },
      peak: { temperature_K: 612.3456789012345, position_m: 0.3 },
      pressure_drop_Pa: 76543.21098765433,
      heat_removed_W: 1234.5,
      catalyst_mass_kg: 0.0123456,
      effectiveness: {
        first: { inlet: 0.5, outlet: 0.6, mean: 0.45 },
        second: { inlet: null, outlet: null, mean: 1.25 },
      },
      balances: { mass: 1e-16, elements: { C: 0, H: 3e-15 }, energy: 2e-12 },
      criteria: [
        { name: 'Thiele modulus', of: 'first', place: 'inlet', value: 1.5, unit: '1' },
        { name: 'some temperature', of: null, place: 'inlet', value: null, unit: 'K' },
      ],
      events: [{ kind: 'peak_temperature', position_m: 0.3 }],
      warnings: inventedResult.warnings,
      assumptions: inventedResult.assumptions,
      work: { steps: 12, pelletSolves: 99, seconds: 0.25 },
      provenance: {
        tool: 'bedwright',
        version: '1.2.3',
        case_file: 'tube.yaml',
        case_sha256: 'ab'.repeat(32),
        files: ['profile.csv', 'summary.json'],
      },
      caution,
    });
  });

  it('survives the way through text, with finite numbers only', () => {
    expect(JSON.parse(JSON.stringify(summary))).toEqual(summary);
    for (const value of numbers(summary)) expect(Number.isFinite(value)).toBe(true);
    expect(numbers(summary).length).toBeGreaterThan(20);
  });

  it('says where and why a run stopped, and leaves unknown times and heats null', () => {
    const stopped = summarise(
      {
        ...inventedResult,
        status: 'stopped',
        stop: { reason: 'no_pellet_state', position: 0.7, message: 'Why.' },
        heatRemoved: null,
      },
      isothermalBed,
      provenance,
      null,
    );
    expect(stopped).toMatchObject({
      status: 'stopped',
      stop: { reason: 'no_pellet_state', position_m: 0.7, message: 'Why.' },
      heat_removed_W: null,
      work: { seconds: null },
    });
  });

  it('the caution gives no clearance and names who decides', () => {
    expect(caution).toMatch(/estimates .* supervision of qualified engineers/);
    expect(caution).toMatch(/no basis for operating limits or relief/);
    expect(caution).toMatch(/Local codes and licensed practice govern/);
    expect(caution).not.toMatch(/\bsafe\b/i);
  });
});
