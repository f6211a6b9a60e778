import { DomainError } from "../errors";
import { quantileSorted } from "../numerics/order-statistics";
import { replicateStarts } from "../uncertainty/replicates";
import type { Ranking } from "./average-ranks";

export interface ValueOfKnowing {
  /** expected share of the result's variance that goes once the input is known; below 0 only by sampling error */
  varianceRemoved: number;
  /** expected P90-P10 width of the result once the input is known, over the width now */
  remainingWidth: number;
}

const FEWEST_BINS = 5;
const MOST_BINS = 40;

/** About a fifth of the root of the trials: 20 bins of 500 for 10,000. */
const binsFor = (trials: number) =>
  Math.min(MOST_BINS, Math.max(FEWEST_BINS, Math.floor(Math.sqrt(trials) / 5)));

/**
 * What it is worth to know one input exactly, on average over what it may turn out to be: the correlation ratio
 * Var(E[y | x]) / Var(y), and the P90-P10 width that is left. Taken from the trials as they are, so whatever is
 * correlated with the input is learned with it.
 *
 * The trials are cut into bins of equal probability of x. Within a bin y is a straight line of x plus what is not
 * explained; the line takes away the error of a wide bin. The level and the slope of a bin also fit some of the noise, so
 * that an input of no importance would come out at 2 bins / n with independent trials. How much they fit is seen from how
 * far the replicates, which are independent of each other however each was drawn, disagree about them: with u the unit
 * vector of a level or of a slope in its bin, and c(r) = sum of u(t) residual(t) over the trials of replicate r,
 *
 *     allowance = R / (R - 1) sum over r of c(r)^2,    1 - (SSE + allowances) / SST
 *
 * With independent trials an allowance comes to the residual variance, as in an adjusted R squared; with trials that fill
 * their space evenly it is close to nothing, for their levels have next to no noise. A single replicate has the former.
 *
 * @param x         the input, trial by trial
 * @param ranking   of the input
 * @param y         the result
 * @param width     P10 less P90 of the result now, > 0
 * @param starts    where each replicate begins, and the number of trials last
 * @throws {DomainError} for fewer than 100 trials
 * @see K. Pearson, On the general theory of skew correlation, Drapers' Company Research Memoirs, Biometric Series II
 *      (1905); K.-Y. Liang, S. L. Zeger, Longitudinal data analysis using generalized linear models, Biometrika 73 (1986)
 *      13-22 (variance of a fit from clusters that are independent of each other); A. Saltelli et al., Global Sensitivity Analysis: the Primer (2008), section 1.2.4 (conditional variances
 *      from slices of a scatter plot)
 */
export function valueOfKnowing(
  x: Float64Array,
  { order }: Ranking,
  y: Float64Array,
  width: number,
  starts: readonly number[] = replicateStarts(y.length),
): ValueOfKnowing {
  const trials = y.length;
  if (trials < 100) {
    throw new DomainError(`${trials} trials are too few to learn from.`, {
      input: "trials",
      value: trials,
    });
  }
  const bins = binsFor(trials);
  let unexplained = 0;
  let widths = 0;
  const replicates = replicateOfTrials(starts);
  for (let bin = 0; bin < bins; bin += 1) {
    const first = Math.floor((bin * trials) / bins);
    const end = Math.floor(((bin + 1) * trials) / bins);
    const fitted = fitBin(x, y, order.subarray(first, end), replicates);
    unexplained += fitted.squares;
    widths += fitted.width * (end - first);
  }
  const total = variance(y);
  if (!(total > 0 && width > 0)) return { varianceRemoved: 0, remainingWidth: 1 };
  return {
    varianceRemoved: 1 - unexplained / trials / total,
    remainingWidth: widths / trials / width,
  };
}

interface Replicates {
  readonly count: number;
  /** of every trial */
  readonly of: Uint8Array;
}

function replicateOfTrials(starts: readonly number[]): Replicates {
  const count = starts.length - 1;
  const of = new Uint8Array(starts[count]);
  for (let r = 0; r < count; r += 1) of.fill(r, starts[r], starts[r + 1]);
  return { count, of };
}

/** Straight line through the trials of one bin; a level one when x does not vary in it. */
function fitBin(x: Float64Array, y: Float64Array, trials: Uint32Array, replicates: Replicates) {
  const count = trials.length;
  let [meanX, meanY] = [0, 0];
  for (const t of trials) {
    meanX += x[t] / count;
    meanY += y[t] / count;
  }
  let [squaresX, products] = [0, 0];
  for (const t of trials) {
    squaresX += (x[t] - meanX) ** 2;
    products += (x[t] - meanX) * (y[t] - meanY);
  }
  const slope = squaresX > 0 ? products / squaresX : 0;
  const residuals = Float64Array.from(trials, (t) => y[t] - meanY - slope * (x[t] - meanX));
  const fitted = residuals.reduce((sum, residual) => sum + residual * residual, 0);
  const offsets = squaresX > 0 ? Float64Array.from(trials, (t) => x[t] - meanX) : null;
  const squares = fitted + allowanceOf(residuals, offsets, trials, replicates);
  // Residuals of a fit are narrower than what they estimate.
  const correction = fitted > 0 ? Math.sqrt(squares / fitted) : 1;
  residuals.sort();
  return {
    squares,
    width: correction * (quantileSorted(residuals, 0.9) - quantileSorted(residuals, 0.1)),
  };
}

/**
 * Noise that the level of a bin, and its slope when it has one, took from the residuals.
 *
 * @param offsets  x less its mean; null for a level line
 */
function allowanceOf(
  residuals: Float64Array,
  offsets: Float64Array | null,
  trials: Uint32Array,
  { count, of }: Replicates,
): number {
  const squaresOf = (values: Float64Array) => values.reduce((sum, one) => sum + one * one, 0);
  if (count === 1) {
    const parameters = offsets ? 2 : 1;
    return (parameters * squaresOf(residuals)) / (trials.length - parameters);
  }
  const levels = new Float64Array(count);
  const slopes = new Float64Array(count);
  let squares = 0;
  residuals.forEach((residual, i) => {
    const offset = offsets ? offsets[i] : 0;
    levels[of[trials[i]]] += residual;
    slopes[of[trials[i]]] += residual * offset;
    squares += offset * offset;
  });
  const noise = squaresOf(levels) / trials.length + (squares > 0 ? squaresOf(slopes) / squares : 0);
  return (noise * count) / (count - 1);
}

function variance(values: Float64Array): number {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  return values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / values.length;
}
