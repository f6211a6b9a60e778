"use client";

import {
  columnUnit,
  rankingColumn,
  type RankingColumnId,
  type RankingSortId,
} from "@/analytics/portfolio/ranking-columns";
import type { Ranking, RankingRow } from "@/app/api/v1/fields/ranking-schema";
import type { Basis } from "@/components/basis/basis";
import { useBasis } from "@/components/basis/use-basis";
import { RangeMark, RangeScale } from "@/components/charts/range-mark";
import { scaleFor, type Scale } from "@/components/charts/scale";
import { nothingWords } from "@/components/portfolio/chance-words";
import { shownRange, type Reporting } from "@/components/portfolio/reporting";
import { fractionDigits } from "@/components/ui/format";
import {
  ColumnHeading,
  FigureCell,
  FolioCell,
  LedgerTable,
  MarkCell,
  TotalRow,
  ArithmeticRow,
} from "@/components/ui/table";
import { NameCell, RankingCell, shownValue, stackClass } from "./ranking-cells";
import type { RankingState } from "./ranking-address";

const liquidColumns: readonly RankingColumnId[] = [
  "liquidValueP90",
  "liquidValueP50",
  "liquidValueP10",
  "liquidValueMean",
];

export interface RankingTableProps {
  state: RankingState;
  ranking: Ranking;
  reporting: Reporting;
  selected: ReadonlySet<string>;
  onSelect: (ids: readonly string[], chosen: boolean) => void;
}

/** The ranking: one row a field, the total trial by trial, and the arithmetic sum under it by its name. */
export function RankingTable({ state, ranking, reporting, selected, onSelect }: RankingTableProps) {
  const { view } = state;
  const { withBasis } = useBasis();
  const columns = layoutOf(view.columns);
  const money = reporting.money;
  const scale = ranking.scale
    ? scaleFor([ranking.scale.low * money.factor, ranking.scale.high * money.factor])
    : null;
  const fractions = fractionsOf(ranking, view.columns, reporting);
  const selectable = ranking.items.filter(({ ranges }) => ranges !== null);
  const allSelected = selectable.length > 0 && selectable.every(({ id }) => selected.has(id));

  return (
    <LedgerTable
      caption={`Fields by ${rankingColumn(view.sort).label.toLowerCase()}`}
      framed
      className="ranking-table"
    >
      <RankingHead
        state={state}
        columns={columns}
        reporting={reporting}
        scale={scale}
        allSelected={allSelected}
        onSelectAll={(chosen) =>
          onSelect(
            selectable.map(({ id }) => id),
            chosen,
          )
        }
      />
      <tbody>
        {ranking.items.map((row) => (
          <tr
            key={row.id}
            data-selected={selected.has(row.id) || undefined}
            data-empty={row.ranges === null || undefined}
          >
            <td className="choose">
              <input
                type="checkbox"
                className="check-box"
                aria-label={`Select ${row.name}`}
                disabled={row.ranges === null}
                checked={selected.has(row.id)}
                onChange={(event) => onSelect([row.id], event.target.checked)}
              />
            </td>
            <FolioCell>{row.rank ?? "–"}</FolioCell>
            <NameCell row={row} href={withBasis(`/fields/${row.slug}`)} />
            {columns.map((id) =>
              id === "mark" ? (
                <ValueMark key={id} row={row} scale={scale} reporting={reporting} />
              ) : (
                <RankingCell
                  key={id}
                  id={id}
                  row={row}
                  reporting={reporting}
                  fraction={fractions[id] ?? 0}
                  sorted={view.sort === id}
                />
              ),
            )}
          </tr>
        ))}
      </tbody>
      <RankingFoot
        ranking={ranking}
        columns={columns}
        reporting={reporting}
        scale={scale}
        fractions={fractions}
        sort={view.sort}
        risk={state.basis.risk}
      />
    </LedgerTable>
  );
}

type Layout = (RankingColumnId | "mark")[];
type Fractions = Partial<Record<RankingColumnId, number>>;

/** The chosen columns, with the range marks after the last one of the liquid's value. */
function layoutOf(ids: readonly RankingColumnId[]): Layout {
  const last = ids.findLastIndex((id) => liquidColumns.includes(id));
  return last === -1 ? [...ids] : [...ids.slice(0, last + 1), "mark", ...ids.slice(last + 1)];
}

function fractionsOf(
  { items, totals }: Ranking,
  ids: readonly RankingColumnId[],
  reporting: Reporting,
): Fractions {
  return Object.fromEntries(
    ids.map((id) => [
      id,
      fractionDigits([
        ...items.map((row) => shownValue(id, row, reporting)),
        totals && totalValue(id, totals.trialByTrial, reporting),
        totals && totalValue(id, totals.arithmeticSum, reporting),
      ]),
    ]),
  );
}

/** The total of a column, in the unit it is shown in; null where a total means nothing. */
function totalValue(
  id: RankingColumnId,
  ranges: NonNullable<RankingRow["ranges"]>,
  reporting: Reporting,
): number | null {
  const { quantity } = rankingColumn(id);
  if (!quantity) return null;
  // A total is a row like any other as far as units go.
  return shownValue(id, { ranges } as RankingRow, reporting);
}

