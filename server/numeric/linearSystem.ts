/**
 * Factors a small dense matrix in place, P M = L U, with partial pivoting.
 *
 * @param matrix row-major n x n; afterwards U on and above the diagonal, except that the diagonal holds
 * 1/u_ii, and L below it
 * @param pivots n row numbers, written: row i was exchanged with row pivots[i]
 * @returns false where the matrix is singular or not finite; the content is then of no use
 * @see Golub & Van Loan, Matrix Computations, 3.4
 */
export function factorise(matrix: Float64Array, n: number, pivots: Int32Array): boolean {
  for (let k = 0; k < n; k++) {
    let pivot = k;
    let largest = Math.abs(matrix[k * n + k]);
    for (let i = k + 1; i < n; i++) {
      const size = Math.abs(matrix[i * n + k]);
      if (size > largest) {
        largest = size;
        pivot = i;
      }
    }
    // Also catches a pivot that is not a number.
    if (!(largest > 0 && largest < Number.POSITIVE_INFINITY)) return false;
    pivots[k] = pivot;
    if (pivot !== k) {
      for (let j = 0; j < n; j++) {
        const held = matrix[k * n + j];
        matrix[k * n + j] = matrix[pivot * n + j];
        matrix[pivot * n + j] = held;
      }
    }
    const inverse = 1 / matrix[k * n + k];
    matrix[k * n + k] = inverse;
    for (let i = k + 1; i < n; i++) {
      const factor = matrix[i * n + k] * inverse;
      matrix[i * n + k] = factor;
      if (factor !== 0) {
        for (let j = k + 1; j < n; j++) matrix[i * n + j] -= factor * matrix[k * n + j];
      }
    }
  }
  return true;
}

/**
 * Solves M x = b with the factors of `factorise`.
 *
 * @param values holds b from `offset` on; overwritten by x
 */
export function solveFactored(
  factors: Float64Array,
  n: number,
  pivots: Int32Array,
  values: Float64Array,
  offset: number,
): void {
  for (let k = 0; k < n; k++) {
    const pivot = pivots[k];
    if (pivot !== k) {
      const held = values[offset + k];
      values[offset + k] = values[offset + pivot];
      values[offset + pivot] = held;
    }
  }
  for (let i = 1; i < n; i++) {
    let sum = values[offset + i];
    for (let j = 0; j < i; j++) sum -= factors[i * n + j] * values[offset + j];
    values[offset + i] = sum;
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = values[offset + i];
    for (let j = i + 1; j < n; j++) sum -= factors[i * n + j] * values[offset + j];
    values[offset + i] = sum * factors[i * n + i];
  }
}
