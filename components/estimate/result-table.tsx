import { Fragment } from "react";
import { RangeMark, RangeScale } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { Figure } from "@/components/ui/figure";
import { fractionDigits } from "@/components/ui/format";
import { Unit } from "@/components/ui/text";
import type { ResultGroup } from "./result-rows";

export interface ResultTableProps {
  caption: string;
  groups: ResultGroup[];
  /** figures of inputs that have changed since */
  isStale?: boolean;
}

/** P90, P50 and P10 of each result with its mark; a box behind a mark is what it was. */
export function ResultTable({ caption, groups, isStale = false }: ResultTableProps) {
  return (
    <table className="ledger-table result-table" data-stale={isStale || undefined}>
      <caption className="sr-only">{caption}</caption>
      <tbody>
        {groups.map(({ title, unit, rows }) => {
          const scale = scaleFor(
            rows.flatMap(({ range, before }) => [
              range.p90,
              range.p10,
              range.mean,
              before?.p90,
              before?.p10,
            ]),
          );
          const digits = fractionDigits(
            rows.flatMap(({ range }) => [range.p90, range.p50, range.p10]),
          );
          return (
            <Fragment key={title}>
              <tr className="group-head">
                <th scope="col">
                  {title} <Unit>{unit}</Unit>
                </th>
                {["P90", "P50", "P10"].map((level) => (
                  <th key={level} scope="col" className="right">
                    <span className="figure">
                      {level}
                      <span
                        className="figure-fraction"
                        style={{ width: digits > 0 ? `calc(${digits}ch + .28em)` : 0 }}
                      />
                    </span>
                  </th>
                ))}
                <th scope="col" className="mark">
                  <span className="sr-only">Range</span>
                  <RangeScale scale={scale} ticks={3} />
                </th>
              </tr>
              {rows.map(({ name, label, tone, range, before, mark }) => (
                <tr key={name}>
                  <th scope="row">
                    {label}
                    {mark && <small className="result-mark">{mark}</small>}
                  </th>
                  {(["p90", "p50", "p10"] as const).map((level) => (
                    <td key={level} className={level === "p50" ? "right strong" : "right"}>
                      <Figure value={range[level]} fraction={digits} />
                    </td>
                  ))}
                  <td className="mark">
                    <RangeMark
                      name={`${title}, ${label}`}
                      range={range}
                      before={before}
                      unit={unit}
                      scale={scale}
                      ticks={3}
                      tone={tone}
                      tipSide="right"
                    />
                  </td>
                </tr>
              ))}
            </Fragment>
          );
        })}
      </tbody>
    </table>
  );
}
