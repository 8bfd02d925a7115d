/** Diffusion in the pores, conduction and film of the pellet: given, or what their estimates follow from. */
import type { Assumption } from '../../bed/reactor-specification.js';
import type {
  FilmSpecification,
  LocalProperty,
  PelletTransportSpecification,
} from '../../pellet/pellet-specification.js';
import type { PoreStructure } from '../../pellet/pores/pore-structure.js';
import { typicalSolidConductivity } from '../../pellet/effective-conductivity.js';
import { problemAt, type CaseContext } from '../case-context.js';
import type { SectionReading } from '../read-section.js';
import type { HeatInput } from '../schema/bed-schema.js';
import type { PropertyValue } from '../schema/leaves.js';
import type { PelletInput } from '../schema/pellet-schema.js';
import { perSpecies } from './build-feed.js';
import { toProperty } from './to-property.js';

/** What a pellet's data are needed for, as far as the case's other sections could be read. */
export interface PelletNeeds {
  readonly speciesIds: readonly string[];
  readonly reactionNames: readonly (string | undefined)[];
  /** True for species that take part in a reaction. */
  readonly isActive: readonly boolean[];
  /** Undefined where the section `heat` is at fault: then nothing is asked for that hangs on it. */
  readonly heatMode: HeatInput['mode'] | undefined;
  readonly assumptions: Assumption[];
}

/** Reports that something is missing and why it is needed. */
export type Missing = (key: keyof PelletInput, why: string, example: string) => void;

const resistanceFree = { kind: 'constant', value: Infinity } as const;
/** Fractions of the pore volume must sum to one this closely. */
const sumTolerance = 1e-6;

/**
 * @param method - how the effect of diffusion is worked out; `intrinsic` and `fixed` need no transport
 * @returns undefined where anything is missing or at fault, with a problem reported
 */
export function buildPelletTransport(
  context: CaseContext,
  reading: SectionReading<PelletInput>,
  needs: PelletNeeds,
  method: 'full' | 'thiele' | 'fixed' | 'intrinsic',
  missing: Missing,
): PelletTransportSpecification | undefined {
  const isResolved = method === 'full' || method === 'thiele';
  const hasInnerHeat = method === 'full' && needs.heatMode !== undefined && needs.heatMode !== 'isothermal';
  const diffusivities = buildDiffusivities(context, reading, needs, isResolved, missing);
  const isEstimated = diffusivities?.some((property) => property.kind === 'estimate') ?? false;
  const pores = isEstimated ? buildPores(context, reading, needs, missing) : undefined;
  const conductivity = hasInnerHeat ? buildConductivity(reading, needs, missing) : resistanceFree;
  const film = isResolved ? buildFilm(context, reading, needs, missing) : ({ kind: 'none' } as const);
  if (!diffusivities || !film || !conductivity || (isEstimated && !pores)) return undefined;
  return {
    effectiveDiffusivities: diffusivities,
    ...(pores && { pores }),
    thermalConductivity: conductivity,
    film,
  };
}

function buildDiffusivities(
  context: CaseContext,
  { values, isGiven }: SectionReading<PelletInput>,
  needs: PelletNeeds,
  isResolved: boolean,
  missing: Missing,
): LocalProperty[] | undefined {
  const path = ['pellet', 'effective_diffusivity'];
  const estimate = needs.isActive.map((active) =>
    active && isResolved ? ({ kind: 'estimate' } as const) : resistanceFree,
  );
  if (!isGiven('effective_diffusivity')) {
    if (!isResolved) return estimate;
    if (isGiven('porosity') || isGiven('pore_radius') || isGiven('pores')) return estimate;
    missing(
      'effective_diffusivity',
      'diffusion in the pores is computed',
      '{A: 1.3e-6 m^2/s, …}` or the pores it is to be estimated from, `porosity: 0.45`, `tortuosity: 3`, `pore_radius: 8 nm',
    );
    return undefined;
  }
  const input = values.effective_diffusivity;
  if (input === undefined) return undefined;
  if (input === 'estimate') return estimate;
  const given = perSpecies(context, path, input, needs.speciesIds);
  return given && complete(context, path, given, needs, isResolved, 'effective diffusivity');
}

/** The pore structure, each part of it asked for. */
function buildPores(
  context: CaseContext,
  { values, isGiven }: SectionReading<PelletInput>,
  needs: PelletNeeds,
  missing: Missing,
): PoreStructure | undefined {
  const { porosity, tortuosity, pore_radius, pores, pore_model, hindrance } = values;
  const model = pore_model === 'random_pore' ? 'random' : 'parallel';
  const why = 'effective diffusivities are estimated from the pores';
  missing('porosity', why, '0.45');
  if (model === 'parallel') missing('tortuosity', why, '3');
  if (isGiven('pore_radius') === isGiven('pores')) {
    if (isGiven('pores')) {
      problemAt(context, ['pellet', 'pores'], {
        code: 'inconsistent',
        found: '`pores` beside `pore_radius`',
        expected: 'one of the two',
      });
    } else missing('pore_radius', why, '8 nm');
    return undefined;
  }
  const classes = pores ?? (pore_radius === undefined ? undefined : [{ radius: pore_radius, fraction: 1 }]);
  if (!classes || porosity === undefined) return undefined;
  const total = classes.reduce((sum, { fraction }) => sum + fraction, 0);
  if (Math.abs(total - 1) > sumTolerance) {
    problemAt(context, ['pellet', 'pores'], {
      code: 'fraction_sum',
      found: `fractions of the pore volume that sum to ${Number(total.toPrecision(8))}`,
      expected: '1',
    });
    return undefined;
  }
  if (model === 'random' && classes.length !== 2) {
    problemAt(context, ['pellet', 'pore_model'], {
      code: 'inconsistent',
      found: `\`random_pore\` with ${classes.length === 1 ? 'one size' : `${classes.length} sizes`} of pores`,
      expected: 'two sizes under `pores`, micropores and macropores',
    });
    return undefined;
  }
  if (model === 'random' && tortuosity !== undefined) {
    problemAt(context, ['pellet', 'tortuosity'], {
      code: 'inconsistent',
      found: '`tortuosity` beside `pore_model: random_pore`',
      expected: 'no tortuosity: the model has none',
    });
    return undefined;
  }
  if (model === 'parallel' && tortuosity === undefined) return undefined;
  if (hindrance === undefined) {
    needs.assumptions.push({
      about: 'pellet.hindrance',
      statement:
        'molecules are small against the pores: their walls do not slow them beyond Knudsen diffusion',
      source: 'default',
    });
  }
  return { porosity, tortuosity: tortuosity ?? 1, pores: classes, model, hindrance: hindrance ?? 'none' };
}

