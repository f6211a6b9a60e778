import type { Letter } from "./templates/letter";
import { renderLetter } from "./templates/letter";
import { enqueue, type EnqueueOptions } from "../queue/queue";

/**
 * Send one letter to one person. It is queued, not sent, so a request never waits for the mail
 * relay; given the transaction of the change it reports, it goes out only if the change is kept.
 */
export async function sendLetter(
  to: string,
  letter: Letter,
  options: EnqueueOptions = {},
): Promise<void> {
  await enqueue("send-mail", { to, ...renderLetter(letter) }, options);
}
