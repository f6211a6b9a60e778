import { inputNames, type InputName } from "@/analytics/volumetrics/inputs-schema";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
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

export const inputGroups: { title: string; inputs: InputName[] }[] = [
  { title: "Rock", inputs: ["areaAcres", "netThicknessFt", "porosity", "waterSaturation"] },
  { title: "Reservoir conditions", inputs: ["pressurePsia", "temperatureDegF"] },
  {
    title: "Fluid and recovery",
    inputs: ["condensateYieldStbPerMmscf", "gasRecovery", "condensateRecovery", "salesGasFraction"],
  },
];

/**
 * Ends that an input has by definition, so that a curve without ends has to be cut off there: a share of the pores or of
 * the gas, and a yield, which is never negative.
 */
export function definedEnds(name: InputName): { minimum?: number; maximum?: number } {
  const [minimum, maximum] = usualRanges[name].possible;
  switch (name) {
    case "porosity":
    case "waterSaturation":
    case "gasRecovery":
    case "condensateRecovery":
    case "salesGasFraction":
      return { minimum, maximum };
    case "condensateYieldStbPerMmscf":
      return { minimum };
    default:
      return {};
  }
}

/** Number of the ledger line of an input, from 1, in the order in which the groups list them. */
export function lineOf(name: InputName): number {
  return inputGroups.flatMap((group) => group.inputs).indexOf(name) + 1;
}

/** An input's name, when a path such as `uncertain.porosity.distribution.low` is about one; `null` otherwise. */
export function inputOfPath(path: string | undefined): InputName | null {
  if (!path) return null;
  const parts = path.split(/[./]/);
  return inputNames.find((name) => parts.includes(name)) ?? null;
}
