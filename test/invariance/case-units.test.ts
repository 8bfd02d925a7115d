/** The units a case is written in, and the order of its parts, change nothing. */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readCase } from '../../src/case/read-case.js';
import { solveReactor } from '../../src/bed/solve-reactor.js';

const good = readFileSync(new URL('../../cases/salt-cooled-oxidation.yaml', import.meta.url), 'utf8');

/** Pairs of texts that mean the same. @source NIST SP 811 (2008): 1 psi = 6894.757293168 Pa, 1 lb = 0.45359237 kg, 1 cal_th = 4.184 J */
const sameThings: readonly (readonly [string, string])[] = [
  ['temperature: 625 K\n', 'temperature: 351.85 degC\n'],
  ['pressure: 1.6 bar', `pressure: ${1.6e5 / 6894.757293168} psi`],
  ['1.3 kg/(m^2 s)', `${(1.3 * 3600) / 0.45359237} lb/(m^2 h)`],
  ['A: 0.9 %,', 'A: 9000 ppm,'],
  ['3.1e-5 Pa s', '0.031 cP'],
  ['1060 J/(kg K)', `${1.06 / 4.184} kcal/(kg K)`],
  ['diameter: 4 mm', 'diameter: 0.4 cm'],
  ['1800 kg/m^3', '1.8 g/cm³'],
  ['0.35 W/(m K)', '350 mW/m/K'],
  ['A: 1.3e-6 m^2/s', 'A: 0.013 cm^2/s'],
  ['190 W/(m^2 K)', `${(190 * 3.6) / 4.184} kcal/(m^2 h K)`],
  ['tube_diameter: 25.4 mm', 'tube_diameter: 1 inch'],
  ['void_fraction: 0.42', 'void_fraction: 42 %'],
  ['at: 640 K, activation_energy: 113 kJ/mol', `at: 692.33 degF, activation_energy: ${113 / 4.184} kcal/mol`],
  ['0.085 mol/(kg s bar^2)', `${0.085 * 3.6 * 1.01325 ** 2} kmol/(kg h atm^2)`],
  ['heat: -1285 kJ/mol', `heat: ${-1285e3 / 4.184} cal/mol`],
];

/** Numbers of a specification by path, functions and texts left aside. */
function numbersOf(value: unknown, path = ''): Map<string, number> {
  const found = new Map<string, number>();
  const visit = (entry: unknown, at: string): void => {
    if (typeof entry === 'number') found.set(at, entry);
    else if (Array.isArray(entry)) entry.forEach((item, k) => visit(item, `${at}[${k}]`));
    else if (typeof entry === 'object' && entry !== null) {
      for (const [key, item] of Object.entries(entry)) visit(item, `${at}.${key}`);
    }
  };
  visit(value, path);
  return found;
}

describe('invariance of the case', () => {
  const original = readCase(good, 'case.yaml').specification;

  it.each(sameThings)('%s is %s', (written, otherwise) => {
    expect(good).toContain(written);
    const { specification } = readCase(good.replace(written, otherwise), 'case.yaml');
    const numbers = numbersOf(original);
    const others = numbersOf(specification);
    expect([...others.keys()]).toEqual([...numbers.keys()]);
    for (const [path, value] of numbers) {
      if (!Number.isFinite(value)) continue;
      expect(Math.abs(others.get(path)! - value), path).toBeLessThanOrEqual(1e-12 * Math.abs(value));
    }
  });

  it('another order of sections, species and keys gives the same answers', () => {
    const [head, ...sections] = good.split(/\n(?=[a-z]+:)/);
    const reordered = [head, ...sections.reverse()]
      .join('\n')
      .replace(
        / {2}A: \{ name[^\n]*\n {2}P: \{ name[^\n]*\n/,
        (lines) => lines.trimEnd().split('\n').reverse().join('\n') + '\n',
      );
    const { specification } = readCase(reordered, 'case.yaml');
    expect(specification.species.map(({ id }) => id)).toEqual(['P', 'A', 'O2', 'H2O', 'CO2', 'N2']);
    const [first, second] = [solveReactor(original), solveReactor(specification)];
    expect(Math.abs(second.peak.temperature / first.peak.temperature - 1)).toBeLessThan(1e-9);
    first.speciesIds.forEach((id, i) => {
      const there = second.outlet.molarFlows[second.speciesIds.indexOf(id)]!;
      expect(Math.abs(there - first.outlet.molarFlows[i]!)).toBeLessThan(1e-8 * first.outlet.molarFlows[i]!);
    });
  });
});
