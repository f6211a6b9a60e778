import { z } from "zod";
import { fractionSchema, nameSchema } from "../common-schema";

export const newBasinSchema = z
  .object({ name: nameSchema, rankCorrelation: fractionSchema.optional() })
  .strict();
export type NewBasinRequest = z.infer<typeof newBasinSchema>;

export const basinPatchSchema = newBasinSchema.partial();
export type BasinPatchRequest = z.infer<typeof basinPatchSchema>;

export const basinSchema = z.object({
  id: z.uuid(),
  slug: z.string(),
  name: z.string(),
  /** rank correlation that the reservoirs of the basin share */
  rankCorrelation: z.number(),
  version: z.number().int(),
});
export type BasinView = z.infer<typeof basinSchema>;

export const basinsSchema = z.object({ items: z.array(basinSchema) });
