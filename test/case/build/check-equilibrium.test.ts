import { describe, expect, it } from 'vitest';
import { readCase } from '../../../src/case/read-case.js';
import type { Problem } from '../../../src/diagnostics/problem.js';
import { caseText, labels, refusalOf, withEdits } from '../case-texts.js';

const shift = caseText('adiabatic-shift');
const law = 'rate: k * p.CO * (1 - p.CO2 * p.H2 / (p.CO * p.H2O * K_eq))';

function warningsWith(rate: string, ...more: readonly (readonly [string, string])[]): readonly Problem[] {
  return readCase(withEdits(shift, [law, `rate: ${rate}`], ...more), 'case.yaml').warnings;
}

describe('a reversible law against the species’ thermochemistry', () => {
  it('that goes by K_eq agrees', () => {
    expect(readCase(shift, 'case.yaml').warnings).toEqual([]);
  });

  it('Moe’s constant (1962), exp(4577.8 K/T - 4.33), agrees within the factor that deserves a word', () => {
    expect(warningsWith('k * (p.CO - p.CO2 * p.H2 / (p.H2O * exp(4577.8 K / T - 4.33)))')).toEqual([]);
  });

  it.each([
    ['1.4', 0],
    ['1 / 1.4', 0],
    ['1.6', 1],
    ['1 / 1.6', 1],
    ['30', 1],
  ])('off by a factor of %s: %i warnings (the limit is 1.5)', (factor, count) => {
    const warnings = warningsWith(`k * p.CO * (1 - p.CO2 * p.H2 / (p.CO * p.H2O * K_eq * (${factor})))`);
    expect(warnings.map(({ code }) => code)).toEqual(Array(count).fill('thermodynamic_disagreement'));
  });

  it('says by how much', () => {
    const [warning] = warningsWith('k * p.CO * (1 - p.CO2 * p.H2 / (p.CO * p.H2O * K_eq * 3))');
    expect(warning!.found).toMatch(/3\.0 times the equilibrium constant/);
  });

  it.each([
    ['turned around', 'k * p.CO * (p.CO2 * p.H2 / (p.CO * p.H2O * K_eq) - 1)'],
    ['that never turns', 'k * p.CO'],
  ])('a law %s does not change sign as it should', (_name, rate) => {
    const [warning] = warningsWith(rate);
    expect(warning!.code).toBe('thermodynamic_disagreement');
    expect(warning!.found).toContain('does not change sign');
  });

  it('of a reaction that is written one way only is not held against it', () => {
    expect(warningsWith('k * p.CO', ['CO + H2O <=> CO2 + H2', 'CO + H2O -> CO2 + H2'])).toEqual([]);
  });

  it('a change of moles brings in the standard pressure of 1 bar', () => {
    // Ammonia: with atm for bar the constant is off by 1.013^2, which is no disagreement; with kPa for bar by ten thousand.
    const withUnit = (unit: string): string =>
      withEdits(
        shift,
        ['  CO: library\n  H2O: library\n  CO2: library\n', '  NH3: library\n'],
        ['CO + H2O <=> CO2 + H2', 'N2 + 3 H2 <=> 2 NH3'],
        [law, `rate: k * p.N2 * (1 - p.NH3^2 * 1 ${unit}^2 / (p.N2 * p.H2^3 * K_eq))`],
        [
          '{ CO: 8.5 %, CO2: 5.0 %, H2: 35 %, H2O: 40 %, N2: balance }',
          '{ NH3: 2 %, H2: 70 %, N2: balance }',
        ],
        ['{ CO: 4.6e-7 m^2/s, H2O: 5.6e-7 m^2/s, CO2: 3.8e-7 m^2/s, H2: 1.5e-6 m^2/s }', '5e-7 m^2/s'],
        ['{ CO: 0.021 m/s, H2O: 0.024 m/s, CO2: 0.018 m/s, H2: 0.055 m/s }', '0.02 m/s'],
        ['{ CO: 70 % }', '{ N2: 7 % }'],
      );
    const warned = (unit: string): string[] => labels(readCase(withUnit(unit), 'case.yaml').warnings);
    expect(warned('bar')).toEqual([]);
    expect(warned('atm')).toEqual([]);
    expect(warned('kPa')).toEqual(['thermodynamic_disagreement reactions[0].rate']);
  });
});

describe('K_eq', () => {
  it('needs the data it follows from', () => {
    const record = '{formula: CO2, heat_capacity: 45 J/(mol K), heat_of_formation: -393.5 kJ/mol}';
    const { problems } = refusalOf(withEdits(shift, ['  CO2: library', `  CO2: ${record}`]));
    expect(labels(problems)).toEqual(['missing_property reactions[0].rate']);
    expect(problems[0]!.found).toBe('`K_eq` without the data it follows from');
  });

  it('is asked for in an isothermal bed too', () => {
    const text = withEdits(
      shift,
      ['  CO2: library', '  CO2: {formula: CO2}'],
      ['heat: { mode: adiabatic }', 'heat: { mode: isothermal }'],
    );
    expect(labels(refusalOf(text).problems)).toEqual(['missing_property reactions[0].rate']);
  });
});
