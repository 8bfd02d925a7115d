import { constantExpression } from '../../expressions/build-expression.js';
import type { Expression } from '../../expressions/expression.js';
import { parseFormula } from '../../expressions/parse-formula.js';
import type { Dimension } from '../../quantities/dimension.js';
import {
  keyProblemAt,
  locate,
  problemAt,
  reportAt,
  type CaseContext,
  type CasePath,
} from '../case-context.js';
import { readSection } from '../read-section.js';
import { constantSchema } from '../schema/reaction-schema.js';
import { isIdentifier } from './build-species.js';

/** Constants by name, SI. */
export type Constants = Map<string, { readonly expression: Expression; readonly dimension: Dimension }>;

/** Names that a constant would hide. */
const reservedNames: ReadonlySet<string> = new Set([
  'T',
  'P',
  'R',
  'K_eq',
  'exp',
  'log',
  'log10',
  'sqrt',
  'abs',
  'min',
  'max',
  'p',
  'c',
  'y',
  'f',
]);

/**
 * Reads constants by name, in the order in which they stand: a formula may name those before it.
 *
 * @param path - of the map; nothing need stand there
 * @param outer - constants of the whole case, which a reaction's own ones hide
 * @returns the outer ones and those read; one at fault is missing
 */
export function readConstants(context: CaseContext, path: CasePath, outer: Constants): Constants {
  const constants: Constants = new Map(outer);
  const { node, isExact } = locate(context.root, path);
  if (!isExact) return constants;
  if (node.kind !== 'map') {
    if (path.length === 1)
      problemAt(context, path, { code: 'wrong_type', found: 'no map', expected: 'constants by name' });
    return constants;
  }
  for (const name of node.entries.keys()) {
    if (!isIdentifier(name) || reservedNames.has(name)) {
      keyProblemAt(context, [...path, name], {
        code: 'bad_identifier',
        found: `\`${name}\` as the name of a constant`,
        expected: reservedNames.has(name)
          ? `another name: \`${name}\` has a meaning of its own in rate laws`
          : 'a letter, then letters, digits and underscores',
      });
      constants.delete(name);
      continue;
    }
    const input = readSection(context, [...path, name], constantSchema);
    constants.delete(name);
    if (!input) continue;
    if (input.kind === 'defined') {
      constants.set(name, { expression: constantExpression(input.definition), dimension: input.dimension });
      continue;
    }
    const formula = parseFormula(
      input.text,
      { constants: new Map(constants), speciesIds: [], allowsTemperature: true, allowsPressure: false },
      reportAt(context, [...path, name, 'formula']),
    );
    if (formula) constants.set(name, formula);
  }
  return constants;
}

/** Names of constants that stand in the case, for the whole of it or for the reaction at `path`, and could not be read. */
export function missingConstants(
  context: CaseContext,
  path: CasePath,
  constants: Constants,
): ReadonlySet<string> {
  const names = [['constants'], [...path, 'constants']].flatMap((place) => {
    const { node, isExact } = locate(context.root, place);
    return isExact && node.kind === 'map' ? [...node.entries.keys()] : [];
  });
  return new Set(names.filter((name) => !constants.has(name)));
}
