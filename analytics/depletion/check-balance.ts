/** Checks of a depletion table against the conservation of moles and mass. */
import { balanceComponents, lumpStream } from "./lumped-gas";
import type { CellRows } from "./cell-rows";
import { componentColumn } from "./check-produced-gas";
import type { DepletionTable } from "./depletion-table-schema";
import type { Finding } from "./finding-schema";
import { asReported, CheckReport, rowAtStart, rowName } from "./findings";
import { hoffmannLine, OUTLIER_LOG_RATIO, type HoffmannLine } from "./hoffmann";
import { balanceCell, type CellState } from "./material-balance";
import { twoPhaseZFromMoles } from "./two-phase-z";
import type { Stream } from "../composition/stream";

/** Rounding of z, produced wellstream and pressure together. */
const Z_ROUNDING = 0.002;
const Z_WRONG = 0.015;
/** Too little liquid for its composition to mean much, fraction of the cell. */
const LITTLE_LIQUID = 0.01;
/** Retrograde liquids at reservoir temperature, lb/ft3; outside is flagged. Common practice, no source. */
const PLAUSIBLE_DENSITY = { low: 22, high: 55 };
/** How much lighter the liquid may become from one row to the next. Common practice, no source. */
const LIGHTER = { density: 0.03, molecularWeight: 0.03 };
const STRAIGHT = { passed: 0.98, poor: 0.95 };

/** A row's place in the table, with the cell's state there. */
export interface PlacedState {
  readonly row: number;
  readonly liquidFraction: number;
  readonly state: CellState;
}

/** The cell row by row, as far as the table can be followed. */
export function placedStates(followed: CellRows, wellstream: Stream): PlacedState[] {
  if (followed.cell === null) return [];
  const states = balanceCell(
    lumpStream(wellstream),
    followed.cell,
    followed.rows.map(({ values }) => values),
  );
  return states.map((state, index) => ({
    row: followed.rows[index].row,
    liquidFraction: followed.rows[index].values.liquidFraction,
    state,
  }));
}

const NOTHING_FOLLOWED = "no row below the dew point has all the figures of a balance.";

/** Reported two-phase z against the one from moles. */
export function checkTwoPhaseZ(table: DepletionTable): Finding[] {
  const report = new CheckReport({
    code: "two_phase_z",
    title: "Two-phase z agrees with the moles",
  });
  const column = "twoPhaseZ";
  const dewPointZ = table.rows[0].gasZ ?? table.rows[0].twoPhaseZ;
  if (dewPointZ === null || !(dewPointZ > 0)) {
    report.missing("the first row gives no z.", { row: 0, column: "gasZ" });
    return report.findings;
  }
  let counted = 0;
  let furthest = 0;
  table.rows.forEach((values, row) => {
    const { pressurePsia, twoPhaseZ, cumulativeProducedMolePercent: produced } = values;
    if (twoPhaseZ === null || produced === null || !(produced >= 0 && produced < 100)) return;
    const fromMoles = twoPhaseZFromMoles(pressurePsia, produced / 100, {
      pressurePsia: table.dewPointPsia,
      gasZ: dewPointZ,
    });
    const off = Math.abs(twoPhaseZ - fromMoles);
    counted += 1;
    furthest = Math.max(furthest, off);
    if (off <= Z_ROUNDING) return;
    const message =
      `${rowAtStart(table, row)} reports a two-phase z of ${asReported(twoPhaseZ)}; ${asReported(produced)} % produced makes it ` +
      `${fromMoles.toFixed(4)}. Either figure may be wrong.`;
    if (off > Z_WRONG) report.fail(message, { row, column });
    else report.warn(message, { row, column });
  });
  if (counted === 0) {
    report.missing(
      "no row gives a two-phase z together with the produced wellstream, so produced moles have nothing to be set against.",
      { column },
    );
  }
  return report.conclude(
    `${counted} figures; the furthest is ${furthest.toFixed(4)} off what the moles give.`,
  );
}

