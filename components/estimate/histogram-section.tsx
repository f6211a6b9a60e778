import type {
  QuantitySummary,
  ResultName,
  SimulationSummary,
} from "@/analytics/volumetrics/results-schema";
import { ChartFrame } from "@/components/charts/chart-frame";
import { Histogram, type HistogramBin } from "@/components/charts/histogram";
import { formatFigure } from "@/components/ui/format";
import { resultFactor, resultUnit, type ResultBasis } from "./result-rows";

/** The histogram of a summary as shares of its trials, in the units of the basis. */
export function binsOf(
  { histogram: { low, high, counts } }: Pick<QuantitySummary, "histogram">,
  factor: number,
): HistogramBin[] {
  const total = counts.reduce((sum, count) => sum + count, 0);
  const step = (high - low) / counts.length;
  return counts.map((count, index) => ({
    low: (low + index * step) * factor,
    high: (low + (index + 1) * step) * factor,
    share: total === 0 ? 0 : count / total,
  }));
}

/**
 * "Trials lie thickest near 3.77; the long high side lifts the mean to 5.20". The place is the mode of the summary, as the
 * table has it; summaries of before modes were kept have the middle of their fullest bar.
 */
export function thickestFinding(
  { mode, mean }: Pick<QuantitySummary, "mode" | "mean">,
  bins: readonly HistogramBin[],
  factor: number,
): string {
  const fullest = bins.reduce((best, bin) => (bin.share > best.share ? bin : best));
  const thickest = mode === undefined ? (fullest.low + fullest.high) / 2 : mode * factor;
  const apart = mean * factor - thickest;
  const start = `Trials lie thickest near ${formatFigure(thickest)}`;
  const figure = formatFigure(mean * factor);
  if (Math.abs(apart) <= (fullest.high - fullest.low) / 2) {
    return `${start}, where the mean of ${figure} is too`;
  }
  return apart > 0
    ? `${start}; the long high side lifts the mean to ${figure}`
    : `${start}; the long low side draws the mean down to ${figure}`;
}

/** Where the trials lie thickest against where their mean is, which is what skew does to a reader. */
export function HistogramSection({
  summary,
  basis,
  result,
  name,
  place,
}: {
  summary: SimulationSummary;
  basis: ResultBasis;
  result: ResultName;
  name: string;
  /** for the names of its files */
  place: string;
}) {
  const factor = resultFactor(result, basis);
  const unit = resultUnit(result, basis);
  const bins = binsOf(summary.results[result], factor);
  const title = thickestFinding(summary.results[result], bins, factor);
  return (
    <ChartFrame
      title={title}
      note={`${name}, ${unit}, ${summary.trials.toLocaleString("en-US")} trials in ${bins.length} equal steps.`}
      fileName={`${place}-${result}-histogram`}
      data={{
        columns: [{ label: "From", unit }, { label: "To", unit }, { label: "Share of trials" }],
        rows: bins.map(({ low, high, share }) => [low, high, share]),
      }}
    >
      <Histogram
        label={`Histogram of ${name}: ${title}`}
        bins={bins}
        unit={unit}
        tone={result.endsWith("Scf") ? "gas" : "condensate"}
      />
    </ChartFrame>
  );
}
