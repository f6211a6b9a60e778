import type { RevisionRangeView } from "@/app/api/v1/fields/file-schema";
import { formatFigure, formatPercent } from "@/components/ui/format";

/** How far P50 has come from the first to the latest revision that was run, and what happened to the spread. */
export function movementFinding(
  revisions: readonly RevisionRangeView[],
  factor: number,
  unit: string,
): string {
  const run = revisions.flatMap(({ revision, condensateRecoverableStb: range }) =>
    range ? [{ revision, range }] : [],
  );
  const latest = run[0];
  const first = run.at(-1);
  if (!latest || !first) return "No revision has been run yet";
  const p50 = formatFigure(latest.range.p50 * factor);
  if (latest === first) return `r${latest.revision} gives ${p50} ${unit} at P50`;
  const change = latest.range.p50 / first.range.p50 - 1;
  const spread = (range: { p90: number; p10: number }) => range.p10 / range.p90;
  const narrowed = spread(latest.range) < spread(first.range);
  return (
    `P50 went from ${formatFigure(first.range.p50 * factor)} to ${p50} ${unit} ` +
    `(${formatPercent(change, { signed: true })}) since r${first.revision}, ` +
    `and the range ${narrowed ? "narrowed" : "widened"}`
  );
}
