import { formatFigure, formatFull, MISSING, splitFigure, type FigureFormat } from "./format";
import { Unit } from "./text";

export interface FigureProps extends FigureFormat {
  value: number | null | undefined;
  unit?: string;
  /** decimals the widest figure of the column shows (`fractionDigits`): aligns the points */
  fraction?: number;
}

/** The point is narrower than a digit: the box is the digits and a little. */
const boxWidth = (digits: number) => (digits > 0 ? `calc(${digits}ch + .28em)` : "0");

/** A number: three significant digits, the full value on hover, an en dash when it is missing. */
export function Figure({ value, unit, fraction, ...format }: FigureProps) {
  const text = formatFigure(value, format);
  const parts = splitFigure(text);
  const full = formatFull(value);
  return (
    <span
      className="figure"
      title={text === MISSING || full === text ? undefined : unit ? `${full} ${unit}` : full}
    >
      <span>{parts.integer}</span>
      {fraction === undefined ? (
        parts.fraction
      ) : (
        <span className="figure-fraction" style={{ width: boxWidth(fraction) }}>
          {parts.fraction}
        </span>
      )}
      {unit && (
        <>
          {" "}
          <Unit>&nbsp;{unit}</Unit>
        </>
      )}
    </span>
  );
}
