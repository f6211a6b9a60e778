import type { RecoveryRoute } from "../recovery/recovery-curve-schema";
import type { ProducingConcept } from "../recovery/recovery-plan-schema";
import { vectorNames, type Range, type VectorName } from "../volumetrics/results-schema";

/** What a ranking knows of every field: the stored volumes, and what they are worth at one flat realised price. */
export const ledgerQuantities = [...vectorNames, "liquidValue", "gasValue"] as const;
export type LedgerQuantity = (typeof ledgerQuantities)[number];

/** A value is null where the basis has no price for it. */
export type LedgerRanges = Record<VectorName, Range> &
  Record<Exclude<LedgerQuantity, VectorName>, Range | null>;

/** A revision that stands for one reservoir of a field. */
export interface ChosenEstimate {
  estimateId: string;
  reservoirName: string;
  reservoirSlug: string;
  revision: number;
  state: "draft" | "submitted" | "approved" | "returned" | "superseded";
  /** business date of the approval, YYYY-MM-DD; null while it is not approved */
  effectiveOn: string | null;
  engineVersion: string | null;
  seed: number;
  trials: number;
  /** where its recoveries come from, and how it is produced; null when recoveries were entered */
  recoveryRoute: RecoveryRoute | null;
  producingConcept: ProducingConcept | null;
}

/** A revision that is being worked on or decided. */
export interface OpenEstimate {
  reservoirName: string;
  reservoirSlug: string;
  revision: number;
  state: "draft" | "submitted" | "returned";
}

/** A reservoir without a computed revision on this basis. */
export interface LeftOut {
  reservoirName: string;
}

export const rankedClasses = ["reserves", "contingent", "prospective"] as const;
export type RankedClass = (typeof rankedClasses)[number];

/** One row of the ranking. Volumes in scf and STB, values in the currency of the deck. */
export interface RankedField {
  id: string;
  slug: string;
  name: string;
  basin: { id: string; slug: string; name: string };
  operator: string;
  prmsClass: RankedClass;
  prmsSubClass: string;
  /** fractions */
  workingInterest: number;
  netRevenueInterest: number;
  chanceOfCommerciality: number;
  engineer: { id: string; name: string } | null;
  /** mean condensate in place over mean dry gas in place; null without an estimate */
  condensateYieldStbPerMmscf: number | null;
  /** largest mole fraction among the reservoirs; null without an estimate */
  hydrogenSulphide: number | null;
  /** codes of the engine's cautions (people can get hurt), each once */
  cautions: string[];
  /** the least trusted route among the revisions that stand for the field; null when all recoveries were entered */
  recoveryRoute: RecoveryRoute | null;
  chosen: ChosenEstimate[];
  /** reservoirs that are not in the figures, and not counted as zero */
  leftOut: LeftOut[];
  open: OpenEstimate[];
  /** null when no reservoir of the field has an estimate on this basis */
  ranges: LedgerRanges | null;
  /** 1 for the largest mean liquid value of the whole portfolio, null without an estimate */
  rank: number | null;
  /** the ranks of the middle 80 % of trials, by condensate value */
  rankRange: { low: number; high: number } | null;
}

export const estimateFilters = ["approved", "draft", "submitted", "returned", "none"] as const;
export type EstimateFilter = (typeof estimateFilters)[number];

/** What of the ranking is looked at. An empty list filters nothing. */
export interface RankingFilter {
  /** part of the name of the field, its basin or its operator, in any case */
  search: string;
  /** slugs */
  basins: readonly string[];
  classes: readonly RankedClass[];
  states: readonly EstimateFilter[];
  /** ids of responsible engineers */
  engineers: readonly string[];
  yieldFromStbPerMmscf: number | null;
  yieldToStbPerMmscf: number | null;
}

const holds = <Value>(list: readonly Value[], value: Value) =>
  list.length === 0 || list.includes(value);

function hasState(field: RankedField, state: EstimateFilter): boolean {
  if (state === "none") return field.chosen.length === 0;
  if (state === "approved") return field.chosen.some((chosen) => chosen.state === "approved");
  return field.open.some((open) => open.state === state);
}

/** Is this field among those looked at? A yield that is not known lies in no range of yields. */
export function matchesFilter(field: RankedField, filter: RankingFilter): boolean {
  const { yieldFromStbPerMmscf: from, yieldToStbPerMmscf: to } = filter;
  const words = `${field.name} ${field.basin.name} ${field.operator}`.toLocaleLowerCase("en");
  const yieldKnown = field.condensateYieldStbPerMmscf;
  return (
    words.includes(filter.search.trim().toLocaleLowerCase("en")) &&
    holds(filter.basins, field.basin.slug) &&
    holds(filter.classes, field.prmsClass) &&
    (filter.states.length === 0 || filter.states.some((state) => hasState(field, state))) &&
    (filter.engineers.length === 0 ||
      (field.engineer !== null && filter.engineers.includes(field.engineer.id))) &&
    (from === null || (yieldKnown !== null && yieldKnown >= from)) &&
    (to === null || (yieldKnown !== null && yieldKnown <= to))
  );
}

export type SortDirection = "ascending" | "descending";
export type SortValue = string | number | null;

const collator = new Intl.Collator("en", { numeric: true, sensitivity: "base" });

/**
 * The fields in the wanted order, in a new array. What is missing stands last in either direction, and equals stand by
 * name, so that an order never depends on where the rows came from.
 */
export function sortFields(
  fields: readonly RankedField[],
  valueOf: (field: RankedField) => SortValue,
  direction: SortDirection,
): RankedField[] {
  const sign = direction === "ascending" ? 1 : -1;
  return [...fields].sort((first, second) => {
    const a = valueOf(first);
    const b = valueOf(second);
    const byName = collator.compare(first.name, second.name);
    if (a === null || b === null) return Number(a === null) - Number(b === null) || byName;
    const order =
      typeof a === "number" && typeof b === "number"
        ? a - b
        : collator.compare(String(a), String(b));
    return order * sign || byName;
  });
}

/**
 * A range multiplied by a constant: what a flat price or an interest does to it. A negative factor turns low into high.
 */
export function scaleRange(range: Range, factor: number): Range {
  const [p90, p10] = factor < 0 ? [range.p10, range.p90] : [range.p90, range.p10];
  return {
    p90: p90 * factor,
    p50: range.p50 * factor,
    p10: p10 * factor,
    mean: range.mean * factor,
  };
}

/**
 * The arithmetic sum of a column of ranges. Only its mean is the mean of the total: percentiles do not add, and whoever
 * shows this names it a sum.
 */
export function sumRanges(ranges: readonly Range[]): Range {
  const sum = { p90: 0, p50: 0, p10: 0, mean: 0 };
  for (const range of ranges) {
    sum.p90 += range.p90;
    sum.p50 += range.p50;
    sum.p10 += range.p10;
    sum.mean += range.mean;
  }
  return sum;
}
