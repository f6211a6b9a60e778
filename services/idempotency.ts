import { createHash } from "node:crypto";
import {
  claimIdempotencyKey,
  findIdempotencyKey,
  forgetAnswers,
  releaseIdempotencyKey,
  rememberAnswer,
} from "@/models/queries/idempotency-keys";
import { now } from "./clock";
import { ConflictError, InvalidInputError } from "./errors";
import type { Actor } from "./policy";

export interface Answer {
  status: number;
  response: unknown;
  etag: string | null;
}

const keptMilliseconds = 24 * 3_600_000;

/**
 * Do `work` once for this person and key; a repetition within a day gets the first answer. A failure is not remembered,
 * so the request can be sent again. If the process dies midway the key stays taken, because whether the work was done
 * is then unknown: the person is told to look.
 *
 * @param request  what was asked, whole; the same key with another request is refused
 * @throws {ConflictError} while the first request is at work
 * @throws {InvalidInputError} when the key was used for something else
 */
export async function once(
  actor: Actor,
  key: string,
  request: string,
  work: () => Promise<Answer>,
): Promise<Answer> {
  const requestHash = createHash("sha256").update(request).digest("hex");
  await forgetAnswers(new Date(now().getTime() - keptMilliseconds));
  if (!(await claimIdempotencyKey(actor.id, key, requestHash))) {
    const found = await findIdempotencyKey(actor.id, key);
    if (found && found.requestHash !== requestHash) {
      throw new InvalidInputError([
        { pointer: "#", detail: "This Idempotency-Key was used for a different request." },
      ]);
    }
    if (found && found.status !== null) {
      return { status: found.status, response: found.response, etag: found.etag };
    }
    throw new ConflictError(
      "The same request is being worked on, or was interrupted. Look whether it was done before sending it anew.",
      "request_in_progress",
    );
  }
  try {
    const answer = await work();
    await rememberAnswer(actor.id, key, answer);
    return answer;
  } catch (error) {
    await releaseIdempotencyKey(actor.id, key);
    throw error;
  }
}
