import { recoveryRouteLabels, recoveryRoutes } from "../recovery/recovery-curve-schema";
import type { ReportingUnits } from "../units/reporting-units";
import type { Range } from "../volumetrics/results-schema";
import { rankedClasses, type LedgerQuantity, type RankedField, type SortValue } from "./ranking";

/** Columns a person can choose, in the order in which they stand. The field's name is always there. */
export const rankingColumnIds = [
  "basin",
  "class",
  "subClass",
  "operator",
  "workingInterest",
  "netRevenueInterest",
  "chanceOfCommerciality",
  "yield",
  "hydrogenSulphide",
  "estimate",
  "effectiveOn",
  "engineer",
  "liquidValueP90",
  "liquidValueP50",
  "liquidValueP10",
  "liquidValueMean",
  "spread",
  "gasValueMean",
  "condensateRecoverableMean",
  "condensateInPlaceMean",
  "salesGasMean",
  "dryGasInPlaceMean",
  "wetGasInPlaceMean",
  "rankRange",
  "recoveryRoute",
] as const;
export type RankingColumnId = (typeof rankingColumnIds)[number];

export const defaultRankingColumns: readonly RankingColumnId[] = [
  "basin",
  "class",
  "yield",
  "estimate",
  "liquidValueP90",
  "liquidValueP50",
  "liquidValueP10",
  "liquidValueMean",
  "condensateRecoverableMean",
  "salesGasMean",
  "rankRange",
];

export type RankingSortId = RankingColumnId | "name";

/** What kind of thing a column holds: decides its unit, its alignment and how it is written. */
export type ColumnKind =
  | "text"
  | "money"
  | "gas"
  | "condensate"
  | "condensateYield"
  | "fraction"
  | "ratio"
  | "ranks";

export interface RankingColumn {
  id: RankingSortId;
  label: string;
  kind: ColumnKind;
  /** in canonical units; what the column sorts by */
  value: (field: RankedField) => SortValue;
  /** what a total has in this column, when a total of it means something */
  quantity?: { name: LedgerQuantity; statistic: keyof Range };
}

const quantityColumn = (
  id: RankingColumnId,
  label: string,
  kind: ColumnKind,
  name: LedgerQuantity,
  statistic: keyof Range,
): RankingColumn => ({
  id,
  label,
  kind,
  value: ({ ranges }) => ranges?.[name]?.[statistic] ?? null,
  quantity: { name, statistic },
});

const text = (
  id: RankingSortId,
  label: string,
  value: (field: RankedField) => string | null,
): RankingColumn => ({ id, label, kind: "text", value });

/** "approved r4; submitted r5", reservoir by reservoir when there are several. */
export function estimateWords(field: RankedField): string {
  const several = field.chosen.length + field.leftOut.length > 1;
  const place = (name: string) => (several ? `${name}: ` : "");
  return [
    ...field.chosen.map(
      ({ reservoirName, state, revision }) => `${place(reservoirName)}${state} r${revision}`,
    ),
    ...field.open
      .filter(
        (open) =>
          !field.chosen.some(
            (chosen) =>
              chosen.reservoirSlug === open.reservoirSlug && chosen.revision === open.revision,
          ),
      )
      .map(({ reservoirName, state, revision }) => `${place(reservoirName)}${state} r${revision}`),
  ].join("; ");
}

/** Where the recoveries of several reservoirs come from, each once, in the order of trust; null is entered by hand. */
export function recoverySourcesOf(chosen: RankedField["chosen"]): RankedField["recoveryRoute"][] {
  const sources = new Set(chosen.map(({ recoveryRoute }) => recoveryRoute));
  return [...recoveryRoutes, null].filter((route) => sources.has(route));
}

function recoveryWordsOf({ chosen }: RankedField): string | null {
  const words = recoverySourcesOf(chosen).map((route) =>
    route === null ? "entered" : recoveryRouteLabels[route].toLowerCase(),
  );
  return words.length === 0 ? null : words.join("; ");
}

/** The oldest approval among the revisions that stand for the field: how old its figures may be. */
function oldestEffectiveOn(field: RankedField): string | null {
  const dates = field.chosen.flatMap(({ effectiveOn }) => effectiveOn ?? []);
  return dates.length === 0 ? null : dates.sort()[0];
}

/** P10 over P90 of the liquid value: 1 is certain, 10 is a decade. Null when P90 is not above zero. */
export function spreadOf(field: RankedField): number | null {
  const range = field.ranges?.liquidValue;
  return range && range.p90 > 0 ? range.p10 / range.p90 : null;
}

