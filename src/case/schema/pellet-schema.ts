import * as z from 'zod';
import {
  addFault,
  describeValue,
  isMap,
  later,
  plainNumber,
  positive,
  property,
  quantity,
  word,
  wordOr,
} from './leaves.js';
import { estimateOr, oneOrEach } from './choices.js';

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

const filmMap = z.strictObject({
  mass_transfer: oneOrEach(
    property('massTransferCoefficient', 'film coefficient of one species'),
    'mass transfer coefficients of the film',
  ).optional(),
  heat_transfer: property('heatTransferCoefficient', 'heat transfer coefficient of the film').optional(),
  correlation: word(
    ['wakao_funazkri', 'thoenes_kramers', 'petrovic_thodos', 'dwivedi_upadhyay', 'gnielinski'],
    'correlation of particle-to-fluid transfer',
  ).optional(),
});

const effectiveness = quantity('fraction', 'effectiveness of one reaction', { above: 0 });
const fixed = z.strictObject({
  fixed: z.strictObject({ effectiveness: oneOrEach(effectiveness, 'effectiveness of each reaction') }),
});

const poreClass = z.strictObject({
  radius: positive('length', 'radius of these pores'),
  fraction: quantity('fraction', 'their share of the pore volume', { above: 0, atMost: 1 }),
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
  thermal_conductivity: estimateOr(
    property('thermalConductivity', 'effective thermal conductivity'),
    'effective thermal conductivity of the pellet; `estimate` takes it from porosity, solid and gas',
  ).optional(),
  solid_conductivity: positive(
    'thermalConductivity',
    'thermal conductivity of the pellet’s solid, for the estimate of the pellet’s',
  ).optional(),
  effective_diffusivity: estimateOr(
    oneOrEach(property('diffusivity', 'effective diffusivity of one species'), 'effective diffusivities'),
    'effective diffusivities; `estimate` takes them from the pores, as it does for species left out of a map',
  ).optional(),
  film: wordOr(
    ['none', 'estimate'],
    [],
    filmMap,
    isMap,
    'a map with mass_transfer and heat_transfer, or with a correlation',
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
  porosity: quantity('fraction', 'pore volume over pellet volume', { above: 0, below: 1 }).optional(),
  tortuosity: plainNumber('tortuosity of the pores', { atLeast: 1, atMost: 100 }).optional(),
  pore_radius: positive('length', 'radius of the pores, all of one size').optional(),
  pores: z
    .array(poreClass)
    .min(1)
    .max(20)
    .optional()
    .meta({ description: 'pores of several sizes, each with its share of the pore volume' }),
  pore_model: word(['parallel', 'random_pore'], 'how pores of several sizes lie to each other').optional(),
  hindrance: word(['none', 'renkin'], 'slowing of molecules not small against a pore').optional(),
  transport: later('`pellet.transport`'),
});

export type PelletInput = z.output<typeof pelletSchema>;
