import type { Warning } from "@/analytics/warnings";
import { RangeMark } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { formatPercent, fractionDigits } from "@/components/ui/format";
import { Icon } from "@/components/ui/icon";
import { FigureCell, FolioCell, LedgerTable } from "@/components/ui/table";
import { Unit } from "@/components/ui/text";
import type { InputDifference } from "./differences";
import { driverCatalogue, inputOfPath } from "./input-catalogue";

/** Inputs before over now; each row scales itself. */
export function DifferenceTable({
  differences,
  warnings,
  caption = "Inputs against the approved revision",
}: {
  differences: readonly InputDifference[];
  warnings: readonly Warning[];
  caption?: string;
}) {
  return (
    <LedgerTable caption={caption} density="change" framed className="stacked-rows">
      <thead>
        <tr>
          <FolioCell heading />
          <th scope="col">Input</th>
          {["P90", "P50", "P10"].map((level) => (
            <th key={level} scope="col" className="right">
              {level}
            </th>
          ))}
          <th scope="col" className="mark">
            P90 to P10
          </th>
          <th scope="col" className="right">
            P50 moves
          </th>
        </tr>
      </thead>
      <tbody>
        {differences.map((difference, index) => (
          <DifferenceRow
            key={difference.name}
            line={index + 1}
            difference={difference}
            warning={warnings.find(({ input }) => inputOfPath(input) === difference.name)}
          />
        ))}
      </tbody>
    </LedgerTable>
  );
}

function DifferenceRow({
  line,
  difference,
  warning,
}: {
  line: number;
  difference: InputDifference;
  warning: Warning | undefined;
}) {
  const { name, now, before, medianChange, shapeChanged, isSame, typed, source, reason } =
    difference;
  const about = driverCatalogue[name];
  const scale = scaleFor([now.p90, now.p10, before?.p90, before?.p10], {
    kind: "linear",
    fromZero: false,
    pad: 0.14,
  });
  const digits = fractionDigits([
    ...[now.p90, now.p50, now.p10],
    ...(before && !isSame ? [before.p90, before.p50, before.p10] : []),
  ]);
  const shown = isSame ? undefined : before;
  const isMove =
    !isSame && medianChange !== null && !(Math.abs(medianChange) < 0.0005 && shapeChanged);
  return (
    <tr className={warning ? "flagged" : undefined}>
      <td className="folio">{line}</td>
      <th scope="row" className={isSame || difference.isWorkedOut ? "wrap plain soft" : "wrap"}>
        {about.label} {about.unit && <Unit>{about.unit}</Unit>}
        <small className="block font-normal text-ink-soft">
          {warning && (
            <span className="flex items-baseline gap-1.5 text-warning-ink">
              <span className="shrink-0">
                <Icon name="warning" />
              </span>
              <span>{warning.message}</span>
            </span>
          )}
          {typed?.before && <span className="block">Was {typed.before}.</span>}
          {typed && (
            <span className="block">
              {typed.before ? "Now" : "Typed:"} {typed.now}.
            </span>
          )}
          {!isSame && source && <span className="block">{source}</span>}
          {!isSame && reason && <span className="said">{reason}</span>}
        </small>
      </th>
      {(["p90", "p50", "p10"] as const).map((level) => (
        <FigureCell
          key={level}
          value={now[level]}
          before={shown ? shown[level] : undefined}
          soft={isSame}
          fraction={digits}
        />
      ))}
      <td className="mark">
        {now.p90 === now.p10 ? (
          <span className="no-mark">One value</span>
        ) : (
          <RangeMark
            name={about.label}
            range={now}
            before={shown ?? null}
            unit={about.unit || undefined}
            scale={scale}
            tone={isSame ? "soft" : "ink"}
            gridLines={false}
          />
        )}
      </td>
      <td className={isSame ? "stacked-aside right soft" : "stacked-aside right strong"}>
        {isSame
          ? "same"
          : medianChange === null
            ? "new"
            : !isMove
              ? "shape"
              : formatPercent(medianChange, {
                  signed: true,
                  decimals: Math.abs(medianChange) < 0.1 ? 1 : 0,
                })}
        {isMove && (
          <small className="hidden font-normal text-ink-soft phone:block">P50 moves</small>
        )}
      </td>
    </tr>
  );
}
