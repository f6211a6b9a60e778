import { sameCorrelations } from "@/analytics/sensitivity/estimate-changes";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import type { Range } from "@/analytics/volumetrics/results-schema";
import { isSameFluid, type InputDifference } from "@/components/estimate/differences";
import { capital, countOf, listWords, numberWords } from "@/components/portfolio/reporting";
import { formatFigure, formatPercent } from "@/components/ui/format";

/** "Right has 12 % more at P50: 34.1 MMSTB against 30.4", or that they are as good as the same. */
export function comparisonFinding(
  left: { label: string; range: Range },
  right: { label: string; range: Range },
  unit: string,
): string {
  const change = right.range.p50 / left.range.p50 - 1;
  const figures = `${formatFigure(right.range.p50)} against ${formatFigure(left.range.p50)} ${unit}`;
  if (!Number.isFinite(change)) return `${right.label} has ${figures} at P50`;
  if (Math.abs(change) < 0.005) return `Both have the same P50: ${figures}`;
  return `${right.label} has ${formatPercent(Math.abs(change))} ${change > 0 ? "more" : "less"} at P50: ${figures}`;
}

/** "Four of ten inputs differ" */
export function inputsFinding(differences: readonly InputDifference[]): string {
  const changed = differences.filter(({ isSame }) => !isSame).length;
  if (changed === 0) return "No input differs";
  if (changed === differences.length) return "Every input differs";
  const total = countOf(differences.length, "input");
  return `${capital(numberWords(changed))} of ${total} ${changed === 1 ? "differs" : "differ"}`;
}

/** What differs besides the ranges: "The rank correlations and the separator test differ too." `null` when nothing does. */
export function otherDifferences(left: EstimateInputs, right: EstimateInputs): string | null {
  const parts = [
    !sameCorrelations(left, right) && "the rank correlations",
    !isSameFluid(left.fluid, right.fluid) && "the separator test",
  ].filter((part): part is string => part !== false);
  if (parts.length === 0) return null;
  return `${capital(listWords(parts))} ${parts.length === 1 && !parts[0].endsWith("s") ? "differs" : "differ"} too.`;
}

/** What tells two labels apart, however long it is: "Larkhaven, Main sand, r3" and "…, r5" are "r3" and "r5". */
export function distinctLabels(left: string, right: string): [string, string] {
  const [a, b] = [left, right].map((label) => label.split(", "));
  const most = Math.min(a.length, b.length) - 1;
  let shared = 0;
  while (shared < most && a[shared] === b[shared]) shared += 1;
  const own = [a, b].map((parts) => parts.slice(shared).join(", "));
  return own[0] === own[1] ? ["Left", "Right"] : [own[0], own[1]];
}

/** Longer does not stand beside a curve. */
const LONGEST = 22;

/** As `distinctLabels`, for where there is little room. */
export function shortLabels(left: string, right: string): [string, string] {
  const labels = distinctLabels(left, right);
  return labels.every((text) => text.length <= LONGEST) ? labels : ["Left", "Right"];
}
