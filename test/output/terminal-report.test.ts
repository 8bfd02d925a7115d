import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { keyFigures, significant, table, terminalReport, wrap } from '../../src/output/terminal-report.js';
import { cooledBed, inventedResult, isothermalBed } from './invented-result.js';

const figures = (...words: Parameters<typeof keyFigures>): Record<string, string> =>
  Object.fromEntries(keyFigures(...words));

describe('key figures', () => {
  it('of a cooled bed: with units, in digits a person can read', () => {
    expect(figures(inventedResult, cooledBed)).toEqual({
      'outlet temperature': '601.0 K (327.9 °C)',
      'outlet pressure': '1.2346 bar',
      'pressure drop': '0.765 bar',
      'peak temperature': '612.3 K (339.2 °C) at 0.3 m',
      'conversion of A': '75 %',
      'selectivity and yield, B_2 from A': '90 %, 67.5 %',
      'selectivity and yield, A from B_2': 'none, 0 %',
      'approach to equilibrium, second': '-2.0 K',
      'effectiveness of first': '0.5 / 0.45 / 0.6  inlet / mean / outlet',
      'effectiveness of second': '– / 1.25 / –  inlet / mean / outlet',
      'heat removed': '1.234 kW',
      'catalyst mass': '0.01235 kg',
      'balances close to': 'mass 1e-16, elements 3e-15, energy 2e-12',
      work: '12 axial steps, 99 pellet solutions',
    });
  });

  it('of an isothermal bed: no peak, no energy; heat where it is known', () => {
    const known = figures(inventedResult, isothermalBed);
    expect(known).not.toHaveProperty('peak temperature');
    expect(known['heat removed']).toBe('1.234 kW');
    expect(known['balances close to']).toBe('mass 1e-16, elements 3e-15');
    expect(figures({ ...inventedResult, heatRemoved: null }, isothermalBed)).not.toHaveProperty(
      'heat removed',
    );
  });

  it('of an adiabatic bed: no heat removed', () => {
    const bed = { ...cooledBed, heat: { mode: 'adiabatic' } as const };
    expect(figures(inventedResult, bed)).not.toHaveProperty('heat removed');
  });

  it('of a run that stopped: the last position is not called the outlet', () => {
    const stop = { reason: 'no_pellet_state', position: 0.7, message: 'Why.' } as const;
    const stopped = figures({ ...inventedResult, status: 'stopped', stop }, cooledBed);
    expect(Object.entries(stopped).flat().join()).not.toContain('outlet');
    expect(stopped['temperature where stopped']).toBe('601.0 K (327.9 °C)');
  });
});

describe('the report', () => {
  it('goes from title to caution, warnings just above it, user text made visible', () => {
    const report = terminalReport(inventedResult, cooledBed, false);
    const order = [
      'Layout <U+001B>[5mcheck',
      'outlet temperature',
      'Along the bed\n  - 0.3 m: temperature peaks at 612.3 K',
      'The assumptions made, 1 in number',
      'Warnings\n  - The first warning, with an escape <U+001B>[31m in it.',
      'These are estimates',
    ].map((part) => report.indexOf(part));
    expect(order).not.toContain(-1);
    expect(order).toEqual([...order].sort((a, b) => a - b));
    expect(report.trimEnd()).toMatch(/govern\.$/);
    expect(report).not.toContain('\u001b');
    expect(report).not.toMatch(/NaN|undefined|null/);
    for (const line of report.split('\n')) expect(line.length).toBeLessThanOrEqual(100);
  });

  it('says at its head where and why a run stopped', () => {
    const stop = { reason: 'no_pellet_state', position: 0.71234, message: 'Why '.repeat(60).trim() } as const;
    const report = terminalReport({ ...inventedResult, status: 'stopped', stop }, cooledBed, false);
    expect(report.indexOf('Stopped at 0.7123 m: Why')).toBeLessThan(
      report.indexOf('temperature where stopped'),
    );
    for (const line of report.split('\n')) expect(line.length).toBeLessThanOrEqual(100);
  });

  it('has no empty headings', () => {
    const report = terminalReport({ ...inventedResult, events: [], warnings: [] }, isothermalBed, false);
    expect(report).not.toMatch(/Along the bed|Warnings/);
    expect(report).not.toContain('\n\n\n');
  });

  it('is coloured when asked: the same words', () => {
    const coloured = terminalReport(inventedResult, cooledBed, true);
    expect(coloured).toContain('\u001b[33m');
    // eslint-disable-next-line no-control-regex -- escapes are what is removed
    expect(coloured.replace(/\u001b\[\d+m/g, '')).toBe(terminalReport(inventedResult, cooledBed, false));
  });
});

describe('table', () => {
  it('aligns its second column, without borders or blanks at line ends', () => {
    expect(
      table([
        ['a', '1 m'],
        ['long name', '22 m'],
      ]),
    ).toBe('  a          1 m\n  long name  22 m');
  });
});

describe('significant', () => {
  it.each([
    [0, 3, '0'],
    [-0, 3, '0'],
    [1234.56, 3, '1230'],
    [1.5, 4, '1.5'],
    [-0.0123456, 3, '-0.0123'],
    [0.001, 3, '0.001'],
    [0.00099, 2, '9.9e-4'],
    [999999.4, 3, '1000000'],
    [1e6, 3, '1.00e+6'],
    [6.02214076e23, 4, '6.022e+23'],
    [NaN, 4, '–'],
    [-Infinity, 4, '–'],
  ])('%d to %d digits is %s', (value, digits, text) => {
    expect(significant(value, digits)).toBe(text);
  });

  it('is within half a unit of its last digit', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e30, max: 1e30, noNaN: true }).filter((x) => Math.abs(x) > 1e-300),
        fc.integer({ min: 1, max: 8 }),
        (value, digits) => {
          const error = Math.abs(Number(significant(value, digits)) - value);
          expect(error).toBeLessThanOrEqual(0.5001 * 10 ** (1 - digits) * Math.abs(value));
        },
      ),
    );
  });
});

describe('wrap', () => {
  it('keeps words and their order, and breaks only where a line would be too long', () => {
    expect(wrap('one two three', 7)).toBe('one two\nthree');
    expect(wrap('', 10)).toBe('');
    expect(wrap('incomprehensibilities is long', 10)).toBe('incomprehensibilities\nis long');
    fc.assert(
      fc.property(
        fc.array(fc.stringMatching(/^[a-z]{1,12}$/), { minLength: 1 }),
        fc.integer({ min: 12, max: 60 }),
        (words, width) => {
          const lines = wrap(words.join(' '), width).split('\n');
          expect(lines.join(' ').split(' ')).toEqual(words);
          for (const [i, line] of lines.entries()) {
            expect(line.length).toBeLessThanOrEqual(width);
            const next = lines[i + 1]?.split(' ')[0];
            if (next !== undefined) expect(line.length + 1 + next.length).toBeGreaterThan(width);
          }
        },
      ),
    );
  });
});
