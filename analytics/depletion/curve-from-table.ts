/** The recovery curve that a depletion table carries. */
import type { Stream } from "../composition/stream";
import { ConvergenceError, DomainError } from "../errors";
import type { Characterisation } from "../equation-of-state/characterisation-schema";
import type { RecoveryCurve, RecoveryRoute } from "../recovery/recovery-curve-schema";
import { cellRows } from "./cell-rows";
import type { DepletionTable } from "./depletion-table-schema";
import type { Finding } from "./finding-schema";
import { CheckReport, psia, rowName } from "./findings";
import { gasMolesInCell } from "./material-balance";
import { recoveryCurve, type CellPoint } from "./recovery-curve";
import { separateByKValues } from "./separate-by-k-values";
import { standingKWarnings } from "./standing-k-values";
import {
  streamSeparator,
  surfaceProducts,
  type ProducedStream,
  type Separators,
  type SurfaceProducts,
  type SurfaceRow,
} from "./surface-products";
import { twoPhaseZFromMoles } from "./two-phase-z";

export interface TableRecovery {
  /** null when the table cannot carry one; `findings` say why */
  readonly curve: RecoveryCurve | null;
  /** of 1 MMscf of the wellstream at the dew point; null with the curve */
  readonly initial: SurfaceProducts | null;
  /** for each row of the table; null where nothing can be said */
  readonly surface: readonly (SurfaceRow | null)[];
  /** how the streams were separated */
  readonly method: "equationOfState" | "kValues";
  readonly findings: Finding[];
}

interface CurveRequest {
  readonly table: DepletionTable;
  /** the wellstream, which is the gas at the dew point */
  readonly stream: Stream;
  /** stages that the reservoir no longer reaches are lowered; a function says otherwise */
  readonly stages: Separators;
  /** null flashes with Standing's K values */
  readonly characterisation: Characterisation | null;
  readonly route: RecoveryRoute;
}

const ROUNDING = 1e-9;

/**
 * Recovery from a depletion table: each produced gas flashed through the separators, by the equation of state or, where
 * that is not set up or does not converge, by Standing's K values. It needs produced moles, gas z, liquid percentage and
 * composition row by row, and ends where one is missing. A table whose pressures do not fall has none.
 *
 * @returns  the curve, or `null` with the reason among the findings
 * @throws {DomainError} when a separator stage is impossible
 */
export function recoveryCurveOfTable(request: CurveRequest): TableRecovery {
  const { table, stream, stages, characterisation, route } = request;
  const report = new CheckReport({
    code: "recovery_curve",
    title: "Recovery follows from the table",
  });
  const followed = cellRows(table);
  const { cell, rows } = followed;
  const misplaced = rowOutOfOrder(table);
  if (misplaced !== null) {
    report.fail(
      `There is no recovery curve from this table: ${rowName(table, misplaced)} does not lie below the row before. ` +
        "Put the rows in the order of falling pressure, or correct the pressure.",
      { row: misplaced, column: "pressurePsia" },
    );
  } else if (followed.stop !== null) {
    const { row, column, reason } = followed.stop;
    const consequence =
      rows.length === 0
        ? "There is no recovery curve from this table"
        : `The recovery curve ends at ${psia(rows[rows.length - 1].values.pressurePsia)}`;
    report.warn(`${consequence}: ${reason}`, { row, column });
  }
  const nothing: TableRecovery = {
    curve: null,
    initial: null,
    surface: table.rows.map(() => null),
    method: "kValues",
    findings: report.findings,
  };
  if (misplaced !== null) return nothing;
  if (cell === null || rows.length === 0) {
    if (followed.stop === null) {
      report.warn("There is no recovery curve: no row below the dew point gives produced gas.");
    }
    return nothing;
  }
  sayWhichStagesAreLowered(report, table, stages);

  const streams = rows.map(
    ({ values }, index): ProducedStream<Stream> => ({
      pressurePsia: values.pressurePsia,
      stepMoles:
        values.producedFraction - (index === 0 ? 0 : rows[index - 1].values.producedFraction),
      gas: values.gas.stream,
    }),
  );
  const dewPoint = { pressurePsia: cell.dewPointPsia, gas: stream };
  const separated = separateAll(report, dewPoint, streams, stages, characterisation);
  const points = rows.map(
    ({ values }): CellPoint => ({
      ...values,
      gasMoles: gasMolesInCell(values, cell),
      twoPhaseZ: twoPhaseZFromMoles(values.pressurePsia, values.producedFraction, {
        pressurePsia: cell.dewPointPsia,
        gasZ: cell.dewPointZ,
      }),
    }),
  );
  const curve = recoveryCurve(
    route,
    {
      pressurePsia: cell.dewPointPsia,
      temperatureDegF: cell.temperatureDegF,
      gasZ: cell.dewPointZ,
    },
    points,
    separated,
  );
  const surface: (SurfaceRow | null)[] = table.rows.map(() => null);
  surface[0] = {
    pressurePsia: cell.dewPointPsia,
    condensateStb: 0,
    surfaceGasMscf: 0,
    stageGasMscf: separated.initial.stageGasMscf.map(() => 0),
    produced: separated.initial,
    producingYieldStbPerMmscf: curve.points[0].producingYieldStbPerMmscf,
  };
  rows.forEach(({ row }, index) => (surface[row] = separated.rows[index]));
  const result = { ...nothing, surface, method: separated.method, initial: separated.initial };
  if (curve.points.length < 2) {
    report.warn("There is no recovery curve: nothing is produced below the dew point.");
    return result;
  }
  const impossible = curve.points.find(
    (point) =>
      point.condensateProduced + point.condensateInGas > 1 + ROUNDING || point.gasProduced > 1,
  );
  if (impossible) {
    report.fail(
      `At ${psia(impossible.pressurePsia)} more comes out than was there: ` +
        `${(100 * impossible.condensateProduced).toFixed(1)} % of the condensate produced and ` +
        `${(100 * impossible.condensateInGas).toFixed(1)} % in the gas. The table contradicts itself; no curve is drawn.`,
      { row: table.rows.findIndex(({ pressurePsia }) => pressurePsia === impossible.pressurePsia) },
    );
    return result;
  }
  const last = curve.points[curve.points.length - 1];
  return {
    ...result,
    curve,
    findings: report.conclude(
      `Down to ${psia(last.pressurePsia)} ${(100 * last.condensateProduced).toFixed(1)} % of the condensate and ` +
        `${(100 * last.gasProduced).toFixed(1)} % of the surface gas are produced.`,
    ),
  };
}

