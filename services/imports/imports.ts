import { createHash, randomUUID } from "node:crypto";
import type { Import } from "@/models/import";
import {
  createImportRow,
  findAppliedTwin,
  findImport,
  findImportWithCreator,
  listImportsPage,
  lockImports,
} from "@/models/queries/imports";
import { recordAudit } from "../audit";
import { now, today } from "../clock";
import { ConflictError, ForbiddenError, NotFoundError } from "../errors";
import { toPage, type Page, type PageRequest } from "../paging";
import { authorise, can, type Actor } from "../policy";
import { createImportRun } from "../runs/create-run";
import { runOfImport, type ImportRun } from "../runs/imports";
import { findObject, putObject } from "../storage/storage";
import { inTransaction } from "../transaction";
import { Applier } from "./apply";
import { loadBook } from "./load-book";
import { planRow, type Book, type RefusedPlan, type RowPlan } from "./plan";
import type { ReadRow } from "./read-row";
import { readRows } from "./read-rows";
import { readTable, type Table } from "./read-table";
import { countActions, importReportSchema, type ImportReport, type ReportRow } from "./report";

/** A file as it came in. */
export interface UploadedFile {
  name: string;
  bytes: Uint8Array;
}

/** An import with its report, its neighbours and how far its runs are. */
export interface ImportFile {
  row: Import;
  report: ImportReport;
  sameFileAs: Import | null;
  /** null until rows are taken, and when none of them had to be run */
  run: ImportRun | null;
}

export async function listImports(actor: Actor, page: PageRequest): Promise<Page<Import>> {
  authorise(actor, "import.read");
  return toPage(await listImportsPage(page), page);
}

/** One import whole. */
export async function getImport(actor: Actor, id: string): Promise<ImportFile> {
  authorise(actor, "import.read");
  const row = await findImportWithCreator(id);
  if (!row) throw new NotFoundError("import");
  return withProgress(row);
}

async function withProgress(row: Import): Promise<ImportFile> {
  const report = importReportSchema.parse(row.report);
  const [sameFileAs, run] = await Promise.all([
    findAppliedTwin(row.sha256, row.id),
    runOfImport(row.id),
  ]);
  return { row, report, sameFileAs, run };
}

/** Who may change what besides estimates, for the plan. */
function permissionsOf(actor: Actor) {
  return {
    actorId: actor.id,
    mayUpdateField: can(actor, "field.update"),
    mayUpdateCommercial: can(actor, "field.updateCommercial"),
  };
}

type Plan = RowPlan | RefusedPlan;

function planRows(actor: Actor, rows: readonly ReadRow[], book: Book): Plan[] {
  const may = permissionsOf(actor);
  return rows.map((read) =>
    read.kind === "good"
      ? planRow(read.row, book, may)
      : { ...read.row, action: "refused", changes: [], warnings: [] },
  );
}

function toReportRow(plan: Plan): ReportRow {
  const { line, basin, field, reservoir, action, changes, warnings } = plan;
  const inBook = plan.action === "refused" ? null : plan;
  return {
    line,
    basin,
    field,
    reservoir,
    action,
    changes,
    warnings,
    problems: plan.action === "refused" ? plan.problems : [],
    fieldSlug: inBook?.bookReservoir ? (inBook.bookField?.slug ?? null) : null,
    reservoirSlug: inBook?.bookReservoir?.slug ?? null,
    estimateId: null,
  };
}

function reportOf(table: Table, rows: ReportRow[]): ImportReport {
  return {
    delimiter: table.delimiter,
    encoding: table.encoding,
    problems: table.problems,
    warnings: table.warnings,
    remarks: table.remarkLines.length,
    rows,
    taken: null,
  };
}

function countsOf(rows: readonly ReportRow[]) {
  const { create, revise, unchanged, refused } = countActions(rows);
  return {
    rowsTotal: rows.length,
    rowsGood: create + revise + unchanged,
    rowsBad: refused,
    rowsUnchanged: unchanged,
  };
}

