import { z } from "zod";
import { roles } from "@/models/vocabulary";
import { momentSchema, nameSchema } from "../common-schema";

export const passwordSchema = z
  .string()
  .min(12, "must have at least 12 characters")
  .max(200, "must have at most 200 characters");

export const newUserSchema = z
  .object({
    email: z.string().trim().max(320).pipe(z.email("must be an e-mail address")),
    name: nameSchema,
    password: passwordSchema,
    role: z.enum(roles),
  })
  .strict();
export type NewUserRequest = z.infer<typeof newUserSchema>;

export const userPatchSchema = z
  .object({
    name: nameSchema.optional(),
    role: z.enum(roles).optional(),
    active: z.boolean().optional(),
    password: passwordSchema.optional(),
    signOutEverywhere: z.boolean().optional(),
  })
  .strict();
export type UserPatchRequest = z.infer<typeof userPatchSchema>;

export const userSchema = z.object({
  id: z.uuid(),
  email: z.string(),
  name: z.string(),
  role: z.enum(roles),
  active: z.boolean(),
  lastSignInAt: momentSchema.nullable(),
  createdAt: momentSchema,
  version: z.number().int(),
});
export type UserView = z.infer<typeof userSchema>;
