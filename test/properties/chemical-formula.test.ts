import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Fault } from '../../src/diagnostics/problem.js';
import { molarMassOf, parseChemicalFormula } from '../../src/properties/chemical-formula.js';

function read(text: string): { elements: Record<string, number> | undefined; faults: Fault[] } {
  const faults: Fault[] = [];
  return { elements: parseChemicalFormula(text, (fault) => faults.push(fault)), faults };
}

describe('parseChemicalFormula', () => {
  it.each([
    ['H', { H: 1 }],
    ['H2', { H: 2 }],
    ['CO', { C: 1, O: 1 }],
    ['Co', { Co: 1 }],
    ['C8H4O3', { C: 8, H: 4, O: 3 }],
    ['CH3OH', { C: 1, H: 4, O: 1 }],
    ['CH3CH2OH', { C: 2, H: 6, O: 1 }],
    ['(CH3)2CO', { C: 3, H: 6, O: 1 }],
    ['Ca(OH)2', { Ca: 1, O: 2, H: 2 }],
    ['Al2(SO4)3', { Al: 2, S: 3, O: 12 }],
    ['((CH3)3C)2O', { C: 8, H: 18, O: 1 }],
    ['CH3(CH2)6CH3', { C: 8, H: 18 }],
    ['(H)', { H: 1 }],
    ['C100H202', { C: 100, H: 202 }],
    ['HCN', { H: 1, C: 1, N: 1 }],
  ])('counts the atoms of %s', (text, elements) => {
    expect(read(text)).toEqual({ elements, faults: [] });
  });

  /** The fault points at the part between « and ». */
  it.each([
    '«»',
    '«c»8H10',
    'C8«h»10',
    '«Xx»',
    'C«Qq»2',
    '«D»2O',
    '«2»H2',
    'H«0»',
    'H123«4»',
    'H2«.»5',
    'C8«-»H10',
    'H2«+»',
    'CuSO4«·»5H2O',
    'C« »H4',
    'H«₂»O',
    '«(CH3»',
    'CH3«)»',
    '«)»CH3(',
    'H(«)»2',
    '(«2»H)',
    '«[»CH3]2',
    '«Н»2', // Cyrillic
    '«_»_proto__',
  ])('refuses %s', (marked) => {
    const text = marked.replace(/[«»]/g, '');
    const { elements, faults } = read(text);
    expect(elements).toBeUndefined();
    expect(faults.map(({ code }) => code)).toEqual(['bad_formula']);
    const start = marked.indexOf('«');
    expect(faults[0]!.span).toEqual({ start, end: Math.max(marked.indexOf('»') - 1, start + 1) });
  });

  it('refuses more than 60 characters', () => {
    expect(read('C'.repeat(60)).elements).toEqual({ C: 60 });
    expect(read('C'.repeat(61)).faults).toMatchObject([{ code: 'bad_formula', span: { start: 0, end: 61 } }]);
  });

  it('never throws, and reports one fault where it returns nothing', () => {
    const pieces = [
      'C',
      'H',
      'Cl',
      'c',
      'X',
      '(',
      ')',
      '2',
      '0',
      '10',
      '.',
      ' ',
      '·',
      '𝐤',
      '\ud800',
      'constructor',
    ];
    fc.assert(
      fc.property(fc.array(fc.constantFrom(...pieces), { maxLength: 12 }), (parts) => {
        const { elements, faults } = read(parts.join(''));
        expect(faults).toHaveLength(elements === undefined ? 1 : 0);
        if (elements) expect(molarMassOf(elements)).toBeGreaterThan(1e-3);
      }),
      { numRuns: 2000 },
    );
  });
});

describe('molarMassOf', () => {
  /** @source IUPAC, abridged standard atomic weights 2021 (Pure Appl. Chem. 94 (2022) 573), g/mol; typed from memory of the table */
  it.each([
    ['H', 1.008],
    ['He', 4.0026],
    ['Li', 6.94],
    ['B', 10.81],
    ['C', 12.011],
    ['N', 14.007],
    ['O', 15.999],
    ['F', 18.998],
    ['Ne', 20.18],
    ['Na', 22.99],
    ['Mg', 24.305],
    ['Al', 26.982],
    ['Si', 28.085],
    ['P', 30.974],
    ['S', 32.06],
    ['Cl', 35.45],
    ['Ar', 39.95],
    ['K', 39.098],
    ['Ca', 40.078],
    ['Ti', 47.867],
    ['V', 50.942],
    ['Cr', 51.996],
    ['Mn', 54.938],
    ['Fe', 55.845],
    ['Co', 58.933],
    ['Ni', 58.693],
    ['Cu', 63.546],
    ['Zn', 65.38],
    ['Ge', 72.63],
    ['As', 74.922],
    ['Se', 78.971],
    ['Br', 79.904],
    ['Kr', 83.798],
    ['Mo', 95.95],
    ['Ru', 101.07],
    ['Rh', 102.91],
    ['Pd', 106.42],
    ['Ag', 107.87],
    ['Sn', 118.71],
    ['I', 126.9],
    ['Xe', 131.29],
    ['W', 183.84],
    ['Pt', 195.08],
    ['Au', 196.97],
    ['Hg', 200.59],
    ['Pb', 207.2],
  ])('%s weighs %d g/mol', (symbol, weight) => {
    expect(molarMassOf(read(symbol).elements!)).toBeCloseTo(weight * 1e-3, 12);
  });

  // Sums of the weights above, done by hand.
  it.each([
    ['H2O', 18.015],
    ['CO2', 44.009],
    ['CH4', 16.043],
    ['NH3', 17.031],
    ['CH3OH', 32.042],
    ['C8H10', 106.168],
    ['C8H4O3', 148.117],
    ['Ca(OH)2', 74.092],
  ])('%s weighs %d g/mol', (text, mass) => {
    expect(molarMassOf(read(text).elements!)).toBeCloseTo(mass * 1e-3, 12);
  });
});
