/** How well the trials of a run know its percentiles, in words. */
import { digitsKnown } from "@/analytics/uncertainty/known-digits";
import type { QuantitySummary, SimulationSummary } from "@/analytics/volumetrics/results-schema";
import type { SamplingMethod } from "@/analytics/uncertainty/sampling-schema";
import { numberWords } from "@/components/portfolio/reporting";
import { formatPercent } from "@/components/ui/format";

/** Figures are shown with so many significant digits everywhere. */
export const SHOWN_DIGITS = 3;

export const samplingLabels: Record<SamplingMethod, string> = {
  latinHypercube: "Latin hypercube",
  sobol: "Scrambled Sobol points",
};

const levels = ["p90", "p50", "p10", "mean"] as const;
export type Level = (typeof levels)[number];

export const levelLabels: Record<Level, string> = {
  p90: "P90",
  p50: "P50",
  p10: "P10",
  mean: "Mean",
};

type Quantity = Pick<QuantitySummary, Level | "standardErrors">;

/** Digits of a percentile, as it is shown times a factor, that the trials do hold; at most those shown. */
export const digitsHeld = (quantity: Quantity, level: Level, factor: number): number =>
  Math.min(
    SHOWN_DIGITS,
    digitsKnown(quantity[level] * factor, quantity.standardErrors[level] * factor),
  );

/** Percentiles of which fewer digits hold than are shown. */
export const uncertainLevels = (quantity: Quantity, factor: number): Level[] =>
  levels.filter((level) => digitsHeld(quantity, level, factor) < SHOWN_DIGITS);

/** "10,000 trials hold all three digits of every percentile", or which they do not. */
export function precisionFinding(trials: number, quantity: Quantity, factor: number): string {
  const count = trials.toLocaleString("en-US");
  const open = uncertainLevels(quantity, factor);
  if (open.length === 0) return `${count} trials hold all three digits of every percentile`;
  const worst = open.reduce((a, b) => (share(quantity, b) > share(quantity, a) ? b : a));
  const held = digitsHeld(quantity, worst, factor);
  const error = formatPercent(1.96 * share(quantity, worst), { decimals: 1 });
  const digits =
    held === 0 ? "not even its first digit" : `${numberWords(held)} digit${held === 1 ? "" : "s"}`;
  return `${count} trials are too few for three digits: ${levelLabels[worst]} is known to ±${error}, ${digits}`;
}

const share = (quantity: Quantity, level: Level) =>
  quantity[level] === 0 ? 0 : quantity.standardErrors[level] / Math.abs(quantity[level]);

/** "Latin hypercube, 16 replicates of 625, seed 4711, engine 2.0.0" */
export function runWords({
  sampling,
  replicates,
  trials,
  seed,
  engineVersion,
}: Pick<
  SimulationSummary,
  "sampling" | "replicates" | "trials" | "seed" | "engineVersion"
>): string {
  const method = samplingLabels[sampling ?? "latinHypercube"];
  const each = replicates && trials % replicates === 0 ? trials / replicates : null;
  const parts = [
    replicates
      ? `${method} in ${replicates} independent replicates${each ? ` of ${each.toLocaleString("en-US")}` : ""}`
      : method,
    `seed ${seed}`,
    `engine ${engineVersion}`,
  ];
  return parts.join(", ");
}

/** Where the errors come from: replicates show what a method gains over plain random trials, older runs did not. */
export const errorWords = ({ replicates }: Pick<SimulationSummary, "replicates">): string =>
  replicates
    ? "Errors come from how the replicates differ, so they count what the sampling gains."
    : "Errors are those of plain random trials, which overstate the ones of this sampling; run it again for its own.";
