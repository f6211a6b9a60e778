import { setTimeout as sleep } from "node:timers/promises";
import { afterEach, describe, expect, it } from "vitest";
import type { Problem } from "@/app/_server/problem";
import type { EstimateView } from "@/app/api/v1/estimates/schema";
import type { RunItemView, RunView } from "@/app/api/v1/runs/schema";
import type { Page } from "@/services/paging";
import { as, buildApproved, buildDraft, ifMatch, made } from "../factories";
import { queryRows } from "../support/database";
import type { ApiClient } from "../support/api";

const recalculation = (scope: string) => ({ kind: "recalculation", scope });

/** Nothing is ever known this well, so such a run goes on until it is stopped or has all its trials. */
const endless = { kind: "untilSettled", tolerance: 0.0005, mostTrials: 1_048_576 };

async function begun(client: ApiClient, body: unknown, headers = {}): Promise<RunView> {
  const answer = await client.post<RunView>("/api/v1/runs", body, { headers });
  expect(answer.status, JSON.stringify(answer.body)).toBe(202);
  return answer.body;
}

async function read(id: string): Promise<RunView> {
  return made(await (await as("engineer")).get<RunView>(`/api/v1/runs/${id}`));
}

async function until(id: string, isThere: (run: RunView) => boolean): Promise<RunView> {
  for (let attempt = 0; attempt < 120; attempt += 1) {
    const run = await read(id);
    if (isThere(run)) return run;
    await sleep(250);
  }
  throw new Error(`the run ${id} did not get there within 30 s`);
}

const finished = (id: string) => until(id, ({ state }) => state === "finished");

async function items(id: string, search = ""): Promise<RunItemView[]> {
  const path = `/api/v1/runs/${id}/items?limit=200${search}`;
  return made(await (await as("executive")).get<Page<RunItemView>>(path)).items;
}

async function estimate(id: string): Promise<EstimateView> {
  return made(await (await as("engineer")).get<EstimateView>(`/api/v1/estimates/${id}`));
}

/** What no request could write: inputs that the engine refuses. */
async function makeImpossible(id: string, pressurePsia: number): Promise<void> {
  await queryRows(
    `update estimates
      set inputs = jsonb_set(inputs, '{uncertain,pressurePsia,distribution,value}', to_jsonb($2::float8))
      where id = $1`,
    [id, pressurePsia],
  );
}

afterEach(async () => {
  const open = await queryRows<{ id: string }>(
    "select id from runs where state in ('waiting', 'running')",
  );
  const administrator = await as("administrator");
  for (const { id } of open) await administrator.post(`/api/v1/runs/${id}/cancel`);
});

