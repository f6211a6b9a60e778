import { MISSING } from "@/components/ui/format";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import type { RecoveryPlan } from "@/analytics/recovery/recovery-plan-schema";
import {
  inputNames,
  type EstimateInputs,
  type InputName,
} from "@/analytics/volumetrics/inputs-schema";
import {
  recoveryNames,
  type DriverName,
  type SimulationSummary,
} from "@/analytics/volumetrics/results-schema";
import { distributionWords, isReadOffRange } from "./difference-words";
import { isWorkedOut } from "./estimate-text";
import { listedInputs, planInputsOf } from "./input-catalogue";
import {
  conceptLabels,
  criticalInWords,
  curveInWords,
  cyclingInWords,
  waterInWords,
} from "./plan-words";

interface Percentiles {
  p90: number;
  p50: number;
  p10: number;
}

export interface InputDifference {
  name: DriverName;
  before: Percentiles | null;
  now: Percentiles;
  /** change of P50 over the P50 before; `null` without one */
  medianChange: number | null;
  /** the shape changed, whatever the percentiles did */
  shapeChanged: boolean;
  /** as it was typed, in words; `null` where P90, P50 and P10 say it all */
  typed: { before: string | null; now: string } | null;
  isSame: boolean;
  source: string;
  /** why this range, in the expert's words; empty when nobody said */
  reason: string;
  /** a plan worked it out rather than a person typing it */
  isWorkedOut: boolean;
}

/**
 * Every input of a revision against the one before, in the order in which inputs are listed. An input is the same when
 * its distribution is; a reworded source is no difference.
 *
 * @param before  `null` for a first estimate
 */
export function inputDifferences(
  now: EstimateInputs,
  before: EstimateInputs | null,
): InputDifference[] {
  return listedOf(now).map((name) => {
    const { distribution: current, source, reason } = sampledInput(now, name) ?? missing(name);
    const isListed = before !== null && listedOf(before).includes(name);
    const previous = isListed ? (sampledInput(before, name)?.distribution ?? null) : null;
    const range = compileDistribution(current).range;
    const beforeRange = previous && compileDistribution(previous).range;
    const isSame = previous !== null && isSameDistribution(current, previous);
    return {
      name,
      before: beforeRange,
      now: range,
      medianChange: beforeRange && beforeRange.p50 !== 0 ? range.p50 / beforeRange.p50 - 1 : null,
      shapeChanged: previous !== null && previous.kind !== current.kind,
      typed:
        isReadOffRange(current) && (previous === null || previous.kind === current.kind)
          ? null
          : {
              now: distributionWords(current, name, now),
              before:
                before && previous && !isSame ? distributionWords(previous, name, before) : null,
            },
      isSame,
      source,
      reason: reason ?? "",
      isWorkedOut: false,
    };
  });
}

const planInputsIn = ({ recoveryPlan }: EstimateInputs) =>
  recoveryPlan && planInputsOf(recoveryPlan.concept);

/** Inputs that an estimate samples, in the order in which they are listed. */
const listedOf = (inputs: EstimateInputs) => listedInputs(planInputsIn(inputs));

/** One sampled input, of the estimate's own ten or of its recovery plan; `undefined` where the plan has none. */
export function sampledInput({ uncertain, recoveryPlan: plan }: EstimateInputs, name: DriverName) {
  switch (name) {
    case "abandonmentPressurePsia":
    case "condensateCurveFactor":
      return plan?.[name];
    case "sweepEfficiency":
    case "displacementEfficiency":
      return plan?.cycling?.[name];
    default:
      return uncertain[name];
  }
}

function missing(name: DriverName): never {
  throw new RangeError(`${name} is listed, but the recovery plan has none`);
}

/**
 * The two recoveries as the trials had them, where a plan worked out either of the two revisions'. Without a run on both
 * sides there is nothing to set side by side.
 */
export function recoveryDifferences(
  now: { inputs: EstimateInputs; summary: SimulationSummary | null },
  before: { inputs: EstimateInputs; summary: SimulationSummary | null } | null,
): InputDifference[] {
  const { summary } = now;
  if (!summary || (!now.inputs.recoveryPlan && !before?.inputs.recoveryPlan)) return [];
  return recoveryNames.map((name) => {
    const range = summary.inputs[name];
    const previous = before?.summary?.inputs[name] ?? null;
    return {
      name,
      now: range,
      before: previous,
      medianChange: previous && previous.p50 !== 0 ? range.p50 / previous.p50 - 1 : null,
      shapeChanged: false,
      typed: null,
      isSame: previous !== null && sortedJson(previous) === sortedJson(range),
      source: now.inputs.recoveryPlan ? "Worked out by the recovery plan" : "Typed by hand",
      reason: "",
      isWorkedOut: true,
    };
  });
}

/** One part of how recoveries come about, in words. */
export interface PlanDifference {
  label: string;
  before: string;
  now: string;
}

