/** What the case needs to know of its species, asked for only where it is needed; holes stand for what could not be read. */
import type { HeatSpecification, ReactorSpecification } from '../../bed/reactor-specification.js';
import type { ReactionRecord } from '../../kinetics/reaction-record.js';
import { createPropertyFunction } from '../../properties/fluid-property.js';
import type { SpeciesRecord } from '../../properties/species-record.js';
import { createSpeciesThermochemistry } from '../../properties/thermochemistry.js';
import { problemAt, type CaseContext, type CasePath } from '../case-context.js';
import { complete } from './holes.js';
import type { SpeciesSection } from './build-species.js';
import { isOwnRecord } from './species-source.js';

/** The parts of a case that its species' data hang on. */
export interface KnownParts {
  readonly species: SpeciesSection;
  readonly reactions: readonly (ReactionRecord | undefined)[];
  readonly stoichiometries: readonly (readonly number[] | undefined)[];
  readonly molarFlows: readonly number[] | undefined;
  readonly fluid: ReactorSpecification['fluid'] | undefined;
  readonly heatMode: HeatSpecification['mode'] | undefined;
  /** K and Pa of the feed. */
  readonly temperature: number | undefined;
  readonly pressure: number | undefined;
}

/** True where nothing is known to be missing or out of range. */
export function checkSpeciesData(context: CaseContext, parts: KnownParts): boolean {
  warnOfIdleSpecies(context, parts);
  const isHeatKnown =
    parts.heatMode === undefined || parts.heatMode === 'isothermal' || checkHeatData(context, parts);
  return checkSigns(context, parts) && isHeatKnown;
}

function warnOfIdleSpecies(context: CaseContext, { species, stoichiometries, molarFlows }: KnownParts): void {
  const equations = complete(stoichiometries);
  if (!equations || !molarFlows) return;
  species.ids.forEach((id, i) => {
    if (molarFlows[i]! > 0 || equations.some((coefficients) => coefficients[i] !== 0)) return;
    problemAt(context, ['species', id], {
      code: 'inconsistent',
      severity: 'warning',
      found: `${id}, which is neither fed nor part of a reaction`,
      expected: 'every species to have a part in the case',
    });
  });
}

/** The heat balance asks for data only where temperature can change. */
function checkHeatData(context: CaseContext, parts: KnownParts): boolean {
  const { species, reactions, stoichiometries, molarFlows, fluid } = parts;
  const reported = new Set<string>();
  const missing = (record: SpeciesRecord, property: string, why: string): void => {
    const key = `${record.id} ${property}`;
    if (reported.has(key)) return;
    reported.add(key);
    const where = isOwnRecord(record) ? '' : ' in the species library';
    problemAt(context, ['species', record.id], {
      code: 'missing_property',
      found: `no \`${property}\` of ${record.id}${where}`,
      expected: `it, since ${why}`,
      mend:
        property === 'heat_of_formation' || why.startsWith('reaction')
          ? 'add it, or give the reaction its `heat`'
          : 'add it, or give `heat_capacity` under `fluid`',
    });
  };
  for (const reaction of reactions) {
    if (!reaction || reaction.heat) continue;
    const why = `reaction \`${reaction.name}\` has no \`heat\` and the bed is not isothermal`;
    species.records.forEach((record, i) => {
      if (!record || reaction.stoichiometry[i] === 0) return;
      const isInPolynomial = record.heatCapacity?.kind === 'nasa';
      if (record.enthalpyOfFormation === undefined && !isInPolynomial) {
        missing(record, 'heat_of_formation', why);
      }
      if (!record.heatCapacity) missing(record, 'heat_capacity', why);
    });
  }
  if (fluid?.heatCapacity.kind === 'species') {
    species.records.forEach((record, i) => {
      const isPresent =
        (molarFlows?.[i] ?? 0) > 0 || stoichiometries.some((coefficients) => (coefficients?.[i] ?? 0) !== 0);
      if (record && isPresent && !record.heatCapacity) {
        missing(record, 'heat_capacity', 'the heat capacity of the mixture is taken from the species');
      }
    });
  }
  return reported.size === 0;
}

/** Formulas and polynomials are tried at the feed: a slip in one mostly shows in its sign. */
function checkSigns(context: CaseContext, parts: KnownParts): boolean {
  const { temperature, pressure, fluid, species } = parts;
  if (temperature === undefined || pressure === undefined) return true;
  let isSound = true;
  const check = (path: CasePath, what: string, value: number, unit: string): void => {
    if (value > 0 && value < Infinity) return;
    isSound = false;
    problemAt(context, path, {
      code: 'out_of_range',
      found: `a ${what} of ${Number.isNaN(value) ? 'no number' : `${value.toPrecision(3)} ${unit}`} at the feed’s ${temperature} K`,
      expected: `a ${what} above 0`,
    });
  };
  if (fluid && fluid.viscosity.kind !== 'estimate') {
    const { value } = createPropertyFunction(fluid.viscosity);
    check(['fluid', 'viscosity'], 'viscosity', value(temperature, pressure), 'Pa s');
  }
  if (fluid?.heatCapacity.kind === 'given') {
    const { per, property } = fluid.heatCapacity;
    const value = createPropertyFunction(property).value(temperature, pressure);
    check(['fluid', 'heat_capacity'], 'heat capacity', value, per === 'mass' ? 'J/(kg K)' : 'J/(mol K)');
  }
  for (const record of species.records) {
    if (!record?.heatCapacity || !isOwnRecord(record)) continue;
    const value = createSpeciesThermochemistry(record).heatCapacity(temperature);
    check(['species', record.id, 'heat_capacity'], 'heat capacity', value, 'J/(mol K)');
  }
  return isSound;
}
