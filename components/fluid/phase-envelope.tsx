import { Fragment } from "react";
import type { SeparatorStage } from "@/analytics/composition/composition-schema";
import type { EquationOfStateResponse } from "@/app/api/v1/calculations/fluid-schema";
import { ChartFrame, type ChartCell } from "@/components/charts/chart-frame";
import { Plot, PlotDot, PlotLabel } from "@/components/charts/plot";
import { linePath, positionOn, ticksOf } from "@/components/charts/scale";
import { formatFigure } from "@/components/ui/format";
import { Flag } from "@/components/ui/text";
import { phaseStanding } from "./phase-standing";
import { psia } from "./words";
import { freeRoom, LABEL_GAP, layoutLabels, type PlacedText, type PlotBox } from "./label-layout";
import { areaInside, partsInside, roundScale, yTicksOf } from "./plot-scale";
import { useWidth } from "./use-width";

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
        <Labels
          dots={dots}
          quality={envelope.quality.map(({ liquidVolumeFraction, points }) => ({
            text: `${formatFigure(liquidVolumeFraction * 100, { decimals: 0 })} %`,
            points: places(points).map(place),
          }))}
          box={{ width: width - LEFT, height: HEIGHT }}
        />
      </Plot>
    </div>
  );
}

interface Mark {
  at: EnvelopePoint;
  /** `null`: a label alone */
  dot: "full" | "open" | null;
  side: PlacedText["side"];
  tone?: "ink" | "gas" | "condensate";
  /** stands in bold before the first line */
  name?: string;
  /** none: a point that another label speaks for */
  lines: readonly string[];
}

function marksOf({
  result: { envelope, saturation, isTuned },
  temperatureDegF,
  initialPressurePsia,
  abandonmentPressurePsia,
  stages,
}: PhaseEnvelopeProps): Mark[] {
  const at = (pressurePsia: number) => ({ temperatureDegF, pressurePsia });
  const marks: Mark[] = [];
  if (envelope.critical) {
    marks.push({ at: envelope.critical, dot: "open", side: "left", lines: ["Critical point"] });
  }
  if (envelope.cricondentherm) {
    marks.push({
      at: envelope.cricondentherm,
      dot: null,
      side: "left",
      lines: [`Cricondentherm ${formatFigure(envelope.cricondentherm.temperatureDegF)} °F`],
    });
  }
  if (initialPressurePsia !== null) {
    marks.push({
      at: at(initialPressurePsia),
      dot: "full",
      side: "right",
      tone: "ink",
      name: "Initial",
      lines: [psia(initialPressurePsia)],
    });
  }
  marks.push(...saturationMarks(saturation, isTuned, at));
  if (abandonmentPressurePsia !== null) {
    marks.push({
      at: at(abandonmentPressurePsia),
      dot: "full",
      side: "right",
      tone: "ink",
      name: "Abandonment",
      lines: [psia(abandonmentPressurePsia)],
    });
  }
  stages.forEach((stage, index) => {
    const isTank = index === stages.length - 1;
    marks.push({
      at: stage,
      dot: "full",
      side: isTank ? "left" : "right",
      tone: "gas",
      lines: [isTank ? "Tank" : `Stage ${index + 1}`],
    });
  });
  return marks;
}