function buildConductivity(
  { values, isGiven }: SectionReading<PelletInput>,
  needs: PelletNeeds,
  missing: Missing,
): PelletTransportSpecification['thermalConductivity'] | undefined {
  const { thermal_conductivity, solid_conductivity, porosity } = values;
  const why = 'temperature varies inside the pellet of a bed that is not isothermal';
  const isEstimated = thermal_conductivity === 'estimate' || !isGiven('thermal_conductivity');
  if (!isEstimated) return thermal_conductivity && toProperty(thermal_conductivity);
  if (!isGiven('porosity')) {
    missing('thermal_conductivity', why, '0.35 W/(m K)');
    if (thermal_conductivity === 'estimate')
      missing('porosity', 'the pellet’s conductivity is estimated from it', '0.45');
    return undefined;
  }
  if (porosity === undefined) return undefined;
  if (!isGiven('solid_conductivity')) {
    needs.assumptions.push({
      about: 'pellet.solid_conductivity',
      statement: `the pellet’s solid conducts ${typicalSolidConductivity.value} W/(m K), between its grains included; a guess good to a factor of about three`,
      source: typicalSolidConductivity.source,
    });
  } else if (solid_conductivity === undefined) return undefined;
  return { kind: 'phases', solid: solid_conductivity ?? typicalSolidConductivity.value, porosity };
}

function buildFilm(
  context: CaseContext,
  { values, isGiven }: SectionReading<PelletInput>,
  needs: PelletNeeds,
  missing: Missing,
): FilmSpecification | undefined {
  const { film } = values;
  if (!isGiven('film')) {
    missing('film', 'it lies between fluid and pellet', 'estimate` or `film: none');
    return undefined;
  }
  if (film === undefined) return undefined;
  if (film === 'none') {
    needs.assumptions.push({
      about: 'pellet.film',
      statement: 'no resistance in the film around the pellet',
      source: 'case: pellet.film',
    });
    return { kind: 'none' };
  }
  if (film === 'estimate') return { kind: 'correlation', name: 'wakao_funazkri' };
  const { correlation, mass_transfer, heat_transfer } = film;
  const path = ['pellet', 'film'];
  if (correlation !== undefined) {
    if (mass_transfer === undefined && heat_transfer === undefined)
      return { kind: 'correlation', name: correlation };
    problemAt(context, path, {
      code: 'inconsistent',
      found: '`correlation` beside coefficients',
      expected: 'one or the other',
    });
    return undefined;
  }
  // Where the mode of the bed could not be read, the heat transfer coefficient is not asked for.
  const isHeatNeeded = needs.heatMode !== undefined && needs.heatMode !== 'isothermal';
  if (mass_transfer === undefined || (heat_transfer === undefined && isHeatNeeded)) {
    const key = mass_transfer === undefined ? 'mass_transfer' : 'heat_transfer';
    problemAt(context, path, {
      code: 'missing_property',
      found: `no \`${key}\` in \`pellet.film\``,
      expected: 'both coefficients of the film, `correlation: …`, or `film: none`',
    });
    return undefined;
  }
  const massPath = [...path, 'mass_transfer'];
  const given = perSpecies(context, massPath, mass_transfer, needs.speciesIds);
  const massTransfer = given && complete(context, massPath, given, needs, true, 'film coefficient');
  if (!massTransfer) return undefined;
  const heatTransfer = isHeatNeeded ? toProperty(heat_transfer!) : resistanceFree;
  return { kind: 'given', massTransfer, heatTransfer };
}

/** Every species that reacts must have a value; the others need none. */
function complete(
  context: CaseContext,
  path: readonly string[],
  given: readonly (PropertyValue | undefined)[],
  needs: PelletNeeds,
  isNeeded: boolean,
  what: string,
): Exclude<LocalProperty, { kind: 'estimate' }>[] | undefined {
  const absent = isNeeded
    ? needs.speciesIds.filter((_id, i) => given[i] === undefined && needs.isActive[i])
    : [];
  for (const id of absent) {
    problemAt(context, path, {
      code: 'missing_property',
      found: `no ${what} of ${id}`,
      expected: 'it, since it takes part in a reaction',
    });
  }
  return absent.length > 0 ? undefined : given.map((value) => (value ? toProperty(value) : resistanceFree));
}
