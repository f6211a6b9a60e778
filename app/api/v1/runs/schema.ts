import { z } from "zod";
import { rangeSchema } from "@/analytics/volumetrics/results-schema";
import { runItemStates, runKinds, runScopes, runStates } from "@/models/vocabulary";
import { momentSchema, pageOf, pageQuery, personSchema } from "../common-schema";

/**
 * POST /api/v1/runs. `recalculation` computes many estimates again with the engine of today; approved ones are compared
 * with what is stored and never changed, open ones get their results. `untilSettled` runs one open estimate with more
 * and more trials until its percentiles are known well enough. Imports begin their runs themselves.
 */
export const newRunSchema = z.discriminatedUnion("kind", [
  z.object({ kind: z.literal("recalculation"), scope: z.enum(runScopes) }).strict(),
  z
    .object({
      kind: z.literal("untilSettled"),
      estimateId: z.uuid(),
      /** half-width of the 95 % interval of P90, P50 and P10 of gas and of condensate, as a share of each */
      tolerance: z.number().min(0.0005).max(0.1),
      /** stop here even if they are not */
      mostTrials: z.number().int().min(1_024).max(1_048_576),
    })
    .strict(),
]);
export type NewRunRequest = z.infer<typeof newRunSchema>;

export const runSchema = z.object({
  id: z.uuid(),
  kind: z.enum(runKinds),
  state: z.enum(runStates),
  /** what was asked for, in words */
  title: z.string(),
  createdBy: personSchema.nullable(),
  createdAt: momentSchema,
  startedAt: momentSchema.nullable(),
  finishedAt: momentSchema.nullable(),
  counts: z.object({
    total: z.number().int(),
    waiting: z.number().int(),
    running: z.number().int(),
    done: z.number().int(),
    failed: z.number().int(),
    /** changed by somebody meanwhile, or cancelled before their turn */
    passedOver: z.number().int(),
  }),
  /** from the pace since work last began; null before anything is done after that, and after the end */
  remainingSeconds: z.number().nullable(),
  /** who has computed something of it: "worker 1", "worker 2"; host, process and a random end to administrators */
  workers: z.array(z.string()),
  /** nothing has moved for a while: no worker is there, or all are busy with other work */
  stalled: z.boolean(),
  can: z.object({ cancel: z.boolean(), retry: z.boolean() }),
  version: z.number().int(),
});
export type RunView = z.infer<typeof runSchema>;

export const runsQuery = pageQuery.extend({ state: z.enum(runStates).optional() });
export const runsSchema = pageOf(runSchema);

const place = z.object({ name: z.string(), slug: z.string() });

/** One estimate of a run. */
export const runItemSchema = z.object({
  estimateId: z.uuid(),
  revision: z.number().int(),
  field: place,
  reservoir: place,
  state: z.enum(runItemStates),
  attempts: z.number().int(),
  /** as in the run's `workers` */
  worker: z.string().nullable(),
  finishedAt: momentSchema.nullable(),
  /** why it failed or was passed over, in words */
  reason: z.string().nullable(),
  /** while it runs: one entry a doubling of trials */
  progress: z
    .array(
      z.object({
        trials: z.number().int(),
        /** largest half-width of a 95 % interval over its percentile, of the percentiles that count */
        worst: z.number(),
        condensateRecoverableStb: rangeSchema,
        standardErrors: rangeSchema,
      }),
    )
    .nullable(),
  outcome: z
    .object({
      trials: z.number().int(),
      engineVersion: z.string(),
      /** of recoverable condensate, STB; null when the estimate had no results */
      before: rangeSchema.nullable(),
      after: rangeSchema,
      standardErrors: rangeSchema,
      /**
       * largest change of P90, P50 or P10 as a share of what it was, signed; null without a before, or from 0. A
       * recalculation has the random numbers of before, so a move is the engine's doing, not chance.
       */
      movedShare: z.number().nullable(),
      /** largest change of the three over the larger standard error of the two; null without a before */
      movedStandardErrors: z.number().nullable(),
      /** only of `untilSettled` */
      settled: z.boolean().nullable(),
    })
    .nullable(),
});
export type RunItemView = z.infer<typeof runItemSchema>;

export const runItemsQuery = pageQuery.extend({
  state: z.enum(runItemStates).optional(),
  /** only those whose figures moved by more than this many standard errors */
  movedBeyond: z.coerce.number().min(0).max(1000).optional(),
});
export const runItemsSchema = pageOf(runItemSchema);
