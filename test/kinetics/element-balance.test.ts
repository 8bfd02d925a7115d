import { describe, expect, it } from 'vitest';
import { elementImbalance } from '../../src/kinetics/element-balance.js';

const xylene = { C: 8, H: 10 };
const anhydride = { C: 8, H: 4, O: 3 };
const oxygen = { O: 2 };
const water = { H: 2, O: 1 };
const carbonDioxide = { C: 1, O: 2 };
const nitrogen = { N: 2 };

describe('elementImbalance', () => {
  // Counted by hand.
  it('is empty for equations that balance', () => {
    expect(elementImbalance([-1, -3, 1, 3], [xylene, oxygen, anhydride, water]).size).toBe(0);
    expect(elementImbalance([-1, -10.5, 8, 5], [xylene, oxygen, carbonDioxide, water]).size).toBe(0);
    expect(elementImbalance([-1, -0.5, 1, 0], [{ S: 1, O: 2 }, oxygen, { S: 1, O: 3 }, nitrogen]).size).toBe(
      0,
    );
  });

  it('names only the elements that do not balance, with the atoms made or lost', () => {
    // C8H10 + 2 O2 -> C8H4O3 + 3 H2O lacks one O2.
    expect([...elementImbalance([-1, -2, 1, 3], [xylene, oxygen, anhydride, water])]).toEqual([['O', 2]]);
    // 3 H2 + N2 -> NH3: one N and three H too few.
    expect(new Map(elementImbalance([-3, -1, 1], [{ H: 2 }, nitrogen, { N: 1, H: 3 }]))).toEqual(
      new Map([
        ['H', -3],
        ['N', -1],
      ]),
    );
  });

  it('passes the rounding of thirds and sevenths, and nothing larger', () => {
    const thirds = [-1 / 3, -1 / 7, 1 / 3, 1 / 7];
    expect(elementImbalance(thirds, [{ C: 7 }, { H: 3 }, { C: 7 }, { H: 3 }]).size).toBe(0);
    expect(elementImbalance([-1 / 3, 1], [{ C: 3 }, { C: 1 }]).size).toBe(0);
    expect(elementImbalance([-0.333333, 1], [{ C: 3 }, { C: 1 }]).size).toBe(1);
    expect(elementImbalance([-1, 1 + 1e-8], [{ C: 1 }, { C: 1 }]).size).toBe(1);
  });

  it('leaves out species that take no part', () => {
    expect(elementImbalance([-1, 0, 1], [{ C: 1 }, { Fe: 3 }, { C: 1 }]).size).toBe(0);
  });
});
