import { z } from "zod";

/** Pieces that the schemas of several resources share. */
export const idParams = z.object({ id: z.uuid() });

/** A piece of a list: at most 200 rows. */
export const pageQuery = z.object({
  limit: z.coerce.number().int().min(1).max(200).default(50),
  offset: z.coerce.number().int().min(0).max(1_000_000).default(0),
});

export function pageOf<Item extends z.ZodType>(item: Item) {
  return z.object({
    items: z.array(item),
    total: z.number().int(),
    limit: z.number().int(),
    offset: z.number().int(),
  });
}

export const nameSchema = z.string().trim().min(1, "must not be empty").max(120);
export const noteSchema = z.string().trim().max(5000);

/** A share or a chance. */
export const fractionSchema = z.number().min(0, "must be 0 or more").max(1, "must be 1 or less");

/** A date of business, without a zone. */
export const dateSchema = z.iso.date("must be a date such as 2026-12-31");

/** A moment, in UTC. */
export const momentSchema = z.iso.datetime();

export const personSchema = z.object({ id: z.uuid(), name: z.string() });
export type Person = z.infer<typeof personSchema>;
