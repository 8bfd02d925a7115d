import { gasConstant } from '../../quantities/constants.js';
import type { SpeciesRecord } from '../../properties/species-record.js';
import { didYouMean } from '../../diagnostics/nearest-name.js';
import { formatPath, problemAt, type CaseContext, type CasePath } from '../case-context.js';
import { reportUnknownKey } from '../read-section.js';
import type { BedInput } from '../schema/bed-schema.js';
import type { FeedInput } from '../schema/feed-schema.js';
import type { SpeciesSection } from './build-species.js';

/** Fractions that are all given must sum to one this closely: one unit in the sixth place. */
const sumTolerance = 1e-6;

const flowKeys = [
  'molar_flow',
  'mass_flow',
  'mass_flux',
  'velocity',
  'volumetric_flow',
  'space_velocity',
] as const;

/** Reports every key that is no species; true when there was none. */
export function checkSpeciesKeys(
  context: CaseContext,
  path: CasePath,
  keys: readonly string[],
  ids: readonly string[],
): boolean {
  const strange = keys.filter((key) => !ids.includes(key));
  for (const key of strange) {
    const mend = didYouMean(key, ids);
    problemAt(context, [...path, key], {
      code: 'unknown_name',
      found: `\`${key}\`, which is no species of this case`,
      expected: `one of ${ids.join(', ')}`,
      ...(mend !== undefined && { mend }),
    });
  }
  return strange.length === 0;
}

/** Molar flows of the whole reactor, mol/s, in case order. */
export function buildMolarFlows(
  context: CaseContext,
  input: FeedInput,
  species: SpeciesSection,
  bed: BedInput | undefined,
): number[] | undefined {
  const given = flowKeys.filter((key) => input[key] !== undefined);
  if (input.molar_flows) {
    if (given.length > 0 || input.mole_fractions || input.mass_fractions) {
      problemAt(context, ['feed', 'molar_flows'], {
        code: 'inconsistent',
        found: `\`molar_flows\` beside \`${given[0] ?? (input.mole_fractions ? 'mole_fractions' : 'mass_fractions')}\``,
        expected: '`molar_flows` alone: it says amount and composition',
      });
      return undefined;
    }
    const flows = input.molar_flows;
    if (!checkSpeciesKeys(context, ['feed', 'molar_flows'], Object.keys(flows), species.ids))
      return undefined;
    const ordered = species.ids.map((id) => flows[id] ?? 0);
    if (ordered.some((flow) => flow > 0)) return ordered;
    problemAt(context, ['feed', 'molar_flows'], {
      code: 'out_of_range',
      found: 'no flow at all',
      expected: 'a flow above zero',
    });
    return undefined;
  }
  if (given.length !== 1) {
    problemAt(context, given.length === 0 ? ['feed'] : ['feed', given[1]!], {
      code: given.length === 0 ? 'missing_key' : 'inconsistent',
      found: given.length === 0 ? 'no flow in `feed`' : given.map((key) => `\`${key}\``).join(' and '),
      expected: `exactly one of ${flowKeys.join(', ')} (or \`molar_flows\` of every species)`,
    });
  }
  const fractions = readFractions(context, input, species);
  if (given.length !== 1 || !fractions || !bed || species.records.some((record) => !record)) return undefined;
  const records = species.records as readonly SpeciesRecord[];
  const meanMass = fractions.reduce((sum, y, i) => sum + y * records[i]!.molarMass, 0);
  const total = totalMolarFlow(given[0]!, input[given[0]!]!, input, bed, meanMass);
  return fractions.map((y) => y * total);
}

function totalMolarFlow(
  key: (typeof flowKeys)[number],
  value: number,
  feed: FeedInput,
  bed: BedInput,
  meanMass: number,
): number {
  const section = (Math.PI / 4) * bed.tube_diameter ** 2 * (bed.tubes ?? 1);
  const molarDensity = feed.pressure / (gasConstant * feed.temperature);
  switch (key) {
    case 'molar_flow':
      return value;
    case 'mass_flow':
      return value / meanMass;
    case 'mass_flux':
      return (value * section) / meanMass;
    case 'velocity':
      return value * section * molarDensity;
    case 'volumetric_flow':
      return value * molarDensity;
    case 'space_velocity':
      return value * section * bed.length * molarDensity;
  }
}

