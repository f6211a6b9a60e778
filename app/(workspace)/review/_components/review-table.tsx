"use client";

import Link from "next/link";
import type { ReviewItemView } from "@/app/api/v1/review/schema";
import { useBasis } from "@/components/basis/use-basis";
import { RangeMark, RangeScale } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { RouteFlag } from "@/components/estimate/route-flag";
import { formatDate, formatPercent, fractionDigits } from "@/components/ui/format";
import { ColumnHeading, FigureCell, LedgerTable, MarkCell } from "@/components/ui/table";
import { Flag, StateMark, Unit } from "@/components/ui/text";
import { ageWords, meanChange } from "./waiting";

export interface ReviewTableProps {
  items: readonly ReviewItemView[];
  unit: string;
  now: Date;
}

/** One row an estimate: what it says now over what the approved revision says, on one scale for the column. */
export function ReviewTable({ items, unit, now }: ReviewTableProps) {
  const scale = scaleFor(
    items.flatMap(({ condensate, approved }) => [
      condensate.p90,
      condensate.p10,
      approved?.condensate.p90,
      approved?.condensate.p10,
    ]),
  );
  const digits = (of: "p50" | "mean") =>
    fractionDigits(
      items.flatMap(({ condensate, approved }) => [condensate[of], approved?.condensate[of]]),
    );
  return (
    <LedgerTable
      caption={`Estimates with the condensate they bring to the tank, ${unit}`}
      density="change"
      framed
      className="review-table"
    >
      <thead>
        <tr>
          <ColumnHeading>Reservoir</ColumnHeading>
          <ColumnHeading>Revision</ColumnHeading>
          <ColumnHeading>Engineer</ColumnHeading>
          <ColumnHeading align="right" unit={unit}>
            P50
          </ColumnHeading>
          <ColumnHeading align="right" unit={unit}>
            Mean
          </ColumnHeading>
          <ColumnHeading align="right">Mean moves</ColumnHeading>
          <ColumnHeading mark>
            <RangeScale scale={scale} />
          </ColumnHeading>
          <ColumnHeading>Checks</ColumnHeading>
        </tr>
      </thead>
      <tbody>
        {items.map((item) => (
          <ReviewRow
            key={item.id}
            {...{ item, unit, scale, now }}
            p50Digits={digits("p50")}
            meanDigits={digits("mean")}
          />
        ))}
      </tbody>
    </LedgerTable>
  );
}

interface ReviewRowProps {
  item: ReviewItemView;
  unit: string;
  scale: ReturnType<typeof scaleFor>;
  now: Date;
  p50Digits: number;
  meanDigits: number;
}

function ReviewRow({ item, unit, scale, now, p50Digits, meanDigits }: ReviewRowProps) {
  const { withBasis } = useBasis();
  const { field, reservoir, condensate, approved, state, revision } = item;
  const moves = meanChange(item);
  const name = `${field.name}, ${reservoir.name}`;
  const page = `/fields/${field.slug}/${reservoir.slug}`;
  return (
    <tr>
      <th scope="row" className="wrap cell-name">
        <Link href={withBasis(state === "submitted" ? `${page}/compare` : page)}>{field.name}</Link>
        <small>
          {reservoir.name}, {item.basin}
        </small>
      </th>
      <td className="cell-state">
        <StateMark state={state} revision={revision} />
        <Waited item={item} now={now} />
      </td>
      <td className="wrap cell-note">
        {item.submitter.name}
        <small className="block text-ink-soft">
          {state === "returned" ? `${item.decider}: ${item.decisionNote}` : item.note}
        </small>
      </td>
      <FigureCell
        className="hide-phone"
        value={condensate.p50}
        before={approved?.condensate.p50 ?? null}
        fraction={p50Digits}
      />
      <FigureCell
        className="cell-figure"
        value={condensate.mean}
        before={approved?.condensate.mean ?? null}
        fraction={meanDigits}
      />
      <td className="right strong cell-moves">
        {approved ? formatPercent(moves, { signed: true }) : <span className="soft">first</span>}
      </td>
      <MarkCell>
        <RangeMark
          name={`${name}, condensate to the tank`}
          unit={unit}
          range={condensate}
          before={approved?.condensate}
          scale={scale}
          tipSide="right"
        />
      </MarkCell>
      <td className="cell-checks">
        {item.warnings > 0 ? (
          <Flag icon="warning">
            {item.warnings} {item.warnings === 1 ? "warning" : "warnings"}
          </Flag>
        ) : (
          <span className="soft">no warnings</span>
        )}{" "}
        <RouteFlag route={item.recoveryRoute} short />
      </td>
    </tr>
  );
}

function Waited({ item, now }: { item: ReviewItemView; now: Date }) {
  const at = item.state === "returned" && item.decidedAt ? item.decidedAt : item.submittedAt;
  return (
    <small className="block text-ink-soft" title={formatDate(at, "time")}>
      {ageWords(at, now)}
      <Unit> {formatDate(at)}</Unit>
    </small>
  );
}
