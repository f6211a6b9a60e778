import { describe, expect, it } from "vitest";
import type { Problem } from "@/app/_server/problem";
import type { BasinView } from "@/app/api/v1/basins/schema";
import type { FieldView } from "@/app/api/v1/fields/schema";
import type { FluidSampleView } from "@/app/api/v1/fluid-samples/schema";
import type { ReservoirFileView, ReservoirView } from "@/app/api/v1/reservoirs/schema";
import {
  as,
  buildBasin,
  buildField,
  buildFluidSample,
  buildReservoir,
  ifMatch,
  made,
  separatorTest,
  uniqueName,
} from "../factories";
import { visitor } from "../support/api";

describe("POST /api/v1/basins", () => {
  it("gives the basin an address made from its name", async () => {
    const planner = await as("planner");
    const name = uniqueName("Skjær Ås");
    const { slug } = made(await planner.post<BasinView>("/api/v1/basins", { name }));
    expect(slug).toBe(name.replace("Skjær Ås", "skjaer-as").replace(" ", "-"));
  });

  it("answers 409 when the name is taken, whatever its capitals", async () => {
    const planner = await as("planner");
    const { name } = await buildBasin();
    const answer = await planner.post("/api/v1/basins", { name: name.toUpperCase() });
    expect(answer.status).toBe(409);
  });
});

describe("POST /api/v1/fields", () => {
  it("answers with the field, its basin and its first version", async () => {
    const field = await buildField({ latitude: 61.2, longitude: 2.4, waterDepthFt: 410 });
    expect(field).toMatchObject({ workingInterest: 0.6, latitude: 61.2, version: 1 });
    expect(field.basin.name).toMatch(/^Basin /);
  });

  it("answers 422 when the sub-class belongs to another class", async () => {
    const planner = await as("planner");
    const { id: basinId } = await buildBasin();
    const answer = await planner.post<Problem>("/api/v1/fields", {
      name: uniqueName("Field"),
      basinId,
      operator: "Quillmere Gas",
      workingInterest: 0.5,
      netRevenueInterest: 0.4,
      prmsClass: "reserves",
      prmsSubClass: "lead",
      chanceOfCommerciality: 1,
    });
    expect(answer.status).toBe(422);
    expect(answer.body.errors?.[0].pointer).toBe("#/prmsSubClass");
  });

  it("answers 422 to an interest above one", async () => {
    const field = await buildField();
    const planner = await as("planner");
    const patch = { workingInterest: 1.01 };
    const answer = await planner.patch<Problem>(
      `/api/v1/fields/${field.id}`,
      patch,
      ifMatch(field),
    );
    expect(answer.status).toBe(422);
    expect(answer.body.errors?.[0].pointer).toBe("#/workingInterest");
  });
});

describe("PATCH /api/v1/fields/:id", () => {
  it("lets an engineer change what is technical and not what is commercial", async () => {
    const engineer = await as("engineer");
    const field = await buildField();
    const path = `/api/v1/fields/${field.id}`;
    const noted = made(
      await engineer.patch<FieldView>(path, { notes: "Sour at the flank" }, ifMatch(field)),
    );
    expect(noted).toMatchObject({ notes: "Sour at the flank", version: 2 });
    const refused = await engineer.patch(path, { workingInterest: 0.4 }, ifMatch(noted));
    expect(refused.status).toBe(403);
  });

  it("lets a planner change the interests, and keeps the field's address when its name changes", async () => {
    const planner = await as("planner");
    const field = await buildField();
    const patch = { name: uniqueName("Renamed"), workingInterest: 0.4, netRevenueInterest: 0.33 };
    const answer = await planner.patch<FieldView>(
      `/api/v1/fields/${field.id}`,
      patch,
      ifMatch(field),
    );
    expect(answer.body).toMatchObject({ ...patch, slug: field.slug });
    expect(answer.headers.get("etag")).toBe('"2"');
  });

  it("answers 412 with both versions when somebody saved first", async () => {
    const planner = await as("planner");
    const field = await buildField();
    const path = `/api/v1/fields/${field.id}`;
    made(await planner.patch(path, { notes: "one" }, ifMatch(field)));
    const stale = await planner.patch<Problem>(path, { notes: "two" }, ifMatch(field));
    expect(stale.status).toBe(412);
    expect(stale.body).toMatchObject({ expectedVersion: 1, current: { notes: "one", version: 2 } });
  });

  it("answers 403 to an executive, 401 to a visitor, 404 for a field that is not there", async () => {
    const field = await buildField();
    const path = `/api/v1/fields/${field.id}`;
    expect((await (await as("executive")).patch(path, {}, ifMatch(field))).status).toBe(403);
    expect((await visitor().patch(path, {}, ifMatch(field))).status).toBe(401);
    const nowhere = "/api/v1/fields/00000000-0000-4000-8000-000000000000";
    expect((await (await as("planner")).patch(nowhere, {}, ifMatch(field))).status).toBe(404);
  });

  it("makes only an engineer responsible", async () => {
    const planner = await as("planner");
    const field = await buildField();
    const people = await planner.get<{ items: { id: string; role: string }[] }>("/api/v1/people");
    const idOf = (role: string) => people.body.items.find((person) => person.role === role)?.id;
    const path = `/api/v1/fields/${field.id}`;
    const wrong = { responsibleEngineerId: idOf("executive") };
    expect((await planner.patch(path, wrong, ifMatch(field))).status).toBe(422);
    const right = { responsibleEngineerId: idOf("engineer") };
    expect((await planner.patch(path, right, ifMatch(field))).status).toBe(200);
  });
});

