import { ConvergenceError } from "../errors";

export interface SymmetricEigen {
  /** ascending */
  readonly values: Float64Array;
  /** unit vectors, one a row, in the order of the values */
  readonly vectors: readonly Float64Array[];
}

const MOST_SWEEPS = 60;

/**
 * Eigenvalues and eigenvectors of a symmetric matrix by cyclic Jacobi rotations: each takes one entry off the diagonal
 * to 0, and sweeps over all of them go on until nothing is left. Meant for small matrices.
 *
 * @param matrix  n x n, row by row; symmetric
 * @param n       order
 * @throws {ConvergenceError} when 60 sweeps do not do it (not seen)
 * @see G. H. Golub, C. F. Van Loan, Matrix Computations, 4th ed. (2013), section 8.5
 */
export function symmetricEigen(matrix: Float64Array, n: number): SymmetricEigen {
  const a = matrix.slice();
  const vectors = Array.from({ length: n }, (_, row) =>
    Float64Array.from({ length: n }, (__, column) => (row === column ? 1 : 0)),
  );
  const scale = Math.hypot(...a);
  for (let sweep = 0; sweep < MOST_SWEEPS; sweep += 1) {
    if (offDiagonal(a, n) <= 1e-17 * scale) return sorted(a, vectors, n);
    for (let p = 0; p < n - 1; p += 1) {
      for (let q = p + 1; q < n; q += 1) rotate(a, vectors, n, p, q);
    }
  }
  throw new ConvergenceError("The eigenvalues did not settle", { order: n });
}

function offDiagonal(a: Float64Array, n: number): number {
  let sum = 0;
  for (let i = 0; i < n; i += 1) for (let j = 0; j < i; j += 1) sum += a[i * n + j] ** 2;
  return Math.sqrt(2 * sum);
}

/** Takes a_pq to 0. */
function rotate(a: Float64Array, vectors: Float64Array[], n: number, p: number, q: number): void {
  const apq = a[p * n + q];
  if (apq === 0) return;
  const theta = (a[q * n + q] - a[p * n + p]) / (2 * apq);
  const t = (theta >= 0 ? 1 : -1) / (Math.abs(theta) + Math.hypot(theta, 1));
  const c = 1 / Math.hypot(t, 1);
  const s = t * c;
  for (let k = 0; k < n; k += 1) {
    const [kp, kq] = [a[k * n + p], a[k * n + q]];
    a[k * n + p] = c * kp - s * kq;
    a[k * n + q] = s * kp + c * kq;
  }
  for (let k = 0; k < n; k += 1) {
    const [pk, qk] = [a[p * n + k], a[q * n + k]];
    a[p * n + k] = c * pk - s * qk;
    a[q * n + k] = s * pk + c * qk;
    const [vp, vq] = [vectors[p][k], vectors[q][k]];
    vectors[p][k] = c * vp - s * vq;
    vectors[q][k] = s * vp + c * vq;
  }
  a[p * n + q] = 0;
  a[q * n + p] = 0;
}

function sorted(a: Float64Array, vectors: Float64Array[], n: number): SymmetricEigen {
  const order = Array.from({ length: n }, (_, i) => i).sort((i, j) => a[i * n + i] - a[j * n + j]);
  return {
    values: Float64Array.from(order, (i) => a[i * n + i]),
    vectors: order.map((i) => vectors[i]),
  };
}
