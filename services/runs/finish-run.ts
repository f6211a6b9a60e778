import { countOpenItems, findRun, tallyRuns } from "@/models/queries/runs";
import { recordAudit } from "../audit";
import { now } from "../clock";
import { inTransaction } from "../transaction";
import { markImport } from "./imports";
import { isUnfinished } from "./overview";

/** Finish a run of which nothing is left to compute; any other stays as it is. Safe to ask at any time, by anybody. */
export async function finishRunIfDone(id: string): Promise<void> {
  await inTransaction(async (transaction) => {
    const run = await findRun(id, { transaction, lock: true });
    if (!run || !isUnfinished(run)) return;
    if ((await countOpenItems(id, transaction)) > 0) return;
    const at = now();
    run.set({ state: "finished", finishedAt: at, updatedAt: at, version: run.version + 1 });
    await run.save({ transaction });
    await markImport(run, "applied", transaction);
    const { done, failed, passedOver } = (await tallyRuns([id], transaction)).get(id)!.counts;
    await recordAudit(
      {
        actor: null,
        action: "run.finished",
        entity: "run",
        entityId: id,
        after: { done, failed, passedOver },
      },
      transaction,
    );
  });
}
