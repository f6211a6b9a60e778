import { describe, expect, it } from "vitest";
import { noStudy, type SampleStudy } from "@/analytics/fluid/sample-study-schema";
import type { RecoveryCurve } from "@/analytics/recovery/recovery-curve-schema";
import type { Problem } from "@/app/_server/problem";
import type {
  DepletionResponse,
  EquationOfStateResponse,
} from "@/app/api/v1/calculations/fluid-schema";
import { estimateSchema, type EstimateView } from "@/app/api/v1/estimates/schema";
import type { FieldFileView, ReservoirPageView } from "@/app/api/v1/fields/file-schema";
import { fluidSampleSchema, type FluidSampleView } from "@/app/api/v1/fluid-samples/schema";
import type { ReviewView } from "@/app/api/v1/review/schema";
import {
  as,
  buildDraft,
  buildFluidSample,
  buildReservoir,
  estimateInputs,
  ifMatch,
  made,
  separatorTest,
} from "../factories";
import { queryRows } from "../support/database";
import { depletionPlan, templateFluid, untunedCharacterisation } from "../support/fluids";

const { sheet, table, stages } = templateFluid();
const study: SampleStudy = {
  composition: sheet,
  depletion: table,
  stages,
  characterisation: untunedCharacterisation,
  tuning: null,
  separatorTestOrigin: "measured",
};
const pathOf = ({ id }: { id: string }) => `/api/v1/fluid-samples/${id}`;

async function laboratoryCurve(): Promise<RecoveryCurve> {
  const engineer = await as("engineer");
  const { curve } = made(
    await engineer.post<DepletionResponse>("/api/v1/calculations/depletion", {
      sheet,
      table,
      stages,
      characterisation: untunedCharacterisation,
    }),
  );
  if (!curve) throw new Error("the template's table carries no curve");
  return curve;
}

async function correlatedCurve(): Promise<RecoveryCurve> {
  const engineer = await as("engineer");
  const { curve } = made(
    await engineer.post<EquationOfStateResponse>("/api/v1/calculations/equation-of-state", {
      sheet,
      stages,
      characterisation: untunedCharacterisation,
      temperatureDegF: 220,
    }),
  );
  if (!curve) throw new Error("the fluid has no curve");
  return { ...curve, route: "correlation" };
}

describe("fluid samples with a study", () => {
  it("have none unless one is given", async () => {
    const sample = await buildFluidSample((await buildReservoir()).id);
    fluidSampleSchema.parse(sample);
    expect(sample.study).toEqual(noStudy);
  });

  it("keep it as it was sent, through the reservoir's page, with one line of history", async () => {
    const engineer = await as("engineer");
    const reservoir = await buildReservoir();
    const sample = await buildFluidSample(reservoir.id);
    const changed = made(
      await engineer.patch<FluidSampleView>(pathOf(sample), { study }, ifMatch(sample)),
    );
    expect(changed).toMatchObject({ study, version: 2 });
    const page = made(
      await engineer.get<ReservoirPageView>(
        `/api/v1/fields/${reservoir.field.slug}/reservoirs/${reservoir.slug}`,
      ),
    );
    expect(page.fluidSamples[0].study).toEqual(study);
    const [event] = await queryRows<{ before: object; after: object }>(
      `select before, after from audit_events where entity_id = $1 and action = 'fluidSample.updated'`,
      [sample.id],
    );
    expect(event).toEqual({ before: { study: noStudy }, after: { study } });
  });

  it("answer 412 to the slower of two, with the study as it is now", async () => {
    const engineer = await as("engineer");
    const sample = await buildFluidSample((await buildReservoir()).id);
    made(await engineer.patch(pathOf(sample), { study }, ifMatch(sample)));
    const late = await engineer.patch<Problem>(
      pathOf(sample),
      { study: { ...study, depletion: null } },
      ifMatch(sample),
    );
    expect(late.status).toBe(412);
    expect(late.body.current).toMatchObject({ study, version: 2 });
  });

  it("refuse a composition that no fluid has, at its field", async () => {
    const engineer = await as("engineer");
    const sample = await buildFluidSample((await buildReservoir()).id);
    const stream = { light: { C1: 40 }, carbonNumbers: [], plus: null };
    const answer = await engineer.patch<Problem>(
      pathOf(sample),
      { study: { ...study, composition: { kind: "wellstream", stream } } },
      ifMatch(sample),
    );
    expect(answer.status).toBe(422);
    expect(answer.body.errors?.[0].pointer).toBe("#/study/composition/stream");
  });

  it("refuse parts that have nothing to stand on", async () => {
    const engineer = await as("engineer");
    const sample = await buildFluidSample((await buildReservoir()).id);
    const tuning = {
      measuredDewPointPsia: 4350,
      fittedDewPointPsia: 4351,
      averageLiquidErrorPoints: 0.2,
    };
    const answer = await engineer.patch<Problem>(
      pathOf(sample),
      { study: { ...noStudy, tuning, separatorTestOrigin: "computed" } },
      ifMatch(sample),
    );
    expect(answer.body.errors?.map(({ pointer }) => pointer)).toEqual([
      "#/study/tuning",
      "#/study/separatorTestOrigin",
    ]);
  });

  it("refuse adjustments that nothing was fitted with", async () => {
    const engineer = await as("engineer");
    const sample = await buildFluidSample((await buildReservoir()).id);
    const adjustments = {
      ...untunedCharacterisation.adjustments,
      heavyCriticalTemperatureFactor: 1.000001,
    };
    const answer = await engineer.patch<Problem>(
      pathOf(sample),
      { study: { ...study, characterisation: { ...untunedCharacterisation, adjustments } } },
      ifMatch(sample),
    );
    expect(answer.body.errors?.map(({ pointer }) => pointer)).toEqual(["#/study/tuning"]);
  });

  it("say that a computed separator sheet is measured once it is typed over", async () => {
    const engineer = await as("engineer");
    const sample = await buildFluidSample((await buildReservoir()).id);
    const computed = made(
      await engineer.patch<FluidSampleView>(
        pathOf(sample),
        { study: { ...study, separatorTestOrigin: "computed" } },
        ifMatch(sample),
      ),
    );
    const typed = made(
      await engineer.patch<FluidSampleView>(
        pathOf(sample),
        { separatorTest: separatorTest({ condensateApi: 55 }) },
        ifMatch(computed),
      ),
    );
    expect(typed.study).toEqual({ ...study, separatorTestOrigin: "measured" });
  });

  it("are an engineer's to change", async () => {
    const planner = await as("planner");
    const sample = await buildFluidSample((await buildReservoir()).id);
    expect((await planner.patch(pathOf(sample), { study }, ifMatch(sample))).status).toBe(403);
  });
});

