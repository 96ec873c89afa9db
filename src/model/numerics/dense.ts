/**
 * Kernels for small dense matrices: square, row after row in a Float64Array. Every inner loop runs along a row, which is what
 * makes them as fast as a general library's blocked ones at up to some hundreds of rows.
 */

/** Replaces the lower triangle by Cholesky's factor; false where a pivot is not above `floor`. */
export function cholesky(matrix: Float64Array, size: number, floor = 0): boolean {
  for (let i = 0; i < size; i++) {
    const row = i * size;
    for (let j = 0; j <= i; j++) {
      const other = j * size;
      let sum = matrix[row + j]!;
      for (let k = 0; k < j; k++) sum -= matrix[row + k]! * matrix[other + k]!;
      if (j < i) matrix[row + j] = sum / matrix[other + j]!;
      else if (sum > floor) matrix[row + i] = Math.sqrt(sum);
      else return false;
    }
  }
  return true;
}

/** Replaces the right-hand sides, one a column, by those of L^-1: forward substitution for all at once. */
export function solveLower(lower: Float64Array, rightHandSides: Float64Array, size: number): void {
  for (let i = 0; i < size; i++) {
    const row = i * size;
    for (let k = 0; k < i; k++) {
      const factor = lower[row + k]!;
      if (factor === 0) continue;
      const above = k * size;
      for (let c = 0; c < size; c++) rightHandSides[row + c]! -= factor * rightHandSides[above + c]!;
    }
    const pivot = 1 / lower[row + i]!;
    for (let c = 0; c < size; c++) rightHandSides[row + c]! *= pivot;
  }
}

/** The product -A^T B as a new matrix. */
export function negativeTransposedProduct(a: Float64Array, b: Float64Array, size: number): Float64Array {
  const result = new Float64Array(size * size);
  for (let k = 0; k < size; k++) {
    const row = k * size;
    for (let i = 0; i < size; i++) {
      const factor = a[row + i]!;
      if (factor === 0) continue;
      const into = i * size;
      for (let j = 0; j < size; j++) result[into + j]! -= factor * b[row + j]!;
    }
  }
  return result;
}

/** Subtracts A^T A and B^T B from a symmetric matrix. */
export function subtractSquares(result: Float64Array, a: Float64Array, b: Float64Array, size: number): void {
  for (let k = 0; k < size; k++) {
    const row = k * size;
    for (let i = 0; i < size; i++) {
      const ofA = a[row + i]!;
      const ofB = b[row + i]!;
      const into = i * size;
      for (let j = 0; j <= i; j++) result[into + j]! -= ofA * a[row + j]! + ofB * b[row + j]!;
    }
  }
  mirrorLower(result, size);
}

/** Copies the lower triangle to the upper one. */
function mirrorLower(matrix: Float64Array, size: number): void {
  for (let i = 0; i < size; i++) for (let j = 0; j < i; j++) matrix[j * size + i] = matrix[i * size + j]!;
}

/** The inverse of L L^T from the lower factor. */
export function inverseFromCholesky(lower: Float64Array, size: number): Float64Array {
  const inverse = new Float64Array(size * size);
  const lowerInverse = new Float64Array(size * size);
  for (let i = 0; i < size; i++) lowerInverse[i * size + i] = 1;
  // As `solveLower`, but row i of the result ends at column i.
  for (let i = 0; i < size; i++) {
    const row = i * size;
    for (let k = 0; k < i; k++) {
      const factor = lower[row + k]!;
      const above = k * size;
      for (let c = 0; c <= k; c++) lowerInverse[row + c]! -= factor * lowerInverse[above + c]!;
    }
    const pivot = 1 / lower[row + i]!;
    for (let c = 0; c <= i; c++) lowerInverse[row + c]! *= pivot;
  }
  for (let k = 0; k < size; k++) {
    const row = k * size;
    for (let i = 0; i <= k; i++) {
      const factor = lowerInverse[row + i]!;
      for (let j = 0; j <= i; j++) inverse[i * size + j]! += factor * lowerInverse[row + j]!;
    }
  }
  mirrorLower(inverse, size);
  return inverse;
}

/** The transpose as a new matrix. */
export function transpose(matrix: Float64Array, size: number): Float64Array {
  const result = new Float64Array(size * size);
  for (let i = 0; i < size; i++) for (let j = 0; j < size; j++) result[j * size + i] = matrix[i * size + j]!;
  return result;
}
