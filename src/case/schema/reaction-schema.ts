import * as z from 'zod';
import type { ConstantDefinition } from '../../expressions/build-expression.js';
import type { Dimension } from '../../quantities/dimension.js';
import {
  addFault,
  anyQuantity,
  delegate,
  isMap,
  plainNumber,
  quantity,
  temperature,
  text,
  word,
} from './leaves.js';

/** A constant as read: a definition in SI with its dimension, or a formula still to be parsed with its neighbours in scope. */
export type ConstantInput =
  | { readonly kind: 'defined'; readonly definition: ConstantDefinition; readonly dimension: Dimension }
  | { readonly kind: 'formula'; readonly text: string };

const energyKeys = {
  activation_energy: quantity('molarEnergy', 'activation energy').optional(),
  adsorption_heat: quantity(
    'molarEnergy',
    'enthalpy change of adsorption or reaction, negative when exothermic',
  ).optional(),
};

const constantMap = z.strictObject({
  value: anyQuantity('value, at the temperature `at` where the constant depends on temperature').optional(),
  at: temperature('temperature at which `value` holds').optional(),
  prefactor: anyQuantity('factor before the exponential').optional(),
  temperature_exponent: plainNumber('power of the temperature in kelvin beside the exponential', {
    atLeast: -20,
    atMost: 20,
  }).optional(),
  formula: text('formula in T', 4000).optional(),
  ...energyKeys,
});

export const constantSchema: z.ZodType<ConstantInput> = z
  .unknown()
  .transform((value, context): ConstantInput => {
    if (!isMap(value)) {
      const { value: number, dimension } = delegate(anyQuantity('value'), value, context);
      return { kind: 'defined', definition: { kind: 'value', value: number }, dimension };
    }
    const read = delegate(constantMap, value, context);
    return read === z.NEVER ? z.NEVER : combine(read, context);
  })
  .meta({
    description:
      'a constant: a value; `{value, at, activation_energy}`; `{prefactor, activation_energy}`; with `adsorption_heat` in place of the energy; or `{formula}`',
    quantity: 'any',
  });

function combine(read: z.output<typeof constantMap>, context: z.core.$RefinementCtx): ConstantInput {
  const refuse = (found: string, expected: string): ConstantInput => {
    addFault(context, { code: 'wrong_value', found, expected });
    return z.NEVER;
  };
  const ways = [read.value, read.prefactor, read.formula].filter((way) => way !== undefined).length;
  if (ways !== 1) {
    return refuse(`${ways} of \`value\`, \`prefactor\` and \`formula\``, 'exactly one of them');
  }
  if (read.activation_energy !== undefined && read.adsorption_heat !== undefined) {
    return refuse('both `activation_energy` and `adsorption_heat`', 'one of them');
  }
  const energy = read.activation_energy ?? read.adsorption_heat;
  if (read.formula !== undefined) {
    if (energy !== undefined || read.at !== undefined || read.temperature_exponent !== undefined) {
      return refuse('other keys beside `formula`', '`formula` alone');
    }
    return { kind: 'formula', text: read.formula };
  }
  if (read.prefactor !== undefined) {
    if (energy === undefined && read.temperature_exponent === undefined) {
      return refuse('`prefactor` without an energy', '`activation_energy` or `adsorption_heat` beside it');
    }
    if (read.at !== undefined)
      return refuse('`at` beside `prefactor`', '`value` with `at`, or `prefactor` without');
    return {
      kind: 'defined',
      definition: {
        kind: 'arrhenius',
        prefactor: read.prefactor.value,
        energy: energy ?? 0,
        temperatureExponent: read.temperature_exponent ?? 0,
      },
      dimension: read.prefactor.dimension,
    };
  }
  const { value, dimension } = read.value!;
  if (read.temperature_exponent !== undefined) {
    return refuse('`temperature_exponent` beside `value`', '`prefactor` with it');
  }
  if ((energy === undefined) !== (read.at === undefined)) {
    return refuse(
      energy === undefined ? '`at` without an energy' : 'an energy without `at`',
      '`at` and an energy together: value * exp(-(E/R)(1/T - 1/at))',
    );
  }
  if (energy === undefined) return { kind: 'defined', definition: { kind: 'value', value }, dimension };
  return { kind: 'defined', definition: { kind: 'referenced', value, at: read.at!, energy }, dimension };
}

const heatMap = z.strictObject({
  value: quantity('molarEnergy', 'heat of reaction, negative when exothermic'),
  at: temperature('temperature at which it holds'),
});

const heat = z
  .unknown()
  .transform((value, context): { value: number; temperature?: number } => {
    if (!isMap(value))
      return { value: delegate(quantity('molarEnergy', 'heat of reaction'), value, context) };
    const read = delegate(heatMap, value, context);
    return { value: read.value, temperature: read.at };
  })
  .meta({
    description: 'heat of reaction, negative when exothermic; from the species where absent',
    quantity: ['molar_energy'],
  });

const unitText = (description: string): z.ZodType<string> => text(description, 60);

export const reactionSchema = z.strictObject({
  name: text('name, a word', 60),
  equation: text('`A + 3 O2 -> P + 3 H2O`, or `<=>` where it is reversible', 500),
  rate: text('rate law', 1_000_000),
  constants: z
    .unknown()
    .transform((value, context): Record<string, unknown> => {
      if (isMap(value)) return value as Record<string, unknown>;
      addFault(context, { code: 'wrong_type', found: 'no map', expected: 'constants by name' });
      return z.NEVER;
    })
    .optional()
    .meta({ description: 'constants of this law by name' }),
  heat: heat.optional(),
  per: word(
    ['catalyst_mass', 'pellet_volume', 'bed_volume'],
    'what the rate refers to; catalyst mass where absent',
  ).optional(),
  written_in: z
    .strictObject({
      p: unitText('unit of partial pressures and of P').optional(),
      c: unitText('unit of concentrations').optional(),
      T: unitText('unit of temperature').optional(),
      rate: unitText('unit of the rate'),
    })
    .optional()
    .meta({ description: 'for a purely empirical law: in what units to read its numbers' }),
});

export type ReactionInput = z.output<typeof reactionSchema>;
