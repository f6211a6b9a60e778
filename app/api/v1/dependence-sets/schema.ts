import { z } from "zod";
import { dependenceSchema } from "@/analytics/portfolio/dependence-schema";
import { momentSchema, nameSchema, noteSchema, personSchema } from "../common-schema";

export const newDependenceSetSchema = z
  .object({ name: nameSchema, note: noteSchema.default(""), dependence: dependenceSchema })
  .strict();
export type NewDependenceSetRequest = z.infer<typeof newDependenceSetSchema>;

/** `isDefault` is set to true to make totals stand on this set unless a page says otherwise; never to false. */
export const dependenceSetPatchSchema = z
  .object({
    name: nameSchema.optional(),
    note: noteSchema.optional(),
    dependence: dependenceSchema.optional(),
    isDefault: z.literal(true).optional(),
  })
  .strict();
export type DependenceSetPatchRequest = z.infer<typeof dependenceSetPatchSchema>;

/** A named answer to how fields move together. */
export const dependenceSetSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  note: z.string(),
  isDefault: z.boolean(),
  dependence: dependenceSchema,
  updatedAt: momentSchema,
  updatedBy: personSchema.nullable(),
  version: z.number().int(),
});
export type DependenceSetView = z.infer<typeof dependenceSetSchema>;

export const dependenceSetsSchema = z.object({ items: z.array(dependenceSetSchema) });
