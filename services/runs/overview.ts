import { tallyRuns, type RunTally } from "@/models/queries/runs";
import type { Run } from "@/models/run";
import { now } from "../clock";
import { can, type Actor } from "../policy";
import { workerNamesFor } from "./worker-names";

/** A run with how it stands and what the person who looks can do with it. */
export interface RunOverview {
  run: Run;
  tally: RunTally;
  /** who has had items of it, as the person who looks may know them */
  workers: string[];
  /** from the pace since work last began; null before anything is done after that, and after the end */
  remainingSeconds: number | null;
  /** nothing has moved for a while: no worker is there, or all are busy with other work */
  stalled: boolean;
  can: { cancel: boolean; retry: boolean };
}

/** Runs that have not moved for this long have nobody who works on them. */
const STALLED_AFTER_SECONDS = 15;

/** The pace is that of the last minute, as `tallyRuns` counts. */
const PACE_SECONDS = 60;

export function isUnfinished({ state }: Run): boolean {
  return state === "waiting" || state === "running";
}

/** Whoever began a run can stop it, and an administrator any. */
export function mayCancel(actor: Actor, run: Run): boolean {
  return can(actor, "run.cancel") && (run.createdBy === actor.id || actor.role === "administrator");
}

/** A run writes in the name of the person who asked for it, so nobody else sets it going again. */
export function mayRetry(actor: Actor, run: Run): boolean {
  return can(actor, "run.create") && run.createdBy === actor.id;
}

/** Several runs with their tallies, counted in one query. */
export async function overviewsOf(actor: Actor, runs: Run[]): Promise<RunOverview[]> {
  const tallies = await tallyRuns(runs.map(({ id }) => id));
  const at = now();
  return runs.flatMap((run) => {
    const tally = tallies.get(run.id);
    return tally ? [overviewOf(actor, run, tally, at)] : [];
  });
}

/** @param at  the moment at which the tally was taken */
export function overviewOf(actor: Actor, run: Run, tally: RunTally, at: Date): RunOverview {
  const open = isUnfinished(run);
  const { counts } = tally;
  return {
    run,
    tally,
    workers: [...workerNamesFor(actor, tally.workers).values()],
    remainingSeconds: open ? remainingSeconds(run, tally, at) : null,
    stalled: isStalled(run, tally, at),
    can: {
      cancel: open && mayCancel(actor, run),
      retry: !open && counts.failed + counts.passedOver > 0 && mayRetry(actor, run),
    },
  };
}

function remainingSeconds(run: Run, tally: RunTally, at: Date): number | null {
  if (tally.ended === 0 || run.startedAt === null) return null;
  const left = tally.counts.waiting + tally.counts.running;
  // `updatedAt` is the last time that work on it began.
  const beganAt = Math.max(run.startedAt.getTime(), run.updatedAt.getTime());
  const atWork = Math.max(1, (at.getTime() - beganAt) / 1000);
  const pace =
    tally.recentlyEnded > 0
      ? tally.recentlyEnded / Math.min(PACE_SECONDS, atWork)
      : tally.ended / atWork;
  return left / pace;
}

/** Whether an unfinished run has nobody who works on it: nothing is held, and nothing ended for a while. */
export function isStalled(run: Run, tally: RunTally, at: Date): boolean {
  if (!isUnfinished(run) || tally.held) return false;
  const moved = Math.max(run.updatedAt.getTime(), tally.lastEndedAt?.getTime() ?? 0);
  return (at.getTime() - moved) / 1000 > STALLED_AFTER_SECONDS;
}
