"use client";

import { useState, type CSSProperties } from "react";
import { inputNames, type InputName } from "@/analytics/volumetrics/inputs-schema";
import { correlationOf, type Correlation } from "./estimate-text";
import { inputCatalogue } from "./input-catalogue";

export interface CorrelationGridProps {
  /** inputs that are sampled, in their order */
  names?: readonly InputName[];
  pairs: readonly Correlation[];
  /** absent: the grid is read, not typed */
  onChange?: (a: InputName, b: InputName, rank: number) => void;
}

/** Pairs below the diagonal, so that each stands once. */
export function CorrelationGrid({ names = inputNames, pairs, onChange }: CorrelationGridProps) {
  const rows = names.slice(1);
  const columns = names.slice(0, -1);
  return (
    <div className="table-scroll" role="region" aria-label="Rank correlations" tabIndex={0}>
      <table className="correlation-grid">
        <caption className="sr-only">
          Rank correlation between each two inputs, from −1 to 1; 0 is independent
        </caption>
        <thead>
          <tr>
            <td />
            {columns.map((name) => (
              <th key={name} scope="col">
                {inputCatalogue[name].short}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row, rowIndex) => (
            <tr key={row}>
              <th scope="row">{inputCatalogue[row].short}</th>
              {columns.map((column, columnIndex) =>
                columnIndex > rowIndex ? (
                  <td key={column} className="off" />
                ) : (
                  <Cell
                    key={column}
                    a={column}
                    b={row}
                    rank={correlationOf(pairs, column, row)}
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
  onChange?: (a: InputName, b: InputName, rank: number) => void;
}

const written = (rank: number) => (rank === 0 ? "0" : rank.toFixed(2).replace("-", "−"));

/** Reads "0.4", ".4", "-0.4" and "−0,4"; anything outside −1 to 1 is no correlation. */
export function readRank(text: string): number | null {
  const value = Number(text.trim().replace("−", "-").replace(",", "."));
  return text.trim() !== "" && value >= -1 && value <= 1 ? value : null;
}

function Cell({ a, b, rank, onChange }: CellProps) {
  const [typed, setTyped] = useState<string | null>(null);
  const label = `${inputCatalogue[a].label} with ${inputCatalogue[b].label}`;
  const sign = rank === 0 ? "zero" : rank > 0 ? "positive" : "negative";
  const style = { "--strength": Math.abs(rank) } as CSSProperties;
  if (!onChange) {
    return (
      <td data-sign={sign} style={style}>
        <span>{written(rank)}</span>
      </td>
    );
  }
  const isInvalid = typed !== null && readRank(typed) === null;
  return (
    <td data-sign={sign} style={style}>
      <input
        type="text"
        inputMode="decimal"
        autoComplete="off"
        aria-label={label}
        aria-invalid={isInvalid || undefined}
        title={isInvalid ? "From −1 to 1" : undefined}
        value={typed ?? written(rank)}
        onFocus={(event) => event.target.select()}
        onChange={(event) => {
          setTyped(event.target.value);
          const read = readRank(event.target.value);
          if (read !== null && read !== rank) onChange(a, b, read);
        }}
        onBlur={() => setTyped(null)}
      />
    </td>
  );
}
