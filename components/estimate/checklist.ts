import { isUnmeasured, recoveryRouteLabels } from "@/analytics/recovery/recovery-curve-schema";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import type { Warning } from "@/analytics/warnings";
import type { EstimateReading } from "./estimate-reading";
import { inputText, type EstimateText } from "./estimate-text";
import { driverCatalogue, listedInputs } from "./input-catalogue";
import { conceptLabels } from "./plan-words";

export interface ChecklistItem {
  /** done; to be explained; to be done before it can be submitted */
  tone: "done" | "warning" | "open";
  text: string;
}

const numbers = [
  "no",
  "one",
  "two",
  "three",
  "four",
  "five",
  "six",
  "seven",
  "eight",
  "nine",
  "ten",
  "eleven",
  "twelve",
];
/** "three" for 3; figures above twelve. */
export const inWords = (count: number) => numbers[count] ?? String(count);
export const capital = (text: string) => text[0].toUpperCase() + text.slice(1);
const labels = (names: readonly DriverName[]) =>
  names.map((name) => driverCatalogue[name].label.toLowerCase()).join(", ");

/** Why there are no results of what stands in the fields: "One input is impossible: porosity. …". */
export function waitingWords({ impossible, incomplete, plan, problem }: EstimateReading): string {
  if (impossible.length > 0) {
    const verb = impossible.length === 1 ? "input is" : "inputs are";
    return `${capital(inWords(impossible.length))} ${verb} impossible: ${labels(impossible)}. Results appear when that is put right.`;
  }
  if (incomplete.length > 0) return "Results appear when every input is filled in.";
  if (plan && plan.open.length > 0) {
    return "Results appear when every figure of the recovery plan is filled in and possible.";
  }
  return problem === null
    ? "Results appear when a fluid sample is entered."
    : `${problem} Results appear when that is put right.`;
}

/**
 * Warnings of a run with few trials, made while somebody types. That the trials are few is its nature, no question for a
 * reviewer: submitting runs them all.
 */
export function previewWarnings(warnings: readonly Warning[]): Warning[] {
  return warnings.filter(({ code }) => code !== "few_trials");
}

/** What stands between a draft and a reviewer, worked out from what is in the fields. */
export function submitChecklist(draft: {
  text: EstimateText;
  reading: EstimateReading;
  warnings: readonly Warning[];
  /** name of the attached fluid sample; `null` when the sheet was typed by hand */
  sampleName: string | null;
  /** the sample was changed since its sheet was taken */
  isSampleNewer?: boolean;
  /** trials of the run that belongs to these inputs; `null` when there is none */
  trials: number | null;
}): ChecklistItem[] {
  return [
    inputsItem(draft.reading),
    fluidItem(draft.text, draft.sampleName, draft.isSampleNewer ?? false),
    ...planItems(draft.text),
    sourcesItem(draft.text, draft.reading),
    ...(draft.reading.estimate ? [warningsItem(draft.warnings), runItem(draft.trials)] : []),
  ];
}

/** Nothing that is open stands in the way. */
export const canSubmit = (items: readonly ChecklistItem[]) =>
  items.every(({ tone }) => tone !== "open");

function inputsItem({ incomplete, impossible, plan, problem }: EstimateReading): ChecklistItem {
  const all = listedInputs(plan && plan.used).length;
  if (impossible.length > 0) {
    return {
      tone: "open",
      text: `${capital(inWords(impossible.length))} impossible: ${labels(impossible)}`,
    };
  }
  if (incomplete.length > 0) {
    const which = incomplete.length <= 4 ? `: ${labels(incomplete)}` : "";
    return {
      tone: "open",
      text: `${capital(inWords(incomplete.length))} of ${inWords(all)} inputs to fill in${which}`,
    };
  }
  if (problem !== null) return { tone: "open", text: problem };
  if (plan && plan.open.length > 0) {
    return { tone: "open", text: "A figure of the recovery plan to fill in or to correct" };
  }
  return { tone: "done", text: `${capital(inWords(all))} inputs complete, no impossible value` };
}

function fluidItem(
  text: EstimateText,
  sampleName: string | null,
  isSampleNewer: boolean,
): ChecklistItem {
  if (text.fluid === null) return { tone: "open", text: "A fluid sample to enter" };
  if (sampleName === null) {
    return { tone: "warning", text: "Separator test typed by hand; no sample stands behind it" };
  }
  return isSampleNewer
    ? {
        tone: "warning",
        text: `Fluid sample ${sampleName}, as it was: its separator test has changed since`,
      }
    : { tone: "done", text: `Fluid sample ${sampleName}` };
}

/** What recoveries rest on, when a plan works them out; a weak route is for the reviewer to weigh. */
function planItems({ plan, usesPlan }: EstimateText): ChecklistItem[] {
  if (!plan || !usesPlan) return [];
  const { route } = plan.curve;
  return [
    {
      tone: isUnmeasured(route) ? "warning" : "done",
      text:
        `Recoveries worked out for ${conceptLabels[plan.concept].toLowerCase()}: ` +
        `${recoveryRouteLabels[route].toLowerCase()}${isUnmeasured(route) ? ", no measured depletion behind it" : ""}`,
    },
  ];
}

function sourcesItem(text: EstimateText, { plan }: EstimateReading): ChecklistItem {
  const missing = listedInputs(plan && plan.used).filter((name) => {
    const input = inputText(text, name);
    return input !== null && input.source.trim() === "";
  });
  if (missing.length === 0) return { tone: "done", text: "Every input says where it comes from" };
  const which = missing.length <= 3 ? `: ${labels(missing)}` : "";
  return {
    tone: "warning",
    text: `${capital(inWords(missing.length))} ${missing.length === 1 ? "input does" : "inputs do"} not say where ${missing.length === 1 ? "it comes" : "they come"} from${which}`,
  };
}

function warningsItem(warnings: readonly Warning[]): ChecklistItem {
  if (warnings.length === 0) return { tone: "done", text: "No warning" };
  return {
    tone: "warning",
    text: `${capital(inWords(warnings.length))} ${warnings.length === 1 ? "warning" : "warnings"} that a reviewer will ask about`,
  };
}

function runItem(trials: number | null): ChecklistItem {
  return trials === null
    ? { tone: "warning", text: "Not run in full yet; submitting runs it" }
    : { tone: "done", text: `Run with ${trials.toLocaleString("en-US")} trials` };
}
