/** Which inputs can be tied to others, and what a change of their correlations comes to. */
import { inputNames, type InputName } from "@/analytics/volumetrics/inputs-schema";
import { lowerFirst } from "@/components/ui/format";
import { caseSetOf } from "./case-sets";
import { correlationOf, isWorkedOut, type Correlation, type EstimateText } from "./estimate-text";
import { inputCatalogue } from "./input-catalogue";

/** Why an input takes no rank correlation, as the end of a sentence that begins with its name. */
export type FixedInputs = Partial<Record<InputName, string>>;

/** Inputs whose correlations count for nothing or cannot be, with the reason. */
export function fixedInputs({ inputs, usesPlan, plan }: EstimateText): FixedInputs {
  const fixed: FixedInputs = {};
  for (const name of inputNames) {
    const set = caseSetOf(inputs[name]);
    if (usesPlan && plan && isWorkedOut(name)) fixed[name] = "is worked out by the recovery plan";
    else if (set !== null) fixed[name] = `takes its case from the set “${set}”`;
  }
  return fixed;
}

/** "Gas recovery and condensate recovery: worked out …": one sentence for each reason. */
export function fixedWords(fixed: FixedInputs): string[] {
  const byReason = new Map<string, InputName[]>();
  for (const name of inputNames) {
    const reason = fixed[name];
    if (reason !== undefined) byReason.set(reason, [...(byReason.get(reason) ?? []), name]);
  }
  return [...byReason].map(([reason, names]) => {
    const labels = names.map((name, index) =>
      index === 0 ? inputCatalogue[name].label : lowerFirst(inputCatalogue[name].label),
    );
    const list =
      labels.length === 1 ? labels[0] : `${labels.slice(0, -1).join(", ")} and ${labels.at(-1)}`;
    return `${list}: ${labels.length === 1 ? "it" : "each"} ${reason}.`;
  });
}

/** Correlations that an input of a shared set of cases still has, and cannot. */
export const refusedPairs = (text: EstimateText): Correlation[] =>
  text.correlations.filter(
    ({ a, b }) => caseSetOf(text.inputs[a]) !== null || caseSetOf(text.inputs[b]) !== null,
  );

/** Pairs that count: neither input is worked out by a plan or in a shared set. */
export function countedPairs(text: EstimateText): Correlation[] {
  const refused = refusedPairs(text);
  const isPlanned = (name: InputName) => text.usesPlan && text.plan !== null && isWorkedOut(name);
  return text.correlations.filter(
    (pair) => !refused.includes(pair) && !isPlanned(pair.a) && !isPlanned(pair.b),
  );
}

export interface CorrelationChange {
  a: InputName;
  b: InputName;
  before: number;
  after: number;
}

/** Changes smaller than what is shown are none. */
const SHOWN = 5e-4;

/** What differs between two sets of correlations, the largest change first. */
export function correlationChanges(
  before: readonly Correlation[],
  after: readonly Correlation[],
): CorrelationChange[] {
  const changes: CorrelationChange[] = [];
  inputNames.forEach((a, index) => {
    for (const b of inputNames.slice(index + 1)) {
      const change = {
        a,
        b,
        before: correlationOf(before, a, b),
        after: correlationOf(after, a, b),
      };
      if (Math.abs(change.after - change.before) >= SHOWN) changes.push(change);
    }
  });
  return changes.sort((x, y) => Math.abs(y.after - y.before) - Math.abs(x.after - x.before));
}

/** The nearest possible set beside the pairs that it says nothing about. */
export function withNearest(text: EstimateText, nearest: readonly Correlation[]): Correlation[] {
  const counted = countedPairs(text);
  return [
    ...text.correlations.filter((pair) => !counted.includes(pair)),
    ...nearest.filter(({ rank }) => rank !== 0),
  ];
}

/** "Area with net thickness" */
export const pairName = ({ a, b }: Pick<Correlation, "a" | "b">) =>
  `${inputCatalogue[a].label} with ${lowerFirst(inputCatalogue[b].label)}`;
