/** Checks of the produced gases: do they add up, start at the wellstream, and lose their heavy end as they should? */
import { DomainError } from "../errors";
import { readStream } from "../composition/read-sheet";
import type { DepletionTable } from "./depletion-table-schema";
import type { Finding } from "./finding-schema";
import { CheckReport, psia, rowAtStart, rowName } from "./findings";
import {
  balanceComponents,
  HEPTANES_PLUS,
  lumpStream,
  reportedHeptanesPlusMolePercent,
  reportedTotalMolePercent,
  type LumpedGas,
} from "./lumped-gas";

/** Twelve figures with two decimals, each rounded, add up to 100 within this, mole per cent. */
const ROUNDING_TOTAL = 0.05;
/** Beyond this the sheet is not merely rounded but wrong, mole per cent. */
const WRONG_TOTAL = 1;
const SAME_COMPOSITION = 0.05;
const OTHER_COMPOSITION = 0.5;
/** How far heptanes plus of the gas may rise again at low pressure, share of its minimum. Common practice, no source. */
const REVAPORISATION = 0.5;
/** Below this liquid may come back into the gas until it is richer than the wellstream, psia. */
const REVAPORISING_PSIA = 1000;

/** The produced gas of a row with heptanes plus as one, or why it cannot be read; `null` when none was reported. */
export function readProducedGas(
  table: DepletionTable,
  row: number,
): { gas: LumpedGas } | { problem: string; column: string } | null {
  const reported = table.rows[row].producedGas;
  if (reported === null) return null;
  try {
    return { gas: lumpStream(readStream(reported, "gas", "producedGas").stream) };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return { problem: error.message, column: error.details.input ?? "producedGas" };
  }
}

/** Column of a balance component in the table. */
export function componentColumn(index: number): string {
  return index === HEPTANES_PLUS
    ? "producedGas.plus.molePercent"
    : `producedGas.light.${balanceComponents[index]}`;
}

/** Each produced gas adds up to 100 %. */
export function checkTotals(table: DepletionTable): Finding[] {
  const report = new CheckReport({
    code: "produced_gas_total",
    title: "Each produced gas adds up to 100 %",
  });
  let counted = 0;
  let furthest = 0;
  table.rows.forEach(({ producedGas }, row) => {
    if (producedGas === null) return;
    counted += 1;
    const total = reportedTotalMolePercent(producedGas);
    const off = Math.abs(total - 100);
    furthest = Math.max(furthest, off);
    if (off <= ROUNDING_TOTAL + 1e-9) return;
    const message =
      `The gas of ${rowName(table, row)} adds up to ${total.toFixed(2)} %, ` +
      `${off.toFixed(2)} ${total > 100 ? "too much" : "too little"}.`;
    const place = { row, column: "producedGas" };
    if (off > WRONG_TOTAL) report.fail(`${message} A component is wrong or missing.`, place);
    else report.warn(`${message} It is scaled to 100 % in what follows.`, place);
  });
  if (counted === 0) {
    report.missing("no row gives the composition of its produced gas.", { column: "producedGas" });
  }
  return report.conclude(
    `${counted} gases; the furthest from 100 % is ${furthest.toFixed(2)} off.`,
  );
}

/** The gas at the dew point is the wellstream. */
export function checkDewPointComposition(table: DepletionTable, wellstream: LumpedGas): Finding[] {
  const report = new CheckReport({
    code: "dew_point_composition",
    title: "The dew-point gas is the wellstream",
  });
  const read = readProducedGas(table, 0);
  if (read === null) {
    report.missing("the first row gives no composition; the wellstream's is taken.", {
      row: 0,
      column: "producedGas",
    });
    return report.findings;
  }
  if ("problem" in read) {
    report.fail(`The gas of row 1 cannot be read: ${read.problem}`, {
      row: 0,
      column: read.column,
    });
    return report.findings;
  }
  let worst = 0;
  let largest = 0;
  balanceComponents.forEach((_, index) => {
    const off = 100 * Math.abs(read.gas.moleFractions[index] - wellstream.moleFractions[index]);
    if (off > largest) {
      largest = off;
      worst = index;
    }
  });
  if (largest > SAME_COMPOSITION) {
    const message =
      `${balanceComponents[worst]} is ${(100 * read.gas.moleFractions[worst]).toFixed(2)} % in the first row ` +
      `and ${(100 * wellstream.moleFractions[worst]).toFixed(2)} % in the wellstream. At the dew point they are the same gas.`;
    const place = { row: 0, column: componentColumn(worst) };
    if (largest > OTHER_COMPOSITION) report.fail(message, place);
    else report.warn(message, place);
  }
  return report.conclude(`No component is more than ${largest.toFixed(2)} % apart.`);
}

