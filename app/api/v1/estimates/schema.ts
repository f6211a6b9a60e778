import { z } from "zod";
import { recoveryRoutes } from "@/analytics/recovery/recovery-curve-schema";
import { samplingMethods } from "@/analytics/uncertainty/sampling-schema";
import { estimateInputsSchema } from "@/analytics/volumetrics/inputs-schema";
import { simulationSummarySchema } from "@/analytics/volumetrics/results-schema";
import { estimateStates } from "@/models/vocabulary";
import { dateSchema, momentSchema, noteSchema, pageQuery, personSchema } from "../common-schema";

export const estimatePatchSchema = z
  .object({
    inputs: estimateInputsSchema.optional(),
    /** naming a sample copies its sheet into the inputs; null cuts the tie and leaves the sheet */
    fluidSampleId: z.uuid().nullable().optional(),
    note: noteSchema.optional(),
    seed: z.number().int().min(0).max(2_147_483_647).optional(),
    /** a power of two, at least 1,024, with scrambled Sobol points */
    trials: z.number().int().min(1_000).max(1_048_576).optional(),
    sampling: z.enum(samplingMethods).optional(),
  })
  .strict();
export type EstimatePatchRequest = z.infer<typeof estimatePatchSchema>;

/** Without inputs the draft begins as a copy of the approved estimate. */
export const newEstimateSchema = estimatePatchSchema;
export type NewEstimateRequest = EstimatePatchRequest;

export const submitEstimateSchema = z.object({ note: noteSchema.optional() }).strict();
export const approveEstimateSchema = z
  .object({ note: noteSchema.optional(), effectiveOn: dateSchema.optional() })
  .strict();
export const returnEstimateSchema = z
  .object({ note: noteSchema.min(1, "Say what should change.") })
  .strict();

export const estimatesQuery = pageQuery.extend({
  state: z.enum(estimateStates).optional(),
  reservoirId: z.uuid().optional(),
});

/** A revision as lists and histories show it. */
export const estimateRowSchema = z.object({
  id: z.uuid(),
  reservoirId: z.uuid(),
  revision: z.number().int(),
  state: z.enum(estimateStates),
  fluidSampleId: z.uuid().nullable(),
  seed: z.number().int(),
  trials: z.number().int(),
  sampling: z.enum(samplingMethods),
  engineVersion: z.string().nullable(),
  computedAt: momentSchema.nullable(),
  note: z.string(),
  creator: personSchema.nullable(),
  submitter: personSchema.nullable(),
  submittedAt: momentSchema.nullable(),
  decider: personSchema.nullable(),
  decidedAt: momentSchema.nullable(),
  decisionNote: z.string(),
  effectiveOn: dateSchema.nullable(),
  createdAt: momentSchema,
  updatedAt: momentSchema,
  version: z.number().int(),
  /** what the person asking can do with it as it stands */
  can: z.object({
    update: z.boolean(),
    run: z.boolean(),
    submit: z.boolean(),
    discard: z.boolean(),
    approve: z.boolean(),
    return: z.boolean(),
  }),
});
export type EstimateRowView = z.infer<typeof estimateRowSchema>;

const named = { id: z.uuid(), slug: z.string(), name: z.string() };

/** Where an estimate belongs. */
export const placeSchema = z.object({
  reservoir: z.object(named),
  field: z.object(named),
  basin: z.object(named),
});
export type PlaceView = z.infer<typeof placeSchema>;

export const estimateListItemSchema = estimateRowSchema.extend({ place: placeSchema });
export type EstimateListItemView = z.infer<typeof estimateListItemSchema>;

/** A revision with what it was computed from and what came out; `summary` is null until it is run as it stands. */
export const estimateBodySchema = estimateRowSchema.extend({
  /** where the recoveries come from; null when they were entered */
  recoveryRoute: z.enum(recoveryRoutes).nullable(),
  inputs: estimateInputsSchema,
  summary: simulationSummarySchema.nullable(),
});
export type EstimateBodyView = z.infer<typeof estimateBodySchema>;

export const estimateSchema = estimateBodySchema.extend({ place: placeSchema });
export type EstimateView = z.infer<typeof estimateSchema>;
