import { EigenvalueDecomposition, Matrix } from 'ml-matrix';

/** Points and weights of a quadrature rule on [0, 1]; points ascending. */
export interface QuadratureRule {
  readonly points: Float64Array;
  readonly weights: Float64Array;
}

/**
 * Gauss–Jacobi rule on [0, 1] for the weight u^lowerExponent (1-u)^upperExponent, normalised so that the weights sum to 1.
 *
 * Golub–Welsch: points are the eigenvalues of the symmetric tridiagonal matrix of the recurrence, weights the squared
 * first components of its eigenvectors.
 *
 * @param count - number of points, ≥ 1; exact for polynomials of degree 2 count - 1
 * @param lowerExponent - > -1, exponent at u = 0
 * @param upperExponent - > -1, exponent at u = 1
 * @source Golub & Welsch (1969), Math. Comp. 23, 221; recurrence of the Jacobi polynomials, Abramowitz & Stegun 22.7.1
 */
export function gaussJacobi(count: number, lowerExponent: number, upperExponent: number): QuadratureRule {
  const a = upperExponent; // Jacobi alpha belongs to t = +1, which is u = 1
  const b = lowerExponent;
  const recurrence = Matrix.zeros(count, count);
  for (let k = 0; k < count; k++) {
    const s = 2 * k + a + b;
    const diagonal = k === 0 ? (b - a) / (a + b + 2) : (b * b - a * a) / (s * (s + 2));
    recurrence.set(k, k, (1 + diagonal) / 2);
    if (k + 1 < count) {
      const n = k + 1;
      const t = 2 * n + a + b;
      // The general formula is 0/0 at n = 1 when a + b = -1.
      const squared =
        n === 1
          ? (4 * (1 + a) * (1 + b)) / ((2 + a + b) ** 2 * (3 + a + b))
          : (4 * n * (n + a) * (n + b) * (n + a + b)) / (t * t * (t + 1) * (t - 1));
      recurrence.set(k, n, Math.sqrt(squared) / 2);
      recurrence.set(n, k, Math.sqrt(squared) / 2);
    }
  }
  const decomposition = new EigenvalueDecomposition(recurrence, { assumeSymmetric: true });
  const vectors = decomposition.eigenvectorMatrix;
  const order = decomposition.realEigenvalues
    .map((value, index) => ({ value, weight: vectors.get(0, index) ** 2 }))
    .sort((left, right) => left.value - right.value);
  return {
    points: Float64Array.from(order, ({ value }) => value),
    weights: Float64Array.from(order, ({ weight }) => weight),
  };
}

/** Gauss–Legendre rule on [0, 1]; weights sum to 1. */
export function gaussLegendre(count: number): QuadratureRule {
  return gaussJacobi(count, 0, 0);
}
