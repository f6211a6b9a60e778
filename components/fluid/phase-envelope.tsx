import type { SeparatorStage } from "@/analytics/composition/composition-schema";
import type { EquationOfStateResponse } from "@/app/api/v1/calculations/fluid-schema";
import { ChartFrame, type ChartCell } from "@/components/charts/chart-frame";
import { Plot, PlotDot, PlotLabel } from "@/components/charts/plot";
import { linePath, positionOn, ticksOf, type Scale } from "@/components/charts/scale";
import { formatFigure } from "@/components/ui/format";
import { Flag } from "@/components/ui/text";
import { psia } from "./words";
import { clippedLine, roundScale, yTicksOf } from "./plot-scale";

type Envelope = EquationOfStateResponse["envelope"];
type EnvelopePoint = Envelope["dew"][number];

export interface PhaseEnvelopeProps {
  result: EquationOfStateResponse;
  temperatureDegF: number;
  initialPressurePsia: number | null;
  abandonmentPressurePsia: number | null;
  stages: readonly SeparatorStage[];
  fileName: string;
}

/** "Liquid starts to drop out 1,474 psi below initial pressure", from the measured dew point where there is one. */
export function envelopeFinding(
  { saturation, isTuned }: Pick<EquationOfStateResponse, "saturation" | "isTuned">,
  initialPressurePsia: number | null,
): string {
  const dewPoint = saturation.measuredPsia ?? saturation.upperPsia;
  if (dewPoint === null) return "No liquid drops out at reservoir temperature";
  const doubt = saturation.measuredPsia === null && !isTuned ? "Untuned, not fitted: " : "";
  const kind =
    saturation.kind === "bubblePoint" && saturation.measuredPsia === null
      ? "bubble point"
      : "dew point";
  const say = (words: string) => (doubt ? doubt + words[0].toLowerCase() + words.slice(1) : words);
  if (initialPressurePsia === null) return say(`The ${kind} is ${psia(dewPoint)} psia`);
  const margin = initialPressurePsia - dewPoint;
  if (Math.abs(margin) < 1) return say(`The reservoir begins at its ${kind}`);
  if (margin < 0) {
    return say(`Initial pressure lies ${formatFigure(-margin)} psi below the ${kind}`);
  }
  return say(
    kind === "bubble point"
      ? `Gas comes out of the liquid ${formatFigure(margin)} psi below initial pressure`
      : `Liquid starts to drop out ${formatFigure(margin)} psi below initial pressure`,
  );
}

/** Bubble and dew lines with the ways that the fluid goes: down in the reservoir, and up to the stock tank. */
export function PhaseEnvelope(props: PhaseEnvelopeProps) {
  const { result, temperatureDegF, fileName } = props;
  const { isTuned, saturation } = result;
  const mismatch = saturation.mismatchPsia;
  return (
    <ChartFrame
      title={envelopeFinding(result, props.initialPressurePsia)}
      note={
        <>
          {isTuned ? (
            "Phase envelope by Peng–Robinson, tuned to the laboratory’s figures."
          ) : (
            <>
              <Flag icon="warning">Untuned</Flag> Phase envelope by Peng–Robinson, dashed because it
              is fitted to no measurement: an indication, not a fact.
            </>
          )}{" "}
          {mismatch !== null &&
            `Computed dew point ${psia(saturation.upperPsia)} psia, measured ${psia(saturation.measuredPsia)}: ${formatFigure(mismatch, { signed: true, digits: 3 })} psi. `}
          What stays in the rock follows the black line, what is produced the blue one; between
          reservoir and separator it is not computed.
        </>
      }
      fileName={fileName}
      data={{
        columns: [
          { label: "Line" },
          { label: "Temperature", unit: "°F" },
          { label: "Pressure", unit: "psia" },
        ],
        rows: rowsOf(result, temperatureDegF),
      }}
    >
      <EnvelopePlot {...props} />
    </ChartFrame>
  );
}

function rowsOf(
  { envelope, saturation }: EquationOfStateResponse,
  temperatureDegF: number,
): ChartCell[][] {
  const line = (name: string, points: readonly EnvelopePoint[]) =>
    points.map((point): ChartCell[] => [name, point.temperatureDegF, point.pressurePsia]);
  const one = (name: string, point: EnvelopePoint | null) => (point ? line(name, [point]) : []);
  const at = (name: string, pressurePsia: number | null) =>
    pressurePsia === null ? [] : line(name, [{ temperatureDegF, pressurePsia }]);
  return [
    ...at("Dew point, measured", saturation.measuredPsia),
    ...at("Saturation, computed", saturation.upperPsia),
    ...at("Lower dew point, computed", saturation.lowerDewPointPsia),
    ...one("Critical point", envelope.critical),
    ...one("Cricondentherm", envelope.cricondentherm),
    ...one("Cricondenbar", envelope.cricondenbar),
    ...line("Bubble points", envelope.bubble),
    ...line("Dew points", envelope.dew),
    ...envelope.quality.flatMap(({ liquidVolumeFraction, points }) =>
      line(`${formatFigure(liquidVolumeFraction * 100, { decimals: 0 })} % liquid`, points),
    ),
  ];
}

