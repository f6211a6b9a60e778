import type { Transaction } from "sequelize";
import { recordImportProgress } from "@/models/queries/imports";
import { findRunOfImport, listFailedRunItems, tallyRuns } from "@/models/queries/runs";
import type { Run } from "@/models/run";
import { now } from "../clock";
import { isStalled } from "./overview";

/** How far the run of an import's estimates is. */
export interface ImportRun {
  id: string;
  total: number;
  /** those that need nothing more, whatever became of them */
  ended: number;
  stalled: boolean;
  /** why estimates have no results, by their ids */
  failed: ReadonlyMap<string, string>;
}

export async function runOfImport(importId: string): Promise<ImportRun | null> {
  const run = await findRunOfImport(importId);
  if (!run) return null;
  const [tallies, failed] = await Promise.all([tallyRuns([run.id]), listFailedRunItems(run.id)]);
  const tally = tallies.get(run.id);
  if (!tally) return null;
  const { waiting, running, done, failed: failures, passedOver } = tally.counts;
  const ended = done + failures + passedOver;
  return {
    id: run.id,
    total: ended + waiting + running,
    ended,
    stalled: isStalled(run, tally, now()),
    failed: new Map(failed.map(({ estimateId, reason }) => [estimateId, reason])),
  };
}

/** An import is at work for as long as the run of its estimates is. Other kinds of run have no import. */
export async function markImport(
  { importId }: Run,
  state: "applying" | "applied",
  transaction: Transaction,
): Promise<void> {
  if (importId === null) return;
  const values = { state, updatedAt: now(), ...(state === "applied" && { progress: 1 }) };
  await recordImportProgress(importId, values, { transaction });
}
