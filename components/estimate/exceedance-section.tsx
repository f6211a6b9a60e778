import type { ResultName, SimulationSummary } from "@/analytics/volumetrics/results-schema";
import { ChartFrame } from "@/components/charts/chart-frame";
import { Exceedance } from "@/components/charts/exceedance";
import { changeFinding, rangeFinding } from "./findings";
import { resultFactor, resultUnit, scaled, type ResultBasis } from "./result-rows";

export interface ExceedanceSectionProps {
  summary: SimulationSummary;
  /** such as "draft r5" */
  label: string;
  before: { label: string; summary: SimulationSummary } | null;
  basis: ResultBasis;
  result?: ResultName;
  name?: string;
  /** for the names of its files, such as "hollin-deep-upper-corrith-sand" */
  place: string;
}

/** Chance of at least each amount, against the approved revision, with the finding as heading. */
export function ExceedanceSection({
  summary,
  label,
  before,
  basis,
  result = "condensateRecoverableStb",
  name = "Condensate to the tank",
  place,
}: ExceedanceSectionProps) {
  const factor = resultFactor(result, basis);
  const unit = resultUnit(result, basis);
  const range = scaled(summary.results[result], factor);
  const curve = curveOf(summary, result, factor);
  const old = before && {
    label: before.label,
    range: scaled(before.summary.results[result], factor),
    curve: curveOf(before.summary, result, factor),
  };
  const probabilities = curve.probabilities;
  return (
    <ChartFrame
      title={old ? changeFinding(range, old.range, unit) : rangeFinding(range, unit)}
      note={old ? `${name}. Solid: ${label}. Dashed: ${old.label}.` : `${name}, ${label}.`}
      fileName={`${place}-${result}-exceedance`}
      data={{
        columns: [{ label: name, unit }, { label: "Chance of at least this much" }],
        rows: curve.values.map((value, index) => [value, probabilities[index]]),
      }}
    >
      <Exceedance
        name={name}
        unit={unit}
        curve={curve}
        range={range}
        tone={result.endsWith("Scf") ? "gas" : "condensate"}
        scale={range.p10 / range.p90 > 10 ? "log" : "linear"}
        before={old ?? undefined}
      />
    </ChartFrame>
  );
}

function curveOf(summary: SimulationSummary, result: ResultName, factor: number) {
  const { values, probabilities } = summary.results[result].exceedance;
  return { values: values.map((value) => value * factor), probabilities };
}
