import * as z from 'zod';
import { addFault, delegate, describeValue, isMap, later, positive, quantity, wordOr } from './leaves.js';
import { mapOf } from './feed-schema.js';

const onlyLong = z
  .unknown()
  .transform((value, context): 'long' => {
    if (value === 'long') return 'long';
    addFault(context, {
      code: 'not_supported_yet',
      found: `${describeValue(value)}, a cylinder whose ends count`,
      expected: '`length: long`: not supported yet',
      mend: 'write `length: long` where the ends may be left out',
    });
    return z.NEVER;
  })
  .meta({ description: '`long`: the ends do not count' });

const shape = z
  .strictObject({
    sphere: z.strictObject({ diameter: positive('length', 'diameter of the sphere') }).optional(),
    slab: z.strictObject({ thickness: positive('length', 'thickness, face to face') }).optional(),
    cylinder: z
      .strictObject({ diameter: positive('length', 'diameter of the cylinder'), length: onlyLong })
      .optional(),
    ring: later('the shape `ring`'),
    holed_cylinder: later('the shape `holed_cylinder`'),
    lobed: later('the shape `lobed`'),
    custom: later('the shape `custom`'),
  })
  .transform((read, context) => {
    // A shape of an unknown name is reported as such.
    if (context.issues.length > 0) return z.NEVER;
    const given = [read.sphere, read.slab, read.cylinder].filter((entry) => entry !== undefined).length;
    if (given === 1) return read;
    addFault(context, {
      code: 'wrong_value',
      found: `${given} shapes`,
      expected: 'one of sphere, slab, cylinder',
    });
    return z.NEVER;
  })
  .meta({ description: 'form and size of the pellet: `{sphere: {diameter: 4 mm}}`' });

/** One value for all species, or a map; a plain union would report both branches' faults. */
function valueOrMap(one: z.ZodType<number>, description: string): z.ZodType<number | Record<string, number>> {
  const map = mapOf(one, description);
  return wordOr(
    [],
    ['estimate'],
    z
      .unknown()
      .transform((value, context): number | Record<string, number> =>
        isMap(value) ? delegate(map, value, context) : delegate(one, value, context),
      ),
    (value) => value !== 'estimate',
    'one value, or one for each species',
    description,
  );
}

const filmMap = z.strictObject({
  mass_transfer: valueOrMap(
    positive('massTransferCoefficient', 'film coefficient of one species'),
    'mass transfer coefficients of the film',
  ).optional(),
  heat_transfer: positive('heatTransferCoefficient', 'heat transfer coefficient of the film').optional(),
  correlation: later('`film.correlation`'),
});

const effectiveness = quantity('fraction', 'effectiveness of one reaction', { above: 0 });
const fixed = z.strictObject({
  fixed: z.strictObject({ effectiveness: valueOrMap(effectiveness, 'effectiveness of each reaction') }),
});

const activity = z
  .unknown()
  .transform((value, context): number => {
    if (typeof value === 'number' && value > 0 && value <= 100) return value;
    const isProfile = isMap(value) || typeof value === 'string';
    addFault(context, {
      code: isProfile ? 'not_supported_yet' : 'out_of_range',
      found: isProfile
        ? `${describeValue(value)}, an activity that varies inside the pellet`
        : describeValue(value),
      expected: isProfile
        ? 'one number for the whole pellet: not supported yet'
        : 'a number above 0, at most 100',
    });
    return z.NEVER;
  })
  .meta({ description: 'multiplies every rate; 1 for fresh catalyst', type: 'number' });

export const pelletSchema = z.strictObject({
  shape: shape.optional(),
  density: positive('density', 'density of the pellet, pores included').optional(),
  thermal_conductivity: wordOr(
    [],
    ['estimate'],
    positive('thermalConductivity', 'effective thermal conductivity'),
    (value) => value !== 'estimate',
    'a value',
    'effective thermal conductivity of the pellet',
  ).optional(),
  effective_diffusivity: valueOrMap(
    positive('diffusivity', 'effective diffusivity of one species'),
    'effective diffusivities',
  ).optional(),
  film: wordOr(
    ['none'],
    ['estimate'],
    filmMap,
    isMap,
    'a map with mass_transfer and heat_transfer',
    'film around the pellet',
  ).optional(),
  method: wordOr(
    ['full', 'thiele', 'intrinsic'],
    [],
    fixed,
    isMap,
    '`{fixed: {effectiveness: …}}`',
    'how the effect of diffusion is worked out',
  ).optional(),
  activity: activity.optional(),
  porosity: later('`pellet.porosity`'),
  tortuosity: later('`pellet.tortuosity`'),
  pore_radius: later('`pellet.pore_radius`'),
  pores: later('`pellet.pores`'),
  transport: later('`pellet.transport`'),
});

export type PelletInput = z.output<typeof pelletSchema>;
