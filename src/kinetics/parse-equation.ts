/** Reaction equations as text: `A + 10.5 O2 -> 8 CO2 + 5 H2O`, `CO + H2O <=> CO2 + H2`, `N2 + 3 H2 <=> 2 NH3`, `1/2 O2 + SO2 <=> SO3`. */
import { didYouMean } from '../diagnostics/nearest-name.js';
import type { ProblemCode, ReportFault } from '../diagnostics/problem.js';

/** An equation in numbers. */
export interface ParsedEquation {
  /** One per species in case order; negative for what stands on the left. */
  readonly stoichiometry: readonly number[];
  readonly isReversible: boolean;
}

const longest = 500;
const termPattern =
  /^(?<space>\s*)(?:(?<number>\d+\.?\d*|\.\d+)(?:\s*\/\s*(?<divisor>\d+\.?\d*))?\s*\*?\s*)?(?<name>[A-Za-z][A-Za-z0-9_]*)\s*$/;

/** @param report - receives every fault of the equation, offsets within `text` */
export function parseEquation(
  text: string,
  speciesIds: readonly string[],
  report: ReportFault,
): ParsedEquation | undefined {
  let faultCount = 0;
  const fault = (
    code: ProblemCode,
    start: number,
    end: number,
    found: string,
    expected: string,
    mend?: string,
  ): void => {
    faultCount++;
    // Where nothing stands, the character before the end of the text is shown.
    const shown = Math.max(0, Math.min(start, text.length - 1));
    const span = { start: shown, end: Math.max(end, shown + 1) };
    report({ code, severity: 'error', span, found, expected, ...(mend !== undefined && { mend }) });
  };
  const shape = 'an equation such as `A + 3 O2 -> P + 3 H2O`';
  if (text.length > longest) {
    fault('wrong_value', 0, text.length, `an equation of ${text.length} characters`, shape);
    return undefined;
  }
  const arrows = [...text.matchAll(/<=>|->|=>|<->|<-|→|⇌|=/g)];
  const arrow = arrows[0];
  if (!arrow || arrows.length > 1 || (arrow[0] !== '->' && arrow[0] !== '<=>')) {
    const at = arrows.find((found) => found[0] !== '->' && found[0] !== '<=>') ?? arrows[1] ?? arrow;
    fault(
      'wrong_value',
      at?.index ?? 0,
      at ? at.index + at[0].length : text.length,
      at ? `\`${at[0]}\`` : 'no arrow',
      'one arrow: `->`, or `<=>` for a reversible reaction',
    );
    return undefined;
  }
  const stoichiometry = speciesIds.map(() => 0);
  const readSide = (start: number, end: number, sign: 1 | -1): void => {
    let at = start;
    for (const term of text.slice(start, end).split('+')) {
      const termStart = at + (term.length - term.trimStart().length);
      const termEnd = at + term.trimEnd().length;
      at += term.length + 1;
      const match = termPattern.exec(term);
      if (!match) {
        fault(
          'wrong_value',
          termStart,
          termEnd,
          term.trim() === '' ? 'nothing' : `\`${term.trim()}\``,
          'a species, with a number before it or none',
        );
        continue;
      }
      const { number, divisor, name } = match.groups!;
      const nameStart = termEnd - name!.length;
      const index = speciesIds.indexOf(name!);
      if (index < 0) {
        fault(
          'unknown_name',
          nameStart,
          termEnd,
          `\`${name!}\`, which is no species of this case`,
          `one of ${speciesIds.join(', ')}`,
          didYouMean(name!, speciesIds),
        );
        continue;
      }
      const coefficient = Number(number ?? 1) / Number(divisor ?? 1);
      if (!(coefficient > 0 && coefficient < 1000)) {
        fault(
          'out_of_range',
          termStart,
          nameStart,
          `the coefficient ${term
            .trim()
            .slice(0, nameStart - termStart)
            .trim()}`,
          'a number above 0 and below 1000',
        );
        continue;
      }
      stoichiometry[index]! += sign * coefficient;
    }
  };
  readSide(0, arrow.index, -1);
  readSide(arrow.index + arrow[0].length, text.length, 1);
  if (faultCount === 0 && stoichiometry.every((coefficient) => coefficient === 0)) {
    fault(
      'wrong_value',
      0,
      text.length,
      'an equation whose sides are the same',
      'a reaction that changes something',
    );
  }
  return faultCount === 0 ? { stoichiometry, isReversible: arrow[0] === '<=>' } : undefined;
}
