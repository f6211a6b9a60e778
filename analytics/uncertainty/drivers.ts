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

/** Rows of a one-at-a-time study: row 0 has every input at P50, then a pair per input, at its P90 and at its P10. */
export function swingColumns(ranges: readonly Omit<SampleRange, "mean">[]): Float64Array[] {
  return ranges.map((range, i) => {
    const column = new Float64Array(1 + 2 * ranges.length).fill(range.p50);
    column[1 + 2 * i] = range.p90;
    column[2 + 2 * i] = range.p10;
    return column;
  });
}
