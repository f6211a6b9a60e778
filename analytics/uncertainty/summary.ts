import { countSample, quantileSorted, type OrderWorkspace } from "../numerics/order-statistics";

/** P90 is the low case: 90 % of the values are at least this. */
export interface SampleRange {
  p90: number;
  p50: number;
  p10: number;
  mean: number;
}

export interface SampleSummary extends SampleRange {
  standardDeviation: number;
  minimum: number;
  maximum: number;
  standardErrors: SampleRange;
  histogram: { low: number; high: number; counts: number[] };
  exceedance: { values: number[]; probabilities: number[] };
}

const RANGE_PROBABILITIES = [0.1, 0.5, 0.9];
/** 0, 0.01, ..., 1: the curve's points; P90, P50 and P10 are among them. */
const CURVE_POINTS = 101;
const CURVE_PROBABILITIES = Array.from({ length: CURVE_POINTS }, (_, i) => i / (CURVE_POINTS - 1));
const EXCEEDANCE_PROBABILITIES = CURVE_PROBABILITIES.map((_, i) => 1 - i / (CURVE_POINTS - 1));

/**
 * P90, P50, P10 and mean of unordered values.
 *
 * @param values finite numbers; not changed
 */
export function rangeOfSample(
  values: ArrayLike<number>,
  count: number,
  workspace: OrderWorkspace,
): SampleRange {
  const { quantiles, mean } = countSample(values, count, RANGE_PROBABILITIES, workspace);
  return { p90: quantiles[0], p50: quantiles[1], p10: quantiles[2], mean };
}

/** The same for values in ascending order. */
export function rangeOfSorted(sorted: ArrayLike<number>, count: number): SampleRange {
  let sum = 0;
  for (let i = 0; i < count; i += 1) sum += sorted[i];
  return {
    p90: quantileSorted(sorted, 0.1, count),
    p50: quantileSorted(sorted, 0.5, count),
    p10: quantileSorted(sorted, 0.9, count),
    mean: sum / count,
  };
}

/**
 * Everything a screen shows about one simulated quantity: R-7 percentiles, moments, a 40-bar histogram and a
 * 101-point exceedance curve.
 *
 * Standard errors are those of independent trials: sd / sqrt(n) for the mean, sqrt(p (1 - p) / n) / f for a
 * percentile, with the density f from the sample itself (the slope of its distribution between neighbouring
 * percentiles). For a Latin hypercube sample they are on the safe side: its variance is at most n / (n - 1) times
 * that of independent trials and usually about half.
 *
 * @param values  finite numbers, not changed
 * @param count   how many of them to use
 * @see A. M. Mood, F. A. Graybill, D. C. Boes, Introduction to the Theory of Statistics, 3rd ed. (1974), section
 *      VI.5.3 (asymptotic variance of a sample quantile); A. B. Owen, Monte Carlo variance of scrambled net
 *      quadrature, SIAM J. Numer. Anal. 34 (1997) 1884-1910 (the bound for Latin hypercubes)
 */
export function summariseSample(
  values: ArrayLike<number>,
  count: number,
  workspace: OrderWorkspace,
): SampleSummary {
  const counted = countSample(values, count, CURVE_PROBABILITIES, workspace);
  const { minimum, maximum, mean, standardDeviation, quantiles, histogram } = counted;
  const error = (percent: number) => quantileError(quantiles, percent, count);
  return {
    p90: quantiles[10],
    p50: quantiles[50],
    p10: quantiles[90],
    mean,
    standardDeviation,
    minimum,
    maximum,
    standardErrors: {
      p90: error(10),
      p50: error(50),
      p10: error(90),
      mean: standardDeviation / Math.sqrt(count),
    },
    histogram: { low: minimum, high: maximum, counts: histogram },
    exceedance: { values: quantiles, probabilities: EXCEEDANCE_PROBABILITIES.slice() },
  };
}

/**
 * sqrt(p (1 - p) / n) / f, with 1 / f the slope of the quantile function over 2 percentiles either side (5 where the
 * sample is too small for that to hold a hundred values).
 */
function quantileError(quantiles: readonly number[], percent: number, count: number): number {
  const half = count >= 2500 ? 2 : 5;
  const inverseDensity =
    (quantiles[percent + half] - quantiles[percent - half]) / ((2 * half) / 100);
  const p = percent / 100;
  return Math.sqrt((p * (1 - p)) / count) * inverseDensity;
}
