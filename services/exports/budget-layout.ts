import { estimateWords, recoverySourcesOf } from "@/analytics/portfolio/ranking-columns";
import type { LedgerQuantity, LedgerRanges, RankedField } from "@/analytics/portfolio/ranking";
import type { Range } from "@/analytics/volumetrics/results-schema";
import type { ChosenPrices, PortfolioBasis } from "../portfolio/basis";
import type { ChosenDependence } from "../portfolio/dependence";
import type { CsvCell } from "./csv";

/** A line of the budget file: a field, or the total of all fields that have an estimate. */
export interface BudgetRow {
  /** null for the total */
  field: RankedField | null;
  ranges: LedgerRanges | null;
  basis: PortfolioBasis;
  prices: ChosenPrices | null;
  dependence: ChosenDependence;
}

export interface BudgetColumn {
  /** stable: a column is never renamed and never changes its unit; new ones are added at the end */
  name: string;
  unit: string;
  meaning: string;
  value: (row: BudgetRow) => CsvCell;
}

const about = (
  name: string,
  unit: string,
  meaning: string,
  value: (field: RankedField) => CsvCell,
): BudgetColumn => ({ name, unit, meaning, value: ({ field }) => field && value(field) });

const statistics: Record<keyof Range, string> = {
  p90: "the low case: 90 % chance of at least this",
  p50: "the median: 50 % chance of at least this",
  p10: "the high case: 10 % chance of at least this",
  mean: "the mean of the trials",
};

/** P90, P50, P10 and mean of a quantity, in the unit that the names say. */
function ranged(
  quantity: LedgerQuantity,
  stem: string,
  suffix: string,
  unit: string,
  meaning: string,
  factor: number,
): BudgetColumn[] {
  return (["p90", "p50", "p10", "mean"] as const).map((statistic) => ({
    name: `${stem}_${statistic}${suffix}`,
    unit,
    meaning: `${meaning}; ${statistics[statistic]}`,
    value: ({ ranges }) => {
      const range = ranges?.[quantity];
      return range ? range[statistic] * factor : null;
    },
  }));
}

const gas = (quantity: LedgerQuantity, stem: string, meaning: string) =>
  ranged(quantity, stem, "_mmscf", "MMscf (14.696 psia, 60 degF)", meaning, 1e-6);
const condensate = (quantity: LedgerQuantity, stem: string, meaning: string) =>
  ranged(quantity, stem, "_stb", "STB", meaning, 1);
const value = (quantity: LedgerQuantity, stem: string, meaning: string) =>
  ranged(quantity, stem, "", "units of the column currency", meaning, 1);

const SEPARATOR = "; ";

/** How the chance of commerciality counts, in the words that the files use. */
export const riskWord = ({ risk }: Pick<PortfolioBasis, "risk">): string =>
  risk === "yesNo" ? "yes_no" : risk;

/** The oldest date among the approvals a field stands on. */
const oldestApproval = ({ chosen }: RankedField): string | null =>
  chosen.flatMap(({ effectiveOn }) => effectiveOn ?? []).sort()[0] ?? null;

/**
 * The layout of the budget file, in one unit system whatever the screen shows. Its order and its names are a contract
 * with the programs that read it.
 */