/** The measured dew point as a full dot, the computed one as an open one; one label where they lie together. */
function saturationMarks(
  { measuredPsia, upperPsia, kind }: EquationOfStateResponse["saturation"],
  isTuned: boolean,
  at: (pressurePsia: number) => EnvelopePoint,
): Mark[] {
  const shared = { side: "right", tone: "condensate" } as const;
  const computedWords = isTuned ? "tuned" : "untuned";
  const areTogether =
    measuredPsia !== null &&
    upperPsia !== null &&
    Math.abs(measuredPsia - upperPsia) < TOGETHER * Math.max(measuredPsia, upperPsia);
  const marks: Mark[] = [];
  if (upperPsia !== null) {
    marks.push({
      ...shared,
      at: at(upperPsia),
      dot: "open",
      name:
        measuredPsia === null ? (kind === "bubblePoint" ? "Bubble point" : "Dew point") : undefined,
      lines: areTogether ? [] : [`${psia(upperPsia)}, ${computedWords}`],
    });
  }
  if (measuredPsia !== null) {
    marks.push({
      ...shared,
      at: at(measuredPsia),
      dot: "full",
      name: "Dew point",
      lines: areTogether
        ? [`${psia(measuredPsia)} measured,`, `${psia(upperPsia)} ${computedWords}`]
        : [`${psia(measuredPsia)}, measured`],
    });
  }
  return marks;
}

/** Pressures nearer to each other than this share are one place of the picture. */
const TOGETHER = 0.04;

/** Where a line leaves the picture at the top, and how far it goes. */
function leavingMark(points: readonly EnvelopePoint[], top: number): Mark[] {
  const most = Math.max(...points.map(({ pressurePsia }) => pressurePsia));
  const index = points.findIndex(
    ({ pressurePsia }, i) => i > 0 && pressurePsia > top !== points[i - 1].pressurePsia > top,
  );
  if (index < 0) return [];
  const [from, to] = [points[index - 1], points[index]];
  const share = (top - from.pressurePsia) / (to.pressurePsia - from.pressurePsia);
  return [
    {
      at: {
        temperatureDegF: from.temperatureDegF + share * (to.temperatureDegF - from.temperatureDegF),
        pressurePsia: top,
      },
      dot: null,
      side: "right",
      lines: [`↑ goes on to ${formatFigure(most)} psia`],
    },
  ];
}

/** Places for a line's label, best first: its end to the right, where lines lie apart, then along it. */
function places(points: readonly EnvelopePoint[]): EnvelopePoint[] {
  if (points.length === 0) return [];
  const tip = points.reduce((far, point) =>
    point.temperatureDegF > far.temperatureDegF ? point : far,
  );
  return [tip, ...[0.3, 0.5, 0.7].map((share) => points[Math.floor(share * (points.length - 1))])];
}

function Labels({
  dots,
  quality,
  box,
}: {
  dots: readonly (Mark & { x: number; y: number })[];
  quality: readonly { text: string; points: readonly { x: number; y: number }[] }[];
  box: PlotBox;
}) {
  const named = dots.filter(({ lines }) => lines.length > 0);
  const placements = layoutLabels(
    named.map(({ name, lines, ...mark }) => ({
      ...mark,
      lines: lines.map((line, index) => (index === 0 && name ? `${name} ${line}` : line)),
    })),
    box,
  );
  const blocks = placements.map(({ block }) => block);
  return (
    <>
      {quality.map(({ text, points }) => {
        for (const point of points) {
          const room = freeRoom(point, text, blocks, box);
          if (!room) continue;
          blocks.push(room);
          return (
            <PlotLabel key={text} {...point} soft>
              {text}
            </PlotLabel>
          );
        }
        return null;
      })}
      {dots.map(
        ({ x, y, dot, tone }, index) =>
          dot && (
            <span key={index} data-tone={tone}>
              <PlotDot x={x} y={y} shape={dot} />
            </span>
          ),
      )}
      {named.map(({ x, y, tone, name, lines }, index) => (
        <span key={index} data-tone={tone}>
          <PlotLabel
            {...{ x, y }}
            anchor={placements[index].side === "right" ? "start" : "end"}
            dx={placements[index].side === "right" ? LABEL_GAP : -LABEL_GAP}
            dy={placements[index].dy}
            toned={tone === "gas" || tone === "condensate"}
            soft={tone === undefined}
          >
            {name && <b>{name} </b>}
            {lines.map((line, at) => (
              <Fragment key={line}>
                {at > 0 && <br />}
                {line}
              </Fragment>
            ))}
          </PlotLabel>
        </span>
      ))}
    </>
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
