import { z } from "zod";
import { momentSchema, pageOf, pageQuery, personSchema } from "../common-schema";
import { importStates } from "@/models/vocabulary";
import { problemSchema } from "@/services/imports/problem";
import { reportRowSchema, rowActions } from "@/services/imports/report";

export const importQuery = pageQuery.extend({
  /** only rows of this kind; `flagged` are good rows with something worth a look */
  show: z.enum(["all", ...rowActions, "flagged"]).default("all"),
});
export type ImportQuery = z.infer<typeof importQuery>;
export type RowKind = ImportQuery["show"];

export const commitBody = z
  .object({
    rows: z
      .enum(["all", "good"])
      .describe("all: every row or, when one is refused, none; good: the rows that are good"),
  })
  .strict();

export const importSummarySchema = z.object({
  id: z.uuid(),
  fileName: z.string(),
  sha256: z.string(),
  state: z.enum(importStates),
  createdAt: momentSchema,
  createdBy: personSchema.nullable(),
  rowsTotal: z.number().int(),
  rowsGood: z.number().int(),
  rowsBad: z.number().int(),
  rowsApplied: z.number().int(),
  rowsUnchanged: z.number().int(),
  /** of the runs that follow, 0 to 1 */
  progress: z.number(),
});
export type ImportSummary = z.infer<typeof importSummarySchema>;

export const importListSchema = pageOf(importSummarySchema);

export const importSchema = importSummarySchema.extend({
  delimiter: z.enum([",", ";", "\t"]),
  encoding: z.string(),
  /** why the file as a whole cannot be read */
  problems: z.array(problemSchema),
  warnings: z.array(problemSchema),
  remarks: z.number().int(),
  counts: z.object({
    create: z.number().int(),
    revise: z.number().int(),
    unchanged: z.number().int(),
    refused: z.number().int(),
    flagged: z.number().int(),
  }),
  taken: z.enum(["all", "good"]).nullable(),
  /** an earlier import of the very same file that is in the book */
  sameFileAs: z
    .object({ id: z.uuid(), createdAt: momentSchema, createdBy: personSchema.nullable() })
    .nullable(),
  mayCommit: z.boolean(),
  runs: z.object({
    /** of the run that computes them; null while there is none */
    id: z.uuid().nullable(),
    total: z.number().int(),
    done: z.number().int(),
    failed: z.array(
      z.object({ line: z.number().int(), reservoir: z.string(), reason: z.string() }),
    ),
    /** nothing has moved for a while: the worker process is away or busy with other work */
    waiting: z.boolean(),
  }),
  rows: pageOf(reportRowSchema),
});
export type ImportDetail = z.infer<typeof importSchema>;
