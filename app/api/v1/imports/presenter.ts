import type { Import } from "@/models/import";
import type { ImportFile } from "@/services/imports/imports";
import { countActions, type ReportRow } from "@/services/imports/report";
import type { Actor } from "@/services/policy";
import { presentMoment, presentPerson } from "../common-presenter";
import type { ImportDetail, ImportQuery, ImportSummary, RowKind } from "./schema";

export function presentImport(row: Import): ImportSummary {
  return {
    id: row.id,
    fileName: row.fileName,
    sha256: row.sha256,
    state: row.state,
    createdAt: presentMoment(row.createdAt),
    createdBy: presentPerson(row.creator),
    rowsTotal: row.rowsTotal,
    rowsGood: row.rowsGood,
    rowsBad: row.rowsBad,
    rowsApplied: row.rowsApplied,
    rowsUnchanged: row.rowsUnchanged,
    progress: row.progress,
  };
}

function isShown(row: ReportRow, show: RowKind): boolean {
  if (show === "all") return true;
  if (show === "flagged") return row.action !== "refused" && row.warnings.length > 0;
  return row.action === show;
}

/** An import with one page of its rows. */
export function presentImportFile(
  { row, report, sameFileAs, run }: ImportFile,
  actor: Actor,
  { show, limit, offset }: ImportQuery = { show: "all", limit: 50, offset: 0 },
): ImportDetail {
  const shown = report.rows.filter((reportRow) => isShown(reportRow, show));
  return {
    ...presentImport(row),
    progress: run ? run.ended / run.total : row.progress,
    delimiter: report.delimiter,
    encoding: report.encoding,
    problems: report.problems,
    warnings: report.warnings,
    remarks: report.remarks,
    counts: {
      ...countActions(report.rows),
      flagged: report.rows.filter((reportRow) => isShown(reportRow, "flagged")).length,
    },
    taken: report.taken,
    sameFileAs: sameFileAs && {
      id: sameFileAs.id,
      createdAt: presentMoment(sameFileAs.createdAt),
      createdBy: presentPerson(sameFileAs.creator),
    },
    mayCommit: row.state === "checked" && row.createdBy === actor.id,
    runs: presentRun(run, report.rows),
    rows: { items: shown.slice(offset, offset + limit), total: shown.length, limit, offset },
  };
}

function presentRun(run: ImportFile["run"], rows: readonly ReportRow[]): ImportDetail["runs"] {
  if (run === null) return { id: null, total: 0, done: 0, failed: [], waiting: false };
  const failed = rows.flatMap(({ line, field, reservoir, estimateId }) => {
    const reason = estimateId === null ? undefined : run.failed.get(estimateId);
    return reason === undefined ? [] : [{ line, reservoir: `${field}, ${reservoir}`, reason }];
  });
  return { id: run.id, total: run.total, done: run.ended, failed, waiting: run.stalled };
}
