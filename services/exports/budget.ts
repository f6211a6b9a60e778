import { today } from "../clock";
import { authorise, type Actor } from "../policy";
import type { PortfolioBasis } from "../portfolio/basis";
import { totalOf } from "../portfolio/group-total";
import { loadRanking } from "../portfolio/ranking";
import { budgetLayout, type BudgetRow } from "./budget-layout";
import { csvResponse, type CsvCell } from "./csv";

/**
 * The whole book in the budget layout: one row a field, by rank, then the total. For programs: one unit system, stable
 * names, no byte-order mark.
 */
export async function exportBudget(actor: Actor, basis: PortfolioBasis): Promise<Response> {
  authorise(actor, "export.create");
  const ranked = await loadRanking(basis);
  const { fields, prices } = ranked;
  const { dependence } = ranked.book;
  const total = await totalOf(ranked, basis, fields);

  function* rows(): Generator<CsvCell[]> {
    const cells = (row: BudgetRow) => budgetLayout.map(({ value }) => value(row));
    for (const field of fields)
      yield cells({ field, ranges: field.ranges, basis, prices, dependence });
    if (total) yield cells({ field: null, ranges: total.trialByTrial, basis, prices, dependence });
  }

  const names = budgetLayout.map(({ name }) => name);
  return csvResponse(
    { names, rows: { [Symbol.iterator]: rows }, byteOrderMark: false },
    `dewledger-budget-${today()}.csv`,
  );
}

/** What each column of the budget file is: one row a column, in the file's order. */
export function exportBudgetDictionary(actor: Actor): Response {
  authorise(actor, "export.create");
  return csvResponse(
    {
      names: ["position", "name", "unit", "meaning"],
      rows: budgetLayout.map(({ name, unit, meaning }, index) => [index + 1, name, unit, meaning]),
      byteOrderMark: false,
    },
    "dewledger-budget-dictionary.csv",
  );
}
