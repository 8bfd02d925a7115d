/**
 * Coefficients of the three-stage Radau IIA method: order 5, stage order 3, L-stable, stiffly accurate.
 * Stages are kept as differences Z_i = Y_i - y_0, which solve Z = h (A ⊗ I) F(Z).
 *
 * @source Hairer & Wanner, Solving Ordinary Differential Equations II, 2nd ed. (1996), Table IV.5.6 and sec. IV.8
 */

const root6 = Math.sqrt(6);

/** Stage positions c. */
export const stagePositions: readonly [number, number, number] = [(4 - root6) / 10, (4 + root6) / 10, 1];

/** Runge–Kutta matrix A, rows. */
export const stageMatrix: readonly (readonly [number, number, number])[] = [
  [(88 - 7 * root6) / 360, (296 - 169 * root6) / 1800, (-2 + 3 * root6) / 225],
  [(296 + 169 * root6) / 1800, (88 + 7 * root6) / 360, (-2 - 3 * root6) / 225],
  [(16 - root6) / 36, (16 + root6) / 36, 1 / 9],
];

/** Real eigenvalue of A⁻¹. */
export const realEigenvalue: number = 3 + 3 ** (2 / 3) - 3 ** (1 / 3);

/** Complex pair of A⁻¹: realPart ± i imaginaryPart. */
export const complexEigenvalue: { readonly realPart: number; readonly imaginaryPart: number } = {
  realPart: 3 + (3 ** (1 / 3) - 3 ** (2 / 3)) / 2,
  imaginaryPart: (3 ** (5 / 6) + 3 ** (7 / 6)) / 2,
};

/**
 * Weights of the error estimate: err = (μ/h I - J)⁻¹ (f(x0, y0) + (Σ e_i Z_i)/h), μ the real eigenvalue.
 * It compares with an embedded formula of order 3, so that err = O(h⁴).
 */
export const errorWeights: readonly [number, number, number] = [
  (-13 - 7 * root6) / 3,
  (-13 + 7 * root6) / 3,
  -1 / 3,
];

type Matrix3 = readonly (readonly [number, number, number])[];

/**
 * Transformation T = [v, Re w, Im w] from eigenvectors of A⁻¹, and its inverse: with W = T⁻¹ Z the stage system falls apart into one
 * real system for W_1 and one complex system for W_2 - i W_3.
 */
export const transform: Matrix3 = buildTransform();
export const inverseTransform: Matrix3 = inverse3(transform);

function buildTransform(): Matrix3 {
  const inverse = inverse3(stageMatrix);
  const real = nullVector(inverse, realEigenvalue, 0);
  const pair = nullVector(inverse, complexEigenvalue.realPart, complexEigenvalue.imaginaryPart);
  return [0, 1, 2].map((row): [number, number, number] => [real[row]![0], pair[row]![0], pair[row]![1]]);
}

/** Eigenvector of a 3×3 matrix for a simple eigenvalue: the cross product of two rows of (matrix - eigenvalue I). Entries [re, im]. */
function nullVector(matrix: Matrix3, realPart: number, imaginaryPart: number): [number, number][] {
  const entry = (row: number, column: number): [number, number] =>
    row === column ? [matrix[row]![column]! - realPart, -imaginaryPart] : [matrix[row]![column]!, 0];
  const product = (a: [number, number], b: [number, number]): [number, number] => [
    a[0] * b[0] - a[1] * b[1],
    a[0] * b[1] + a[1] * b[0],
  ];
  return [0, 1, 2].map((k): [number, number] => {
    const i = (k + 1) % 3;
    const j = (k + 2) % 3;
    const left = product(entry(0, i), entry(1, j));
    const right = product(entry(0, j), entry(1, i));
    return [left[0] - right[0], left[1] - right[1]];
  });
}

function inverse3(m: Matrix3): Matrix3 {
  const cofactor = (row: number, column: number): number => {
    const r = [(row + 1) % 3, (row + 2) % 3] as const;
    const c = [(column + 1) % 3, (column + 2) % 3] as const;
    return m[r[0]]![c[0]]! * m[r[1]]![c[1]]! - m[r[0]]![c[1]]! * m[r[1]]![c[0]]!;
  };
  const determinant = [0, 1, 2].reduce((sum, column) => sum + m[0]![column]! * cofactor(0, column), 0);
  return [0, 1, 2].map((row): [number, number, number] => [
    cofactor(0, row) / determinant,
    cofactor(1, row) / determinant,
    cofactor(2, row) / determinant,
  ]);
}
