import {
  checkFirstRow,
  checkGasZ,
  checkLiquidCurve,
  checkPressures,
  checkProduced,
} from "@/analytics/depletion/check-rows";
import type { DepletionTable } from "@/analytics/depletion/depletion-table-schema";
import type { Finding } from "@/analytics/depletion/finding-schema";
import type { Cells } from "./grid-paste";

/** Checks that need nothing but the table's own columns: made before there is a composition. */
export const rowChecks = (table: DepletionTable): Finding[] => [
  ...checkPressures(table),
  ...checkFirstRow(table),
  ...checkProduced(table),
  ...checkLiquidCurve(table),
  ...checkGasZ(table),
];

export const rowFailures = (table: DepletionTable): Finding[] =>
  rowChecks(table).filter(({ severity }) => severity === "failed");

/**
 * Failed checks at the cells that they are about, by place in the grid; the first one of a cell.
 *
 * @param rowsOfTable  rows of the grid that the table's rows stand in
 */
export function failuresAtCells(
  findings: readonly Finding[],
  rowsOfTable: readonly number[],
): Cells {
  return Object.fromEntries(
    findings
      .flatMap(({ severity, row, column, message }) =>
        severity === "failed" && row !== null && column !== null
          ? [[`rows.${rowsOfTable[row] ?? row}.${column}`, message] as const]
          : [],
      )
      .reverse(),
  );
}
