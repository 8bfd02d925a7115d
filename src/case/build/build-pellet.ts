import type { PelletGeometry, PelletMethod, PelletSpecification } from '../../pellet/pellet-specification.js';
import { longCylinderGeometry, slabGeometry, sphereGeometry } from '../../pellet/shapes.js';
import { problemAt, type CaseContext } from '../case-context.js';
import type { SectionReading } from '../read-section.js';
import type { PelletInput } from '../schema/pellet-schema.js';
import { perReaction } from './build-feed.js';
import { buildPelletTransport, type Missing, type PelletNeeds } from './build-pellet-transport.js';

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
  const transport = method && buildPelletTransport(context, reading, needs, method.kind, missing);
  const isResolved = method?.kind === 'full' || method?.kind === 'thiele';
  noteAssumptions(needs, isResolved && needs.heatMode === 'isothermal', !isGiven('activity'));
  const { shape, density } = values;
  if (!reading.isSound || !method || !transport || !shape || density === undefined) return undefined;
  return { geometry: toGeometry(shape), method, density, activity: values.activity ?? 1, transport };
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
