import { z } from "zod";
import { nameSchema } from "../common-schema";

export const newBasinSchema = z.object({ name: nameSchema }).strict();
export type NewBasinRequest = z.infer<typeof newBasinSchema>;

export const basinPatchSchema = newBasinSchema.partial();
export type BasinPatchRequest = z.infer<typeof basinPatchSchema>;

export const basinSchema = z.object({
  id: z.uuid(),
  slug: z.string(),
  name: z.string(),
  version: z.number().int(),
});
export type BasinView = z.infer<typeof basinSchema>;

export const basinsSchema = z.object({ items: z.array(basinSchema) });
