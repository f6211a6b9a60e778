import type { QuantitySummary, Range } from "@/analytics/volumetrics/results-schema";

/**
 * How far one simulation's figures are from another's with the same inputs. A recalculation uses the revision's own
 * number of trials, method and seed, so both have the same random numbers: an engine that computes as before repeats
 * every digit, and whatever moves is the engine's doing, not chance. The standard error is no test of that, only a
 * yardstick for whether it matters.
 */

const percentiles = ["p90", "p50", "p10"] as const;

/**
 * A quantity that does not vary has no sampling error; what is left then is the rounding of doubles. Counted as a
 * share of the value, far below any digit that is shown.
 */
const leastShare = 1e-9;

/**
 * The largest change of P90, P50 and P10, each in its own standard error (the larger one of the two simulations).
 *
 * @returns 0 for the same figures
 */
export function movedStandardErrors(before: QuantitySummary, after: QuantitySummary): number {
  return Math.max(
    ...percentiles.map((name) => {
      const least = leastShare * Math.max(Math.abs(before[name]), Math.abs(after[name]));
      const error = Math.max(before.standardErrors[name], after.standardErrors[name], least);
      const change = Math.abs(after[name] - before[name]);
      return change === 0 ? 0 : change / error;
    }),
  );
}

/**
 * The largest change of P90, P50 and P10, each as a share of what it was, with its sign.
 *
 * @returns null when one of them was 0 and is not any more
 */
export function movedShare(before: Range, after: Range): number | null {
  let largest = 0;
  for (const name of percentiles) {
    const change = after[name] - before[name];
    if (change === 0) continue;
    if (before[name] === 0) return null;
    const share = change / before[name];
    if (Math.abs(share) > Math.abs(largest)) largest = share;
  }
  return largest;
}
