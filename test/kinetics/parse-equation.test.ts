import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Fault } from '../../src/diagnostics/problem.js';
import { parseEquation, type ParsedEquation } from '../../src/kinetics/parse-equation.js';

const species = ['A', 'O2', 'CO2', 'H2O', 'B_2', 'n'];

function read(text: string): { equation: ParsedEquation | undefined; faults: Fault[] } {
  const faults: Fault[] = [];
  return { equation: parseEquation(text, species, (fault) => faults.push(fault)), faults };
}

describe('parseEquation', () => {
  it.each<[string, number[], boolean]>([
    ['A -> CO2', [-1, 0, 1, 0, 0, 0], false],
    ['A <=> CO2', [-1, 0, 1, 0, 0, 0], true],
    ['A + 10.5 O2 -> 8 CO2 + 5 H2O', [-1, -10.5, 8, 5, 0, 0], false],
    ['A+10.5O2->8CO2+5H2O', [-1, -10.5, 8, 5, 0, 0], false],
    ['A + 10.5*O2 -> 8 * CO2', [-1, -10.5, 8, 0, 0, 0], false],
    ['1/2 O2 + A <=> B_2', [-1, -0.5, 0, 0, 1, 0], true],
    ['1 / 4 O2 -> A', [1, -0.25, 0, 0, 0, 0], false],
    ['3/2 O2 -> A', [1, -1.5, 0, 0, 0, 0], false],
    ['.5 O2 -> A', [1, -0.5, 0, 0, 0, 0], false],
    ['2. O2 -> A', [1, -2, 0, 0, 0, 0], false],
    ['2 n -> A', [1, 0, 0, 0, 0, -2], false],
    ['2n -> A', [1, 0, 0, 0, 0, -2], false],
    // A species on both sides counts by its difference, one named twice by its sum.
    ['A + O2 -> 3 O2', [-1, 2, 0, 0, 0, 0], false],
    ['O2 + O2 -> A', [1, -2, 0, 0, 0, 0], false],
    ['A + CO2 -> H2O + CO2', [-1, 0, 0, 1, 0, 0], false],
    ['  A  ->  O2  ', [-1, 1, 0, 0, 0, 0], false],
    ['999 A -> O2', [-999, 1, 0, 0, 0, 0], false],
  ])('reads %s', (text, stoichiometry, isReversible) => {
    const { equation, faults } = read(text);
    expect(faults).toEqual([]);
    expect(equation).toEqual({ stoichiometry, isReversible });
  });

  /** Every fault points at a part between « and »; several in the order of the text. */
  it.each([
    ['A «=» O2', ['wrong_value']],
    ['A «→» O2', ['wrong_value']],
    ['A «⇌» O2', ['wrong_value']],
    ['A «<->» O2', ['wrong_value']],
    ['A «<-» O2', ['wrong_value']],
    ['A «=>» O2', ['wrong_value']],
    ['A -> O2 «->» CO2', ['wrong_value']],
    ['A -> O2 «=» CO2', ['wrong_value']],
    ['«A + O2»', ['wrong_value']],
    ['«A»', ['wrong_value']],
    ['A -> «C»', ['unknown_name']],
    ['A -> «a»', ['unknown_name']],
    ['A -> 2 «constructor»', ['unknown_name']],
    ['«X» + 2 «Y» -> «Z»', ['unknown_name', 'unknown_name', 'unknown_name']],
    ['«0» A -> O2', ['out_of_range'], ' '],
    ['«1/0» A -> O2', ['out_of_range'], ' '],
    ['«1000» A -> O2', ['out_of_range'], ' '],
    ['A + «»-> O2', ['wrong_value'], '-'],
    ['A + «-2 O2» -> CO2', ['wrong_value']],
    ['«2» -> O2', ['wrong_value']],
    ['«A O2» -> CO2', ['wrong_value']],
    ['«2 3 A» -> CO2', ['wrong_value']],
    ['«(A)» -> CO2', ['wrong_value']],
    ['«A.B» -> CO2', ['wrong_value']],
    ['«A^2» -> CO2', ['wrong_value']],
    ['«1,5 A» -> CO2', ['wrong_value']],
    ['«A\u200b» -> CO2', ['wrong_value']],
    ['«А» -> CO2', ['wrong_value']], // Cyrillic
    ['«A -> A»', ['wrong_value']],
    ['«A + O2 -> O2 + A»', ['wrong_value']],
    ['«2 A -> A + A»', ['wrong_value']],
  ] as const)('refuses %s: %j', (marked, codes, behind: string = '') => {
    const text = marked.replace(/[«»]/g, '');
    const { equation, faults } = read(text);
    expect(equation).toBeUndefined();
    expect(faults.map(({ code }) => code)).toEqual(codes);
    const parts = [...marked.matchAll(/«([^»]*)»/g)].map((match) => match[1]! + behind);
    expect(faults.map(({ span }) => text.slice(span.start, span.end))).toEqual(parts);
  });

  it.each([
    ['', 0],
    ['A -> ', 4],
    ['A ->', 3],
    ['A -> O2 +', 8],
    ['-> A', 0],
    ['->', 0],
  ])('points into the text where a side of %j is missing', (text, start) => {
    const { equation, faults } = read(text);
    expect(equation).toBeUndefined();
    expect(faults[0]!.code).toBe('wrong_value');
    expect(faults[0]!.span).toEqual({ start, end: start + 1 });
  });

  it('suggests a near species', () => {
    expect(read('A -> CO3').faults[0]!.mend).toContain('CO2');
    expect(read('A -> b_2').faults[0]!.mend).toContain('B_2');
  });

  it('refuses more than 500 characters', () => {
    const text = `A -> ${'A + '.repeat(200)}O2`;
    expect(read(text).faults).toMatchObject([{ code: 'wrong_value', span: { start: 0, end: text.length } }]);
  });

  it('reads back what it is given, whatever the coefficients and the order', () => {
    const coefficient = fc.integer({ min: 1, max: 999 * 8 }).map((eighths) => eighths / 8);
    const side = fc.uniqueArray(fc.record({ index: fc.integer({ min: 0, max: 2 }), coefficient }), {
      minLength: 1,
      selector: ({ index }) => index,
    });
    const write = (terms: readonly { index: number; coefficient: number }[], offset: number): string =>
      terms.map(({ index, coefficient: value }) => `${value} ${species[index + offset]!}`).join(' + ');
    fc.assert(
      fc.property(side, side, fc.boolean(), (left, right, isReversible) => {
        const expected = species.map(() => 0);
        left.forEach(({ index, coefficient: value }) => (expected[index] = -value));
        right.forEach(({ index, coefficient: value }) => (expected[index + 3] = value));
        const { equation } = read(`${write(left, 0)} ${isReversible ? '<=>' : '->'} ${write(right, 3)}`);
        expect(equation).toEqual({ stoichiometry: expected, isReversible });
      }),
    );
  });

  it('never throws, and reports at least one fault where it returns nothing', () => {
    const pieces = [
      'A',
      'O2',
      'B_2',
      '+',
      '->',
      '<=>',
      '=',
      ' ',
      '2',
      '0',
      '1/2',
      '/',
      '*',
      '.',
      '-',
      '\n',
      '→',
      '𝐤',
      '\ud800',
      '__proto__',
    ];
    fc.assert(
      fc.property(fc.array(fc.constantFrom(...pieces), { maxLength: 15 }), (parts) => {
        const text = parts.join('');
        const { equation, faults } = read(text);
        expect(equation === undefined).toBe(faults.length > 0);
        for (const { span } of faults) {
          expect(span.start).toBeGreaterThanOrEqual(0);
          expect(span.end).toBeGreaterThan(span.start);
          expect(span.end).toBeLessThanOrEqual(Math.max(1, text.length));
        }
      }),
      { numRuns: 3000 },
    );
  });
});
