import { describe, expect, it } from "vitest";
import { isSame, planRow, type Book, type BookEstimate } from "@/services/imports/plan";
import type { ReservoirRow } from "@/services/imports/read-row";
import { readRows } from "@/services/imports/read-rows";
import { readTable } from "@/services/imports/read-table";
import { goodRow, sheet, type SheetRow } from "../../support/import-sheet";

const ME = "me";
const engineer = { actorId: ME, mayUpdateField: true, mayUpdateCommercial: false };

function rowOf(changes: SheetRow = {}): ReservoirRow {
  const text = sheet([goodRow(changes)]);
  const [entry] = readRows(readTable(new TextEncoder().encode(text)), "2026-12-01");
  if (entry.kind === "bad") throw new Error(JSON.stringify(entry.row.problems));
  return entry.row;
}

/** A book that holds the good row, as an earlier import would have left it. */
function bookWith(estimate: Partial<BookEstimate> = {}): Book {
  const { inputs, sample, fieldData } = rowOf();
  const latest: BookEstimate = {
    id: "e1",
    revision: 1,
    version: 1,
    state: "draft",
    createdBy: ME,
    createdByName: "Me",
    inputs,
    ...estimate,
  };
  const reservoir = {
    id: "r1",
    slug: "main-sand",
    name: "Main sand",
    version: 1,
    depthFt: inputs.depthFt,
    latest,
    samples: [{ id: "s1", version: 1, ...sample }],
  };
  const data = {
    operator: fieldData.operator ?? "",
    workingInterest: fieldData.workingInterest ?? 0,
    netRevenueInterest: fieldData.netRevenueInterest ?? 0,
    prmsClass: fieldData.prmsClass ?? ("reserves" as const),
    prmsSubClass: fieldData.prmsSubClass ?? ("on_production" as const),
    chanceOfCommerciality: fieldData.chanceOfCommerciality ?? 0,
  };
  const field = {
    id: "f1",
    slug: "test-field",
    name: "Test field",
    version: 1,
    basinName: "Test basin",
    data,
    reservoirs: new Map([["main-sand", reservoir]]),
  };
  return {
    basins: new Map([["test-basin", { id: "b1", name: "Test basin" }]]),
    fields: new Map([["test-field", field]]),
  };
}

const emptyBook: Book = { basins: new Map(), fields: new Map() };

describe("planRow(row, book, may)", () => {
  it("makes what the book does not have", () => {
    expect(planRow(rowOf(), emptyBook, engineer)).toMatchObject({
      action: "create",
      estimate: "create",
      sample: "create",
    });
  });

  it("leaves alone what the book has already", () => {
    expect(planRow(rowOf(), bookWith(), engineer)).toMatchObject({
      action: "unchanged",
      estimate: "keep",
      sample: "keep",
      changes: [],
    });
  });

  it("names what it needs for a new field", () => {
    const plan = planRow(rowOf({ operator: "" }), emptyBook, engineer);
    expect(plan).toMatchObject({ action: "refused", problems: [{ column: "operator" }] });
  });

  it("begins a revision where the latest is approved, and changes one's own draft", () => {
    const row = rowOf({ area_high: "4000" });
    const approved = bookWith({ state: "approved", createdBy: "another" });
    expect(planRow(row, approved, engineer)).toMatchObject({
      action: "revise",
      estimate: "create",
    });
    expect(planRow(row, bookWith(), engineer)).toMatchObject({
      action: "revise",
      estimate: "update",
    });
  });

  it("keeps out of what lies with a reviewer, and of another person's draft", () => {
    const row = rowOf({ area_high: "4000" });
    for (const estimate of [
      { state: "submitted" as const },
      { createdBy: "another", createdByName: "Somebody" },
    ]) {
      expect(planRow(row, bookWith(estimate), engineer)).toMatchObject({ action: "refused" });
      expect(planRow(rowOf(), bookWith(estimate), engineer)).toMatchObject({ action: "unchanged" });
    }
  });

  it("keeps correlations, sources and depth that the sheet does not give", () => {
    const { inputs } = rowOf();
    const uncertain = {
      ...inputs.uncertain,
      areaAcres: { ...inputs.uncertain.areaAcres, source: "Map of May" },
    };
    const correlations = [{ a: "areaAcres" as const, b: "porosity" as const, rank: 0.2 }];
    const book = bookWith({ inputs: { ...inputs, uncertain, correlations } });
    expect(planRow(rowOf({ depth: "" }), book, engineer)).toMatchObject({ action: "unchanged" });
  });

  it("keeps a recovery plan, and says that recoveries of the sheet are not used beside it", () => {
    const { inputs } = rowOf();
    const uncertain = (value: number) => ({
      distribution: { kind: "constant" as const, value },
      source: "",
    });
    const point = {
      wellstreamProduced: 0,
      gasProduced: 0,
      condensateProduced: 0,
      condensateInGas: 1,
      liquidSaturation: 0,
      gasZ: 0.9,
      twoPhaseZ: 0.9,
      producingYieldStbPerMmscf: 80,
    };
    const recoveryPlan = {
      concept: "depletion" as const,
      curve: {
        route: "laboratory" as const,
        temperatureDegF: 240,
        dewPointPsia: 4000,
        points: [
          { ...point, pressurePsia: 4000 },
          { ...point, pressurePsia: 700 },
        ],
      },
      abandonmentPressurePsia: uncertain(1000),
      condensateCurveFactor: uncertain(1),
      criticalSaturation: { low: 0.1, high: 0.2 },
      waterDrive: { kind: "none" as const },
      cycling: null,
    };
    const book = bookWith({ inputs: { ...inputs, recoveryPlan } });
    const same = planRow(rowOf(), book, engineer);
    expect(same.action).toBe("unchanged");
    expect(same.warnings.map(({ column }) => column)).not.toContain("gas_recovery_best");
    const wider = planRow(rowOf({ area_high: "4000" }), book, engineer);
    expect(wider).toMatchObject({ action: "revise", inputs: { recoveryPlan } });
    const recovery = planRow(rowOf({ gas_recovery_best: "0.7" }), book, engineer);
    expect(recovery).toMatchObject({ inputs: { recoveryPlan } });
    expect(recovery.warnings).toContainEqual(
      expect.objectContaining({
        column: "gas_recovery_best",
        reason: expect.stringMatching(/not used/),
      }),
    );
  });

  it("reports a commercial difference, and makes it only where the role may", () => {
    const row = rowOf({ working_interest: "0.5" });
    expect(planRow(row, bookWith(), engineer)).toMatchObject({
      action: "unchanged",
      fieldChanges: {},
    });
    const planner = { ...engineer, mayUpdateCommercial: true };
    expect(planRow(row, bookWith(), planner)).toMatchObject({
      action: "revise",
      fieldChanges: { workingInterest: 0.5 },
    });
  });

  it("refuses a field that the book has in another basin", () => {
    const plan = planRow(rowOf({ basin: "Elsewhere" }), bookWith(), engineer);
    expect(plan).toMatchObject({ action: "refused", problems: [{ column: "basin" }] });
  });
});

describe("isSame(a, b)", () => {
  it("takes figures that differ by rounding for the same, and nothing else", () => {
    expect(isSame({ a: [0.1 + 0.2] }, { a: [0.3] })).toBe(true);
    expect(isSame({ a: 1 }, { a: 1, b: undefined })).toBe(true);
    expect(isSame({ a: 1 }, { a: 1.0001 })).toBe(false);
    expect(isSame([1], { 0: 1 })).toBe(false);
    expect(isSame(null, {})).toBe(false);
  });
});
