"use client";

import { useState, type ClipboardEvent, type KeyboardEvent, type ReactNode } from "react";
import { QuantityInput } from "@/components/estimate/quantity-input";
import type { FieldReading } from "@/components/estimate/quantities-of-inputs";
import { MISSING } from "@/components/ui/format";
import { Icon } from "@/components/ui/icon";
import { cellsOfClipboard, fillFrom, neighbour, turned, type Cells, type Grid } from "./grid-paste";

/** What the cells of a grid have in common. */
export interface EntryState {
  cells: Cells;
  fields: Readonly<Record<string, FieldReading>>;
  /** what the server refuses, by place */
  problems: Cells;
  /** what a laboratory's file said there and why it was not read, by place */
  remarks: Cells;
  /** places that a check is about */
  flags?: ReadonlySet<string>;
  /** absent: the grid is read, not typed */
  onChange?: (changes: Cells) => void;
}

const UNREAD: FieldReading = { value: null, preview: null, problem: null };

/** What is wrong at a place: how it is typed, or what the server says about it. */
const problemAt = ({ fields, problems }: EntryState, place: string): string | null =>
  fields[place]?.problem ?? problems[place] ?? null;

/**
 * Around a table of `EntryCell`s: takes a block from a spreadsheet from the cell with the cursor on, and moves between
 * rows with Enter and the arrow keys.
 */
export function EntryGrid({
  grid,
  isTurned = false,
  onFill,
  children,
}: {
  grid: Grid;
  /** a pasted block is turned: its columns are the rows here */
  isTurned?: boolean;
  /** absent: nothing can be pasted */
  onFill?: (changes: Cells) => void;
  children: ReactNode;
}) {
  const [note, setNote] = useState("");

  function handlePaste(event: ClipboardEvent<HTMLDivElement>) {
    const place = placeOf(event.target);
    const block = cellsOfClipboard(event.clipboardData.getData("text/plain"));
    if (!onFill || place === null || block === null) return;
    event.preventDefault();
    const { changes, leftOut } = fillFrom(grid, place, isTurned ? turned(block) : block);
    onFill(changes);
    const taken = Object.keys(changes).length;
    setNote(
      `${taken === 1 ? "One cell" : `${taken} cells`} pasted${leftOut > 0 ? `; ${leftOut} outside the grid ${leftOut === 1 ? "was" : "were"} left out` : ""}.`,
    );
  }

  function handleKey(event: KeyboardEvent<HTMLDivElement>) {
    const step = { Enter: 1, ArrowDown: 1, ArrowUp: -1 }[event.key] as 1 | -1 | undefined;
    const place = placeOf(event.target);
    if (!step || place === null || event.altKey || event.ctrlKey || event.metaKey) return;
    event.preventDefault();
    const next = neighbour(grid, place, step);
    const input =
      next === null
        ? null
        : event.currentTarget.querySelector<HTMLInputElement>(
            `[data-place="${CSS.escape(next)}"] input`,
          );
    input?.focus();
    input?.select();
  }

  return (
    <div className="entry-grid" onPaste={handlePaste} onKeyDown={handleKey}>
      {children}
      <p className={note ? "entry-note" : "sr-only"} role="status">
        {note}
      </p>
    </div>
  );
}

const placeOf = (target: EventTarget): string | null =>
  target instanceof HTMLInputElement
    ? (target.closest<HTMLElement>("[data-place]")?.dataset.place ?? null)
    : null;

/** One figure of a grid: a field, or the figure where the sheet is only read. */
export function EntryCell({
  place,
  label,
  state,
}: {
  place: string;
  label: string;
  state: EntryState;
}) {
  const text = state.cells[place] ?? "";
  if (!state.onChange) return <span className="entry-figure">{text || MISSING}</span>;
  const { onChange } = state;
  return (
    <span data-place={place} className="block">
      <QuantityInput
        label={label}
        value={text}
        reading={{ ...(state.fields[place] ?? UNREAD), problem: problemAt(state, place) }}
        flagged={state.remarks[place] !== undefined || state.flags?.has(place)}
        describedBy={`about-${place}`}
        onChange={(value) => onChange({ [place]: value })}
      />
    </span>
  );
}

/** A line under a row, with what is wrong or was unreadable in it; nothing when all is well. */
export function EntryProblems({
  places,
  columns,
  state,
}: {
  places: readonly { place: string; label: string }[];
  columns: number;
  state: EntryState;
}) {
  const found = places.flatMap(({ place, label }) => {
    const remark = state.remarks[place];
    // A remark on a figure that cannot be read says why already.
    const problem = remark && state.fields[place]?.problem ? null : problemAt(state, place);
    const words = [remark, problem].filter(Boolean).join(" ");
    return words ? [{ place, label, words, isWrong: problemAt(state, place) !== null }] : [];
  });
  if (found.length === 0) return null;
  return (
    <tr className="follow">
      <td colSpan={columns}>
        {found.map(({ place, label, words, isWrong }) => (
          <p key={place} id={`about-${place}`} className={isWrong ? "field-error" : "entry-remark"}>
            <Icon name="warning" />
            <span>
              {label}: {words}
            </span>
          </p>
        ))}
      </td>
    </tr>
  );
}
