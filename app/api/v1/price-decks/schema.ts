import { z } from "zod";
import { priceCases, priceDeckStates, priceUnits, products } from "@/models/vocabulary";
import {
  dateSchema,
  momentSchema,
  nameSchema,
  noteSchema,
  pageQuery,
  personSchema,
} from "../common-schema";

const money = z.number().max(1_000_000).multipleOf(0.0001, "must have at most four decimals");

export const priceSchema = z
  .object({
    product: z.enum(products),
    priceCase: z.enum(priceCases),
    benchmark: money.nonnegative(),
    differential: money.min(-1_000_000),
  })
  .strict();
export type PriceRequest = z.infer<typeof priceSchema>;

export const newPriceDeckSchema = z
  .object({
    name: nameSchema,
    currency: z.string().regex(/^[A-Z]{3}$/, "must be three capital letters, such as USD"),
    asOfOn: dateSchema,
    note: noteSchema.optional(),
    prices: z.array(priceSchema).max(9).optional(),
  })
  .strict();
export type NewPriceDeckRequest = z.infer<typeof newPriceDeckSchema>;

export const priceDeckPatchSchema = newPriceDeckSchema.omit({ name: true }).partial();
export type PriceDeckPatchRequest = z.infer<typeof priceDeckPatchSchema>;

export const priceDecksQuery = pageQuery.extend({ state: z.enum(priceDeckStates).optional() });

export const priceDeckSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  versionNumber: z.number().int(),
  currency: z.string(),
  asOfOn: dateSchema,
  state: z.enum(priceDeckStates),
  note: z.string(),
  creator: personSchema.nullable(),
  publisher: personSchema.nullable(),
  publishedAt: momentSchema.nullable(),
  prices: z.array(
    priceSchema.extend({
      unit: z.enum(Object.values(priceUnits)),
      /** benchmark plus differential: what the company is paid */
      realised: z.number(),
    }),
  ),
  version: z.number().int(),
});
export type PriceDeckView = z.infer<typeof priceDeckSchema>;
