import type { CSSProperties } from "react";
import { formatFigure, MISSING } from "@/components/ui/format";
import { VisuallyHidden } from "@/components/ui/text";
import { percent, positionOn, ticksOf, type Scale } from "./scale";

/** P90 is the low case: 90 % chance of at least this much. */
export interface MarkRange {
  p90: number;
  p50: number;
  p10: number;
  mean?: number | null;
}

/** Condensate, gas, plant liquids, rock: where a molecule goes. Ink: money. Soft: what it was. */
export type Tone = "condensate" | "gas" | "ngl" | "rock" | "ink" | "soft";

export interface RangeMarkProps {
  /** read out before the values: "Pellow North liquid value" */
  name: string;
  range: MarkRange | null | undefined;
  unit?: string;
  scale: Scale;
  tone?: Tone;
  size?: "row" | "large";
  /** the range it had: a hollow box behind the mark */
  before?: MarkRange | null;
  /** what the box is, read out: what it was unless told otherwise */
  beforeWord?: string;
  /** decade lines through the row; on for rows */
  gridLines?: boolean;
  /** how many ticks the column's scale has, so that lines and header agree */
  ticks?: number;
  /** prints P90, P50 and P10 under their positions; on for large marks */
  values?: boolean;
  /** the edge the tooltip lines up with; a row's opens leftwards, because marks stand at the right of a table */
  tipSide?: "left" | "right";
  format?: (value: number) => string;
}

const toStyle = (from: number, to: number): CSSProperties => ({
  left: percent(from),
  width: percent(to - from),
});

const within = (position: number) => Math.min(100, Math.max(0, position));
const isOn = (position: number) => position >= -0.01 && position <= 100.01;

/** "P90 4,260, P50 5,700, mean 5,890, P10 7,720" */
export function describeRange(
  range: MarkRange,
  format: (value: number) => string = formatFigure,
  separator = ", ",
) {
  const parts = [`P90 ${format(range.p90)}`, `P50 ${format(range.p50)}`];
  if (typeof range.mean === "number") parts.push(`mean ${format(range.mean)}`);
  parts.push(`P10 ${format(range.p10)}`);
  return parts.join(separator);
}

const formatPlain = (value: number) => formatFigure(value);

/**
 * The range mark: a line from P90 to P10, a tick at P50, a dot at the mean, on a scale shared by its
 * column. Focusable, and reads out its values; the same text shows on hover and focus.
 */
export function RangeMark({
  name,
  range,
  unit,
  scale,
  tone = "condensate",
  size = "row",
  before,
  beforeWord = "before",
  gridLines = size === "row",
  ticks,
  values = size === "large",
  tipSide = size === "row" ? "right" : "left",
  format = formatPlain,
}: RangeMarkProps) {
  if (!range || ![range.p90, range.p50, range.p10].every(Number.isFinite)) {
    return <span className="no-mark">No range</span>;
  }
  const at = {
    p90: positionOn(scale, range.p90),
    p50: positionOn(scale, range.p50),
    p10: positionOn(scale, range.p10),
    mean: typeof range.mean === "number" ? positionOn(scale, range.mean) : null,
  };
  const cut = [!isOn(at.p90) && "low", !isOn(at.p10) && "high"].filter(Boolean).join(" ");
  const unitText = unit ? ` ${unit}` : "";
  const beforeText = before ? `; ${beforeWord} ${describeRange(before, format)}` : "";

  return (
    <>
      <span
        className="range-mark"
        data-tone={tone}
        data-size={size}
        data-before={before ? "" : undefined}
        data-tip-side={tipSide}
        data-tip={
          describeRange(range, format, "   ") +
          (before ? `\n${beforeWord} ${describeRange(before, format, "   ")}` : "")
        }
        role="img"
        tabIndex={0}
        aria-label={`${name}: ${describeRange(range, format)}${unitText}${beforeText}`}
      >
        {gridLines &&
          ticksOf(scale, ticks).map(({ value, position }) => (
            <i key={value} className="grid-line" style={{ left: percent(position) }} />
          ))}
        {before && <BeforeBox before={before} scale={scale} />}
        <i
          className="span"
          data-cut={cut || undefined}
          style={toStyle(within(at.p90), within(at.p10))}
        />
        {isOn(at.p50) && <i className="median" style={{ left: percent(at.p50) }} />}
        {at.mean !== null && isOn(at.mean) && (
          <i className="mean" style={{ left: percent(at.mean) }} />
        )}
      </span>
      {values && (
        <dl className="range-values">
          {(["p90", "p50", "p10"] as const).map((key) => (
            <div key={key} style={{ left: percent(within(at[key])) }}>
              <dt>{key.toUpperCase()}</dt>
              <dd>{format(range[key])}</dd>
            </div>
          ))}
        </dl>
      )}
    </>
  );
}

function BeforeBox({ before, scale }: { before: MarkRange; scale: Scale }) {
  const [low, middle, high] = [before.p90, before.p50, before.p10].map((value) =>
    positionOn(scale, value),
  );
  return (
    <>
      <i className="before-box" style={toStyle(within(low), within(high))} />
      {isOn(middle) && <i className="before-median" style={{ left: percent(middle) }} />}
    </>
  );
}

/** The axis of a column of range marks, printed in its heading: the axis is the column. */
export function RangeScale({ scale, ticks }: { scale: Scale; ticks?: number }) {
  return (
    <>
      <VisuallyHidden>Range from P90 to P10</VisuallyHidden>
      <span className="range-scale" aria-hidden="true">
        {ticksOf(scale, ticks).map(({ value, label, position }) => (
          <i key={value} style={{ left: percent(position) }}>
            {label}
          </i>
        ))}
      </span>
    </>
  );
}

/** How to read the mark, for the basis strip and for legends. */
export function RangeKey() {
  return (
    <span className="flex items-center gap-[5px]">
      P90
      <span className="range-mark" data-size="key" data-tone="soft" aria-hidden="true">
        <i className="span" style={{ left: "0%", width: "100%" }} />
        <i className="median" style={{ left: "42%" }} />
        <i className="mean" style={{ left: "55%" }} />
      </span>
      P10
    </span>
  );
}

/** P90, P50 and P10 as one phrase where there is no room for a mark. */
export const rangePhrase = (range: MarkRange | null | undefined) =>
  range ? `P90 ${formatFigure(range.p90)}, P10 ${formatFigure(range.p10)}` : MISSING;
