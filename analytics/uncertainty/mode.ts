/** Cells to a bandwidth, and bandwidths to either side of a value that its kernel reaches. */
const CELLS = 8;
const REACH = 4;

const KERNEL = Float64Array.from({ length: 2 * CELLS * REACH + 1 }, (_, i) => {
  const u = (i - CELLS * REACH) / CELLS;
  return Math.exp(-0.5 * u * u);
});

/**
 * Where values are densest: the peak of a Gaussian kernel density, estimated on the logarithms of values that are all
 * positive (a peak of f(x) is one of g(ln x) / x) and on the values themselves where one is not.
 *
 * The bandwidth is the one that is best for a normal density's slope, h = (4/5)^(1/7) s n^(-1/7), because the mode is
 * where the slope vanishes; and the values are first drawn together about their mean by 1 / sqrt(1 + h^2/s^2), so that
 * smoothing does not widen them. For a lognormal distribution both together are exact, exp(mu - sigma^2); of two peaks
 * nearer than about three bandwidths one is seen. A mode is never known as well as a mean: for a lognormal of
 * P10/P90 = 8 to 4 % with 10,000 trials of a Latin hypercube, to 2 % with 16,384 Sobol points.
 *
 * @param quantiles  of cumulative probabilities 0, 0.01, ..., 1, ascending; each step counts as values at its middle
 * @param count      trials that they come from
 * @see J. E. Chacon, T. Duong, M. P. Wand, Asymptotics for general multivariate kernel density derivative estimators,
 *      Stat. Sinica 21 (2011) 807-840 (bandwidth); M. C. Jones, On correcting for variance inflation in kernel density
 *      estimation, Comput. Stat. Data Anal. 11 (1991) 3-15
 */
export function modeOfCurve(quantiles: readonly number[], count: number): number {
  const lowest = quantiles[0];
  if (lowest === quantiles[quantiles.length - 1]) return lowest;
  const isLog = lowest > 0;
  const scaled = isLog ? quantiles.map(Math.log) : quantiles;
  const steps = scaled.slice(1).map((value, i) => (value + scaled[i]) / 2);
  const mean = steps.reduce((sum, value) => sum + value, 0) / steps.length;
  const spread = Math.sqrt(
    steps.reduce((sum, value) => sum + (value - mean) ** 2, 0) / steps.length,
  );
  // More than half of the values are one value.
  if (spread === 0) return quantiles[Math.floor(quantiles.length / 2)];
  const relative = (4 / 5) ** (1 / 7) * count ** (-1 / 7);
  const shrink = 1 / Math.sqrt(1 + relative * relative);
  const cell = (relative * spread * shrink) / CELLS;
  const drawn = steps.map((value) => mean + (value - mean) * shrink);
  const low = drawn[0] - REACH * CELLS * cell;
  const density = smooth(drawn, low, cell);
  return toValue(peakOf(density, low, cell, isLog), isLog);
}

const toValue = (position: number, isLog: boolean) => (isLog ? Math.exp(position) : position);

/** Kernel density on a grid from `low`, each value shared between the two cells that it lies between. */
function smooth(values: readonly number[], low: number, cell: number): Float64Array {
  const last = (values[values.length - 1] - low) / cell;
  const weights = new Float64Array(Math.ceil(last) + REACH * CELLS + 2);
  for (const value of values) {
    const position = (value - low) / cell;
    const below = Math.floor(position);
    weights[below] += below + 1 - position;
    weights[below + 1] += position - below;
  }
  const density = new Float64Array(weights.length);
  const reach = REACH * CELLS;
  weights.forEach((weight, at) => {
    if (weight === 0) return;
    const from = Math.max(0, at - reach);
    const to = Math.min(density.length - 1, at + reach);
    for (let i = from; i <= to; i += 1) density[i] += weight * KERNEL[i - at + reach];
  });
  return density;
}

/** The highest cell, and the top of the parabola through it and its neighbours, in logarithms of the density. */
function peakOf(density: Float64Array, low: number, cell: number, isLog: boolean): number {
  const height = (i: number) => Math.log(density[i]) - (isLog ? i * cell : 0);
  let best = 1;
  for (let i = 1; i < density.length - 1; i += 1) if (height(i) > height(best)) best = i;
  const [before, top, after] = [height(best - 1), height(best), height(best + 1)];
  const bend = before - 2 * top + after;
  const shift = bend < 0 ? (0.5 * (before - after)) / bend : 0;
  return low + (best + (Math.abs(shift) <= 1 ? shift : 0)) * cell;
}
