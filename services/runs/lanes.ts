import type { Transaction } from "sequelize";
import type { RunKind } from "@/models/vocabulary";
import { enqueueUnlessWaiting } from "../queue/queue";

/** Lanes of one run: more than the threads of all workers together would only look and find nothing. */
const MOST_LANES = 16;

/** Who waits in front of a screen goes before who left for lunch; higher goes first. */
export const priorities: Record<RunKind, number> = { untilSettled: 2, import: 1, recalculation: 0 };

interface LanesOf {
  id: string;
  kind: RunKind;
}

/** Let one lane of a run wait for a worker, unless it waits already. */
export async function sendLane(
  { id, kind }: LanesOf,
  lane: number,
  transaction?: Transaction,
): Promise<void> {
  const options = { transaction, priority: priorities[kind] };
  await enqueueUnlessWaiting("work-on-run", { runId: id, lane }, `${id}/${lane}`, options);
}

/** Let as many lanes wait as could be at work on this many items. */
export async function sendLanes(
  run: LanesOf,
  items: number,
  transaction?: Transaction,
): Promise<void> {
  for (let lane = 1; lane <= Math.min(items, MOST_LANES); lane += 1) {
    await sendLane(run, lane, transaction);
  }
}
