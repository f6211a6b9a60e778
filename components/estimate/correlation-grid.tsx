"use client";

import { useState, type CSSProperties, type KeyboardEvent } from "react";
import { inputNames, type InputName } from "@/analytics/volumetrics/inputs-schema";
import type { FixedInputs } from "./correlation-words";
import { correlationOf, type Correlation } from "./estimate-text";
import { inputCatalogue } from "./input-catalogue";

export interface CorrelationGridProps {
  pairs: readonly Correlation[];
  /** inputs that take no correlation, with the reason */
  fixed?: FixedInputs;
  /** pairs that contradict each other */
  conflicts?: readonly Pick<Correlation, "a" | "b">[];
  /** absent: the grid is read, not typed */
  onChange?: (a: InputName, b: InputName, rank: number) => void;
}

const steps: Record<string, readonly [rows: number, columns: number]> = {
  ArrowUp: [-1, 0],
  ArrowDown: [1, 0],
  Enter: [1, 0],
};

/**
 * The whole matrix: what is typed on one side of the diagonal stands on the other too. The Tab key goes through the
 * lower half, so that it meets each pair once; up, down and Enter go along a column.
 */
export function CorrelationGrid({
  pairs,
  fixed = {},
  conflicts = [],
  onChange,
}: CorrelationGridProps) {
  function handleKey(event: KeyboardEvent<HTMLTableElement>) {
    const step = steps[event.key];
    const cell = (event.target as HTMLElement).closest("td");
    if (!step || !cell) return;
    const row = cell.parentElement as HTMLTableRowElement;
    const body = row.parentElement as HTMLTableSectionElement;
    for (
      let next = row.sectionRowIndex + step[0];
      next >= 0 && next < body.rows.length;
      next += step[0]
    ) {
      const input = body.rows[next].cells[cell.cellIndex].querySelector("input");
      if (!input) continue;
      event.preventDefault();
      input.focus();
      return;
    }
  }

  return (
    <div className="table-scroll" role="region" aria-label="Rank correlations" tabIndex={0}>
      <table className="correlation-grid" onKeyDown={handleKey}>
        <caption className="sr-only">
          Rank correlation between each two inputs, from −1 to 1; 0 is independent
        </caption>
        <thead>
          <tr>
            <td />
            {inputNames.map((name) => (
              <th key={name} scope="col" data-fixed={fixed[name] && ""}>
                {inputCatalogue[name].short}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {inputNames.map((row, rowIndex) => (
            <tr key={row}>
              <th scope="row" data-fixed={fixed[row] && ""}>
                {inputCatalogue[row].short}
              </th>
              {inputNames.map((column, columnIndex) =>
                row === column ? (
                  <td key={column} data-diagonal="">
                    1
                  </td>
                ) : fixed[row] || fixed[column] ? (
                  <td key={column} data-fixed="" data-sign="zero">
                    <span aria-hidden="true">–</span>
                    <span className="sr-only">takes none</span>
                  </td>
                ) : (
                  <Cell
                    key={column}
                    a={column}
                    b={row}
                    rank={correlationOf(pairs, column, row)}
                    isMirror={columnIndex > rowIndex}
                    isConflict={conflicts.some(
                      ({ a, b }) => (a === row && b === column) || (a === column && b === row),
                    )}
                    onChange={onChange}
                  />
                ),
              )}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

interface CellProps {
  a: InputName;
  b: InputName;
  rank: number;
  /** above the diagonal, where every pair stands a second time */
  isMirror: boolean;
  isConflict: boolean;
  onChange?: (a: InputName, b: InputName, rank: number) => void;
}

const written = (rank: number) => (rank === 0 ? "0" : rank.toFixed(2).replace("-", "−"));

/** Reads "0.4", ".4", "-0.4" and "−0,4". At −1 or 1 one input would follow from the other, so neither is one. */
export function readRank(text: string): number | null {
  const value = Number(text.trim().replace("−", "-").replace(",", "."));
  return text.trim() !== "" && value > -1 && value < 1 ? value : null;
}

const unreadable = "A rank correlation lies between −1 and 1, such as 0.4; exactly 1 is none.";

function Cell({ a, b, rank, isMirror, isConflict, onChange }: CellProps) {
  const [typed, setTyped] = useState<string | null>(null);
  const label = `${inputCatalogue[a].label} with ${inputCatalogue[b].label}`;
  const sign = rank === 0 ? "zero" : rank > 0 ? "positive" : "negative";
  const style = { "--strength": Math.abs(rank) } as CSSProperties;
  const marks = { "data-sign": sign, "data-conflict": isConflict ? "" : undefined, style };
  if (!onChange) {
    return (
      <td {...marks}>
        <span>{written(rank)}</span>
      </td>
    );
  }
  const isInvalid = typed !== null && readRank(typed) === null;
  return (
    <td {...marks}>
      <input
        type="text"
        inputMode="decimal"
        autoComplete="off"
        tabIndex={isMirror ? -1 : undefined}
        aria-label={label}
        aria-invalid={isInvalid || isConflict || undefined}
        title={isInvalid ? unreadable : undefined}
        value={typed ?? written(rank)}
        onFocus={(event) => event.target.select()}
        onChange={(event) => {
          setTyped(event.target.value);
          const read = readRank(event.target.value);
          if (read !== null && read !== rank) onChange(a, b, read);
        }}
        onBlur={() => {
          // What cannot be read stays to be put right, rather than turning back into what was there.
          if (!isInvalid) setTyped(null);
        }}
      />
      {isInvalid && (
        <span role="alert" className="sr-only">
          {label}: {unreadable}
        </span>
      )}
    </td>
  );
}
