import { describe, expect, it } from 'vitest';
import { listNames } from '../../src/diagnostics/list-names.js';
import { didYouMean, nearestName } from '../../src/diagnostics/nearest-name.js';

describe('nearestName', () => {
  it.each([
    ['tube_diametre', 'tube_diameter'],
    ['lenght', 'length'],
    ['LENGTH', 'length'],
    ['lengths', 'length'],
    ['o2', 'O2'],
    ['H20', 'H2O'],
  ])('%s → %s', (typed, meant) => {
    expect(nearestName(typed, ['O2', 'H2O', 'length', 'tube_diameter', 'tubes'])).toBe(meant);
  });

  it('proposes nothing that is far from it, and nothing for a single letter', () => {
    expect(nearestName('colour', ['length', 'tubes'])).toBeUndefined();
    expect(nearestName('Q', ['A', 'B'])).toBeUndefined();
    expect(nearestName('length', [])).toBeUndefined();
  });

  it('the nearest wins, not the first', () => {
    expect(nearestName('pressures', ['pressure_x', 'pressure'])).toBe('pressure');
  });

  it('didYouMean asks, or says nothing', () => {
    expect(didYouMean('lenght', ['length'])).toBe('did you mean `length`?');
    expect(didYouMean('colour', ['length'])).toBeUndefined();
  });
});

describe('listNames', () => {
  it('names all of a short list and counts a long one', () => {
    expect(listNames(['a', 'b'])).toBe('a, b');
    expect(listNames([])).toBe('');
    const many = Array.from({ length: 500 }, (_, k) => `s${k}`);
    expect(listNames(many)).toMatch(/^s0, s1, .*s29, … \(500 in all\)$/);
    expect(listNames(many.slice(0, 30))).not.toContain('…');
  });
});
