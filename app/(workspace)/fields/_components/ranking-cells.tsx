import Link from "next/link";
import type { ReactNode } from "react";
import {
  columnFactor,
  estimateWords,
  rankingColumn,
  type RankingColumn,
  type RankingColumnId,
} from "@/analytics/portfolio/ranking-columns";
import type { RankingRow } from "@/app/api/v1/fields/ranking-schema";
import { RouteFlag } from "@/components/estimate/route-flag";
import { capital, type Reporting } from "@/components/portfolio/reporting";
import { formatDate, MISSING } from "@/components/ui/format";
import { FigureCell } from "@/components/ui/table";
import { ClassMark, Flag, StateMark } from "@/components/ui/text";

/** Columns whose cells keep their place when a row is stacked on a phone; the others are left out there. */
const stackedAs: Partial<Record<RankingColumnId, string>> = {
  class: "stack-class",
  estimate: "stack-state",
  liquidValueP90: "stack-percentile stack-p90",
  liquidValueP50: "stack-percentile stack-p50",
  liquidValueP10: "stack-percentile stack-p10",
  liquidValueMean: "stack-mean",
};

/** Class names of a column's cells. */
export const stackClass = (id: RankingColumn["id"]) =>
  (id === "name" ? "stack-name" : stackedAs[id]) ?? "stack-hidden";

/** The value of a column in the unit it is shown in. */
export function shownValue(id: RankingColumnId, row: RankingRow, reporting: Reporting) {
  const { value, kind } = rankingColumn(id);
  const canonical = value(row);
  return typeof canonical === "number" ? canonical * columnFactor(kind, reporting.units) : null;
}

const fills = { reserves: "full", contingent: "half", prospective: "empty" } as const;

const flagWords: Record<string, string> = {
  sour_gas: "Sour",
  high_pressure_high_temperature: "HPHT",
};

/** The field's name, linked, with the engine's cautions and a word for recoveries that nobody measured. */
export function NameCell({ row, href }: { row: RankingRow; href: string }) {
  return (
    <th scope="row" className="stack-name">
      <Link href={href}>{row.name}</Link>
      {row.cautions.map((code) => (
        <Flag key={code}>{flagWords[code] ?? "Caution"}</Flag>
      ))}
      <RouteFlag route={row.recoveryRoute} short />
    </th>
  );
}

/** One cell of the ranking, by what its column holds. */
export function RankingCell({
  id,
  row,
  reporting,
  fraction,
  sorted,
}: {
  id: RankingColumnId;
  row: RankingRow;
  reporting: Reporting;
  /** decimals that the widest figure of the column shows */
  fraction: number;
  sorted: boolean;
}) {
  const { kind } = rankingColumn(id);
  const className = stackClass(id);
  if (kind === "text") {
    return (
      <td className={className} title={id === "estimate" ? estimateWords(row) : undefined}>
        {textOf(id, row)}
      </td>
    );
  }
  if (kind === "ranks")
    return (
      <td className={className}>
        <Ranks row={row} />
      </td>
    );
  return (
    <FigureCell
      value={shownValue(id, row, reporting)}
      fraction={fraction}
      strong={id === "liquidValueMean"}
      sorted={sorted}
      className={className}
    />
  );
}

function textOf(id: RankingColumnId, row: RankingRow): ReactNode {
  switch (id) {
    case "class":
      return <ClassMark fill={fills[row.prmsClass]}>{capital(row.prmsClass)}</ClassMark>;
    case "subClass":
      return capital(row.prmsSubClass.replaceAll("_", " "));
    case "estimate":
      return <States row={row} />;
    case "effectiveOn": {
      const date = rankingColumn(id).value(row);
      return formatDate(typeof date === "string" ? date : null);
    }
    default:
      return rankingColumn(id).value(row) ?? MISSING;
  }
}

/** What stands for the field, then only what waits. */
function States({ row }: { row: RankingRow }) {
  const [first] = row.chosen;
  const sameState = row.chosen.filter(({ state }) => state === first?.state);
  const revisions = [...new Set(sameState.map(({ revision }) => `r${revision}`))].join(", ");
  const standing = row.chosen.map(({ reservoirSlug, revision }) => `${reservoirSlug} ${revision}`);
  const waiting = new Map(
    row.open
      .filter(({ reservoirSlug, revision }) => !standing.includes(`${reservoirSlug} ${revision}`))
      .map((open) => [`${open.state} ${open.revision}`, open]),
  );
  if (!first && waiting.size === 0) return MISSING;
  return (
    <>
      {first && (
        <span className="state-mark-group">
          <StateMark state={first.state} /> <span className="text-ink-soft">{revisions}</span>
        </span>
      )}
      {[...waiting].map(([key, { state, revision }]) => (
        <StateMark key={key} state={state} revision={revision} />
      ))}
    </>
  );
}

/** "1 to 4": between which ranks the field lies in the middle 80 % of trials. */
function Ranks({ row: { rankRange } }: { row: RankingRow }) {
  if (!rankRange) return MISSING;
  const { low, high } = rankRange;
  return low === high ? `${low}` : `${low} to ${high}`;
}