const columns: Record<RankingSortId, RankingColumn> = {
  name: text("name", "Field", ({ name }) => name),
  basin: text("basin", "Basin", ({ basin }) => basin.name),
  class: {
    id: "class",
    label: "Class",
    kind: "text",
    value: ({ prmsClass }) => rankedClasses.indexOf(prmsClass),
  },
  subClass: text("subClass", "Sub-class", ({ prmsSubClass }) => prmsSubClass.replaceAll("_", " ")),
  operator: text("operator", "Operator", ({ operator }) => operator),
  workingInterest: {
    id: "workingInterest",
    label: "Working interest",
    kind: "fraction",
    value: ({ workingInterest }) => workingInterest,
  },
  netRevenueInterest: {
    id: "netRevenueInterest",
    label: "Net revenue interest",
    kind: "fraction",
    value: ({ netRevenueInterest }) => netRevenueInterest,
  },
  chanceOfCommerciality: {
    id: "chanceOfCommerciality",
    label: "Chance of commerciality",
    kind: "fraction",
    value: ({ chanceOfCommerciality }) => chanceOfCommerciality,
  },
  yield: {
    id: "yield",
    label: "Yield",
    kind: "condensateYield",
    value: ({ condensateYieldStbPerMmscf }) => condensateYieldStbPerMmscf,
  },
  hydrogenSulphide: {
    id: "hydrogenSulphide",
    label: "Hydrogen sulphide",
    kind: "fraction",
    value: ({ hydrogenSulphide }) => hydrogenSulphide,
  },
  estimate: text("estimate", "Estimate", (field) => estimateWords(field) || null),
  effectiveOn: text("effectiveOn", "As of", oldestEffectiveOn),
  engineer: text("engineer", "Responsible engineer", ({ engineer }) => engineer?.name ?? null),
  liquidValueP90: quantityColumn(
    "liquidValueP90",
    "Liquid value P90",
    "money",
    "liquidValue",
    "p90",
  ),
  liquidValueP50: quantityColumn(
    "liquidValueP50",
    "Liquid value P50",
    "money",
    "liquidValue",
    "p50",
  ),
  liquidValueP10: quantityColumn(
    "liquidValueP10",
    "Liquid value P10",
    "money",
    "liquidValue",
    "p10",
  ),
  liquidValueMean: quantityColumn(
    "liquidValueMean",
    "Liquid value mean",
    "money",
    "liquidValue",
    "mean",
  ),
  spread: { id: "spread", label: "P10 over P90", kind: "ratio", value: spreadOf },
  gasValueMean: quantityColumn("gasValueMean", "Gas value", "money", "gasValue", "mean"),
  condensateRecoverableMean: quantityColumn(
    "condensateRecoverableMean",
    "Condensate to the tank",
    "condensate",
    "condensateRecoverableStb",
    "mean",
  ),
  condensateInPlaceMean: quantityColumn(
    "condensateInPlaceMean",
    "Condensate in place",
    "condensate",
    "condensateInPlaceStb",
    "mean",
  ),
  salesGasMean: quantityColumn("salesGasMean", "Sales gas", "gas", "salesGasScf", "mean"),
  dryGasInPlaceMean: quantityColumn(
    "dryGasInPlaceMean",
    "Dry gas in place",
    "gas",
    "dryGasInPlaceScf",
    "mean",
  ),
  wetGasInPlaceMean: quantityColumn(
    "wetGasInPlaceMean",
    "Wet gas in place",
    "gas",
    "wetGasInPlaceScf",
    "mean",
  ),
  rankRange: {
    id: "rankRange",
    label: "Rank in 80 % of trials",
    kind: "ranks",
    value: ({ rankRange }) => (rankRange ? (rankRange.low + rankRange.high) / 2 : null),
  },
  recoveryRoute: text("recoveryRoute", "Recovery from", recoveryWordsOf),
};

export const rankingColumn = (id: RankingSortId): RankingColumn => columns[id];

/** The chosen columns in their standing order, each once. */
export const orderColumns = (ids: readonly RankingColumnId[]): RankingColumnId[] =>
  rankingColumnIds.filter((id) => ids.includes(id));

/** How the column chooser groups them. */
export const rankingColumnGroups: readonly { label: string; ids: readonly RankingColumnId[] }[] = [
  {
    label: "Field",
    ids: ["basin", "class", "subClass", "operator"],
  },
  {
    label: "Interest and chance",
    ids: ["workingInterest", "netRevenueInterest", "chanceOfCommerciality"],
  },
  {
    label: "Fluid and volumes",
    ids: [
      "yield",
      "hydrogenSulphide",
      "condensateRecoverableMean",
      "condensateInPlaceMean",
      "salesGasMean",
      "dryGasInPlaceMean",
      "wetGasInPlaceMean",
    ],
  },
  {
    label: "Value and rank",
    ids: [
      "liquidValueP90",
      "liquidValueP50",
      "liquidValueP10",
      "liquidValueMean",
      "spread",
      "gasValueMean",
      "rankRange",
    ],
  },
  { label: "Status", ids: ["estimate", "recoveryRoute", "effectiveOn", "engineer"] },
];

/** Unit of a column for people; empty where a column has none. */
export function columnUnit(kind: ColumnKind, units: ReportingUnits, currency: string): string {
  switch (kind) {
    case "money":
      return `${currency} million`;
    case "gas":
      return units.gas.unit;
    case "condensate":
      return units.condensate.unit;
    case "condensateYield":
      return units.condensateYield.unit;
    case "fraction":
      return "%";
    default:
      return "";
  }
}

/** Value shown = canonical value x this. */
export function columnFactor(kind: ColumnKind, units: ReportingUnits): number {
  switch (kind) {
    case "money":
      return 1e-6;
    case "gas":
      return units.gas.factor;
    case "condensate":
      return units.condensate.factor;
    case "condensateYield":
      return units.condensateYield.factor;
    case "fraction":
      return 100;
    default:
      return 1;
  }
}
