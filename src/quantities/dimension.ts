/**
 * Physical dimension as exponents of kg, m, s, mol, K. Exponents may be fractions (`bar^0.5`).
 * Angles, counts and fractions are dimensionless: all zeros.
 */
export type Dimension = readonly [
  mass: number,
  length: number,
  time: number,
  amount: number,
  temperature: number,
];

/** The dimension of a pure number. */
export const dimensionless: Dimension = [0, 0, 0, 0, 0];

const exponentTolerance = 1e-9;

/** Dimension of a product. */
export function multiplyDimensions(a: Dimension, b: Dimension): Dimension {
  return [a[0] + b[0], a[1] + b[1], a[2] + b[2], a[3] + b[3], a[4] + b[4]];
}

/** Dimension of a quotient a/b. */
export function divideDimensions(a: Dimension, b: Dimension): Dimension {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2], a[3] - b[3], a[4] - b[4]];
}

/** Dimension of a power; the exponent may be a fraction. */
export function raiseDimension(a: Dimension, exponent: number): Dimension {
  return [a[0] * exponent, a[1] * exponent, a[2] * exponent, a[3] * exponent, a[4] * exponent];
}

/** Whether two dimensions agree; exponents that differ by rounding (1e-9) count as equal. */
export function sameDimension(a: Dimension, b: Dimension): boolean {
  return a.every((exponent, index) => Math.abs(exponent - b[index]!) <= exponentTolerance);
}

/** Whether it is the dimension of a pure number. */
export function isDimensionless(a: Dimension): boolean {
  return sameDimension(a, dimensionless);
}

const baseUnits = ['kg', 'm', 's', 'mol', 'K'] as const;

/** SI unit of a dimension as text, e.g. `kg m^-1 s^-2`; `1` when dimensionless. */
export function formatDimension(dimension: Dimension): string {
  const factors = dimension.flatMap((exponent, index) => {
    if (Math.abs(exponent) <= exponentTolerance) return [];
    const unit = baseUnits[index]!;
    const rounded = Number(exponent.toPrecision(6));
    return rounded === 1 ? [unit] : [`${unit}^${rounded}`];
  });
  return factors.length === 0 ? '1' : factors.join(' ');
}
