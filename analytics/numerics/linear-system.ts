/**
 * Solves A x = b in place by Gaussian elimination with row pivoting.
 *
 * @param matrix  n x n, row by row; destroyed
 * @param b       right-hand side; becomes x
 * @returns       false when the matrix is singular to rounding, with `b` spoilt
 * @see G. H. Golub, C. F. Van Loan, Matrix Computations, 4th ed. (2013), section 3.4
 */
export function solveLinear(matrix: Float64Array, b: Float64Array, n: number): boolean {
  for (let column = 0; column < n; column += 1) {
    let pivot = column;
    let largest = Math.abs(matrix[column * n + column]);
    for (let row = column + 1; row < n; row += 1) {
      const size = Math.abs(matrix[row * n + column]);
      if (size > largest) {
        largest = size;
        pivot = row;
      }
    }
    if (!(largest > 0 && largest < Infinity)) return false;
    if (pivot !== column) {
      for (let k = column; k < n; k += 1) {
        const held = matrix[column * n + k];
        matrix[column * n + k] = matrix[pivot * n + k];
        matrix[pivot * n + k] = held;
      }
      const held = b[column];
      b[column] = b[pivot];
      b[pivot] = held;
    }
    const inverse = 1 / matrix[column * n + column];
    for (let row = column + 1; row < n; row += 1) {
      const factor = matrix[row * n + column] * inverse;
      if (factor === 0) continue;
      for (let k = column + 1; k < n; k += 1) {
        matrix[row * n + k] -= factor * matrix[column * n + k];
      }
      b[row] -= factor * b[column];
    }
  }
  for (let row = n - 1; row >= 0; row -= 1) {
    let sum = b[row];
    for (let k = row + 1; k < n; k += 1) sum -= matrix[row * n + k] * b[k];
    b[row] = sum / matrix[row * n + row];
  }
  return true;
}

/**
 * Solves (A + shift I) x = b for a symmetric matrix by Cholesky factors; with a large enough shift there are some.
 *
 * @param matrix  n x n, row by row; kept, only the lower triangle is read
 * @param factor  n x n, filled with the lower factor
 * @param b       right-hand side; becomes x
 * @returns       false when the shifted matrix is not positive definite, with `b` untouched
 */
export function solveShifted(
  matrix: Float64Array,
  shift: number,
  factor: Float64Array,
  b: Float64Array,
  n: number,
): boolean {
  for (let row = 0; row < n; row += 1) {
    for (let column = 0; column <= row; column += 1) {
      let sum = matrix[row * n + column];
      if (row === column) sum += shift;
      for (let k = 0; k < column; k += 1) sum -= factor[row * n + k] * factor[column * n + k];
      if (row === column) {
        if (!(sum > 1e-12)) return false;
        factor[row * n + row] = Math.sqrt(sum);
      } else {
        factor[row * n + column] = sum / factor[column * n + column];
      }
    }
  }
  for (let row = 0; row < n; row += 1) {
    let sum = b[row];
    for (let k = 0; k < row; k += 1) sum -= factor[row * n + k] * b[k];
    b[row] = sum / factor[row * n + row];
  }
  for (let row = n - 1; row >= 0; row -= 1) {
    let sum = b[row];
    for (let k = row + 1; k < n; k += 1) sum -= factor[k * n + row] * b[k];
    b[row] = sum / factor[row * n + row];
  }
  return true;
}
