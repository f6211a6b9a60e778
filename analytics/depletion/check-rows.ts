/** Checks of a depletion table that need nothing but its own columns: order, first row, ranges and turning points. */
import type { DepletionTable } from "./depletion-table-schema";
import type { Finding } from "./finding-schema";
import { asReported, CheckReport, psia, rowName, rowAtStart } from "./findings";

/** A pressure may be off the dew point by its rounding, psi. */
const SAME_PRESSURE_PSI = 0.5;
/** Last digit of a reported liquid percentage. */
const LIQUID_DIGIT = 0.1;
/** More liquid than this, per cent of the cell, only drops out near the critical point. Common practice, no source. */
const NEAR_CRITICAL_LIQUID = 25;
/** Last digit of a reported z. */
const Z_DIGIT = 0.001;

/** Pressures fall from row to row, and stay below the dew point after the first. */
export function checkPressures(table: DepletionTable): Finding[] {
  const report = new CheckReport({ code: "pressures_fall", title: "Pressures fall" });
  const column = "pressurePsia";
  table.rows.forEach(({ pressurePsia }, row) => {
    if (row === 0) return;
    const before = table.rows[row - 1].pressurePsia;
    if (!(pressurePsia < before)) {
      report.fail(
        `${rowAtStart(table, row)} does not lie below ${rowName(table, row - 1)}. Pressures of a depletion fall.`,
        { row, column },
      );
    } else if (pressurePsia >= table.dewPointPsia) {
      report.fail(
        `${rowAtStart(table, row)} does not lie below the dew point of ${psia(table.dewPointPsia)}.`,
        { row, column },
      );
    }
  });
  const last = table.rows[table.rows.length - 1];
  return report.conclude(
    `${table.rows.length} rows from ${psia(table.rows[0].pressurePsia)} down to ${psia(last.pressurePsia)}, each below the last.`,
  );
}

/** The first row is the dew point: nothing produced, no liquid. */
export function checkFirstRow(table: DepletionTable): Finding[] {
  const report = new CheckReport({
    code: "starts_at_dew_point",
    title: "First row is the dew point",
  });
  const first = table.rows[0];
  const at = (column: string) => ({ row: 0, column });
  if (Math.abs(first.pressurePsia - table.dewPointPsia) > SAME_PRESSURE_PSI) {
    report.fail(
      `The first row is at ${psia(first.pressurePsia)}, but the dew point is ${psia(table.dewPointPsia)}. ` +
        "A depletion is counted from the dew point.",
      at("pressurePsia"),
    );
  }
  if (first.cumulativeProducedMolePercent !== null && first.cumulativeProducedMolePercent !== 0) {
    report.fail(
      `${asReported(first.cumulativeProducedMolePercent)} % of the fluid is already produced in the first row; at the dew point nothing is.`,
      at("cumulativeProducedMolePercent"),
    );
  }
  if (first.liquidPercent !== null && first.liquidPercent !== 0) {
    report.fail(
      `The first row has ${asReported(first.liquidPercent)} % liquid; at the dew point there is none yet.`,
      at("liquidPercent"),
    );
  }
  return report.conclude(
    `Nothing is produced and no liquid has dropped out at ${psia(table.dewPointPsia)}, the dew point.`,
  );
}

/** Produced wellstream only grows, between 0 and 100 %. */
export function checkProduced(table: DepletionTable): Finding[] {
  const report = new CheckReport({ code: "produced_grows", title: "Produced wellstream grows" });
  const column = "cumulativeProducedMolePercent";
  let before: { row: number; value: number } | null = null;
  let counted = 0;
  table.rows.forEach(({ cumulativeProducedMolePercent: value }, row) => {
    if (value === null) return;
    counted += 1;
    if (!(value >= 0 && value <= 100)) {
      report.fail(
        `${rowAtStart(table, row)} has ${asReported(value)} % produced; it lies between 0 and 100.`,
        {
          row,
          column,
        },
      );
      return;
    }
    if (before && value < before.value) {
      report.fail(
        `${rowAtStart(table, row)} has ${asReported(value)} % produced, less than the ${asReported(before.value)} % of ${rowName(table, before.row)}. ` +
          "What has been produced does not go back.",
        { row, column },
      );
    }
    before = { row, value };
  });
  if (counted < 2) {
    report.missing("fewer than two rows give the cumulative produced wellstream.", { column });
  }
  return report.conclude(`${counted} figures, each at least the one before, none above 100 %.`);
}

