import { setTimeout as sleep } from "node:timers/promises";
import { isDatabaseAway } from "../database-errors";
import { ServiceBusyError } from "../errors";
import { log } from "../log";

const firstWaitMs = 250;
const longestWaitMs = 5_000;

/**
 * Do a piece of work again and again while the database is away, waiting longer each time. The work must be safe to
 * repeat: whether its transaction was committed before the connection broke is not known.
 *
 * @param signal  ends the waiting with its reason
 */
export async function patiently<Result>(
  work: () => Promise<Result>,
  signal: AbortSignal,
): Promise<Result> {
  for (let waitMs = firstWaitMs; ; waitMs = Math.min(2 * waitMs, longestWaitMs)) {
    try {
      return await work();
    } catch (error) {
      if (!isDatabaseAway(error) && !(error instanceof ServiceBusyError)) throw error;
      log.warn({ err: error, waitMs }, "run waits");
    }
    await sleep(waitMs, undefined, { signal }).catch(() => undefined);
    signal.throwIfAborted();
  }
}
