import { describe, expect, it } from "vitest";
import type { Problem } from "@/app/_server/problem";
import {
  compositionResponseSchema,
  depletionResponseSchema,
  equationOfStateResponseSchema,
  labSheetResponseSchema,
  tuningResponseSchema,
  type CompositionResponse,
  type DepletionResponse,
  type EquationOfStateResponse,
  type LabSheetResponse,
  type TuningResponse,
} from "@/app/api/v1/calculations/fluid-schema";
import {
  nearWellResponseSchema,
  recoveryResponseSchema,
  type NearWellResponse,
  type RecoveryResponse,
} from "@/app/api/v1/calculations/recovery-schema";
import { as, estimateInputs } from "../factories";
import { visitor } from "../support/api";
import { testEnvironment } from "../support/environment";
import { depletionPlan, templateFluid, untunedCharacterisation } from "../support/fluids";

const path = (name: string) => `/api/v1/calculations/${name}`;
const { sheet, table, stages } = templateFluid();
const characterisation = untunedCharacterisation;
const fluid = { sheet, stages, characterisation, temperatureDegF: 220 };

async function ask<Body>(name: string, body: unknown): Promise<Body> {
  const executive = await as("executive");
  const answer = await executive.post<Body>(path(name), body);
  expect(answer).toMatchObject({ status: 200 });
  return answer.body;
}

async function refused(name: string, body: unknown): Promise<Problem> {
  const engineer = await as("engineer");
  const answer = await engineer.post<Problem>(path(name), body);
  expect(answer.status).toBe(422);
  expect(answer.headers.get("content-type")).toBe("application/problem+json");
  return answer.body;
}

const pointersOf = ({ errors }: Problem) => errors?.map(({ pointer }) => pointer);

/** The sheet with other figures of heptanes plus. */
function withPlus(values: Record<string, number>) {
  if (sheet.kind !== "wellstream" || !sheet.stream.plus) throw new Error("not a wellstream");
  const plus = { ...sheet.stream.plus, ...values };
  return { ...sheet, stream: { ...sheet.stream, plus } };
}

describe("POST /api/v1/calculations/composition", () => {
  it("gives gravity, type, z and dew points of a sheet", async () => {
    const body = await ask<CompositionResponse>("composition", {
      sheet,
      reservoir: { pressurePsia: 4800, temperatureDegF: 220 },
    });
    compositionResponseSchema.parse(body);
    expect(body.components.reduce((sum, { moleFraction }) => sum + moleFraction, 0)).toBeCloseTo(
      1,
      12,
    );
    // Gravity is molecular weight over that of air, 28.9647 lb/lbmol.
    expect(body.gravity).toBeCloseTo(body.molecularWeight / 28.9647, 6);
    expect(body.dewPointEstimates).toHaveLength(2);
  });

  it("shows what normalising did", async () => {
    const stream = { light: { C1: 90, C2: 9 }, carbonNumbers: [], plus: null };
    const body = await ask<CompositionResponse>("composition", {
      sheet: { kind: "wellstream", stream },
    });
    expect(body.normalised).toEqual([
      { stream: "wellstream", reportedTotalMolePercent: 99, factor: 100 / 99 },
    ]);
  });

  it("refuses a sum that is none, and a weight that no fraction has, at their fields", async () => {
    const stream = { light: { C1: 50 }, carbonNumbers: [], plus: null };
    const half = await refused("composition", { sheet: { kind: "wellstream", stream } });
    expect(pointersOf(half)).toEqual(["#/sheet/stream"]);
    const gapped = withPlus({ carbonNumber: 12 });
    const gap = await refused("composition", { sheet: gapped });
    expect(pointersOf(gap)).toEqual(["#/sheet/stream/plus/carbonNumber"]);
  });

  it("names every figure that is out of its range", async () => {
    const stream = { light: { C1: 101, C2: -1 }, carbonNumbers: [], plus: null };
    const problem = await refused("composition", { sheet: { kind: "wellstream", stream } });
    expect(pointersOf(problem)).toEqual(["#/sheet/stream/light/C1", "#/sheet/stream/light/C2"]);
  });

  it("answers 401 to a visitor", async () => {
    expect((await visitor().post(path("composition"), { sheet })).status).toBe(401);
  });
});

