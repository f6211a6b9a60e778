import type { QuantitySummary } from "@/analytics/volumetrics/results-schema";

/**
 * A quantity that does not vary has no sampling error; what is left then is the rounding of doubles. Counted as a
 * share of the value, far below any digit that is shown.
 */
const leastShare = 1e-9;

/**
 * How far P90, P50 and P10 of one quantity moved from one simulation to another, the farthest of the three, in standard
 * errors of the difference: the two simulations have their own trials, so their variances add.
 */
export function movedStandardErrors(before: QuantitySummary, after: QuantitySummary): number {
  return Math.max(
    ...(["p90", "p50", "p10"] as const).map((name) => {
      const least = leastShare * Math.max(Math.abs(before[name]), Math.abs(after[name]));
      const error = Math.hypot(before.standardErrors[name], after.standardErrors[name], least);
      const change = Math.abs(after[name] - before[name]);
      return change === 0 ? 0 : change / error;
    }),
  );
}
