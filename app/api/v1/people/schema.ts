import { z } from "zod";
import { roles } from "@/models/vocabulary";
import { personSchema } from "../common-schema";

export const peopleQuery = z.object({ role: z.enum(roles).optional() });

export const peopleSchema = z.object({
  items: z.array(personSchema.extend({ role: z.enum(roles) })),
});
export type PeopleView = z.infer<typeof peopleSchema>;
