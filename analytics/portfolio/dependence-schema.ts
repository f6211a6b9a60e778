import { z } from "zod";

/** Fields that the factors of one set may name, taken together: every total looks each field up in every factor. */
const MOST_NAMED = 2000;

const rank = z.number().min(0).max(0.99);

/**
 * How reservoirs of a portfolio move together: Spearman rank correlations of their recoverable condensate, from the
 * whole portfolio down to the basin, and factors that some fields share on top (one seismic survey, one source rock, one
 * plant). Rows of trials stay whole, so a reservoir's other quantities follow.
 */
export const dependenceSchema = z
  .object({
    /** between any two reservoirs */
    portfolioRank: rank,
    /** between two reservoirs of one basin, by the basin's id; at least `portfolioRank` */
    basinRanks: z.record(z.uuid(), rank),
    /** of basins that are not listed */
    otherBasinsRank: rank,
    sharedFactors: z
      .array(
        z
          .object({
            name: z.string().trim().min(1).max(80),
            /** why these fields move together */
            note: z.string().trim().max(500).default(""),
            /** what the factor alone would make of the rank correlation of two of its fields, which add up */
            rank: rank.min(0.01),
            fieldIds: z.array(z.uuid()).min(2).max(500),
          })
          .strict(),
      )
      .max(20)
      .refine(
        (factors) => factors.reduce((sum, { fieldIds }) => sum + fieldIds.length, 0) <= MOST_NAMED,
        `The factors of a set name at most ${MOST_NAMED.toLocaleString("en-GB")} fields, taken together. Use ranks of basins where whole basins move together.`,
      ),
  })
  .strict();
export type Dependence = z.infer<typeof dependenceSchema>;
