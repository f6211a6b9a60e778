import type { SampleRange } from "./summary";

/** What one input does to one result. */
export interface DriverOf<Name extends string> {
  input: Name;
  /** Spearman's rank correlation of the input with the result */
  rankCorrelation: number;
  /** squared rank correlation over the sum of them, 0 to 1 */
  shareOfSpread: number;
  /** the result with this input at its P90 and at its P10, the others at their P50 */
  swing: { atP90: number; atP10: number };
}

/**
 * Ranks inputs by their share of a result's spread. Shares are squared rank correlations scaled to add up to 1 (0 for
 * an input without spread): a description of the sample, exact for additive or multiplicative results of independent
 * inputs. Shares of correlated inputs overlap.
 *
 * @see A. Saltelli et al., Global Sensitivity Analysis: the Primer (2008), section 1.2 (rank-based measures)
 */
export function rankDrivers<Name extends string>(
  drivers: readonly Omit<DriverOf<Name>, "shareOfSpread">[],
): DriverOf<Name>[] {
  const total = drivers.reduce((sum, driver) => sum + driver.rankCorrelation ** 2, 0);
  return drivers
    .map((driver) => ({
      ...driver,
      shareOfSpread: total > 0 ? driver.rankCorrelation ** 2 / total : 0,
    }))
    .sort((a, b) => b.shareOfSpread - a.shareOfSpread);
}

/**
 * Spearman's rank correlation of an input with a result, over trials made of replicates: the correlation of the
 * stratum that each trial drew in its replicate, which is the input's rank there, with the result's rank among all
 * trials.
 *
 * @param strata  0 to the replicate's length - 1, each once a replicate
 * @param grades  relative ranks of the result, between 0 and 1
 * @param starts  where each replicate begins, and the number of trials last
 */
export function gradeCorrelation(
  strata: Uint16Array,
  grades: Float64Array,
  starts: readonly number[],
): number {
  const replicates = starts.length - 1;
  const count = starts[replicates];
  let products = 0;
  let spread = 0;
  for (let r = 0; r < replicates; r += 1) {
    const size = starts[r + 1] - starts[r];
    let sum = 0;
    let total = 0;
    for (let t = starts[r]; t < starts[r + 1]; t += 1) {
      const grade = grades[t] - 0.5;
      sum += strata[t] * grade;
      total += grade;
    }
    products += (sum - 0.5 * (size - 1) * total) / size;
    spread += (size * (1 - 1 / (size * size))) / 12;
  }
  let squares = 0;
  for (let t = 0; t < count; t += 1) squares += (grades[t] - 0.5) ** 2;
  return squares > 0 && spread > 0 ? products / Math.sqrt(spread * squares) : 0;
}

/** Rows of a one-at-a-time study: row 0 has every input at P50, then a pair per input, at its P90 and at its P10. */
export function swingColumns(ranges: readonly Omit<SampleRange, "mean">[]): Float64Array[] {
  return ranges.map((range, i) => {
    const column = new Float64Array(1 + 2 * ranges.length).fill(range.p50);
    column[1 + 2 * i] = range.p90;
    column[2 + 2 * i] = range.p10;
    return column;
  });
}
