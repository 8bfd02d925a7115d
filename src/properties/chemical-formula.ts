/** Chemical formulas as text: `C8H4O3`, `Ca(OH)2`, `CH3OH`. */
import type { ReportFault } from '../diagnostics/problem.js';

/**
 * Standard atomic weights, g/mol, of the elements that gases and liquids of the trade hold.
 *
 * @source IUPAC abridged standard atomic weights (2021)
 */
const atomicWeights: ReadonlyMap<string, number> = new Map(
  Object.entries({
    H: 1.008,
    He: 4.0026,
    Li: 6.94,
    B: 10.81,
    C: 12.011,
    N: 14.007,
    O: 15.999,
    F: 18.998,
    Ne: 20.18,
    Na: 22.99,
    Mg: 24.305,
    Al: 26.982,
    Si: 28.085,
    P: 30.974,
    S: 32.06,
    Cl: 35.45,
    Ar: 39.95,
    K: 39.098,
    Ca: 40.078,
    Ti: 47.867,
    V: 50.942,
    Cr: 51.996,
    Mn: 54.938,
    Fe: 55.845,
    Co: 58.933,
    Ni: 58.693,
    Cu: 63.546,
    Zn: 65.38,
    Ge: 72.63,
    As: 74.922,
    Se: 78.971,
    Br: 79.904,
    Kr: 83.798,
    Mo: 95.95,
    Ru: 101.07,
    Rh: 102.91,
    Pd: 106.42,
    Ag: 107.87,
    Sn: 118.71,
    I: 126.9,
    Xe: 131.29,
    W: 183.84,
    Pt: 195.08,
    Au: 196.97,
    Hg: 200.59,
    Pb: 207.2,
  }),
);

const longest = 60;
const tokenPattern = /(?<element>[A-Z][a-z]?)|(?<open>\()|(?<close>\))|(?<count>\d{1,3})/y;

/**
 * Atoms per molecule by element symbol.
 *
 * @param report - receives one fault where the text is no formula of known elements
 */
export function parseChemicalFormula(text: string, report: ReportFault): Record<string, number> | undefined {
  const refuse = (start: number, end: number, found: string): undefined => {
    report({
      code: 'bad_formula',
      severity: 'error',
      span: { start, end: Math.max(end, start + 1) },
      found,
      expected: 'a chemical formula such as `C8H10` or `CH3OH`',
    });
    return undefined;
  };
  if (text.length > longest) return refuse(0, text.length, `a formula of ${text.length} characters`);
  if (text === '') return refuse(0, 1, 'an empty formula');
  const groups = [new Map<string, number>()];
  /** What the next count multiplies. */
  let last: ReadonlyMap<string, number> | undefined;
  tokenPattern.lastIndex = 0;
  while (tokenPattern.lastIndex < text.length) {
    const start = tokenPattern.lastIndex;
    const match = tokenPattern.exec(text);
    if (!match) return refuse(start, start + 1, `\`${text}\``);
    const { element, open, close, count } = match.groups!;
    const top = groups.at(-1)!;
    if (element !== undefined) {
      if (!atomicWeights.has(element))
        return refuse(start, tokenPattern.lastIndex, `\`${element}\`, no element known here`);
      last = new Map([[element, 1]]);
      addTo(top, last, 1);
    } else if (open !== undefined) {
      groups.push(new Map());
      last = undefined;
    } else if (close !== undefined) {
      if (groups.length === 1) return refuse(start, start + 1, 'a parenthesis too many');
      last = groups.pop()!;
      if (last.size === 0) return refuse(start, start + 1, 'empty parentheses');
      addTo(groups.at(-1)!, last, 1);
    } else {
      const factor = Number(count);
      if (!last || factor === 0) return refuse(start, tokenPattern.lastIndex, `the number ${count!} there`);
      addTo(top, last, factor - 1);
      last = undefined;
    }
  }
  if (groups.length > 1) return refuse(0, text.length, 'a parenthesis that is not closed');
  return Object.fromEntries(groups[0]!);
}

function addTo(target: Map<string, number>, source: ReadonlyMap<string, number>, times: number): void {
  for (const [element, count] of source) target.set(element, (target.get(element) ?? 0) + times * count);
}

/** kg/mol, from atoms per molecule of elements that {@link parseChemicalFormula} knows. */
export function molarMassOf(elements: Readonly<Record<string, number>>): number {
  return Object.entries(elements).reduce(
    (sum, [element, count]) => sum + count * atomicWeights.get(element)! * 1e-3,
    0,
  );
}
