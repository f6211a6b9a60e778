import type { TuningResponse } from "@/app/api/v1/calculations/fluid-schema";
import { ChartFrame, type ChartCell } from "@/components/charts/chart-frame";
import { Plot, PlotDot, PlotLabel } from "@/components/charts/plot";
import { linePath, positionOn, ticksOf } from "@/components/charts/scale";
import { formatFigure } from "@/components/ui/format";
import { roundScale, yTicksOf } from "./plot-scale";
import { psia } from "./words";

export interface TuningChartProps {
  result: Pick<TuningResponse, "before" | "after">;
  measured: {
    dewPointPsia: number;
    rows: readonly { pressurePsia: number; liquidPercent: number | null }[];
  };
}

type Fit = TuningResponse["before"];
type Place = readonly [pressurePsia: number, liquidPercent: number];

/** Dropout of a fit, from its dew point down. */
const lineOf = ({ dewPointPsia, rows }: Fit): Place[] => [
  ...(dewPointPsia === null ? [] : [[dewPointPsia, 0] as const]),
  ...rows.flatMap(({ pressurePsia, liquidPercent }): Place[] =>
    liquidPercent === null || pressurePsia >= (dewPointPsia ?? Infinity)
      ? []
      : [[pressurePsia, liquidPercent]],
  ),
];

/** Dropout and dew point before and after a fit, with the laboratory's points. */
export function TuningChart({ result, measured }: TuningChartProps) {
  const { before, after } = result;
  const known = measured.rows.flatMap(({ pressurePsia, liquidPercent }): Place[] =>
    liquidPercent === null ? [] : [[pressurePsia, liquidPercent]],
  );
  const lines = { before: lineOf(before), after: lineOf(after) };
  const all = [...known, ...lines.before, ...lines.after, [measured.dewPointPsia, 0] as const];
  const x = roundScale([0, ...all.map(([pressure]) => pressure)], { count: 6 });
  const y = roundScale(
    all.map(([, percent]) => percent),
    { count: 4, least: 5 },
  );
  const at = ([pressure, percent]: Place) =>
    [positionOn(x, pressure), 100 - positionOn(y, percent)] as const;
  const error = (fit: Fit) => formatFigure(fit.averageLiquidErrorPoints, { digits: 2 });
  const [markX, markY] = at([measured.dewPointPsia, 0]);
  return (
    <ChartFrame
      level={3}
      title={
        after.averageLiquidErrorPoints === null
          ? `Dew point ${psia(after.dewPointPsia)} psia after the fit`
          : `Dropout misses the laboratory by ${error(after)} points on average, before by ${error(before)}`
      }
      note="Squares: measured. Dashed: before. Firm: after."
      fileName="tuning"
      data={{
        columns: [
          { label: "Pressure", unit: "psia" },
          { label: "Measured liquid", unit: "%" },
          { label: "Before", unit: "%" },
          { label: "After", unit: "%" },
        ],
        rows: measured.rows.map(({ pressurePsia, liquidPercent }): ChartCell[] => [
          pressurePsia,
          liquidPercent,
          before.rows.find((row) => row.pressurePsia === pressurePsia)?.liquidPercent ?? null,
          after.rows.find((row) => row.pressurePsia === pressurePsia)?.liquidPercent ?? null,
        ]),
      }}
    >
      <Plot
        label={`Dropout before and after tuning. Dew point measured ${psia(measured.dewPointPsia)}, before ${psia(before.dewPointPsia)}, after ${psia(after.dewPointPsia)} psia.`}
        height={200}
        left={46}
        tone="rock"
        yTitle="Liquid, % of the cell"
        xTitle="Pressure, psia"
        yTicks={yTicksOf(y, 4, " %")}
        xTicks={ticksOf(x, 6)}
        shapes={
          <>
            <path className="line-soft line-dashed" d={linePath(lines.before.map(at))} />
            <path className="line" d={linePath(lines.after.map(at))} />
          </>
        }
      >
        {known.map((point) => {
          const [left, top] = at(point);
          return <PlotDot key={point[0]} x={left} y={top} shape="square" />;
        })}
        <PlotDot x={markX} y={markY} shape="diamond" />
        <PlotLabel x={markX} y={markY} anchor={markX > 75 ? "end" : "start"} dy={-44} soft>
          Measured dew point
        </PlotLabel>
      </Plot>
    </ChartFrame>
  );
}
