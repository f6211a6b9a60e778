import { describe, expect, it } from "vitest";
import type { Problem } from "@/app/_server/problem";
import { changeResponseSchema, type ChangeRequest } from "@/app/api/v1/calculations/change/schema";
import { wholeSensitivitySchema } from "@/app/api/v1/calculations/sensitivity/schema";
import { comparisonSchema, type Comparison } from "@/app/api/v1/comparisons/schema";
import type { EstimateView } from "@/app/api/v1/estimates/schema";
import type { ReservoirView } from "@/app/api/v1/reservoirs/schema";
import { buildPlan } from "../analytics/recovery/published-curve";
import {
  as,
  buildApproved,
  buildDraft,
  buildField,
  buildReservoir,
  buildSubmitted,
  estimateInputs,
  ifMatch,
  made,
  uniqueName,
  withConstant,
} from "../factories";
import { visitor } from "../support/api";

const sensitivityPath = "/api/v1/calculations/sensitivity";
const changePath = "/api/v1/calculations/change";
const comparisonPath = "/api/v1/comparisons";

describe("POST /api/v1/calculations/sensitivity", () => {
  const question = {
    inputs: estimateInputs(),
    seed: 7,
    trials: 2_000,
    sampling: "latinHypercube",
    result: "condensateRecoverableStb",
  };

  it("answers what drives a result, the same every time", async () => {
    const engineer = await as("engineer");
    const answer = await engineer.post(sensitivityPath, question);
    expect(answer).toMatchObject({ status: 200 });
    const body = wholeSensitivitySchema.parse(answer.body);
    expect(body.trials).toBe(2_000);
    expect(body.knowing[0].input).toBe("areaAcres");
    expect(body.conditional).toMatchObject({ from: 0.9, to: 1, trials: 200 });
    expect(body.varianceShares.factors.map(({ inputs }) => inputs)).not.toContainEqual([
      "pressurePsia",
    ]);
    expect((await engineer.post(sensitivityPath, question)).body).toEqual(answer.body);
  });

  it("looks at the trials that a revision stored", async () => {
    const engineer = await as("engineer");
    const run = await buildSubmitted();
    const { inputs, seed, trials, sampling } = run;
    const answer = await engineer.post(sensitivityPath, {
      ...{ inputs, seed, trials, sampling, result: "salesGasScf" },
      chosen: { from: 0, to: 1 },
    });
    const { conditional } = wholeSensitivitySchema.parse(made(answer));
    const { p90, p50, p10 } = run.summary?.results.salesGasScf ?? {};
    expect(conditional.result).toMatchObject({ p90, p50, p10 });
  });

  it("refuses an impossible input and an interval too narrow, at their fields", async () => {
    const engineer = await as("engineer");
    const inputs = withConstant(estimateInputs(), "porosity", 0.7);
    const impossible = await engineer.post<Problem>(sensitivityPath, { ...question, inputs });
    expect(impossible.status).toBe(422);
    expect(impossible.body.errors?.[0].pointer).toBe("#/inputs/uncertain/porosity/value");
    const chosen = { from: 0.5, to: 0.505 };
    const narrow = await engineer.post<Problem>(sensitivityPath, { ...question, chosen });
    expect(narrow.status).toBe(422);
    expect(narrow.body.errors?.[0].pointer).toBe("#/chosen");
  });

  it("refuses a number of trials that Sobol points cannot have", async () => {
    const engineer = await as("engineer");
    const body = { ...question, sampling: "sobol", trials: 3_000 };
    const answer = await engineer.post<Problem>(sensitivityPath, body);
    expect(answer.status).toBe(422);
    expect(answer.body.errors?.[0].pointer).toBe("#/trials");
  });

  it("asks for a sign-in", async () => {
    expect((await visitor().post(sensitivityPath, question)).status).toBe(401);
  });
});

