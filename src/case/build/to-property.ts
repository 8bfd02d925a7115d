import type { FluidProperty } from '../../properties/fluid-property.js';
import type { PropertyValue } from '../schema/leaves.js';

/** A value or formula as read, without what only reading needed. */
export function toProperty(input: PropertyValue): FluidProperty {
  return input.kind === 'constant'
    ? { kind: 'constant', value: input.value }
    : { kind: 'formula', formula: input.formula };
}