async function runWithPlan(curve: RecoveryCurve): Promise<EstimateView> {
  const engineer = await as("engineer");
  const reservoir = await buildReservoir();
  const inputs = { ...estimateInputs(), recoveryPlan: depletionPlan(curve) };
  const draft = made(
    await engineer.post<EstimateView>(`/api/v1/reservoirs/${reservoir.id}/estimates`, {
      inputs,
      trials: 10_000,
    }),
  );
  const path = `/api/v1/estimates/${draft.id}/run`;
  return made(await engineer.post<EstimateView>(path, undefined, ifMatch(draft)));
}

describe("estimates with a recovery plan", () => {
  it("work their recoveries out of the curve", async () => {
    const curve = await laboratoryCurve();
    const estimate = await runWithPlan(curve);
    estimateSchema.parse(estimate);
    expect(estimate.recoveryRoute).toBe("laboratory");
    expect(estimate.inputs.recoveryPlan).toEqual(depletionPlan(curve));
    expect(estimate.summary?.recovery).toMatchObject({ concept: "depletion", route: "laboratory" });
  });

  it("read as without one when they were stored before plans, and re-saving keeps their results", async () => {
    const engineer = await as("engineer");
    const draft = await buildDraft();
    const path = `/api/v1/estimates/${draft.id}`;
    const run = made(await engineer.post<EstimateView>(`${path}/run`, undefined, ifMatch(draft)));
    await queryRows(
      `update estimates set inputs = inputs - 'recoveryPlan', summary = summary - 'recovery' where id = $1`,
      [draft.id],
    );
    const old = made(await engineer.get<EstimateView>(path));
    expect(old).toMatchObject({ inputs: { recoveryPlan: null }, recoveryRoute: null });
    const saved = made(
      await engineer.patch<EstimateView>(path, { inputs: run.inputs, note: "x" }, ifMatch(run)),
    );
    expect(saved.summary).not.toBeNull();
  });

  it("are marked in review, ranking and files when nobody measured their depletion", async () => {
    const engineer = await as("engineer");
    const reviewer = await as("reviewer");
    const run = await runWithPlan(await correlatedCurve());
    const path = `/api/v1/estimates/${run.id}`;
    const submitted = made(await engineer.post<EstimateView>(`${path}/submit`, {}, ifMatch(run)));
    const { items } = made(await reviewer.get<ReviewView>("/api/v1/review"));
    expect(items.find(({ id }) => id === run.id)?.recoveryRoute).toBe("correlation");
    made(await reviewer.post(`${path}/approve`, {}, ifMatch(submitted)));

    const { field, reservoir } = run.place;
    const file = made(await reviewer.get<FieldFileView>(`/api/v1/fields/${field.slug}/file`));
    expect(file.ranked).toMatchObject({
      recoveryRoute: "correlation",
      chosen: [
        {
          reservoirSlug: reservoir.slug,
          recoveryRoute: "correlation",
          producingConcept: "depletion",
        },
      ],
    });
    expect(file.reservoirs[0].revisions[0].recoveryRoute).toBe("correlation");

    const budget = made(await reviewer.get<string>("/api/v1/exports/budget.csv"));
    const [header, ...lines] = budget.split("\r\n");
    expect(header.endsWith("recovery_route,producing_concept,dependence_set")).toBe(true);
    expect(lines.find((line) => line.includes(field.id))).toMatch(/correlation,depletion,[^,]+$/);
    const ranking = made(await reviewer.get<string>("/api/v1/exports/ranking.csv"));
    const row = ranking.split("\r\n").find((line) => line.includes(field.name));
    expect(ranking.split("\r\n")[0].endsWith("recovery_route,dependence_set")).toBe(true);
    expect(row).toMatch(/correlation,[^,]+$/);
  });
});
