import { z } from "zod";

/** One message as it is queued: complete, so that sending it needs nothing but the relay. */
export const mailMessage = z.object({
  to: z.email(),
  subject: z
    .string()
    .min(1)
    .max(200)
    .refine((text) => !/[\r\n]/.test(text), { error: "must be one line" }),
  text: z.string().min(1),
  html: z.string().min(1),
});

export type MailMessage = z.output<typeof mailMessage>;
