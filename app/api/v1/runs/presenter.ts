import type { RunItem } from "@/models/run-item";
import type { RunOverview } from "@/services/runs/overview";
import { presentMoment, presentPerson } from "../common-presenter";
import type { RunItemView, RunView } from "./schema";

/** @param overview  its run loaded with whoever began it */
export function presentRun({ run, tally, remainingSeconds, stalled, can }: RunOverview): RunView {
  const { counts, workers } = tally;
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

/** @param item  loaded with its reservoir and field */
export function presentRunItem(item: RunItem): RunItemView {
  const { reservoir } = item;
  if (!reservoir?.field) throw new Error("a run item is presented with its reservoir and field");
  return {
    estimateId: item.estimateId,
    revision: item.revision,
    field: { name: reservoir.field.name, slug: reservoir.field.slug },
    reservoir: { name: reservoir.name, slug: reservoir.slug },
    state: item.state,
    attempts: item.attempts,
    worker: item.worker,
    finishedAt: presentMoment(item.finishedAt),
    reason: item.reason,
    progress: item.progress,
    outcome: item.outcome,
  };
}
