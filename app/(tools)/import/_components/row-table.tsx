"use client";

import Link from "next/link";
import type { ImportDetail, RowKind } from "@/app/api/v1/imports/schema";
import { Button } from "@/components/ui/button";
import { classNames } from "@/components/ui/class-names";
import { Icon } from "@/components/ui/icon";
import { Section } from "@/components/ui/section";
import { FolioCell, LedgerTable } from "@/components/ui/table";

type Row = ImportDetail["rows"]["items"][number];

export interface RowTableProps {
  file: ImportDetail;
  show: RowKind;
  onShow: (kind: RowKind) => void;
  onPage: (offset: number) => void;
}

/** Rows of the sheet, line by line, with what each does and what is wrong or worth a look. */
export function RowTable({ file, show, onShow, onPage }: RowTableProps) {
  const isDone = file.taken !== null;
  const { items, total, limit, offset } = file.rows;
  return (
    <Section
      title={isDone ? "What was done, row by row" : "What each row would do"}
      note={isDone ? undefined : "Nothing has changed yet."}
    >
      <div className="filter-bar" role="group" aria-label="Rows shown">
        {filtersOf(file).map(({ kind, label, count }) => (
          <button
            key={kind}
            type="button"
            className={classNames("filter", show === kind && "filter-on")}
            aria-pressed={show === kind}
            onClick={() => onShow(kind)}
          >
            {label} <b>{count.toLocaleString("en-GB")}</b>
          </button>
        ))}
      </div>
      <ul
        className="hidden border-t-2 border-ink bg-sheet phone:block"
        aria-label="Rows of the sheet"
      >
        {items.map((row) => (
          <StackedRow key={row.line} row={row} isDone={isDone} />
        ))}
      </ul>
      <div className="phone:hidden">
        <LedgerTable caption="Rows of the sheet" framed>
          <thead>
            <tr>
              <FolioCell heading>Line</FolioCell>
              <th scope="col">Reservoir</th>
              <th scope="col">{isDone ? "Done" : "Would be"}</th>
              <th scope="col">Column</th>
              <th scope="col">Value</th>
              <th scope="col">What to know</th>
            </tr>
          </thead>
          <tbody>
            {items.map((row) => (
              <RowLines key={row.line} row={row} isDone={isDone} />
            ))}
          </tbody>
        </LedgerTable>
      </div>
      {total > limit && (
        <nav className="mt-3 flex items-center gap-3 text-13" aria-label="Pages of rows">
          <Button
            size="small"
            disabled={offset === 0}
            onClick={() => onPage(Math.max(0, offset - limit))}
          >
            Previous
          </Button>
          <span>
            {(offset + 1).toLocaleString("en-GB")} to{" "}
            {Math.min(offset + limit, total).toLocaleString("en-GB")} of{" "}
            {total.toLocaleString("en-GB")}
          </span>
          <Button
            size="small"
            disabled={offset + limit >= total}
            onClick={() => onPage(offset + limit)}
          >
            Next
          </Button>
        </nav>
      )}
    </Section>
  );
}

function filtersOf({ counts, rowsTotal, taken }: ImportDetail) {
  const filters: { kind: RowKind; label: string; count: number }[] = [
    { kind: "all", label: "All", count: rowsTotal },
    { kind: "refused", label: "Refused", count: counts.refused },
    { kind: "flagged", label: "Worth a look", count: counts.flagged },
    { kind: "create", label: taken ? "Made" : "New", count: counts.create },
    { kind: "revise", label: "Revised", count: counts.revise },
    { kind: "unchanged", label: "Unchanged", count: counts.unchanged },
  ];
  return filters.filter(({ kind, count }) => kind === "all" || count > 0);
}

const actionWords = {
  create: { planned: "new", done: "made" },
  revise: { planned: "revised", done: "revised" },
  unchanged: { planned: "unchanged", done: "unchanged" },
  refused: { planned: "refused", done: "left out" },
} as const;

interface Line {
  column: string;
  value: string;
  text: string;
  tone: "problem" | "warning" | "change";
}

