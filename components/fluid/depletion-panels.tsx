"use client";

import type { RecoveryRoute } from "@/analytics/recovery/recovery-curve-schema";
import { ChartFrame, type ChartCell } from "@/components/charts/chart-frame";
import { Plot, PlotDot, PlotLabel } from "@/components/charts/plot";
import { linePath, percent, positionOn, ticksOf, type Scale } from "@/components/charts/scale";
import { Figure } from "@/components/ui/figure";
import { formatFigure, MISSING } from "@/components/ui/format";
import { Flag, Unit } from "@/components/ui/text";
import { AbandonmentLine } from "./abandonment-line";
import type { AvailableCurve } from "./available-curves";
import {
  fineStates,
  gainPer100Psi,
  mostLiquid,
  revaporised,
  stateAt,
  type CurveState,
} from "./curve-reading";
import { LABEL_GAP, layoutLabels, type Placement } from "./label-layout";
import { roundScale, yTicksOf } from "./plot-scale";
import { useWidth } from "./use-width";
import { psia } from "./words";

export interface DepletionPanelsProps {
  /** what the read-outs stand on */
  curve: AvailableCurve;
  /** drawn thin beside it */
  others: readonly AvailableCurve[];
  /** measured liquid, per cent of the cell; drawn as squares */
  measured: readonly { pressurePsia: number; liquidPercent: number | null }[];
  initialPressurePsia: number | null;
  /** what speaks against any dropout at all, in a heading; `null` when nothing does */
  contradiction?: string | null;
  /** produced above the dew point, share of what is in place at first; `null` while unknown */
  producedBefore: number | null;
  /** liquid below this stays where it is, per cent of pore space */
  criticalBand: { low: number; high: number };
  /** P50; liquid is measured in the pore space that water leaves. `null` while unknown: the band is drawn as it stands */
  waterSaturation: number | null;
  abandonmentPressurePsia: number;
  /** what depletion is compared on with other concepts, while it is known */
  abandonmentRange: { p90: number; p10: number } | null;
  onAbandon: (pressurePsia: number) => void;
  fileName: string;
}

const LEFT = 46;
const LIQUID_HEIGHT = 180;

/** The band, which counts of all pore space, as per cent of what water leaves of it. */
function ofHydrocarbons(
  { low, high }: DepletionPanelsProps["criticalBand"],
  waterSaturation: number | null,
) {
  const share = waterSaturation === null ? 1 : Math.max(1 - waterSaturation, 0.01);
  return { low: low / share, high: high / share };
}

/** A label at its side of its point. */
const besides = ({ side, dy }: Placement) => ({
  anchor: side === "right" ? ("start" as const) : ("end" as const),
  dx: side === "right" ? LABEL_GAP : -LABEL_GAP,
  dy,
});

/** Curves that no measured depletion stands behind: said in words, and drawn dashed. */
const doubts: Partial<Record<RecoveryRoute, string>> = {
  untunedEquationOfState: "Untuned",
  correlation: "By correlation",
};

