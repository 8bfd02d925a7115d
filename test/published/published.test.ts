import { describe, expect, it } from 'vitest';
import { equilibriumRows } from './equilibrium.js';
import { filmRows } from './film.js';
import { kineticsRows } from './kinetics.js';
import { pelletRows } from './pellet.js';
import { poreDiffusionRows } from './pore-diffusion.js';
import { pressureDropRows } from './pressure-drop.js';
import { missRatio, type PublishedRow } from './published-row.js';
import { reactorRows } from './reactor.js';
import { transportRows } from './transport.js';

const areas: Readonly<Record<string, readonly PublishedRow[]>> = {
  pellet: pelletRows,
  'pore diffusion': poreDiffusionRows,
  film: filmRows,
  'pressure drop': pressureDropRows,
  kinetics: kineticsRows,
  equilibrium: equilibriumRows,
  transport: transportRows,
  reactor: reactorRows,
};

describe.each(Object.entries(areas))('published values: %s', (_area, rows) => {
  it.each(rows.map((row) => [row.id, row] as const))('%s', (_id, row) => {
    const obtained = row.obtain();
    const ratio = missRatio(row, obtained);
    const account = `${row.id}: ${obtained} against ${row.expected} ${row.unit}, ${ratio.toPrecision(3)} times the tolerance (${row.tolerance.reason}); ${row.source}`;
    expect(ratio <= 1, account).toBe(true);
  });
});

describe('the rows themselves', () => {
  const rows = Object.values(areas).flat();

  it('are named once, with source, inputs and a reason for the tolerance', () => {
    expect(new Set(rows.map((row) => row.id)).size).toBe(rows.length);
    for (const row of rows) {
      expect(row.source.length, row.id).toBeGreaterThan(10);
      expect(row.inputs.length, row.id).toBeGreaterThan(3);
      expect(row.tolerance.reason.length, row.id).toBeGreaterThan(5);
      expect(Number.isFinite(row.expected), row.id).toBe(true);
    }
  });

  it('would be missed by a value just outside', () => {
    for (const row of rows) {
      const { relative, absolute } = row.tolerance;
      const allowed = relative === undefined ? absolute : relative * Math.abs(row.expected);
      expect(allowed, row.id).toBeGreaterThan(0);
      expect(missRatio(row, row.expected + 1.01 * allowed), row.id).toBeGreaterThan(1);
      expect(missRatio(row, NaN) <= 1, row.id).toBe(false);
    }
  });
});
