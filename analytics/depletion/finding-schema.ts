import { z } from "zod";

/**
 * What a check of a laboratory's table found, in words. Checks that passed are findings too, so that a reader sees what
 * was looked at. A check that lacks its figures says `warning` and what is missing.
 */
export const findingSchema = z.object({
  /** stable, such as `component_balance` */
  code: z.string(),
  severity: z.enum(["passed", "warning", "failed"]),
  title: z.string(),
  /** in words, with figures */
  message: z.string(),
  /** 0-based row of the table, null when it is about the whole */
  row: z.number().int().nullable(),
  /** path inside the row, such as `liquidPercent` or `producedGas.light.C3`; null when it is about no single column */
  column: z.string().nullable(),
});
export type Finding = z.infer<typeof findingSchema>;