/** Liquid in the pores over the producing yield, on one pressure axis, with the end of production drawn through both. */
export function DepletionPanels(props: DepletionPanelsProps) {
  const { curve, measured, fileName, initialPressurePsia } = props;
  const { points } = curve.curve;
  const most = mostLiquid(curve.curve);
  const back = revaporised(curve.curve);
  const leastYield = Math.min(...points.map((point) => point.producingYieldStbPerMmscf));
  const doubt = doubts[curve.route];
  const hasLiquid = most.liquidSaturation > 0;
  const lead =
    doubt === undefined
      ? "Liquid"
      : curve.route === "correlation"
        ? `${doubt}, liquid`
        : `${doubt}: liquid`;
  return (
    <div className="depletion-panels">
      <ChartFrame
        title={
          props.contradiction
            ? `${props.contradiction}; the depletion table says otherwise`
            : hasLiquid
              ? `${lead} takes up to ${formatFigure(most.liquidSaturation * 100)} % of the gas’s pore space; the yield falls from ${formatFigure(points[0].producingYieldStbPerMmscf)} to ${formatFigure(leastYield)} STB/MMscf`
              : `${doubt ? `${doubt}: the` : "The"} yield falls from ${formatFigure(points[0].producingYieldStbPerMmscf)} to ${formatFigure(leastYield)} STB/MMscf`
        }
        note={
          <>
            {doubt && <Flag icon="warning">{doubt}</Flag>} {curve.note}{" "}
            {measured.length > 0 && "Squares: measured by the laboratory. "}
            {props.others.length > 0 &&
              `Thin: ${props.others.map(({ label }) => label.toLowerCase()).join(", ")}. `}
            {back !== null &&
              `Below ${psia(most.pressurePsia)} psia ${formatFigure(back * 100, { digits: 2 })} points of it turn to vapour again. `}
            Shaded: critical saturation; liquid below it stays in the rock
            {props.waterSaturation === null
              ? ". It counts of all pore space and liquid of what water leaves; water is not known yet. "
              : `; it counts of all pore space, of which water takes ${formatFigure(props.waterSaturation * 100, { digits: 2 })} % (P50). `}
            The line is one pressure, to be dragged or moved with the arrow keys
            {props.abandonmentRange
              ? "; concepts stand on a range of them: the band on the axis is depletion’s P90 to P10."
              : "."}
          </>
        }
        fileName={fileName}
        data={{
          columns: [
            { label: "Recovery from" },
            { label: "Pressure", unit: "psia" },
            { label: "Liquid", unit: "% of hydrocarbon pore space" },
            { label: "Measured liquid", unit: "% of hydrocarbon pore space" },
            { label: "Producing yield", unit: "STB/MMscf" },
            { label: "Condensate produced", unit: "% of that at the dew point" },
            { label: "Gas produced", unit: "% of that at the dew point" },
            { label: "Condensate left in the gas", unit: "% of that at the dew point" },
          ],
          rows: points.map((point): ChartCell[] => [
            curve.label,
            point.pressurePsia,
            point.liquidSaturation * 100,
            measured.find(({ pressurePsia }) => Math.abs(pressurePsia - point.pressurePsia) < 0.5)
              ?.liquidPercent ?? null,
            point.producingYieldStbPerMmscf,
            point.condensateProduced * 100,
            point.gasProduced * 100,
            point.condensateInGas * 100,
          ]),
        }}
      >
        <Panels {...props} />
      </ChartFrame>
      <ReadOuts {...props} />
      {initialPressurePsia !== null && initialPressurePsia < curve.curve.dewPointPsia && (
        <p className="mt-2 text-12 text-ink-soft">
          Initial pressure {psia(initialPressurePsia)} psia lies below the dew point{" "}
          {psia(curve.curve.dewPointPsia)}: the figures count from the dew point.
        </p>
      )}
    </div>
  );
}