describe("POST /api/v1/calculations/equation-of-state", () => {
  it("gives the phase behaviour, and marks an equation of state that is not tuned", async () => {
    const body = await ask<EquationOfStateResponse>("equation-of-state", {
      ...fluid,
      measuredDewPointPsia: table.dewPointPsia,
    });
    equationOfStateResponseSchema.parse(body);
    expect(body).toMatchObject({ isTuned: false, saturation: { kind: "dewPoint" } });
    const { upperPsia, mismatchPsia } = body.saturation;
    expect(mismatchPsia).toBeCloseTo((upperPsia ?? 0) - table.dewPointPsia, 9);
    expect(body.curve?.route).toBe("untunedEquationOfState");
    expect(body.depletion?.rows[0]).toMatchObject({
      liquidPercent: 0,
      cumulativeProducedMolePercent: 0,
    });
    expect(body.warnings.map(({ code }) => code)).toContain("untuned_equation_of_state");
  });

  it("says that a fluid above its cricondentherm drops no liquid", async () => {
    if (sheet.kind !== "wellstream" || !sheet.stream.plus) throw new Error("not a wellstream");
    const light = { ...sheet.stream.plus, molecularWeight: 110, specificGravity: 0.74 };
    const body = await ask<EquationOfStateResponse>("equation-of-state", {
      ...fluid,
      sheet: { ...sheet, stream: { ...sheet.stream, plus: light } },
      temperatureDegF: 450,
    });
    expect(body).toMatchObject({ depletion: null, curve: null, saturation: { kind: "none" } });
    expect(body.warnings.map(({ code }) => code)).toContain("above_cricondentherm");
  });

  it("refuses separators that do not follow on, at their field", async () => {
    const rising = [stages[1], stages[0]];
    const problem = await refused("equation-of-state", { ...fluid, stages: rising });
    expect(pointersOf(problem)).toEqual(["#/stages/1/pressurePsia"]);
  });

  it("refuses an adjustment that is none, at its field", async () => {
    const adjustments = { ...characterisation.adjustments, heavyCriticalTemperatureFactor: 0 };
    const problem = await refused("equation-of-state", {
      ...fluid,
      characterisation: { ...characterisation, adjustments },
    });
    expect(pointersOf(problem)).toEqual([
      "#/characterisation/adjustments/heavyCriticalTemperatureFactor",
    ]);
  });

  it("lets an abandoned request go, and answers the next", async () => {
    const engineer = await as("engineer");
    const [{ name, value }] = engineer.cookies().filter((cookie) => /session/.test(cookie.name));
    const abandoned = fetch(`${testEnvironment.baseUrl}${path("tuning")}`, {
      method: "POST",
      signal: AbortSignal.timeout(20),
      headers: {
        "content-type": "application/json",
        Origin: testEnvironment.baseUrl,
        Cookie: `${name}=${value}`,
      },
      body: JSON.stringify({
        sheet,
        table,
        characterisation,
        tunables: ["heavyCriticalTemperatureFactor"],
      }),
    });
    await expect(abandoned).rejects.toThrow();
    await ask("equation-of-state", fluid);
  });
});

describe("POST /api/v1/calculations/depletion", () => {
  it("checks a table, and gives what it brings to the surface", async () => {
    const body = await ask<DepletionResponse>("depletion", {
      sheet,
      table,
      stages,
      characterisation,
    });
    depletionResponseSchema.parse(body);
    expect(body.findings.filter(({ severity }) => severity === "failed")).toEqual([]);
    expect(body.rows).toHaveLength(table.rows.length);
    expect(body.curve).toMatchObject({ route: "laboratory", dewPointPsia: 4350 });
  });

  it("finds a figure that cannot be, with its row", async () => {
    const rows = table.rows.map((row, index) =>
      index === 3 ? { ...row, cumulativeProducedMolePercent: 5 } : row,
    );
    const body = await ask<DepletionResponse>("depletion", {
      sheet,
      table: { ...table, rows },
      stages,
      characterisation,
    });
    const failed = body.findings.filter(({ severity }) => severity === "failed");
    expect(failed.some(({ row }) => row === 3)).toBe(true);
  });

  it("keeps a failed check with the curve, for the estimate that it goes into to repeat", async () => {
    const rows = table.rows.map((row, index) =>
      index === 3 ? { ...row, liquidPercent: 45 } : row,
    );
    const body = await ask<DepletionResponse>("depletion", {
      sheet,
      table: { ...table, rows },
      stages,
      characterisation,
    });
    depletionResponseSchema.parse(body);
    expect(body.method).toBe("equationOfState");
    expect(body.curve?.doubts).toEqual([expect.stringMatching(/^Check “.*” fails\. Row 4/)]);
  });
});

