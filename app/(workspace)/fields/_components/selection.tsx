"use client";

import { rankingColumn, type RankingColumnId } from "@/analytics/portfolio/ranking-columns";
import type { RankingRow } from "@/app/api/v1/fields/ranking-schema";
import { basisHref, type Basis } from "@/components/basis/basis";
import { comparisonHref } from "@/components/compare/sides";
import { shownRange, type Reporting } from "@/components/portfolio/reporting";
import { Button, IconButton, LinkButton } from "@/components/ui/button";
import { formatFigure } from "@/components/ui/format";
import { SelectionBar } from "@/components/ui/statement";
import { useToast } from "@/components/ui/toast";
import { useTogether } from "../_queries/ranking";
import { shownValue } from "./ranking-cells";

export interface SelectionProps {
  basis: Basis;
  reporting: Reporting;
  ids: readonly string[];
  /** rows on the page, for copying */
  rows: readonly RankingRow[];
  columns: readonly RankingColumnId[];
  onClear: () => void;
}

/** What the chosen fields come to together, and copying their rows. */
export function Selection({ basis, reporting, ids, rows, columns, onClear }: SelectionProps) {
  const toast = useToast();
  const { data, isPlaceholderData } = useTogether(basis, ids);
  const total = data?.total;
  const value = total?.trialByTrial.liquidValue ?? null;
  const range =
    total && shownRange(value ?? total.trialByTrial.condensateRecoverableStb, shownOf());
  const summedP90 =
    total && (total.arithmeticSum.liquidValue ?? total.arithmeticSum.condensateRecoverableStb).p90;

  function shownOf() {
    return value ? reporting.money : reporting.condensate;
  }

  function comparisonOf([left, right]: readonly string[]) {
    const href = comparisonHref({
      left: { kind: "field", fieldId: left },
      right: { kind: "field", fieldId: right },
    });
    return basisHref(href, basis);
  }

  async function handleCopy() {
    const chosen = rows.filter(({ id }) => ids.includes(id));
    try {
      await navigator.clipboard.writeText(tsvOf(chosen, columns, reporting));
      toast({
        title: "Copied",
        detail: `${chosen.length} rows, ready to paste into a spreadsheet.`,
      });
    } catch {
      toast({
        tone: "error",
        title: "The browser did not allow copying.",
        detail: "Export CSV writes the same rows to a file.",
      });
    }
  }

  return (
    <SelectionBar
      count={ids.length}
      noun={ids.length === 1 ? "field" : "fields"}
      summary={
        range && !isPlaceholderData ? (
          <>
            Together, trial by trial: mean <b>{formatFigure(range.mean)}</b>, P90{" "}
            <b>{formatFigure(range.p90)}</b>, P50 <b>{formatFigure(range.p50)}</b>, P10{" "}
            <b>{formatFigure(range.p10)}</b> {shownOf().unit}
            {ids.length > 1 && summedP90 != null && (
              <span className="selection-aside">
                {" "}
                (their P90s add to {formatFigure(summedP90 * shownOf().factor)})
              </span>
            )}
          </>
        ) : (
          "Adding up, trial by trial"
        )
      }
      actions={
        <>
          {ids.length === 2 && (
            <LinkButton kind="inverse" size="small" href={comparisonOf(ids)}>
              Compare
            </LinkButton>
          )}
          <Button kind="inverse" size="small" onClick={() => void handleCopy()}>
            Copy as TSV
          </Button>
          <IconButton icon="close" label="Clear selection" onClick={onClear} />
        </>
      }
    />
  );
}

/** Rows as they stand on the screen, with all digits; what a spreadsheet would run as a formula is defused. */
function tsvOf(
  rows: readonly RankingRow[],
  columns: readonly RankingColumnId[],
  reporting: Reporting,
): string {
  const safe = (text: string) => text.replace(/[\t\r\n]+/g, " ").replace(/^(?=[=+\-@])/, "'");
  const cell = (id: RankingColumnId, row: RankingRow): string => {
    if (id === "class") return row.prmsClass;
    if (id === "rankRange")
      return row.rankRange ? `${row.rankRange.low} to ${row.rankRange.high}` : "";
    const { value, kind } = rankingColumn(id);
    return kind === "text"
      ? safe(String(value(row) ?? ""))
      : String(shownValue(id, row, reporting) ?? "");
  };
  return [
    ["Rank", "Field", ...columns.map((id) => rankingColumn(id).label)],
    ...rows.map((row) => [
      String(row.rank ?? ""),
      safe(row.name),
      ...columns.map((id) => cell(id, row)),
    ]),
  ]
    .map((cells) => cells.join("\t"))
    .join("\n");
}