/** Reads a file, keeps it as it came, and says what importing it would do. Nothing in the book changes yet. */
export async function createImport(actor: Actor, file: UploadedFile): Promise<ImportFile> {
  authorise(actor, "import.create");
  const id = randomUUID();
  const storageKey = `imports/${id}.csv`;
  const table = readTable(file.bytes);
  const read = readRows(table, today());
  const book = await loadBook(read.map(({ row }) => row));
  const rows = planRows(actor, read, book).map(toReportRow);
  await putObject(storageKey, file.bytes, "text/csv");

  await inTransaction(async (transaction) => {
    const at = now();
    const values = {
      id,
      fileName: file.name,
      sha256: createHash("sha256").update(file.bytes).digest("hex"),
      storageKey,
      state: table.problems.length > 0 ? ("failed" as const) : ("checked" as const),
      ...countsOf(rows),
      createdBy: actor.id,
      createdAt: at,
      updatedAt: at,
    };
    await createImportRow({ ...values, report: reportOf(table, rows) }, { transaction });
    const { fileName, sha256, rowsGood, rowsBad } = values;
    await recordAudit(
      {
        actor,
        action: "import.uploaded",
        entity: "import",
        entityId: id,
        after: { fileName, sha256, rowsGood, rowsBad },
      },
      transaction,
    );
  });
  return getImport(actor, id);
}

async function readStoredRows(row: Import): Promise<ReadRow[]> {
  const stored = await findObject(row.storageKey);
  const sha256 = stored && createHash("sha256").update(stored.body).digest("hex");
  if (!stored || sha256 !== row.sha256) {
    throw new ConflictError(
      "The file of this import is no longer in the store as it was. Choose it again.",
      "file_gone",
    );
  }
  return readRows(readTable(stored.body), today());
}

/**
 * Takes the rows of a checked file into the book, in one transaction, and asks the worker for their runs. The plan is
 * made anew against the book as it is now, so what was done since the preview is respected. Asked again, it answers
 * with what was done and does nothing.
 *
 * @param take  `all`: every row, or none when one is refused; `good`: the rows that are good
 * @throws {ConflictError} when the file could not be read, or `all` was asked and a row is refused
 */
export async function commitImport(
  actor: Actor,
  id: string,
  take: "all" | "good",
): Promise<ImportFile> {
  authorise(actor, "import.create");
  const found = await findImport(id);
  if (!found) throw new NotFoundError("import");
  if (found.createdBy !== actor.id) {
    throw new ForbiddenError("Only the person who brought this file in can take it into the book.");
  }
  if (found.state === "failed") {
    throw new ConflictError("This file could not be read, so it has no rows.", "unreadable_file");
  }
  if (found.state !== "checked") return getImport(actor, id);
  const read = await readStoredRows(found);

  await inTransaction(async (transaction) => {
    await lockImports(transaction);
    const row = await findImport(id, { transaction, lock: true });
    if (row?.state !== "checked") return;
    const book = await loadBook(
      read.map(({ row: readRow }) => readRow),
      transaction,
    );
    const plans = planRows(actor, read, book);
    const refused = plans.filter(({ action }) => action === "refused").length;
    if (take === "all" && refused > 0) {
      throw new ConflictError(
        `${refused} ${refused === 1 ? "row is" : "rows are"} refused, so nothing was taken. Repair the file, or take the good rows alone.`,
        "rows_refused",
      );
    }

    const applier = new Applier(actor, id, book);
    const rows: ReportRow[] = [];
    for (const plan of plans) {
      const reportRow = toReportRow(plan);
      rows.push(
        plan.action === "refused" || plan.action === "unchanged"
          ? reportRow
          : { ...reportRow, ...(await applier.apply(plan)) },
      );
    }

    const counts = countsOf(rows);
    const rowsApplied = counts.rowsGood - counts.rowsUnchanged;
    const estimateIds = rows.flatMap(({ estimateId }) => (estimateId ? [estimateId] : []));
    const hasRuns = estimateIds.length > 0;
    const report = importReportSchema.parse(row.report);
    row.set({
      ...counts,
      rowsApplied,
      state: hasRuns ? "applying" : "applied",
      progress: hasRuns ? 0 : 1,
      report: { ...report, rows, taken: take },
      updatedAt: now(),
    });
    await row.save({ transaction });
    await recordAudit(
      {
        actor,
        action: "import.taken",
        entity: "import",
        entityId: id,
        after: { take, rowsApplied, ...counts },
      },
      transaction,
    );
    if (hasRuns) {
      const { fileName } = row;
      await createImportRun(actor, { importId: id, fileName, estimateIds }, transaction);
    }
  });
  return getImport(actor, id);
}
