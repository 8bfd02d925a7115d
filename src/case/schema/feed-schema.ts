import * as z from 'zod';
import { delegate, flag, plainNumber, positive, property, quantity, temperature, word } from './leaves.js';
import { estimateOr, mapOf, oneOrEach } from './choices.js';

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

export const fluidSchema = z.strictObject({
  phase: word(['gas'], 'gas or liquid', ['liquid']).optional(),
  equation_of_state: word(['ideal', 'peng_robinson', 'soave_redlich_kwong'], 'equation of state', [
    'constant_density',
  ]).optional(),
  binary_interaction: mapOf(
    mapOf(
      plainNumber('binary interaction parameter of two species', { atLeast: -1, atMost: 1 }),
      'parameters with the species of the outer key',
    ),
    'binary interaction parameters k_ij of the equation of state, 0 where absent: `{CO2: {CH4: 0.09}}`',
  ).optional(),
  viscosity: estimateOr(property('viscosity', 'dynamic viscosity'), 'dynamic viscosity').optional(),
  heat_capacity: estimateOr(
    property(['heatCapacityPerMass', 'heatCapacityPerAmount'], 'heat capacity of the mixture'),
    'heat capacity of the mixture; `estimate` takes it from the species',
  ).optional(),
  thermal_conductivity: estimateOr(
    property('thermalConductivity', 'thermal conductivity of the fluid'),
    'thermal conductivity of the fluid',
  ).optional(),
  diffusivity: estimateOr(
    oneOrEach(
      property('diffusivity', 'diffusivity of one species in the mixture'),
      'diffusivities in the mixture',
    ),
    'diffusivity of each species in the mixture; species left out of a map are estimated',
  ).optional(),
  diffusivity_mixing: word(
    ['wilke', 'blanc', 'flux_ratios'],
    'how a diffusivity in the mixture follows from those of the pairs',
  ).optional(),
  pressure_correction: flag(
    'whether estimated transport properties are corrected for pressure; where absent, above 10 bar',
  ).optional(),
});

export type FluidInput = z.output<typeof fluidSchema>;
