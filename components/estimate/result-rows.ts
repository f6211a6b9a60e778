import { reportingUnits, type BaseName } from "@/analytics/units/reporting-units";
import type { UnitSystem } from "@/analytics/units/conversions";
import type { Range, ResultName, SimulationSummary } from "@/analytics/volumetrics/results-schema";
import type { Basis } from "@/components/basis/basis";
import type { Tone } from "@/components/charts/range-mark";
import { formatPercent } from "@/components/ui/format";
import { routeMark } from "./plan-words";

/** What a table of results is shown in. */
export interface ResultBasis {
  units: UnitSystem;
  base: BaseName;
  /** what every volume is multiplied by: the company's share, and the chance of commerciality when risked */
  factor: number;
  /** "Net to the company (70.4 %), unrisked" */
  words: string;
}

/** A reservoir's results on the basis of the page, in the interest and with the chance of its field. */
export function resultBasisOf(
  basis: Pick<Basis, "units" | "base" | "interest" | "risk">,
  field: { netRevenueInterest: number; chanceOfCommerciality: number },
): ResultBasis {
  const isNet = basis.interest === "net";
  const isRisked = basis.risk === "risked";
  const unless =
    basis.risk === "yesNo"
      ? `, if it comes, of which the chance is ${formatPercent(field.chanceOfCommerciality)}`
      : ", unrisked";
  const share = formatPercent(field.netRevenueInterest, { decimals: 1 });
  const chance = formatPercent(field.chanceOfCommerciality);
  return {
    units: basis.units,
    base: basis.base,
    factor: (isNet ? field.netRevenueInterest : 1) * (isRisked ? field.chanceOfCommerciality : 1),
    words:
      (isNet ? `Net to the company (${share})` : "Gross") +
      (isRisked ? `, times the ${chance} chance of commerciality` : unless),
  };
}

export interface ResultRow {
  name: ResultName;
  label: string;
  tone: Tone;
  range: Range;
  before: Range | null;
  /** what the figure rests on, where no measured depletion stands behind it: "from a correlation" */
  mark: string | null;
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

/** Results that a recovery is part of. */
const recovered: ReadonlySet<ResultName> = new Set([
  "salesGasScf",
  "condensateRecoverableStb",
  "condensateLeftStb",
]);

/** Results in the units of the basis, beside what they were. */
export function resultGroups(
  summary: SimulationSummary,
  before: SimulationSummary | null,
  basis: ResultBasis,
): ResultGroup[] {
  return groupsOfRanges(
    summary.results,
    before?.results ?? null,
    basis,
    routeMark(summary.recovery?.route),
  );
}

/**
 * As `resultGroups`, of any ranges; results that are not among them are left out.
 *
 * @param mark  what the recovered volumes rest on, where no measured depletion stands behind them
 */
export function groupsOfRanges(
  now: Partial<Record<ResultName, Range>>,
  before: Partial<Record<ResultName, Range>> | null,
  basis: ResultBasis,
  mark: string | null,
): ResultGroup[] {
  const units = reportingUnits(basis.units, basis.base);
  return layout.map(({ title, kind, rows }) => {
    const factor = units[kind].factor * basis.factor;
    return {
      title,
      unit: units[kind].unit,
      rows: rows.flatMap(({ name, label, tone }) => {
        const range = now[name];
        const old = before?.[name];
        if (!range) return [];
        return {
          name,
          label,
          tone,
          range: scaled(range, factor),
          before: old ? scaled(old, factor) : null,
          mark: recovered.has(name) ? mark : null,
        };
      }),
    };
  });
}

/** Factor from the engine's unit of a result to the unit shown, interest included. */
export function resultFactor(name: ResultName, basis: ResultBasis): number {
  const units = reportingUnits(basis.units, basis.base);
  const kind = name.endsWith("Stb") ? "condensate" : "gas";
  return units[kind].factor * basis.factor;
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
