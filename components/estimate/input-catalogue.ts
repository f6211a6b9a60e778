import { inputNames, type InputName } from "@/analytics/volumetrics/inputs-schema";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import {
  planInputNames,
  type PlanInputName,
  type ProducingConcept,
} from "@/analytics/recovery/recovery-plan-schema";
import { usualRanges } from "@/analytics/volumetrics/usual-ranges";

/** What an input is called, and in what unit it is kept. Screens list inputs in the order of `inputGroups`. */
export interface InputDescription {
  label: string;
  /** for the narrow head of a column */
  short: string;
  /** printed after the figure; empty for a fraction */
  unit: string;
  /** printed below the label */
  unitWords: string;
}

export const inputCatalogue: Record<InputName, InputDescription> = {
  areaAcres: { label: "Area", short: "Area", unit: "acre", unitWords: "acre" },
  netThicknessFt: { label: "Net thickness", short: "Thickness", unit: "ft", unitWords: "ft" },
  porosity: { label: "Porosity", short: "Porosity", unit: "", unitWords: "fraction" },
  waterSaturation: {
    label: "Water saturation",
    short: "Water sat.",
    unit: "",
    unitWords: "fraction of the pores",
  },
  pressurePsia: { label: "Initial pressure", short: "Pressure", unit: "psia", unitWords: "psia" },
  temperatureDegF: { label: "Temperature", short: "Temp.", unit: "°F", unitWords: "°F" },
  condensateYieldStbPerMmscf: {
    label: "Condensate yield",
    short: "Yield",
    unit: "",
    unitWords: "STB per MMscf of surface gas",
  },
  gasRecovery: {
    label: "Gas recovery",
    short: "Gas rec.",
    unit: "",
    unitWords: "fraction of dry gas in place",
  },
  condensateRecovery: {
    label: "Condensate recovery",
    short: "Cond. rec.",
    unit: "",
    unitWords: "fraction of condensate in place",
  },
  salesGasFraction: {
    label: "Sales gas fraction",
    short: "Sales gas",
    unit: "",
    unitWords: "left after fuel and shrinkage",
  },
};

/** What can drive a result: the inputs, and those of a recovery plan. */
export const driverCatalogue: Record<DriverName, InputDescription> = {
  ...inputCatalogue,
  abandonmentPressurePsia: {
    label: "Abandonment pressure",
    short: "Abandonment",
    unit: "psia",
    unitWords: "psia",
  },
  condensateCurveFactor: {
    label: "Condensate curve factor",
    short: "Curve factor",
    unit: "",
    unitWords: "times the curve's condensate recovery",
  },
  sweepEfficiency: {
    label: "Sweep efficiency",
    short: "Sweep",
    unit: "",
    unitWords: "fraction of the gas pore volume",
  },
  displacementEfficiency: {
    label: "Displacement efficiency",
    short: "Displacement",
    unit: "",
    unitWords: "fraction of the swept vapour's condensate",
  },
};

const groups: { title: string; inputs: InputName[] }[] = [
  { title: "Rock", inputs: ["areaAcres", "netThicknessFt", "porosity", "waterSaturation"] },
  { title: "Reservoir conditions", inputs: ["pressurePsia", "temperatureDegF"] },
  {
    title: "Fluid and recovery",
    inputs: ["condensateYieldStbPerMmscf", "gasRecovery", "condensateRecovery", "salesGasFraction"],
  },
];

/**
 * Groups of the ledger with their inputs.
 *
 * @param planInputs  of a recovery plan in use: they stand where the two recoveries would; `null` without a plan
 */
export function inputGroups(
  planInputs: readonly PlanInputName[] | null,
): { title: string; inputs: DriverName[] }[] {
  return groups.map(({ title, inputs }) => ({
    title,
    inputs: inputs.flatMap((name): DriverName[] =>
      planInputs === null
        ? [name]
        : name === "gasRecovery"
          ? [...planInputs]
          : name === "condensateRecovery"
            ? []
            : [name],
    ),
  }));
}

/** Every input in the order of the ledger, as `inputGroups`. */
export const listedInputs = (planInputs: readonly PlanInputName[] | null): DriverName[] =>
  inputGroups(planInputs).flatMap(({ inputs }) => inputs);

/** Inputs of a plan that a way of producing uses. */
export const planInputsOf = (concept: ProducingConcept): readonly PlanInputName[] =>
  concept === "cycling" ? planInputNames : planInputNames.slice(0, 2);

/**
 * Ends that an input has by definition, so that a curve without ends has to be cut off there: a share of the pores or of
 * the gas, and a yield or a factor, which is never negative.
 */
export function definedEnds(name: DriverName): { minimum?: number; maximum?: number } {
  switch (name) {
    case "porosity":
    case "waterSaturation":
    case "gasRecovery":
    case "condensateRecovery":
    case "salesGasFraction": {
      const [minimum, maximum] = usualRanges[name].possible;
      return { minimum, maximum };
    }
    case "sweepEfficiency":
    case "displacementEfficiency":
      return { minimum: 0, maximum: 1 };
    case "condensateYieldStbPerMmscf":
      return { minimum: usualRanges[name].possible[0] };
    case "condensateCurveFactor":
      return { minimum: 0 };
    default:
      return {};
  }
}

/** An input's name, when a path such as `uncertain.porosity.distribution.low` is about one; `null` otherwise. */
export function inputOfPath(path: string | undefined): DriverName | null {
  if (!path) return null;
  const parts = path.split(/[./]/);
  if (parts.includes("fluid")) return null;
  const names: readonly DriverName[] = parts.includes("recoveryPlan") ? planInputNames : inputNames;
  return names.find((name) => parts.includes(name)) ?? null;
}
