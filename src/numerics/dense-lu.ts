/**
 * Small dense linear systems, in place, without allocation: LU with partial pivoting.
 * Matrices are row-major `size × size`. For set-up work on larger or structured problems use ml-matrix instead.
 *
 * @source Golub & Van Loan, Matrix Computations, 4th ed., Alg. 3.4.1
 */

/**
 * Replaces `matrix` by its LU factors.
 *
 * @param matrix - row-major, `size × size`, overwritten
 * @param size - number of unknowns, ≥ 0
 * @param pivots - written: row exchanged with row k at step k, length `size`
 * @returns false when a pivot is zero or not finite; the factors are then unusable
 */
export function factoriseInPlace(matrix: Float64Array, size: number, pivots: Int32Array): boolean {
  for (let k = 0; k < size; k++) {
    let pivotRow = k;
    let largest = Math.abs(matrix[k * size + k]!);
    for (let i = k + 1; i < size; i++) {
      const candidate = Math.abs(matrix[i * size + k]!);
      if (candidate > largest) {
        largest = candidate;
        pivotRow = i;
      }
    }
    pivots[k] = pivotRow;
    // Written so that NaN fails too.
    if (!(largest > 0 && largest < Infinity)) return false;
    if (pivotRow !== k) swapRows(matrix, size, k, pivotRow);
    const inversePivot = 1 / matrix[k * size + k]!;
    for (let i = k + 1; i < size; i++) {
      const factor = matrix[i * size + k]! * inversePivot;
      matrix[i * size + k] = factor;
      if (factor === 0) continue;
      const target = i * size;
      const source = k * size;
      for (let j = k + 1; j < size; j++) matrix[target + j]! -= factor * matrix[source + j]!;
    }
  }
  return true;
}

/** Solves A x = b with the factors of {@link factoriseInPlace}; `vector` holds b from `offset` and receives x. */
export function solveInPlace(
  factors: Float64Array,
  size: number,
  pivots: Int32Array,
  vector: Float64Array,
  offset = 0,
): void {
  for (let k = 0; k < size; k++) {
    const pivotRow = pivots[k]!;
    if (pivotRow !== k) swapEntries(vector, offset + k, offset + pivotRow);
  }
  for (let i = 1; i < size; i++) {
    let sum = vector[offset + i]!;
    const row = i * size;
    for (let j = 0; j < i; j++) sum -= factors[row + j]! * vector[offset + j]!;
    vector[offset + i] = sum;
  }
  for (let i = size - 1; i >= 0; i--) {
    let sum = vector[offset + i]!;
    const row = i * size;
    for (let j = i + 1; j < size; j++) sum -= factors[row + j]! * vector[offset + j]!;
    vector[offset + i] = sum / factors[row + i]!;
  }
}

/** Solves Aᵀ x = b with the same factors; `vector` holds b from `offset` and receives x. */
export function solveTransposedInPlace(
  factors: Float64Array,
  size: number,
  pivots: Int32Array,
  vector: Float64Array,
  offset = 0,
): void {
  // Column-oriented, so that the row-major factors are read along rows.
  for (let i = 0; i < size; i++) {
    const row = i * size;
    const value = vector[offset + i]! / factors[row + i]!;
    vector[offset + i] = value;
    if (value === 0) continue;
    for (let j = i + 1; j < size; j++) vector[offset + j]! -= factors[row + j]! * value;
  }
  for (let i = size - 1; i > 0; i--) {
    const value = vector[offset + i]!;
    if (value === 0) continue;
    const row = i * size;
    for (let j = 0; j < i; j++) vector[offset + j]! -= factors[row + j]! * value;
  }
  for (let k = size - 1; k >= 0; k--) {
    const pivotRow = pivots[k]!;
    if (pivotRow !== k) swapEntries(vector, offset + k, offset + pivotRow);
  }
}

function swapRows(matrix: Float64Array, size: number, a: number, b: number): void {
  for (let j = 0; j < size; j++) swapEntries(matrix, a * size + j, b * size + j);
}

function swapEntries(values: Float64Array, a: number, b: number): void {
  const kept = values[a]!;
  values[a] = values[b]!;
  values[b] = kept;
}
