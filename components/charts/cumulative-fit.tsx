import { formatFigure } from "@/components/ui/format";
import { linePath, percent, positionOn, scaleFor } from "./scale";

export interface CumulativeFitProps {
  name: string;
  unit?: string;
  values: readonly number[];
  /** chance of at most x by the fitted curve; `null` for the values alone */
  cdf: ((x: number) => number) | null;
}

const STEPS = 80;

/** Share of measured values up to each value, as stairs, against the curve that was fitted to them. */
export function CumulativeFit({ name, unit, values, cdf }: CumulativeFitProps) {
  const sorted = [...values].sort((a, b) => a - b);
  const scale = scaleFor(sorted, { kind: "linear", fromZero: false, pad: 0.08 });
  const [low, high] = scale.domain;
  const x = (value: number) => positionOn(scale, value);
  const y = (share: number) => 100 - 100 * share;
  const stairs: [number, number][] = [[0, 100]];
  sorted.forEach((value, index) => {
    stairs.push([x(value), y(index / sorted.length)], [x(value), y((index + 1) / sorted.length)]);
  });
  stairs.push([100, 0]);
  const curve = cdf
    ? Array.from({ length: STEPS + 1 }, (_, index): [number, number] => {
        const value = low + ((high - low) * index) / STEPS;
        return [x(value), y(cdf(value))];
      })
    : null;
  return (
    <figure className="cumulative-fit">
      <figcaption>
        Share of values up to each value
        {curve ? "; stairs: measured, line: fitted" : ""}
      </figcaption>
      <div
        role="img"
        aria-label={`${name}: ${sorted.length} measured values from ${formatFigure(sorted[0])} to ${formatFigure(sorted.at(-1))}${unit ? ` ${unit}` : ""}${curve ? ", with the fitted curve" : ""}`}
      >
        <svg viewBox="0 0 100 100" preserveAspectRatio="none" aria-hidden="true" focusable="false">
          {[25, 50, 75].map((share) => (
            <line key={share} className="grid-line" x1="0" x2="100" y1={share} y2={share} />
          ))}
          <path className="measured" d={linePath(stairs)} />
          {curve && <path className="fitted" d={linePath(curve)} />}
        </svg>
        {[1, 0.5, 0].map((share) => (
          <span key={share} className="share" style={{ top: percent(y(share)) }} aria-hidden="true">
            {share * 100} %
          </span>
        ))}
      </div>
      <div className="ends" aria-hidden="true">
        <span>{formatFigure(low)}</span>
        <span>
          {formatFigure(high)} {unit && <span className="unit">{unit}</span>}
        </span>
      </div>
    </figure>
  );
}