/** Heptanes plus of the produced gas falls with pressure, then stays about level. */
export function checkHeptanesPlusTrend(table: DepletionTable, wellstream: LumpedGas): Finding[] {
  const report = new CheckReport({
    code: "heptanes_plus_falls",
    title: "Heptanes plus in the gas falls, then levels off",
  });
  const series: { row: number; value: number }[] = [];
  table.rows.forEach(({ producedGas }, row) => {
    if (producedGas === null) return;
    series.push({ row, value: reportedHeptanesPlusMolePercent(producedGas) });
  });
  if (series.length < 3) {
    report.missing("fewer than three rows give the composition of their produced gas.", {
      column: "producedGas",
    });
    return report.findings;
  }
  const column = componentColumn(HEPTANES_PLUS);
  const initial = 100 * wellstream.moleFractions[HEPTANES_PLUS];
  let lowest = Infinity;
  let before: { row: number; value: number } | null = null;
  for (const { row, value } of series) {
    const isLow = table.rows[row].pressurePsia < REVAPORISING_PSIA;
    if (row > 0 && !isLow && value > initial + SAME_COMPOSITION) {
      report.fail(
        `The gas of ${rowName(table, row)} has ${value.toFixed(2)} % heptanes plus, more than the ${initial.toFixed(2)} % ` +
          "of the wellstream. Gas below the dew point is leaner.",
        { row, column },
      );
    } else if (before && value > before.value && value > lowest * (1 + REVAPORISATION)) {
      report.warn(
        `Heptanes plus rises from ${before.value.toFixed(2)} to ${value.toFixed(2)} % in ${rowName(table, row)}. ` +
          "A little revaporisation at low pressure is usual, this much is not.",
        { row, column },
      );
    }
    lowest = Math.min(lowest, value);
    before = { row, value };
  }
  const last = series[series.length - 1];
  return report.conclude(
    `From ${series[0].value.toFixed(2)} % down to ${lowest.toFixed(2)} %, ${last.value.toFixed(2)} % in the last row.`,
  );
}

/** Molecular weight and specific gravity of the gas's heptanes plus fall with pressure: the heaviest drop out first. */
export function checkHeptanesPlusWeight(table: DepletionTable, wellstream: LumpedGas): Finding[] {
  const report = new CheckReport({
    code: "heptanes_plus_weight_falls",
    title: "Heptanes plus in the gas grows lighter",
  });
  const properties = [
    {
      key: "molecularWeight",
      name: "molecular weight",
      digits: 0,
      rounding: 1,
      initial: wellstream.heptanesPlus?.molecularWeight,
    },
    {
      key: "specificGravity",
      name: "specific gravity",
      digits: 3,
      rounding: 0.002,
      initial: wellstream.heptanesPlus?.specificGravity,
    },
  ] as const;
  let counted = 0;
  let first = 0;
  let last = 0;
  for (const { key, name, digits, rounding, initial } of properties) {
    const column = `producedGas.plus.${key}`;
    let before = initial ?? null;
    table.rows.forEach((_, row) => {
      const read = readProducedGas(table, row);
      if (read === null) return;
      if ("problem" in read) {
        if (key === "molecularWeight" && row > 0) {
          report.fail(`The gas of ${rowName(table, row)} cannot be read: ${read.problem}`, {
            row,
            column: read.column,
          });
        }
        return;
      }
      if (read.gas.heptanesPlus === null) return;
      const value = read.gas.heptanesPlus[key];
      if (key === "molecularWeight") {
        counted += 1;
        first ||= value;
        last = value;
      }
      if (row > 0 && before !== null && value > before + rounding) {
        report.warn(
          `${rowAtStart(table, row)}: the ${name} of heptanes plus rises from ${before.toFixed(digits)} to ` +
            `${value.toFixed(digits)}. The heaviest drop out first, so it falls with pressure.`,
          { row, column },
        );
      }
      before = value;
    });
  }
  if (counted < 2) {
    report.missing("fewer than two produced gases have heptanes plus with a molecular weight.", {
      column: "producedGas.plus.molecularWeight",
    });
  }
  return report.conclude(
    `Molecular weight from ${first.toFixed(0)} to ${last.toFixed(0)} at ${psia(table.rows[table.rows.length - 1].pressurePsia)}.`,
  );
}
