import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import { ChartFrame } from "@/components/charts/chart-frame";
import { InputBars } from "@/components/charts/input-bars";
import { formatPercent } from "@/components/ui/format";
import {
  byTotal,
  jointWords,
  possibleShare,
  samplingWords,
  varianceFinding,
} from "./driver-findings";
import { factorLabel, togetherWords } from "./driver-names";
import type { DriverViewProps } from "./regression-view";

/** "54 % ± 2", "1.2 % ± 0.3": a share with its 95 % half-width, to the digits that it has. */
function shareText({ value, standardError }: { value: number; standardError: number }): string {
  const half = 196 * standardError;
  if (value < 0.0005 && half < 0.05) return "0 %";
  const decimals = half < 0.95 ? 1 : 0;
  const error = half > 0 && half < 0.05 ? "<0.1" : half.toFixed(decimals);
  return `${formatPercent(possibleShare(value), { decimals })} ± ${error}`;
}

/** Shares of the variance: what goes when a factor alone is known, and what stays when all others are. */
export function VarianceView({
  sensitivity,
  inputs,
  name,
  tone,
  fileName,
}: DriverViewProps & { inputs: EstimateInputs }) {
  const { varianceShares } = sensitivity;
  const factors = byTotal(varianceShares.factors);
  const words = [
    jointWords(varianceShares),
    samplingWords(factors.map(({ first, total }) => ({ alone: first.value, inAll: total.value }))),
    togetherWords(factors, inputs),
  ].filter(Boolean);
  return (
    <ChartFrame
      level={3}
      title={varianceFinding(varianceShares)}
      note={`${name}. Full bar: share that goes when the input alone is known (first order). Pale bar: share it has a hand in (total). Lines and ±: 95 % of the sampling, from ${varianceShares.evaluations.toLocaleString("en-US")} runs of the model. ${words.join(" ")}`}
      fileName={`${fileName}-variance-shares`}
      data={{
        columns: [
          { label: "Factor" },
          { label: "First order" },
          { label: "Standard error of first order" },
          { label: "Total" },
          { label: "Standard error of total" },
        ],
        rows: factors.map(({ inputs: members, first, total }) => [
          factorLabel(members),
          first.value,
          first.standardError,
          total.value,
          total.standardError,
        ]),
      }}
    >
      <InputBars
        label={`Shares of the variance of ${name}`}
        nameHeading="Factor"
        figureHeadings={["Alone", "In all"]}
        scale={{ kind: "linear", domain: [0, 1] }}
        tone={tone}
        format={(value) => formatPercent(value)}
        rows={factors.map(({ inputs: members, first, total }) => ({
          name: factorLabel(members),
          bar: first,
          wider: total,
          figures: [shareText(first), shareText(total)],
        }))}
      />
    </ChartFrame>
  );
}
