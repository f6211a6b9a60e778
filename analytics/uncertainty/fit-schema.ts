import { z } from "zod";
import { dataShapes, percentileFamilies } from "./distribution-schema";

/** How figures that somebody gave became a distribution, and how well they fit. In the quantity's own unit. */

const limitsSchema = z.object({ low: z.number(), mode: z.number(), high: z.number() });

const testSchema = z.object({
  statistic: z.number(),
  /** chance of a statistic this large when the values do come from such a distribution; null with too few values */
  pValue: z.number().nullable(),
});

export const goodnessSchema = z.object({
  andersonDarling: testSchema,
  lilliefors: testSchema,
  /** one of the p-values is below 0.05 */
  contradicted: z.boolean(),
  /** what the two tests say, in a sentence */
  meaning: z.string(),
});
export type Goodness = z.infer<typeof goodnessSchema>;

export const rangeFitSchema = z.discriminatedUnion("kind", [
  /** of a triangular or PERT range whose low and high are percentiles: the limits that were solved for */
  z.object({ kind: z.literal("limits"), limits: limitsSchema }),
  z.object({
    kind: z.literal("percentiles"),
    family: z.enum(percentileFamilies),
    /** in the order they were asked for; `given` is what the distribution has there, within its bounds */
    points: z.array(z.object({ exceedance: z.number(), asked: z.number(), given: z.number() })),
    /** largest difference between asked and given, as a share of the distance between the outermost points */
    largestResidual: z.number(),
    /** of a triangular or PERT distribution */
    limits: limitsSchema.nullable(),
  }),
  z.object({
    kind: z.literal("data"),
    shape: z.enum(dataShapes),
    sampleSize: z.number().int(),
    /** of the values, divisor n - 1 for the standard deviation */
    mean: z.number(),
    standardDeviation: z.number(),
    /** of maximum likelihood: of the values (normal) or of their natural logarithms (lognormal); null for empirical */
    parameters: z.object({ mean: z.number(), standardDeviation: z.number() }).nullable(),
    /** whichever shape was chosen; null for the lognormal when a value is 0 or below */
    tests: z.object({ normal: goodnessSchema, lognormal: goodnessSchema.nullable() }),
    /** stairs of the values: the share of them that is at most `values[i]`, ascending, ties once; 200 steps at most, evenly chosen */
    stairs: z.object({ values: z.array(z.number()), shares: z.array(z.number()) }),
  }),
]);
export type RangeFit = z.infer<typeof rangeFitSchema>;
export type DataFitReport = Extract<RangeFit, { kind: "data" }>;
export type PercentilesFitReport = Extract<RangeFit, { kind: "percentiles" }>;
