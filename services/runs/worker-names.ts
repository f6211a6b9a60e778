import type { Actor } from "../policy";

/**
 * What somebody sees of the workers of a run: numbers, which tell them apart, or for administrators, who look after the
 * machines, host and process.
 *
 * @param workers  in the order of their numbers
 * @returns by the worker's own name
 */
export function workerNamesFor(actor: Actor, workers: readonly string[]): Map<string, string> {
  return new Map(
    workers.map((worker, index) => [
      worker,
      actor.role === "administrator" ? worker : `worker ${index + 1}`,
    ]),
  );
}
