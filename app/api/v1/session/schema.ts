import { z } from "zod";
import { passwordSchema } from "../users/schema";
import { policy, roles, type Action } from "@/services/policy";

/** Who is signed in, and what their role allows: for hiding buttons, never for security. */
export const sessionSchema = z.object({
  id: z.uuid(),
  name: z.string(),
  email: z.string(),
  role: z.enum(roles),
  can: z.array(z.enum(Object.keys(policy) as [Action, ...Action[]])),
});

export type SessionView = z.infer<typeof sessionSchema>;

export const passwordChangeSchema = z
  .object({ currentPassword: z.string().min(1).max(1000), password: passwordSchema })
  .strict();
export type PasswordChangeRequest = z.infer<typeof passwordChangeSchema>;