function readFractions(
  context: CaseContext,
  input: FeedInput,
  species: SpeciesSection,
): number[] | undefined {
  const key = input.mole_fractions ? 'mole_fractions' : 'mass_fractions';
  const given = input.mole_fractions ?? input.mass_fractions;
  if (!given || (input.mole_fractions && input.mass_fractions)) {
    problemAt(context, given ? ['feed', 'mass_fractions'] : ['feed'], {
      code: given ? 'inconsistent' : 'missing_key',
      found: given ? '`mole_fractions` and `mass_fractions`' : 'no composition in `feed`',
      expected: 'one of `mole_fractions` and `mass_fractions`',
    });
    return undefined;
  }
  const path = ['feed', key];
  if (!checkSpeciesKeys(context, path, Object.keys(given), species.ids)) return undefined;
  const balances = Object.entries(given).filter(([, value]) => value === 'balance');
  if (balances.length > 1) {
    problemAt(context, [...path, balances[1]![0]], {
      code: 'inconsistent',
      found: '`balance` a second time',
      expected: 'one species that makes up the balance',
    });
    return undefined;
  }
  const sum = Object.values(given).reduce<number>(
    (total, value) => (value === 'balance' ? total : total + value),
    0,
  );
  const isOff = balances.length === 1 ? sum > 1 + sumTolerance : Math.abs(sum - 1) > sumTolerance;
  if (isOff) {
    problemAt(context, path, {
      code: 'fraction_sum',
      found: `fractions that sum to ${Number(sum.toPrecision(8))}`,
      expected: balances.length === 1 ? 'at most 1, the balance aside' : '1',
      ...(balances.length === 0 && { mend: 'write `balance` for the species that makes up the rest' }),
    });
    return undefined;
  }
  const values = species.ids.map((id) => {
    const value = given[id];
    return value === 'balance' ? Math.max(0, 1 - sum) : (value ?? 0);
  });
  const shares = key === 'mole_fractions' ? values : toAmounts(values, species);
  const total = shares?.reduce((all, share) => all + share, 0);
  return shares?.map((share) => share / total!);
}

/** Mass fractions over molar masses; undefined where a record is missing. */
function toAmounts(values: readonly number[], species: SpeciesSection): number[] | undefined {
  if (species.records.some((record) => !record)) return undefined;
  return values.map((value, i) => value / species.records[i]!.molarMass);
}

/** A value for each species, from one value or a map; `undefined` entries where a map is silent. */
export function perSpecies(
  context: CaseContext,
  path: CasePath,
  input: number | Record<string, number>,
  ids: readonly string[],
): (number | undefined)[] | undefined {
  if (typeof input === 'number') return ids.map(() => input);
  if (!checkSpeciesKeys(context, path, Object.keys(input), ids)) return undefined;
  return ids.map((id) => input[id]);
}

/** As {@link perSpecies}, for reactions. */
export function perReaction(
  context: CaseContext,
  path: CasePath,
  input: number | Record<string, number>,
  names: readonly string[],
): number[] | undefined {
  if (typeof input === 'number') return names.map(() => input);
  let isSound = true;
  for (const key of Object.keys(input)) {
    if (names.includes(key)) continue;
    isSound = false;
    reportUnknownKey(context, path, key, names);
  }
  for (const name of names) {
    if (input[name] !== undefined) continue;
    isSound = false;
    problemAt(context, path, {
      code: 'missing_key',
      found: `no value for the reaction \`${name}\` in \`${formatPath(path)}\``,
      expected: 'a value for every reaction',
    });
  }
  return isSound ? names.map((name) => input[name]!) : undefined;
}
