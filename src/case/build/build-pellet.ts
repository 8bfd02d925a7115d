import type { Assumption } from '../../bed/reactor-specification.js';
import type { PelletGeometry, PelletMethod, PelletSpecification } from '../../pellet/pellet-specification.js';
import { longCylinderGeometry, slabGeometry, sphereGeometry } from '../../pellet/shapes.js';
import { problemAt, type CaseContext } from '../case-context.js';
import type { HeatInput } from '../schema/bed-schema.js';
import type { PelletInput } from '../schema/pellet-schema.js';
import { perReaction, perSpecies } from './build-feed.js';

/** What a pellet's data are needed for. */
interface PelletNeeds {
  readonly speciesIds: readonly string[];
  readonly reactionNames: readonly string[];
  /** True for species that take part in a reaction. */
  readonly isActive: readonly boolean[];
  readonly heat: HeatInput | undefined;
  /** A rate law per catalyst mass, or any report of catalyst mass, needs the density. */
  readonly assumptions: Assumption[];
}

export function buildPellet(
  context: CaseContext,
  input: PelletInput,
  needs: PelletNeeds,
): PelletSpecification | undefined {
  let isSound = true;
  const missing = (key: string, why: string, example: string): void => {
    isSound = false;
    problemAt(context, ['pellet'], {
      code: 'missing_property',
      found: `no \`${key}\` in \`pellet\``,
      expected: `it, since ${why}`,
      mend: `add \`${key}: ${example}\``,
    });
  };
  const geometry = input.shape && toGeometry(input.shape);
  if (!geometry)
    missing('shape', 'rates, friction and diffusion need the pellet’s size', '{sphere: {diameter: 4 mm}}');
  if (input.density === undefined) missing('density', 'catalyst mass follows from it', '1800 kg/m^3');
  const method = toMethod(context, input, needs);
  if (!method) isSound = false;
  const isResolved = method?.kind === 'full' || method?.kind === 'thiele';
  const isIsothermal = needs.heat?.mode === 'isothermal';

  const diffusivities = resolveDiffusivities(context, input, needs, isResolved, missing);
  const film = resolveFilm(context, input, needs, isResolved, isIsothermal, missing);
  const needsConductivity = method?.kind === 'full' && !isIsothermal;
  if (needsConductivity && input.thermal_conductivity === undefined) {
    missing(
      'thermal_conductivity',
      'temperature varies inside the pellet of a bed that is not isothermal',
      '0.35 W/(m K)',
    );
  }
  if (isResolved && isIsothermal) {
    needs.assumptions.push({
      about: 'pellet',
      statement: 'film and pellet are at the bed’s temperature, since the bed is isothermal',
      source: 'case: heat.mode',
    });
  }
  if (input.activity === undefined) {
    needs.assumptions.push({
      about: 'pellet.activity',
      statement: 'activity 1: fresh catalyst',
      source: 'default',
    });
  }
  if (!isSound || !geometry || !method || !diffusivities || !film) return undefined;
  return {
    geometry,
    method,
    density: input.density!,
    activity: input.activity ?? 1,
    effectiveDiffusivities: diffusivities,
    thermalConductivity: needsConductivity ? (input.thermal_conductivity as number) : Infinity,
    film,
  };
}

function toGeometry(shape: NonNullable<PelletInput['shape']>): PelletGeometry {
  if (shape.sphere) return sphereGeometry(shape.sphere.diameter);
  if (shape.slab) return slabGeometry(shape.slab.thickness);
  return longCylinderGeometry(shape.cylinder!.diameter);
}

function toMethod(context: CaseContext, input: PelletInput, needs: PelletNeeds): PelletMethod | undefined {
  const { method } = input;
  if (method === undefined) {
    needs.assumptions.push({
      about: 'pellet.method',
      statement: 'the reaction–diffusion problem is solved in the pellet at every position (`full`)',
      source: 'default',
    });
    return { kind: 'full' };
  }
  if (typeof method === 'string') return { kind: method };
  const effectiveness = perReaction(
    context,
    ['pellet', 'method', 'fixed', 'effectiveness'],
    method.fixed.effectiveness,
    needs.reactionNames,
  );
  return effectiveness && { kind: 'fixed', effectiveness };
}

type Missing = (key: string, why: string, example: string) => void;

function resolveDiffusivities(
  context: CaseContext,
  input: PelletInput,
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
  input: PelletInput,
  needs: PelletNeeds,
  isNeeded: boolean,
  isIsothermal: boolean,
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
  if (mass_transfer === undefined || (heat_transfer === undefined && !isIsothermal)) {
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
  return massTransfer && { massTransfer, heatTransfer: isIsothermal ? Infinity : heat_transfer! };
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
