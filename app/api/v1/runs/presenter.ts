import { movedShare } from "@/services/runs/moved";
import type { RunOverview } from "@/services/runs/overview";
import type { RunItemOverview } from "@/services/runs/runs";
import { presentMoment, presentPerson } from "../common-presenter";
import type { RunItemView, RunView } from "./schema";

/** @param overview  its run loaded with whoever began it */
export function presentRun(overview: RunOverview): RunView {
  const { run, tally, workers, remainingSeconds, stalled, can } = overview;
  const { counts } = tally;
  const total = Object.values(counts).reduce((sum, count) => sum + count, 0);
  return {
    id: run.id,
    kind: run.kind,
    state: run.state,
    title: run.title,
    createdBy: presentPerson(run.creator),
    createdAt: presentMoment(run.createdAt),
    startedAt: presentMoment(run.startedAt),
    finishedAt: presentMoment(run.finishedAt),
    counts: { total, ...counts },
    remainingSeconds,
    workers,
    stalled,
    can,
    version: run.version,
  };
}

/** @param overview  its item loaded with its reservoir and field */
export function presentRunItem({ item, worker }: RunItemOverview): RunItemView {
  const { reservoir, outcome } = item;
  if (!reservoir?.field) throw new Error("a run item is presented with its reservoir and field");
  return {
    estimateId: item.estimateId,
    revision: item.revision,
    field: { name: reservoir.field.name, slug: reservoir.field.slug },
    reservoir: { name: reservoir.name, slug: reservoir.slug },
    state: item.state,
    attempts: item.attempts,
    worker,
    finishedAt: presentMoment(item.finishedAt),
    reason: item.reason,
    progress: item.progress,
    outcome: outcome && {
      ...outcome,
      movedShare: outcome.before && movedShare(outcome.before, outcome.after),
    },
  };
}