function EnvelopePlot({
  result,
  temperatureDegF,
  initialPressurePsia,
  abandonmentPressurePsia,
  stages,
}: PhaseEnvelopeProps) {
  const { envelope, saturation, isTuned } = result;
  const all = [...envelope.bubble, ...envelope.dew];
  const temperatures = all.map((point) => point.temperatureDegF);
  const x = roundScale(
    [
      // Far below freezing nothing of a reservoir happens; the line runs out of the picture there.
      Math.max(Math.min(...temperatures, 0), -150),
      Math.max(...temperatures, temperatureDegF) + 15,
      ...stages.map((stage) => stage.temperatureDegF),
    ],
    { fromZero: false },
  );
  const y = roundScale([
    ...all.map((point) => point.pressurePsia),
    initialPressurePsia ?? 0,
    saturation.measuredPsia ?? 0,
  ]);
  const draw = (points: readonly EnvelopePoint[]) =>
    linePath(
      clippedLine(
        points.map((point) => [
          positionOn(x, point.temperatureDegF),
          100 - positionOn(y, point.pressurePsia),
        ]),
      ),
    );
  const place = (temperature: number, pressure: number) => ({
    x: positionOn(x, temperature),
    y: 100 - positionOn(y, pressure),
  });
  // Bubble line rising, then the dew line from the critical point down: one closed shape.
  const outline = outlineOf(envelope);
  const last = abandonmentPressurePsia ?? stages[0]?.pressurePsia ?? 0;
  const start = initialPressurePsia ?? saturation.measuredPsia ?? saturation.upperPsia;
  const dash = isTuned ? "" : " line-dashed";

  return (
    <Plot
      label={describe(result, temperatureDegF)}
      height={440}
      left={52}
      tone="condensate"
      yTitle="Pressure, psia"
      xTitle="Temperature, °F"
      yTicks={yTicksOf(y, 6)}
      xTicks={ticksOf(x, 6)}
      shapes={
        <>
          {outline.length > 2 && <path className="area" opacity={0.6} d={draw(closed(outline))} />}
          {envelope.quality.map(({ liquidVolumeFraction, points }) => (
            <path
              key={liquidVolumeFraction}
              className="line line-thin line-dotted"
              d={draw(points)}
            />
          ))}
          <path className={`line${dash}`} d={draw(envelope.bubble)} />
          <path className={`line${dash}`} d={draw(envelope.dew)} />
          {start !== null && (
            <g data-tone="ink">
              <path
                className="line"
                d={draw([
                  { temperatureDegF, pressurePsia: start },
                  { temperatureDegF, pressurePsia: last },
                ])}
              />
            </g>
          )}
          <g data-tone="gas">
            {start !== null && stages.length > 0 && (
              <path
                className="line line-thin line-dashed"
                d={draw([{ temperatureDegF, pressurePsia: start }, stages[0]])}
              />
            )}
            <path className="line" d={draw(stages)} />
          </g>
        </>
      }
    >
      {envelope.critical && (
        <Mark
          {...place(envelope.critical.temperatureDegF, envelope.critical.pressurePsia)}
          shape="open"
          anchor="end"
        >
          Critical point
        </Mark>
      )}
      {envelope.cricondentherm && (
        <PlotLabel
          {...place(envelope.cricondentherm.temperatureDegF, envelope.cricondentherm.pressurePsia)}
          anchor="end"
          dx={-8}
          soft
        >
          {formatFigure(envelope.cricondentherm.temperatureDegF)} °F
        </PlotLabel>
      )}
      <QualityLabels quality={envelope.quality} x={x} y={y} />
      {initialPressurePsia !== null && (
        <span data-tone="ink">
          <Mark {...place(temperatureDegF, initialPressurePsia)} anchor="start" firm>
            <b>Initial</b> {psia(initialPressurePsia)}
          </Mark>
        </span>
      )}
      <DewPointMarks {...{ saturation, place, temperatureDegF, isTuned }} />
      {abandonmentPressurePsia !== null && (
        <span data-tone="ink">
          <Mark {...place(temperatureDegF, abandonmentPressurePsia)} anchor="start">
            <b>Abandonment</b> {psia(abandonmentPressurePsia)}
          </Mark>
        </span>
      )}
      <span data-tone="gas">
        {stages.map((stage, index) => (
          <Mark
            key={index}
            {...place(stage.temperatureDegF, stage.pressurePsia)}
            anchor={index === stages.length - 1 ? "end" : "start"}
            dy={index === stages.length - 1 ? -8 : 0}
            toned
          >
            {index === stages.length - 1 ? "Tank" : `Stage ${index + 1}`}
          </Mark>
        ))}
      </span>
    </Plot>
  );
}

