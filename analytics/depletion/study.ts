/** Everything that a laboratory's depletion study says: its checks, what it brings to the surface, its curve. */
import type { SeparatorStage } from "../composition/composition-schema";
import type { Stream } from "../composition/stream";
import { characterisationWarnings } from "../equation-of-state/characterise";
import type { Characterisation } from "../equation-of-state/characterisation-schema";
import type { RecoveryCurve } from "../recovery/recovery-curve-schema";
import type { Warning } from "../warnings";
import { cellRows } from "./cell-rows";
import { hoffmannLines, placedStates } from "./check-balance";
import { checkTable } from "./check-table";
import { recoveryCurveOfTable } from "./curve-from-table";
import type { DepletionTable } from "./depletion-table-schema";
import type { Finding } from "./finding-schema";
import type { HoffmannLine } from "./hoffmann";
import { reportedHeptanesPlusMolePercent } from "./lumped-gas";
import { twoPhaseZFromMoles } from "./two-phase-z";

export interface StudyRow {
  readonly pressurePsia: number;
  readonly liquidPercent: number | null;
  readonly cumulativeProducedMolePercent: number | null;
  readonly gasZ: number | null;
  readonly reportedTwoPhaseZ: number | null;
  /** from the produced moles */
  readonly computedTwoPhaseZ: number | null;
  /** cumulative, per MMscf of wellstream at the dew point */
  readonly condensateStb: number | null;
  readonly surfaceGasMscf: number | null;
  readonly producingYieldStbPerMmscf: number | null;
  /** heptanes plus in the produced gas, mole per cent as reported */
  readonly heptanesPlusMolePercent: number | null;
}

export interface DepletionStudy {
  readonly findings: Finding[];
  readonly rows: StudyRow[];
  readonly hoffmann: readonly HoffmannLine[];
  /** null when the table cannot carry one; the findings say why */
  readonly curve: RecoveryCurve | null;
  readonly warnings: Warning[];
}

function computedTwoPhaseZ(table: DepletionTable, row: number): number | null {
  const { pressurePsia, cumulativeProducedMolePercent: produced } = table.rows[row];
  const dewPointZ = table.rows[0].gasZ ?? table.rows[0].twoPhaseZ;
  if (dewPointZ === null || !(dewPointZ > 0)) return null;
  if (produced === null || !(produced >= 0 && produced < 100)) return null;
  return twoPhaseZFromMoles(pressurePsia, produced / 100, {
    pressurePsia: table.dewPointPsia,
    gasZ: dewPointZ,
  });
}

/**
 * Reads a depletion study: checks it against itself, flashes what it produced through the separators, and draws the
 * recovery curve that it carries. See `checkTable` and `recoveryCurveOfTable`.
 *
 * @param stream            the wellstream, which is the gas at the dew point
 * @param stages            separators in the direction of flow, the stock tank last
 * @param characterisation  of the equation of state that separates the streams; null takes Standing's K values
 * @throws {DomainError} when a separator stage is impossible
 */
export function readDepletionStudy(request: {
  readonly table: DepletionTable;
  readonly stream: Stream;
  readonly stages: readonly SeparatorStage[];
  readonly characterisation: Characterisation | null;
}): DepletionStudy {
  const { table, stream, characterisation } = request;
  const recovery = recoveryCurveOfTable({ ...request, route: "laboratory" });
  const states = placedStates(cellRows(table), stream);
  return {
    findings: [...checkTable(table, stream), ...recovery.findings],
    rows: table.rows.map((values, row) => {
      const surface = recovery.surface[row];
      return {
        pressurePsia: values.pressurePsia,
        liquidPercent: values.liquidPercent,
        cumulativeProducedMolePercent: values.cumulativeProducedMolePercent,
        gasZ: values.gasZ,
        reportedTwoPhaseZ: values.twoPhaseZ,
        computedTwoPhaseZ: computedTwoPhaseZ(table, row),
        condensateStb: surface?.condensateStb ?? null,
        surfaceGasMscf: surface?.surfaceGasMscf ?? null,
        producingYieldStbPerMmscf: surface?.producingYieldStbPerMmscf ?? null,
        heptanesPlusMolePercent:
          values.producedGas === null ? null : reportedHeptanesPlusMolePercent(values.producedGas),
      };
    }),
    hoffmann: hoffmannLines(table.temperatureDegF, states).map(({ line }) => line),
    curve: recovery.curve,
    warnings: characterisation === null ? [] : characterisationWarnings(stream, characterisation),
  };
}
