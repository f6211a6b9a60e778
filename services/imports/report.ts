import { z } from "zod";
import { problemSchema } from "./problem";

/** What is kept of an import beside the file itself: what each row would do, or did. */

export const rowActions = ["create", "revise", "unchanged", "refused"] as const;

export const changeSchema = z.object({ what: z.string(), before: z.string(), after: z.string() });

export const reportRowSchema = z.object({
  line: z.number().int(),
  basin: z.string(),
  field: z.string(),
  reservoir: z.string(),
  action: z.enum(rowActions),
  changes: z.array(changeSchema),
  problems: z.array(problemSchema),
  warnings: z.array(problemSchema),
  /** words of the address of the reservoir's screen; `null` while there is none */
  fieldSlug: z.string().nullable(),
  reservoirSlug: z.string().nullable(),
  /** the revision that the row made or changed and that has to be run; `null` when there is none */
  estimateId: z.string().nullable(),
});
export type ReportRow = z.infer<typeof reportRowSchema>;

export const importReportSchema = z.object({
  delimiter: z.enum([",", ";", "\t"]),
  encoding: z.enum(["utf-8", "utf-16le", "windows-1252"]),
  /** why the file as a whole cannot be read; then there are no rows */
  problems: z.array(problemSchema),
  warnings: z.array(problemSchema),
  /** rows left alone because they begin with # */
  remarks: z.number().int(),
  rows: z.array(reportRowSchema),
  /** what was taken when the import was carried out; `null` before */
  taken: z.enum(["all", "good"]).nullable(),
});
export type ImportReport = z.infer<typeof importReportSchema>;

/** Rows by what is done with them. */
export function countActions(rows: readonly ReportRow[]): Record<ReportRow["action"], number> {
  const counts = { create: 0, revise: 0, unchanged: 0, refused: 0 };
  for (const row of rows) counts[row.action] += 1;
  return counts;
}