describe("POST /api/v1/runs", () => {
  it("computes approved estimates again and changes none of them", async () => {
    const approved = await buildApproved();
    const rows = () =>
      queryRows("select id, version, summary from estimates where state = 'approved' order by id");
    const before = await rows();
    const planner = await as("planner");
    const asked = await begun(planner, recalculation("approved"));
    expect(asked).toMatchObject({
      kind: "recalculation",
      title: "Recalculation of approved estimates",
      createdBy: { name: "Marit Sundeholt" },
      counts: { total: before.length },
    });
    const run = await finished(asked.id);
    expect(run.counts).toMatchObject({ done: before.length, failed: 0, passedOver: 0 });
    expect(run.workers.length).toBeGreaterThan(0);
    expect(run.workers).toEqual(run.workers.map((_, index) => `worker ${index + 1}`));
    const administrator = await as("administrator");
    const named = made(await administrator.get<RunView>(`/api/v1/runs/${run.id}`));
    expect(named.workers).toHaveLength(run.workers.length);
    expect(named.workers.every((name) => /^.+:\d+:[0-9a-f]{6}$/.test(name))).toBe(true);
    expect(run).toMatchObject({ remainingSeconds: null, stalled: false });
    expect(await rows()).toEqual(before);

    const [item] = (await items(run.id)).filter(({ estimateId }) => estimateId === approved.id);
    const { p90, p50, p10, mean } = approved.summary!.results.condensateRecoverableStb;
    // The same inputs, seed and engine: the same trials.
    expect(item).toMatchObject({
      state: "done",
      attempts: 1,
      worker: expect.stringMatching(/^worker \d+$/),
      outcome: {
        before: { p90, p50, p10, mean },
        after: { p90, p50, p10, mean },
        movedShare: 0,
        movedStandardErrors: 0,
        settled: null,
      },
    });
    const moved = await items(run.id, "&movedBeyond=0");
    expect(moved.every(({ outcome }) => outcome!.movedStandardErrors! > 0)).toBe(true);
  });

  it("refuses a second one of the same estimates with the first one's id", async () => {
    await buildApproved();
    const planner = await as("planner");
    // Signed in beforehand: the first one may be done in a second.
    await as("engineer");
    const first = await begun(planner, recalculation("approved"));
    const engineer = await as("engineer");
    const refused = await Promise.all([
      planner.post<Problem>("/api/v1/runs", recalculation("approved")),
      engineer.post<Problem>("/api/v1/runs", recalculation("both")),
    ]);
    for (const { status, body } of refused) {
      expect(status).toBe(409);
      expect(body).toMatchObject({ code: "already_running", existingId: first.id });
    }
    await finished(first.id);
  });

  it("gives open estimates their results and a new version", async () => {
    const draft = await buildDraft();
    const run = await begun(await as("engineer"), recalculation("open"));
    await finished(run.id);
    const after = await estimate(draft.id);
    expect(after.version).toBe(draft.version + 1);
    expect(after.summary?.trials).toBe(draft.trials);
    const events = await queryRows(
      "select 1 from audit_events where entity_id = $1 and action = 'estimate.computed'",
      [draft.id],
    );
    expect(events).toHaveLength(1);
  });

  it("stores of a run until settled exactly the plain run of that number of trials", async () => {
    const engineer = await as("engineer");
    const draft = await buildDraft();
    const body = {
      kind: "untilSettled",
      estimateId: draft.id,
      tolerance: 0.05,
      mostTrials: 65_536,
    };
    const run = await finished((await begun(engineer, body)).id);
    const [item] = await items(run.id);
    expect(item.outcome).toMatchObject({ settled: true, before: null });
    const trials = item.outcome!.trials;
    expect(Math.log2(trials) % 1).toBe(0);
    expect(item.progress?.at(-1)).toMatchObject({ trials });
    expect(item.progress!.at(-1)!.worst).toBeLessThanOrEqual(0.05);

    const settled = await estimate(draft.id);
    expect(settled.trials).toBe(trials);
    const plain = made(
      await engineer.post<EstimateView>(
        `/api/v1/estimates/${draft.id}/run`,
        undefined,
        ifMatch(settled),
      ),
    );
    expect(plain.summary).toEqual(settled.summary);
  });

  it("fails an impossible estimate alone, and computes it on retry once it is possible", async () => {
    const engineer = await as("engineer");
    const [good, bad] = [await buildDraft(), await buildDraft()];
    await makeImpossible(bad.id, -5400);
    const run = await finished((await begun(engineer, recalculation("open"))).id);
    expect(run.counts.failed).toBe(1);
    expect(run.can.retry).toBe(true);
    expect((await estimate(good.id)).summary).not.toBeNull();
    const [failed] = await items(run.id, "&state=failed");
    expect(failed).toMatchObject({ estimateId: bad.id, attempts: 1, outcome: null });
    expect(failed.reason).toMatch(/pressure/i);

    await makeImpossible(bad.id, 5400);
    expect((await engineer.post(`/api/v1/runs/${run.id}/retry`)).status).toBe(202);
    const again = await finished(run.id);
    expect(again.counts).toMatchObject({ failed: 0, total: run.counts.total });
    expect((await estimate(bad.id)).summary).not.toBeNull();
    const goodVersion = (await estimate(good.id)).version;
    expect(goodVersion).toBe(good.version + 1);
  });

  it("begins once under one Idempotency-Key", async () => {
    const draft = await buildDraft();
    const engineer = await as("engineer");
    const headers = { "Idempotency-Key": `run-${draft.id}` };
    const body = { ...endless, estimateId: draft.id };
    const first = await begun(engineer, body, headers);
    expect((await begun(engineer, body, headers)).id).toBe(first.id);
    const other = await engineer.post<Problem>("/api/v1/runs", body);
    expect(other.body).toMatchObject({ code: "already_running", existingId: first.id });
  });

  it("refuses open estimates to a planner, and everything to an executive", async () => {
    const planner = await as("planner");
    expect((await planner.post("/api/v1/runs", recalculation("open"))).status).toBe(403);
    const executive = await as("executive");
    expect((await executive.post("/api/v1/runs", recalculation("approved"))).status).toBe(403);
  });

  it("refuses to run a submitted estimate until it is settled", async () => {
    const approved = await buildApproved();
    const body = { ...endless, estimateId: approved.id };
    const answer = await (await as("engineer")).post<Problem>("/api/v1/runs", body);
    expect(answer.body).toMatchObject({ status: 409, code: "wrong_state" });
  });
});

