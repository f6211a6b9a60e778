"use client";

import Link from "next/link";
import type { VectorName } from "@/analytics/volumetrics/results-schema";
import type { Comparison } from "@/app/api/v1/comparisons/schema";
import { useBasis } from "@/components/basis/use-basis";
import { ChartFrame } from "@/components/charts/chart-frame";
import { Exceedance } from "@/components/charts/exceedance";
import {
  comparisonFinding,
  distinctLabels,
  inputsFinding,
  otherDifferences,
  shortLabels,
} from "@/components/compare/comparison-words";
import { ChangeExplanation } from "@/components/drivers/change-explanation";
import { resultLabels, resultOptions } from "@/components/drivers/driver-names";
import { CorrelationDifferences } from "@/components/estimate/difference-correlations";
import { DifferenceTable } from "@/components/estimate/difference-table";
import { inputDifferences } from "@/components/estimate/differences";
import { PlanDifferenceTable } from "@/components/estimate/plan-difference-table";
import { ResultChangeTable } from "@/components/estimate/result-change-table";
import {
  groupsOfRanges,
  resultFactor,
  resultUnit,
  scaled,
  type ResultBasis,
} from "@/components/estimate/result-rows";
import { Select } from "@/components/ui/choice";
import { Columns, Section, Stack } from "@/components/ui/section";

type Side = Comparison["left"];

const isVector = (option: {
  value: string;
  label: string;
}): option is { value: VectorName; label: string } => option.value !== "condensateLeftStb";

/** Results, curves, what explains the difference, and the inputs that differ. */
export function ComparisonBody({
  comparison,
  result,
  onResult,
}: {
  comparison: Comparison;
  result: VectorName;
  onResult: (result: VectorName) => void;
}) {
  const { basis, withBasis } = useBasis();
  const { left, right } = comparison;
  const shown: ResultBasis = {
    units: basis.units,
    base: basis.base,
    factor: 1,
    words: "Gross, unrisked",
  };
  const factor = resultFactor(result, shown);
  const unit = resultUnit(result, shown);
  const ranges = {
    left: scaled(left.quantities[result], factor),
    right: scaled(right.quantities[result], factor),
  };
  const name = resultLabels[result];
  const names = shortLabels(left.label, right.label);
  const fullNames = distinctLabels(left.label, right.label);
  const finding = comparisonFinding(
    { label: left.label, range: ranges.left },
    { label: right.label, range: ranges.right },
    unit,
  );
  const fileName = `compare-${slugOf(left.label)}-${slugOf(right.label)}`;

  return (
    <Stack>
      <Section
        title={finding}
        note={
          <>
            {name}. Upper figures and box: <SideLink side={left} withBasis={withBasis} />. Lower
            figures and line: <SideLink side={right} withBasis={withBasis} />. {shown.words}.
          </>
        }
      >
        <ResultChangeTable
          caption={`Results of ${left.label}, then of ${right.label}`}
          groups={groupsOfRanges(right.quantities, left.quantities, shown, null)}
        />
      </Section>
      <div>
        <div className="mb-4">
          <Select
            label="Result looked at"
            value={result}
            options={resultOptions.filter(isVector)}
            onChange={onResult}
            className="w-64"
          />
        </div>
        <Columns kind="equal">
          <ChartFrame
            title={`${name}, one curve over the other`}
            note={`Solid: ${right.label}. Dashed: ${left.label}.`}
            fileName={`${fileName}-${result}-exceedance`}
            data={curveData(left, right, result, factor, unit)}
          >
            <Exceedance
              name={`${name} of ${right.label}`}
              unit={unit}
              curve={curveOf(right, result, factor)}
              range={ranges.right}
              tone={result.endsWith("Scf") ? "gas" : "condensate"}
              scale={ranges.right.p10 / ranges.right.p90 > 10 ? "log" : "linear"}
              before={{
                label: names[0],
                range: ranges.left,
                curve: curveOf(left, result, factor),
              }}
            />
          </ChartFrame>
          {comparison.explanation ? (
            <ChangeExplanation
              explanation={comparison.explanation}
              from={fullNames[0]}
              to={fullNames[1]}
              name={name}
              factor={factor}
              unit={unit}
              fileName={`${fileName}-${result}`}
              storedTrials={Math.max(left.trials, right.trials)}
            />
          ) : (
            <Section title="What explains the difference">
              <p className="text-13 text-ink-soft">
                {comparison.whyNotExplained ?? "Nothing could be told apart."}
              </p>
            </Section>
          )}
        </Columns>
      </div>
      <InputSection left={left} right={right} />
    </Stack>
  );
}

function SideLink({ side, withBasis }: { side: Side; withBasis: (href: string) => string }) {
  return (
    <>
      <Link href={withBasis(side.href)}>{side.label}</Link> ({side.detail},{" "}
      {side.trials.toLocaleString("en-US")} trials)
    </>
  );
}

function InputSection({ left, right }: { left: Side; right: Side }) {
  if (!left.inputs || !right.inputs) return null;
  const differences = inputDifferences(right.inputs, left.inputs);
  const others = otherDifferences(left.inputs, right.inputs);
  return (
    <Section
      title={inputsFinding(differences)}
      note={`Upper figures and box: ${left.label}. Lower figures and line: ${right.label}. Each input on its own scale, in field units. ${others ?? ""}`}
    >
      <DifferenceTable
        caption={`Inputs of ${left.label}, then of ${right.label}`}
        differences={differences}
        warnings={[]}
      />
      <PlanDifferenceTable
        now={right.inputs.recoveryPlan}
        before={{ plan: left.inputs.recoveryPlan, label: left.label }}
      />
      <CorrelationDifferences
        now={{ pairs: right.inputs.correlations, label: right.label }}
        before={{ pairs: left.inputs.correlations, label: left.label }}
      />
    </Section>
  );
}

function curveOf({ quantities }: Side, result: VectorName, factor: number) {
  const { values, probabilities } = quantities[result].exceedance;
  return { values: values.map((value) => value * factor), probabilities };
}

function curveData(left: Side, right: Side, result: VectorName, factor: number, unit: string) {
  return {
    columns: [
      { label: "Side" },
      { label: resultLabels[result], unit },
      { label: "Chance of at least this much" },
    ],
    rows: [left, right].flatMap((side) => {
      const { values, probabilities } = curveOf(side, result, factor);
      return values.map((value, index) => [side.label, value, probabilities[index]]);
    }),
  };
}

const slugOf = (label: string) =>
  label
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "-")
    .replace(/^-|-$/g, "");
