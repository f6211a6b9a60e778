import { describe, expect, it } from "vitest";
import type { RunView } from "@/app/api/v1/runs/schema";
import {
  compareOutcomes,
  durationWords,
  fractionOf,
  movedNote,
  movedWords,
  outcomeWords,
  paceWords,
  progressWords,
  runTitle,
} from "@/components/runs/run-words";

const nothing = { compared: 0, same: 0, beyond: 0, largestShare: 0 };
const range = { p90: 1, p50: 2, p10: 3, mean: 2 };

function run(change: Partial<RunView> = {}, counts: Partial<RunView["counts"]> = {}): RunView {
  return {
    id: "0198f0aa-5c1e-7000-8000-000000000001",
    kind: "recalculation",
    state: "finished",
    title: "Recalculation of the approved book",
    createdBy: null,
    createdAt: "2026-12-01T08:00:00.000Z",
    startedAt: null,
    finishedAt: null,
    counts: { total: 22, waiting: 0, running: 0, done: 22, failed: 0, passedOver: 0, ...counts },
    remainingSeconds: null,
    workers: [],
    stalled: false,
    can: { cancel: false, retry: false },
    version: 1,
    ...change,
  };
}

describe("durationWords(seconds)", () => {
  it("is no finer than what is known", () => {
    expect(durationWords(0.2)).toBe("1 s");
    expect(durationWords(89)).toBe("89 s");
    expect(durationWords(100)).toBe("2 min");
    expect(durationWords(4800)).toBe("80 min");
    expect(durationWords(6000)).toBe("1 h 40 min");
    expect(durationWords(7200)).toBe("2 h");
  });
});

describe("the progress of a run", () => {
  const underWay = run(
    { state: "running", remainingSeconds: 540 },
    { total: 500, waiting: 376, running: 2, done: 120, failed: 2 },
  );

  it("counts what needs nothing more", () => {
    expect(fractionOf(underWay)).toBe(122 / 500);
    expect(fractionOf(run({}, { total: 0, done: 0 }))).toBe(1);
  });

  it("says counts, pace and remaining time", () => {
    expect(paceWords(underWay)).toBe("42 a minute");
    expect(progressWords(underWay)).toBe("122 of 500, 42 a minute, about 9 min left");
  });

  it("says how long one takes where a minute is too short for one", () => {
    const slow = run({ state: "running", remainingSeconds: 600 }, { waiting: 4, running: 1 });
    expect(paceWords(slow)).toBe("one in 2 min");
  });

  it("claims no pace before anything is done", () => {
    expect(paceWords(run({ state: "running" }, { waiting: 22, done: 0 }))).toBeNull();
  });
});

describe("runTitle(run, comparison)", () => {
  it("states the finding of a finished recalculation", () => {
    const found = (same: number, beyond: number, compared = 22) =>
      runTitle(run(), { compared, same, beyond, largestShare: 0.004 });
    expect(found(22, 0)).toBe("22 of 22 estimates repeat exactly");
    expect(found(1, 0, 1)).toBe("1 of 1 estimate repeats exactly");
    expect(found(21, 0)).toBe("22 of 22 estimates moved by 2 standard errors at most");
    expect(found(0, 3)).toBe("3 of 22 estimates moved by more than 2 standard errors");
  });

  it("puts failures before everything else", () => {
    expect(runTitle(run({}, { done: 20, failed: 2 }), { ...nothing, compared: 20, same: 20 })).toBe(
      "2 of 22 estimates could not be computed",
    );
  });

  it("claims no comparison where there were no results before", () => {
    expect(runTitle(run(), nothing)).toBe("22 of 22 estimates computed");
    expect(runTitle(run(), null)).toBe("22 of 22 estimates computed");
  });

  it("says where a run stands that has not finished", () => {
    expect(runTitle(run({ state: "waiting" }, { waiting: 22, done: 0 }), null)).toBe(
      "22 estimates wait for a worker",
    );
    expect(runTitle(run({ state: "waiting" }, { waiting: 20, done: 2 }), null)).toBe(
      "20 estimates wait for a worker",
    );
    expect(runTitle(run({ state: "cancelled" }, { done: 7 }), null)).toBe(
      "Cancelled after 7 of 22 estimates",
    );
  });
});

describe("outcomeWords(run)", () => {
  it("says that a run stands still instead of a pace", () => {
    expect(outcomeWords(run({ state: "running", stalled: true }))).toBe("standing still");
  });
});

describe("how far figures moved", () => {
  const outcome = {
    trials: 16_384,
    engineVersion: "2.0.0",
    before: range,
    after: range,
    standardErrors: range,
    movedShare: -0.0042,
    movedStandardErrors: 2.43,
    settled: null,
  };
  const same = { ...outcome, movedShare: 0, movedStandardErrors: 0 };
  const first = { ...outcome, before: null, movedShare: null, movedStandardErrors: null };

  it("is said in per cent, beside standard errors", () => {
    expect(movedWords({ outcome })).toBe("−0.42\u00a0%, 2.4 SE");
    expect(movedWords({ outcome: { ...outcome, movedShare: 0.123 } })).toBe("+12\u00a0%, 2.4 SE");
    expect(movedWords({ outcome: same })).toBe("the same");
  });

  it("never calls the same what differs in its last digits, nor a move from 0 a share", () => {
    const least = { ...outcome, movedShare: 1e-15, movedStandardErrors: 1e-12 };
    expect(movedWords({ outcome: least })).toBe("under 0.01\u00a0%, under 0.01 SE");
    expect(movedWords({ outcome: { ...outcome, movedShare: null } })).toBe("from 0, 2.4 SE");
  });

  it("compares nothing with results that were not there", () => {
    expect(movedWords({ outcome: first })).toBe("first results");
    expect(movedWords({ outcome: null })).toBe("–");
  });

  it("is counted over a run", () => {
    expect(compareOutcomes([outcome, same, same, first, null])).toEqual({
      compared: 3,
      same: 2,
      beyond: 1,
      largestShare: -0.0042,
    });
  });

  it("is put down to the engine, never to chance", () => {
    const moved = movedNote(compareOutcomes([outcome, same, same]));
    expect(moved).toMatch(/same random numbers, so a move is the engine’s doing, not chance/);
    expect(moved).toMatch(/2 of 3 repeat exactly; the largest move is −0\.42\s%\.$/);
    expect(movedNote(compareOutcomes([same]))).toMatch(/Nothing moved\.$/);
  });
});
