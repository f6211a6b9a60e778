import { z } from "zod";
import { rankedClasses, estimateFilters } from "@/analytics/portfolio/ranking";
import {
  defaultRankingColumns,
  orderColumns,
  rankingColumnIds,
} from "@/analytics/portfolio/ranking-columns";
import { recoveryRoutes } from "@/analytics/recovery/recovery-curve-schema";
import { producingConcepts } from "@/analytics/recovery/recovery-plan-schema";
import { rangeSchema } from "@/analytics/volumetrics/results-schema";
import { basisSchema } from "@/components/basis/basis";

/** "saltmarrow,corrith" or a name given twice -> a list without repeats. */
const listOf = <Item extends z.ZodType<string, string>>(item: Item, most = 200) =>
  z
    .union([z.string(), z.array(z.string())])
    .optional()
    .transform((given) => [
      ...new Set((Array.isArray(given) ? given : [given ?? ""]).flatMap((part) => part.split(","))),
    ])
    .transform((parts) => parts.filter((part) => part !== ""))
    .pipe(z.array(item).max(most));

const yieldBound = z.coerce.number().min(0).max(1e6).optional();

/** The filter of the ranking, as its address has it. */
export const rankingFilterSchema = z.object({
  /** part of the name of a field, its basin or its operator */
  search: z.string().max(100).default(""),
  /** slugs, separated by commas */
  basin: listOf(z.string().max(100)),
  class: listOf(z.enum(rankedClasses)),
  /** state of the field's estimates; `none` has no estimate on this basis */
  state: listOf(z.enum(estimateFilters)),
  /** ids of responsible engineers */
  engineer: listOf(z.uuid()),
  /** STB per MMscf of surface gas */
  yieldFrom: yieldBound,
  yieldTo: yieldBound,
});

export const rankingOrderSchema = z.object({
  sort: z.enum(["name", ...rankingColumnIds]).default("liquidValueMean"),
  direction: z.enum(["ascending", "descending"]).default("descending"),
});

const columnsSchema = listOf(z.enum(rankingColumnIds)).transform((ids) =>
  ids.length === 0 ? [...defaultRankingColumns] : orderColumns(ids),
);

/** GET /api/v1/fields */
export const rankingQuerySchema = basisSchema
  .extend(rankingFilterSchema.shape)
  .extend(rankingOrderSchema.shape)
  .extend({
    limit: z.coerce.number().int().min(1).max(1000).default(200),
    offset: z.coerce.number().int().min(0).default(0),
  });

/** GET /api/v1/exports/ranking.csv: the ranking's own address, with its columns and without paging. */
export const rankingExportQuerySchema = basisSchema
  .extend(rankingFilterSchema.shape)
  .extend(rankingOrderSchema.shape)
  .extend({ columns: columnsSchema });

/** GET /api/v1/fields/together */
export const togetherQuerySchema = basisSchema.extend({
  ids: listOf(z.uuid(), 1000).refine((ids) => ids.length > 0, "say which fields"),
});

export const chosenPricesSchema = z.object({
  deckId: z.uuid(),
  deckName: z.string(),
  deckVersion: z.number(),
  asOfOn: z.string(),
  currency: z.string(),
  case: z.enum(["low", "mid", "high"]),
  condensatePerStb: z.number().nullable(),
  gasPerMscf: z.number().nullable(),
});

export type ChosenPricesView = z.infer<typeof chosenPricesSchema>;

/** Volumes in scf (14.696 psia, 60 degF) and STB, values in the currency of the deck. */
export const ledgerRangesSchema = z.object({
  wetGasInPlaceScf: rangeSchema,
  dryGasInPlaceScf: rangeSchema,
  condensateInPlaceStb: rangeSchema,
  salesGasScf: rangeSchema,
  condensateRecoverableStb: rangeSchema,
  /** null where the deck has no such price */
  liquidValue: rangeSchema.nullable(),
  gasValue: rangeSchema.nullable(),
});

