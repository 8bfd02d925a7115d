/**
 * Small dense complex linear systems, in place, without allocation: LU with partial pivoting by the 1-norm of the entries.
 * Real and imaginary parts live in separate row-major arrays. Same layout and pivots as `dense-lu.ts`.
 */

/** Replaces the matrix by its LU factors; false when a pivot is zero or not finite. */
export function factoriseComplexInPlace(
  real: Float64Array,
  imaginary: Float64Array,
  size: number,
  pivots: Int32Array,
): boolean {
  for (let k = 0; k < size; k++) {
    let pivotRow = k;
    let largest = Math.abs(real[k * size + k]!) + Math.abs(imaginary[k * size + k]!);
    for (let i = k + 1; i < size; i++) {
      const candidate = Math.abs(real[i * size + k]!) + Math.abs(imaginary[i * size + k]!);
      if (candidate > largest) {
        largest = candidate;
        pivotRow = i;
      }
    }
    pivots[k] = pivotRow;
    if (!(largest > 0 && largest < Infinity)) return false;
    if (pivotRow !== k) {
      for (let j = 0; j < size; j++) {
        swap(real, k * size + j, pivotRow * size + j);
        swap(imaginary, k * size + j, pivotRow * size + j);
      }
    }
    const pivotReal = real[k * size + k]!;
    const pivotImaginary = imaginary[k * size + k]!;
    const squared = pivotReal * pivotReal + pivotImaginary * pivotImaginary;
    for (let i = k + 1; i < size; i++) {
      const a = real[i * size + k]!;
      const b = imaginary[i * size + k]!;
      const factorReal = (a * pivotReal + b * pivotImaginary) / squared;
      const factorImaginary = (b * pivotReal - a * pivotImaginary) / squared;
      real[i * size + k] = factorReal;
      imaginary[i * size + k] = factorImaginary;
      for (let j = k + 1; j < size; j++) {
        const c = real[k * size + j]!;
        const d = imaginary[k * size + j]!;
        real[i * size + j]! -= factorReal * c - factorImaginary * d;
        imaginary[i * size + j]! -= factorReal * d + factorImaginary * c;
      }
    }
  }
  return true;
}

/** Solves A x = b; `vectorReal + i vectorImaginary` holds b and receives x. */
export function solveComplexInPlace(
  real: Float64Array,
  imaginary: Float64Array,
  size: number,
  pivots: Int32Array,
  vectorReal: Float64Array,
  vectorImaginary: Float64Array,
): void {
  for (let k = 0; k < size; k++) {
    const pivotRow = pivots[k]!;
    if (pivotRow !== k) {
      swap(vectorReal, k, pivotRow);
      swap(vectorImaginary, k, pivotRow);
    }
  }
  for (let i = 1; i < size; i++) subtractRow(real, imaginary, size, vectorReal, vectorImaginary, i, 0, i);
  for (let i = size - 1; i >= 0; i--) {
    subtractRow(real, imaginary, size, vectorReal, vectorImaginary, i, i + 1, size);
    const c = real[i * size + i]!;
    const d = imaginary[i * size + i]!;
    const squared = c * c + d * d;
    const a = vectorReal[i]!;
    const b = vectorImaginary[i]!;
    vectorReal[i] = (a * c + b * d) / squared;
    vectorImaginary[i] = (b * c - a * d) / squared;
  }
}

/** vector[row] -= sum over columns `from..to` of factors[row, column] * vector[column]. */
function subtractRow(
  real: Float64Array,
  imaginary: Float64Array,
  size: number,
  vectorReal: Float64Array,
  vectorImaginary: Float64Array,
  row: number,
  from: number,
  to: number,
): void {
  let sumReal = vectorReal[row]!;
  let sumImaginary = vectorImaginary[row]!;
  for (let j = from; j < to; j++) {
    const a = real[row * size + j]!;
    const b = imaginary[row * size + j]!;
    sumReal -= a * vectorReal[j]! - b * vectorImaginary[j]!;
    sumImaginary -= a * vectorImaginary[j]! + b * vectorReal[j]!;
  }
  vectorReal[row] = sumReal;
  vectorImaginary[row] = sumImaginary;
}

function swap(values: Float64Array, a: number, b: number): void {
  const kept = values[a]!;
  values[a] = values[b]!;
  values[b] = kept;
}
