import * as z from 'zod';
import {
  isMap,
  later,
  plainNumber,
  positive,
  quantity,
  temperature,
  text,
  wholeNumber,
  word,
  wordOr,
} from './leaves.js';
import { mapOf } from './choices.js';

const ownFriction = z.strictObject({
  viscous: plainNumber('constant of the viscous term; 150 after Ergun', { atLeast: 0, atMost: 1e5 }),
  inertial: plainNumber('constant of the inertial term; 1.75 after Ergun', { atLeast: 0, atMost: 1e3 }),
});

export const bedSchema = z.strictObject({
  tube_diameter: positive('length', 'inner diameter of a tube'),
  tubes: wholeNumber('number of tubes in parallel; 1 where absent', { atLeast: 1, atMost: 1e6 }).optional(),
  length: positive('length', 'length of the bed'),
  void_fraction: wordOr(
    [],
    ['estimate'],
    quantity('fraction', 'void fraction of the bed', { above: 0, below: 1 }),
    (value) => value !== 'estimate',
    'a fraction between 0 and 1',
    'void fraction of the bed',
  ),
  pressure_drop: wordOr(
    ['ergun', 'none'],
    ['carman', 'tallmadge', 'hicks', 'kta', 'eisfeld_schnitzlein', 'nemec_levec', 'macdonald'],
    ownFriction,
    isMap,
    'a pair of constants `{viscous: 150, inertial: 1.75}`',
    'friction in the bed',
  ),
  zones: later('`bed.zones`'),
});
export type BedInput = z.output<typeof bedSchema>;

export const heatSchema = z.strictObject({
  mode: word(['isothermal', 'adiabatic', 'cooled'], 'isothermal, adiabatic or cooled through the wall'),
  overall_coefficient: wordOr(
    [],
    ['estimate'],
    positive('heatTransferCoefficient', 'overall coefficient on the inner wall area'),
    (value) => value !== 'estimate',
    'a value',
    'overall heat transfer coefficient on the inner wall area',
  ).optional(),
  coolant: z
    .strictObject({
      temperature: temperature('temperature of the coolant, constant along the bed'),
      mass_flow: later('`coolant.mass_flow`'),
      heat_capacity: later('`coolant.heat_capacity`'),
      direction: later('`coolant.direction`'),
    })
    .optional()
    .meta({ description: 'what takes up the heat on the other side of the wall' }),
  radial: later('`heat.radial`'),
});
export type HeatInput = z.output<typeof heatSchema>;

export const limitsSchema = z.strictObject({
  temperature: temperature('temperature that the supervising engineer set as limit').optional(),
  pressure_drop: positive(
    'pressureDifference',
    'pressure drop that the supervising engineer set as limit',
  ).optional(),
});

export const targetsSchema = z.strictObject({
  conversion: mapOf(
    quantity('fraction', 'conversion of one species', { above: 0, below: 1 }),
    'conversions whose first position along the bed is reported',
  ).optional(),
});

export const outputSchema = z.strictObject({
  points: wholeNumber('rows of the profile; 101 where absent', { atLeast: 2, atMost: 10_001 }).optional(),
  pellet_positions: z
    .array(quantity('length', 'position along the bed', { atLeast: 0 }))
    .max(50)
    .optional()
    .meta({
      description: 'positions whose pellet is written out besides inlet, hottest position and outlet',
    }),
  selectivity: z
    .array(z.strictObject({ of: text('product', 60), from: text('reactant', 60) }))
    .max(50)
    .optional()
    .meta({ description: 'selectivities and yields to report' }),
});

export const numericsSchema = z.strictObject({
  tolerance: plainNumber('relative tolerance of the results; 1e-6 where absent', {
    atLeast: 1e-10,
    atMost: 1e-3,
  }).optional(),
});
