import { randomBytes } from "node:crypto";
import os from "node:os";
import process from "node:process";
import { setTimeout as sleep } from "node:timers/promises";
import {
  claimRunItem,
  failExhaustedItems,
  giveItemBack,
  listOpenRuns,
  lockLeasedItem,
  markRunStarted,
  renewLeases,
  saveItemProgress,
  type ClaimedItem,
  type LeaseToken,
} from "@/models/queries/run-leases";
import { findRun } from "@/models/queries/runs";
import type { Run } from "@/models/run";
import type { RunStep } from "@/models/run-item";
import { now } from "../clock";
import { log } from "../log";
import { inTransaction } from "../transaction";
import { computeItem, endingOf, type Ending } from "./compute-item";
import { finishRunIfDone } from "./finish-run";
import { priorities, sendLane, sendLanes } from "./lanes";
import { LatestOnly } from "./latest-only";
import { isUnfinished } from "./overview";
import { patiently } from "./patience";

/** A worker that is not heard of for this long has lost what it was computing. */
const LEASE_SECONDS = 30;
/** Leases are renewed, and cancelled or lost items noticed, this often. */
const BEAT_MS = 2_000;
/** Runs that nobody works on, and items that nobody ends, are looked for this often. */
const SWEEP_MS = 5_000;
/** An item that brought its worker down, or failed without a reason of its own, is tried this often in all. */
const MOST_ATTEMPTS = 3;
/** After this long a lane lets other runs have its place, and waits for its next turn. */
const SLICE_MS = 10_000;
/** Progress is written at most this often. */
const PROGRESS_MS = 500;

const exhausted =
  "The worker that computed this ended three times before it was done. It may need more memory than there is: try fewer trials.";

interface Held {
  claimId: string;
  controller: AbortController;
}

class LeaseLost extends Error {
  override readonly name = "LeaseLost";
}
class WorkerStops extends Error {
  override readonly name = "WorkerStops";
}

/**
 * Host and process, what a person needs to find it, and a random end: a container that is started again has the same
 * host and process, and is another worker.
 */
export function nameOfWorker(): string {
  return `${os.hostname()}:${process.pid}:${randomBytes(3).toString("hex")}`;
}

/** What a person who has the sentence finds the item by in the workers' log. */
const referenceOf = ({ runId, position }: LeaseToken) => `${runId.slice(0, 8)}-${position}`;

const unforeseen = (token: LeaseToken) =>
  `Something unforeseen went wrong three times. An administrator finds it in the workers’ log as item ${referenceOf(token)}.`;

/**
 * This process's part in runs. Workers know nothing of each other: each takes items under a lease and stores a result
 * and the end of its item in one transaction, if the item is still its own. So every item is done once, whoever dies.
 */
export class RunWorker {
  private readonly held = new Set<Held>();
  private readonly stopping = new AbortController();
  private readonly loops: Promise<void>[] = [];

  constructor(readonly name: string = nameOfWorker()) {}

  /** Begin to renew leases and to look after runs that nobody works on; those of a worker that died go on from here. */
  start(): void {
    this.loops.push(
      this.every(BEAT_MS, () => this.beat()),
      this.every(SWEEP_MS, () => this.sweep()),
    );
  }

  /** Give everything in hand back at once, for other workers to take. */
  async stop(): Promise<void> {
    this.stopping.abort(new WorkerStops("the worker stops"));
    for (const { controller } of this.held) controller.abort(this.stopping.signal.reason);
    await Promise.all(this.loops);
  }

  /** One lane: takes items of its run, then of any other, until none can be taken or it is another lane's turn. */
  async work({ runId, lane }: { runId: string; lane: number }): Promise<void> {
    const { signal } = this.stopping;
    const until = performance.now() + SLICE_MS;
    try {
      let run = await patiently(() => this.begin(runId), signal);
      while (run) {
        const { id } = run;
        signal.throwIfAborted();
        const item = await patiently(() => this.claim(id), signal);
        if (item === null) {
          await patiently(() => finishRunIfDone(id), signal);
          run = await patiently(() => this.anotherRun(), signal);
          continue;
        }
        await this.treat(run, item);
        if (performance.now() < until) continue;
        const { kind } = run;
        await patiently(() => sendLane({ id, kind }, lane), signal);
        return;
      }
    } catch (error) {
      if (!(error instanceof WorkerStops)) throw error;
    }
  }

  private async begin(runId: string): Promise<Run | null> {
    const run = await findRun(runId);
    if (!run || !isUnfinished(run)) return null;
    await markRunStarted(runId);
    return run;
  }

