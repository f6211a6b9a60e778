import { formatFigure } from "@/components/ui/format";
import type { ExceedanceCurve } from "./exceedance-curve";
import { ExceedanceReader } from "./exceedance-reader";
import { Plot, PlotDot, PlotLabel } from "./plot";
import { describeRange, type MarkRange, type Tone } from "./range-mark";
import { linePath, positionOn, scaleFor, ticksOf, type Scale, type Tick } from "./scale";

export interface ExceedanceProps {
  /** "Portfolio liquid value" */
  name: string;
  unit: string;
  curve: ExceedanceCurve;
  range: MarkRange;
  tone?: Tone;
  scale?: "auto" | "linear" | "log";
  /** the curve it had, dashed */
  before?: { label: string; curve: ExceedanceCurve; range: MarkRange };
  /** sums of the members' percentiles: named, and set apart as diamonds */
  arithmetic?: { p90: number; p10: number };
  height?: number;
  xTitle?: string;
}

const chanceTicks: Tick[] = [1, 0.75, 0.5, 0.25, 0].map((chance) => ({
  value: chance,
  label: `${chance * 100} %`,
  position: 100 - chance * 100,
}));

const readings = [
  { key: "p90", chance: 0.9, label: "P90" },
  { key: "p50", chance: 0.5, label: "P50" },
  { key: "p10", chance: 0.1, label: "P10" },
] as const;

/** Points of the curve in percent, with the flat parts outside the simulated values drawn in. */
function pointsOf(curve: ExceedanceCurve, scale: Scale): [number, number][] {
  const inside = curve.values
    .map((value, i): [number, number] => [
      positionOn(scale, value),
      100 - curve.probabilities[i] * 100,
    ])
    .filter(([x]) => x >= 0 && x <= 100);
  if (inside.length === 0) return [];
  return [[0, inside[0][1]], ...inside];
}

/** A scale that shows the curve from where it leaves 100 % to where it is nearly 0 %. */
function curveScale(
  curves: readonly ExceedanceCurve[],
  marks: readonly number[],
  kind: "auto" | "linear" | "log",
): Scale {
  const shown = curves.flatMap(({ values, probabilities }) =>
    values.filter((_, i) => probabilities[i] <= 0.995 && probabilities[i] >= 0.003),
  );
  return scaleFor([...shown, ...marks], { kind: kind === "auto" ? "linear" : kind, pad: 0.02 });
}

/** Chance of at least each amount, with P90, P50 and P10 read off it. */
export function Exceedance({
  name,
  unit,
  curve,
  range,
  tone = "condensate",
  scale: kind = "auto",
  before,
  arithmetic,
  height = 300,
  xTitle = unit,
}: ExceedanceProps) {
  const scale = curveScale(
    before ? [curve, before.curve] : [curve],
    [range.p90, range.p10, ...(arithmetic ? [arithmetic.p90, arithmetic.p10] : [])],
    kind,
  );
  const points = pointsOf(curve, scale);
  const line = linePath(points);
  const end = points.at(-1)?.[0] ?? 0;
  const sums = arithmetic
    ? `. Arithmetic sum of the P90s ${formatFigure(arithmetic.p90)}, of the P10s ${formatFigure(arithmetic.p10)}`
    : "";
  const was = before ? `. ${before.label}: ${describeRange(before.range)}` : "";

  return (
    <Plot
      label={`Exceedance curve. ${name}: ${describeRange(range)} ${unit}${was}${sums}.`}
      height={height}
      tone={tone}
      yTitle="Chance of at least this much"
      xTitle={scale.kind === "log" ? `${xTitle}, log scale` : xTitle}
      yTicks={chanceTicks}
      xTicks={ticksOf(scale, 6)}
      shapes={
        <>
          {line && <path className="area" d={`${line}L${end} 100L0 100Z`} />}
          {readings.map(({ key, chance }) => {
            const x = positionOn(scale, range[key]);
            const y = 100 - chance * 100;
            return (
              <path
                key={key}
                className="line-soft line-thin line-dashed"
                d={`M0 ${y}L${x} ${y}L${x} 100`}
              />
            );
          })}
          {arithmetic &&
            (["p90", "p10"] as const).map((key) => {
              const y = key === "p90" ? 10 : 90;
              return (
                <path
                  key={key}
                  className="line-soft line-dotted"
                  d={`M${positionOn(scale, arithmetic[key])} ${y}L${positionOn(scale, range[key])} ${y}`}
                />
              );
            })}
          {before && (
            <path className="line-soft line-dashed" d={linePath(pointsOf(before.curve, scale))} />
          )}
          {line && <path className="line" d={line} />}
        </>
      }
    >
      <ExceedanceReader curve={curve} scale={scale} unit={unit} />
      {before && (
        <>
          <PlotDot x={positionOn(scale, before.range.p90)} y={10} shape="open" />
          <PlotLabel
            x={positionOn(scale, before.range.p90)}
            y={10}
            anchor="start"
            soft
            dx={8}
            dy={-12}
          >
            {before.label} P90 {formatFigure(before.range.p90)}
          </PlotLabel>
        </>
      )}
      {arithmetic && <ArithmeticMarks sums={arithmetic} scale={scale} />}
      {readings.map(({ key, chance, label }) => {
        const x = positionOn(scale, range[key]);
        const y = 100 - chance * 100;
        // Under the point where the curve it had runs above it.
        const under = before !== undefined && key === "p90";
        return (
          <span key={key}>
            <PlotDot x={x} y={y} />
            <PlotLabel
              x={x}
              y={y}
              anchor={under ? "middle" : x > 84 ? "end" : "start"}
              dx={under ? -18 : x > 84 ? -10 : 10}
              dy={under ? 16 : -10}
            >
              <b>{label}</b> {formatFigure(range[key])}
            </PlotLabel>
          </span>
        );
      })}
    </Plot>
  );
}

/** Sums of the members' percentiles: diamonds, because they are no probabilities. */
function ArithmeticMarks({ sums, scale }: { sums: { p90: number; p10: number }; scale: Scale }) {
  return (["p90", "p10"] as const).map((key) => {
    const x = positionOn(scale, sums[key]);
    const y = key === "p90" ? 10 : 90;
    return (
      <span key={key}>
        <PlotDot x={x} y={y} shape="diamond" />
        <PlotLabel
          x={x}
          y={y}
          soft
          anchor={x > 80 ? "end" : x < 20 ? "start" : "middle"}
          dy={key === "p90" ? 20 : -28}
        >
          Sum of {key.toUpperCase()}s {formatFigure(sums[key])}
        </PlotLabel>
      </span>
    );
  });
}