/** The measured dew point as a full dot, the computed one as an open one beside it. */
function DewPointMarks({
  saturation,
  place,
  temperatureDegF,
  isTuned,
}: {
  saturation: EquationOfStateResponse["saturation"];
  place: (temperature: number, pressure: number) => { x: number; y: number };
  temperatureDegF: number;
  isTuned: boolean;
}) {
  const { measuredPsia, upperPsia, kind } = saturation;
  const name = kind === "bubblePoint" ? "Bubble point" : "Dew point";
  // Two labels a line apart, where their points are nearer than that [% of the height].
  const apart =
    measuredPsia === null || upperPsia === null
      ? Infinity
      : place(0, upperPsia).y - place(0, measuredPsia).y;
  const besideMeasured = Math.abs(apart) < 4 ? (apart >= 0 ? 16 : -16) : 0;
  return (
    <>
      {measuredPsia !== null && (
        <Mark {...place(temperatureDegF, measuredPsia)} anchor="start" toned>
          <b>Dew point</b> {psia(measuredPsia)}, measured
        </Mark>
      )}
      {upperPsia !== null && (
        <Mark
          {...place(temperatureDegF, upperPsia)}
          shape="open"
          anchor="start"
          dy={besideMeasured}
          toned
        >
          {measuredPsia === null && <b>{name} </b>}
          {psia(upperPsia)}, {isTuned ? "tuned" : "untuned"}
        </Mark>
      )}
    </>
  );
}

function Mark({
  x,
  y,
  shape = "full",
  anchor,
  toned,
  firm,
  dy = 0,
  children,
}: {
  x: number;
  y: number;
  shape?: "full" | "open";
  anchor: "start" | "end";
  toned?: boolean;
  firm?: boolean;
  dy?: number;
  children: React.ReactNode;
}) {
  return (
    <>
      <PlotDot x={x} y={y} shape={shape} />
      <PlotLabel
        {...{ x, y, dy, toned }}
        anchor={anchor}
        dx={anchor === "start" ? 11 : -11}
        soft={!toned && !firm}
      >
        {children}
      </PlotLabel>
    </>
  );
}

/** Each line's share of liquid, where it reaches farthest to the right: there the lines lie apart. */
function QualityLabels({ quality, x, y }: { quality: Envelope["quality"]; x: Scale; y: Scale }) {
  return quality.map(({ liquidVolumeFraction, points }) => {
    if (points.length === 0) return null;
    const tip = points.reduce((far, point) =>
      point.temperatureDegF > far.temperatureDegF ? point : far,
    );
    const at = {
      x: positionOn(x, tip.temperatureDegF),
      y: 100 - positionOn(y, tip.pressurePsia),
    };
    if (at.x < 5 || at.x > 95 || at.y < 5 || at.y > 95) return null;
    return (
      <PlotLabel key={liquidVolumeFraction} {...at} soft>
        {formatFigure(liquidVolumeFraction * 100, { decimals: 0 })} %
      </PlotLabel>
    );
  });
}

/** The outline down to the axis at both ends, where the lines leave the picture or were not followed further. */
const closed = (outline: readonly EnvelopePoint[]): EnvelopePoint[] => [
  { ...outline[0], pressurePsia: 0 },
  ...outline,
  { ...outline[outline.length - 1], pressurePsia: 0 },
];

/** Bubble and dew line as one, put together where their ends are nearest to each other. */
function outlineOf({ bubble, dew }: Envelope): EnvelopePoint[] {
  if (bubble.length === 0) return dew;
  if (dew.length === 0) return bubble;
  const gap = (from: EnvelopePoint, to: EnvelopePoint) =>
    Math.abs(from.temperatureDegF - to.temperatureDegF) / 100 +
    Math.abs(from.pressurePsia - to.pressurePsia) / 1000;
  const ways = [bubble, bubble.toReversed()].flatMap((first) =>
    [dew, dew.toReversed()].map((second) => ({
      line: [...first, ...second],
      gap: gap(first[first.length - 1], second[0]),
    })),
  );
  return ways.reduce((best, way) => (way.gap < best.gap ? way : best)).line;
}

function describe(
  { envelope, saturation, isTuned }: EquationOfStateResponse,
  temperatureDegF: number,
): string {
  const parts = [
    `Phase envelope, ${isTuned ? "tuned" : "untuned"}`,
    envelope.cricondentherm &&
      `cricondentherm ${formatFigure(envelope.cricondentherm.temperatureDegF)} °F`,
    envelope.critical &&
      `critical point ${formatFigure(envelope.critical.temperatureDegF)} °F and ${psia(envelope.critical.pressurePsia)} psia`,
    saturation.upperPsia !== null &&
      `at ${formatFigure(temperatureDegF)} °F the computed saturation pressure is ${psia(saturation.upperPsia)} psia`,
    saturation.measuredPsia !== null && `measured dew point ${psia(saturation.measuredPsia)} psia`,
  ];
  return `${parts.filter(Boolean).join(", ")}.`;
}
