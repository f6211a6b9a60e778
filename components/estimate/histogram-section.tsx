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
  const mode = bins.reduce((best, bin) => (bin.share > best.share ? bin : best));
  const mean = summary.results[result].mean * factor;
  const middle = (mode.low + mode.high) / 2;
  const title =
    mean > mode.high
      ? `Trials lie thickest near ${formatFigure(middle)}; the long high side lifts the mean to ${formatFigure(mean)}`
      : `Trials lie thickest near ${formatFigure(middle)}, where the mean of ${formatFigure(mean)} is too`;
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
