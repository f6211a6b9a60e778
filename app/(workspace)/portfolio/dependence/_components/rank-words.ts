import { scoreCorrelation } from "@/analytics/portfolio/factor-model";
import type { Dependence } from "@/analytics/portfolio/dependence-schema";
import { formatPercent } from "@/components/ui/format";

/**
 * What a rank correlation means: when one reservoir comes out in its upper half, the chance that the other does too,
 * 1/2 + arcsin(rho) / pi for normal scores that correlate by rho.
 *
 * @param rank  Spearman's, 0 to 1
 * @returns     0.5 (nothing in common) to 1 (always together)
 * @see W. F. Sheppard, On the application of the theory of error to cases of normal distribution and normal
 *      correlation, Phil. Trans. R. Soc. A 192 (1899) 101-167 (the orthant probability)
 * @example upperHalfTogether(0.3) // => 0.601290
 */
export const upperHalfTogether = (rank: number): number =>
  0.5 + Math.asin(scoreCorrelation(rank)) / Math.PI;

/** "60 in 100 instead of 50" */
export const meaningWords = (rank: number): string =>
  rank === 0
    ? "Nothing in common: 50 in 100, as by chance"
    : `Upper half together: ${Math.round(100 * upperHalfTogether(rank))} in 100 instead of 50`;

/** "0.28", "0.05" */
export const rankWords = (rank: number): string => rank.toFixed(2);

/** "0.22 to 0.32" over the basins that there are, or one figure when they agree. */
export function basinRankWords(
  { basinRanks, otherBasinsRank }: Dependence,
  basinIds: readonly string[],
): string {
  const ranks = basinIds.map((id) => basinRanks[id] ?? otherBasinsRank);
  if (ranks.length === 0) return rankWords(otherBasinsRank);
  const low = Math.min(...ranks);
  const high = Math.max(...ranks);
  return low === high ? rankWords(low) : `${rankWords(low)} to ${rankWords(high)}`;
}

/** No reservoir has anything in common with another. */
export const isIndependent = ({
  portfolioRank,
  basinRanks,
  otherBasinsRank,
  sharedFactors,
}: Dependence): boolean =>
  portfolioRank === 0 &&
  otherBasinsRank === 0 &&
  sharedFactors.length === 0 &&
  Object.values(basinRanks).every((rank) => rank === 0);

/** "P90 8 % lower and P10 6 % higher", "the same"; below half a percent nothing is said to have moved. */
export function effectWords(
  from: { p90: number; p10: number },
  to: { p90: number; p10: number },
): string {
  const part = (name: string, change: number) => {
    if (!Number.isFinite(change) || Math.abs(change) < 0.005) return null;
    return `${name} ${formatPercent(Math.abs(change))} ${change < 0 ? "lower" : "higher"}`;
  };
  const parts = [part("P90", to.p90 / from.p90 - 1), part("P10", to.p10 / from.p10 - 1)].filter(
    (words) => words !== null,
  );
  return parts.length === 0 ? "the same within half a percent" : parts.join(" and ");
}