describe("calculations on fluids, of what cannot be", () => {
  const adjustments = { ...characterisation.adjustments, heavyVolumeShiftFactor: 10 };
  const conditions = {
    sheet,
    characterisation,
    temperatureDegF: 220,
    reservoirPressurePsia: 1e300,
    flowingPressurePsia: 3000,
    relativePermeability: {
      gasExponent: 2,
      condensateExponent: 2,
      criticalCondensateSaturation: 0.15,
      residualGasSaturation: 0.1,
    },
  };
  const tunables = ["heavyCriticalTemperatureFactor"];

  it.each([
    ["equation-of-state", { ...fluid, temperatureDegF: -200 }, "#/temperatureDegF"],
    [
      "equation-of-state",
      { ...fluid, characterisation: { ...characterisation, adjustments } },
      "#/characterisation/adjustments/heavyVolumeShiftFactor",
    ],
    [
      "equation-of-state",
      { ...fluid, stages: [{ pressurePsia: 9000, temperatureDegF: 80 }, stages[1]] },
      "#/stages/0/pressurePsia",
    ],
    [
      "tuning",
      { sheet, characterisation, tunables, table: { ...table, temperatureDegF: -200 } },
      "#/table/temperatureDegF",
    ],
    ["near-well", conditions, "#/reservoirPressurePsia"],
    [
      "composition",
      { sheet, reservoir: { pressurePsia: 5000, temperatureDegF: 1000 } },
      "#/reservoir/temperatureDegF",
    ],
  ])("refuses it in %s with its range, at its field: %j", async (name, body, pointer) => {
    const { errors } = await refused(name, body);
    expect(errors?.map((error) => error.pointer)).toEqual([pointer]);
    expect(errors?.[0].detail).toMatch(/between|at most/);
  });
});

describe("POST /api/v1/calculations/tuning", () => {
  it("proposes adjustments of what was declared, and nothing else", async () => {
    const body = await ask<TuningResponse>("tuning", {
      sheet,
      table,
      characterisation,
      tunables: ["heavyCriticalTemperatureFactor", "heavyAcentricFactorFactor"],
    });
    tuningResponseSchema.parse(body);
    expect(body.after.objective).toBeLessThan(body.before.objective);
    const { adjustments } = body.characterisation;
    expect(adjustments.heavyCriticalTemperatureFactor).not.toBe(1);
    expect(adjustments).toMatchObject({
      heavyCriticalPressureFactor: 1,
      methaneHeavyInteractionFactor: 1,
      heavyVolumeShiftFactor: 1,
    });
  });

  it("counts as tuned with its record and the table it was fitted to, and else not", async () => {
    const { record, ...tuned } = await ask<TuningResponse>("tuning", {
      sheet,
      table,
      characterisation,
      tunables: ["heavyCriticalTemperatureFactor", "heavyAcentricFactorFactor"],
    });
    const question = {
      ...fluid,
      characterisation: tuned.characterisation,
      temperatureDegF: table.temperatureDegF,
      measuredDewPointPsia: table.dewPointPsia,
    };
    const standing = async (more: object) => {
      const { isTuned, curve, warnings } = await ask<EquationOfStateResponse>("equation-of-state", {
        ...question,
        ...more,
      });
      const said = warnings.find(({ code }) => code === "untuned_equation_of_state");
      return [isTuned, curve?.route, said?.message.slice(0, 50)];
    };
    expect(await standing({ tuning: record, table })).toEqual([
      true,
      "tunedEquationOfState",
      undefined,
    ]);
    const untuned = [
      false,
      "untunedEquationOfState",
      "The equation of state does not count as tuned. Adj",
    ];
    expect(await standing({})).toEqual(untuned);
    const [first, ...rest] = table.rows;
    const edited = { ...table, rows: [{ ...first, gasZ: 0.999 }, ...rest] };
    expect(await standing({ tuning: record, table: edited })).toEqual([
      ...untuned.slice(0, 2),
      "The equation of state does not count as tuned. Com",
    ]);
  });

  it("refuses a table with nothing below its dew point, at its field", async () => {
    const rows = [table.rows[0], { ...table.rows[0], pressurePsia: 4500 }];
    const problem = await refused("tuning", {
      sheet,
      table: { ...table, rows },
      characterisation,
      tunables: ["heavyCriticalTemperatureFactor"],
    });
    expect(pointersOf(problem)).toEqual(["#/table/rows"]);
  });
});

