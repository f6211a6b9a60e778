import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import {
  inputNames,
  type EstimateInputs,
  type InputName,
} from "@/analytics/volumetrics/inputs-schema";

export interface InputDifference {
  name: InputName;
  before: { p90: number; p50: number; p10: number } | null;
  now: { p90: number; p50: number; p10: number };
  /** change of P50 over the P50 before; `null` without one */
  medianChange: number | null;
  /** the shape changed, whatever the percentiles did */
  shapeChanged: boolean;
  isSame: boolean;
  source: string;
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
  return inputNames.map((name) => {
    const current = now.uncertain[name].distribution;
    const previous = before?.uncertain[name].distribution ?? null;
    const range = compileDistribution(current).range;
    const beforeRange = previous && compileDistribution(previous).range;
    return {
      name,
      before: beforeRange,
      now: range,
      medianChange: beforeRange && beforeRange.p50 !== 0 ? range.p50 / beforeRange.p50 - 1 : null,
      shapeChanged: previous !== null && previous.kind !== current.kind,
      isSame: previous !== null && isSameDistribution(current, previous),
      source: now.uncertain[name].source,
    };
  });
}

export function isSameDistribution(a: Distribution, b: Distribution): boolean {
  return sortedJson(a) === sortedJson(b);
}

/** Whether two separator tests say the same, whatever the order of their keys. */
export function isSameFluid(a: SeparatorTest | null, b: SeparatorTest | null): boolean {
  return sortedJson(a) === sortedJson(b);
}

export function isSameInputs(a: EstimateInputs, b: EstimateInputs): boolean {
  return sortedJson(a) === sortedJson(b);
}

/** What differs between two versions of the same draft, as parts that a person can choose one by one. */
export type DraftPart = InputName | "correlations" | "fluid" | "depthFt";

/**
 * Parts in which my unsaved draft and the saved one of somebody else differ, when both began from the same version.
 * Sources count here: somebody typed them.
 */
export function conflictingParts(mine: EstimateInputs, theirs: EstimateInputs): DraftPart[] {
  const inputs = inputNames.filter(
    (name) => sortedJson(mine.uncertain[name]) !== sortedJson(theirs.uncertain[name]),
  );
  const others = (["correlations", "fluid", "depthFt"] as const).filter(
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
