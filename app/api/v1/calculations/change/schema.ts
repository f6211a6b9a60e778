import { z } from "zod";
import { changeExplanationSchema } from "@/analytics/sensitivity/sensitivity-schema";
import { samplingMethods } from "@/analytics/uncertainty/sampling-schema";
import { estimateInputsSchema } from "@/analytics/volumetrics/inputs-schema";
import { resultNames } from "@/analytics/volumetrics/results-schema";

const side = z
  .object({
    inputs: estimateInputsSchema,
    seed: z.number().int().min(0).max(2_147_483_647),
    trials: z.number().int().min(1_000).max(1_048_576),
    sampling: z.enum(samplingMethods),
  })
  .strict();

/** How much of the move of a percentile from one estimate to another each difference explains. */
export const changeRequestSchema = z
  .object({
    from: side,
    to: side,
    result: z.enum(resultNames),
    percentile: z.enum(["p90", "p50", "p10"]).default("p50"),
  })
  .strict();
export type ChangeRequest = z.infer<typeof changeRequestSchema>;

export const changeResponseSchema = changeExplanationSchema;
