import { elementImbalance } from '../../kinetics/element-balance.js';
import { problemAt, type CaseContext, type CasePath } from '../case-context.js';
import type { SpeciesSection } from './build-species.js';

/** Molar masses as people round them. */
const massTolerance = 5e-3;

/** Atoms of both sides where all formulas are known, else their masses and a warning. */
export function checkBalance(
  context: CaseContext,
  path: CasePath,
  equation: string,
  stoichiometry: readonly number[],
  species: SpeciesSection,
): void {
  const involved = stoichiometry.flatMap((coefficient, i) => (coefficient === 0 ? [] : [i]));
  // A record with a fault of its own is silent here.
  if (involved.some((i) => !species.records[i])) return;
  const unknown = involved.filter((i) => !species.records[i]!.elements);
  if (unknown.length > 0) {
    problemAt(context, [...path, 'equation'], {
      code: 'missing_property',
      severity: 'warning',
      found: `no formula of ${unknown.map((i) => species.ids[i]!).join(', ')}`,
      expected: 'formulas of all species, so that the element balance can be checked',
    });
    checkMass(context, path, stoichiometry, species);
    return;
  }
  const imbalance = elementImbalance(
    stoichiometry,
    species.records.map((record) => record?.elements ?? {}),
  );
  if (imbalance.size === 0) return;
  const words = [...imbalance].map(([element, sum]) => {
    const size = Number(Math.abs(sum).toPrecision(6));
    return `${size} ${element} too ${sum > 0 ? 'many' : 'few'} on the right`;
  });
  problemAt(context, [...path, 'equation'], {
    code: 'element_balance',
    found: `\`${equation}\`, which does not balance: ${words.join(', ')}`,
    expected: 'the same atoms on both sides',
    mend: 'check the coefficients and the formulas of the species',
  });
}

/** Without formulas, at least the masses of both sides must agree. */
function checkMass(
  context: CaseContext,
  path: CasePath,
  stoichiometry: readonly number[],
  species: SpeciesSection,
): void {
  let sum = 0;
  let scale = 0;
  stoichiometry.forEach((coefficient, i) => {
    if (coefficient === 0) return;
    const mass = coefficient * species.records[i]!.molarMass;
    sum += mass;
    scale += Math.abs(mass) / 2;
  });
  if (Math.abs(sum) <= massTolerance * scale) return;
  problemAt(context, [...path, 'equation'], {
    code: 'element_balance',
    found: `sides whose masses differ by ${(100 * Math.abs(sum / scale)).toPrecision(2)} %`,
    expected: 'the same mass on both sides',
    mend: 'check the coefficients and the molar masses',
  });
}
