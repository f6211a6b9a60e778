import { normalCdf, normalPdf, normalQuantile } from "../numerics/normal";
import { fillNormalQuantiles } from "../numerics/normal-table";
import type { Family } from "./families";

/** A spread of the logarithm this small cannot be told from a normal distribution. */
const LEAST_SIGMA = 1e-10;

/** (e^u - 1) / u, which is 1 at 0. */
export function growth(u: number): number {
  return u === 0 ? 1 : Math.expm1(u) / u;
}

/**
 * Three-parameter lognormal, of either skew, in a form that has the normal distribution in its middle:
 *
 *     x(z) = median + scale (e^(sigma z) - 1) / sigma,   z standard normal
 *
 * A positive `sigma` gives a lognormal with a lower end at median - scale / sigma, a negative one its mirror image with
 * an upper end there, and 0 a normal distribution with standard deviation `scale`.
 *
 * @param scale  > 0; the density at the median is that of a normal distribution with this standard deviation
 * @see N. L. Johnson, S. Kotz, N. Balakrishnan, Continuous Univariate Distributions 1, 2nd ed. (1994), ch. 14
 */
export function shiftedLognormalFamily(median: number, scale: number, spread: number): Family {
  const sigma = Math.abs(spread) < LEAST_SIGMA ? 0 : spread;
  const end = sigma === 0 ? Infinity : median - scale / sigma;
  const minimum = sigma > 0 ? end : -Infinity;
  const maximum = sigma < 0 ? end : Infinity;
  const valueAt = (z: number) => median + scale * z * growth(sigma * z);
  const standard = (x: number) => {
    if (x <= minimum) return -Infinity;
    if (x >= maximum) return Infinity;
    const y = (x - median) / scale;
    return sigma === 0 ? y : Math.log1p(sigma * y) / sigma;
  };
  return {
    minimum,
    maximum,
    quantile(p) {
      const z = normalQuantile(p);
      if (Number.isFinite(z)) return valueAt(z);
      return z < 0 ? minimum : maximum;
    },
    cdf: (x) => normalCdf(standard(x)),
    pdf(x) {
      const z = standard(x);
      return Number.isFinite(z) ? normalPdf(z) / (scale * Math.exp(sigma * z)) : 0;
    },
    momentsBetween: (low, high) =>
      normalScoreMoments(valueAt, standard(low), standard(high), 9 + 2 * Math.abs(sigma)),
    fillQuantiles(probabilities, count, out) {
      fillNormalQuantiles(probabilities, count, out);
      for (let i = 0; i < count; i += 1) out[i] = valueAt(out[i]);
    },
  };
}

/** Five-point Gauss-Legendre nodes and weights on [-1, 1]. */
const GAUSS_5: readonly (readonly [number, number])[] = [
  [-0.906179845938664, 0.23692688505618908],
  [-0.5384693101056831, 0.47862867049936647],
  [0, 128 / 225],
  [0.5384693101056831, 0.47862867049936647],
  [0.906179845938664, 0.23692688505618908],
];
const PANEL_WIDTH = 0.25;

/**
 * Mean and variance of a smooth function of a standard normal between two scores, by quadrature: the closed form loses
 * all its digits where sigma is small.
 *
 * @param reach  scores beyond plus or minus this carry nothing
 */
function normalScoreMoments(
  valueAt: (z: number) => number,
  from: number,
  to: number,
  reach: number,
): { mean: number; variance: number } {
  const low = Math.max(from, -reach);
  const high = Math.min(to, reach);
  const panels = Math.max(8, Math.ceil((high - low) / PANEL_WIDTH));
  const half = (high - low) / panels / 2;
  const average = (of: (x: number) => number) => {
    let mass = 0;
    let sum = 0;
    for (let i = 0; i < panels; i += 1) {
      const middle = low + (2 * i + 1) * half;
      for (const [node, weight] of GAUSS_5) {
        const z = middle + node * half;
        const w = weight * normalPdf(z);
        mass += w;
        sum += w * of(valueAt(z));
      }
    }
    return sum / mass;
  };
  const centre = valueAt(0);
  const mean = centre + average((x) => x - centre);
  return { mean, variance: average((x) => (x - mean) ** 2) };
}
