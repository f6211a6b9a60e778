import { z } from "zod";
import { estimateInputsSchema } from "@/analytics/volumetrics/inputs-schema";

const pairs = estimateInputsSchema.shape.correlations;

export const correlationsRequestSchema = z.object({ correlations: pairs }).strict();
export type CorrelationsRequest = z.infer<typeof correlationsRequestSchema>;

/** Whether a set of rank correlations is possible, and the nearest one that is. Nothing is changed. */
export const correlationsResponseSchema = z.object({
  possible: z.boolean(),
  /** of the matrix of normal-score correlations; above 0 when it is possible */
  smallestEigenvalue: z.number(),
  /** why not, in words; null when it is possible */
  reason: z.string().nullable(),
  /** null when it is possible */
  nearest: z
    .object({
      correlations: pairs,
      /** largest change of one rank correlation */
      largestChange: z.number(),
      /** pairs that were not listed and are no longer 0 */
      added: z.number().int(),
    })
    .nullable(),
});
export type CorrelationsResponse = z.infer<typeof correlationsResponseSchema>;
