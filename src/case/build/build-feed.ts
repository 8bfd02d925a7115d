import { listNames } from '../../diagnostics/list-names.js';
import { didYouMean } from '../../diagnostics/nearest-name.js';
import { formatPath, keyProblemAt, problemAt, type CaseContext, type CasePath } from '../case-context.js';
import { reportUnknownKey, type SectionReading } from '../read-section.js';
import type { BedInput } from '../schema/bed-schema.js';
import type { OneOrEach } from '../schema/choices.js';
import type { FeedInput } from '../schema/feed-schema.js';
import type { SpeciesSection } from './build-species.js';
import { complete } from './holes.js';

/** Fractions that are all given must sum to one this closely: one unit in the sixth place. */
const sumTolerance = 1e-6;

/** mol/m³ of a mixture; undefined where it cannot be told. */
export type MolarDensity = (
  moleFractions: readonly number[],
  temperature: number,
  pressure: number,
) => number | undefined;

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
    keyProblemAt(context, [...path, key], {
      code: 'unknown_name',
      found: `\`${key}\`, which is no species of this case`,
      expected: `one of ${listNames(ids)}`,
      ...(mend !== undefined && { mend }),
    });
  }
  return strange.length === 0;
}

/**
 * Molar flows of the whole reactor, mol/s, in case order.
 *
 * @param molarDensity - of the feed, mol/m³; asked only where the flow is given by volume
 * @param bed - needed for a flux, a velocity or a space velocity; undefined where its section is at fault
 * @returns undefined where anything they follow from is missing or at fault, with a problem reported
 */
export function buildMolarFlows(
  context: CaseContext,
  reading: SectionReading<FeedInput>,
  species: SpeciesSection,
  bed: BedInput | undefined,
  molarDensity: MolarDensity,
): number[] | undefined {
  if (reading.isGiven('molar_flows')) return readMolarFlows(context, reading, species);
  const { values, isGiven } = reading;
  const given = flowKeys.filter(isGiven);
  if (given.length !== 1) {
    problemAt(context, given.length === 0 ? ['feed'] : ['feed', given[1]!], {
      code: given.length === 0 ? 'missing_key' : 'inconsistent',
      found: given.length === 0 ? 'no flow in `feed`' : given.map((key) => `\`${key}\``).join(' and '),
      expected: `exactly one of ${flowKeys.join(', ')} (or \`molar_flows\` of every species)`,
    });
  }
  const fractions = readFractions(context, reading, species);
  const { temperature, pressure } = values;
  const flow = given.length === 1 ? values[given[0]!] : undefined;
  const records = complete(species.records);
  if (flow === undefined || !fractions || !records || !bed) return undefined;
  if (temperature === undefined || pressure === undefined) return undefined;
  const meanMass = fractions.reduce((sum, y, i) => sum + y * records[i]!.molarMass, 0);
  const density = molarDensity(fractions, temperature, pressure);
  if (density === undefined) return undefined;
  const total = totalMolarFlow(given[0]!, flow, { molarDensity: density, meanMass }, bed);
  return fractions.map((y) => y * total);
}

/** Each species' own flow, which says amount and composition at once. */
function readMolarFlows(
  context: CaseContext,
  { values, isGiven }: SectionReading<FeedInput>,
  species: SpeciesSection,
): number[] | undefined {
  const path = ['feed', 'molar_flows'];
  const beside = [...flowKeys, 'mole_fractions' as const, 'mass_fractions' as const].filter(isGiven);
  if (beside.length > 0) {
    problemAt(context, path, {
      code: 'inconsistent',
      found: `\`molar_flows\` beside ${beside.map((key) => `\`${key}\``).join(', ')}`,
      expected: '`molar_flows` alone: it says amount and composition',
    });
  }
  const flows = values.molar_flows;
  if (!flows || !checkSpeciesKeys(context, path, Object.keys(flows), species.ids) || beside.length > 0) {
    return undefined;
  }
  const ordered = species.ids.map((id) => flows[id] ?? 0);
  if (ordered.some((flow) => flow > 0)) return ordered;
  problemAt(context, path, { code: 'out_of_range', found: 'no flow at all', expected: 'a flow above zero' });
  return undefined;
}

function totalMolarFlow(
  key: (typeof flowKeys)[number],
  value: number,
  { molarDensity, meanMass }: { readonly molarDensity: number; readonly meanMass: number },
  bed: BedInput,
): number {
  const section = (Math.PI / 4) * bed.tube_diameter ** 2 * (bed.tubes ?? 1);
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
  { values, isGiven }: SectionReading<FeedInput>,
  species: SpeciesSection,
): number[] | undefined {
  const keys = (['mole_fractions', 'mass_fractions'] as const).filter(isGiven);
  if (keys.length !== 1) {
    problemAt(context, keys.length > 0 ? ['feed', 'mass_fractions'] : ['feed'], {
      code: keys.length > 0 ? 'inconsistent' : 'missing_key',
      found: keys.length > 0 ? '`mole_fractions` and `mass_fractions`' : 'no composition in `feed`',
      expected: 'one of `mole_fractions` and `mass_fractions`',
    });
    return undefined;
  }
  const key = keys[0]!;
  const given = values[key];
  if (!given) return undefined;
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
  const shares = species.ids.map((id) => {
    const value = given[id];
    return value === 'balance' ? Math.max(0, 1 - sum) : (value ?? 0);
  });
  const amounts = key === 'mole_fractions' ? shares : toAmounts(shares, species);
  const total = amounts?.reduce((all, amount) => all + amount, 0);
  return amounts?.map((amount) => amount / total!);
}

/** Mass fractions over molar masses; undefined where a record is missing. */
function toAmounts(massFractions: readonly number[], species: SpeciesSection): number[] | undefined {
  const records = complete(species.records);
  return records && massFractions.map((fraction, i) => fraction / records[i]!.molarMass);
}

/** A value for each species, from one value or a map; `undefined` entries where a map is silent. */
export function perSpecies<Value>(
  context: CaseContext,
  path: CasePath,
  input: OneOrEach<Value>,
  ids: readonly string[],
): (Value | undefined)[] | undefined {
  if (input.kind === 'one') return ids.map(() => input.value);
  if (!checkSpeciesKeys(context, path, Object.keys(input.values), ids)) return undefined;
  return ids.map((id) => input.values[id]);
}

/** As {@link perSpecies}, for reactions. */
export function perReaction(
  context: CaseContext,
  path: CasePath,
  input: OneOrEach<number>,
  names: readonly (string | undefined)[],
): number[] | undefined {
  if (input.kind === 'one') return names.map(() => input.value);
  const { values } = input;
  const known = complete(names);
  // A reaction whose name could not be read may be the one that is meant.
  if (!known) return undefined;
  let isSound = true;
  for (const key of Object.keys(values)) {
    if (known.includes(key)) continue;
    isSound = false;
    reportUnknownKey(context, path, key, known);
  }
  for (const name of known) {
    if (values[name] !== undefined) continue;
    isSound = false;
    problemAt(context, path, {
      code: 'missing_key',
      found: `no value for the reaction \`${name}\` in \`${formatPath(path)}\``,
      expected: 'a value for every reaction',
    });
  }
  return isSound ? known.map((name) => values[name]!) : undefined;
}
