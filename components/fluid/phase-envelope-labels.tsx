import { Fragment } from "react";
import { PlotDot, PlotLabel } from "@/components/charts/plot";
import type { EquationOfStateResponse } from "@/app/api/v1/calculations/fluid-schema";
import { formatFigure } from "@/components/ui/format";
import { freeRoom, LABEL_GAP, layoutLabels, type PlacedText, type PlotBox } from "./label-layout";
import type { EnvelopePoint, PhaseEnvelopeProps } from "./phase-envelope";
import { psia } from "./words";

export interface Mark {
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

export function marksOf({
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
export function leavingMark(points: readonly EnvelopePoint[], top: number): Mark[] {
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
export function labelPlaces(points: readonly EnvelopePoint[]): EnvelopePoint[] {
  if (points.length === 0) return [];
  const tip = points.reduce((far, point) =>
    point.temperatureDegF > far.temperatureDegF ? point : far,
  );
  return [tip, ...[0.3, 0.5, 0.7].map((share) => points[Math.floor(share * (points.length - 1))])];
}

export function EnvelopeLabels({
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