function Panels({
  curve,
  others,
  measured,
  initialPressurePsia,
  producedBefore,
  criticalBand,
  waterSaturation,
  abandonmentPressurePsia,
  abandonmentRange,
  onAbandon,
}: DepletionPanelsProps) {
  const [frame, width] = useWidth<HTMLDivElement>(640);
  const band = ofHydrocarbons(criticalBand, waterSaturation);
  const before = producedBefore ?? 0;
  const { points, dewPointPsia } = curve.curve;
  const x = roundScale([0, Math.max(dewPointPsia * 1.06, initialPressurePsia ?? 0)], { count: 6 });
  const liquid = roundScale(
    [
      ...[curve, ...others].flatMap((shown) =>
        // Room above the line for its highest figure.
        shown.curve.points.map((point) => point.liquidSaturation * 112),
      ),
      ...measured.map(({ liquidPercent }) => liquidPercent ?? 0),
      band.high * 1.15,
    ],
    { count: 4, least: 5 },
  );
  const yields = roundScale(
    [curve, ...others].flatMap((shown) =>
      shown.curve.points.map((point) => point.producingYieldStbPerMmscf),
    ),
    { count: 4 },
  );
  const states = fineStates(curve.curve);
  const state = stateAt(states, abandonmentPressurePsia);
  const dewX = positionOn(x, dewPointPsia);
  const most = mostLiquid(curve.curve);
  const draw = (of: AvailableCurve, y: Scale, read: (state: CurveState) => number) => {
    const line = of === curve ? states : fineStates(of.curve);
    return linePath([
      ...line.map((at) => [positionOn(x, at.pressurePsia), 100 - positionOn(y, read(at))] as const),
      [100, 100 - positionOn(y, read(line[line.length - 1]))],
    ]);
  };
  const look = (of: AvailableCurve, isMain: boolean) =>
    [isMain ? "line" : "line-soft line-thin", doubts[of.route] && "line-dashed"]
      .filter(Boolean)
      .join(" ");
  const saturation = (at: CurveState) => at.liquidSaturation * 100;
  const producing = (at: CurveState) => at.producingYieldStbPerMmscf;
  const bandTop = 100 - positionOn(liquid, band.high);
  const bandBottom = 100 - positionOn(liquid, band.low);
  const mostAt = {
    x: positionOn(x, most.pressurePsia),
    y: 100 - positionOn(liquid, most.liquidSaturation * 100),
  };
  const dewLabel = {
    x: dewX,
    y: 6,
    lines: [`Dew point ${psia(dewPointPsia)}`],
    side: "right",
  } as const;
  const mostLabel = {
    x: mostAt.x,
    y: Math.max(6, mostAt.y - 7),
    lines: [
      `Most liquid ${formatFigure(most.liquidSaturation * 100)} % at ${psia(most.pressurePsia)} psia`,
    ],
    side: "left",
  } as const;
  const [dewPlace, mostPlace] = layoutLabels([dewLabel, mostLabel], {
    width: width - LEFT,
    height: LIQUID_HEIGHT,
  });
  const dewRule = (
    <line className="line-soft line-thin line-dashed" x1={dewX} x2={dewX} y1="0" y2="100" />
  );

  return (
    <div className="panels-and-line" ref={frame}>
      <Plot
        label={`Liquid in the hydrocarbon pore space against pressure, largest ${formatFigure(most.liquidSaturation * 100)} % at ${psia(most.pressurePsia)} psia; dew point ${psia(dewPointPsia)} psia; critical saturation ${formatFigure(criticalBand.low, { digits: 2 })} to ${formatFigure(criticalBand.high, { digits: 2 })} % of all pore space.`}
        height={LIQUID_HEIGHT}
        left={LEFT}
        tone="rock"
        yTitle="Liquid, % of hydrocarbon pore space"
        yTicks={yTicksOf(liquid, 4, " %")}
        shapes={
          <>
            <rect className="area" x="0" width="100" y={bandTop} height={bandBottom - bandTop} />
            {others.map((other) => (
              <path
                key={other.route}
                className={look(other, false)}
                d={draw(other, liquid, saturation)}
              />
            ))}
            <path className={look(curve, true)} d={draw(curve, liquid, saturation)} />
            {dewRule}
          </>
        }
      >
        <PlotLabel x={45} y={bandBottom} dy={10} soft>
          Critical saturation, {formatFigure(criticalBand.low, { decimals: 0 })} to{" "}
          {formatFigure(criticalBand.high, { decimals: 0 })} % of all pore space
        </PlotLabel>
        <PlotLabel x={dewX} y={dewLabel.y} {...besides(dewPlace)} soft>
          {dewLabel.lines[0]}
        </PlotLabel>
        {measured.map(
          ({ pressurePsia, liquidPercent }) =>
            liquidPercent !== null && (
              <PlotDot
                key={pressurePsia}
                x={positionOn(x, pressurePsia)}
                y={100 - positionOn(liquid, liquidPercent)}
                shape="square"
              />
            ),
        )}
        {most.liquidSaturation > 0 && (
          <PlotLabel x={mostAt.x} y={mostLabel.y} {...besides(mostPlace)} toned>
            <b>Most liquid</b> {formatFigure(most.liquidSaturation * 100)} % at{" "}
            {psia(most.pressurePsia)} psia
          </PlotLabel>
        )}
      </Plot>
      <Plot
        label={`Produced condensate yield against pressure, ${formatFigure(points[0].producingYieldStbPerMmscf)} at the dew point, ${formatFigure(points[points.length - 1].producingYieldStbPerMmscf)} at ${psia(points[points.length - 1].pressurePsia)} psia.`}
        height={150}
        left={LEFT}
        tone="condensate"
        yTitle="Produced yield, STB/MMscf of surface gas"
        xTitle="Reservoir pressure, psia"
        yTicks={yTicksOf(yields, 4)}
        xTicks={ticksOf(x, 6)}
        shapes={
          <>
            {others.map((other) => (
              <path
                key={other.route}
                className={look(other, false)}
                d={draw(other, yields, producing)}
              />
            ))}
            <path className={look(curve, true)} d={draw(curve, yields, producing)} />
            {dewRule}
          </>
        }
      >
        <PlotLabel
          x={(dewX + 100) / 2}
          y={100 - positionOn(yields, points[0].producingYieldStbPerMmscf)}
          dy={13}
          toned
        >
          <b>{formatFigure(points[0].producingYieldStbPerMmscf)}</b>
        </PlotLabel>
        {abandonmentRange && (
          <i
            className="abandonment-span"
            aria-hidden="true"
            style={spanStyle(x, abandonmentRange)}
          />
        )}
      </Plot>
      <AbandonmentLine
        pressurePsia={abandonmentPressurePsia}
        scale={x}
        left={LEFT}
        lowest={Math.ceil(points[points.length - 1].pressurePsia)}
        highest={Math.floor(dewPointPsia)}
        describe={
          state
            ? `${formatFigure((before + (1 - before) * state.condensateProduced) * 100)} % of the condensate reaches the tank, liquid in the pores ${formatFigure(state.liquidSaturation * 100)} %`
            : ""
        }
        onChange={onAbandon}
      />
    </div>
  );
}