export const budgetLayout: readonly BudgetColumn[] = [
  {
    name: "row_kind",
    unit: "",
    meaning:
      "field; field_without_estimate (no figures, and not counted as zero); total (all rows of kind field, added up trial by trial: its percentiles are not the sums of the column)",
    value: ({ field, ranges }) =>
      field === null ? "total" : ranges === null ? "field_without_estimate" : "field",
  },
  about("field_id", "", "identifier of the field in this book, a UUID", ({ id }) => id),
  about("field_name", "", "name of the field", ({ name }) => name),
  about("basin", "", "name of the basin", ({ basin }) => basin.name),
  about("operator", "", "who operates the field", ({ operator }) => operator),
  about("prms_class", "", "PRMS 2018 class", ({ prmsClass }) => prmsClass),
  about("prms_sub_class", "", "PRMS 2018 sub-class", ({ prmsSubClass }) => prmsSubClass),
  about(
    "working_interest",
    "fraction",
    "the company's share of the costs",
    ({ workingInterest }) => workingInterest,
  ),
  about(
    "net_revenue_interest",
    "fraction",
    "the company's share of the revenue",
    ({ netRevenueInterest }) => netRevenueInterest,
  ),
  about(
    "chance_of_commerciality",
    "fraction",
    "chance that the field is developed",
    ({ chanceOfCommerciality }) => chanceOfCommerciality,
  ),
  about(
    "responsible_engineer",
    "",
    "who answers for the field's estimates",
    ({ engineer }) => engineer?.name ?? null,
  ),
  about("rank", "", "place by mean recoverable condensate on this basis", ({ rank }) => rank),
  about(
    "condensate_yield_stb_per_mmscf",
    "STB/MMscf of surface gas (14.696 psia, 60 degF)",
    "mean condensate in place over mean dry gas in place",
    ({ condensateYieldStbPerMmscf }) => condensateYieldStbPerMmscf,
  ),
  ...gas("wetGasInPlaceScf", "wet_gas_in_place", "wellstream gas in place"),
  ...gas("dryGasInPlaceScf", "dry_gas_in_place", "surface (separator) gas in place"),
  ...condensate("condensateInPlaceStb", "condensate_in_place", "stock-tank condensate in place"),
  ...gas("salesGasScf", "sales_gas", "recovered gas after fuel, flare and plant shrinkage"),
  ...condensate(
    "condensateRecoverableStb",
    "condensate_recoverable",
    "condensate that reaches the tank",
  ),
  ...value(
    "liquidValue",
    "liquid_value",
    "recoverable condensate times condensate_price_per_stb, undiscounted",
  ),
  ...value("gasValue", "gas_value", "sales gas times gas_price_per_mscf, undiscounted"),
  {
    name: "currency",
    unit: "ISO 4217",
    meaning: "of prices and values; they are flat and real, as of price_deck_as_of",
    value: ({ prices }) => prices?.currency ?? null,
  },
  {
    name: "price_deck",
    unit: "",
    meaning: "name of the published price deck",
    value: ({ prices }) => prices?.deckName ?? null,
  },
  {
    name: "price_deck_version",
    unit: "",
    meaning: "its version",
    value: ({ prices }) => prices?.deckVersion ?? null,
  },
  {
    name: "price_deck_as_of",
    unit: "YYYY-MM-DD",
    meaning: "date of the prices",
    value: ({ prices }) => prices?.asOfOn ?? null,
  },
  {
    name: "price_case",
    unit: "",
    meaning: "low, mid or high",
    value: ({ basis }) => basis.case,
  },
  {
    name: "condensate_price_per_stb",
    unit: "currency/STB",
    meaning: "realised: benchmark plus differential",
    value: ({ prices }) => prices?.condensatePerStb ?? null,
  },
  {
    name: "gas_price_per_mscf",
    unit: "currency/Mscf (14.696 psia, 60 degF)",
    meaning: "realised: benchmark plus differential",
    value: ({ prices }) => prices?.gasPerMscf ?? null,
  },
  {
    name: "estimates",
    unit: "",
    meaning: "approved: approved revisions only; latest: the newest computed revision, drafts too",
    value: ({ basis }) => basis.estimates,
  },
  {
    name: "interest",
    unit: "",
    meaning: "gross: the whole field; net: volumes and values times net_revenue_interest",
    value: ({ basis }) => basis.interest,
  },
  {
    name: "risk",
    unit: "",
    meaning:
      "unrisked; risked: every trial times chance_of_commerciality, so means are exact and ranges do not hold the chance of nothing; yes_no: each field comes or not, drawn trial by trial with chance_of_commerciality, so ranges hold the chance of nothing and means are those of the draws",
    value: ({ basis }) => riskWord(basis),
  },
  about(
    "estimate_states",
    "",
    "state and revision number of what stands for the field, by reservoir when it has several; revisions in work after it",
    estimateWords,
  ),
  about(
    "estimate_ids",
    "",
    "UUIDs of the revisions counted, for tracing, by reservoir name",
    (field) => field.chosen.map(({ estimateId }) => estimateId).join(SEPARATOR),
  ),
  about(
    "estimates_effective_on",
    "YYYY-MM-DD",
    "oldest approval among the revisions counted",
    oldestApproval,
  ),
  about(
    "reservoirs_counted",
    "",
    "number of reservoirs in the figures",
    ({ chosen }) => chosen.length,
  ),
  about(
    "reservoirs_left_out",
    "",
    "names of reservoirs that are not in the figures for want of an estimate, and not counted as zero",
    ({ leftOut }) => leftOut.map(({ reservoirName }) => reservoirName).join(SEPARATOR),
  ),
  about("engine_versions", "", "versions of the calculation behind the figures", ({ chosen }) =>
    [...new Set(chosen.flatMap(({ engineVersion }) => engineVersion ?? []))].sort().join(SEPARATOR),
  ),
  about(
    "recovery_route",
    "",
    "where the recoveries of the revisions counted come from: laboratory, tunedEquationOfState, untunedEquationOfState, correlation or entered, each once. untunedEquationOfState and correlation have no measured depletion behind them",
    ({ chosen }) =>
      recoverySourcesOf(chosen)
        .map((route) => route ?? "entered")
        .join(SEPARATOR),
  ),
  about(
    "producing_concept",
    "",
    "how the revisions counted are produced: depletion, compression or cycling, each once; empty where recoveries were entered",
    ({ chosen }) =>
      [...new Set(chosen.flatMap(({ producingConcept }) => producingConcept ?? []))]
        .sort()
        .join(SEPARATOR),
  ),
  {
    name: "dependence_set",
    unit: "",
    meaning:
      "name of the dependence set by which fields move together in the total; a field's own ranges depend on it only where the field has several reservoirs",
    value: ({ dependence }) => dependence.name,
  },
];
