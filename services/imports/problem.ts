import { z } from "zod";

/** Something wrong, or worth a look, in one cell, one row or the whole file. */
export const problemSchema = z.object({
  /** line of the file on which the row begins, counted from 1; `null` for the file as a whole */
  line: z.number().int().nullable(),
  column: z.string().nullable(),
  /** what stood in the cell, as typed */
  value: z.string().nullable(),
  /** why, and what to do, in words */
  reason: z.string(),
});

export type Problem = z.infer<typeof problemSchema>;
