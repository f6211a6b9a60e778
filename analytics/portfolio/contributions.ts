import type { Range } from "../volumetrics/results-schema";

type Percentiles = Pick<Range, "p90" | "p50" | "p10">;

/** What one member brings to a total, in the total's unit. They add up to the total's own figure in each column. */
export interface Contribution {
  /** Cov(member, total) / Var(total); can be above 1 or below 0, adds up to 1 over all members */
  shareOfVariance: number;
  mean: number;
  p90: number;
  p50: number;
  p10: number;
}

/** How well the contributions are known before the total's own errors are. */
export interface ContributionFit {
  contribution: Contribution;
  /** what each percentile's contribution moves by with the percentile: the slopes of all members add up to 1 */
  slopes: Percentiles;
  /** one standard error of the line at each percentile, from the scatter around it, for independent trials */
  lineErrors: Percentiles;
}

/** The trials near a percentile of the total. */
interface Window {
  trials: Uint32Array;
  /** of the total over the window */
  mean: number;
  /** sum of squared deviations of the total over the window */
  squares: number;
  /** the percentile itself */
  target: number;
}

export interface ContributionOptions {
  total: Float64Array;
  /** trials from the smallest total to the largest */
  order: Uint32Array;
  quantiles: { p90: number; p50: number; p10: number };
}

/** Half the width of a window, as a share of all trials: 5 % of them tell of one percentile. */
const HALF_WIDTH = 0.025;

/**
 * Euler's allocation of a total's percentiles: a member contributes E[member | total = percentile], what it holds on
 * average when the total comes out there, so that the contributions add up to the percentile.
 *
 * The conditional mean is estimated by a straight line through the trials whose total ranks within 2.5 points of the
 * percentile, read at the percentile itself. The slopes of all members add up to 1, so the contributions add up to
 * the percentile exactly, whatever the width. For jointly normal members the line is the truth,
 * mu_i + Cov(X_i, S) / Var(S) (q - mu_S).
 *
 * The error of a line read at x is s sqrt(1 / n + (x - mean)^2 / squares), with s^2 the squared scatter around it over
 * n - 2 (any textbook of regression).
 *
 * @returns a function from a member's trials, in the order of the total's, to its contribution
 * @see D. Tasche, Risk contributions and performance measurement, Technische Universitaet Muenchen (1999), section 5
 *      (quantile-based risk measures); J. Fan, I. Gijbels, Local Polynomial Modelling and Its Applications (1996),
 *      chapter 2 (the local line)
 */
export function createContributions({ total, order, quantiles }: ContributionOptions) {
  const count = total.length;
  let mean = 0;
  for (let t = 0; t < count; t += 1) mean += total[t];
  mean /= count;
  const centred = new Float64Array(count);
  let squares = 0;
  for (let t = 0; t < count; t += 1) {
    centred[t] = total[t] - mean;
    squares += centred[t] * centred[t];
  }
  const windows = {
    p90: windowAt(0.1, quantiles.p90, total, order),
    p50: windowAt(0.5, quantiles.p50, total, order),
    p10: windowAt(0.9, quantiles.p10, total, order),
  };
  return (member: ArrayLike<number>): ContributionFit => {
    let sum = 0;
    let products = 0;
    for (let t = 0; t < count; t += 1) {
      sum += member[t];
      products += member[t] * centred[t];
    }
    const p90 = lineAt(windows.p90, member, total);
    const p50 = lineAt(windows.p50, member, total);
    const p10 = lineAt(windows.p10, member, total);
    return {
      contribution: {
        shareOfVariance: squares > 0 ? products / squares : 0,
        mean: sum / count,
        p90: p90.value,
        p50: p50.value,
        p10: p10.value,
      },
      slopes: { p90: p90.slope, p50: p50.slope, p10: p10.slope },
      lineErrors: { p90: p90.error, p50: p50.error, p10: p10.error },
    };
  };
}

/**
 * One standard error of a member's contributions: of its line, and of the percentile at which the line is read. They
 * hold what sampling leaves open of a straight line; its bend within the window is not in them.
 *
 * @param totalErrors  standard errors of the total's percentiles
 * @param meanError    of the member's mean
 * @param repeats      how often a row of the member is used in the total, at least 1: repeated rows say nothing new
 */
export function contributionErrors(
  { slopes, lineErrors }: Omit<ContributionFit, "contribution">,
  {
    totalErrors,
    meanError,
    repeats,
  }: { totalErrors: Percentiles; meanError: number; repeats: number },
): Range {
  const at = (key: keyof Percentiles) =>
    Math.hypot(lineErrors[key] * Math.sqrt(repeats), slopes[key] * totalErrors[key]);
  return { p90: at("p90"), p50: at("p50"), p10: at("p10"), mean: meanError };
}

function windowAt(p: number, target: number, total: Float64Array, order: Uint32Array): Window {
  const count = total.length;
  const from = Math.max(0, Math.floor((p - HALF_WIDTH) * (count - 1)));
  const to = Math.min(count - 1, Math.ceil((p + HALF_WIDTH) * (count - 1)));
  const trials = order.subarray(from, to + 1);
  let mean = 0;
  for (const t of trials) mean += total[t];
  mean /= trials.length;
  let squares = 0;
  for (const t of trials) squares += (total[t] - mean) ** 2;
  return { trials, mean, squares, target };
}

/** The member's line over a window, read at the percentile. */
function lineAt(
  { trials, mean, squares, target }: Window,
  member: ArrayLike<number>,
  total: Float64Array,
): { value: number; slope: number; error: number } {
  let sum = 0;
  let products = 0;
  for (const t of trials) {
    sum += member[t];
    products += member[t] * (total[t] - mean);
  }
  const level = sum / trials.length;
  const slope = squares > 0 ? products / squares : 0;
  let scatter = 0;
  for (const t of trials) scatter += (member[t] - level - slope * (total[t] - mean)) ** 2;
  const lever = squares > 0 ? (target - mean) ** 2 / squares : 0;
  const variance = scatter / Math.max(1, trials.length - 2);
  return {
    value: level + slope * (target - mean),
    slope,
    error: Math.sqrt(variance * (1 / trials.length + lever)),
  };
}
