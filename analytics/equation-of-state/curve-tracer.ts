/** Follows a curve through the space of ln K, ln T and ln p, around its turns and through the critical point. */
import { solveLinear } from "../numerics/linear-system";

/** size - 1 equations in `size` unknowns: a curve. */
export interface CurveSystem {
  readonly size: number;
  /**
   * Residuals and Jacobian (rows of `size`) of all equations but the last row, which belongs to the tracer.
   *
   * @returns false where the equations have no value
   */
  fill(at: Float64Array, residual: Float64Array, jacobian: Float64Array): boolean;
}

/** A point on the curve with its tangent, which is 1 in the unknown that was held when it was found. */
export interface CurvePoint {
  readonly at: Float64Array;
  readonly tangent: Float64Array;
}

const TOLERANCE = 1e-10;
/**
 * The step before the last must have been below this: next to the critical point small residuals alone leave pressure
 * and temperature open.
 */
const SMALL_STEP = 1e-5;
const MAXIMUM_ITERATIONS = 9;
/** A correction larger than this means a prediction too far from the curve. */
const LARGEST_CORRECTION = 1;

/**
 * Newton's method along a curve. Each point is found with one unknown held, the one that changes most along the curve,
 * predicted by the cubic through the last two points and their tangents.
 *
 * @see M. L. Michelsen, Fluid Phase Equilib. 4 (1980) 1-10
 */
export class CurveTracer {
  iterations = 0;
  private readonly residual: Float64Array;
  private readonly jacobian: Float64Array;

  constructor(private readonly system: CurveSystem) {
    this.residual = new Float64Array(system.size);
    this.jacobian = new Float64Array(system.size * system.size);
  }

  /** Brings a guess to the curve with unknown `held` kept at `value`. @returns null when that does not converge */
  correct(guess: Float64Array, held: number, value: number): CurvePoint | null {
    const { residual, jacobian, system } = this;
    const n = system.size;
    const at = guess.slice();
    at[held] = value;
    let lastStep = Infinity;
    for (this.iterations = 1; this.iterations <= MAXIMUM_ITERATIONS; this.iterations += 1) {
      if (!this.fill(at, held)) return null;
      residual[n - 1] = 0;
      const error = residual.reduce((largest, r) => Math.max(largest, Math.abs(r)), 0);
      if (!(error < Infinity)) return null;
      if (error < TOLERANCE && lastStep < SMALL_STEP) {
        const tangent = new Float64Array(n);
        tangent[n - 1] = 1;
        return solveLinear(jacobian, tangent, n) ? { at, tangent } : null;
      }
      if (!solveLinear(jacobian, residual, n)) return null;
      lastStep = residual.reduce((largest, step) => Math.max(largest, Math.abs(step)), 0);
      if (!(lastStep < LARGEST_CORRECTION)) return null;
      for (let i = 0; i < n; i += 1) at[i] -= residual[i];
    }
    return null;
  }

  private fill(at: Float64Array, held: number): boolean {
    const n = this.system.size;
    this.jacobian.fill(0);
    this.jacobian[(n - 1) * n + held] = 1;
    return this.system.fill(at, this.residual, this.jacobian);
  }
}

/** The unknown that changes most along the curve. */
export function steepest({ tangent }: CurvePoint): number {
  let held = 0;
  for (let i = 1; i < tangent.length; i += 1) {
    if (Math.abs(tangent[i]) > Math.abs(tangent[held])) held = i;
  }
  return held;
}

/**
 * Cubic Hermite polynomial through two points and their tangents, with unknown `held` as its argument: inside to
 * interpolate, beyond `to` to predict.
 */
export function hermite(
  from: CurvePoint,
  to: CurvePoint,
  held: number,
  value: number,
): Float64Array {
  const width = to.at[held] - from.at[held];
  const t = (value - from.at[held]) / width;
  const h00 = (1 + 2 * t) * (1 - t) * (1 - t);
  const h10 = t * (1 - t) * (1 - t);
  const h11 = t * t * (t - 1);
  const fromScale = width / from.tangent[held];
  const toScale = width / to.tangent[held];
  return to.at.map(
    (end, i) =>
      h00 * from.at[i] +
      (1 - h00) * end +
      h10 * fromScale * from.tangent[i] +
      h11 * toScale * to.tangent[i],
  );
}

/** Straight along the tangent. */
export function straight({ at, tangent }: CurvePoint, held: number, value: number): Float64Array {
  const step = (value - at[held]) / tangent[held];
  return at.map((start, i) => start + step * tangent[i]);
}