describe("POST /api/v1/calculations/recovery", () => {
  it("sets concepts side by side, whose shares add up", async () => {
    const { curve } = await ask<DepletionResponse>("depletion", {
      sheet,
      table,
      stages,
      characterisation,
    });
    if (!curve) throw new Error("the template's table carries no curve");
    const plan = depletionPlan(curve);
    const lower = { distribution: { kind: "constant" as const, value: 750 }, source: "" };
    const compression = { ...plan, concept: "compression", abandonmentPressurePsia: lower };
    const body = await ask<RecoveryResponse>("recovery", {
      inputs: { ...estimateInputs(), recoveryPlan: null },
      plans: [plan, compression],
      seed: 7,
      trials: 500,
    });
    recoveryResponseSchema.parse(body);
    const [depleted, compressed] = body.concepts;
    for (const { shares } of body.concepts) {
      expect(shares.toTank + shares.leftInRock + shares.leftInGas).toBeCloseTo(1, 9);
    }
    expect(compressed.gasRecovery.mean).toBeGreaterThan(depleted.gasRecovery.mean);
  });

  it("refuses an abandonment that the curve does not reach, at its plan", async () => {
    const { curve } = await ask<EquationOfStateResponse>("equation-of-state", fluid);
    if (!curve) throw new Error("the fluid has no curve");
    const below = { distribution: { kind: "constant" as const, value: 20 }, source: "" };
    const problem = await refused("recovery", {
      inputs: { ...estimateInputs(), recoveryPlan: null },
      plans: [depletionPlan(curve), { ...depletionPlan(curve), abandonmentPressurePsia: below }],
      seed: 7,
      trials: 200,
    });
    expect(pointersOf(problem)?.[0]).toMatch(/^#\/plans\/1\/abandonmentPressurePsia/);
  });
});

describe("POST /api/v1/calculations/near-well", () => {
  const well = {
    sheet,
    characterisation,
    temperatureDegF: 220,
    reservoirPressurePsia: 4200,
    flowingPressurePsia: 2000,
    relativePermeability: {
      gasExponent: 2.5,
      condensateExponent: 3,
      criticalCondensateSaturation: 0.15,
      residualGasSaturation: 0.2,
    },
  };

  it("gives the share of its rate that a well keeps", async () => {
    const body = await ask<NearWellResponse>("near-well", well);
    nearWellResponseSchema.parse(body);
    expect(body.productivityRatio).toBeGreaterThan(0);
    expect(body.productivityRatio).toBeLessThan(1);
  });

  it("refuses a well that flows against the reservoir, at its field", async () => {
    const problem = await refused("near-well", { ...well, flowingPressurePsia: 4300 });
    expect(pointersOf(problem)).toEqual(["#/flowingPressurePsia"]);
  });
});

describe("POST /api/v1/calculations/lab-sheet", () => {
  it("reads the template that can be downloaded", async () => {
    const engineer = await as("engineer");
    const template = await engineer.get<string>(path("lab-sheet-template.csv"));
    expect(template.headers.get("content-disposition")).toContain(".csv");
    const body = await ask<LabSheetResponse>("lab-sheet", {
      text: template.body,
    });
    labSheetResponseSchema.parse(body);
    expect(body.problems).toEqual([]);
    expect(body.composition).toEqual(sheet);
    expect(body.depletion).toEqual(table);
  });

  it("refuses a text longer than any study, in words at the field", async () => {
    const problem = await refused("lab-sheet", { text: "1".repeat(200_001) });
    expect(problem.errors).toEqual([
      { pointer: "#/text", detail: expect.stringContaining("200 thousand characters") },
    ]);
  });
});
