import { setTimeout as sleep } from "node:timers/promises";
import { Failure } from "./failure.mjs";

/**
 * Wait until the product answers that it is healthy.
 *
 * @param {string} address as in http://127.0.0.1:3000
 * @param {Promise<never>} ended rejects when the process ends before that
 * @param {number} [patience] how long to wait [ms]
 */
export async function waitUntilHealthy(address, ended, patience = 120_000) {
  const deadline = Date.now() + patience;
  const poll = async () => {
    let last = "it did not answer";
    while (Date.now() < deadline) {
      try {
        const answer = await fetch(`${address}/api/v1/health`, {
          signal: AbortSignal.timeout(30_000),
        });
        if (answer.ok) return;
        last = `it answered ${answer.status}: ${(await answer.text()).slice(0, 500)}`;
      } catch {
        // Not listening yet.
      }
      await sleep(100);
    }
    throw new Failure(
      `The product did not become healthy within ${Math.round(patience / 1000)} s; ${last}`,
      "The logs are in .data/logs.",
    );
  };
  await Promise.race([poll(), ended]);
}