/** First row whose pressure does not lie below the one before; null when all fall. */
function rowOutOfOrder({ rows }: DepletionTable): number | null {
  const row = rows.findIndex(
    ({ pressurePsia }, index) => index > 0 && !(pressurePsia < rows[index - 1].pressurePsia),
  );
  return row < 0 ? null : row;
}

function sayWhichStagesAreLowered(
  report: CheckReport,
  table: DepletionTable,
  stages: Separators,
): void {
  if (typeof stages === "function") return;
  const separators = stages.slice(0, -1);
  const row = table.rows.findIndex(({ pressurePsia }) =>
    separators.some((stage) => stage.pressurePsia >= pressurePsia),
  );
  if (row < 0) return;
  const { pressurePsia } = table.rows[row];
  const highest = Math.max(...separators.map((stage) => stage.pressurePsia));
  report.warn(
    `From ${psia(pressurePsia)} down the reservoir no longer reaches the separator at ${psia(highest)}; ` +
      "from there it is run at half the reservoir's pressure.",
    { row, column: "pressurePsia" },
  );
}

/** By the equation of state; by K values, with a word about it, where that is missing or fails. */
function separateAll(
  report: CheckReport,
  dewPoint: { readonly pressurePsia: number; readonly gas: Stream },
  streams: readonly ProducedStream<Stream>[],
  stages: Separators,
  characterisation: Characterisation | null,
) {
  if (characterisation !== null) {
    try {
      return {
        method: "equationOfState" as const,
        ...surfaceProducts(dewPoint, streams, stages, streamSeparator(characterisation)),
      };
    } catch (error) {
      const isStage =
        error instanceof DomainError && (error.details.input ?? "").startsWith("stages");
      if (isStage || !(error instanceof DomainError || error instanceof ConvergenceError)) {
        throw error;
      }
      report.warn(
        `The equation of state does not separate these streams (${error.message}). Standing's K values are used instead.`,
      );
    }
  } else {
    report.warn(
      "No equation of state is set up; the streams are separated by Standing's K values.",
    );
  }
  const atDewPoint = typeof stages === "function" ? stages(dewPoint.pressurePsia) : stages;
  for (const { pressurePsia, temperatureDegF } of atDewPoint) {
    for (const { message } of standingKWarnings(pressurePsia, temperatureDegF))
      report.warn(message);
  }
  return {
    method: "kValues" as const,
    ...surfaceProducts(dewPoint, streams, stages, separateByKValues),
  };
}
