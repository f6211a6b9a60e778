import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import type { DriverName, ResultName } from "@/analytics/volumetrics/results-schema";
import { sampledInput } from "@/components/estimate/differences";
import { driverCatalogue } from "@/components/estimate/input-catalogue";
import { lowerFirst } from "@/components/ui/format";
import { listWords } from "@/components/portfolio/reporting";

/** Results in the order in which a person chooses one. */
export const resultLabels: Record<ResultName, string> = {
  condensateRecoverableStb: "Condensate to the tank",
  condensateInPlaceStb: "Condensate in place",
  condensateLeftStb: "Condensate left behind",
  wetGasInPlaceScf: "Wet gas in place",
  dryGasInPlaceScf: "Dry gas in place",
  salesGasScf: "Sales gas",
};

export const resultOptions = (Object.keys(resultLabels) as ResultName[]).map((value) => ({
  value,
  label: resultLabels[value],
}));

export const inputLabel = (name: DriverName): string => driverCatalogue[name].label;

/** "Area and net thickness together": inputs that only have a share of the spread as one. */
export function factorLabel(inputs: readonly DriverName[]): string {
  const [first, ...others] = inputs.map(inputLabel);
  if (others.length === 0) return first;
  return `${listWords([first, ...others.map(lowerFirst)])} together`;
}

/** Why some inputs stand together as one factor: they are rank-correlated, or take the same case. `null` without any. */
export function togetherWords(
  factors: readonly { inputs: readonly DriverName[] }[],
  inputs: EstimateInputs,
): string | null {
  const groups = factors.filter((factor) => factor.inputs.length > 1);
  if (groups.length === 0) return null;
  const takesCases = (name: DriverName) => {
    const distribution = sampledInput(inputs, name)?.distribution;
    return distribution?.kind === "scenarios" && distribution.caseSet !== undefined;
  };
  const inCases = groups.filter((group) => group.inputs.every(takesCases)).length;
  const why =
    inCases === groups.length
      ? "take the same case"
      : inCases === 0
        ? "are correlated"
        : "are correlated or take the same case";
  return `Inputs that ${why} count as one: only what is independent has a share of its own.`;
}
