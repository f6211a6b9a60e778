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
  /** of these, the same to the last digit */
  same: number;
  /** of these, moved by more than `MOVED_BEYOND` standard errors */
  beyond: number;
  /** largest move as a share of what was there, signed */
  largestShare: number;
}

/** Moves of more than this many standard errors are pointed out: larger than what the trials leave open. */
export const MOVED_BEYOND = 2;

export function compareOutcomes(outcomes: readonly RunItemView["outcome"][]): Comparison {
  const comparison: Comparison = { compared: 0, same: 0, beyond: 0, largestShare: 0 };
  for (const outcome of outcomes) {
    const moved = outcome?.movedStandardErrors ?? null;
    if (outcome === null || moved === null) continue;
    comparison.compared += 1;
    if (moved === 0) comparison.same += 1;
    if (moved > MOVED_BEYOND) comparison.beyond += 1;
    const share = outcome.movedShare ?? 0;
    if (Math.abs(share) > Math.abs(comparison.largestShare)) comparison.largestShare = share;
  }
  return comparison;
}

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
    const { compared, same, beyond } = comparison;
    const all = `${whole(compared)} of ${estimatesWords(compared)}`;
    if (same === compared) return `${all} ${compared === 1 ? "repeats" : "repeat"} exactly`;
    return beyond === 0
      ? `${all} moved by ${MOVED_BEYOND} standard errors at most`
      : `${whole(beyond)} of ${estimatesWords(compared)} moved by more than ${MOVED_BEYOND} standard errors`;
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

/** "+0.42 %", and no more digits than tell moves apart. */
function shareWords(share: number): string {
  const size = Math.abs(share) * 100;
  if (size < 0.005) return "under 0.01\u00a0%";
  return formatPercent(share, { signed: true, decimals: size < 1 ? 2 : size < 10 ? 1 : 0 });
}

/** "+0.42 %, 2.4 SE"; an estimate without earlier results has nothing to be compared with. */
export function movedWords({ outcome }: Pick<RunItemView, "outcome">): string {
  if (!outcome) return "–";
  const { before, movedShare, movedStandardErrors } = outcome;
  if (movedStandardErrors === null) return before ? "–" : "first results";
  if (movedStandardErrors === 0) return "the same";
  const share = movedShare === null ? "from 0" : shareWords(movedShare);
  return `${share}, ${standardErrorsWords(movedStandardErrors)}`;
}

const standardErrorsWords = (errors: number) =>
  errors < 0.01 ? "under 0.01 SE" : `${formatFigure(errors, { digits: 2 })} SE`;

/** What to think of estimates that moved, when the run has compared some. */
export function movedNote({ compared, same, largestShare }: Comparison): string {
  const why =
    "Both used the same random numbers, so a move is the engine’s doing, not chance; the standard error (SE) is only a yardstick for whether it matters.";
  if (same === compared) return `${why} Nothing moved.`;
  return `${why} ${whole(same)} of ${whole(compared)} repeat exactly; the largest move is ${shareWords(largestShare)}.`;
}