export const rankedFieldSchema = z.object({
  id: z.uuid(),
  slug: z.string(),
  name: z.string(),
  basin: z.object({ id: z.uuid(), slug: z.string(), name: z.string() }),
  operator: z.string(),
  prmsClass: z.enum(rankedClasses),
  prmsSubClass: z.string(),
  workingInterest: z.number(),
  netRevenueInterest: z.number(),
  chanceOfCommerciality: z.number(),
  engineer: z.object({ id: z.uuid(), name: z.string() }).nullable(),
  condensateYieldStbPerMmscf: z.number().nullable(),
  hydrogenSulphide: z.number().nullable(),
  cautions: z.array(z.string()),
  /** the least trusted route among the revisions in `chosen`; null when all recoveries were entered */
  recoveryRoute: z.enum(recoveryRoutes).nullable(),
  chosen: z.array(
    z.object({
      estimateId: z.uuid(),
      reservoirName: z.string(),
      reservoirSlug: z.string(),
      revision: z.number(),
      state: z.enum(["draft", "submitted", "approved", "returned", "superseded"]),
      effectiveOn: z.string().nullable(),
      engineVersion: z.string().nullable(),
      seed: z.number(),
      trials: z.number(),
      /** null when recoveries were entered */
      recoveryRoute: z.enum(recoveryRoutes).nullable(),
      producingConcept: z.enum(producingConcepts).nullable(),
    }),
  ),
  /** reservoirs without an estimate on this basis */
  leftOut: z.array(z.object({ reservoirName: z.string() })),
  open: z.array(
    z.object({
      reservoirName: z.string(),
      reservoirSlug: z.string(),
      revision: z.number(),
      state: z.enum(["draft", "submitted", "returned"]),
    }),
  ),
  ranges: ledgerRangesSchema.nullable(),
  rank: z.number().nullable(),
  rankRange: z.object({ low: z.number(), high: z.number() }).nullable(),
});

/** The dependence set that totals stand on. */
export const chosenDependenceSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  isDefault: z.boolean(),
});

const percentilesSchema = rangeSchema.pick({ p90: true, p50: true, p10: true });

/** What a field brings to a total's recoverable condensate, STB. */
export const contributionSchema = z.object({
  fieldId: z.uuid(),
  slug: z.string(),
  name: z.string(),
  /** Cov(field, total) / Var(total); may be below 0, adds up to 1 */
  shareOfVariance: z.number(),
  mean: z.number(),
  /** what it holds on average when the total comes out at its own P90, P50 and P10: they add up to these */
  p90: z.number(),
  p50: z.number(),
  p10: z.number(),
  /** one standard error of each of these, of sampling alone; they do not add up */
  standardErrors: rangeSchema.optional(),
});
export type ContributionView = z.infer<typeof contributionSchema>;

/** A group of fields: added up trial by trial, and the sum of the column apart. */
export const groupTotalSchema = z.object({
  /** fields counted; those without an estimate are not */
  fields: z.number(),
  trialByTrial: ledgerRangesSchema,
  arithmeticSum: ledgerRangesSchema,
  /** trial by trial less the arithmetic sum */
  diversification: z.object({
    condensateRecoverableStb: percentilesSchema,
    /** null where the deck has no condensate price */
    liquidValue: percentilesSchema.nullable(),
  }),
  /** one standard error of the total's recoverable condensate [STB], of sampling alone; on the safe side */
  standardErrors: rangeSchema,
  /** chance that none of the fields comes, 0 to 1; null unless the risk is `yesNo` */
  chanceOfNothing: z.number().nullable(),
  /** every field counted, the largest mean first */
  contributions: z.array(contributionSchema),
});
export type GroupTotalView = z.infer<typeof groupTotalSchema>;

export const rankingSchema = z.object({
  items: z.array(rankedFieldSchema),
  /** rows that match the filter */
  total: z.number(),
  limit: z.number(),
  offset: z.number(),
  /** fields in the book, whatever the filter */
  fieldsInAll: z.number(),
  /** of all rows that match, not of the page; null when none of them has an estimate */
  totals: groupTotalSchema.nullable(),
  prices: chosenPricesSchema.nullable(),
  dependence: chosenDependenceSchema,
  /** which field comes first by liquid value in most trials of the whole portfolio */
  leader: z.object({ name: z.string(), chance: z.number() }).nullable(),
  /** lowest P90 and highest P10 of the liquid value among the rows, for one scale over all pages */
  scale: z.object({ low: z.number(), high: z.number() }).nullable(),
  /** what can be filtered by */
  choices: z.object({
    basins: z.array(z.object({ slug: z.string(), name: z.string() })),
    engineers: z.array(z.object({ id: z.uuid(), name: z.string() })),
    yieldStbPerMmscf: z.object({ low: z.number(), high: z.number() }).nullable(),
  }),
  engine: z.object({ versions: z.array(z.string()), trials: z.number() }).nullable(),
});
export type Ranking = z.infer<typeof rankingSchema>;
export type RankingRow = z.infer<typeof rankedFieldSchema>;

export const togetherSchema = z.object({
  total: groupTotalSchema.nullable(),
  prices: chosenPricesSchema.nullable(),
  dependence: chosenDependenceSchema,
});
export type Together = z.infer<typeof togetherSchema>;
