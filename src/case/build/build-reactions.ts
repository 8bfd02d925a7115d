import { constantExpression } from '../../expressions/build-expression.js';
import type { Expression } from '../../expressions/expression.js';
import { parseFormula, type FormulaScope, type WrittenIn } from '../../expressions/parse-formula.js';
import { elementImbalance } from '../../kinetics/element-balance.js';
import { parseEquation } from '../../kinetics/parse-equation.js';
import type { RateBasis, ReactionRecord } from '../../kinetics/reaction-record.js';
import { formatDimension, sameDimension, type Dimension } from '../../quantities/dimension.js';
import { parseUnit } from '../../quantities/parse-unit.js';
import {
  keyProblemAt,
  locate,
  problemAt,
  reportAt,
  type CaseContext,
  type CasePath,
} from '../case-context.js';
import { readSection } from '../read-section.js';
import { constantSchema, reactionSchema, type ReactionInput } from '../schema/reaction-schema.js';
import { isIdentifier, type SpeciesSection } from './build-species.js';

type Constants = Map<string, { readonly expression: Expression; readonly dimension: Dimension }>;

const rateDimensions: Readonly<Record<RateBasis, { readonly dimension: Dimension; readonly words: string }>> =
  {
    catalyst_mass: {
      dimension: [-1, 0, -1, 1, 0],
      words: 'amount per time per catalyst mass, as mol/(kg s)',
    },
    pellet_volume: {
      dimension: [0, -3, -1, 1, 0],
      words: 'amount per time per pellet volume, as mol/(m^3 s)',
    },
    bed_volume: { dimension: [0, -3, -1, 1, 0], words: 'amount per time per bed volume, as mol/(m^3 s)' },
  };

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

/** Constants of the whole case. */
export function buildCaseConstants(context: CaseContext): Constants {
  return readConstants(context, ['constants'], new Map());
}

export function buildReactions(
  context: CaseContext,
  species: SpeciesSection | undefined,
  caseConstants: Constants,
): (ReactionRecord | undefined)[] | undefined {
  const { node, isExact } = locate(context.root, ['reactions']);
  if (!isExact) return undefined;
  if (node.kind !== 'list' || node.items.length === 0 || node.items.length > 100) {
    problemAt(context, ['reactions'], {
      code: 'wrong_type',
      found: node.kind === 'list' ? `${node.items.length} reactions` : 'no list',
      expected: 'a list of one to a hundred reactions, each behind a dash',
    });
    return undefined;
  }
  const names = new Set<string>();
  return node.items.map((_item, index) => {
    const path: CasePath = ['reactions', index];
    const input = readSection(context, path, reactionSchema);
    if (!input) return undefined;
    if (!isIdentifier(input.name)) {
      problemAt(context, [...path, 'name'], {
        code: 'bad_identifier',
        found: `\`${input.name}\` as the name of a reaction`,
        expected: 'a letter, then letters, digits and underscores',
      });
      return undefined;
    }
    if (names.has(input.name)) {
      problemAt(context, [...path, 'name'], {
        code: 'inconsistent',
        found: `the name \`${input.name}\` a second time`,
        expected: 'a name of its own for each reaction',
      });
    }
    names.add(input.name);
    return species && toReaction(context, path, index, input, species, caseConstants);
  });
}

