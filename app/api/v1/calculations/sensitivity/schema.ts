import { z } from "zod";
import {
  sensitivityAnswerSchema,
  sensitivityParts,
  sensitivitySchema,
} from "@/analytics/sensitivity/sensitivity-schema";
import { samplingMethods } from "@/analytics/uncertainty/sampling-schema";
import { estimateInputsSchema } from "@/analytics/volumetrics/inputs-schema";
import { resultNames } from "@/analytics/volumetrics/results-schema";

/** What drives one result of an estimate. Inputs, seed, method and trials of a revision give that revision's trials. */
export const sensitivityRequestSchema = z
  .object({
    inputs: estimateInputsSchema,
    seed: z.number().int().min(0).max(2_147_483_647).default(1),
    trials: z.number().int().min(1_000).max(65_536).optional(),
    sampling: z.enum(samplingMethods).optional(),
    result: z.enum(resultNames),
    /** cumulative probabilities of the trials to look at: 0.9 to 1 are those above P10 */
    chosen: z
      .object({ from: z.number().min(0).max(1), to: z.number().min(0).max(1) })
      .strict()
      .refine(({ from, to }) => to - from >= 0.01, "must be at least 1 % of the trials")
      .default({ from: 0.9, to: 1 }),
    /** what is wanted; all of it unless said. Other chosen trials alone need only "conditional". */
    parts: z.array(z.enum(sensitivityParts)).min(1).max(sensitivityParts.length).optional(),
  })
  .strict();
export type SensitivityRequest = z.infer<typeof sensitivityRequestSchema>;

/** The number of trials and the parts asked for. */
export const sensitivityResponseSchema = sensitivityAnswerSchema;
/** All parts, when none were named. */
export const wholeSensitivitySchema = sensitivitySchema;
/** What the chosen trials have in common, when that alone was asked for. */
export const conditionalResponseSchema = sensitivitySchema.pick({
  trials: true,
  conditional: true,
});
