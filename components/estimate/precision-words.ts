/** How well the trials of a run know its percentiles, in words. */
import { digitsKnown } from "@/analytics/uncertainty/digits-known";
import { halfWidth95, replicatesOf } from "@/analytics/uncertainty/replicates";
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

/** That a run may have. */
const MOST_TRIALS = 1_048_576;

type Quantity = Pick<QuantitySummary, Level | "standardErrors">;

/** What the trials know of a percentile as it is shown, times a factor. */
export function knownOf(quantity: Quantity, level: Level, factor: number, trials: number) {
  const error = quantity.standardErrors[level] * factor;
  return digitsKnown(quantity[level] * factor, error, trials, SHOWN_DIGITS);
}

/** "10,000 trials hold all three digits of every percentile", or which of them they hold least. */
export function precisionFinding(trials: number, quantity: Quantity, factor: number): string {
  const count = trials.toLocaleString("en-US");
  const [worst] = levels
    .filter((level) => !knownOf(quantity, level, factor, trials).enough)
    .sort((a, b) => share(quantity, b) - share(quantity, a));
  if (!worst) return `${count} trials hold all three digits of every percentile`;
  const halfWidth = halfWidth95(replicatesOf(trials)) * share(quantity, worst);
  const error = formatPercent(halfWidth, { decimals: 1 });
  const { digits } = knownOf(quantity, worst, factor, trials);
  const held =
    digits === 0
      ? "not even its first digit holds"
      : `${numberWords(digits)} ${digits === 1 ? "digit holds" : "digits hold"}`;
  return `${count} trials are too few for three digits: ${levelLabels[worst]} is known to ±${error}, ${held}`;
}

/**
 * Trials at which every percentile would have its three digits, as sampling error falls, and which of them asks for the
 * most; `null` when they have. Sobol points come in powers of two.
 */
export function enoughTrials(
  { trials, sampling }: Pick<SimulationSummary, "trials" | "sampling">,
  quantity: Quantity,
  factor: number,
): string | null {
  const [most] = levels
    .map((level) => ({ level, needed: knownOf(quantity, level, factor, trials).trialsNeeded ?? 0 }))
    .sort((a, b) => b.needed - a.needed);
  if (most.needed === 0) return null;
  const possible =
    sampling === "sobol"
      ? 2 ** Math.ceil(Math.log2(most.needed))
      : Number(most.needed.toPrecision(2));
  const count = possible.toLocaleString("en-US");
  const name = levelLabels[most.level];
  return most.needed > MOST_TRIALS
    ? `Three digits of ${name === "Mean" ? "the mean" : name} would take about ${count} trials, more than a run may have: read two.`
    : `About ${count} trials would be enough: ${name === "Mean" ? "the mean" : name} asks for the most.`;
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
