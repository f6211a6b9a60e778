import type { MaterialBalanceResponse } from "@/app/api/v1/calculations/material-balance-schema";
import { ChartFrame, type ChartCell } from "@/components/charts/chart-frame";
import { Plot, PlotDot, PlotLabel } from "@/components/charts/plot";
import type { MarkRange } from "@/components/charts/range-mark";
import { linePath, positionOn, ticksOf } from "@/components/charts/scale";
import { roundScale, yTicksOf } from "@/components/fluid/plot-scale";
import { psia } from "@/components/fluid/words";
import { formatFigure } from "@/components/ui/format";
import { balanceAdvice, balanceTitle, bscf } from "./balance-words";

export interface PressureOverZChartProps {
  result: MaterialBalanceResponse;
  /** wet gas in place of the estimate, scf; `null` without one */
  volumetric: MarkRange | null;
  /** "Laboratory", "Tuned equation of state"; `null` where the gas's own z is taken */
  source: string | null;
  fileName: string;
}

/** p/z2 against the wellstream produced: where the line meets zero pressure is the gas in place. */
export function PressureOverZChart({
  result,
  volumetric,
  source,
  fileName,
}: PressureOverZChartProps) {
  const advice = balanceAdvice(result.wellstreamInPlaceScf, volumetric);
  return (
    <ChartFrame
      level={3}
      title={balanceTitle(result, volumetric)}
      note={
        <>
          {advice && `${advice} `}
          {source
            ? `Two-phase z below the dew point: ${source.toLowerCase()}. `
            : "The gas’s own z throughout. "}
          {result.withGasZ && "Open: the gas’s own z, which misses. "}
          {volumetric &&
            `Shaded: wet gas in place of the estimate, P90 ${bscf(volumetric.p90)}, P50 ${bscf(volumetric.p50)}, P10 ${bscf(volumetric.p10)} Bscf, gross.`}
        </>
      }
      fileName={fileName}
      data={{
        columns: [
          { label: "Pressure", unit: "psia" },
          { label: "Wellstream produced", unit: "Bscf" },
          { label: "z" },
          { label: "p/z", unit: "psia" },
          { label: "Line", unit: "psia" },
          { label: "z of the gas" },
          { label: "p/z of the gas", unit: "psia" },
        ],
        rows: [
          ...result.points.map((point): ChartCell[] => [
            point.pressurePsia,
            point.wellstreamProducedScf / 1e9,
            point.z,
            point.pressureOverZ,
            point.linePressureOverZ,
            point.gasZ,
            point.gasPressureOverZ,
          ]),
          [0, result.wellstreamInPlaceScf / 1e9, null, 0, 0, null, null],
        ],
      }}
    >
      <Line result={result} volumetric={volumetric} />
    </ChartFrame>
  );
}

function Line({ result, volumetric }: Pick<PressureOverZChartProps, "result" | "volumetric">) {
  const { points, line, wellstreamInPlaceScf: foot, withGasZ } = result;
  const reach = Math.max(foot, withGasZ?.wellstreamInPlaceScf ?? 0, volumetric?.p10 ?? 0);
  // Room at the right of the foot, for its figure.
  const x = roundScale([0, (reach * 1.15) / 1e9], { count: 6 });
  const y = roundScale(
    [line.initialPressureOverZ, ...points.map(({ pressureOverZ }) => pressureOverZ)],
    { count: 5 },
  );
  const place = (scf: number, pressureOverZ: number): [number, number] => [
    positionOn(x, scf / 1e9),
    100 - positionOn(y, pressureOverZ),
  ];
  const at = (scf: number) => positionOn(x, scf / 1e9);
  const footX = at(foot);
  return (
    <Plot
      label={`p/z against the wellstream produced, ${points.length} pressures on a line from ${psia(line.initialPressureOverZ)} psia to ${bscf(foot)} Bscf, r² ${formatFigure(line.rSquared, { digits: 4 })}.${volumetric ? ` Volumetric P90 ${bscf(volumetric.p90)}, P50 ${bscf(volumetric.p50)}, P10 ${bscf(volumetric.p10)} Bscf.` : ""}`}
      height={300}
      left={52}
      tone="gas"
      yTitle="p/z, psia"
      xTitle="Wellstream produced, Bscf"
      yTicks={yTicksOf(y, 5)}
      xTicks={ticksOf(x, 6)}
      shapes={
        <>
          {volumetric && (
            <>
              <rect
                className="area"
                x={at(volumetric.p90)}
                width={at(volumetric.p10) - at(volumetric.p90)}
                y="0"
                height="100"
              />
              <line
                className="line-soft line-thin"
                x1={at(volumetric.p50)}
                x2={at(volumetric.p50)}
                y1="0"
                y2="100"
              />
            </>
          )}
          {withGasZ && (
            <path
              className="line-soft line-thin line-dashed"
              d={linePath([
                place(0, withGasZ.initialPressureOverZ),
                place(withGasZ.wellstreamInPlaceScf, 0),
              ])}
            />
          )}
          <path
            className="line"
            d={linePath([place(0, line.initialPressureOverZ), place(foot, 0)])}
          />
        </>
      }
    >
      {volumetric && (
        <PlotLabel x={at(volumetric.p50)} y={4} anchor="start" dx={6} soft>
          Volumetric P50
        </PlotLabel>
      )}
      {withGasZ &&
        points
          .filter(({ z, gasZ }) => z !== gasZ)
          .map((point) => {
            const [left, top] = place(point.wellstreamProducedScf, point.gasPressureOverZ);
            return <PlotDot key={point.wellstreamProducedScf} x={left} y={top} shape="open" />;
          })}
      {points.map((point) => {
        const [left, top] = place(point.wellstreamProducedScf, point.pressureOverZ);
        return <PlotDot key={point.wellstreamProducedScf} x={left} y={top} />;
      })}
      <PlotDot x={footX} y={100} shape="square" />
      <PlotLabel x={footX} y={100} anchor="start" dx={8} dy={-12} toned>
        <b>{bscf(foot)}</b>
      </PlotLabel>
    </Plot>
  );
}