/** Between P90 and P10, whichever is the lower pressure. */
function spanStyle(x: Scale, { p90, p10 }: { p90: number; p10: number }) {
  const [from, to] = [positionOn(x, Math.min(p90, p10)), positionOn(x, Math.max(p90, p10))];
  return { left: percent(from), width: percent(to - from) };
}

/** What abandoning at the line brings. */
function ReadOuts({ curve, abandonmentPressurePsia, producedBefore }: DepletionPanelsProps) {
  const states = fineStates(curve.curve);
  const state = stateAt(states, abandonmentPressurePsia);
  const gain = gainPer100Psi(states, abandonmentPressurePsia);
  const before = producedBefore ?? 0;
  const inPlace = producedBefore === null ? "% of that at the dew point" : "% of in place";
  const figures = [
    {
      label: "Liquid in the hydrocarbon pores",
      value: state && state.liquidSaturation * 100,
      unit: "%",
    },
    {
      label: "Yield at that pressure",
      value: state && state.producingYieldStbPerMmscf,
      unit: "STB/MMscf",
    },
    {
      label: "Condensate to the tank",
      value: state && (before + (1 - before) * state.condensateProduced) * 100,
      unit: inPlace,
    },
    {
      label: "Left in the rock",
      value: state && (1 - before) * (1 - state.condensateProduced - state.condensateInGas) * 100,
      unit: "%",
    },
    {
      label: "Per 100 psi lower",
      value: gain && (1 - before) * gain * 100,
      unit: "points",
      signed: true,
    },
  ];
  return (
    <dl className="read-outs" aria-live="polite">
      {figures.map(({ label, value, unit, signed }) => (
        <div key={label}>
          <dt>{label}</dt>
          <dd>
            {value === null ? MISSING : <Figure value={value} signed={signed} />}{" "}
            <Unit>{unit}</Unit>
          </dd>
        </div>
      ))}
    </dl>
  );
}
