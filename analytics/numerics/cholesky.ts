/**
 * Lower Cholesky factor L of a symmetric matrix, L L' = A.
 *
 * @param matrix  n x n, row by row; only the lower triangle is read
 * @param n       order
 * @returns       n x n, row by row, zeros above the diagonal; or `null` when the matrix is not positive definite
 *                (a pivot below 1e-10 of its diagonal entry)
 * @see G. H. Golub, C. F. Van Loan, Matrix Computations, 4th ed. (2013), section 4.2
 */
export function choleskyFactor(matrix: Float64Array, n: number): Float64Array | null {
  const factor = new Float64Array(n * n);
  for (let row = 0; row < n; row += 1) {
    for (let column = 0; column <= row; column += 1) {
      let sum = matrix[row * n + column];
      for (let k = 0; k < column; k += 1) sum -= factor[row * n + k] * factor[column * n + k];
      if (row === column) {
        if (!(sum > 1e-10 * matrix[row * n + row])) return null;
        factor[row * n + row] = Math.sqrt(sum);
      } else {
        factor[row * n + column] = sum / factor[column * n + column];
      }
    }
  }
  return factor;
}

/** Inverse of a lower triangular n x n matrix with a non-zero diagonal, by forward substitution. */
export function invertLower(lower: Float64Array, n: number): Float64Array {
  const inverse = new Float64Array(n * n);
  for (let column = 0; column < n; column += 1) {
    for (let row = column; row < n; row += 1) {
      let sum = row === column ? 1 : 0;
      for (let k = column; k < row; k += 1) sum -= lower[row * n + k] * inverse[k * n + column];
      inverse[row * n + column] = sum / lower[row * n + row];
    }
  }
  return inverse;
}