describe("POST /api/v1/reservoirs", () => {
  it("allows the same name in another field but not twice in one", async () => {
    const engineer = await as("engineer");
    const reservoir = await buildReservoir();
    const body = { fieldId: reservoir.field.id, name: reservoir.name };
    expect((await engineer.post("/api/v1/reservoirs", body)).status).toBe(409);
    const elsewhere = { ...body, fieldId: (await buildField()).id };
    expect((await engineer.post("/api/v1/reservoirs", elsewhere)).status).toBe(201);
  });

  it("answers 403 to a planner", async () => {
    const body = { fieldId: (await buildField()).id, name: uniqueName("Sand") };
    expect((await (await as("planner")).post("/api/v1/reservoirs", body)).status).toBe(403);
  });
});

describe("GET /api/v1/reservoirs/:id", () => {
  it("answers with the field, the samples and no estimate before there is one", async () => {
    const reservoir = await buildReservoir();
    const sample = await buildFluidSample(reservoir.id);
    const executive = await as("executive");
    const { body } = await executive.get<ReservoirFileView>(`/api/v1/reservoirs/${reservoir.id}`);
    expect(body).toMatchObject({ name: reservoir.name, approved: null, open: null, history: [] });
    expect(body.field.id).toBe(reservoir.field.id);
    expect(body.fluidSamples.map(({ id }) => id)).toEqual([sample.id]);
  });
});

describe("PATCH /api/v1/reservoirs/:id", () => {
  it("changes the depth under a new version", async () => {
    const engineer = await as("engineer");
    const reservoir = await buildReservoir();
    const path = `/api/v1/reservoirs/${reservoir.id}`;
    const answer = await engineer.patch<ReservoirView>(
      path,
      { depthFt: 12_050 },
      ifMatch(reservoir),
    );
    expect(answer.body).toMatchObject({ depthFt: 12_050, version: 2 });
  });
});

describe("POST /api/v1/fluid-samples", () => {
  it("keeps the sheet and the figures that follow from it", async () => {
    const reservoir = await buildReservoir();
    const sample = await buildFluidSample(reservoir.id);
    // 17,500 + 320 scf/STB of surface gas, so 1e6 / 17,820 STB/MMscf: arithmetic on the sheet.
    expect(sample.gasOilRatioScfPerStb).toBeCloseTo(17_820, 6);
    expect(sample.condensateYieldStbPerMmscf).toBeCloseTo(1e6 / 17_820, 6);
    expect(sample.separatorTest).toEqual(separatorTest());
  });

  it("answers 422 with a pointer into the sheet when the fluid is impossible", async () => {
    const engineer = await as("engineer");
    const reservoir = await buildReservoir();
    const answer = await engineer.post<Problem>("/api/v1/fluid-samples", {
      reservoirId: reservoir.id,
      name: "Impossible",
      sampledOn: "2026-01-05",
      separatorTest: separatorTest({ nitrogen: 0.6, carbonDioxide: 0.6 }),
    });
    expect(answer.status).toBe(422);
    expect(answer.body.errors?.[0].pointer).toMatch(/^#\/separatorTest/);
  });

  it("answers 422 to a sample from the future", async () => {
    const engineer = await as("engineer");
    const reservoir = await buildReservoir();
    const answer = await engineer.post<Problem>("/api/v1/fluid-samples", {
      reservoirId: reservoir.id,
      name: "Ahead of its time",
      sampledOn: "2999-01-01",
      separatorTest: separatorTest(),
    });
    expect(answer.body.errors?.[0].pointer).toBe("#/sampledOn");
  });
});

describe("PATCH /api/v1/fluid-samples/:id", () => {
  it("recomputes the figures from a corrected sheet", async () => {
    const engineer = await as("engineer");
    const sample = await buildFluidSample((await buildReservoir()).id);
    const corrected = separatorTest({
      stockTankGas: { gasOilRatioScfPerStb: 500, gasGravity: 1.21 },
    });
    const answer = await engineer.patch<FluidSampleView>(
      `/api/v1/fluid-samples/${sample.id}`,
      { separatorTest: corrected },
      ifMatch(sample),
    );
    expect(answer.body.gasOilRatioScfPerStb).toBeCloseTo(18_000, 6);
  });
});
