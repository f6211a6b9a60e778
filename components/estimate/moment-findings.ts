/** What stands in for a range as one figure, in sentences with the figures in them. */
import { swansonMean } from "@/analytics/uncertainty/swanson";
import type { QuantitySummary } from "@/analytics/volumetrics/results-schema";
import { formatFigure, formatPercent } from "@/components/ui/format";

type Quantity = Pick<QuantitySummary, "p90" | "p50" | "p10" | "mean">;

/** Closer than this the two are the same to anybody who uses them. */
const SAME = 0.01;

/** "Swanson’s mean falls 6 % short of the mean of 44.1 MMSTB" */
export function swansonFinding(quantity: Quantity, factor: number, unit: string): string {
  const mean = `${formatFigure(quantity.mean * factor)} ${unit}`;
  const off = swansonMean(quantity) / quantity.mean - 1;
  if (!Number.isFinite(off)) return `The mean is ${mean}`;
  if (Math.abs(off) < SAME)
    return `The mean is ${mean}, and Swanson’s mean agrees to ${formatPercent(SAME)}`;
  const size = formatPercent(Math.abs(off), { decimals: Math.abs(off) < 0.1 ? 1 : 0 });
  return off < 0
    ? `Swanson’s mean falls ${size} short of the mean of ${mean}`
    : `Swanson’s mean stands ${size} above the mean of ${mean}`;
}

/** Why the two differ. */
export function swansonReason(quantity: Quantity): string {
  const rule =
    "Swanson’s mean weighs P90, P50 and P10 by 30, 40 and 30 %; the mean is of every trial.";
  const off = swansonMean(quantity) / quantity.mean - 1;
  if (!Number.isFinite(off) || Math.abs(off) < SAME) {
    return `${rule} They agree while the range is not too skewed.`;
  }
  const ratio =
    quantity.p90 > 0
      ? ` (P10 is ${formatFigure(quantity.p10 / quantity.p90, { digits: 2 })} times P90)`
      : "";
  return off < 0
    ? `${rule} Three points do not see how far the trials beyond P10 reach${ratio}.`
    : `${rule} The trials below P90, or between the three points, weigh more than its weights say${ratio}.`;
}

/** "Every input at its P50 gives 30.2 MMSTB, which 48 % of trials reach" */
export function deterministicWords(
  deterministic: number,
  chance: number,
  factor: number,
  unit: string,
): string {
  return `Every input at its P50 gives ${formatFigure(deterministic * factor)} ${unit}, which ${formatPercent(chance)} of trials reach: a product of medians is no median where inputs multiply unevenly or move together.`;
}