const planParts: { label: string; words: (plan: RecoveryPlan) => string }[] = [
  { label: "Concept", words: ({ concept }) => conceptLabels[concept] },
  { label: "Depletion curve", words: curveInWords },
  { label: "Critical saturation", words: criticalInWords },
  { label: "Water", words: waterInWords },
  { label: "Injection", words: cyclingInWords },
];

/** What differs between two ways to recoveries; empty when nothing does, whatever their uncertain inputs do. */
export function planDifferences(
  now: RecoveryPlan | null,
  before: RecoveryPlan | null,
): PlanDifference[] {
  const words = (plan: RecoveryPlan | null) => (plan ? "Worked out by a plan" : "Typed by hand");
  if (now === null || before === null) {
    if (now === before) return [];
    const one = now ?? before;
    return [
      { label: "Recoveries", before: words(before), now: words(now) },
      ...planParts
        .map(({ label, words: part }) => ({
          label,
          before: before ? part(before) : MISSING,
          now: now ? part(now) : MISSING,
        }))
        .filter(({ label }) => label !== "Injection" || one?.cycling !== null),
    ];
  }
  const parts = planParts
    .map(({ label, words: part }) => ({ label, before: part(before), now: part(now) }))
    .filter((part) => part.before !== part.now);
  const isNewCurve = sortedJson(now.curve) !== sortedJson(before.curve);
  const saysSo = parts.some(({ label }) => label === "Depletion curve");
  return isNewCurve && !saysSo
    ? [
        ...parts,
        {
          label: "Depletion curve",
          before: curveInWords(before),
          now: `${curveInWords(now)}, with other figures on the way`,
        },
      ]
    : parts;
}

export function isSameDistribution(a: Distribution, b: Distribution): boolean {
  return sortedJson(a) === sortedJson(b);
}

/** Apart by no more than what is lost between a figure, its text in a field and the figure read back. */
const SAME_FIGURE = 1e-9;

/** Whether two separator tests say the same: figure by figure, whatever the order of keys and the last binary digit. */
export function isSameFluid(a: SeparatorTest | null, b: SeparatorTest | null): boolean {
  return saysTheSame(a, b);
}

function saysTheSame(a: unknown, b: unknown): boolean {
  if (typeof a === "number" && typeof b === "number") {
    return Math.abs(a - b) <= SAME_FIGURE * Math.max(Math.abs(a), Math.abs(b));
  }
  if (!isRecord(a) || !isRecord(b)) return (a ?? null) === (b ?? null);
  return [...new Set([...Object.keys(a), ...Object.keys(b)])].every((key) =>
    saysTheSame(a[key], b[key]),
  );
}

const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === "object" && value !== null;

export function isSameInputs(a: EstimateInputs, b: EstimateInputs): boolean {
  return sortedJson(a) === sortedJson(b);
}

/** What differs between two versions of the same draft, as parts that a person can choose one by one. */
export type DraftPart = InputName | "correlations" | "fluid" | "depthFt" | "recoveryPlan";

/**
 * Parts in which my unsaved draft and the saved one of somebody else differ, when both began from the same version.
 * Sources count here: somebody typed them.
 */
export function conflictingParts(mine: EstimateInputs, theirs: EstimateInputs): DraftPart[] {
  // A recovery that a plan works out on both sides is nobody's typing.
  const bothPlanned = mine.recoveryPlan !== null && theirs.recoveryPlan !== null;
  const inputs = inputNames.filter(
    (name) =>
      !(bothPlanned && isWorkedOut(name)) &&
      sortedJson(mine.uncertain[name]) !== sortedJson(theirs.uncertain[name]),
  );
  const others = (["correlations", "fluid", "depthFt", "recoveryPlan"] as const).filter(
    (part) => sortedJson(mine[part]) !== sortedJson(theirs[part]),
  );
  return [...inputs, ...others];
}

/** Takes the parts named in `fromTheirs` from their version and the rest from mine. */
export function mergeDrafts(
  mine: EstimateInputs,
  theirs: EstimateInputs,
  fromTheirs: readonly DraftPart[],
): EstimateInputs {
  const merged: EstimateInputs = { ...mine, uncertain: { ...mine.uncertain } };
  for (const name of inputNames) {
    if (fromTheirs.includes(name)) merged.uncertain[name] = theirs.uncertain[name];
  }
  if (fromTheirs.includes("correlations")) merged.correlations = theirs.correlations;
  if (fromTheirs.includes("fluid")) merged.fluid = theirs.fluid;
  if (fromTheirs.includes("recoveryPlan")) merged.recoveryPlan = theirs.recoveryPlan;
  if (fromTheirs.includes("depthFt")) merged.depthFt = theirs.depthFt;
  return merged;
}

/** JSON with keys in order, so that a round trip through the database compares equal. */
function sortedJson(value: unknown): string {
  return JSON.stringify(value, (_key, inner: unknown) =>
    inner !== null && typeof inner === "object" && !Array.isArray(inner)
      ? Object.fromEntries(Object.entries(inner).sort(([a], [b]) => (a < b ? -1 : 1)))
      : inner,
  );
}