describe("POST /api/v1/runs/:id/cancel", () => {
  it("stops what is computed at this moment and stores nothing of it", async () => {
    const draft = await buildDraft();
    const engineer = await as("engineer");
    const { id } = await begun(engineer, { ...endless, estimateId: draft.id });
    await until(id, ({ counts }) => counts.running === 1);
    const cancelled = made(await engineer.post<RunView>(`/api/v1/runs/${id}/cancel`));
    expect(cancelled).toMatchObject({ state: "cancelled", counts: { passedOver: 1, running: 0 } });
    expect(cancelled.can).toEqual({ cancel: false, retry: true });
    const [item] = await items(id);
    expect(item.reason).toContain("cancelled while this was computed");

    // The thread is free again: another run is done while the first would still be going on.
    const other = await buildDraft();
    const body = { kind: "untilSettled", estimateId: other.id, tolerance: 0.1, mostTrials: 1_024 };
    await finished((await begun(engineer, body)).id);
    expect(await estimate(draft.id)).toMatchObject({ version: draft.version, summary: null });
    expect(await read(id)).toMatchObject({ state: "cancelled", counts: { passedOver: 1 } });
  });

  it("is for the person who began the run, and administrators", async () => {
    const draft = await buildDraft();
    const { id } = await begun(await as("engineer"), { ...endless, estimateId: draft.id });
    expect((await (await as("planner")).post(`/api/v1/runs/${id}/cancel`)).status).toBe(403);
    expect((await (await as("reviewer")).post(`/api/v1/runs/${id}/cancel`)).status).toBe(403);
    const administrator = await as("administrator");
    expect((await administrator.post(`/api/v1/runs/${id}/cancel`)).status).toBe(200);
  });

  it("answers 409 to a run that is finished", async () => {
    const draft = await buildDraft();
    const engineer = await as("engineer");
    const body = { kind: "untilSettled", estimateId: draft.id, tolerance: 0.1, mostTrials: 1_024 };
    const { id } = await finished((await begun(engineer, body)).id);
    expect((await engineer.post(`/api/v1/runs/${id}/cancel`)).status).toBe(409);
  });
});

describe("a run whose estimate changes meanwhile", () => {
  it("passes it over, and takes it as it is on retry", async () => {
    const engineer = await as("engineer");
    const draft = await buildDraft();
    const { id } = await begun(engineer, { ...endless, mostTrials: 524_288, estimateId: draft.id });
    await until(id, ({ counts }) => counts.running === 1);
    made(await engineer.patch(`/api/v1/estimates/${draft.id}`, { note: "wider" }, ifMatch(draft)));
    const run = await finished(id);
    expect(run.counts.passedOver).toBe(1);
    expect((await items(id))[0].reason).toContain("after the run was asked for");
    expect((await estimate(draft.id)).summary).toBeNull();
  });
});

describe("GET /api/v1/runs", () => {
  it("lists runs newest first", async () => {
    const draft = await buildDraft();
    const body = { kind: "untilSettled", estimateId: draft.id, tolerance: 0.1, mostTrials: 1_024 };
    const { id } = await begun(await as("engineer"), body);
    const page = made(await (await as("executive")).get<Page<RunView>>("/api/v1/runs?limit=1"));
    expect(page.items[0].id).toBe(id);
    expect(page.items[0].can).toEqual({ cancel: false, retry: false });
  });

  it("answers 404 to a run that is not there", async () => {
    const path = "/api/v1/runs/00000000-0000-4000-8000-000000000000";
    expect((await (await as("engineer")).get(path)).status).toBe(404);
    expect((await (await as("engineer")).get(`${path}/items`)).status).toBe(404);
  });
});
