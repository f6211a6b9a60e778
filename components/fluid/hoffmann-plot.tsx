import type { DepletionResponse } from "@/app/api/v1/calculations/fluid-schema";
import { ChartFrame, type ChartCell } from "@/components/charts/chart-frame";
import { Plot, PlotDot, PlotLabel } from "@/components/charts/plot";
import { linePath, positionOn, ticksOf } from "@/components/charts/scale";
import { formatFigure } from "@/components/ui/format";
import { ComponentSymbol } from "./component-label";
import { roundScale, yTicksOf } from "./plot-scale";
import { psia } from "./words";

type Step = DepletionResponse["hoffmann"][number];

/** Below this the points of a step do not lie on a line; common practice, no source. */
const STRAIGHT = 0.99;

/** K-values of each step against the characterisation factor: on a straight line when liquid and gas belong together. */
export function HoffmannPlot({ steps, fileName }: { steps: readonly Step[]; fileName: string }) {
  if (steps.length === 0) return null;
  const worst = steps.reduce((least, step) => (step.rSquared < least.rSquared ? step : least));
  const isStraight = worst.rSquared >= STRAIGHT;
  const at = `${psia(worst.pressurePsia)} psia`;
  const squared = formatFigure(worst.rSquared, { digits: 4 });
  return (
    <ChartFrame
      title={
        isStraight
          ? `K-values lie on straight lines: r² ${squared} or more`
          : `K-values stray from their line at ${at}: r² ${squared}`
      }
      note={`log K·p against the characterisation factor of Hoffmann, Crump and Hocott (1953), one line a step. Drawn firm: the step that fits least, at ${at}.`}
      fileName={fileName}
      data={{
        columns: [
          { label: "Pressure", unit: "psia" },
          { label: "Component" },
          { label: "Characterisation factor" },
          { label: "log K·p" },
          { label: "Line of the step" },
          { label: "r²" },
        ],
        rows: steps.flatMap(({ pressurePsia, points, slope, intercept, rSquared }) =>
          points.map(({ name, characterisationFactor, logKTimesPressure }): ChartCell[] => [
            pressurePsia,
            name,
            characterisationFactor,
            logKTimesPressure,
            intercept + slope * characterisationFactor,
            rSquared,
          ]),
        ),
      }}
    >
      <HoffmannLines steps={steps} worst={worst} />
    </ChartFrame>
  );
}

function HoffmannLines({ steps, worst }: { steps: readonly Step[]; worst: Step }) {
  const factors = steps.flatMap(({ points }) => points.map((p) => p.characterisationFactor));
  const x = roundScale(factors, { fromZero: false });
  const y = roundScale(
    steps.flatMap(({ points }) => points.map((p) => p.logKTimesPressure)),
    { fromZero: false },
  );
  const place = (factor: number, value: number): [number, number] => [
    positionOn(x, factor),
    100 - positionOn(y, value),
  ];
  return (
    <Plot
      label={`Hoffmann plot of ${steps.length} steps; the least straight is at ${psia(worst.pressurePsia)} psia with r² ${formatFigure(worst.rSquared, { digits: 4 })}.`}
      height={300}
      left={40}
      tone="condensate"
      yTitle="log K·p, p in psia"
      xTitle="Characterisation factor"
      yTicks={yTicksOf(y, 5)}
      xTicks={ticksOf(x, 6)}
      shapes={steps.map((step) => {
        const ends = step.points.map((p) => p.characterisationFactor);
        const line = (factor: number) => place(factor, step.intercept + step.slope * factor);
        return (
          <path
            key={step.pressurePsia}
            className={step === worst ? "line" : "line-soft line-thin"}
            d={linePath([line(Math.min(...ends)), line(Math.max(...ends))])}
          />
        );
      })}
    >
      {steps.map((step) => (
        <span key={step.pressurePsia} data-tone={step === worst ? undefined : "soft"}>
          {step.points.map(({ name, characterisationFactor, logKTimesPressure }) => {
            const [left, top] = place(characterisationFactor, logKTimesPressure);
            return (
              <span key={name}>
                <PlotDot x={left} y={top} shape={step === worst ? "full" : "small"} />
                {step === worst && (
                  <PlotLabel x={left} y={top} anchor="start" dx={7} dy={9} soft>
                    <ComponentSymbol symbol={name} />
                  </PlotLabel>
                )}
              </span>
            );
          })}
        </span>
      ))}
    </Plot>
  );
}
