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
  text,
  type PropertyValue,
} from './leaves.js';

const nasaRange = z
  .strictObject({
    // Published ranges go to 6000 K and beyond, further than any bed.
    from: quantity('temperature', 'lowest temperature of the range', { above: 0 }),
    to: quantity('temperature', 'highest temperature of the range', { above: 0 }),
    coefficients: z
      .unknown()
      .transform((value, context): number[] => {
        const isList = Array.isArray(value) && value.every((entry) => typeof entry === 'number');
        if (isList && (value.length === 7 || value.length === 9)) return value;
        addFault(context, {
          code: 'wrong_value',
          found: Array.isArray(value) ? `a list of ${value.length} entries` : describeValue(value),
          expected: 'seven or nine plain numbers, the two integration constants last',
        });
        return z.NEVER;
      })
      .meta({
        description:
          'NASA polynomial of Cp/R: a1..a5 (or a1..a7 from T^-2), then the constants of enthalpy and entropy',
      }),
  })
  .transform((range, context) => {
    if (range.from < range.to) return range;
    addFault(context, { code: 'out_of_range', found: '`from` above `to`', expected: 'a range that rises' });
    return z.NEVER;
  });

export type NasaInput = readonly { from: number; to: number; coefficients: number[] }[];
export type HeatCapacityInput = PropertyValue | { readonly kind: 'nasa'; readonly ranges: NasaInput };

const heatCapacityValue = property('heatCapacityPerAmount', 'molar heat capacity, ideal gas', false);
const heatCapacityNasa = z.strictObject({ nasa: z.array(nasaRange).min(1) });

const heatCapacity: z.ZodType<HeatCapacityInput> = z
  .unknown()
  .transform((value, context): HeatCapacityInput => {
    if (!isMap(value)) return delegate(heatCapacityValue, value, context);
    const read = delegate(heatCapacityNasa, value, context);
    return { kind: 'nasa', ranges: read.nasa };
  })
  .meta({
    description: 'ideal-gas heat capacity: a value, a formula in T, or NASA polynomials',
    quantity: ['heat_capacity_per_amount'],
  });

/** An own record. */
export const speciesRecordSchema = z.strictObject({
  name: text('trade name', 200).optional(),
  molar_mass: positive('molarMass', 'molar mass; from the formula where absent').optional(),
  formula: text('chemical formula, for the element balance', 60).optional(),
  heat_of_formation: quantity('molarEnergy', 'enthalpy of formation, ideal gas, 298.15 K').optional(),
  entropy: positive('molarEntropy', 'standard entropy, ideal gas, 298.15 K, 1 bar').optional(),
  heat_capacity: heatCapacity.optional(),
  critical_temperature: later('`critical_temperature`'),
  critical_pressure: later('`critical_pressure`'),
  critical_volume: later('`critical_volume`'),
  acentric_factor: later('`acentric_factor`'),
  dipole_moment: later('`dipole_moment`'),
  diffusion_volume: later('`diffusion_volume`'),
  viscosity: later('`viscosity` of a species'),
  thermal_conductivity: later('`thermal_conductivity` of a species'),
});
