/** What drives a result, in sentences with the figures in them. Nothing here is said that was not computed. */
import type { Sensitivity } from "@/analytics/sensitivity/sensitivity-schema";
import { driverCatalogue } from "@/components/estimate/input-catalogue";
import { formatFigure, formatPercent, lowerFirst } from "@/components/ui/format";
import { factorLabel, inputLabel } from "./driver-names";

type Regression = Sensitivity["rankRegression"];
type Shares = Sensitivity["varianceShares"];
type Knowing = Sensitivity["knowing"][number];
type Conditional = Sensitivity["conditional"];

/** A coefficient or a share below this is nothing that a person acts on. */
const SLIGHT = 0.02;

/** "Net thickness moves the result most: 0.71 of a standard deviation of rank for each of its own" */
export function regressionFinding({ coefficients }: Regression): string {
  const [first] = byStrength(coefficients);
  if (!first || Math.abs(first.coefficient) < SLIGHT)
    return "No input moves the ranks of the result";
  const way = first.coefficient < 0 ? " downwards" : "";
  return `${inputLabel(first.input)} moves the ranks most${way}: ${formatFigure(first.coefficient, { digits: 2 })} for each of its own`;
}

export const byStrength = (coefficients: Regression["coefficients"]) =>
  [...coefficients].sort((a, b) => Math.abs(b.coefficient) - Math.abs(a.coefficient));

/** How far the straight picture of ranks can be trusted. */
export function rSquaredWords({ rSquared }: Regression): string {
  const share = formatPercent(rSquared);
  if (rSquared >= 0.9) {
    return `Together they explain ${share} of the ranks (R² ${rSquared.toFixed(2)}): the picture holds.`;
  }
  if (rSquared >= 0.7) {
    return `Together they explain ${share} of the ranks (R² ${rSquared.toFixed(2)}): good for the order of the inputs, rough for the figures.`;
  }
  return `Together they explain only ${share} of the ranks (R² ${rSquared.toFixed(2)}): inputs act through each other or turn around, so trust the shares of variance instead.`;
}

/** "Net thickness alone makes 54 % of the variance, and 61 % with what it does together with others" */
export function varianceFinding({ factors }: Shares): string {
  const [first] = byTotal(factors);
  if (!first || first.total.value < SLIGHT) return "Nothing spreads: every input is a constant";
  const name = factorLabel(first.inputs);
  const alone = formatPercent(possibleShare(first.first.value));
  const joint = first.total.value - first.first.value;
  const noise = 2 * Math.hypot(first.first.standardError, first.total.standardError);
  const verb = first.inputs.length > 1 ? "make" : "makes";
  return joint > Math.max(SLIGHT, noise)
    ? `${name} ${verb} ${alone} of the variance alone, ${formatPercent(possibleShare(first.total.value))} with what ${first.inputs.length > 1 ? "they do" : "it does"} through others`
    : `${name} ${verb} ${alone} of the variance, next to nothing of it through others`;
}

export const byTotal = (factors: Shares["factors"]) =>
  [...factors].sort((a, b) => b.total.value - a.total.value);

/** A share as a screen shows it; sampling can put an estimate of one below nothing or above everything. */
export const possibleShare = (share: number) => Math.min(1, Math.max(0, share));

/** Less than this goes with rounding on a screen. */
const UNSEEN = 0.0005;

/** That shares are shown otherwise than estimated, or contradict each other; `null` when neither. */
export function samplingWords(
  estimates: readonly { alone: number; inAll?: number }[],
): string | null {
  const isBeyond = (share: number) => Math.abs(share - possibleShare(share)) > UNSEEN;
  const sentences = [
    estimates.some(({ alone, inAll = alone }) => isBeyond(alone) || isBeyond(inAll)) &&
      "Sampling put an estimate outside 0 to 100 %: it stands at that end here, and as it came in the table.",
    estimates.some(
      ({ alone, inAll = alone }) => possibleShare(alone) - possibleShare(inAll) > UNSEEN,
    ) && "Where a share alone is above the share in all, that is sampling error.",
  ].filter((sentence) => sentence !== false);
  return sentences.length === 0 ? null : sentences.join(" ");
}

/** What the shares leave over: the part of the variance that only inputs acting together explain. */
export function jointWords({ factors }: Shares): string {
  const alone = factors.reduce((sum, { first }) => sum + first.value, 0);
  const error = Math.hypot(...factors.map(({ first }) => first.standardError));
  const joint = 1 - alone;
  return joint > 2 * error && joint > SLIGHT
    ? `The shares alone add up to ${formatPercent(alone)}; the other ${formatPercent(joint)} is inputs multiplying each other.`
    : "The shares alone add up to the whole within their errors: the inputs act one by one.";
}

/** "If net thickness were known, the P90–P10 width would shrink by 31 % on average" */
export function knowingFinding(knowing: readonly Knowing[]): string {
  const [first] = byWorth(knowing);
  if (!first || 1 - first.remainingWidth < SLIGHT) {
    return "Knowing any one input would narrow the range by next to nothing";
  }
  const name = lowerFirst(inputLabel(first.input));
  return `If ${name} were known, the P90–P10 width would shrink by ${formatPercent(1 - first.remainingWidth)} on average`;
}

export const byWorth = (knowing: readonly Knowing[]) =>
  [...knowing].sort((a, b) => a.remainingWidth - b.remainingWidth);

/** How the chosen trials are called: "Trials above P10", "Trials from P60 to P20". */
export function chosenWords({ from, to }: { from: number; to: number }): string {
  const level = (chance: number) => `P${Math.round((1 - chance) * 100)}`;
  if (to >= 1 && from <= 0) return "All trials";
  if (to >= 1) return `Trials above ${level(from)}`;
  if (from <= 0) return `Trials below ${level(to)}`;
  return `Trials from ${level(from)} to ${level(to)}`;
}

export const byMove = (inputs: Conditional["inputs"]) =>
  [...inputs].sort((a, b) => Math.abs(b.meanRank - 0.5) - Math.abs(a.meanRank - 0.5));

/** Mean ranks of n trials scatter around one half by 0.29 / sqrt(n) when the input does not matter. */
const rankNoise = (trials: number) => 2 / Math.sqrt(12 * trials);

/** "Trials above P10 share a high net thickness: 142 ft at P50, against 98 ft in all trials" */
export function conditionalFinding(view: Conditional): string {
  const words = chosenWords(view);
  const [first] = byMove(view.inputs);
  if (!first || Math.abs(first.meanRank - 0.5) < Math.max(SLIGHT, rankNoise(view.trials))) {
    return `${words} share nothing: every input spreads as it does in all trials`;
  }
  const unit = driverCatalogue[first.input].unit;
  const figure = (value: number) => `${formatFigure(value)}${unit ? ` ${unit}` : ""}`;
  const size = first.meanRank > 0.5 ? "high" : "low";
  return `${words} share a ${size} ${lowerFirst(inputLabel(first.input))}: ${figure(first.chosen.p50)} at P50, against ${figure(first.all.p50)} in all trials`;
}
