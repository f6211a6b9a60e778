import type { SeparatorStage } from "@/analytics/composition/composition-schema";
import type { EquationOfStateResponse } from "@/app/api/v1/calculations/fluid-schema";
import { ChartFrame, type ChartCell } from "@/components/charts/chart-frame";
import { Plot } from "@/components/charts/plot";
import { linePath, positionOn, ticksOf } from "@/components/charts/scale";
import { formatFigure } from "@/components/ui/format";
import { Flag } from "@/components/ui/text";
import { phaseStanding } from "./phase-standing";
import { psia } from "./words";
import { EnvelopeLabels, labelPlaces, leavingMark, marksOf } from "./phase-envelope-labels";
import { areaInside, partsInside, roundScale, yTicksOf } from "./plot-scale";
import { useWidth } from "./use-width";

type Envelope = EquationOfStateResponse["envelope"];
export type EnvelopePoint = Envelope["dew"][number];

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
  {
    saturation,
    isTuned,
    ...result
  }: Pick<EquationOfStateResponse, "saturation" | "isTuned" | "envelope" | "train">,
  initialPressurePsia: number | null,
  temperatureDegF: number,
): string {
  const standing = phaseStanding({ saturation, ...result }, temperatureDegF);
  if (standing) return standing.heading;
  const dewPoint = saturation.measuredPsia ?? saturation.upperPsia;
  if (dewPoint === null) return "No liquid drops out at reservoir temperature";
  const doubt = saturation.measuredPsia === null && !isTuned ? "Untuned, not fitted: " : "";
  const say = (words: string) => (doubt ? doubt + words[0].toLowerCase() + words.slice(1) : words);
  if (initialPressurePsia === null) return say(`The dew point is ${psia(dewPoint)} psia`);
  const margin = initialPressurePsia - dewPoint;
  if (Math.abs(margin) < 1) return say(`The reservoir begins at its dew point`);
  if (margin < 0) {
    return say(`Initial pressure lies ${formatFigure(-margin)} psi below the dew point`);
  }
  return say(`Liquid starts to drop out ${formatFigure(margin)} psi below initial pressure`);
}

/** Bubble and dew lines with the ways that the fluid goes: down in the reservoir, and up to the stock tank. */
export function PhaseEnvelope(props: PhaseEnvelopeProps) {
  const { result, temperatureDegF, fileName } = props;
  const { isTuned, saturation } = result;
  const mismatch = saturation.mismatchPsia;
  return (
    <ChartFrame
      title={envelopeFinding(result, props.initialPressurePsia, temperatureDegF)}
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
          { label: "Equation of state" },
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
  { envelope, saturation, isTuned }: EquationOfStateResponse,
  temperatureDegF: number,
): ChartCell[][] {
  const tuned = isTuned ? "tuned" : "untuned";
  const line = (name: string, points: readonly EnvelopePoint[], words = tuned) =>
    points.map((point): ChartCell[] => [name, words, point.temperatureDegF, point.pressurePsia]);
  const one = (name: string, point: EnvelopePoint | null) => (point ? line(name, [point]) : []);
  const at = (name: string, pressurePsia: number | null, words?: string) =>
    pressurePsia === null ? [] : line(name, [{ temperatureDegF, pressurePsia }], words);
  return [
    ...at("Dew point, measured", saturation.measuredPsia, "none"),
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

/** How far above its highest figure the picture reaches; a branch that goes on is cut there. */
const HEADROOM = 1.2;
const HEIGHT = 440;
const LEFT = 52;

/** The highest pressure of the picture: it holds the figures, and as much of the lines as lies about them. */
function topOf({ envelope, saturation }: EquationOfStateResponse, initialPsia: number | null) {
  const lines = [...envelope.bubble, ...envelope.dew].map((point) => point.pressurePsia);
  const figures = [
    initialPsia,
    saturation.measuredPsia,
    saturation.upperPsia,
    envelope.critical?.pressurePsia,
    envelope.cricondenbar?.pressurePsia,
  ].filter((value) => typeof value === "number");
  const most = Math.max(...lines, ...figures, 1);
  return figures.length === 0 ? most : Math.min(most, HEADROOM * Math.max(...figures));
}

function EnvelopePlot(props: PhaseEnvelopeProps) {
  const { result, temperatureDegF, initialPressurePsia, abandonmentPressurePsia, stages } = props;
  const { envelope, saturation, isTuned } = result;
  const [frame, width] = useWidth<HTMLDivElement>(520);
  const y = roundScale([topOf(result, initialPressurePsia)]);
  const top = y.domain[1];
  const temperatures = [...envelope.bubble, ...envelope.dew]
    .filter((point) => point.pressurePsia <= top)
    .map((point) => point.temperatureDegF);
  const x = roundScale(
    [
      // Far below freezing nothing of a reservoir happens; the line runs out of the picture there.
      Math.max(Math.min(...temperatures, 0), -150),
      Math.max(...temperatures, temperatureDegF) + 15,
      ...stages.map((stage) => stage.temperatureDegF),
    ],
    { fromZero: false, count: 7 },
  );
  const place = (point: EnvelopePoint) => ({
    x: positionOn(x, point.temperatureDegF),
    y: 100 - positionOn(y, point.pressurePsia),
  });
  const pairs = (points: readonly EnvelopePoint[]) =>
    points.map(place).map((at) => [at.x, at.y] as const);
  const draw = (points: readonly EnvelopePoint[]) =>
    partsInside(pairs(points)).map(linePath).join("");
  // Bubble line rising, then the dew line from the critical point down: one closed shape.
  const outline = outlineOf(envelope);
  const last = abandonmentPressurePsia ?? stages[0]?.pressurePsia ?? 0;
  const start = initialPressurePsia ?? saturation.measuredPsia ?? saturation.upperPsia;
  const dash = isTuned ? "" : " line-dashed";
  const dots = [
    ...marksOf(props),
    ...[envelope.bubble, envelope.dew].flatMap((points) => leavingMark(points, top)),
  ]
    .map((mark) => ({ ...mark, ...place(mark.at) }))
    .filter((mark) => [mark.x, mark.y].every((at) => at >= -0.01 && at <= 100.01));

  return (
    <div ref={frame}>
      <Plot
        label={describe(result, temperatureDegF)}
        height={HEIGHT}
        left={LEFT}
        tone="condensate"
        yTitle="Pressure, psia"
        xTitle="Temperature, °F"
        yTicks={yTicksOf(y, 6)}
        xTicks={ticksOf(x, 6)}
        shapes={
          <>
            {outline.length > 2 && (
              <path
                className="area"
                opacity={0.6}
                d={`${linePath(areaInside(pairs(closed(outline))))}Z`}
              />
            )}
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
        <EnvelopeLabels
          dots={dots}
          quality={envelope.quality.map(({ liquidVolumeFraction, points }) => ({
            text: `${formatFigure(liquidVolumeFraction * 100, { decimals: 0 })} %`,
            points: labelPlaces(points).map(place),
          }))}
          box={{ width: width - LEFT, height: HEIGHT }}
        />
      </Plot>
    </div>
  );
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
