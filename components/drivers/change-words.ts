/** How much each difference between two estimates explains, in words. */
import type {
  Change,
  ChangeExplanation,
  SingleChange,
} from "@/analytics/sensitivity/sensitivity-schema";
import { listWords } from "@/components/portfolio/reporting";
import { formatFigure, lowerFirst } from "@/components/ui/format";
import { inputLabel } from "./driver-names";

const singleLabel = (change: SingleChange): string => {
  switch (change.kind) {
    case "input":
      return inputLabel(change.input);
    case "correlations":
      return "Rank correlation";
    case "fluid":
      return "Separator test";
    case "recoveryPlan":
      return "Recovery plan";
    case "sampling":
      return "Sampling";
  }
};

/** "Net thickness", "Area and net thickness together" */
export function changeLabel(change: Change): string {
  if (change.kind !== "together") return singleLabel(change);
  const [first, ...others] = change.changes.map(singleLabel);
  return `${listWords([first, ...others.map(lowerFirst)])} together`;
}

/** "explains", or "explain" for differences that are several. */
const verbFor = (label: string, verb: string) =>
  / (together|others)$/.test(label) ? verb : `${verb}s`;

export interface ExplainedStep {
  label: string;
  effect: number;
  standardError: number | null;
}

/** Bars of a bridge beyond these are too narrow to read. */
const MOST_STEPS = 7;

/** An effect smaller than this share of the figure is what rounding leaves of none. */
const NO_EFFECT = 1e-9;

const hasEffect = ({ from, to }: ChangeExplanation, { effect }: { effect: number }) =>
  Math.abs(effect) > NO_EFFECT * Math.max(Math.abs(from), Math.abs(to));

/** Largest effect first, those without one left out; from the eighth on they are one step, which still adds up. */
export function explainedSteps(explanation: ChangeExplanation): ExplainedStep[] {
  const steps = explanation.changes
    .filter((change) => hasEffect(explanation, change))
    .sort((a, b) => Math.abs(b.effect) - Math.abs(a.effect))
    .map(({ change, ...rest }) => ({ label: changeLabel(change), ...rest }));
  if (steps.length <= MOST_STEPS) return steps;
  const rest = steps.slice(MOST_STEPS - 1);
  return [
    ...steps.slice(0, MOST_STEPS - 1),
    {
      label: `${rest.length} others`,
      effect: rest.reduce((sum, { effect }) => sum + effect, 0),
      standardError: rest.some(({ standardError }) => standardError === null)
        ? null
        : Math.hypot(...rest.map(({ standardError }) => standardError ?? 0)),
    },
  ];
}

/** A move smaller than this share of where it began is no move. */
const NO_MOVE = 0.005;

/** "Net thickness explains 6.2 of the 7.1 MMSTB by which P50 rises" */
export function changeExplained(
  explanation: ChangeExplanation,
  factor: number,
  unit: string,
): string {
  const [first, ...others] = explainedSteps(explanation);
  const move = explanation.to - explanation.from;
  const figure = (value: number) => formatFigure(Math.abs(value) * factor);
  if (!first) {
    return explanation.changes.length === 0
      ? "Nothing differs, so P50 stands"
      : "P50 stands: no difference moves it";
  }
  if (Math.abs(move) < NO_MOVE * Math.abs(explanation.from)) {
    return Math.abs(first.effect) < NO_MOVE * Math.abs(explanation.from)
      ? `P50 stands: no difference moves it`
      : `P50 stands: ${lowerFirst(first.label)} ${verbFor(first.label, "move")} it by ${figure(first.effect)} ${unit}, and the rest takes it back`;
  }
  const verb = move > 0 ? "rises" : "falls";
  const sameWay = first.effect * move > 0;
  if (others.length === 0) {
    return `${first.label} ${verbFor(first.label, "explain")} all of the ${figure(move)} ${unit} by which P50 ${verb}`;
  }
  if (sameWay && Math.abs(first.effect) <= Math.abs(move)) {
    return `${first.label} ${verbFor(first.label, "explain")} ${figure(first.effect)} of the ${figure(move)} ${unit} by which P50 ${verb}`;
  }
  const way = verbFor(first.label, first.effect > 0 ? "raise" : "lower");
  return sameWay
    ? `${first.label} ${way} P50 by ${figure(first.effect)} ${unit}; the other differences take back ${figure(first.effect - move)}`
    : `${first.label} ${way} P50 by ${figure(first.effect)} ${unit}, and yet it ${verb} by ${figure(move)}`;
}

/** How effects were told apart when differences act through each other. */
export function methodWords({ orders, trials }: ChangeExplanation): string {
  const how =
    orders === "all"
      ? "Each effect is averaged over all orders in which the differences could be made"
      : `Each effect is averaged over ${orders} orders of making the differences, drawn at random; its standard error is in the table`;
  return `${how}, on the same ${trials.toLocaleString("en-US")} draws, so they add up to the whole move.`;
}

/** What a reader may ask besides: which differences do nothing, what "Sampling" is, and why P50 is not the stored one. */
export function remarksOn(explanation: ChangeExplanation, storedTrials: number): string {
  const idle = explanation.changes
    .filter((change) => !hasEffect(explanation, change))
    .map(({ change }) => changeLabel(change));
  const isSampled = explanation.changes.some(
    ({ change }) =>
      change.kind === "sampling" ||
      (change.kind === "together" && change.changes.some(({ kind }) => kind === "sampling")),
  );
  const sentences = [
    idle.length > 0 && `No effect on it: ${listWords(idle.map(lowerFirst))}.`,
    isSampled &&
      "Sampling is another seed, method or number of trials: what it moves is sampling error.",
    explanation.trials < storedTrials &&
      `The runs have up to ${storedTrials.toLocaleString("en-US")} trials; with fewer, both ends stand a little off the stored P50.`,
  ].filter((sentence) => sentence !== false);
  return sentences.map((sentence) => ` ${sentence}`).join("");
}