/** Moles at the dew point = produced + gas left + liquid left, with something left for the liquid. */
export function checkClosure(
  table: DepletionTable,
  followed: CellRows,
  states: readonly PlacedState[],
): Finding[] {
  const report = new CheckReport({
    code: "moles_close",
    title: "Produced, gas and liquid add up",
  });
  for (const { row, liquidFraction, state } of states) {
    const rounding = state.roundingMoles.reduce((sum, value) => sum + value, 0);
    const share = `${(100 * state.liquidMoles).toFixed(2)} %`;
    if (state.liquidMoles < -rounding) {
      report.fail(
        `${rowAtStart(table, row)}: what was produced and the gas left in the cell make ` +
          `${(100 - 100 * state.liquidMoles).toFixed(2)} % of the fluid, more than there was. ` +
          "The gas z, the produced wellstream or the liquid is wrong.",
        { row, column: "gasZ" },
      );
    } else if (liquidFraction > LITTLE_LIQUID && state.liquidMoles < rounding) {
      report.fail(
        `${rowAtStart(table, row)} has ${(100 * liquidFraction).toFixed(1)} % liquid by volume, but only ${share} of the moles ` +
          "are left for it.",
        { row, column: "liquidPercent" },
      );
    }
  }
  if (followed.stop !== null) {
    const { row, column, reason } = followed.stop;
    report.missing(`from here on the moles cannot be followed: ${reason}`, { row, column });
  }
  const last = states[states.length - 1];
  return report.conclude(
    last
      ? `At the end ${(100 * last.state.gasMoles).toFixed(1)} % of the moles are gas and ${(100 * last.state.liquidMoles).toFixed(1)} % liquid.`
      : "Nothing below the dew point.",
  );
}

/** The balance of each component leaves no less than nothing of it in the liquid. */
export function checkComponents(table: DepletionTable, states: readonly PlacedState[]): Finding[] {
  const report = new CheckReport({
    code: "component_balance",
    title: "Every component is left in the liquid",
  });
  for (const { row, state } of states) {
    state.liquidComponentMoles.forEach((moles, index) => {
      if (moles >= 0) return;
      const rounding = state.roundingMoles[index];
      const message =
        `${balanceComponents[index]} in ${rowName(table, row)}: the balance leaves ${(100 * moles).toFixed(3)} mole per cent ` +
        "of the dew-point fluid in the liquid, less than nothing.";
      const place = { row, column: componentColumn(index) };
      if (moles < -2 * rounding) {
        report.fail(`${message} More of it came out than was there.`, place);
      } else if (moles < -1e-9) {
        report.warn(
          `${message} Rounding of the figures explains up to ${(100 * rounding).toFixed(3)}.`,
          place,
        );
      }
    });
  }
  if (states.length === 0) report.missing(NOTHING_FOLLOWED);
  return report.conclude(
    `${balanceComponents.length} components balanced forward through ${states.length} steps; none falls below nothing.`,
  );
}

