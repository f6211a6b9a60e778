"use client";

import Link from "next/link";
import { useState } from "react";
import { errorWords } from "@/app/_client/request";
import type { RunItemView, RunView } from "@/app/api/v1/runs/schema";
import { reportingUnits } from "@/analytics/units/reporting-units";
import { RangeMark, type MarkRange } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { classNames } from "@/components/ui/class-names";
import { Figure } from "@/components/ui/figure";
import { Section } from "@/components/ui/section";
import { Notice, Skeleton } from "@/components/ui/status";
import { ColumnHeading, FolioCell, LedgerTable, MarkCell } from "@/components/ui/table";
import { VisuallyHidden } from "@/components/ui/text";
import { ITEMS_PER_PAGE, isUnderWay, useRunItems, type ItemFilter } from "../../_queries/runs";
import { Pager } from "./pager";
import { MOVED_BEYOND, itemStateWords, movedWords } from "@/components/runs/run-words";

/** A run shows volumes as they are stored, on no basis: gross, unrisked, in field units. */
const condensate = reportingUnits("field", "14.696").condensate;

/**
 * Every estimate of a run, with what it had and what it has.
 *
 * @param moved  how many moved by more than `MOVED_BEYOND` standard errors; null until that is known
 */
export function RunItems({ run, moved }: { run: RunView; moved: number | null }) {
  const [show, setShow] = useState<ItemFilter>("all");
  const [offset, setOffset] = useState(0);
  const { data, error } = useRunItems(run.id, show, offset, isUnderWay(run));

  function handleShow(filter: ItemFilter) {
    setShow(filter);
    setOffset(0);
  }

  return (
    <Section
      title="Estimate by estimate"
      note={`Recoverable condensate, ${condensate.unit}, gross and unrisked. Boxes and soft figures: before. Each mark has a scale of its own.`}
    >
      <div className="filter-bar" role="group" aria-label="Estimates shown">
        {filtersOf(run, moved).map(({ filter, label, count }) => (
          <button
            key={filter}
            type="button"
            className={classNames("filter", show === filter && "filter-on")}
            aria-pressed={show === filter}
            onClick={() => handleShow(filter)}
          >
            {label} {count !== null && <b>{count.toLocaleString("en-GB")}</b>}
          </button>
        ))}
      </div>
      {error && (
        <Notice tone="error" title={errorWords(error)}>
          {data ? "The list is as it was when last heard." : "The list could not be read."} What was
          done is kept.
        </Notice>
      )}
      {!data && !error && <Skeleton lines={8} label="Loading the estimates" />}
      {data?.items.length === 0 && <p className="text-13 text-ink-soft">{emptyWords(show, run)}</p>}
      {data && data.items.length > 0 && (
        <>
          <ItemTable items={data.items} />
          <Pager {...data} noun="estimates" step={ITEMS_PER_PAGE} onPage={setOffset} />
        </>
      )}
    </Section>
  );
}

function filtersOf({ counts }: RunView, moved: number | null) {
  const filters: { filter: ItemFilter; label: string; count: number | null }[] = [
    { filter: "all", label: "All", count: counts.total },
    { filter: "failed", label: "Failed", count: counts.failed },
    { filter: "moved", label: `Moved by more than ${MOVED_BEYOND} standard errors`, count: moved },
    { filter: "waiting", label: "Waiting", count: counts.waiting },
    { filter: "running", label: "Running", count: counts.running },
    { filter: "done", label: "Done", count: counts.done },
    { filter: "passedOver", label: "Passed over", count: counts.passedOver },
  ];
  return filters.filter(({ filter, count }) => filter === "moved" || count === null || count > 0);
}

function emptyWords(show: ItemFilter, run: RunView): string {
  if (show === "moved") {
    return isUnderWay(run)
      ? "None that is done has moved that far."
      : "None of them has moved that far.";
  }
  return show === "all" ? "The run has no estimates." : "There are none left of this kind.";
}

function ItemTable({ items }: { items: readonly RunItemView[] }) {
  return (
    <LedgerTable
      caption="Estimates of the run"
      density="change"
      framed
      className="stacking-table run-items"
    >
      <thead>
        <tr>
          <FolioCell heading>Revision</FolioCell>
          <ColumnHeading>Reservoir</ColumnHeading>
          <ColumnHeading>State</ColumnHeading>
          <ColumnHeading align="right">P90</ColumnHeading>
          <ColumnHeading align="right">P50</ColumnHeading>
          <ColumnHeading align="right">P10</ColumnHeading>
          <ColumnHeading mark>Before and now</ColumnHeading>
          <ColumnHeading align="right">Moved</ColumnHeading>
          <ColumnHeading>Worker</ColumnHeading>
        </tr>
      </thead>
      <tbody>
        {items.map((item) => (
          <ItemRow key={item.estimateId} item={item} />
        ))}
      </tbody>
    </LedgerTable>
  );
}

const scaled = (range: MarkRange): MarkRange => ({
  p90: range.p90 * condensate.factor,
  p50: range.p50 * condensate.factor,
  p10: range.p10 * condensate.factor,
  mean: range.mean == null ? null : range.mean * condensate.factor,
});

function ItemRow({ item }: { item: RunItemView }) {
  const { field, reservoir, outcome, revision, reason, attempts } = item;
  const after = outcome && scaled(outcome.after);
  const before = outcome?.before ? scaled(outcome.before) : null;
  return (
    <tr>
      <FolioCell>r{revision}</FolioCell>
      <th scope="row" className="wrap">
        <Link href={`/fields/${field.slug}/${reservoir.slug}`}>{reservoir.name}</Link>
        <small className="block font-normal text-ink-soft">{field.name}</small>
      </th>
      <td>
        {item.state === "failed" ? (
          <b className="text-rock">{itemStateWords.failed}</b>
        ) : (
          itemStateWords[item.state]
        )}
        {attempts > 1 && <small className="block text-ink-soft">attempt {attempts}</small>}
      </td>
      {after ? (
        <>
          {(["p90", "p50", "p10"] as const).map((key) => (
            <ChangeCell
              key={key}
              label={key.toUpperCase()}
              before={before?.[key]}
              now={after[key]}
            />
          ))}
          <MarkCell>
            <RangeMark
              name={`${reservoir.name}, recoverable condensate`}
              range={after}
              before={before}
              unit={condensate.unit}
              scale={scaleFor(
                [after, ...(before ? [before] : [])].flatMap(({ p90, p10 }) => [p90, p10]),
                { kind: "linear", pad: 0.14, fromZero: false },
              )}
              gridLines={false}
            />
          </MarkCell>
          <td className="right" data-label="Moved">
            {movedWords(item)}
          </td>
        </>
      ) : (
        <td colSpan={5} className="wrap soft">
          {reason ?? "–"}
        </td>
      )}
      <td data-label="Worker">{item.worker ?? "–"}</td>
    </tr>
  );
}

function ChangeCell({
  label,
  before,
  now,
}: {
  label: string;
  before: number | undefined;
  now: number;
}) {
  return (
    <td className="right" data-label={label}>
      {before === undefined ? (
        <Figure value={now} />
      ) : (
        <span className="before-after">
          <span>
            <VisuallyHidden>before </VisuallyHidden>
            <Figure value={before} />
          </span>
          <span>
            <VisuallyHidden>now </VisuallyHidden>
            <Figure value={now} />
          </span>
        </span>
      )}
    </td>
  );
}
