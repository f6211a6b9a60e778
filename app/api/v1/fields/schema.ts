import { z } from "zod";
import { prmsClasses, prmsSubClasses, type PrmsSubClass } from "@/models/vocabulary";
import { basinSchema } from "../basins/schema";
import { fractionSchema, nameSchema, noteSchema, personSchema } from "../common-schema";

const subClasses = Object.values(prmsSubClasses).flat() as [PrmsSubClass, ...PrmsSubClass[]];

export const newFieldSchema = z
  .object({
    name: nameSchema,
    basinId: z.uuid(),
    operator: nameSchema,
    /** decimal degrees, WGS 84 */
    latitude: z.number().min(-90).max(90).nullable().optional(),
    longitude: z.number().min(-180).max(180).nullable().optional(),
    waterDepthFt: z.number().min(0).max(40_000).nullable().optional(),
    workingInterest: fractionSchema,
    netRevenueInterest: fractionSchema,
    prmsClass: z.enum(prmsClasses),
    prmsSubClass: z.enum(subClasses),
    chanceOfCommerciality: fractionSchema,
    responsibleEngineerId: z.uuid().nullable().optional(),
    notes: noteSchema.optional(),
  })
  .strict();
export type NewFieldRequest = z.infer<typeof newFieldSchema>;

export const fieldPatchSchema = newFieldSchema.partial();
export type FieldPatchRequest = z.infer<typeof fieldPatchSchema>;

export const fieldSchema = z.object({
  id: z.uuid(),
  slug: z.string(),
  name: z.string(),
  basin: basinSchema.pick({ id: true, slug: true, name: true }),
  operator: z.string(),
  latitude: z.number().nullable(),
  longitude: z.number().nullable(),
  waterDepthFt: z.number().nullable(),
  workingInterest: z.number(),
  netRevenueInterest: z.number(),
  prmsClass: z.enum(prmsClasses),
  prmsSubClass: z.enum(subClasses),
  chanceOfCommerciality: z.number(),
  responsibleEngineer: personSchema.nullable(),
  notes: z.string(),
  version: z.number().int(),
});
export type FieldView = z.infer<typeof fieldSchema>;