function RankingHead({
  state: { view, setView },
  columns,
  reporting,
  scale,
  allSelected,
  onSelectAll,
}: {
  state: RankingState;
  columns: Layout;
  reporting: Reporting;
  scale: Scale | null;
  allSelected: boolean;
  onSelectAll: (chosen: boolean) => void;
}) {
  const sortBy = (id: RankingSortId) => {
    const text = rankingColumn(id).kind === "text";
    const other = view.direction === "ascending" ? "descending" : "ascending";
    setView({ sort: id, direction: view.sort === id ? other : text ? "ascending" : "descending" });
  };
  const first = columns.findIndex((id) => id === "mark" || liquidColumns.includes(id));
  const grouped = columns.filter((id) => id === "mark" || liquidColumns.includes(id)).length;
  return (
    <thead>
      {grouped > 0 && (
        <tr className="column-group">
          <td colSpan={3 + first} />
          <th scope="colgroup" colSpan={grouped}>
            Liquid value, {reporting.money.unit}
          </th>
          {columns.length > first + grouped && <td colSpan={columns.length - first - grouped} />}
        </tr>
      )}
      <tr>
        <th scope="col" className="choose">
          <input
            type="checkbox"
            className="check-box"
            aria-label="Select all rows shown"
            checked={allSelected}
            onChange={(event) => onSelectAll(event.target.checked)}
          />
        </th>
        <FolioCell heading>Rank</FolioCell>
        <ColumnHeading
          sorted={view.sort === "name" ? view.direction : null}
          onSort={() => sortBy("name")}
        >
          Field
        </ColumnHeading>
        {columns.map((id) => {
          if (id === "mark") {
            return (
              <ColumnHeading key={id} mark>
                {scale && <RangeScale scale={scale} />}
              </ColumnHeading>
            );
          }
          const column = rankingColumn(id);
          const inGroup = liquidColumns.includes(id);
          const unit = inGroup
            ? undefined
            : columnUnit(column.kind, reporting.units, reporting.currency) || undefined;
          return (
            <ColumnHeading
              key={id}
              align={column.kind === "text" || column.kind === "ranks" ? "left" : "right"}
              unit={unit}
              sorted={view.sort === id ? view.direction : null}
              onSort={() => sortBy(id)}
            >
              {inGroup ? shortLabel(column.label) : column.label}
            </ColumnHeading>
          );
        })}
      </tr>
    </thead>
  );
}

/** "Liquid value P90" -> "P90" under its group's heading. */
const shortLabel = (label: string) => {
  const word = label.replace("Liquid value ", "");
  return word.charAt(0).toUpperCase() + word.slice(1);
};

function ValueMark({
  row,
  scale,
  reporting,
}: {
  row: RankingRow;
  scale: Scale | null;
  reporting: Reporting;
}) {
  const range = row.ranges?.liquidValue;
  return (
    <MarkCell className="stack-mark">
      {range && scale ? (
        <RangeMark
          name={`${row.name} liquid value`}
          range={shownRange(range, reporting.money)}
          unit={reporting.money.unit}
          scale={scale}
        />
      ) : row.ranges ? (
        "No price"
      ) : (
        "No estimate"
      )}
    </MarkCell>
  );
}

function RankingFoot({
  ranking: { totals },
  columns,
  reporting,
  scale,
  fractions,
  sort,
  risk,
}: {
  ranking: Ranking;
  columns: Layout;
  reporting: Reporting;
  scale: Scale | null;
  fractions: Fractions;
  sort: RankingSortId;
  risk: Basis["risk"];
}) {
  if (!totals) return null;
  const firstFigure = columns.findIndex((id) => id === "mark" || rankingColumn(id).quantity);
  const wordsSpan = firstFigure === -1 ? columns.length : firstFigure;
  const cells = (kind: "trialByTrial" | "arithmeticSum") =>
    columns.slice(wordsSpan).map((id) => {
      if (id === "mark") {
        const range = kind === "trialByTrial" ? totals.trialByTrial.liquidValue : null;
        return (
          <MarkCell key={id} className="stack-mark">
            {range && scale ? (
              <RangeMark
                name="Total liquid value"
                range={shownRange(range, reporting.money)}
                unit={reporting.money.unit}
                scale={scale}
                tipSide="right"
              />
            ) : (
              ""
            )}
          </MarkCell>
        );
      }
      const { quantity } = rankingColumn(id);
      const className = stackClass(id);
      if (!quantity) return <td key={id} className={className} />;
      return (
        <FigureCell
          key={id}
          value={totalValue(id, totals[kind], reporting)}
          fraction={fractions[id] ?? 0}
          sorted={sort === id}
          className={className}
        />
      );
    });
  return (
    <tfoot>
      <TotalRow>
        <td className="choose" />
        <FolioCell />
        <th scope="row" className="stack-name" colSpan={1 + wordsSpan}>
          Total, added up trial by trial{" "}
          <span className="font-normal text-ink-soft">
            {totals.fields} {totals.fields === 1 ? "field" : "fields"}
            {risk === "yesNo" && `. ${nothingWords(totals.chanceOfNothing)}`}
          </span>
        </th>
        {cells("trialByTrial")}
      </TotalRow>
      <ArithmeticRow>
        <td className="choose" />
        <FolioCell />
        <th scope="row" className="stack-name" colSpan={1 + wordsSpan}>
          Arithmetic sum of the column. Not the P90 or P10 of the total.
        </th>
        {cells("arithmeticSum")}
      </ArithmeticRow>
    </tfoot>
  );
}
