import { RangeMark } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { formatPercent, fractionDigits } from "@/components/ui/format";
import { FigureCell, LedgerTable } from "@/components/ui/table";
import { Unit } from "@/components/ui/text";
import type { ResultGroup } from "./result-rows";

/** Results before over now; each row scales itself. */
export function ResultChangeTable({
  groups,
  caption = "Results against the approved revision",
}: {
  groups: readonly ResultGroup[];
  caption?: string;
}) {
  const rows = groups.flatMap(({ title, unit, rows: results }) =>
    results.map((row) => ({
      ...row,
      unit,
      label: title === "Condensate" ? `Condensate ${row.label.toLowerCase()}` : row.label,
    })),
  );
  return (
    <LedgerTable caption={caption} density="change" framed className="stacked-rows">
      <thead>
        <tr>
          <th scope="col">Quantity</th>
          {["P90", "P50", "P10"].map((level) => (
            <th key={level} scope="col" className="right">
              {level}
            </th>
          ))}
          <th scope="col" className="mark">
            P90 to P10
          </th>
          <th scope="col" className="right">
            Mean moves
          </th>
        </tr>
      </thead>
      <tbody>
        {rows.map(({ name, label, unit, tone, range, before, mark }) => {
          const digits = fractionDigits([
            ...[range.p90, range.p50, range.p10],
            ...(before ? [before.p90, before.p50, before.p10] : []),
          ]);
          const scale = scaleFor([range.p90, range.p10, range.mean, before?.p90, before?.p10], {
            pad: 0.14,
            fromZero: false,
          });
          return (
            <tr key={name}>
              <th scope="row" className="wrap">
                {label} <Unit>{unit}</Unit>
                {mark && <small className="result-mark">{mark}</small>}
              </th>
              {(["p90", "p50", "p10"] as const).map((level) => (
                <FigureCell
                  key={level}
                  value={range[level]}
                  before={before ? before[level] : undefined}
                  fraction={digits}
                />
              ))}
              <td className="mark">
                <RangeMark
                  name={label}
                  range={range}
                  before={before}
                  unit={unit}
                  scale={scale}
                  tone={tone}
                  gridLines={false}
                />
              </td>
              <td className="stacked-aside right strong">
                {before ? formatPercent(range.mean / before.mean - 1, { signed: true }) : "new"}
                {before && (
                  <small className="hidden font-normal text-ink-soft phone:block">mean moves</small>
                )}
              </td>
            </tr>
          );
        })}
      </tbody>
    </LedgerTable>
  );
}
