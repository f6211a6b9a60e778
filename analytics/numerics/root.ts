import { ConvergenceError } from "../errors";

const MOST_STEPS = 100;

/**
 * Root of a continuous function between two points where its signs differ: Brent's method (inverse quadratic
 * interpolation, secant steps and bisection), to rounding.
 *
 * @param f     evaluated between `from` and `to` only
 * @param from  one end; may be the root itself
 * @param to    the other
 * @throws {ConvergenceError} when the signs at the ends are the same
 * @see R. P. Brent, Algorithms for Minimization without Derivatives (1973), chapter 4
 */
export function findRoot(f: (x: number) => number, from: number, to: number): number {
  let [a, b] = [from, to];
  let [fa, fb] = [f(a), f(b)];
  if (!(fa * fb <= 0)) {
    throw new ConvergenceError("The function has one sign at both ends", { from, to, fa, fb });
  }
  let [c, fc] = [a, fa];
  let step = b - a;
  let before = step;
  for (let count = 0; count < MOST_STEPS && fb !== 0; count += 1) {
    if (fb > 0 === fc > 0) {
      [c, fc] = [a, fa];
      step = b - a;
      before = step;
    }
    if (Math.abs(fc) < Math.abs(fb)) {
      [a, b, c] = [b, c, b];
      [fa, fb, fc] = [fb, fc, fb];
    }
    const tolerance = 2 * Number.EPSILON * Math.abs(b) + 1e-300;
    const half = 0.5 * (c - b);
    if (Math.abs(half) <= tolerance) break;
    const trial = Math.abs(before) >= tolerance && Math.abs(fa) > Math.abs(fb);
    const inward = trial ? interpolate(a, b, c, fa, fb, fc) : null;
    const limit = Math.min(3 * Math.abs(half) - Math.abs(tolerance), Math.abs(before));
    if (inward !== null && inward * half > 0 && 2 * Math.abs(inward) < limit) {
      before = step;
      step = inward;
    } else {
      step = half;
      before = half;
    }
    [a, fa] = [b, fb];
    b += Math.abs(step) > tolerance ? step : Math.sign(half) * tolerance;
    fb = f(b);
  }
  return b;
}

/** Step from b by the secant, or by inverse quadratic interpolation when the three points differ. */
function interpolate(a: number, b: number, c: number, fa: number, fb: number, fc: number): number {
  const s = fb / fa;
  if (a === c) return ((c - b) * s) / (s - 1);
  const q = fa / fc;
  const r = fb / fc;
  return -(s * ((c - b) * q * (q - r) - (b - a) * (r - 1))) / ((q - 1) * (r - 1) * (s - 1));
}
