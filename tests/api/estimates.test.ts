import { describe, expect, it } from "vitest";
import type { Problem } from "@/app/_server/problem";
import type { AuditEventView } from "@/app/api/v1/audit-events/schema";
import type { EstimateListItemView, EstimateView } from "@/app/api/v1/estimates/schema";
import type { ReservoirFileView } from "@/app/api/v1/reservoirs/schema";
import type { SessionView } from "@/app/api/v1/session/schema";
import {
  as,
  buildApproved,
  buildDraft,
  buildFluidSample,
  buildReservoir,
  buildSubmitted,
  estimateInputs,
  ifMatch,
  made,
  separatorTest,
  withConstant,
} from "../factories";
import { visitor } from "../support/api";
import { queryRows } from "../support/database";

const pathOf = ({ id }: { id: string }) => `/api/v1/estimates/${id}`;

async function run(estimate: EstimateView): Promise<EstimateView> {
  const engineer = await as("engineer");
  const path = `${pathOf(estimate)}/run`;
  return made(await engineer.post<EstimateView>(path, undefined, ifMatch(estimate)));
}

describe("POST /api/v1/reservoirs/:id/estimates", () => {
  it("begins revision 1 as a draft without results", async () => {
    const draft = await buildDraft();
    expect(draft).toMatchObject({ revision: 1, state: "draft", summary: null, version: 1 });
    expect(draft.can).toEqual({
      update: true,
      run: true,
      submit: true,
      discard: true,
      approve: false,
      return: false,
    });
  });

  it("begins the next revision as a copy of the approved one, with its seed", async () => {
    const engineer = await as("engineer");
    const approved = await buildApproved();
    const path = `/api/v1/reservoirs/${approved.reservoirId}/estimates`;
    const next = made(await engineer.post<EstimateView>(path, {}));
    expect(next).toMatchObject({ revision: 2, state: "draft", seed: approved.seed });
    expect(next.inputs).toEqual(approved.inputs);
  });

  it("answers 409 while another revision is open", async () => {
    const engineer = await as("engineer");
    const draft = await buildDraft();
    const path = `/api/v1/reservoirs/${draft.reservoirId}/estimates`;
    const answer = await engineer.post(path, { inputs: estimateInputs() });
    expect(answer.status).toBe(409);
  });

  it("answers 409 when there is nothing to copy", async () => {
    const engineer = await as("engineer");
    const path = `/api/v1/reservoirs/${(await buildReservoir()).id}/estimates`;
    expect(await engineer.post(path, {})).toMatchObject({
      status: 409,
      body: { code: "nothing_to_copy" },
    });
  });

  it("takes the sheet of a sample that it names", async () => {
    const engineer = await as("engineer");
    const reservoir = await buildReservoir();
    const sample = await buildFluidSample(reservoir.id);
    const inputs = estimateInputs({ fluid: separatorTest({ condensateApi: 48 }) });
    const path = `/api/v1/reservoirs/${reservoir.id}/estimates`;
    const body = { inputs, fluidSampleId: sample.id };
    const draft = made(await engineer.post<EstimateView>(path, body));
    expect(draft.fluidSampleId).toBe(sample.id);
    expect(draft.inputs.fluid.condensateApi).toBe(54);
  });

  it("answers 422 to a sample of another reservoir", async () => {
    const engineer = await as("engineer");
    const sample = await buildFluidSample((await buildReservoir()).id);
    const path = `/api/v1/reservoirs/${(await buildReservoir()).id}/estimates`;
    const body = { inputs: estimateInputs(), fluidSampleId: sample.id };
    expect((await engineer.post(path, body)).status).toBe(422);
  });

  it("answers 422 with a pointer to the impossible input", async () => {
    const engineer = await as("engineer");
    const path = `/api/v1/reservoirs/${(await buildReservoir()).id}/estimates`;
    const inputs = withConstant(estimateInputs(), "porosity", 1.4);
    const answer = await engineer.post<Problem>(path, { inputs });
    expect(answer.status).toBe(422);
    expect(answer.body.errors?.[0].pointer).toMatch(/^#\/inputs\/uncertain\/porosity/);
  });

  it("answers 403 to a reviewer and 401 to a visitor", async () => {
    const path = `/api/v1/reservoirs/${(await buildReservoir()).id}/estimates`;
    const body = { inputs: estimateInputs() };
    expect((await (await as("reviewer")).post(path, body)).status).toBe(403);
    expect((await visitor().post(path, body)).status).toBe(401);
  });
});

describe("POST /api/v1/estimates/:id/run", () => {
  it("answers with the summary and keeps every trial as float32", async () => {
    const done = await run(await buildDraft());
    expect(done.summary?.trials).toBe(1000);
    const { p90, p50, p10 } = done.summary?.results.condensateRecoverableStb ?? {
      p90: NaN,
      p50: NaN,
      p10: NaN,
    };
    expect(p90).toBeLessThan(p50);
    expect(p50).toBeLessThan(p10);
    const [row] = await queryRows<{ bytes: Buffer; trials: number }>(
      "select condensate_recoverable_stb as bytes, trials from estimate_trials where estimate_id = $1",
      [done.id],
    );
    expect(row.trials).toBe(1000);
    const values = Array.from({ length: 1000 }, (_, trial) => row.bytes.readFloatLE(4 * trial));
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    // float32 carries 24 bits, so a mean of a thousand of them is good to about 1e-7 of itself.
    const expected = done.summary?.results.condensateRecoverableStb.mean ?? NaN;
    expect(Math.abs(mean / expected - 1)).toBeLessThan(1e-6);
  });

  it("gives the same figures for the same inputs and seed", async () => {
    const first = await run(await buildDraft());
    const second = await run(first);
    expect(second.summary).toEqual(first.summary);
  });

  it("answers 412 when the estimate changed since", async () => {
    const engineer = await as("engineer");
    const draft = await buildDraft();
    made(await engineer.patch(pathOf(draft), { note: "changed" }, ifMatch(draft)));
    const stale = await engineer.post(`${pathOf(draft)}/run`, undefined, ifMatch(draft));
    expect(stale.status).toBe(412);
  });
});

describe("PATCH /api/v1/estimates/:id", () => {
  it("changes the method of sampling where the number of trials allows it, and takes the results away", async () => {
    const engineer = await as("engineer");
    const done = await run(await buildDraft());
    expect(done.sampling).toBe("latinHypercube");
    const sobol = { sampling: "sobol" };
    const refused = await engineer.patch<Problem>(pathOf(done), sobol, ifMatch(done));
    expect(refused.status).toBe(422);
    expect(refused.body.errors?.[0]).toMatchObject({
      pointer: "#/trials",
      detail: expect.stringContaining("powers of two") as string,
    });
    const changed = made(
      await engineer.patch<EstimateView>(pathOf(done), { ...sobol, trials: 2048 }, ifMatch(done)),
    );
    expect(changed).toMatchObject({ sampling: "sobol", trials: 2048, summary: null });
    const again = await run(changed);
    expect(again.summary).toMatchObject({ sampling: "sobol", trials: 2048, replicates: 16 });
  });

  it("takes the results away when an input changes, and keeps them when only the note does", async () => {
    const engineer = await as("engineer");
    const done = await run(await buildDraft());
    const noted = made(
      await engineer.patch<EstimateView>(pathOf(done), { note: "core data" }, ifMatch(done)),
    );
    expect(noted.summary).not.toBeNull();
    const same = made(
      await engineer.patch<EstimateView>(pathOf(done), { inputs: done.inputs }, ifMatch(noted)),
    );
    expect(same.summary).not.toBeNull();
    const inputs = withConstant(done.inputs, "areaAcres", 4000);
    const changed = made(
      await engineer.patch<EstimateView>(pathOf(done), { inputs }, ifMatch(same)),
    );
    expect(changed).toMatchObject({ summary: null, computedAt: null, engineVersion: null });
    const trials = await queryRows("select 1 from estimate_trials where estimate_id = $1", [
      done.id,
    ]);
    expect(trials).toEqual([]);
  });

  it("forgets the sample when its sheet is edited by hand", async () => {
    const engineer = await as("engineer");
    const draft = await buildDraft();
    const sample = await buildFluidSample(draft.reservoirId);
    const path = pathOf(draft);
    const tied = made(
      await engineer.patch<EstimateView>(path, { fluidSampleId: sample.id }, ifMatch(draft)),
    );
    expect(tied.fluidSampleId).toBe(sample.id);
    const inputs = { ...tied.inputs, fluid: separatorTest({ condensateApi: 51 }) };
    const edited = made(await engineer.patch<EstimateView>(path, { inputs }, ifMatch(tied)));
    expect(edited.fluidSampleId).toBeNull();
  });

  it("answers 409 while the estimate lies with the reviewer", async () => {
    const engineer = await as("engineer");
    const submitted = await buildSubmitted();
    const answer = await engineer.patch(pathOf(submitted), { note: "no" }, ifMatch(submitted));
    expect(answer).toMatchObject({ status: 409, body: { code: "wrong_state" } });
  });
});

describe("POST /api/v1/estimates/:id/submit", () => {
  it("answers 409 when the estimate was not run as it stands", async () => {
    const engineer = await as("engineer");
    const draft = await buildDraft();
    const answer = await engineer.post(`${pathOf(draft)}/submit`, {}, ifMatch(draft));
    expect(answer).toMatchObject({ status: 409, body: { code: "not_run" } });
  });

  it("answers 409 when the results are from another engine", async () => {
    const engineer = await as("engineer");
    const done = await run(await buildDraft());
    await queryRows("update estimates set engine_version = '0.0.1' where id = $1", [done.id]);
    const answer = await engineer.post(`${pathOf(done)}/submit`, {}, ifMatch(done));
    expect(answer).toMatchObject({ status: 409, body: { code: "engine_changed" } });
  });

  it("puts the estimate into the reviewers' queue", async () => {
    const submitted = await buildSubmitted();
    expect(submitted).toMatchObject({ state: "submitted", submitter: { name: "Ines Okonrae" } });
    const queue = await (
      await as("reviewer")
    ).get<{ items: EstimateListItemView[] }>("/api/v1/estimates?state=submitted&limit=200");
    const waiting = queue.body.items.find(({ id }) => id === submitted.id);
    expect(waiting).toMatchObject({ can: { approve: true, return: true, update: false } });
    expect(waiting?.place.field.name).toMatch(/^Field /);
  });
});

describe("POST /api/v1/estimates/:id/approve", () => {
  it("makes it the approved one and supersedes the one before", async () => {
    const reviewer = await as("reviewer");
    const first = await buildApproved();
    expect(first).toMatchObject({ state: "approved", decider: { name: "Tobias Falkmere" } });
    const second = await buildApproved(first.reservoirId);
    expect(second.revision).toBe(2);
    const before = await reviewer.get<EstimateView>(pathOf(first));
    expect(before.body.state).toBe("superseded");
    const { body } = await reviewer.get<ReservoirFileView>(
      `/api/v1/reservoirs/${first.reservoirId}`,
    );
    expect(body.approved?.id).toBe(second.id);
    expect(body.open).toBeNull();
    expect(body.history.map(({ revision }) => revision)).toEqual([2, 1]);
  });

  it("answers 403 to everybody but a reviewer", async () => {
    const submitted = await buildSubmitted();
    for (const role of ["engineer", "planner", "executive", "administrator"] as const) {
      const client = await as(role);
      const answer = await client.post(`${pathOf(submitted)}/approve`, {}, ifMatch(submitted));
      expect(answer.status).toBe(403);
    }
  });

  it("answers 403 when a reviewer approves their own estimate", async () => {
    const reviewer = await as("reviewer");
    const submitted = await buildSubmitted();
    const { body: session } = await reviewer.get<SessionView>("/api/v1/session");
    // As if the reviewer had been an engineer when this estimate was submitted.
    await queryRows("update estimates set submitted_by = $1 where id = $2", [
      session.id,
      submitted.id,
    ]);
    const answer = await reviewer.post<Problem>(
      `${pathOf(submitted)}/approve`,
      {},
      ifMatch(submitted),
    );
    expect(answer.status).toBe(403);
    expect(answer.body.detail).toMatch(/their own/);
    const seen = await reviewer.get<EstimateView>(pathOf(submitted));
    expect(seen.body.can.approve).toBe(false);
  });

  it("counts from the date given, and refuses one to come or before the predecessor's", async () => {
    const reviewer = await as("reviewer");
    const first = await buildSubmitted();
    const approve = (estimate: EstimateView, effectiveOn: string) =>
      reviewer.post<EstimateView>(
        `${pathOf(estimate)}/approve`,
        { effectiveOn },
        ifMatch(estimate),
      );
    const early = await approve(first, "2999-01-01");
    expect(early).toMatchObject({ status: 422, body: { errors: [{ pointer: "#/effectiveOn" }] } });
    const approved = made(await approve(first, "2025-07-01"));
    expect(approved.effectiveOn).toBe("2025-07-01");

    const second = await buildSubmitted(approved.reservoirId);
    const before = await approve(second, "2025-06-30");
    expect(before).toMatchObject({ status: 422, body: { errors: [{ pointer: "#/effectiveOn" }] } });
    expect((await approve(second, "2025-07-01")).status).toBe(200);
  });

  it("answers 409 when it was approved already", async () => {
    const reviewer = await as("reviewer");
    const approved = await buildApproved();
    const answer = await reviewer.post(`${pathOf(approved)}/approve`, {}, ifMatch(approved));
    expect(answer).toMatchObject({ status: 409, body: { code: "wrong_state" } });
  });

  it("lets one of two simultaneous decisions through", async () => {
    const reviewer = await as("reviewer");
    const submitted = await buildSubmitted();
    const answers = await Promise.all([
      reviewer.post(`${pathOf(submitted)}/approve`, {}, ifMatch(submitted)),
      reviewer.post(`${pathOf(submitted)}/return`, { note: "look again" }, ifMatch(submitted)),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 412]);
  });
});

describe("POST /api/v1/estimates/:id/return", () => {
  it("asks for a note, then hands the estimate back to be changed and submitted again", async () => {
    const [engineer, reviewer] = [await as("engineer"), await as("reviewer")];
    const submitted = await buildSubmitted();
    const path = pathOf(submitted);
    const silent = await reviewer.post(`${path}/return`, { note: " " }, ifMatch(submitted));
    expect(silent.status).toBe(422);
    const note = { note: "Thickness looks gross, not net." };
    const returned = made(
      await reviewer.post<EstimateView>(`${path}/return`, note, ifMatch(submitted)),
    );
    expect(returned).toMatchObject({ state: "returned", decisionNote: note.note });
    const inputs = withConstant(returned.inputs, "netThicknessFt", 70);
    const patched = made(await engineer.patch<EstimateView>(path, { inputs }, ifMatch(returned)));
    const again = await run(patched);
    const resubmitted = made(
      await engineer.post<EstimateView>(`${path}/submit`, {}, ifMatch(again)),
    );
    expect(resubmitted).toMatchObject({ state: "submitted", decider: null, decisionNote: "" });
  });
});

describe("DELETE /api/v1/estimates/:id", () => {
  it("discards a draft, and nothing else", async () => {
    const engineer = await as("engineer");
    const draft = await run(await buildDraft());
    const gone = await engineer.delete(pathOf(draft), ifMatch(draft));
    expect(gone.status).toBe(204);
    expect((await engineer.get(pathOf(draft))).status).toBe(404);
    const approved = await buildApproved();
    expect((await engineer.delete(pathOf(approved), ifMatch(approved))).status).toBe(409);
  });
});

describe("GET /api/v1/estimates/:id/history", () => {
  it("tells what happened, by whom, newest first", async () => {
    const approved = await buildApproved();
    const executive = await as("executive");
    const { body } = await executive.get<{ items: AuditEventView[] }>(
      `${pathOf(approved)}/history`,
    );
    expect(body.items.map(({ action }) => action)).toEqual([
      "estimate.approved",
      "estimate.submitted",
      "estimate.computed",
      "estimate.created",
    ]);
    expect(body.items[0].actor?.name).toBe("Tobias Falkmere");
  });
});

describe("the database", () => {
  it("refuses to change, delete or recompute an approved estimate", async () => {
    const { id } = await buildApproved();
    const immutable = /cannot be (changed|deleted)|belong to a/;
    await expect(queryRows("update estimates set note = 'x' where id = $1", [id])).rejects.toThrow(
      immutable,
    );
    await expect(
      queryRows("update estimates set state = 'draft' where id = $1", [id]),
    ).rejects.toThrow(immutable);
    await expect(queryRows("delete from estimates where id = $1", [id])).rejects.toThrow(immutable);
    await expect(
      queryRows("update estimates set sampling = 'sobol' where id = $1", [id]),
    ).rejects.toThrow(immutable);
    const submitted = await buildSubmitted();
    await expect(
      queryRows("update estimates set sampling = 'sobol' where id = $1", [submitted.id]),
    ).rejects.toThrow(/lies with a reviewer/);
    await expect(
      queryRows("update estimate_trials set trials = trials where estimate_id = $1", [id]),
    ).rejects.toThrow(immutable);
    await expect(
      queryRows("delete from estimate_trials where estimate_id = $1", [id]),
    ).rejects.toThrow(immutable);
  });

  it("refuses a decision by the person who submitted", async () => {
    const { id } = await buildSubmitted();
    await expect(
      queryRows(
        `update estimates set state = 'returned', decided_by = submitted_by, decided_at = now()
          where id = $1`,
        [id],
      ),
    ).rejects.toThrow(/estimates_not_own_decision/);
  });
});
