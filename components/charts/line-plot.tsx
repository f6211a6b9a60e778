import { Plot, PlotLabel } from "./plot";
import type { Tone } from "./range-mark";
import { linePath, positionOn, scaleFor, ticksOf, type Scale } from "./scale";

export interface PlotLine {
  label: string;
  points: readonly { x: number; y: number }[];
  tone?: Tone;
  /** dashed: what it was, or what it would be */
  dashed?: boolean;
  /** where the label stands, as a share of the points; the end unless told otherwise */
  labelAt?: number;
  labelSide?: "above" | "below";
}

export interface LinePlotProps {
  /** read out in place of the drawing: what is shown and what it shows */
  label: string;
  lines: readonly PlotLine[];
  /** from P90 to P10, behind the lines */
  band?: { label: string; points: readonly { x: number; low: number; high: number }[] };
  /** a stretch of the axis that means something: "critical saturation" */
  zone?: { label: string; axis: "x" | "y"; from: number; to: number };
  /** upright lines: dew point, abandonment */
  markers?: readonly { x: number; label: string; double?: boolean }[];
  xTitle: string;
  yTitle: string;
  tone?: Tone;
  xScale?: Scale;
  yScale?: Scale;
  height?: number;
  xTicks?: number;
  children?: React.ReactNode;
}

/** Lines against a continuous axis, labelled where they run. Never two y axes: stack two of these. */
export function LinePlot({
  label,
  lines,
  band,
  zone,
  markers = [],
  xTitle,
  yTitle,
  tone = "condensate",
  xScale,
  yScale,
  height = 240,
  xTicks = 6,
  children,
}: LinePlotProps) {
  const xs = [...lines, ...(band ? [band] : [])].flatMap(({ points }) =>
    (points as readonly { x: number }[]).map(({ x }) => x),
  );
  const ys = [
    ...lines.flatMap(({ points }) => points.map(({ y }) => y)),
    ...(band?.points.flatMap(({ low, high }) => [low, high]) ?? []),
    ...(zone?.axis === "y" ? [zone.from, zone.to] : []),
  ];
  const xAxis = xScale ?? tight(xs);
  const yAxis = yScale ?? scaleFor(ys, { kind: "linear", pad: 0.04 });
  const xOf = (value: number) => positionOn(xAxis, value);
  const yOf = (value: number) => 100 - positionOn(yAxis, value);

  return (
    <Plot
      label={label}
      height={height}
      tone={tone}
      xTitle={xTitle}
      yTitle={yTitle}
      xTicks={ticksOf(xAxis, xTicks)}
      yTicks={ticksOf(yAxis, 4).map((tick) => ({ ...tick, position: 100 - tick.position }))}
      shapes={
        <>
          {zone && <rect className="zone" {...zoneBox(zone, xOf, yOf)} />}
          {band && (
            <path
              className="band"
              d={`${linePath(band.points.map(({ x, high }) => [xOf(x), yOf(high)]))}${linePath(
                [...band.points].reverse().map(({ x, low }) => [xOf(x), yOf(low)]),
              ).replace("M", "L")}Z`}
            />
          )}
          {lines.map((line) => (
            <g key={line.label} data-tone={line.tone}>
              <path
                className={line.dashed ? "line line-dashed" : "line"}
                d={linePath(line.points.map(({ x, y }) => [xOf(x), yOf(y)]))}
              />
            </g>
          ))}
          {markers.map(({ x, label: words, double }) => (
            <line
              key={words}
              className={double ? "line-soft" : "line-soft line-thin line-dashed"}
              x1={xOf(x)}
              x2={xOf(x)}
              y1="0"
              y2="100"
            />
          ))}
        </>
      }
    >
      {zone && (
        <PlotLabel {...zoneLabel(zone, xOf, yOf)} soft>
          {zone.label}
        </PlotLabel>
      )}
      {lines.map((line) => {
        const share = line.labelAt ?? 1;
        const point = line.points[Math.round(share * (line.points.length - 1))];
        if (!point || lines.length + (band ? 1 : 0) < 2) return null;
        return (
          <span key={line.label} data-tone={line.tone}>
            <PlotLabel
              x={xOf(point.x)}
              y={yOf(point.y)}
              anchor={share > 0.8 ? "end" : share > 0.2 ? "middle" : "start"}
              dx={share > 0.8 ? -4 : share > 0.2 ? 0 : 8}
              dy={line.labelSide === "below" ? 12 : -12}
              toned
            >
              {line.label}
            </PlotLabel>
          </span>
        );
      })}
      {markers.map(({ x, label: words }) => (
        <PlotLabel
          key={words}
          x={xOf(x)}
          y={0}
          anchor={xOf(x) > 70 ? "end" : "start"}
          dx={xOf(x) > 70 ? -6 : 6}
          dy={8}
          soft
        >
          {words}
        </PlotLabel>
      ))}
      {children}
    </Plot>
  );
}

/** An axis from the first to the last value, without room at the sides. */
function tight(values: readonly number[]): Scale {
  if (values.length === 0) return { kind: "linear", domain: [0, 1] };
  const low = Math.min(...values);
  const high = Math.max(...values);
  return { kind: "linear", domain: [low, high > low ? high : low + 1] };
}

type Zone = NonNullable<LinePlotProps["zone"]>;
type Place = (value: number) => number;

function zoneBox({ axis, from, to }: Zone, xOf: Place, yOf: Place) {
  return axis === "x"
    ? { x: xOf(from), width: xOf(to) - xOf(from), y: 0, height: 100 }
    : { x: 0, width: 100, y: yOf(to), height: yOf(from) - yOf(to) };
}

function zoneLabel({ axis, from, to }: Zone, xOf: Place, yOf: Place) {
  return axis === "x"
    ? { x: (xOf(from) + xOf(to)) / 2, y: 4, anchor: "middle" as const }
    : { x: 0, y: (yOf(from) + yOf(to)) / 2, anchor: "start" as const, dx: 6 };
}
