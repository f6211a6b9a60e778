import { beforeEach, describe, expect, it, vi } from "vitest";
import { DomainError } from "@/analytics/errors";
import type { Run } from "@/models/run";
import { StaleVersionError } from "@/services/errors";
import { computeItem, endingOf, type Ending } from "@/services/runs/compute-item";

const { findUser, findEstimate, runSimulation, runUntilSettled, storeResults } = vi.hoisted(() => ({
  findUser: vi.fn(),
  findEstimate: vi.fn(),
  runSimulation: vi.fn(),
  runUntilSettled: vi.fn(),
  storeResults: vi.fn(),
}));

vi.mock("@/models/queries/users", () => ({ findUser }));
vi.mock("@/models/queries/estimates", () => ({ findEstimate }));
vi.mock("@/services/compute/pool", () => ({ runSimulation, runUntilSettled }));
vi.mock("@/services/estimate-runs", () => ({
  storeResults,
  toResults: ({ summary }: { summary: unknown }) => ({ summary, vectors: {} }),
}));

const run = { kind: "recalculation", options: { scope: "both" }, createdBy: "person" } as Run;
const item = {
  runId: "run",
  position: 1,
  claimId: "claim",
  attempts: 1,
  estimateId: "estimate",
  estimateVersion: 4,
};
const person = { id: "person", name: "A", email: "a@example.org", role: "engineer", active: true };
const range = (p50: number) => ({ p90: p50 / 2, p50, p10: p50 * 2, mean: p50 });
const summary = (p50: number) => ({
  trials: 1024,
  engineVersion: "9.0.0",
  results: { condensateRecoverableStb: { ...range(p50), standardErrors: range(p50 / 100) } },
});
const stored = { id: "estimate", version: 4, state: "draft", summary: summary(100) };

const computed = (options = {}) =>
  computeItem({ ...run, ...options } as Run, item, {
    signal: new AbortController().signal,
    onSteps: vi.fn(),
  });

function done(ending: Ending) {
  if (ending.state !== "done") throw new Error(`${ending.state}: ${ending.reason}`);
  return ending;
}

beforeEach(() => {
  vi.resetAllMocks();
  findUser.mockResolvedValue(person);
  findEstimate.mockResolvedValue(stored);
  runSimulation.mockResolvedValue({ summary: summary(110), vectors: {} });
});

describe("computeItem(run, item)", () => {
  it.each(["draft", "returned"])("stores the results of a %s estimate", async (state) => {
    findEstimate.mockResolvedValue({ ...stored, state });
    const { store } = done(await computed());
    const transaction = {} as never;
    await store!(transaction);
    const [actor, id, version] = storeResults.mock.lastCall!;
    expect(actor).toMatchObject({ id: "person", role: "engineer" });
    expect([id, version]).toEqual(["estimate", 4]);
  });

  it.each(["approved", "submitted"])("only compares a %s estimate", async (state) => {
    findEstimate.mockResolvedValue({ ...stored, state });
    findUser.mockResolvedValue({ ...person, role: "planner" });
    const { store, outcome } = done(await computed());
    expect(store).toBeNull();
    expect(outcome).toMatchObject({ before: range(100), after: range(110), settled: null });
    // P50 moved by 10 with standard errors of 1 and 1.1; P90 and P10 in the same proportion.
    expect(outcome.movedStandardErrors).toBeCloseTo(10 / 1.1, 9);
  });

  it("computes nothing for a person who is no longer active, and says why", async () => {
    findUser.mockResolvedValue({ ...person, active: false });
    const ending = await computed();
    expect(ending).toMatchObject({ state: "failed" });
    expect("reason" in ending && ending.reason).toContain("no longer active");
    expect(runSimulation).not.toHaveBeenCalled();
  });

  it("stores nothing for a person who is made inactive while it computes", async () => {
    const { store } = done(await computed());
    findUser.mockResolvedValue({ ...person, active: false });
    const fault = await store!({} as never).catch((error: unknown) => error);
    expect(endingOf(fault)).toMatchObject({ state: "failed" });
    expect(storeResults).not.toHaveBeenCalled();
  });

  it("fails an open estimate whose person is no longer an engineer", async () => {
    findUser.mockResolvedValue({ ...person, role: "reviewer" });
    expect(await computed()).toMatchObject({ state: "failed" });
  });

  it("passes over an estimate that was changed or discarded after the run was asked for", async () => {
    findEstimate.mockResolvedValue({ ...stored, version: 5 });
    expect(await computed()).toMatchObject({ state: "passedOver" });
    findEstimate.mockResolvedValue(null);
    expect(await computed()).toMatchObject({ state: "passedOver" });
    expect(runSimulation).not.toHaveBeenCalled();
    expect(endingOf(new StaleVersionError(4, { version: 5 }))).toMatchObject({
      state: "passedOver",
    });
  });

  it("fails at once with the engine's reason when the inputs are impossible", async () => {
    runSimulation.mockRejectedValue(new DomainError("Porosity is below 1.", { input: "x" }));
    expect(await computed()).toEqual({ state: "failed", reason: "Porosity is below 1." });
  });

  it("throws what another attempt might not meet", async () => {
    runSimulation.mockRejectedValue(new Error("the thread ran out of memory"));
    await expect(computed()).rejects.toThrow("out of memory");
  });

  it("hands on every step of a run until settled, and says whether it is", async () => {
    const step = { trials: 1024, worst: 0.02 };
    runUntilSettled.mockImplementation((_inputs, _options, { onStep }) => {
      onStep(step);
      const simulation = { summary: summary(110), vectors: {} };
      return Promise.resolve({ simulation, settled: true, steps: [step] });
    });
    const options = { tolerance: 0.02, mostTrials: 4096 };
    const ending = done(await computed({ kind: "untilSettled", options }));
    expect(ending).toMatchObject({ steps: [step], outcome: { settled: true } });
    expect(runUntilSettled.mock.lastCall![1]).toMatchObject(options);
  });
});
