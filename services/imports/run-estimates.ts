import { findEstimate } from "@/models/queries/estimates";
import { findImport, recordImportProgress } from "@/models/queries/imports";
import { findUser } from "@/models/queries/users";
import { now } from "../clock";
import {
  ConflictError,
  ForbiddenError,
  InvalidInputError,
  NotFoundError,
  StaleVersionError,
} from "../errors";
import { runEstimate } from "../estimate-runs";
import type { Actor } from "../policy";
import { importReportSchema } from "./report";

/** Runs that go on at the same time: enough to keep the threads busy while rows are written. */
const AT_ONCE = 2;

/**
 * Runs the estimates that an import made or changed, in the name of the person who brought it in. Safe to repeat: what
 * has its results is passed over, so a worker that was killed goes on where it stopped.
 */
export async function runImportedEstimates({ importId }: { importId: string }): Promise<void> {
  const row = await findImport(importId);
  if (row?.state !== "applying") return;
  const report = importReportSchema.parse(row.report);
  const { createdBy } = row;
  const ids = report.rows.flatMap(({ estimateId }) => (estimateId ? [estimateId] : []));
  const queue = ids.filter((id) => !(id in report.failedRuns));
  let done = ids.length - queue.length;

  async function work(): Promise<void> {
    for (let id = queue.shift(); id !== undefined; id = queue.shift()) {
      const failure = await runOne(createdBy, id);
      done += 1;
      if (failure !== null) report.failedRuns[id] = failure;
      await recordImportProgress(importId, {
        progress: done / ids.length,
        updatedAt: now(),
        ...(failure !== null && { report }),
      });
    }
  }

  await Promise.all(Array.from({ length: AT_ONCE }, work));
  await recordImportProgress(importId, { progress: 1, state: "applied", updatedAt: now() });
}

/**
 * The person as they are now. Read before each run, so that one who is made inactive while an import goes on writes
 * nothing more.
 */
async function actorOf(userId: string): Promise<Actor> {
  const user = await findUser(userId);
  if (!user?.active) {
    throw new ForbiddenError(
      "The person who brought this file in is no longer active, so nothing is run in their name.",
    );
  }
  return { id: user.id, name: user.name, email: user.email, role: user.role };
}

/** @returns why the estimate has no results, or `null` when it has them or somebody took it further meanwhile */
async function runOne(userId: string, id: string): Promise<string | null> {
  const estimate = await findEstimate(id);
  if (!estimate || estimate.computedAt !== null) return null;
  try {
    await runEstimate(await actorOf(userId), id, estimate.version);
    return null;
  } catch (error) {
    if (error instanceof InvalidInputError) return error.problems[0].detail;
    if (error instanceof ForbiddenError) return error.message;
    // Changed, submitted or discarded while this waited: whoever did that runs it themselves.
    if (error instanceof StaleVersionError || error instanceof ConflictError) return null;
    if (error instanceof NotFoundError) return null;
    throw error;
  }
}
