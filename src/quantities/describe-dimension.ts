import { formatDimension, isDimensionless, sameDimension, type Dimension } from './dimension.js';

/** What a reader calls a quantity of the dimension; where several fit, the one that is neutral among them. */
const nouns: readonly (readonly [noun: string, dimension: Dimension])[] = [
  ['a mass', [1, 0, 0, 0, 0]],
  ['a length', [0, 1, 0, 0, 0]],
  ['an area', [0, 2, 0, 0, 0]],
  ['a volume', [0, 3, 0, 0, 0]],
  ['a time', [0, 0, 1, 0, 0]],
  ['one per time', [0, 0, -1, 0, 0]],
  ['an amount', [0, 0, 0, 1, 0]],
  ['a temperature', [0, 0, 0, 0, 1]],
  ['one per temperature', [0, 0, 0, 0, -1]],
  ['a velocity', [0, 1, -1, 0, 0]],
  ['a pressure', [1, -1, -2, 0, 0]],
  ['one per pressure', [-1, 1, 2, 0, 0]],
  ['an amount per volume', [0, -3, 0, 1, 0]],
  ['an amount per time', [0, 0, -1, 1, 0]],
  ['an amount per time and mass', [-1, 0, -1, 1, 0]],
  ['an amount per time and volume', [0, -3, -1, 1, 0]],
  ['a mass per time', [1, 0, -1, 0, 0]],
  ['a mass per volume', [1, -3, 0, 0, 0]],
  ['a mass per amount', [1, 0, 0, -1, 0]],
  ['an energy', [1, 2, -2, 0, 0]],
  ['a power', [1, 2, -3, 0, 0]],
  ['an energy per amount', [1, 2, -2, -1, 0]],
  ['an energy per amount and temperature', [1, 2, -2, -1, -1]],
];

/** `a pressure (kg m^-1 s^-2)`, `a pure number`, or the SI unit alone where the dimension has no common name. */
export function describeDimension(dimension: Dimension): string {
  if (isDimensionless(dimension)) return 'a pure number';
  const unit = formatDimension(dimension);
  const noun = nouns.find(([, named]) => sameDimension(named, dimension))?.[0];
  return noun === undefined ? `${unit} in SI` : `${noun} (${unit})`;
}
