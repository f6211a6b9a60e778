import { createTransport, type Transporter } from "nodemailer";
import { env } from "../env";
import type { MailMessage } from "./message";

let transport: Transporter | undefined;

/**
 * Hand one message to the mail relay. The job's id becomes the Message-ID, so that a message which
 * was accepted twice, because a retry followed a lost answer, is recognised as one.
 */
export async function deliver(message: MailMessage, job: { id: string }): Promise<void> {
  transport ??= createTransport(env().SMTP_URL);
  await transport.sendMail({
    ...message,
    from: env().MAIL_FROM,
    messageId: `<${job.id}@dewledger>`,
    headers: { "Auto-Submitted": "auto-generated" },
  });
}
