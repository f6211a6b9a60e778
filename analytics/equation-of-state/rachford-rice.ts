/** Phase split at given K-values. */
import { ConvergenceError } from "../errors";

const MAXIMUM_ITERATIONS = 100;

/**
 * Vapour fraction V at which sum z_i (K_i - 1) / (1 + V (K_i - 1)) = 0, on the window
 *
 *     1 / (1 - Kmax) < V < 1 / (1 - Kmin)
 *
 * in which every mole fraction is positive. The window reaches beyond 0 and 1: there the feed is a mixture of phases
 * with a negative amount of one (the negative flash), so that an iteration may pass through a phase boundary and come
 * back. Newton's method on the function times its distances from both poles, which is nearly straight; bisection
 * whenever a step leaves the bracket. To rounding.
 *
 * @param z        feed, adding up to 1; components of zero do not count
 * @param lnK      ln (y_i / x_i)
 * @param k        filled with the K-values
 * @param start    a vapour fraction to start from; NaN when there is none
 * @returns        V; NaN when no K-value is above 1 or none is below, so that there is no window
 * @throws {ConvergenceError} when the iteration does not settle
 * @example vapourFraction(Float64Array.of(0.6, 0.4), Float64Array.of(Math.log(3), Math.log(0.2)), new Float64Array(2), NaN)
 *   // => 0.55
 * @see C. H. Whitson, M. L. Michelsen, Fluid Phase Equilib. 53 (1989) 51-71
 * @see H. H. Rachford, J. D. Rice, J. Pet. Technol. 4 (Oct. 1952) 19
 */
export function vapourFraction(
  z: Float64Array,
  lnK: Float64Array,
  k: Float64Array,
  start: number,
): number {
  const n = z.length;
  let largest = 0;
  let smallest = Infinity;
  for (let i = 0; i < n; i += 1) {
    k[i] = Math.exp(lnK[i]);
    if (z[i] > 0) {
      if (k[i] > largest) largest = k[i];
      if (k[i] < smallest) smallest = k[i];
    }
  }
  if (!(largest > 1 && smallest < 1 && largest < Infinity)) return NaN;
  const lowPole = 1 / (1 - largest);
  const highPole = 1 / (1 - smallest);
  // No x_i and no y_i is above 1, which brings the bounds in from the poles.
  let low = lowPole;
  let high = highPole;
  for (let i = 0; i < n; i += 1) {
    if (!(z[i] > 0)) continue;
    if (k[i] > 1) low = Math.max(low, (k[i] * z[i] - 1) / (k[i] - 1));
    else if (k[i] < 1) high = Math.min(high, (1 - z[i]) / (1 - k[i]));
  }
  let v = start > low && start < high ? start : 0.5 * (low + high);
  for (let iteration = 0; iteration < MAXIMUM_ITERATIONS; iteration += 1) {
    let value = 0;
    let slope = 0;
    let size = 0;
    for (let i = 0; i < n; i += 1) {
      const excess = k[i] - 1;
      const share = excess / (1 + v * excess);
      const term = z[i] * share;
      value += term;
      size += Math.abs(term);
      slope -= term * share;
    }
    if (Math.abs(value) <= 2e-16 * size) return v;
    if (value > 0) low = v;
    else high = v;
    const fromLow = v - lowPole;
    const fromHigh = highPole - v;
    const straightSlope = slope * fromLow * fromHigh + value * (fromHigh - fromLow);
    let next = v - (value * fromLow * fromHigh) / straightSlope;
    // A step within rounding is the end, not a reason to halve.
    if (Math.abs(next - v) <= 1e-16 * Math.max(1, Math.abs(v))) return v;
    if (!(next > low && next < high)) next = 0.5 * (low + high);
    if (next === low || next === high) return v;
    v = next;
  }
  throw new ConvergenceError("The split into gas and liquid did not converge", {
    lowPole,
    highPole,
    vapourFraction: v,
  });
}
