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
  { row, report, sameFileAs, runs }: ImportFile,
  actor: Actor,
  { show, limit, offset }: ImportQuery = { show: "all", limit: 50, offset: 0 },
): ImportDetail {
  const shown = report.rows.filter((reportRow) => isShown(reportRow, show));
  return {
    ...presentImport(row),
    progress: runs.total === 0 ? row.progress : runs.done / runs.total,
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
    runs: {
      ...runs,
      failed: report.rows.flatMap(({ line, field, reservoir, estimateId }) =>
        estimateId !== null && estimateId in report.failedRuns
          ? [{ line, reservoir: `${field}, ${reservoir}`, reason: report.failedRuns[estimateId] }]
          : [],
      ),
    },
    rows: { items: shown.slice(offset, offset + limit), total: shown.length, limit, offset },
  };
}
