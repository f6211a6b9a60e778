/** Nonlinear least squares within bounds. */
import { ConvergenceError, DomainError } from "../errors";
import { solveShifted } from "./linear-system";

export interface LeastSquaresProblem {
  readonly start: readonly number[];
  readonly lowest: readonly number[];
  readonly highest: readonly number[];
  /** residuals at a point within the bounds; null where they cannot be had, which the search then avoids */
  readonly residuals: (point: readonly number[]) => Float64Array | null;
  readonly maximumIterations?: number;
  /** an improvement of the sum of squares that is not worth going on for; none by default */
  readonly negligibleImprovement?: number;
  /** called after every improvement */
  readonly onProgress?: (progress: LeastSquaresProgress) => void;
}

export interface LeastSquaresProgress {
  readonly iteration: number;
  /** sum of squares */
  readonly objective: number;
}

export interface LeastSquaresFit {
  readonly point: readonly number[];
  readonly residuals: Float64Array;
  readonly startObjective: number;
  readonly objective: number;
  readonly iterations: number;
}

const DIFFERENCE = 1e-4;
const FIRST_DAMPING = 1e-2;
/** enough for the normal equations to have Cholesky factors whatever their rank */
const LEAST_DAMPING = 1e-6;
const LARGEST_DAMPING = 1e9;
/** The search ends when two improvements in a row are each below this, relative, or negligible. */
const SMALL_IMPROVEMENT = 1e-4;
const DEFAULT_ITERATIONS = 60;

const sumOfSquares = (values: Float64Array) =>
  values.reduce((sum, value) => sum + value * value, 0);

/**
 * Levenberg and Marquardt's method with steps projected onto the bounds: a parameter at a bound that wants to go beyond
 * it is held there for the step. Derivatives by differences, forward or, where that fails, backward.
 *
 *     (J'J + damping diag(J'J)) step = -J' r
 *
 * @throws {DomainError} when the start lies outside the bounds or has no residuals
 * @throws {ConvergenceError} when neither side of a point has residuals, or the iterations run out
 * @see D. W. Marquardt, J. Soc. Ind. Appl. Math. 11 (1963) 431-441; C. T. Kelley, Iterative Methods for Optimization
 *   (1999), section 5.5, on projection
 */
export function fitLeastSquares(problem: LeastSquaresProblem): LeastSquaresFit {
  const { start, lowest, highest, onProgress } = problem;
  const { maximumIterations = DEFAULT_ITERATIONS, negligibleImprovement = 0 } = problem;
  start.forEach((value, i) => {
    if (!(value >= lowest[i] && value <= highest[i])) {
      throw new DomainError(
        `A fit starts within its bounds, ${lowest[i]} to ${highest[i]}; ${value} lies outside`,
        {
          input: `start.${i}`,
          value,
        },
      );
    }
  });
  let point = [...start];
  const first = problem.residuals(point);
  if (first === null)
    throw new DomainError("A fit needs residuals at its start", { input: "start" });
  let residuals = first;
  const startObjective = sumOfSquares(residuals);
  let objective = startObjective;
  let damping = FIRST_DAMPING;
  let small = 0;
  for (let iteration = 1; iteration <= maximumIterations; iteration += 1) {
    const normal = normalEquations(problem, point, residuals);
    let improved: { point: number[]; residuals: Float64Array; objective: number } | null = null;
    while (improved === null && damping < LARGEST_DAMPING) {
      const trial = dampedStep(problem, point, normal, damping);
      if (trial === null) break;
      const values = problem.residuals(trial);
      const trialObjective = values === null ? Infinity : sumOfSquares(values);
      if (values !== null && trialObjective < objective) {
        improved = { point: trial, residuals: values, objective: trialObjective };
      } else {
        damping *= 4;
      }
    }
    if (improved === null) {
      return { point, residuals, startObjective, objective, iterations: iteration };
    }
    const enough = Math.max(SMALL_IMPROVEMENT * objective, negligibleImprovement);
    small = objective - improved.objective < enough ? small + 1 : 0;
    ({ point, residuals, objective } = improved);
    damping = Math.max(damping / 5, LEAST_DAMPING);
    onProgress?.({ iteration, objective });
    if (small === 2 || objective === 0) {
      return { point, residuals, startObjective, objective, iterations: iteration };
    }
  }
  throw new ConvergenceError("The fit did not settle", {
    iterations: maximumIterations,
    objective,
  });
}

interface NormalEquations {
  /** J'J by rows */
  readonly matrix: Float64Array;
  /** J'r */
  readonly gradient: Float64Array;
}

function normalEquations(
  problem: LeastSquaresProblem,
  point: readonly number[],
  residuals: Float64Array,
): NormalEquations {
  const n = point.length;
  const columns = point.map((value, i) => {
    const step = DIFFERENCE * (1 + Math.abs(value));
    const inward = value + step <= problem.highest[i] ? step : -step;
    for (const signed of [inward, -inward]) {
      const moved = value + signed;
      if (moved < problem.lowest[i] || moved > problem.highest[i]) continue;
      const beside = problem.residuals(point.map((other, j) => (j === i ? moved : other)));
      if (beside !== null) return beside.map((r, row) => (r - residuals[row]) / signed);
    }
    throw new ConvergenceError("The fit ran into a point with no residuals on either side", {
      parameter: i,
      value,
    });
  });
  const matrix = new Float64Array(n * n);
  const gradient = new Float64Array(n);
  for (let i = 0; i < n; i += 1) {
    for (let j = 0; j <= i; j += 1) {
      const value = columns[i].reduce((sum, entry, row) => sum + entry * columns[j][row], 0);
      matrix[i * n + j] = value;
      matrix[j * n + i] = value;
    }
    gradient[i] = columns[i].reduce((sum, entry, row) => sum + entry * residuals[row], 0);
  }
  return { matrix, gradient };
}

/** The next point, or null when no parameter can move. */
function dampedStep(
  { lowest, highest }: LeastSquaresProblem,
  point: readonly number[],
  { matrix, gradient }: NormalEquations,
  damping: number,
): number[] | null {
  const n = point.length;
  const free = point.flatMap((value, i) => {
    const stuck =
      (value <= lowest[i] && gradient[i] >= 0) || (value >= highest[i] && gradient[i] <= 0);
    return stuck || !(matrix[i * n + i] > 0) ? [] : [i];
  });
  const m = free.length;
  if (m === 0) return null;
  // In units of each parameter's own curvature the damping is one number on the diagonal.
  const scaled = new Float64Array(m * m);
  const step = new Float64Array(m);
  free.forEach((i, a) => {
    const scale = Math.sqrt(matrix[i * n + i]);
    step[a] = -gradient[i] / scale;
    free.forEach((j, b) => {
      scaled[a * m + b] = matrix[i * n + j] / (scale * Math.sqrt(matrix[j * n + j]));
    });
  });
  if (!solveShifted(scaled, damping, new Float64Array(m * m), step, m)) return null;
  const next = [...point];
  free.forEach((i, a) => {
    const moved = point[i] + step[a] / Math.sqrt(matrix[i * n + i]);
    next[i] = Math.min(highest[i], Math.max(lowest[i], moved));
  });
  return next;
}
