import type { RankedField } from "@/analytics/portfolio/ranking";
import {
  columnFactor,
  rankingColumn,
  type RankingColumn,
  type RankingColumnId,
} from "@/analytics/portfolio/ranking-columns";
import { reportingUnits, type ReportingUnits } from "@/analytics/units/reporting-units";
import { today } from "../clock";
import { authorise, type Actor } from "../policy";
import type { ChosenPrices, PortfolioBasis } from "../portfolio/basis";
import type { GroupTotal } from "../portfolio/group-total";
import { selectRanking, type RankingRequest } from "../portfolio/ranking";
import { riskWord } from "./budget-layout";
import { csvResponse, type CsvCell, type CsvFile } from "./csv";

export interface RankingExportRequest extends RankingRequest {
  columns: readonly RankingColumnId[];
}

/**
 * The ranking as it is shown: the same rows in the same order, the same columns in the same units, all digits, then the
 * total trial by trial and the arithmetic sum, each named in `row_kind`. The last columns carry the basis and, whatever
 * columns are shown, where each field's recoveries come from and by which dependence set fields move together.
 */
export async function exportRanking(
  actor: Actor,
  request: RankingExportRequest,
): Promise<Response> {
  authorise(actor, "export.create");
  const { rows, totals, prices, book } = await selectRanking(request);
  const units = reportingUnits(request.basis.units, request.basis.base);
  const file = rankingFile(rows, totals, prices, units, request, book.dependence.name);
  return csvResponse(file, `dewledger-ranking-${today()}.csv`);
}

function rankingFile(
  rows: readonly RankedField[],
  totals: GroupTotal | null,
  prices: ChosenPrices | null,
  units: ReportingUnits,
  { basis, columns: ids }: RankingExportRequest,
  dependenceSet: string,
): CsvFile {
  // It stands at the end in any case, so that no figure leaves without its mark.
  const columns = ids.filter((id) => id !== "recoveryRoute").map(rankingColumn);
  const routeOf = (row: RankedField) => rankingColumn("recoveryRoute").value(row);
  const basisColumns = basisCells(basis, prices, units);
  const basisNames = Object.keys(basisColumns);
  const basisValues = Object.values(basisColumns);
  const sumCells = (kind: "trialByTrial" | "arithmeticSum"): CsvCell[] =>
    columns.flatMap((column) => totalCells(column, totals?.[kind] ?? null, units));

  function* lines(): Generator<CsvCell[]> {
    for (const row of rows) {
      const cells = columns.flatMap((column) => cellsOf(column, row, units));
      yield ["field", row.rank, row.name, ...cells, ...basisValues, routeOf(row), dependenceSet];
    }
    if (totals === null) return;
    const count = `${totals.fields} fields`;
    const last = [...basisValues, null, dependenceSet];
    yield ["total_trial_by_trial", null, count, ...sumCells("trialByTrial"), ...last];
    yield ["arithmetic_sum", null, count, ...sumCells("arithmeticSum"), ...last];
  }

  return {
    names: [
      "row_kind",
      "rank",
      "field",
      ...columns.flatMap((column) => namesOf(column, units)),
      ...basisNames,
      "recovery_route",
      "dependence_set",
    ],
    rows: { [Symbol.iterator]: lines },
    byteOrderMark: true,
  };
}

const snakeCase = (id: string) => id.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`);

/** `liquidValueP90` in millions -> `liquid_value_p90_million`; the currency is among the basis columns. */
function namesOf({ id, kind }: RankingColumn, units: ReportingUnits): string[] {
  const name = snakeCase(id);
  switch (kind) {
    case "money":
      return [`${name}_million`];
    case "gas":
      return [`${name}_${units.gas.suffix}`];
    case "condensate":
      return [`${name}_${units.condensate.suffix}`];
    case "condensateYield":
      return [`condensate_yield_${units.condensateYield.suffix}`];
    case "fraction":
      return [`${name}_percent`];
    case "ranks":
      return ["rank_best_of_80_percent", "rank_worst_of_80_percent"];
    default:
      return [name === "class" ? "prms_class" : name];
  }
}

function cellsOf(column: RankingColumn, field: RankedField, units: ReportingUnits): CsvCell[] {
  if (column.kind === "ranks") {
    return [field.rankRange?.low ?? null, field.rankRange?.high ?? null];
  }
  if (column.id === "class") return [field.prmsClass];
  const value = column.value(field);
  return [typeof value === "number" ? value * columnFactor(column.kind, units) : value];
}

function totalCells(
  { quantity, kind }: RankingColumn,
  ranges: GroupTotal["trialByTrial"] | null,
  units: ReportingUnits,
): CsvCell[] {
  if (kind === "ranks") return [null, null];
  const value = quantity && ranges?.[quantity.name]?.[quantity.statistic];
  return [value === undefined ? null : value * columnFactor(kind, units)];
}

/** What every number of a file stands on, as columns, so that a row cut out of the file still says it. */
export function basisCells(
  basis: PortfolioBasis,
  prices: ChosenPrices | null,
  units: ReportingUnits,
): Record<string, CsvCell> {
  return {
    currency: prices?.currency ?? null,
    price_deck: prices ? `${prices.deckName} v${prices.deckVersion}` : null,
    price_deck_as_of: prices?.asOfOn ?? null,
    price_case: basis.case,
    condensate_price_per_stb: prices?.condensatePerStb ?? null,
    gas_price_per_mscf: prices?.gasPerMscf ?? null,
    estimates: basis.estimates,
    interest: basis.interest,
    risk: riskWord(basis),
    standard_conditions: units.standardConditions,
  };
}
