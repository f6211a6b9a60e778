import { setTimeout as sleep } from "node:timers/promises";
import type { ReceivedMail } from "@/services/mail/fake/parse";
import { testEnvironment } from "./environment";

/** The first message to somebody whose subject contains `subject`; waits for the worker to send it. */
export async function mailTo(
  address: string,
  subject: string,
  patienceMs = 15_000,
): Promise<ReceivedMail> {
  const deadline = Date.now() + patienceMs;
  while (Date.now() < deadline) {
    const response = await fetch(`${testEnvironment.mailUrl}/messages.json`);
    const messages = (await response.json()) as ReceivedMail[];
    const found = messages.find(
      (mail) => mail.to.includes(address) && mail.subject.includes(subject),
    );
    if (found !== undefined) return found;
    await sleep(200);
  }
  throw new Error(`No message to ${address} about "${subject}" within ${patienceMs} ms`);
}
