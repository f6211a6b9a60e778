import { ConvergenceError, DomainError } from "../errors";
import { symmetricEigen } from "./symmetric-eigen";

export interface NearestCorrelation {
  /** n x n, row by row: ones on the diagonal, no eigenvalue below the floor */
  readonly matrix: Float64Array;
  /** of the matrix that was given */
  readonly smallestEigenvalue: number;
  /** square root of the sum of squared changes over all entries */
  readonly distance: number;
  readonly iterations: number;
}

const MOST_ITERATIONS = 20_000;

/**
 * The correlation matrix nearest to a symmetric one: least sum of squared changes over all entries. Alternating
 * projections onto the matrices without negative eigenvalues and onto those with ones on the diagonal, with Dykstra's
 * correction of the first, without which the limit would be a correlation matrix but not the nearest.
 *
 * @param matrix     n x n, row by row, symmetric
 * @param n          order
 * @param floor      least eigenvalue of the answer, 0 to 1; above 0 it leaves room for a Cholesky factor
 * @param tolerance  the projections end when they differ by less, in the largest entry
 * @throws {DomainError} when the matrix is not symmetric
 * @throws {ConvergenceError} when the projections do not settle
 * @see N. J. Higham, Computing the nearest correlation matrix: a problem from finance, IMA J. Numer. Anal. 22 (2002)
 *      329-343
 */
export function nearestCorrelation(
  matrix: Float64Array,
  n: number,
  { floor = 0, tolerance = 1e-12 }: { floor?: number; tolerance?: number } = {},
): NearestCorrelation {
  requireSymmetry(matrix, n);
  const smallestEigenvalue = symmetricEigen(matrix, n).values[0];
  const isUnit = matrix.every((value, i) => i % (n + 1) !== 0 || value === 1);
  if (isUnit && smallestEigenvalue >= floor) {
    return { matrix: matrix.slice(), smallestEigenvalue, distance: 0, iterations: 0 };
  }
  let y: Float64Array = matrix.slice();
  let correction = new Float64Array(n * n);
  for (let iteration = 1; iteration <= MOST_ITERATIONS; iteration += 1) {
    const r = y.map((value, i) => value - correction[i]);
    const x = raiseEigenvalues(r, n, floor);
    correction = x.map((value, i) => value - r[i]);
    y = x.map((value, i) => (i % (n + 1) === 0 ? 1 : value));
    const gap = x.reduce((largest, value, i) => Math.max(largest, Math.abs(value - y[i])), 0);
    if (gap < tolerance) {
      const changes = y.map((value, i) => value - matrix[i]);
      return {
        matrix: y,
        smallestEigenvalue,
        distance: Math.hypot(...changes),
        iterations: iteration,
      };
    }
  }
  throw new ConvergenceError("The nearest correlations did not settle", { order: n });
}

/** The nearest symmetric matrix without an eigenvalue below the floor. */
function raiseEigenvalues(matrix: Float64Array, n: number, floor: number): Float64Array {
  const { values, vectors } = symmetricEigen(matrix, n);
  const raised = matrix.slice();
  values.forEach((value, k) => {
    if (value >= floor) return;
    const vector = vectors[k];
    for (let i = 0; i < n; i += 1) {
      for (let j = 0; j < n; j += 1) raised[i * n + j] += (floor - value) * vector[i] * vector[j];
    }
  });
  return raised;
}

function requireSymmetry(matrix: Float64Array, n: number): void {
  for (let i = 0; i < n; i += 1) {
    for (let j = 0; j < i; j += 1) {
      if (matrix[i * n + j] === matrix[j * n + i]) continue;
      throw new DomainError("A correlation matrix is symmetric.", {
        input: "matrix",
        value: matrix[i * n + j],
      });
    }
  }
}
