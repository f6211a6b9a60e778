import { z } from "zod";
import { recoveryRoutes } from "@/analytics/recovery/recovery-curve-schema";
import { rangeSchema } from "@/analytics/volumetrics/results-schema";
import { estimateStates } from "@/models/vocabulary";
import { dateSchema, momentSchema } from "../common-schema";
import { reservoirFileSchema } from "../reservoirs/schema";
import { chosenDependenceSchema, chosenPricesSchema, rankedFieldSchema } from "./ranking-schema";
import { fieldSchema } from "./schema";

/** The field by its id, or by the word of its address. */
export const fieldFileParams = z.object({ id: z.string().min(1).max(200) });
export const reservoirPageParams = fieldFileParams.extend({
  reservoir: z.string().min(1).max(200),
});

/** A revision as timelines draw it; ranges are null until it has been run. */
export const revisionRangeSchema = z.object({
  estimateId: z.uuid(),
  revision: z.number().int(),
  state: z.enum(estimateStates),
  note: z.string(),
  creator: z.string(),
  decider: z.string().nullable(),
  createdAt: momentSchema,
  submittedAt: momentSchema.nullable(),
  decidedAt: momentSchema.nullable(),
  effectiveOn: dateSchema.nullable(),
  /** null when recoveries were entered */
  recoveryRoute: z.enum(recoveryRoutes).nullable(),
  condensateRecoverableStb: rangeSchema.nullable(),
  salesGasScf: rangeSchema.nullable(),
  wetGasInPlaceScf: rangeSchema.nullable(),
});
export type RevisionRangeView = z.infer<typeof revisionRangeSchema>;

export const fieldFileSchema = z.object({
  field: fieldSchema,
  reservoirs: z.array(
    z.object({
      id: z.uuid(),
      slug: z.string(),
      name: z.string(),
      depthFt: z.number().nullable(),
      /** newest first */
      revisions: z.array(revisionRangeSchema),
    }),
  ),
  /** the field's row of the ranking on the basis; its ranges are added up trial by trial */
  ranked: rankedFieldSchema,
  fieldsInAll: z.number().int(),
  prices: chosenPricesSchema.nullable(),
  dependence: chosenDependenceSchema,
});
export type FieldFileView = z.infer<typeof fieldFileSchema>;

export const reservoirPageSchema = reservoirFileSchema.extend({
  /** newest first */
  revisions: z.array(revisionRangeSchema),
});
export type ReservoirPageView = z.infer<typeof reservoirPageSchema>;
