import type { Assumption } from '../../bed/reactor-specification.js';
import type { PelletGeometry, PelletMethod, PelletSpecification } from '../../pellet/pellet-specification.js';
import { longCylinderGeometry, slabGeometry, sphereGeometry } from '../../pellet/shapes.js';
import { problemAt, type CaseContext } from '../case-context.js';
import type { SectionReading } from '../read-section.js';
import type { HeatInput } from '../schema/bed-schema.js';
import type { PelletInput } from '../schema/pellet-schema.js';
import { perReaction, perSpecies } from './build-feed.js';

/** What a pellet's data are needed for, as far as the case's other sections could be read. */
interface PelletNeeds {
  readonly speciesIds: readonly string[];
  readonly reactionNames: readonly (string | undefined)[];
  /** True for species that take part in a reaction. */
  readonly isActive: readonly boolean[];
  /** Undefined where the section `heat` is at fault: then nothing is asked for that hangs on it. */
  readonly heatMode: HeatInput['mode'] | undefined;
  readonly assumptions: Assumption[];
}

/** Reports that something is missing and why it is needed. */
type Missing = (key: keyof PelletInput, why: string, example: string) => void;

/**
 * The pellet, with what the case needs of it asked for.
 *
 * @returns undefined where anything is missing or at fault, with a problem reported
 */
export function buildPellet(
  context: CaseContext,
  reading: SectionReading<PelletInput>,
  needs: PelletNeeds,
): PelletSpecification | undefined {
  const { values, isGiven } = reading;
  const missing: Missing = (key, why, example) => {
    if (isGiven(key)) return;
    problemAt(context, ['pellet'], {
      code: 'missing_property',
      found: `no \`${key}\` in \`pellet\``,
      expected: `it, since ${why}`,
      mend: `add \`${key}: ${example}\``,
    });
  };
  missing('shape', 'rates, friction and diffusion need the pellet’s size', '{sphere: {diameter: 4 mm}}');
  missing('density', 'catalyst mass follows from it', '1800 kg/m^3');
  const method = isGiven('method') ? toMethod(context, values.method, needs) : defaultMethod(needs);
  const isResolved = method?.kind === 'full' || method?.kind === 'thiele';
  const isIsothermal = needs.heatMode === 'isothermal';
  const needsConductivity = method?.kind === 'full' && needs.heatMode !== undefined && !isIsothermal;
  if (needsConductivity) {
    const why = 'temperature varies inside the pellet of a bed that is not isothermal';
    missing('thermal_conductivity', why, '0.35 W/(m K)');
  }
  const diffusivities = resolveDiffusivities(context, values, needs, isResolved, missing);
  const film = resolveFilm(context, values, needs, isResolved, missing);
  noteAssumptions(needs, isResolved && isIsothermal, !isGiven('activity'));
  const { shape, density, thermal_conductivity } = values;
  if (!reading.isSound || !method || !diffusivities || !film) return undefined;
  if (!shape || density === undefined) return undefined;
  if (needsConductivity && thermal_conductivity === undefined) return undefined;
  return {
    geometry: toGeometry(shape),
    method,
    density,
    activity: values.activity ?? 1,
    effectiveDiffusivities: diffusivities,
    thermalConductivity: needsConductivity ? (thermal_conductivity as number) : Infinity,
    film,
  };
}

function noteAssumptions(needs: PelletNeeds, isIsothermalInside: boolean, isFresh: boolean): void {
  if (isIsothermalInside) {
    needs.assumptions.push({
      about: 'pellet',
      statement: 'film and pellet are at the bed’s temperature, since the bed is isothermal',
      source: 'case: heat.mode',
    });
  }
  if (isFresh) {
    needs.assumptions.push({
      about: 'pellet.activity',
      statement: 'activity 1: fresh catalyst',
      source: 'default',
    });
  }
}

function toGeometry(shape: NonNullable<PelletInput['shape']>): PelletGeometry {
  if (shape.sphere) return sphereGeometry(shape.sphere.diameter);
  if (shape.slab) return slabGeometry(shape.slab.thickness);
  return longCylinderGeometry(shape.cylinder!.diameter);
}