describe("POST /api/v1/calculations/change", () => {
  const side = { seed: 7, trials: 2_000, sampling: "latinHypercube" } as const;
  const question: ChangeRequest = {
    from: { ...side, inputs: withConstant(estimateInputs(), "areaAcres", 4_000) },
    to: {
      ...side,
      inputs: withConstant(
        withConstant(estimateInputs(), "areaAcres", 5_000),
        "condensateYieldStbPerMmscf",
        60,
      ),
    },
    result: "wetGasInPlaceScf",
    percentile: "p50",
  };

  it("shares the move among what differs, and the shares add up to it", async () => {
    const engineer = await as("engineer");
    const body = changeResponseSchema.parse(made(await engineer.post(changePath, question)));
    const { from, to, changes, orders } = body;
    // Gas in place is proportional to area: a quarter more.
    const area = changes.find(
      ({ change }) => change.kind === "input" && change.input === "areaAcres",
    );
    expect((area?.effect ?? 0) / from).toBeCloseTo(0.25, 2);
    expect(orders).toBe("all");
    const sum = changes.reduce((total, { effect }) => total + effect, 0);
    expect(sum / (to - from)).toBeCloseTo(1, 9);
  });

  it("refuses a side that is impossible, at that side", async () => {
    const engineer = await as("engineer");
    const to = { ...question.to, inputs: withConstant(estimateInputs(), "porosity", 0.7) };
    const answer = await engineer.post<Problem>(changePath, { ...question, to });
    expect(answer.status).toBe(422);
    expect(answer.body.errors?.[0].pointer).toBe("#/to/inputs/uncertain/porosity/value");
  });
});

