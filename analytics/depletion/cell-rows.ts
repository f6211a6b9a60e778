/** The rows of a depletion table that a balance can follow, and where it has to stop. */
import { readProducedGas } from "./check-produced-gas";
import type { DepletionTable } from "./depletion-table-schema";
import { asReported, rowName } from "./findings";
import type { CellConditions, CellRow } from "./material-balance";

export interface CellRows {
  /** null when the gas z at the dew point is missing */
  readonly cell: CellConditions | null;
  /** below the dew point, each with its place in the table */
  readonly rows: readonly { readonly row: number; readonly values: CellRow }[];
  /** first figure that is missing or impossible, in words; nothing below that row is followed. null when all rows serve */
  readonly stop: { readonly row: number; readonly column: string; readonly reason: string } | null;
}

/**
 * Collects rows until one lacks a figure. A row that gives neither produced wellstream nor gas is only a liquid
 * reading: it takes nothing out of the balance and is passed over.
 */
export function cellRows(table: DepletionTable): CellRows {
  const dewPointZ = table.rows[0].gasZ ?? table.rows[0].twoPhaseZ;
  const rows: { row: number; values: CellRow }[] = [];
  const stopped = (row: number, column: string, reason: string): CellRows => ({
    cell:
      dewPointZ !== null && dewPointZ > 0
        ? { dewPointPsia: table.dewPointPsia, dewPointZ, temperatureDegF: table.temperatureDegF }
        : null,
    rows,
    stop: { row, column, reason },
  });
  if (dewPointZ === null) {
    return stopped(
      0,
      "gasZ",
      "the first row gives no gas z, on which every mole in the cell rests.",
    );
  }
  if (!(dewPointZ > 0)) {
    return stopped(
      0,
      "gasZ",
      `a gas z at the dew point of ${asReported(dewPointZ)} is impossible.`,
    );
  }
  let producedBefore = 0;
  let pressureBefore = table.dewPointPsia;
  for (let row = 1; row < table.rows.length; row += 1) {
    const { pressurePsia, liquidPercent, cumulativeProducedMolePercent, gasZ, producedGas } =
      table.rows[row];
    if (cumulativeProducedMolePercent === null && producedGas === null) continue;
    const name = rowName(table, row);
    if (!(pressurePsia < pressureBefore)) {
      return stopped(row, "pressurePsia", `${name} does not lie below the row before.`);
    }
    if (cumulativeProducedMolePercent === null) {
      return stopped(
        row,
        "cumulativeProducedMolePercent",
        `${name} does not say how much was produced.`,
      );
    }
    const producedFraction = cumulativeProducedMolePercent / 100;
    if (!(producedFraction >= producedBefore && producedFraction < 1)) {
      return stopped(
        row,
        "cumulativeProducedMolePercent",
        `${name} has an impossible cumulative production of ${asReported(cumulativeProducedMolePercent)} %.`,
      );
    }
    if (gasZ === null) return stopped(row, "gasZ", `${name} gives no gas z.`);
    if (!(gasZ > 0)) return stopped(row, "gasZ", `${name} has a gas z of ${asReported(gasZ)}.`);
    if (liquidPercent === null) {
      return stopped(row, "liquidPercent", `${name} gives no liquid percentage.`);
    }
    if (!(liquidPercent >= 0 && liquidPercent < 100)) {
      return stopped(row, "liquidPercent", `${name} has ${asReported(liquidPercent)} % liquid.`);
    }
    const read = readProducedGas(table, row);
    if (read === null) {
      return stopped(row, "producedGas", `${name} gives no composition of its produced gas.`);
    }
    if ("problem" in read) {
      return stopped(row, read.column, `the gas of ${name} cannot be read. ${read.problem}`);
    }
    rows.push({
      row,
      values: {
        pressurePsia,
        producedFraction,
        gasZ,
        liquidFraction: liquidPercent / 100,
        gas: read.gas,
      },
    });
    producedBefore = producedFraction;
    pressureBefore = pressurePsia;
  }
  return {
    cell: { dewPointPsia: table.dewPointPsia, dewPointZ, temperatureDegF: table.temperatureDegF },
    rows,
    stop: null,
  };
}
