import { z } from "zod";
import { distributionSchema } from "@/analytics/uncertainty/distribution-schema";
import { rangeFitSchema } from "@/analytics/uncertainty/fit-schema";
import { rangeSchema } from "@/analytics/volumetrics/results-schema";

export const distributionRequestSchema = z
  .object({
    distribution: distributionSchema,
    points: z.number().int().min(2).max(400).default(80).describe("points of the density curve"),
  })
  .strict();
export type DistributionRequest = z.infer<typeof distributionRequestSchema>;

const supportSchema = z.object({ low: z.number().nullable(), high: z.number().nullable() });

export const distributionResponseSchema = z.object({
  range: rangeSchema,
  standardDeviation: z.number(),
  /** null where there is no end */
  support: supportSchema,
  /** probability that the truncation cut away; of scenarios, over all cases */
  lostMass: z.number(),
  /**
   * densities per unit of what has no chance of its own, from the 0.1 % to the 99.9 % quantile or from end to end; one
   * point with a density of 0 for a constant
   */
  curve: z.object({ values: z.array(z.number()), densities: z.array(z.number()) }),
  /** values with chances of their own, ascending: a constant, a case that is one, equal values among data */
  atoms: z.array(z.object({ value: z.number(), probability: z.number() })),
  /** how percentiles, data or ends that are percentiles became the distribution; null for the other kinds */
  fit: rangeFitSchema.nullable(),
  /** of scenarios, in their order; null for the other kinds */
  cases: z
    .array(
      z.object({
        name: z.string(),
        weight: z.number(),
        range: rangeSchema,
        standardDeviation: z.number(),
        support: supportSchema,
        lostMass: z.number(),
        fit: rangeFitSchema.nullable(),
      }),
    )
    .nullable(),
});
export type DistributionResponse = z.infer<typeof distributionResponseSchema>;