function toReaction(
  context: CaseContext,
  path: CasePath,
  index: number,
  input: ReactionInput,
  species: SpeciesSection,
  caseConstants: Constants,
): ReactionRecord | undefined {
  const equation = parseEquation(input.equation, species.ids, reportAt(context, [...path, 'equation']));
  if (equation) checkElements(context, path, input, equation.stoichiometry, species);
  const constants = readConstants(context, [...path, 'constants'], caseConstants);
  const basis = input.per ?? 'catalyst_mass';
  const writtenIn = input.written_in && readWrittenIn(context, path, input.written_in);
  if (input.written_in && !writtenIn) return undefined;
  // Faults of constants are reported already: a law that names them would only repeat them.
  if (hasMissingConstant(context, path, constants)) return undefined;
  const scope: FormulaScope = {
    constants,
    speciesIds: species.ids,
    allowsTemperature: true,
    allowsPressure: true,
    equilibriumReaction: index,
    ...(writtenIn && { writtenIn }),
  };
  const rate = parseFormula(input.rate.trimEnd(), scope, reportAt(context, [...path, 'rate']));
  if (!rate || !equation) return undefined;
  const wanted = rateDimensions[basis];
  if (!sameDimension(rate.dimension, wanted.dimension)) {
    problemAt(context, [...path, 'rate'], {
      code: 'wrong_dimension',
      found: `a rate in ${formatDimension(rate.dimension)}`,
      expected: `${wanted.words} (${formatDimension(wanted.dimension)})`,
      mend: mendOfRate(rate.dimension, basis),
    });
    return undefined;
  }
  return {
    name: input.name,
    equation: input.equation,
    isReversible: equation.isReversible,
    stoichiometry: equation.stoichiometry,
    rate,
    basis,
    ...(input.heat && { heat: input.heat }),
  };
}

function mendOfRate(found: Dimension, basis: RateBasis): string {
  const other = (['catalyst_mass', 'pellet_volume'] as const).find(
    (entry) => entry !== basis && sameDimension(rateDimensions[entry].dimension, found),
  );
  if (other === 'catalyst_mass') return 'leave `per` out: the law refers to catalyst mass';
  if (other === 'pellet_volume')
    return 'say what volume it refers to: `per: pellet_volume` or `per: bed_volume`';
  return 'check the units of the constants and the orders in the law';
}

function checkElements(
  context: CaseContext,
  path: CasePath,
  input: ReactionInput,
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
    found: `\`${input.equation}\`, which does not balance: ${words.join(', ')}`,
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
  if (Math.abs(sum) <= 5e-3 * scale) return;
  problemAt(context, [...path, 'equation'], {
    code: 'element_balance',
    found: `sides whose masses differ by ${(100 * Math.abs(sum / scale)).toPrecision(2)} %`,
    expected: 'the same mass on both sides',
    mend: 'check the coefficients and the molar masses',
  });
}

function readConstants(context: CaseContext, path: CasePath, outer: Constants): Constants {
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

/** True where a constant of this reaction could not be read. */
function hasMissingConstant(context: CaseContext, path: CasePath, constants: Constants): boolean {
  const { node, isExact } = locate(context.root, [...path, 'constants']);
  return isExact && node.kind === 'map' && [...node.entries.keys()].some((name) => !constants.has(name));
}

const unitKinds: readonly (readonly ['p' | 'c' | 'T', Dimension, string])[] = [
  ['p', [1, -1, -2, 0, 0], 'a unit of pressure'],
  ['c', [0, -3, 0, 1, 0], 'a unit of concentration'],
  ['T', [0, 0, 0, 0, 1], 'kelvin'],
];

function readWrittenIn(
  context: CaseContext,
  path: CasePath,
  input: NonNullable<ReactionInput['written_in']>,
): WrittenIn | undefined {
  const factors: Partial<Record<'p' | 'c' | 'T', number>> = {};
  let isSound = true;
  const wrong = (key: string, found: string, expected: string): void => {
    isSound = false;
    problemAt(context, [...path, 'written_in', key], {
      code: 'wrong_dimension',
      found: `\`${found}\``,
      expected,
    });
  };
  for (const [key, dimension, words] of unitKinds) {
    const text = input[key];
    if (text === undefined) continue;
    const unit = parseUnit(text, reportAt(context, [...path, 'written_in', key]));
    if (!unit) isSound = false;
    else if (!sameDimension(unit.dimension, dimension) || unit.offset !== undefined) wrong(key, text, words);
    else factors[key] = unit.factor;
  }
  const rate = parseUnit(input.rate, reportAt(context, [...path, 'written_in', 'rate']));
  if (!rate) return undefined;
  if (!isSound) return undefined;
  return {
    ...(factors.p !== undefined && { pressure: factors.p }),
    ...(factors.c !== undefined && { concentration: factors.c }),
    ...(factors.T !== undefined && { temperature: factors.T }),
    result: { factor: rate.factor, dimension: rate.dimension },
  };
}