interface Reading {
  readonly row: number;
  readonly value: number;
}

/** Readings at which a series turns back after having changed direction once, beyond its rounding. */
function secondTurns(series: readonly Reading[], digit: number, firstDirection: 1 | -1): Reading[] {
  let extreme = -Infinity;
  let turned = false;
  let trough = Infinity;
  return series.filter(({ value }) => {
    const along = firstDirection * value;
    if (!turned) {
      extreme = Math.max(extreme, along);
      turned = along < extreme - digit;
      if (turned) trough = along;
      return false;
    }
    const turnsBack = along > trough + digit;
    trough = turnsBack ? along : Math.min(trough, along);
    return turnsBack;
  });
}

/** Liquid lies between 0 and 100 %, rises to one maximum and then falls. */
export function checkLiquidCurve(table: DepletionTable): Finding[] {
  const report = new CheckReport({
    code: "liquid_curve",
    title: "Liquid rises once, then falls",
  });
  const column = "liquidPercent";
  const series: { row: number; value: number }[] = [];
  table.rows.forEach(({ liquidPercent: value }, row) => {
    if (value === null) return;
    if (!(value >= 0 && value < 100)) {
      report.fail(
        `${rowAtStart(table, row)} has ${asReported(value)} % liquid; it lies between 0 and 100.`,
        {
          row,
          column,
        },
      );
      return;
    }
    series.push({ row, value });
  });
  if (series.length < 3) {
    report.missing("fewer than three rows give a liquid percentage.", { column });
    return report.findings;
  }
  for (const { row, value } of secondTurns(series, LIQUID_DIGIT, 1)) {
    report.warn(
      `Liquid rises again to ${asReported(value)} % in ${rowName(table, row)} after it had begun to fall. ` +
        "Retrograde liquid has one maximum; look at this figure and the one before.",
      { row, column },
    );
  }
  const top = series.reduce((most, point) => (point.value > most.value ? point : most));
  return report.conclude(
    `The most liquid is ${asReported(top.value)} % in ${rowName(table, top.row)}; it rises before and falls after.`,
  );
}

/**
 * The gas z is plausible and has one minimum. A fluid that drops much liquid at once is near its critical point, where
 * its gas changes so much that z may turn twice.
 */
export function checkGasZ(table: DepletionTable): Finding[] {
  const report = new CheckReport({ code: "gas_z_curve", title: "Gas z falls once, then rises" });
  const column = "gasZ";
  const series: { row: number; value: number }[] = [];
  table.rows.forEach(({ gasZ: value }, row) => {
    if (value === null) return;
    if (!(value > 0.3 && value < 2)) {
      report.fail(
        `${rowAtStart(table, row)} has a gas z of ${asReported(value)}. Reservoir gases lie between about 0.6 and 1.8.`,
        { row, column },
      );
      return;
    }
    series.push({ row, value });
  });
  if (series.length < 3) {
    report.missing("fewer than three rows give a gas z.", { column });
    return report.findings;
  }
  const mostLiquid = Math.max(...table.rows.map(({ liquidPercent }) => liquidPercent ?? 0));
  const turns = mostLiquid > NEAR_CRITICAL_LIQUID ? [] : secondTurns(series, Z_DIGIT, -1);
  for (const { row, value } of turns) {
    report.warn(
      `The gas z falls again to ${asReported(value)} in ${rowName(table, row)} after it had begun to rise. ` +
        "Along a depletion it has one minimum.",
      { row, column },
    );
  }
  return report.conclude(
    mostLiquid > NEAR_CRITICAL_LIQUID
      ? `${series.length} plausible figures. With ${mostLiquid.toFixed(1)} % liquid the fluid is near-critical, and its z may turn twice.`
      : `${series.length} figures with one minimum at most.`,
  );
}
