import {
  findRun,
  findRunWithCreator,
  listRunItemsPage,
  listRunsPage,
  listWorkersOfRuns,
  lockRuns,
  passOverOpenItems,
  returnEndedItems,
  type RunItemFilter,
} from "@/models/queries/runs";
import type { RunItem } from "@/models/run-item";
import type { RunState } from "@/models/vocabulary";
import { recordAudit } from "../audit";
import { now } from "../clock";
import { ConflictError, ForbiddenError, NotFoundError } from "../errors";
import { toPage, type Page, type PageRequest } from "../paging";
import { authorise, type Actor } from "../policy";
import { inTransaction } from "../transaction";
import { refuseOverlap } from "./create-run";
import { markImport } from "./imports";
import { sendLanes } from "./lanes";
import { isUnfinished, mayCancel, mayRetry, overviewsOf, type RunOverview } from "./overview";
import { workerNamesFor } from "./worker-names";

/** Runs of everybody, newest first. */
export async function listRuns(
  actor: Actor,
  filter: { state?: RunState },
  page: PageRequest,
): Promise<Page<RunOverview>> {
  authorise(actor, "run.read");
  const { rows, count } = await listRunsPage(filter, page);
  return toPage({ rows: await overviewsOf(actor, rows), count }, page);
}

export async function getRun(actor: Actor, id: string): Promise<RunOverview> {
  authorise(actor, "run.read");
  const run = await findRunWithCreator(id);
  if (!run) throw new NotFoundError("run");
  const [overview] = await overviewsOf(actor, [run]);
  return overview;
}

/** An item of a run, with its worker as the person who looks may know it. */
export interface RunItemOverview {
  item: RunItem;
  worker: string | null;
}

/** The estimates of a run, in the order of fields and reservoirs. */
export async function listRunItems(
  actor: Actor,
  id: string,
  filter: RunItemFilter,
  page: PageRequest,
): Promise<Page<RunItemOverview>> {
  authorise(actor, "run.read");
  if (!(await findRun(id))) throw new NotFoundError("run");
  const { rows, count } = await listRunItemsPage(id, filter, page);
  const workers = (await listWorkersOfRuns([id])).map(({ worker }) => worker);
  const names = workerNamesFor(actor, workers);
  const items = rows.map((item) => ({ item, worker: names.get(item.worker ?? "") ?? null }));
  return toPage({ rows: items, count }, page);
}

/**
 * Stop a run. What is stored stays; what waits is passed over, and what is computed at this moment belongs to nobody
 * from here on, so nothing of it is stored whether or not its worker has heard.
 *
 * @throws {ConflictError} when it is finished; a cancelled one is answered as it is
 */
export async function cancelRun(actor: Actor, id: string): Promise<RunOverview> {
  authorise(actor, "run.cancel");
  await inTransaction(async (transaction) => {
    const run = await findRun(id, { transaction, lock: true });
    if (!run) throw new NotFoundError("run");
    if (!mayCancel(actor, run)) {
      throw new ForbiddenError(
        "Only the person who began this run, or an administrator, stops it.",
      );
    }
    if (run.state === "cancelled") return;
    if (!isUnfinished(run)) throw new ConflictError("This run is finished.", "wrong_state");
    const at = now();
    const reasons = {
      waiting: "The run was cancelled before its turn.",
      running: "The run was cancelled while this was computed; nothing of it was stored.",
    };
    await passOverOpenItems(id, reasons, at, transaction);
    const before = { state: run.state };
    run.set({ state: "cancelled", finishedAt: at, updatedAt: at, version: run.version + 1 });
    await run.save({ transaction });
    await markImport(run, "applied", transaction);
    await recordAudit(
      {
        actor,
        action: "run.cancelled",
        entity: "run",
        entityId: id,
        before,
        after: { state: "cancelled" },
      },
      transaction,
    );
  });
  return getRun(actor, id);
}

/**
 * Let what failed or was passed over be computed after all, as it is now. What is done stays done.
 *
 * @throws {ConflictError} while the run is under way, when there is nothing to do again, or when another run has
 *   the same estimates before it
 */
export async function retryRun(actor: Actor, id: string): Promise<RunOverview> {
  authorise(actor, "run.create");
  await inTransaction(async (transaction) => {
    await lockRuns(transaction);
    const run = await findRun(id, { transaction, lock: true });
    if (!run) throw new NotFoundError("run");
    if (!mayRetry(actor, run)) {
      throw new ForbiddenError(
        "A run writes in the name of the person who began it, so only they set it going again. Begin one of your own.",
      );
    }
    if (isUnfinished(run)) throw new ConflictError("This run is under way.", "wrong_state");
    await refuseOverlap(run, transaction);
    const items = await returnEndedItems(id, transaction);
    if (items === 0) {
      throw new ConflictError(
        "Nothing of this run failed or was passed over that is still there.",
        "nothing_to_do",
      );
    }
    run.set({ state: "waiting", finishedAt: null, updatedAt: now(), version: run.version + 1 });
    await run.save({ transaction });
    await markImport(run, "applying", transaction);
    await sendLanes(run, items, transaction);
    await recordAudit(
      { actor, action: "run.retried", entity: "run", entityId: id, after: { items } },
      transaction,
    );
  });
  return getRun(actor, id);
}
