import { describe, expect, it } from 'vitest';
import { findReactionBasis } from '../../src/kinetics/independent-reactions.js';

describe('findReactionBasis', () => {
  // CH4 + H2O = CO + 3 H2; CO + H2O = CO2 + H2; CH4 + 2 H2O = CO2 + 4 H2, the sum of the first two. Species CH4 H2O CO H2 CO2.
  const reforming = [
    [-1, -1, 1, 3, 0],
    [0, -1, -1, 1, 1],
    [-1, -2, 0, 4, 1],
  ];

  it('finds two independent reactions in steam reforming, and the third as their sum', () => {
    const { independent, combination } = findReactionBasis(reforming, undefined);
    expect(independent).toEqual([0, 1]);
    expect([...combination]).toEqual([1, 0, 1, 0, 1, 1]);
  });

  it('keeps the third where its heat is not the sum of the others', () => {
    expect(findReactionBasis(reforming, [206e3, -41e3, 165e3]).independent).toEqual([0, 1]);
    expect(findReactionBasis(reforming, [206e3, -41e3, 165.1e3]).independent).toEqual([0, 1, 2]);
  });

  it('takes multiples and fractions', () => {
    const { independent, combination } = findReactionBasis(
      [
        [-1, 0.5],
        [2, -1],
      ],
      undefined,
    );
    expect(independent).toEqual([0]);
    expect([...combination]).toEqual([1, -2]);
  });
});