describe("POST /api/v1/comparisons", () => {
  async function compare(body: unknown): Promise<Comparison> {
    const executive = await as("executive");
    return comparisonSchema.parse(made(await executive.post(comparisonPath, body)));
  }

  /** The next revision of the same reservoir, with another area, as run. */
  async function buildNext(approved: EstimateView, inputs: EstimateView["inputs"]) {
    const engineer = await as("engineer");
    const path = `/api/v1/reservoirs/${approved.reservoirId}/estimates`;
    const draft = made(await engineer.post<EstimateView>(path, { inputs, trials: 1_000 }));
    return made(
      await engineer.post<EstimateView>(
        `/api/v1/estimates/${draft.id}/run`,
        undefined,
        ifMatch(draft),
      ),
    );
  }

  it("puts two revisions beside each other and explains the P50", async () => {
    const before = await buildApproved();
    const inputs = structuredClone(before.inputs);
    inputs.uncertain.areaAcres.distribution = { kind: "lognormalP90P10", p90: 3_400, p10: 6_000 };
    const now = await buildNext(before, inputs);
    const comparison = await compare({
      left: { kind: "estimate", estimateId: before.id },
      right: { kind: "estimate", estimateId: now.id },
    });
    const { left, right, explanation } = comparison;
    const { field, reservoir } = before.place;
    expect(left.label).toBe(`${field.name}, ${reservoir.name}, r1`);
    expect(left.href).toBe(`/fields/${field.slug}/${reservoir.slug}/results`);
    expect(left.detail).toMatch(/^Approved, in force from \d+ \w+ \d{4}$/);
    expect(right.detail).toMatch(/^Draft, run \d+ \w+ \d{4}$/);
    const p50 = (run: EstimateView) => run.summary?.results.condensateRecoverableStb.p50;
    expect(left.quantities.condensateRecoverableStb.p50).toBe(p50(before));
    expect(explanation).toMatchObject({ from: p50(before), to: p50(now) });
    expect(explanation?.changes.map(({ change }) => change)).toEqual([
      { kind: "input", input: "areaAcres" },
    ]);
    expect(comparison.whyNotExplained).toBeNull();
  });

  it("computes a draft that was not run, and keeps nothing", async () => {
    const engineer = await as("engineer");
    const draft = await buildDraft();
    const side = { kind: "estimate", estimateId: draft.id };
    const { left, explanation } = await compare({ left: side, right: side });
    expect(left.detail).toBe("Draft, computed for this comparison");
    expect(explanation?.changes).toEqual([]);
    const after = made(await engineer.get<EstimateView>(`/api/v1/estimates/${draft.id}`));
    expect(after).toMatchObject({ summary: null, version: draft.version });
  });

  it("compares a revision with itself under another concept", async () => {
    const engineer = await as("engineer");
    const reservoir = await buildReservoir();
    const inputs = estimateInputs({ depthFt: 9_000, recoveryPlan: buildPlan() });
    inputs.uncertain.pressurePsia.distribution = { kind: "constant", value: 4_500 };
    inputs.uncertain.temperatureDegF.distribution = { kind: "constant", value: 200 };
    inputs.uncertain.condensateYieldStbPerMmscf.distribution = {
      kind: "uniform",
      low: 130,
      high: 165,
    };
    const path = `/api/v1/reservoirs/${reservoir.id}/estimates`;
    const { id } = made(await engineer.post<EstimateView>(path, { inputs, trials: 1_000 }));
    const { left, right, explanation } = await compare({
      left: { kind: "concept", estimateId: id, concept: "depletion" },
      right: { kind: "concept", estimateId: id, concept: "cycling" },
    });
    expect(right.label).toMatch(/, r1, cycling, then blowdown$/);
    const p50 = (side: Comparison["left"]) => side.quantities.condensateRecoverableStb.p50;
    expect(p50(right)).toBeGreaterThan(p50(left));
    expect(right.inputs?.recoveryPlan?.concept).toBe("cycling");
    expect(explanation?.changes.map(({ change }) => change)).toEqual([{ kind: "recoveryPlan" }]);
  });

  it("says why a revision without a recovery plan has no concepts", async () => {
    const engineer = await as("engineer");
    const { id } = await buildDraft();
    const side = { kind: "concept", estimateId: id, concept: "cycling" };
    const answer = await engineer.post<Problem>(comparisonPath, { left: side, right: side });
    expect(answer.status).toBe(422);
    expect(answer.body.errors?.[0]).toMatchObject({ pointer: "#/left/concept" });
    expect(answer.body.errors?.[0].detail).toContain("recovery plan");
  });

  it("adds up a field's reservoirs, and explains a field of one", async () => {
    const engineer = await as("engineer");
    const one = await buildApproved();
    const fieldId = one.place.field.id;
    const field = { kind: "field", fieldId };
    const estimate = { kind: "estimate", estimateId: one.id };
    const alone = await compare({ left: field, right: estimate });
    expect(alone.left).toMatchObject({ label: one.place.field.name, inputs: null });
    const mean = (run: EstimateView) => run.summary?.results.condensateRecoverableStb.mean ?? 0;
    // Trials are spread over the total's by rank: rows come 16 or 17 times, which moves a mean a little.
    const ofField = ({ left }: Comparison) => left.quantities.condensateRecoverableStb.mean;
    expect(ofField(alone) / mean(one)).toBeCloseTo(1, 3);
    expect(alone.explanation?.changes).toEqual([]);

    const body = { fieldId, name: uniqueName("Sand"), depthFt: 11_200 };
    const second = made(await engineer.post<ReservoirView>("/api/v1/reservoirs", body));
    const two = await buildApproved(second.id);
    const both = await compare({ left: field, right: estimate });
    expect(ofField(both) / (mean(one) + mean(two))).toBeCloseTo(1, 3);
    expect(both.explanation).toBeNull();
    expect(both.whyNotExplained).toContain("2 reservoirs");
  });

  it("refuses a field without figures and an estimate that is not there", async () => {
    const engineer = await as("engineer");
    const left = { kind: "field", fieldId: (await buildField()).id };
    const empty = await engineer.post<Problem>(comparisonPath, { left, right: left });
    expect(empty.status).toBe(422);
    expect(empty.body.errors?.[0].pointer).toBe("#/left/fieldId");
    const gone = { kind: "estimate", estimateId: "6e0c9c3a-0000-4000-8000-000000000000" };
    expect((await engineer.post(comparisonPath, { left: gone, right: gone })).status).toBe(404);
  });
});
