import type { CompositionSheet, SeparatorStage } from "@/analytics/composition/composition-schema";
import { readComposition } from "@/analytics/composition/read-sheet";
import { cellRows } from "@/analytics/depletion/cell-rows";
import { hoffmannLines, placedStates } from "@/analytics/depletion/check-balance";
import { checkTable } from "@/analytics/depletion/check-table";
import { recoveryCurveOfTable, type TableRecovery } from "@/analytics/depletion/curve-from-table";
import type { DepletionRow, DepletionTable } from "@/analytics/depletion/depletion-table-schema";
import type { Finding } from "@/analytics/depletion/finding-schema";
import { reportedHeptanesPlusMolePercent } from "@/analytics/depletion/lumped-gas";
import { twoPhaseZFromMoles } from "@/analytics/depletion/two-phase-z";
import { DomainError, underPath } from "@/analytics/errors";
import type { Characterisation } from "@/analytics/equation-of-state/characterisation-schema";
import { warningsUnder } from "./warnings-under";

export interface DepletionQuestion {
  sheet: CompositionSheet;
  table: DepletionTable;
  stages: SeparatorStage[];
  characterisation: Characterisation;
}

/**
 * A laboratory's depletion table checked against itself, and what it brings to the surface.
 *
 * @throws {DomainError} with a path into the question
 */
export function describeDepletion({ sheet, table, stages, characterisation }: DepletionQuestion) {
  const { stream, warnings } = underPath("sheet", () => readComposition(sheet));
  const findings = underPath("table", () => checkTable(table, stream));
  const recovery = recoveryCurveOfTable({
    table,
    stream,
    stages,
    characterisation,
    route: "laboratory",
  });
  const states = placedStates(cellRows(table), stream);
  return {
    findings: [...findings, ...recovery.findings],
    rows: table.rows.map((row, index) => {
      const surface = recovery.surface[index];
      return {
        pressurePsia: row.pressurePsia,
        liquidPercent: row.liquidPercent,
        cumulativeProducedMolePercent: row.cumulativeProducedMolePercent,
        gasZ: row.gasZ,
        reportedTwoPhaseZ: row.twoPhaseZ,
        computedTwoPhaseZ: computedTwoPhaseZ(table, row),
        condensateStb: surface?.condensateStb ?? null,
        surfaceGasMscf: surface?.surfaceGasMscf ?? null,
        producingYieldStbPerMmscf: surface?.producingYieldStbPerMmscf ?? null,
        heptanesPlusMolePercent:
          row.producedGas && reportedHeptanesPlusMolePercent(row.producedGas),
      };
    }),
    hoffmann: hoffmannLines(table.temperatureDegF, states).map(({ line }) => ({
      pressurePsia: line.pressurePsia,
      points: line.points.map(({ name, characterisationFactor, logKTimesPressure }) => ({
        name,
        characterisationFactor,
        logKTimesPressure,
      })),
      slope: line.slope,
      intercept: line.intercept,
      rSquared: line.rSquared,
    })),
    curve: recovery.curve && {
      ...recovery.curve,
      ...doubtsOf([...findings, ...recovery.findings], recovery.method),
    },
    /** how the streams were separated at the surface */
    method: recovery.method,
    warnings: warningsUnder("sheet", warnings),
  };
}

/** What a curve carries with it wherever it is copied to: failed checks, each once, and a flash that was given up. */
function doubtsOf(findings: readonly Finding[], method: TableRecovery["method"]) {
  const failed = findings.filter(({ severity }) => severity === "failed");
  const doubts = failed.flatMap(({ code, title, message }, index) => {
    if (failed.findIndex((other) => other.code === code) < index) return [];
    const more = failed.filter((other) => other.code === code).length - 1;
    return `Check “${title}” fails. ${message}${more === 0 ? "" : ` And ${more} more of the kind.`}`;
  });
  if (method === "kValues") {
    doubts.push(
      "The produced gas was separated by Standing’s K values: the equation of state gave no answer.",
    );
  }
  return doubts.length === 0 ? {} : { doubts };
}

/** From the moles left in the cell; null in a row whose figures cannot carry one, which its findings say. */
function computedTwoPhaseZ(table: DepletionTable, row: DepletionRow): number | null {
  const dewPointZ = table.rows[0].gasZ ?? table.rows[0].twoPhaseZ;
  if (dewPointZ === null || row.cumulativeProducedMolePercent === null) return null;
  try {
    return twoPhaseZFromMoles(row.pressurePsia, row.cumulativeProducedMolePercent / 100, {
      pressurePsia: table.dewPointPsia,
      gasZ: dewPointZ,
    });
  } catch (error) {
    if (error instanceof DomainError) return null;
    throw error;
  }
}
