import type { DepletionTable } from "@/analytics/depletion/depletion-table-schema";
import { ChartFrame, type ChartCell } from "@/components/charts/chart-frame";
import { Plot, PlotLabel } from "@/components/charts/plot";
import { linePath, positionOn, scaleFor, ticksOf } from "@/components/charts/scale";
import { formatFigure } from "@/components/ui/format";
import { ComponentSymbol } from "./component-label";
import { toneOfComponent } from "./component-names";
import { gasGroups, producedGasOf } from "./lump-gas";
import { roundScale, spread, yTicksOf } from "./plot-scale";
import { psia } from "./words";

export interface GasCompositionChartProps {
  table: DepletionTable;
  source: "laboratory" | "tuned" | "untuned";
  fileName: string;
}

const sourceWords = {
  laboratory: "As the laboratory reported it",
  tuned: "Simulated by the tuned equation of state",
  untuned: "Simulated by the untuned equation of state: an indication",
};

/** The produced gas step by step: how the heavy end stays behind. Needs two steps with an analysis. */
export function GasCompositionChart({ table, source, fileName }: GasCompositionChartProps) {
  const steps = producedGasOf(table);
  if (steps.length < 2) return null;
  const present = gasGroups.filter((group) => steps.every(({ groups }) => groups[group] > 0));
  const heavy = steps.map(({ groups }) => groups["C7+"]);
  const leanest = Math.min(...heavy);
  const leanestAt = steps[heavy.indexOf(leanest)].pressurePsia;
  return (
    <ChartFrame
      title={`Heptanes plus in the produced gas: ${formatFigure(heavy[0])} mol % at first, ${formatFigure(leanest)} at ${psia(leanestAt)} psia`}
      note={`${sourceWords[source]}; butanes and pentanes taken together. Log scale.`}
      fileName={fileName}
      data={{
        columns: [
          { label: "Pressure", unit: "psia" },
          ...gasGroups.map((group) => ({ label: group, unit: "mol %" })),
        ],
        rows: steps.map(({ pressurePsia, groups }): ChartCell[] => [
          pressurePsia,
          ...gasGroups.map((group) => groups[group]),
        ]),
      }}
    >
      <Lines steps={steps} present={present} isUntuned={source === "untuned"} />
    </ChartFrame>
  );
}

function Lines({
  steps,
  present,
  isUntuned,
}: {
  steps: ReturnType<typeof producedGasOf>;
  present: readonly (typeof gasGroups)[number][];
  isUntuned: boolean;
}) {
  // Room at the right, above the first pressure, for the names of the lines.
  const x = roundScale([0, steps[0].pressurePsia * 1.12], { count: 6 });
  const y = scaleFor(
    steps.flatMap(({ groups }) => present.map((group) => groups[group])),
    { kind: "log" },
  );
  const at = (pressure: number, share: number): [number, number] => [
    positionOn(x, pressure),
    100 - positionOn(y, share),
  ];
  const names = spread(
    present.map((group) => at(0, steps[0].groups[group])[1]),
    5.4,
  );
  return (
    <Plot
      label={`Produced gas against pressure: ${present.map((group) => `${group} from ${formatFigure(steps[0].groups[group])} to ${formatFigure(steps[steps.length - 1].groups[group])} mol %`).join(", ")}.`}
      height={300}
      left={46}
      yTitle="Produced gas, mol %"
      xTitle="Reservoir pressure, psia"
      yTicks={yTicksOf(y, 5)}
      xTicks={ticksOf(x, 6)}
      shapes={present.map((group) => (
        <g key={group} data-tone={toneOf(group)}>
          <path
            className={`line${group === "C7+" ? "" : " line-thin"}${isUntuned ? " line-dashed" : ""}`}
            d={linePath(steps.map(({ pressurePsia, groups }) => at(pressurePsia, groups[group])))}
          />
        </g>
      ))}
    >
      {present.map((group, index) => (
        <span key={group} data-tone={toneOf(group)}>
          <PlotLabel
            x={positionOn(x, steps[0].pressurePsia)}
            y={names[index]}
            anchor="start"
            dx={8}
            toned
          >
            <b>
              <ComponentSymbol symbol={group} />
            </b>
          </PlotLabel>
        </span>
      ))}
    </Plot>
  );
}

const toneOf = (group: string) => {
  const tone = toneOfComponent(group);
  return tone === "inert" ? "soft" : tone;
};
