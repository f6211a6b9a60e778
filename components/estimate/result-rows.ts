import type { BaseName } from "@/analytics/units/reporting-units";
import { reportingUnits } from "@/analytics/units/reporting-units";
import type { UnitSystem } from "@/analytics/units/conversions";
import type { Range, ResultName, SimulationSummary } from "@/analytics/volumetrics/results-schema";
import type { Tone } from "@/components/charts/range-mark";

/** What a table of results is shown in. */
export interface ResultBasis {
  units: UnitSystem;
  base: BaseName;
  /** 1 for the whole reservoir, the net revenue interest for the company's part */
  interestFactor: number;
}

export interface ResultRow {
  name: ResultName;
  label: string;
  tone: Tone;
  range: Range;
  before: Range | null;
}

export interface ResultGroup {
  title: string;
  unit: string;
  rows: ResultRow[];
}

const layout = [
  {
    title: "Gas",
    kind: "gas",
    rows: [
      { name: "wetGasInPlaceScf", label: "Wet gas in place", tone: "gas" },
      { name: "dryGasInPlaceScf", label: "Dry gas in place", tone: "gas" },
      { name: "salesGasScf", label: "Sales gas", tone: "gas" },
    ],
  },
  {
    title: "Condensate",
    kind: "condensate",
    rows: [
      { name: "condensateInPlaceStb", label: "In place", tone: "condensate" },
      { name: "condensateRecoverableStb", label: "To the tank", tone: "condensate" },
      { name: "condensateLeftStb", label: "Left behind", tone: "rock" },
    ],
  },
] as const;

/** Results in the units of the basis, beside what they were. */
export function resultGroups(
  summary: SimulationSummary,
  before: SimulationSummary | null,
  basis: ResultBasis,
): ResultGroup[] {
  const units = reportingUnits(basis.units, basis.base);
  return layout.map(({ title, kind, rows }) => {
    const factor = units[kind].factor * basis.interestFactor;
    return {
      title,
      unit: units[kind].unit,
      rows: rows.map(({ name, label, tone }) => ({
        name,
        label,
        tone,
        range: scaled(summary.results[name], factor),
        before: before && scaled(before.results[name], factor),
      })),
    };
  });
}

/** Factor from the engine's unit of a result to the unit shown, interest included. */
export function resultFactor(name: ResultName, basis: ResultBasis): number {
  const units = reportingUnits(basis.units, basis.base);
  const kind = name.endsWith("Stb") ? "condensate" : "gas";
  return units[kind].factor * basis.interestFactor;
}

export function resultUnit(name: ResultName, basis: ResultBasis): string {
  const units = reportingUnits(basis.units, basis.base);
  return name.endsWith("Stb") ? units.condensate.unit : units.gas.unit;
}

export function scaled(range: Range, factor: number): Range {
  return {
    p90: range.p90 * factor,
    p50: range.p50 * factor,
    p10: range.p10 * factor,
    mean: range.mean * factor,
  };
}
