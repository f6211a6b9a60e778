import type { Sensitivity } from "@/analytics/sensitivity/sensitivity-schema";
import { ChartFrame } from "@/components/charts/chart-frame";
import { InputBars } from "@/components/charts/input-bars";
import type { Tone } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import { caseSetWords } from "@/components/estimate/findings";
import { formatFigure } from "@/components/ui/format";
import { byStrength, regressionFinding, rSquaredWords } from "./driver-findings";
import { inputLabel } from "./driver-names";

export interface DriverViewProps {
  sensitivity: Sensitivity;
  /** "Condensate to the tank" */
  name: string;
  tone: Tone;
  /** without extension, such as "hollin-deep-upper-corrith-sand-condensateRecoverableStb" */
  fileName: string;
}

const coefficientText = (value: number) => formatFigure(value, { decimals: 2 });

/** " Net thickness is left out: … What it does is in the coefficients shown." */
const leftOutWords = (inputs: Sensitivity["rankRegression"]["leftOut"]) =>
  inputs
    .map(
      ({ input, reason }) =>
        ` ${inputLabel(input)} is left out: ${reason} What it does is in the coefficients shown.`,
    )
    .join("");

/** By how many standard deviations of rank the result moves with each input, the others held. */
export function RegressionView({
  sensitivity,
  name,
  tone,
  fileName,
  inputs,
}: DriverViewProps & { inputs: EstimateInputs }) {
  const { rankRegression, trials } = sensitivity;
  const rows = byStrength(rankRegression.coefficients);
  const sets = caseSetWords(inputs);
  return (
    <ChartFrame
      level={3}
      title={regressionFinding(rankRegression)}
      note={`${name}. Standard deviations of rank that the result moves when the input moves by one and the others stand, over ${trials.toLocaleString("en-US")} trials. ${rSquaredWords(rankRegression)}${leftOutWords(rankRegression.leftOut)}${sets ? ` ${sets}` : ""}`}
      fileName={`${fileName}-rank-regression`}
      data={{
        columns: [{ label: "Input" }, { label: "Coefficient" }],
        rows: rows.map(({ input, coefficient }) => [inputLabel(input), coefficient]),
      }}
    >
      <InputBars
        label={`Rank regression of ${name}`}
        figureHeadings={["Coefficient"]}
        scale={scaleFor([...rows.map(({ coefficient }) => coefficient), 0.1, -0.1], {
          kind: "linear",
        })}
        tone={tone}
        format={(value) => formatFigure(value, { digits: 1 })}
        rows={rows.map(({ input, coefficient }) => ({
          name: inputLabel(input),
          bar: { value: coefficient },
          figures: [coefficientText(coefficient)],
        }))}
      />
    </ChartFrame>
  );
}
