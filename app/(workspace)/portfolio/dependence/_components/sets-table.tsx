"use client";

import Link from "next/link";
import type { BasinView } from "@/app/api/v1/basins/schema";
import type { DependenceSetView } from "@/app/api/v1/dependence-sets/schema";
import { useBasis } from "@/components/basis/use-basis";
import { RangeMark, RangeScale } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { reportingOf } from "@/components/portfolio/reporting";
import { Figure } from "@/components/ui/figure";
import { formatDate } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import { ColumnHeading, LedgerTable, MarkCell } from "@/components/ui/table";
import { VisuallyHidden } from "@/components/ui/text";
import { liquidOf, type Liquid } from "../../_components/liquid";
import type { SetTotals } from "../_queries/dependence";
import { basinRankWords, effectWords, isIndependent, rankWords } from "./rank-words";

export interface SetsTableProps {
  sets: readonly DependenceSetView[];
  basins: readonly BasinView[];
  totals: ReadonlyMap<string, SetTotals | undefined>;
  chosenId: string | null;
  /** the set that the basis stands on */
  inUse: DependenceSetView | undefined;
}

/** Every set with what it makes of the same portfolio: the marks share one scale. */
export function SetsTable({ sets, basins, totals, chosenId, inUse }: SetsTableProps) {
  const { basis, withBasis } = useBasis();
  const known = [...totals.values()].find((set) => set?.totals);
  const reporting = reportingOf(basis, known?.prices ?? null);
  const liquid = liquidOf({ prices: known?.prices ?? null }, reporting);
  const rows = sets.map((set) => ({ set, ...rangesOf(liquid, totals.get(set.id)) }));
  const scale = scaleFor(
    rows.flatMap(({ range, sum }) =>
      [range, sum].flatMap((each) => (each ? [each.p90, each.p10] : [])),
    ),
    { kind: "linear", fromZero: false },
  );
  const basinIds = basins.map(({ id }) => id);

  return (
    <Section
      title={findingOf(rows)}
      note={`Portfolio ${liquid.name}, ${liquid.unit}, ${reporting.words}, under each set. Nothing but the dependence differs. In italics, and as a box behind the mark: the arithmetic sum under that set, as if every field came out low or high together. Each set has its own, because reservoirs inside a field follow the set too.`}
    >
      <LedgerTable
        caption="Dependence sets and what they make of the portfolio"
        density="change"
        framed
        className="stacking-table sets-table"
      >
        <thead>
          <tr>
            <ColumnHeading>Set</ColumnHeading>
            <ColumnHeading align="right">Any two</ColumnHeading>
            <ColumnHeading align="right">In a basin</ColumnHeading>
            <ColumnHeading align="right">Shared factors</ColumnHeading>
            <ColumnHeading align="right">P90</ColumnHeading>
            <ColumnHeading align="right">P50</ColumnHeading>
            <ColumnHeading align="right">P10</ColumnHeading>
            <ColumnHeading mark>
              <RangeScale scale={scale} />
            </ColumnHeading>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ set, range, sum }) => (
            <tr key={set.id} aria-selected={set.id === chosenId}>
              <th scope="row" className="wrap">
                <Link href={withBasis(`/portfolio/dependence?set=${set.id}`)} scroll={false}>
                  {set.name}
                </Link>
                <small className="block font-normal text-ink-soft">
                  {[
                    set.isDefault && "the book’s own",
                    set.id === inUse?.id && !set.isDefault && "chosen on the basis",
                    `${formatDate(set.updatedAt)}${set.updatedBy ? `, ${set.updatedBy.name}` : ""}`,
                  ]
                    .filter(Boolean)
                    .join(" · ")}
                </small>
              </th>
              <td className="right" data-label="Any two">
                {rankWords(set.dependence.portfolioRank)}
              </td>
              <td className="right" data-label="In a basin">
                {basinRankWords(set.dependence, basinIds)}
              </td>
              <td className="right" data-label="Shared factors">
                {set.dependence.sharedFactors.length || "–"}
              </td>
              {(["p90", "p50", "p10"] as const).map((key) => (
                <td key={key} className="right" data-label={key.toUpperCase()}>
                  <Figure value={range?.[key]} />
                  {sum && (
                    <span className="set-sum">
                      <VisuallyHidden>arithmetic sum </VisuallyHidden>
                      <Figure value={sum[key]} />
                    </span>
                  )}
                </td>
              ))}
              <MarkCell>
                {range ? (
                  <RangeMark
                    name={`${liquid.name} under ${set.name}`}
                    range={range}
                    before={sum && { ...sum, mean: null }}
                    beforeWord="arithmetic sum"
                    unit={liquid.unit}
                    scale={scale}
                  />
                ) : totals.get(set.id) ? (
                  "Nothing to add up"
                ) : (
                  "Adding up…"
                )}
              </MarkCell>
            </tr>
          ))}
        </tbody>
      </LedgerTable>
    </Section>
  );
}

/** The total under a set, and the sum of its fields' percentiles under the same set. */
const rangesOf = (liquid: Liquid, set: SetTotals | undefined) =>
  set?.totals
    ? {
        range: liquid.rangeOf(set.totals.trialByTrial),
        sum: liquid.rangeOf(set.totals.arithmeticSum),
      }
    : { range: null, sum: null };

type Row = { set: DependenceSetView } & ReturnType<typeof rangesOf>;

/** What the book's own set does against no dependence at all, when there is such a set to compare with. */
function findingOf(rows: readonly Row[]): string {
  const standing = rows.find(({ set }) => set.isDefault);
  const alone = rows.find(({ set }) => isIndependent(set.dependence));
  if (!standing?.range || !alone?.range || standing.set.id === alone.set.id) {
    return `${rows.length} ${rows.length === 1 ? "answer" : "answers"} to how fields move together`;
  }
  return `Against independence, “${standing.set.name}” makes the portfolio’s ${effectWords(alone.range, standing.range)}`;
}
