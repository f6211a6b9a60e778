import { DomainError } from "../errors";
import { quantileSorted } from "../numerics/order-statistics";
import type { Ranking } from "./average-ranks";

export interface ValueOfKnowing {
  /** expected share of the result's variance that goes once the input is known, 0 to 1 */
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
 * explained; the line takes away the error of a wide bin, and the two degrees of freedom that each bin takes are allowed
 * for, as in an adjusted R squared:
 *
 *     1 - (SSE / (n - 2 bins)) / (SST / (n - 1))
 *
 * Without that allowance an input of no importance would come out at 2 bins / n. What is left below 0 is sampling error
 * and given as 0.
 *
 * @param x         the input, trial by trial
 * @param ranking   of the input
 * @param y         the result
 * @param width     P10 less P90 of the result now, > 0
 * @throws {DomainError} for fewer than 100 trials
 * @see K. Pearson, On the general theory of skew correlation, Drapers' Company Research Memoirs, Biometric Series II
 *      (1905); A. Saltelli et al., Global Sensitivity Analysis: the Primer (2008), section 1.2.4 (conditional variances
 *      from slices of a scatter plot)
 */
export function valueOfKnowing(
  x: Float64Array,
  { order }: Ranking,
  y: Float64Array,
  width: number,
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
  let parameters = 0;
  let widths = 0;
  for (let bin = 0; bin < bins; bin += 1) {
    const first = Math.floor((bin * trials) / bins);
    const end = Math.floor(((bin + 1) * trials) / bins);
    const fitted = fitBin(x, y, order.subarray(first, end));
    unexplained += fitted.squares;
    parameters += fitted.parameters;
    widths += fitted.width * (end - first);
  }
  const total = variance(y);
  if (!(total > 0 && width > 0)) return { varianceRemoved: 0, remainingWidth: 1 };
  return {
    varianceRemoved: Math.max(0, 1 - unexplained / (trials - parameters) / total),
    remainingWidth: widths / trials / width,
  };
}

/** Straight line through the trials of one bin; a level one when x does not vary in it. */
function fitBin(x: Float64Array, y: Float64Array, trials: Uint32Array) {
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
  const parameters = squaresX > 0 ? 2 : 1;
  const residuals = Float64Array.from(trials, (t) => y[t] - meanY - slope * (x[t] - meanX)).sort();
  // Residuals of a fit are narrower than what they estimate.
  const correction = Math.sqrt(count / (count - parameters));
  return {
    squares: residuals.reduce((sum, residual) => sum + residual * residual, 0),
    parameters,
    width: correction * (quantileSorted(residuals, 0.9) - quantileSorted(residuals, 0.1)),
  };
}

function variance(values: Float64Array): number {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  return values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1);
}
