import { z } from "zod";
import { rankedClasses } from "@/analytics/portfolio/ranking";
import {
  chosenDependenceSchema,
  chosenPricesSchema,
  groupTotalSchema,
  ledgerRangesSchema,
  rankedFieldSchema,
} from "../fields/ranking-schema";

const place = { name: z.string(), fieldSlug: z.string() };

/** Something that somebody should look at. */
export const attentionSchema = z.discriminatedUnion("kind", [
  z.object({
    kind: z.enum(["submitted", "returned"]),
    ...place,
    revisions: z.array(
      z.object({ reservoirName: z.string(), reservoirSlug: z.string(), revision: z.number() }),
    ),
    days: z.number(),
    changeStb: z.number().nullable(),
  }),
  z.object({
    kind: z.literal("field"),
    ...place,
    spread: z.number().nullable(),
    share: z.number(),
    samples: z.number(),
    cautions: z.array(z.string()),
    hydrogenSulphide: z.number().nullable(),
  }),
  z.object({
    kind: z.literal("unmeasured"),
    fields: z.array(z.object(place)),
    share: z.number(),
  }),
  z.object({ kind: z.literal("no_estimate"), names: z.array(z.string()) }),
  z.object({
    kind: z.literal("basin"),
    name: z.string(),
    shareOfVariance: z.number(),
    rankCorrelation: z.number(),
  }),
  z.object({ kind: z.literal("price"), condensateMeanStb: z.number() }),
]);
export type AttentionView = z.infer<typeof attentionSchema>;

/** GET /api/v1/portfolio. Volumes in scf (14.696 psia, 60 degF) and STB, values in the currency of the deck. */
export const statementSchema = z.object({
  /** today, YYYY-MM-DD */
  asOf: z.string(),
  prices: chosenPricesSchema.nullable(),
  dependence: chosenDependenceSchema,
  /** fields in the figures */
  counted: z.number(),
  /** fields that are not, and are not counted as zero */
  leftOut: z.array(z.object({ name: z.string(), slug: z.string(), open: z.boolean() })),
  totals: groupTotalSchema
    .extend({
      condensateExceedance: z.object({
        values: z.array(z.number()),
        probabilities: z.array(z.number()),
      }),
      /** chance that the total reaches the sum of the fields' P90s */
      chanceOfSummedP90: z.number(),
    })
    .nullable(),
  /** the largest ten by mean recoverable condensate */
  fields: z.array(rankedFieldSchema),
  shares: z.array(z.object({ name: z.string(), condensateMeanStb: z.number() })),
  /** the fields after the largest ten */
  others: groupTotalSchema.nullable(),
  basins: z.array(
    z.object({
      id: z.uuid(),
      slug: z.string(),
      name: z.string(),
      fields: z.number(),
      ranges: ledgerRangesSchema,
      /** by covariance with the total; the shares of all basins add up to 1 */
      shareOfVariance: z.number(),
      condensateMeanStbByClass: z.record(z.enum(rankedClasses), z.number().nullable()),
    }),
  ),
  attention: z.array(attentionSchema),
  /** revisions in force a year ago against those of now, at today's interests and prices; null for a young book */
  year: z
    .object({
      since: z.string(),
      condensatePerStb: z.number().nullable(),
      condensateMeanBeforeStb: z.number(),
      salesGasMeanBeforeScf: z.number(),
      moves: z.array(
        z.object({
          slug: z.string(),
          name: z.string(),
          isNew: z.boolean(),
          changeStb: z.number(),
        }),
      ),
    })
    .nullable(),
  engine: z.object({ versions: z.array(z.string()), trials: z.number() }).nullable(),
});
export type Statement = z.infer<typeof statementSchema>;
