import type { ChangeExplanation as Explanation } from "@/analytics/sensitivity/sensitivity-schema";
import { Bridge } from "@/components/charts/bridge";
import { ChartFrame } from "@/components/charts/chart-frame";
import {
  changeExplained,
  changeLabel,
  explainedSteps,
  methodWords,
  remarksOn,
} from "./change-words";

/** What explains the change of P50 from one estimate to another: bars that add up from one to the other. */
export function ChangeExplanation({
  explanation,
  from,
  to,
  name,
  factor,
  unit,
  fileName,
  storedTrials,
}: {
  explanation: Explanation;
  /** what the two are called: "r4", "r5" */
  from: string;
  to: string;
  /** "Condensate to the tank" */
  name: string;
  factor: number;
  unit: string;
  fileName: string;
  /** trials that the two were run with, the more of them */
  storedTrials: number;
}) {
  return (
    <ChartFrame
      title={changeExplained(explanation, factor, unit)}
      note={`What explains the change in P50 of ${name.toLowerCase()}. ${methodWords(explanation)}${remarksOn(explanation, storedTrials)}`}
      fileName={`${fileName}-change-of-p50`}
      data={{
        columns: [
          { label: "Difference" },
          { label: "Effect on P50", unit },
          { label: "Standard error", unit },
        ],
        rows: [
          [from, explanation.from * factor, null],
          ...explanation.changes.map(({ change, effect, standardError }) => [
            changeLabel(change),
            effect * factor,
            standardError === null ? null : standardError * factor,
          ]),
          [to, explanation.to * factor, null],
        ],
      }}
    >
      <Bridge
        horizontal
        quantity={`P50 of ${name.toLowerCase()}, ${unit}`}
        from={{ label: from, value: explanation.from * factor }}
        steps={explainedSteps(explanation).map(({ label, effect }) => ({
          label,
          change: effect * factor,
        }))}
        to={{ label: to, value: explanation.to * factor }}
      />
    </ChartFrame>
  );
}