/** The liquid of the balance weighs what a condensate weighs, and grows heavier as pressure falls. */
export function checkLiquid(table: DepletionTable, states: readonly PlacedState[]): Finding[] {
  const report = new CheckReport({
    code: "liquid_density",
    title: "The liquid weighs what a condensate weighs",
  });
  const column = "liquidPercent";
  let before: { density: number; molecularWeight: number; row: number } | null = null;
  const densities: number[] = [];
  for (const { row, liquidFraction, state } of states) {
    if (liquidFraction < LITTLE_LIQUID) continue;
    if (state.liquid === null) {
      report.fail(`${rowAtStart(table, row)}: the balance leaves no mass for the liquid.`, {
        row,
        column,
      });
      continue;
    }
    const { densityLbPerCubicFoot: density, molecularWeight } = state.liquid;
    densities.push(density);
    if (density < PLAUSIBLE_DENSITY.low || density > PLAUSIBLE_DENSITY.high) {
      report.fail(
        `${rowAtStart(table, row)}: mass and volume make the liquid ${density.toFixed(1)} lb/ft³. Condensates at reservoir ` +
          `conditions weigh ${PLAUSIBLE_DENSITY.low} to ${PLAUSIBLE_DENSITY.high}.`,
        { row, column },
      );
    } else if (before && density < before.density * (1 - LIGHTER.density)) {
      report.warn(
        `The liquid becomes lighter, from ${before.density.toFixed(1)} lb/ft³ in ${rowName(table, before.row)} to ` +
          `${density.toFixed(1)} in ${rowName(table, row)}. It grows heavier as its light ends leave; ` +
          "the liquid percentage or the gas z of either row may be wrong.",
        { row, column },
      );
    } else if (before && molecularWeight < before.molecularWeight * (1 - LIGHTER.molecularWeight)) {
      report.warn(
        `The liquid's molecular weight falls from ${before.molecularWeight.toFixed(0)} in ${rowName(table, before.row)} to ` +
          `${molecularWeight.toFixed(0)} in ${rowName(table, row)}. It rises as light ends leave.`,
        { row, column },
      );
    }
    before = { density, molecularWeight, row };
  }
  if (states.length === 0) report.missing(NOTHING_FOLLOWED);
  return report.conclude(
    densities.length > 0
      ? `${Math.min(...densities).toFixed(1)} to ${Math.max(...densities).toFixed(1)} lb/ft³, growing heavier with falling pressure.`
      : "No row has enough liquid to weigh.",
  );
}

/** The Hoffmann lines of the rows that have enough liquid. */
export function hoffmannLines(
  temperatureDegF: number,
  states: readonly PlacedState[],
): { readonly row: number; readonly line: HoffmannLine }[] {
  return states.flatMap(({ row, liquidFraction, state }) => {
    if (liquidFraction < LITTLE_LIQUID) return [];
    const line = hoffmannLine(state.pressurePsia, temperatureDegF, state.kValues);
    return line ? [{ row, line }] : [];
  });
}

/** The K values lie on a straight Hoffmann plot that steepens with falling pressure. */
export function checkHoffmann(
  table: DepletionTable,
  lines: readonly { readonly row: number; readonly line: HoffmannLine }[],
): Finding[] {
  const report = new CheckReport({
    code: "hoffmann_plot",
    title: "K values lie on a straight Hoffmann plot",
  });
  let before: { row: number; slope: number } | null = null;
  for (const { row, line } of lines) {
    if (line.rSquared < STRAIGHT.passed) {
      const message =
        `${rowAtStart(table, row)}: the K values of the hydrocarbons scatter about their line (R² ${line.rSquared.toFixed(3)}). ` +
        "Gas and liquid were not in equilibrium, or a figure is wrong.";
      if (line.rSquared < STRAIGHT.poor) report.fail(message, { row, column: "producedGas" });
      else report.warn(message, { row, column: "producedGas" });
    }
    for (const point of line.points) {
      if (!point.isOutlier) continue;
      report.warn(
        `${point.name} in ${rowName(table, row)} lies ${Math.abs(point.residual).toFixed(2)} ` +
          `${point.residual > 0 ? "above" : "below"} the line in log10(Kp); usual are ${OUTLIER_LOG_RATIO} at most.`,
        { row, column: componentColumn(balanceComponents.indexOf(point.name)) },
      );
    }
    if (before && line.slope < before.slope) {
      report.warn(
        `The line is flatter in ${rowName(table, row)} (slope ${line.slope.toFixed(3)}) than in ` +
          `${rowName(table, before.row)} (${before.slope.toFixed(3)}). It steepens as gas and liquid part.`,
        { row, column: "producedGas" },
      );
    }
    before = { row, slope: line.slope };
  }
  if (lines.length === 0) {
    report.missing("no step gives the K values of four hydrocarbons.", { column: "producedGas" });
  }
  const worst = Math.min(...lines.map(({ line }) => line.rSquared));
  return report.conclude(`${lines.length} lines, R² at least ${worst.toFixed(3)}.`);
}
