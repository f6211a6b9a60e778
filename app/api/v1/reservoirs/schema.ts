import { z } from "zod";
import { nameSchema } from "../common-schema";
import { estimateBodySchema, estimateRowSchema } from "../estimates/schema";
import { fieldSchema } from "../fields/schema";
import { fluidSampleSchema } from "../fluid-samples/schema";

export const newReservoirSchema = z
  .object({
    fieldId: z.uuid(),
    name: nameSchema,
    /** ft subsea or below mudline */
    depthFt: z.number().positive().max(40_000).nullable().optional(),
  })
  .strict();
export type NewReservoirRequest = z.infer<typeof newReservoirSchema>;

export const reservoirPatchSchema = newReservoirSchema.omit({ fieldId: true }).partial();
export type ReservoirPatchRequest = z.infer<typeof reservoirPatchSchema>;

export const reservoirSchema = z.object({
  id: z.uuid(),
  slug: z.string(),
  name: z.string(),
  depthFt: z.number().nullable(),
  field: fieldSchema,
  version: z.number().int(),
});
export type ReservoirView = z.infer<typeof reservoirSchema>;

/** A reservoir with all that its screen shows. */
export const reservoirFileSchema = reservoirSchema.extend({
  approved: estimateBodySchema.nullable(),
  open: estimateBodySchema.nullable(),
  /** every revision, newest first */
  history: z.array(estimateRowSchema),
  fluidSamples: z.array(fluidSampleSchema),
});
export type ReservoirFileView = z.infer<typeof reservoirFileSchema>;
