import { describe, expect, it } from 'vitest';
import { findBestYield } from '../../../src/case/build/best-yield.js';

const irreversible = (
  stoichiometry: readonly number[],
): { stoichiometry: readonly number[]; isReversible: false } => ({
  stoichiometry,
  isReversible: false,
});
const [A, B, C, D] = [0, 1, 2, 3] as const;

describe('findBestYield', () => {
  it('A -> 2 B: two', () => {
    expect(findBestYield([irreversible([-1, 2, 0, 0])], B, A)).toBe(2);
  });

  it('2 A -> B: a half', () => {
    expect(findBestYield([irreversible([-2, 1, 0, 0])], B, A)).toBe(0.5);
  });

  it('a chain A -> 2 B, B -> 3 C: six of C from A', () => {
    expect(findBestYield([irreversible([-1, 2, 0, 0]), irreversible([0, -1, 3, 0])], C, A)).toBe(6);
  });

  it('the direct way counts, though a chain would make more', () => {
    const reactions = [irreversible([-1, 0, 1, 0]), irreversible([-1, 1, 0, 0]), irreversible([0, -1, 3, 0])];
    expect(findBestYield(reactions, C, A)).toBe(1);
  });

  it('of two direct ways the better one, whatever their order', () => {
    const reactions = [irreversible([-1, 0, 1, 1]), irreversible([-1, 0, 2, 0])];
    expect(findBestYield(reactions, C, A)).toBe(2);
    expect(findBestYield([...reactions].reverse(), C, A)).toBe(2);
  });

  it('no way back through a reaction that does not run back', () => {
    expect(findBestYield([irreversible([-1, 2, 0, 0])], A, B)).toBeUndefined();
    expect(findBestYield([{ stoichiometry: [-1, 2, 0, 0], isReversible: true }], A, B)).toBe(0.5);
  });

  it('none at all, and rings that lead nowhere come to an end', () => {
    const ring = [irreversible([-1, 1, 0, 0]), irreversible([1, -1, 0, 0])];
    expect(findBestYield(ring, D, A)).toBeUndefined();
    expect(findBestYield([], B, A)).toBeUndefined();
  });
});
