import type { RunItemView, RunView } from "@/app/api/v1/runs/schema";
import type { RunItemState, RunScope } from "@/models/vocabulary";
import { formatFigure, formatPercent } from "@/components/ui/format";

const whole = (count: number) => count.toLocaleString("en-GB");

export const estimatesWords = (count: number): string =>
  `${whole(count)} ${count === 1 ? "estimate" : "estimates"}`;

/** "40 s", "3 min", "1 h 40 min": no finer than what is known. */
export function durationWords(seconds: number): string {
  const rounded = Math.max(1, Math.round(seconds));
  if (rounded < 90) return `${rounded} s`;
  const minutes = Math.round(rounded / 60);
  if (minutes < 90) return `${minutes} min`;
  const rest = minutes % 60;
  return `${Math.floor(minutes / 60)} h${rest > 0 ? ` ${rest} min` : ""}`;
}

/** What a recalculation takes and what it does to it. */
export const scopes: Record<RunScope, { label: string; note: string }> = {
  approved: {
    label: "The approved book",
    note: "Every approved estimate is computed again and compared with what is stored. Nothing of it is changed.",
  },
  open: {
    label: "Open drafts",
    note: "Drafts and returned estimates get the results of today’s engine.",
  },
  both: {
    label: "Both",
    note: "The approved book is compared and never changed; open drafts get new results.",
  },
};

export const itemStateWords: Record<RunItemState, string> = {
  waiting: "Waiting",
  running: "Running",
  done: "Done",
  failed: "Failed",
  passedOver: "Passed over",
};

/** Items that need nothing more. */
const settledItems = ({ counts }: Pick<RunView, "counts">) =>
  counts.done + counts.failed + counts.passedOver;

/** 0 to 1 */
export const fractionOf = (run: Pick<RunView, "counts">): number =>
  run.counts.total === 0 ? 1 : settledItems(run) / run.counts.total;

/** How many a minute, from what is left and how long that takes; null while nobody knows. */
export function paceWords({
  counts,
  remainingSeconds,
}: Pick<RunView, "counts" | "remainingSeconds">): string | null {
  const left = counts.waiting + counts.running;
  if (remainingSeconds === null || remainingSeconds <= 0 || left === 0) return null;
  const perMinute = (60 * left) / remainingSeconds;
  return perMinute >= 1
    ? `${whole(Math.round(perMinute))} a minute`
    : `one in ${durationWords(60 / perMinute)}`;
}

/** "120 of 500, 42 a minute, about 9 min left" */
export function progressWords(run: Pick<RunView, "counts" | "remainingSeconds">): string {
  return [
    `${whole(settledItems(run))} of ${whole(run.counts.total)}`,
    paceWords(run),
    run.remainingSeconds !== null && `about ${durationWords(run.remainingSeconds)} left`,
  ]
    .filter(Boolean)
    .join(", ");
}

/** How recomputed figures compare with those that were there. */
export interface Comparison {
  /** estimates that had figures before */
  compared: number;
  /** of these, moved by more than `MOVED_BEYOND` standard errors */
  moved: number;
}

/** A change beyond two standard errors of the two runs is more than chance usually does. */
export const MOVED_BEYOND = 2;

/** The finding that heads a run's page. */
export function runTitle(run: RunView, comparison: Comparison | null): string {
  const { counts, state, kind } = run;
  if (state === "waiting") {
    return `${estimatesWords(counts.waiting)} ${counts.waiting === 1 ? "waits" : "wait"} for a worker`;
  }
  if (state === "running") {
    return `${whole(settledItems(run))} of ${estimatesWords(counts.total)} computed`;
  }
  if (state === "cancelled") {
    return `Cancelled after ${whole(counts.done)} of ${estimatesWords(counts.total)}`;
  }
  if (counts.failed > 0) {
    return `${whole(counts.failed)} of ${estimatesWords(counts.total)} could not be computed`;
  }
  if (kind === "recalculation" && comparison && comparison.compared > 0) {
    const { compared, moved } = comparison;
    return `${whole(compared - moved)} of ${estimatesWords(compared)} ${compared === 1 ? "repeats" : "repeat"} within ${compared === 1 ? "its" : "their"} sampling error`;
  }
  return `${whole(counts.done)} of ${estimatesWords(counts.total)} computed`;
}

/** What became of a run, in a few words for a list. */
export function outcomeWords(run: RunView): string {
  const { counts, state } = run;
  switch (state) {
    case "waiting":
      return "waiting for a worker";
    case "running":
      return run.stalled ? "standing still" : progressWords(run);
    case "cancelled":
      return `cancelled after ${whole(counts.done)} of ${whole(counts.total)}`;
    case "finished":
      return counts.failed > 0
        ? `${whole(counts.failed)} of ${whole(counts.total)} failed`
        : `${whole(counts.done)} of ${whole(counts.total)} computed`;
  }
}

/** "2.4 standard errors"; an estimate without earlier results has nothing to be compared with. */
export function movedWords({ outcome }: Pick<RunItemView, "outcome">): string {
  if (!outcome) return "–";
  if (outcome.movedStandardErrors === null) return outcome.before ? "–" : "first results";
  return outcome.movedStandardErrors === 0
    ? "the same"
    : `${formatFigure(outcome.movedStandardErrors, { digits: 2 })} SE`;
}

/**
 * Chance that at least one of P90, P50 and P10 moves by more than two standard errors when nothing but the sample
 * differs: 4.55 % for one; at most three times that, less the overlaps, for three (1 - 0.9545^3 were they independent).
 */
const MOST_BY_CHANCE = 1 - 0.9545 ** 3;

/** What to think of estimates that moved, when the run has compared some. */
export function movedNote({ compared, moved }: Comparison): string {
  const expected = `Three percentiles of each are looked at, so up to ${formatPercent(MOST_BY_CHANCE)} of the estimates move this far by chance alone.`;
  return moved > compared * MOST_BY_CHANCE
    ? `${expected} More than that moved here: look at the largest.`
    : expected;
}
