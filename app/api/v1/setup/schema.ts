import { z } from "zod";
import { newUserSchema } from "../users/schema";

export const setupRequestSchema = newUserSchema.omit({ role: true });
export type SetupRequest = z.infer<typeof setupRequestSchema>;

export const setupSchema = z.object({ needsSetup: z.boolean() });
export type SetupView = z.infer<typeof setupSchema>;
