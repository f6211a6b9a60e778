import { formatFigure, formatPercent } from "@/components/ui/format";
import { linePath, percent, positionOn, type Scale } from "./scale";

export interface DensityCurveProps {
  name: string;
  unit?: string;
  /** points of the density, x rising; any scale of density */
  points: readonly { x: number; density: number }[];
  /** values with chances of their own, drawn as stems beside the density */
  atoms?: readonly { value: number; probability: number }[];
  range: { p90: number; p50: number; p10: number };
  /** the range usually met, drawn as a bar under the curve */
  usual?: { low: number; high: number };
  flagged?: boolean;
}

/** Heights are drawn from 14 (top) to 100 (base) of the box, so the peak never touches the edge. */
const TOP = 14;

/** The small curve of one input, with P90, P50 and P10 as ticks and the usual range under it. */
export function DensityCurve({
  name,
  unit,
  points,
  atoms = [],
  range,
  usual,
  flagged,
}: DensityCurveProps) {
  if (points.length < 2) return null;
  const scale = scaleOf(points, atoms.length > 0);
  const likeliest = Math.max(...atoms.map(({ probability }) => probability));
  const peak = Math.max(...points.map(({ density }) => density)) || 1;
  const yOf = (density: number) => 100 - (density / peak) * (100 - TOP);
  const line = linePath(points.map(({ x, density }) => [positionOn(scale, x), yOf(density)]));

  const heightAt = (value: number) => {
    const next = points.findIndex(({ x }) => x >= value);
    if (next <= 0) return 100;
    const [a, b] = [points[next - 1], points[next]];
    return yOf(a.density + ((value - a.x) / (b.x - a.x)) * (b.density - a.density));
  };
  const clip = (value: number) => Math.min(100, Math.max(0, positionOn(scale, value)));

  return (
    <span
      className="density"
      data-flagged={flagged || undefined}
      role="img"
      aria-label={`${name} density: P90 ${formatFigure(range.p90)}, P50 ${formatFigure(range.p50)}, P10 ${formatFigure(range.p10)}${unit ? ` ${unit}` : ""}${atoms.length > 0 ? `; single values ${atoms.map(({ value, probability }) => `${formatFigure(value)} with ${formatPercent(probability)}`).join(", ")}` : ""}${usual ? `; usual ${formatFigure(usual.low)} to ${formatFigure(usual.high)}` : ""}`}
    >
      <svg viewBox="0 0 100 100" preserveAspectRatio="none" aria-hidden="true" focusable="false">
        <path className="density-area" d={`${line}L100 100L0 100Z`} />
        {(["p90", "p50", "p10"] as const).map((key) => {
          const x = positionOn(scale, range[key]);
          return (
            <line
              key={key}
              className={key === "p50" ? "density-tick density-median" : "density-tick"}
              x1={x}
              x2={x}
              y1={heightAt(range[key])}
              y2="100"
            />
          );
        })}
        <path className="density-line" d={line} />
        {atoms.map(({ value, probability }) => {
          const x = positionOn(scale, value);
          return (
            <line
              key={value}
              className="density-atom"
              x1={x}
              x2={x}
              y1={yOf((peak * probability) / likeliest)}
              y2="100"
            />
          );
        })}
      </svg>
      {usual && (
        <i
          className="usual"
          style={{
            left: percent(clip(usual.low)),
            width: percent(clip(usual.high) - clip(usual.low)),
          }}
        />
      )}
    </span>
  );
}

/** Room for stems that stand at the very ends. */
const STEM_ROOM = 0.04;

function scaleOf(points: readonly { x: number }[], hasStems: boolean): Scale {
  const [low, high] = [points[0].x, points[points.length - 1].x];
  const room = hasStems ? STEM_ROOM * (high - low) : 0;
  return { kind: "linear", domain: [low - room, high + room] };
}
