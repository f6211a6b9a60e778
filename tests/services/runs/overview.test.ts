import { describe, expect, it } from "vitest";
import type { RunTally } from "@/models/queries/runs";
import type { Run } from "@/models/run";
import type { Actor, Role } from "@/services/policy";
import { overviewOf } from "@/services/runs/overview";

const at = new Date("2026-12-01T12:00:00Z");
const before = (seconds: number) => new Date(at.getTime() - 1000 * seconds);

const actor = (role: Role, id = "somebody"): Actor => ({ id, role, name: "", email: "" });

function run(values: Partial<Run> = {}): Run {
  return {
    state: "running",
    createdBy: "owner",
    startedAt: before(120),
    updatedAt: before(120),
    ...values,
  } as Run;
}

function tally(values: Partial<RunTally> = {}): RunTally {
  return {
    counts: { waiting: 30, running: 2, done: 0, failed: 0, passedOver: 0 },
    workers: [],
    recentlyEnded: 0,
    ended: 0,
    lastEndedAt: null,
    held: true,
    ...values,
  };
}

const engineer = actor("engineer", "owner");
const workers = ["host:1:0c0ffe", "host:1:ab12cd"];

describe("overviewOf(actor, run, tally, at)", () => {
  it("takes the remaining time from the pace of the last minute", () => {
    // 40 in 60 s; 32 left: 48 s
    const found = overviewOf(engineer, run(), tally({ recentlyEnded: 40, ended: 500 }), at);
    expect(found.remainingSeconds).toBeCloseTo(48, 9);
  });

  it("takes it from the whole time when nothing ended within the last minute", () => {
    // 4 in 120 s; 32 left: 960 s
    const found = overviewOf(engineer, run(), tally({ ended: 4 }), at);
    expect(found.remainingSeconds).toBeCloseTo(960, 9);
  });

  it("does not count the time before work was begun again", () => {
    const again = run({ startedAt: before(9000), updatedAt: before(16) });
    const found = overviewOf(engineer, again, tally({ recentlyEnded: 8, ended: 8 }), at);
    expect(found.remainingSeconds).toBeCloseTo(64, 9);
  });

  it("promises nothing before anything is done, and after the end", () => {
    expect(overviewOf(engineer, run(), tally(), at).remainingSeconds).toBeNull();
    const finished = run({ state: "finished" });
    expect(overviewOf(engineer, finished, tally({ ended: 9 }), at).remainingSeconds).toBeNull();
  });

  it("promises nothing after a retry before something ended again", () => {
    // 20 had ended before it; none of them belongs to the pace of what is left.
    const again = run({ startedAt: before(9000), updatedAt: before(1) });
    const counts = { waiting: 3, running: 1, done: 20, failed: 0, passedOver: 0 };
    const found = overviewOf(engineer, again, tally({ counts, ended: 0 }), at);
    expect(found.remainingSeconds).toBeNull();
  });

  it("numbers the workers, and names them to administrators", () => {
    const seen = (who: Actor) => overviewOf(who, run(), tally({ workers }), at).workers;
    expect(seen(engineer)).toEqual(["worker 1", "worker 2"]);
    expect(seen(actor("planner"))).toEqual(["worker 1", "worker 2"]);
    expect(seen(actor("administrator"))).toEqual(workers);
  });

  it("calls a run stalled when nobody holds an item and nothing ended for 15 s", () => {
    const stalled = (values: Partial<RunTally>) =>
      overviewOf(engineer, run(), tally(values), at).stalled;
    expect(stalled({ held: false })).toBe(true);
    expect(stalled({ held: true })).toBe(false);
    expect(stalled({ held: false, lastEndedAt: before(14) })).toBe(false);
    expect(stalled({ held: false, lastEndedAt: before(16) })).toBe(true);
  });

  it("lets its owner and administrators cancel, and the owner alone retry", () => {
    const can = (who: Actor, state: Run["state"]) => {
      const counts = { waiting: 0, running: 0, done: 5, failed: 1, passedOver: 0 };
      return overviewOf(who, run({ state }), tally({ counts }), at).can;
    };
    expect(can(engineer, "running")).toEqual({ cancel: true, retry: false });
    expect(can(engineer, "finished")).toEqual({ cancel: false, retry: true });
    expect(can(actor("engineer"), "running")).toEqual({ cancel: false, retry: false });
    expect(can(actor("engineer"), "finished")).toEqual({ cancel: false, retry: false });
    expect(can(actor("administrator"), "running")).toEqual({ cancel: true, retry: false });
    expect(can(actor("executive", "owner"), "running")).toEqual({ cancel: false, retry: false });
  });
});
