import * as z from 'zod';
import {
  addFault,
  delegate,
  describeValue,
  isMap,
  later,
  positive,
  property,
  quantity,
  temperature,
  wordOr,
  word,
  type PropertyValue,
} from './leaves.js';

const share = quantity('fraction', 'share of one species', { atLeast: 0, atMost: 1 });

const fractions = (description: string): z.ZodType<Record<string, number | 'balance'>> =>
  mapOf(
    z
      .unknown()
      .transform((value, context): number | 'balance' =>
        value === 'balance' ? 'balance' : delegate(share, value, context),
      ),
    description,
  );

/** A map with free keys; each value by one schema, all faults kept. */
export function mapOf<Value>(
  schema: z.ZodType<Value>,
  description: string,
): z.ZodType<Record<string, Value>> {
  return z
    .unknown()
    .transform((value, context): Record<string, Value> => {
      if (!isMap(value)) {
        addFault(context, {
          code: 'wrong_type',
          found: describeValue(value),
          expected: 'a map with a value for each name',
        });
        return z.NEVER;
      }
      const result = Object.create(null) as Record<string, Value>;
      for (const [key, entry] of Object.entries(value as Record<string, unknown>)) {
        result[key] = delegate(schema, entry, context, [key]);
      }
      return result;
    })
    .meta({ description });
}

export const feedSchema = z.strictObject({
  temperature: temperature('feed temperature'),
  pressure: positive('pressure', 'feed pressure, absolute'),
  molar_flow: positive('molarFlow', 'total molar flow, whole reactor').optional(),
  mass_flow: positive('massFlow', 'mass flow, whole reactor').optional(),
  mass_flux: positive('massFlux', 'mass flow over the cross-section of the empty tubes').optional(),
  velocity: positive('velocity', 'superficial velocity at feed conditions').optional(),
  volumetric_flow: positive('volumetricFlow', 'volumetric flow at feed conditions, whole reactor').optional(),
  space_velocity: positive('spaceVelocity', 'volumetric flow at feed conditions over bed volume').optional(),
  mole_fractions: fractions('mole fractions; one of them may be `balance`').optional(),
  mass_fractions: fractions('mass fractions; one of them may be `balance`').optional(),
  molar_flows: mapOf(
    quantity('molarFlow', 'molar flow of one species, whole reactor', { atLeast: 0 }),
    'molar flow of each species',
  ).optional(),
});

export type FeedInput = z.output<typeof feedSchema>;

const estimateOrProperty = (
  names: Parameters<typeof property>[0],
  description: string,
  estimateIsLater: boolean,
): z.ZodType<'estimate' | PropertyValue> =>
  wordOr(
    estimateIsLater ? [] : (['estimate'] as const),
    estimateIsLater ? ['estimate'] : [],
    property(names, description),
    (value) => value !== 'estimate',
    'a value or a formula in T',
    description,
  );

export const fluidSchema = z.strictObject({
  phase: word(['gas'], 'gas or liquid', ['liquid']).optional(),
  equation_of_state: word(['ideal'], 'equation of state', [
    'peng_robinson',
    'soave_redlich_kwong',
    'constant_density',
  ]).optional(),
  viscosity: estimateOrProperty('viscosity', 'dynamic viscosity, for friction', true).optional(),
  heat_capacity: estimateOrProperty(
    ['heatCapacityPerMass', 'heatCapacityPerAmount'],
    'heat capacity of the mixture; `estimate` takes it from the species',
    false,
  ).optional(),
  thermal_conductivity: later('`fluid.thermal_conductivity`'),
  diffusivity: later('`fluid.diffusivity`'),
});

export type FluidInput = z.output<typeof fluidSchema>;
