import { beforeEach, describe, expect, it, vi } from "vitest";
import type { ClaimedItem } from "@/models/queries/run-leases";
import { RunWorker, nameOfWorker } from "@/services/runs/run-worker";

const leases = vi.hoisted(() => ({
  claimRunItem: vi.fn(),
  failExhaustedItems: vi.fn(),
  giveItemBack: vi.fn(),
  listOpenRuns: vi.fn(),
  lockLeasedItem: vi.fn(),
  markRunStarted: vi.fn(),
  renewLeases: vi.fn(),
  saveItemProgress: vi.fn(),
}));
const { computeItem, log } = vi.hoisted(() => ({
  computeItem: vi.fn(),
  log: { error: vi.fn(), warn: vi.fn() },
}));

vi.mock("@/models/queries/run-leases", () => leases);
vi.mock("@/models/queries/runs", () => ({
  findRun: () => Promise.resolve({ id: "run", kind: "recalculation", state: "running" }),
}));
vi.mock("@/services/runs/compute-item", () => ({ computeItem, endingOf: () => null }));
vi.mock("@/services/runs/finish-run", () => ({ finishRunIfDone: vi.fn() }));
vi.mock("@/services/runs/lanes", () => ({ priorities: {}, sendLane: vi.fn(), sendLanes: vi.fn() }));
vi.mock("@/services/transaction", () => ({
  inTransaction: (work: (transaction: unknown) => Promise<unknown>) => work({}),
}));
vi.mock("@/services/log", () => ({ log }));

const item = (claimId: string, attempts = 1): ClaimedItem => ({
  runId: "1a2b3c4d-5c1e-4000-8000-000000000001",
  position: 17,
  claimId,
  attempts,
  estimateId: "estimate",
  estimateVersion: 4,
});

beforeEach(() => {
  vi.resetAllMocks();
  leases.listOpenRuns.mockResolvedValue([]);
  leases.claimRunItem.mockResolvedValue(null);
});

describe("nameOfWorker()", () => {
  it("differs in the same process of the same host, as after a restart of a container", () => {
    const [one, other] = [nameOfWorker(), nameOfWorker()];
    expect(one).toMatch(new RegExp(`:${process.pid}:[0-9a-f]{6}$`));
    expect(one).not.toBe(other);
  });
});

describe("RunWorker", () => {
  it("renews the claims in its hands alone, and breaks off what is no longer its own", async () => {
    const signals: AbortSignal[] = [];
    computeItem.mockImplementation((_run, _item, { signal }: { signal: AbortSignal }) => {
      signals.push(signal);
      return new Promise((_resolve, reject) => {
        signal.addEventListener("abort", () => reject(signal.reason as Error));
      });
    });
    leases.claimRunItem.mockResolvedValueOnce(item("kept")).mockResolvedValueOnce(item("lost"));
    leases.renewLeases.mockResolvedValue(["kept"]);
    const worker = new RunWorker("here");
    const lanes = [0, 1].map((lane) => worker.work({ runId: "run", lane }));
    await vi.waitFor(() => expect(signals).toHaveLength(2));
    worker.start();
    await vi.waitFor(() => expect(signals[1].aborted).toBe(true));
    expect(signals[0].aborted).toBe(false);
    expect(leases.renewLeases.mock.lastCall![0]).toEqual(["kept", "lost"]);
    await worker.stop();
    await Promise.all(lanes);
    // What was lost is another's to end.
    expect(leases.giveItemBack.mock.calls).toEqual([
      [expect.objectContaining({ claimId: "kept" }), { counted: false }],
    ]);
  });

  it("tells people a plain sentence and a reference, and the log what happened", async () => {
    const fault = new Error('relation "secrets" does not exist at /srv/app/x.js:3');
    computeItem.mockRejectedValue(fault);
    leases.claimRunItem.mockResolvedValueOnce(item("third", 3));
    const row = { set: vi.fn(), save: vi.fn() };
    leases.lockLeasedItem.mockResolvedValue(row);
    await new RunWorker("here").work({ runId: "run", lane: 0 });
    expect(row.set).toHaveBeenCalledExactlyOnceWith(
      expect.objectContaining({
        state: "failed",
        claimId: null,
        reason:
          "Something unforeseen went wrong three times. An administrator finds it in the workers’ log as item 1a2b3c4d-17.",
      }),
    );
    expect(log.error.mock.lastCall![0]).toMatchObject({ err: fault, item: "1a2b3c4d-17" });
  });

  it("lets an item that met a fault wait for another attempt", async () => {
    computeItem.mockRejectedValue(new Error("out of memory"));
    leases.claimRunItem.mockResolvedValueOnce(item("second", 2));
    await new RunWorker("here").work({ runId: "run", lane: 0 });
    expect(leases.giveItemBack.mock.lastCall).toEqual([
      expect.objectContaining({ claimId: "second" }),
      { counted: true },
    ]);
    expect(leases.lockLeasedItem).not.toHaveBeenCalled();
  });
});
