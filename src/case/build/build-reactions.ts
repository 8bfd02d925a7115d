import type { CheckedFormula } from '../../expressions/expression.js';
import { parseFormula, type FormulaScope, type WrittenIn } from '../../expressions/parse-formula.js';
import { parseEquation } from '../../kinetics/parse-equation.js';
import type { RateBasis, ReactionRecord } from '../../kinetics/reaction-record.js';
import { formatDimension, sameDimension, type Dimension } from '../../quantities/dimension.js';
import { parseUnit } from '../../quantities/parse-unit.js';
import { locate, problemAt, reportAt, type CaseContext, type CasePath } from '../case-context.js';
import { readKeys, type SectionReading } from '../read-section.js';
import { reactionSchema, type ReactionInput } from '../schema/reaction-schema.js';
import { missingConstants, readConstants, type Constants } from './build-constants.js';
import { isIdentifier, type SpeciesSection } from './build-species.js';
import { checkBalance } from './check-balance.js';

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

/** The section `reactions` as far as it could be read; the lists run in parallel, with holes where something was at fault. */
export interface ReactionSection {
  readonly names: readonly (string | undefined)[];
  readonly stoichiometries: readonly (readonly number[] | undefined)[];
  readonly records: readonly (ReactionRecord | undefined)[];
}

const mostReactions = 100;

/** Reads the section `reactions`; undefined where there is none or it is no list. */
export function buildReactions(
  context: CaseContext,
  species: SpeciesSection | undefined,
  caseConstants: Constants,
): ReactionSection | undefined {
  const { node, isExact } = locate(context.root, ['reactions']);
  if (!isExact) return undefined;
  if (node.kind !== 'list' || node.items.length === 0 || node.items.length > mostReactions) {
    problemAt(context, ['reactions'], {
      code: 'wrong_type',
      found: node.kind === 'list' ? `${node.items.length} reactions` : 'no list',
      expected: 'a list of one to a hundred reactions, each behind a dash',
    });
    return undefined;
  }
  const names = new Set<string>();
  const read = node.items.map((_item, index) => readReaction(context, index, names, species, caseConstants));
  return {
    names: read.map((entry) => entry?.name),
    stoichiometries: read.map((entry) => entry?.stoichiometry),
    records: read.map((entry) => entry?.record),
  };
}

interface ReadReaction {
  readonly name?: string | undefined;
  readonly stoichiometry?: readonly number[] | undefined;
  readonly record?: ReactionRecord | undefined;
}

function readReaction(
  context: CaseContext,
  index: number,
  names: Set<string>,
  species: SpeciesSection | undefined,
  caseConstants: Constants,
): ReadReaction | undefined {
  const path: CasePath = ['reactions', index];
  const reading = readKeys(context, path, reactionSchema);
  if (!reading) return undefined;
  const { values } = reading;
  const name =
    values.name !== undefined && checkName(context, path, values.name, names) ? values.name : undefined;
  const constants = readConstants(context, [...path, 'constants'], caseConstants);
  if (!species) return { name };
  const equation =
    values.equation === undefined
      ? undefined
      : parseEquation(values.equation, species.ids, reportAt(context, [...path, 'equation']));
  if (equation) checkBalance(context, path, values.equation!, equation.stoichiometry, species);
  const rate = readRate(context, path, index, reading, species, constants);
  const stoichiometry = equation?.stoichiometry;
  if (!reading.isSound || name === undefined || !equation || !rate) return { name, stoichiometry };
  const record: ReactionRecord = {
    name,
    equation: values.equation!,
    isReversible: equation.isReversible,
    stoichiometry: equation.stoichiometry,
    rate,
    basis: values.per ?? 'catalyst_mass',
    ...(values.heat && { heat: values.heat }),
  };
  return { name, stoichiometry, record };
}

/** A name of its own, fit for a column of the results. */
function checkName(context: CaseContext, path: CasePath, name: string, names: Set<string>): boolean {
  if (!isIdentifier(name)) {
    problemAt(context, [...path, 'name'], {
      code: 'bad_identifier',
      found: `\`${name}\` as the name of a reaction`,
      expected: 'a letter, then letters, digits and underscores',
    });
    return false;
  }
  if (names.has(name)) {
    problemAt(context, [...path, 'name'], {
      code: 'inconsistent',
      found: `the name \`${name}\` a second time`,
      expected: 'a name of its own for each reaction',
    });
    return false;
  }
  names.add(name);
  return true;
}

/** The law, checked as far as what it names could be read. */
function readRate(
  context: CaseContext,
  path: CasePath,
  index: number,
  { values, isGiven }: SectionReading<ReactionInput>,
  species: SpeciesSection,
  constants: Constants,
): CheckedFormula | undefined {
  const writtenIn = values.written_in && readWrittenIn(context, path, values.written_in);
  if (values.rate === undefined || (isGiven('written_in') && !writtenIn)) return undefined;
  const text = values.rate.trimEnd();
  const missing = missingConstants(context, path, constants);
  const report = reportAt(context, [...path, 'rate']);
  const scope: FormulaScope = {
    constants,
    speciesIds: species.ids,
    allowsTemperature: true,
    allowsPressure: true,
    equilibriumReaction: index,
    ...(writtenIn && { writtenIn }),
  };
  const rate = parseFormula(text, scope, (fault) => {
    // A constant at fault is reported where it stands: a law that names it would only repeat that.
    if (!missing.has(text.slice(fault.span.start, fault.span.end))) report(fault);
  });
  // With a hole in what the law is made of, its dimension says nothing.
  if (!rate || missing.size > 0 || (isGiven('per') && values.per === undefined)) return undefined;
  const basis = values.per ?? 'catalyst_mass';
  const wanted = rateDimensions[basis];
  if (sameDimension(rate.dimension, wanted.dimension)) return rate;
  problemAt(context, [...path, 'rate'], {
    code: 'wrong_dimension',
    found: `a rate in ${formatDimension(rate.dimension)}`,
    expected: `${wanted.words} (${formatDimension(wanted.dimension)})`,
    mend: mendOfRate(rate.dimension, basis),
  });
  return undefined;
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