  /** The run that most deserves a lane which has nothing left to do for its own. */
  private async anotherRun(): Promise<Run | null> {
    const open = await listOpenRuns(MOST_ATTEMPTS);
    const [next] = open
      .filter(({ claimable }) => claimable > 0)
      .sort((a, b) => priorities[b.kind] - priorities[a.kind]);
    return next ? this.begin(next.id) : null;
  }

  private claim(runId: string): Promise<ClaimedItem | null> {
    const limits = { leaseSeconds: LEASE_SECONDS, mostAttempts: MOST_ATTEMPTS };
    return claimRunItem(runId, this.name, limits);
  }

  private async treat(run: Run, item: ClaimedItem): Promise<void> {
    const held: Held = { claimId: item.claimId, controller: new AbortController() };
    const { signal } = held.controller;
    if (this.stopping.signal.aborted) held.controller.abort(this.stopping.signal.reason);
    this.held.add(held);
    const progress = new LatestOnly<RunStep[]>(PROGRESS_MS, (steps) =>
      saveItemProgress(item, steps),
    );
    try {
      signal.throwIfAborted();
      const onSteps = (steps: RunStep[]) => progress.offer(steps);
      const ending = await patiently(() => computeItem(run, item, { signal, onSteps }), signal);
      await progress.settled();
      await patiently(() => this.end(item, ending), signal);
    } catch (error) {
      await progress.settled();
      await this.afterFault(item, signal, error);
    } finally {
      this.held.delete(held);
    }
  }

  /** Store what came of an item, with its results, in one transaction; nothing when the item is another's by now. */
  private async end(token: LeaseToken, ending: Ending): Promise<void> {
    try {
      await this.write(token, ending);
    } catch (error) {
      // Somebody changed the estimate, or may no longer store, since it was read.
      const instead = endingOf(error);
      if (instead === null || ending.state !== "done") throw error;
      await this.write(token, instead);
    }
  }

  private async write(token: LeaseToken, ending: Ending): Promise<void> {
    await inTransaction(async (transaction) => {
      const item = await lockLeasedItem(token, transaction);
      if (item === null) {
        log.warn({ item: referenceOf(token) }, "run item lost, its result dropped");
        return;
      }
      if (ending.state === "done") await ending.store?.(transaction);
      item.set({
        state: ending.state,
        claimId: null,
        leasedUntil: null,
        finishedAt: now(),
        ...(ending.state === "done"
          ? { outcome: ending.outcome, progress: ending.steps }
          : { reason: ending.reason }),
      });
      await item.save({ transaction });
    });
  }

  private async afterFault(item: ClaimedItem, signal: AbortSignal, error: unknown): Promise<void> {
    const stops = signal.aborted && signal.reason instanceof WorkerStops;
    if (signal.aborted && !stops) return;
    try {
      if (stops) {
        await giveItemBack(item, { counted: false });
        return;
      }
      const { runId, estimateId, attempts } = item;
      const context = { item: referenceOf(item), runId, estimateId, attempts };
      log.error({ err: error, ...context }, "run item failed");
      if (attempts < MOST_ATTEMPTS) {
        await patiently(() => giveItemBack(item, { counted: true }), this.stopping.signal);
        return;
      }
      const ending: Ending = { state: "failed", reason: unforeseen(item) };
      await patiently(() => this.write(item, ending), this.stopping.signal);
    } catch (fault) {
      // The lease ends by itself, and whoever takes the item then goes on from there.
      log.warn({ err: fault, item: referenceOf(item) }, "run item left to its lease");
    }
  }

  private async beat(): Promise<void> {
    // Only what was held before asking: an item that is taken meanwhile is not in the answer.
    const asked = [...this.held];
    if (asked.length === 0) return;
    const claimIds = asked.map(({ claimId }) => claimId);
    const standing = new Set(await renewLeases(claimIds, LEASE_SECONDS));
    for (const { claimId, controller } of asked) {
      if (!standing.has(claimId)) controller.abort(new LeaseLost("the item is no longer ours"));
    }
  }

  private async sweep(): Promise<void> {
    await failExhaustedItems(MOST_ATTEMPTS, exhausted);
    for (const run of await listOpenRuns(MOST_ATTEMPTS)) {
      if (run.open === 0) await finishRunIfDone(run.id);
      else if (run.claimable > 0) await sendLanes(run, run.claimable);
    }
  }

  private async every(ms: number, work: () => Promise<void>): Promise<void> {
    const { signal } = this.stopping;
    while (!signal.aborted) {
      // A database that is away comes back; the next round does what this one could not.
      await work().catch((error: unknown) => log.warn({ err: error }, "run worker"));
      await sleep(ms, undefined, { signal }).catch(() => undefined);
    }
  }
}