function linesOf({ problems, changes, warnings }: Row): Line[] {
  return [
    ...problems.map(
      ({ column, value, reason }): Line => ({
        column: column ?? "",
        value: value ?? "–",
        text: reason,
        tone: "problem",
      }),
    ),
    ...changes.map(
      ({ what, before, after }): Line => ({
        column: what,
        value: after,
        text: before === "–" ? "New." : `Was ${before}.`,
        tone: "change",
      }),
    ),
    ...warnings.map(
      ({ column, value, reason }): Line => ({
        column: column ?? "",
        value: value ?? "–",
        text: reason,
        tone: "warning",
      }),
    ),
  ];
}

interface RowProps {
  row: Row;
  isDone: boolean;
}

/** The reservoir, as a link once it is in the book, over its field and basin. */
function Place({ row }: { row: Row }) {
  return (
    <>
      {row.fieldSlug && row.reservoirSlug ? (
        <Link href={`/fields/${row.fieldSlug}/${row.reservoirSlug}`}>{row.reservoir}</Link>
      ) : (
        row.reservoir || "–"
      )}
      <small className="block font-normal text-ink-soft">
        {[row.field, row.basin].filter(Boolean).join(", ")}
      </small>
    </>
  );
}

function ActionWords({ row, isDone }: RowProps) {
  const words = actionWords[row.action][isDone ? "done" : "planned"];
  return row.action === "refused" ? <b className="text-rock">{words}</b> : words;
}

/** The same row on a phone: what to know stands under the reservoir. */
function StackedRow({ row, isDone }: RowProps) {
  return (
    <li className="grid grid-cols-[auto_1fr_auto] gap-x-3 border-b border-rule p-2 text-13">
      <span className="text-ink-soft">
        <span className="sr-only">Line </span>
        {row.line}
      </span>
      <span className="min-w-0 font-semibold">
        <Place row={row} />
      </span>
      <span>
        <ActionWords row={row} isDone={isDone} />
      </span>
      {linesOf(row).map((line, index) => (
        <div key={index} className="col-span-2 col-start-2 mt-2 min-w-0">
          <div className="break-words text-ink-soft">
            {line.column || "Row"}: <span className="text-ink">{line.value}</span>
          </div>
          <LineText line={line} />
        </div>
      ))}
    </li>
  );
}

/** A row, with a line for each thing to know about it. */
function RowLines({ row, isDone }: RowProps) {
  const lines = linesOf(row);
  const span = Math.max(1, lines.length);
  return (
    <>
      {Array.from({ length: span }, (_, index) => {
        const line = lines[index];
        return (
          <tr key={index}>
            {index === 0 && (
              <>
                <td className="folio" rowSpan={span}>
                  {row.line}
                </td>
                <th scope="row" className="wrap min-w-36 align-top" rowSpan={span}>
                  <Place row={row} />
                </th>
                <td className="align-top" rowSpan={span}>
                  <span className="inline-block py-[7px]">
                    <ActionWords row={row} isDone={isDone} />
                  </span>
                </td>
              </>
            )}
            {line ? <LineCells line={line} /> : <td colSpan={3} className="soft" />}
          </tr>
        );
      })}
    </>
  );
}

function LineCells({ line }: { line: Line }) {
  return (
    <>
      <td className="wrap min-w-40 break-words">{line.column || "–"}</td>
      <td className="wrap min-w-28 break-words">{line.value}</td>
      <td className="wrap min-w-64">
        <LineText line={line} />
      </td>
    </>
  );
}

function LineText({ line }: { line: Line }) {
  return (
    <span className="flex gap-1.5">
      {line.tone === "problem" && (
        <span className="text-rock">
          <Icon name="close" size={11} />
          <span className="sr-only">Refused: </span>
        </span>
      )}
      {line.tone === "warning" && (
        <span className="text-warning-ink">
          <Icon name="warning" size={11} />
          <span className="sr-only">Worth a look: </span>
        </span>
      )}
      <span className="min-w-0">{line.text}</span>
    </span>
  );
}
