import { z } from "zod";
import { momentSchema, nameSchema } from "../common-schema";

export const newApiTokenSchema = z.object({ name: nameSchema }).strict();
export type NewApiTokenRequest = z.infer<typeof newApiTokenSchema>;

export const apiTokenSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  createdAt: momentSchema,
  lastUsedAt: momentSchema.nullable(),
  revokedAt: momentSchema.nullable(),
});
export type ApiTokenView = z.infer<typeof apiTokenSchema>;

/** The answer to making one: the only time the secret is shown. */
export const newApiTokenAnswerSchema = apiTokenSchema.extend({ token: z.string() });
export type NewApiTokenView = z.infer<typeof newApiTokenAnswerSchema>;

export const apiTokensSchema = z.object({ items: z.array(apiTokenSchema) });
