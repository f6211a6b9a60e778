"use client";

import { useRef, useState, type ReactNode } from "react";
import { classNames } from "@/components/ui/class-names";
import { csvOf, downloadText } from "@/components/ui/download";
import { ColumnHeading, FigureCell, LedgerTable } from "@/components/ui/table";
import { svgOf } from "./export-svg";

export type ChartCell = string | number | null;

/** The same data as the drawing, for the table view and the CSV. */
export interface ChartData {
  columns: readonly { label: string; unit?: string }[];
  rows: readonly (readonly ChartCell[])[];
}

export interface ChartFrameProps {
  /** states the finding or asks the question */
  title: string;
  note?: ReactNode;
  data: ChartData;
  /** without extension */
  fileName: string;
  level?: 2 | 3;
  className?: string;
  /** the drawing; may include its legend */
  children: ReactNode;
}

/** A figure under a ruled head, with its data as a table and as files. */
export function ChartFrame({
  title,
  note,
  data,
  fileName,
  level = 2,
  className,
  children,
}: ChartFrameProps) {
  const drawing = useRef<HTMLDivElement>(null);
  const [asTable, setAsTable] = useState(false);
  const Heading = level === 2 ? "h2" : "h3";

  function handleSvg() {
    if (drawing.current) {
      downloadText(`${fileName}.svg`, svgOf(drawing.current, title), "image/svg+xml");
    }
  }

  function handleCsv() {
    const header = data.columns.map(({ label, unit }) => (unit ? `${label} [${unit}]` : label));
    downloadText(`${fileName}.csv`, csvOf(header, data.rows), "text/csv");
  }

  return (
    <figure className={classNames("section", className)}>
      <figcaption className="section-head">
        <div>
          <Heading>{title}</Heading>
          {note && <p>{note}</p>}
        </div>
        <div className="tools" role="group" aria-label={`Chart “${title}” as`}>
          <button type="button" aria-pressed={asTable} onClick={() => setAsTable(!asTable)}>
            Table
          </button>
          {!asTable && (
            <button type="button" onClick={handleSvg}>
              SVG
            </button>
          )}
          <button type="button" onClick={handleCsv}>
            CSV
          </button>
        </div>
      </figcaption>
      {asTable ? <ChartTable title={title} data={data} /> : <div ref={drawing}>{children}</div>}
    </figure>
  );
}

function ChartTable({ title, data }: { title: string; data: ChartData }) {
  const isNumeric = data.columns.map((_, column) =>
    data.rows.some((row) => typeof row[column] === "number"),
  );
  return (
    <LedgerTable caption={title} maxHeight="420px">
      <thead>
        <tr>
          {data.columns.map(({ label, unit }, column) => (
            <ColumnHeading key={label} unit={unit} align={isNumeric[column] ? "right" : "left"}>
              {label}
            </ColumnHeading>
          ))}
        </tr>
      </thead>
      <tbody>
        {data.rows.map((row, index) => (
          <tr key={index}>
            {row.map((cell, column) =>
              isNumeric[column] ? (
                <FigureCell
                  key={column}
                  value={typeof cell === "number" ? cell : null}
                  digits={4}
                />
              ) : column === 0 ? (
                <th key={column} scope="row">
                  {cell}
                </th>
              ) : (
                <td key={column}>{cell ?? "–"}</td>
              ),
            )}
          </tr>
        ))}
      </tbody>
    </LedgerTable>
  );
}
