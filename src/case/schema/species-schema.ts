import * as z from 'zod';
import {
  addFault,
  delegate,
  describeValue,
  isMap,
  plainNumber,
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

/** One debye, C m. @source 1e-18 esu cm; 1e-21/c C m with the SI speed of light, rounded */
const debye = 3.33564e-30;

/** Debye. Volatile molecules stay below 5, ion pairs in the gas phase about 12. @source common knowledge, from memory */
const largestDipole = 20;

const dipoleMoment = z
  .unknown()
  .transform((value, context): number => {
    const number = typeof value === 'string' ? /^(\d+\.?\d*) +debye$/.exec(value)?.[1] : undefined;
    const read = Number(number);
    if (number !== undefined && read <= largestDipole) return read * debye;
    addFault(context, {
      code: 'wrong_type',
      found: describeValue(value),
      expected: `a dipole moment in debye, at most ${largestDipole}, for example \`1.47 debye\``,
    });
    return z.NEVER;
  })
  .meta({ description: 'dipole moment in debye, as `1.47 debye`', type: 'string' });

/** A record: whole, or what differs from that of a species of the library. */
export const speciesRecordSchema = z.strictObject({
  from: text(
    '`library`, or the id of a species of the library whose data are taken where none are given',
    60,
  ).optional(),
  name: text('trade name', 200).optional(),
  molar_mass: positive('molarMass', 'molar mass; from the formula where absent').optional(),
  formula: text('chemical formula, for the element balance', 60).optional(),
  heat_of_formation: quantity('molarEnergy', 'enthalpy of formation, ideal gas, 298.15 K').optional(),
  entropy: positive('molarEntropy', 'standard entropy, ideal gas, 298.15 K, 1 bar').optional(),
  heat_capacity: heatCapacity.optional(),
  critical_temperature: quantity('temperature', 'critical temperature', { above: 0 }).optional(),
  critical_pressure: positive('pressure', 'critical pressure').optional(),
  critical_volume: positive('molarVolume', 'critical volume').optional(),
  acentric_factor: plainNumber('acentric factor', { atLeast: -1, atMost: 3 }).optional(),
  dipole_moment: dipoleMoment.optional(),
  association_factor: plainNumber('association factor of Chung et al.', { atLeast: 0, atMost: 1 }).optional(),
  diffusion_volume: plainNumber('diffusion volume of Fuller, Schettler and Giddings', {
    atLeast: 0.1,
    atMost: 1e4,
  }).optional(),
  collision_diameter: positive('length', 'Lennard-Jones collision diameter').optional(),
  well_depth: quantity('temperature', 'Lennard-Jones well depth over Boltzmann’s constant', {
    above: 0,
  }).optional(),
  viscosity: property('viscosity', 'viscosity of the pure gas').optional(),
  thermal_conductivity: property('thermalConductivity', 'thermal conductivity of the pure gas').optional(),
});

/** A plain file name, no folder, that is a YAML file and cannot be taken for another file of a result. */
const fileName = /^(?!case\.ya?ml$)[a-z0-9_][a-z0-9._-]{0,99}\.ya?ml$/i;

export const speciesFilesSchema = z
  .array(
    z
      .unknown()
      .transform((value, context): string => {
        if (typeof value === 'string' && fileName.test(value)) return value;
        addFault(context, {
          code: 'wrong_value',
          found: describeValue(value),
          expected: 'the name of a YAML file beside the case, without folders, and not `case.yaml`',
        });
        return z.NEVER;
      })
      .meta({ description: 'name of a species file beside the case', type: 'string' }),
  )
  .max(20)
  .meta({ description: 'further species libraries, files beside the case' });
