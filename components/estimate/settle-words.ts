/** A run that goes on until the percentiles are known well enough, in words. */
import type { RunItemView, RunView } from "@/app/api/v1/runs/schema";
import { formatPercent } from "@/components/ui/format";

export interface SettleWish {
  /** half-width of the 95 % interval as a share of each percentile */
  tolerance: number;
  mostTrials: number;
}

export type SettleStepView = NonNullable<RunItemView["progress"]>[number];

/** "±1.8 %" */
export const halfWidthText = (share: number) =>
  `±${formatPercent(share, { decimals: share < 0.001 ? 2 : share < 0.1 ? 1 : 0 })}`;

export const trialsText = (trials: number) => trials.toLocaleString("en-US");

/** Doublings that may still be needed: sampling error falls with the root of the trials, or faster. */
export function trialsNeeded({ trials, worst }: SettleStepView, tolerance: number): number {
  const wanted = trials * (worst / tolerance) ** 2;
  return worst <= tolerance ? trials : 2 ** Math.ceil(Math.log2(wanted));
}

/** What is expected to be left, from the pace so far; `null` before the first doubling is done. */
export function secondsLeft(
  steps: readonly SettleStepView[],
  { tolerance, mostTrials }: SettleWish,
  elapsedSeconds: number,
): number | null {
  const last = steps.at(-1);
  if (!last || elapsedSeconds <= 0) return null;
  const end = Math.min(trialsNeeded(last, tolerance), mostTrials);
  // Every doubling is run anew, so what was done and what is to do are sums of doublings.
  const done = 2 * last.trials;
  return Math.max(0, (elapsedSeconds * (2 * end - done)) / done);
}

/** Share of the way, measured in doublings; never quite all of it before the end. */
export function settleFraction(
  steps: readonly SettleStepView[],
  { tolerance, mostTrials }: SettleWish,
): number | undefined {
  const last = steps.at(-1);
  if (!last) return undefined;
  const end = Math.min(trialsNeeded(last, tolerance), mostTrials);
  return Math.min(0.98, last.trials / Math.max(end, last.trials));
}

export interface SettleEnd {
  tone: "success" | "warning" | "error" | "info";
  title: string;
  detail: string;
}

/** What became of the figures that a run found: "… in place of the figures before, whose P50 moved by +0.4 %." */
function replacedWords({ before, after }: NonNullable<RunItemView["outcome"]>): string {
  if (before === null || before.p50 === 0) return "The figures above are of this run.";
  const move = formatPercent(after.p50 / before.p50 - 1, { decimals: 1, signed: true });
  return `The figures above are of this run and replace those before it: P50 of condensate to the tank moved by ${move}.`;
}

/** What came of it and what to do; `null` while it goes on. */
export function settleEnd(
  run: Pick<RunView, "state">,
  item: Pick<RunItemView, "state" | "reason" | "outcome" | "progress"> | null,
  { tolerance, mostTrials }: SettleWish,
): SettleEnd | null {
  if (run.state === "waiting" || run.state === "running") return null;
  // The run was read after its end, its item before it: the next look at both will agree.
  const isBehind = !item || item.state === "waiting" || item.state === "running";
  if (run.state === "finished" && isBehind) return null;
  const last = item?.progress?.at(-1);
  if (item?.state === "done" && item.outcome) {
    const trials = trialsText(item.outcome.trials);
    const worst = last ? halfWidthText(last.worst) : null;
    if (item.outcome.settled !== false) {
      return {
        tone: "success",
        title: `Settled at ${trials} trials.`,
        detail: `P90, P50 and P10 of gas and of condensate are within ${worst ?? halfWidthText(tolerance)}. ${replacedWords(item.outcome)}`,
      };
    }
    const needed = last ? trialsNeeded(last, tolerance) : null;
    return {
      tone: "warning",
      title: `Not settled at the most trials allowed, ${trials}.`,
      detail: `The least known percentile is within ${worst ?? "more than was asked"}. ${
        needed !== null && needed > mostTrials && needed <= 1_048_576
          ? `About ${trialsText(needed)} trials would do: allow more, or ask for less.`
          : "Ask for less, or look for an input whose tail makes the percentiles wild."
      } ${replacedWords(item.outcome)}`,
    };
  }
  if (item?.state === "failed") {
    return {
      tone: "error",
      title: "The run failed.",
      detail: `${item.reason ?? "No reason was given."} The results above stand as they were.`,
    };
  }
  return {
    tone: "info",
    title: run.state === "cancelled" ? "Cancelled." : "Passed over.",
    detail: `${item?.reason ? `${item.reason} ` : ""}The results above stand as they were.`,
  };
}
