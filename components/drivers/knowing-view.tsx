import { ChartFrame } from "@/components/charts/chart-frame";
import { InputBars } from "@/components/charts/input-bars";
import { formatPercent } from "@/components/ui/format";
import { byWorth, knowingFinding, possibleShare, samplingWords } from "./driver-findings";
import { inputLabel } from "./driver-names";
import type { DriverViewProps } from "./regression-view";

/** What it is worth to know each input: how much narrower the range would be, on average over what it may turn out. */
export function KnowingView({ sensitivity, name, tone, fileName }: DriverViewProps) {
  const rows = byWorth(sensitivity.knowing);
  const sampling = samplingWords(
    rows.flatMap(({ remainingWidth, varianceRemoved }) => [
      { alone: 1 - remainingWidth },
      { alone: varianceRemoved },
    ]),
  );
  return (
    <ChartFrame
      level={3}
      title={knowingFinding(rows)}
      note={`${name}. How much narrower P90 to P10 would be if one input were measured exactly, averaged over what it may turn out to be. A correlated input also tells of the ones it moves with, so these do not add up.${sampling ? ` ${sampling}` : ""}`}
      fileName={`${fileName}-worth-knowing`}
      data={{
        columns: [
          { label: "Input" },
          { label: "Width that goes" },
          { label: "Variance that goes" },
        ],
        rows: rows.map(({ input, remainingWidth, varianceRemoved }) => [
          inputLabel(input),
          1 - remainingWidth,
          varianceRemoved,
        ]),
      }}
    >
      <InputBars
        label={`Value of knowing each input of ${name}`}
        figureHeadings={["Width", "Variance"]}
        scale={{ kind: "linear", domain: [0, 1] }}
        tone={tone}
        format={(value) => formatPercent(value)}
        rows={rows.map(({ input, remainingWidth, varianceRemoved }) => ({
          name: inputLabel(input),
          bar: { value: possibleShare(1 - remainingWidth) },
          figures: [
            formatPercent(possibleShare(1 - remainingWidth)),
            formatPercent(possibleShare(varianceRemoved)),
          ],
        }))}
      />
    </ChartFrame>
  );
}