function defaultMethod(needs: PelletNeeds): PelletMethod {
  needs.assumptions.push({
    about: 'pellet.method',
    statement: 'the reaction–diffusion problem is solved in the pellet at every position (`full`)',
    source: 'default',
  });
  return { kind: 'full' };
}

function toMethod(
  context: CaseContext,
  method: PelletInput['method'],
  needs: PelletNeeds,
): PelletMethod | undefined {
  if (method === undefined) return undefined;
  if (typeof method === 'string') return { kind: method };
  const effectiveness = perReaction(
    context,
    ['pellet', 'method', 'fixed', 'effectiveness'],
    method.fixed.effectiveness,
    needs.reactionNames,
  );
  return effectiveness && { kind: 'fixed', effectiveness };
}

function resolveDiffusivities(
  context: CaseContext,
  input: SectionReading<PelletInput>['values'],
  needs: PelletNeeds,
  isNeeded: boolean,
  missing: Missing,
): number[] | undefined {
  const inert = needs.speciesIds.map(() => Infinity);
  if (input.effective_diffusivity === undefined) {
    if (isNeeded)
      missing('effective_diffusivity', 'diffusion in the pores is computed', '{A: 1.3e-6 m^2/s, …}');
    return isNeeded ? undefined : inert;
  }
  const given = perSpecies(
    context,
    ['pellet', 'effective_diffusivity'],
    input.effective_diffusivity,
    needs.speciesIds,
  );
  if (!given) return undefined;
  if (!isNeeded) return given.map((value) => value ?? Infinity);
  return complete(
    context,
    ['pellet', 'effective_diffusivity'],
    given,
    needs,
    'effective diffusivity',
    'it takes part in a reaction',
  );
}

function resolveFilm(
  context: CaseContext,
  input: SectionReading<PelletInput>['values'],
  needs: PelletNeeds,
  isNeeded: boolean,
  missing: Missing,
): PelletSpecification['film'] | undefined {
  const none = { massTransfer: needs.speciesIds.map(() => Infinity), heatTransfer: Infinity };
  if (!isNeeded) return none;
  if (input.film === undefined) {
    missing(
      'film',
      'it lies between fluid and pellet',
      '{mass_transfer: 0.075 m/s, heat_transfer: 190 W/(m^2 K)}` or `film: none',
    );
    return undefined;
  }
  if (input.film === 'none') {
    needs.assumptions.push({
      about: 'pellet.film',
      statement: 'no resistance in the film around the pellet',
      source: 'case: pellet.film',
    });
    return none;
  }
  const { mass_transfer, heat_transfer } = input.film;
  const path = ['pellet', 'film'];
  // Where the mode of the bed could not be read, the heat transfer coefficient is not asked for.
  const isHeatNeeded = needs.heatMode !== undefined && needs.heatMode !== 'isothermal';
  if (mass_transfer === undefined || (heat_transfer === undefined && isHeatNeeded)) {
    const key = mass_transfer === undefined ? 'mass_transfer' : 'heat_transfer';
    problemAt(context, path, {
      code: 'missing_property',
      found: `no \`${key}\` in \`pellet.film\``,
      expected: 'both coefficients of the film, or `film: none`',
    });
    return undefined;
  }
  const given = perSpecies(context, [...path, 'mass_transfer'], mass_transfer, needs.speciesIds);
  const massTransfer =
    given &&
    complete(
      context,
      [...path, 'mass_transfer'],
      given,
      needs,
      'film coefficient',
      'it takes part in a reaction',
    );
  return massTransfer && { massTransfer, heatTransfer: isHeatNeeded ? heat_transfer! : Infinity };
}

/** Every species that reacts must have a value; the others need none. */
function complete(
  context: CaseContext,
  path: readonly string[],
  given: readonly (number | undefined)[],
  needs: PelletNeeds,
  what: string,
  why: string,
): number[] | undefined {
  const absent = needs.speciesIds.filter((_id, i) => given[i] === undefined && needs.isActive[i]);
  for (const id of absent) {
    problemAt(context, path, {
      code: 'missing_property',
      found: `no ${what} of ${id}`,
      expected: `it, since ${why}`,
    });
  }
  return absent.length > 0 ? undefined : given.map((value) => value ?? Infinity);
}
