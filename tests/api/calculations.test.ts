import { describe, expect, it } from "vitest";
import type { Problem } from "@/app/_server/problem";
import { correlationsResponseSchema } from "@/app/api/v1/calculations/correlations/schema";
import { distributionResponseSchema } from "@/app/api/v1/calculations/distribution/schema";
import {
  inPlaceResponseSchema,
  simulationResponseSchema,
  wellstreamResponseSchema,
  zFactorResponseSchema,
  type InPlaceResponse,
  type SimulationResponse,
  type WellstreamResponse,
  type ZFactorResponse,
} from "@/app/api/v1/calculations/schema";
import { as, estimateInputs, separatorTest, withConstant } from "../factories";
import { visitor } from "../support/api";

const path = (name: string) => `/api/v1/calculations/${name}`;

/** Two stages, all gas measured, condensate weight by Cragoe. */
const measuredTest = separatorTest({
  primarySeparator: {
    pressurePsia: 514.696,
    temperatureDegF: 80,
    gasOilRatioScfPerStb: 12_000,
    gasGravity: 0.68,
  },
  stockTankGas: { gasOilRatioScfPerStb: 450, gasGravity: 1.15 },
  condensateApi: 56,
  nitrogen: 0,
  carbonDioxide: 0,
  dewPointPsia: null,
});

async function ask<Body>(name: string, body: unknown): Promise<Body> {
  const engineer = await as("engineer");
  const answer = await engineer.post<Body>(path(name), body);
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

describe("POST /api/v1/calculations/wellstream", () => {
  it("recombines a two-stage test by the balance of moles and mass", async () => {
    const body = await ask<WellstreamResponse>("wellstream", { separatorTest: measuredTest });
    wellstreamResponseSchema.parse(body);
    // Mole and mass balance worked out by hand with Vm = 379.4828 scf/lbmol and Cragoe's M = 6084 / (API - 5.9).
    expect(body.wellstreamGravity).toBeCloseTo(0.914422, 5);
    expect(body.wellstreamScfPerStb).toBeCloseTo(13275.781, 2);
    expect(body.dryGasFraction).toBeCloseTo(0.937798, 5);
    expect(body.atReservoir).toBeNull();
  });

  it("answers with a balance whose shares add up to one", async () => {
    const vented = { ...measuredTest, stockTankGas: null };
    for (const test of [measuredTest, vented]) {
      const { balance } = await ask<WellstreamResponse>("wellstream", { separatorTest: test });
      expect(balance.reduce((sum, { moleShare }) => sum + moleShare, 0)).toBeCloseTo(1, 12);
    }
  });

  it("restates gas volumes of another base at 14.696 psia", async () => {
    const louisiana = { ...measuredTest, basePressurePsia: 15.025 };
    const body = await ask<WellstreamResponse>("wellstream", { separatorTest: louisiana });
    expect(body.surfaceGasOilRatioScfPerStb).toBeCloseTo((12_450 * 15.025) / 14.696, 6);
  });

  it("gives the gas at reservoir conditions when they are stated", async () => {
    const body = await ask<WellstreamResponse>("wellstream", {
      separatorTest: measuredTest,
      reservoir: { pressurePsia: 6500, temperatureDegF: 260 },
    });
    const { atReservoir } = body;
    // Bg = (psc / Tsc) z T / p, in cf/scf
    const expected = (0.0282795 * (atReservoir?.zFactor ?? 0) * 719.67) / 6500;
    expect(atReservoir?.formationVolumeFactorCfPerScf).toBeCloseTo(expected, 7);
  });

  it("gives all streams and the voidage of a metered day", async () => {
    const { rates, atReservoir } = await ask<WellstreamResponse>("wellstream", {
      separatorTest: measuredTest,
      reservoir: { pressurePsia: 6500, temperatureDegF: 260 },
      metered: { stream: "primary-separator-gas", scfPerDay: 24e6 },
    });
    // 24 MMscf/d over 12,000 scf/STB is 2,000 STB/d; each barrel carries 12,450 scf of gas and 13,275.781 of wellstream.
    expect(rates?.condensateStbPerDay).toBeCloseTo(2000, 9);
    expect(rates?.surfaceGasScfPerDay).toBeCloseTo(24.9e6, 3);
    expect(rates?.wetGasScfPerDay).toBeCloseTo(26_551_562, -1);
    // 1 bbl = 9,702 cubic inches, so 1,728 / 9,702 barrels a cubic foot.
    const voidage =
      ((rates?.wetGasScfPerDay ?? 0) * (atReservoir?.formationVolumeFactorCfPerScf ?? 0) * 1728) /
      9702;
    expect(rates?.voidageRbPerDay).toBeCloseTo(voidage, 6);
  });

  it("asks for the reservoir's state when a rate is given", async () => {
    const problem = await refused("wellstream", {
      separatorTest: measuredTest,
      metered: { stream: "condensate", stbPerDay: 100 },
    });
    expect(problem.errors?.map(({ pointer }) => pointer)).toEqual(["#/reservoir"]);
  });

  it("refuses a gas lighter than methane, at its field", async () => {
    const problem = await refused("wellstream", {
      separatorTest: {
        ...measuredTest,
        primarySeparator: { ...measuredTest.primarySeparator, gasGravity: 0.48 },
      },
    });
    expect(problem.errors?.[0].pointer).toBe("#/separatorTest/primarySeparator/gasGravity");
  });

  it("names every field that is missing or of the wrong kind", async () => {
    const problem = await refused("wellstream", {
      separatorTest: { ...measuredTest, nitrogen: "2 %" },
    });
    expect(problem.errors?.map(({ pointer }) => pointer)).toEqual(["#/separatorTest/nitrogen"]);
  });
});

describe("POST /api/v1/calculations/z-factor", () => {
  it("agrees with a reading of the Standing-Katz chart to 1 %", async () => {
    // A sweet gas of gravity 0.7 has pseudocriticals of 381.5 degR and 659.1 psia by Sutton (2007), so that this is
    // the chart's point Tpr = 1.5, Ppr = 3.006, where z = 0.776.
    const body = await ask<ZFactorResponse>("z-factor", {
      gasGravity: 0.7,
      temperatureDegF: 1.5 * (164.3 + 357.7 * 0.7 - 67.7 * 0.49) - 459.67,
      pressurePsia: 3.006 * (744 - 125.4 * 0.7 + 5.9 * 0.49),
    });
    zFactorResponseSchema.parse(body);
    expect(body.reducedTemperature).toBeCloseTo(1.5, 6);
    expect(body.reducedPressure).toBeCloseTo(3.006, 6);
    expect(Math.abs(body.zFactor / 0.776 - 1)).toBeLessThan(0.01);
  });

  it("warns where the correlation is poor", async () => {
    const body = await ask<ZFactorResponse>("z-factor", {
      gasGravity: 1.2,
      temperatureDegF: 100,
      pressurePsia: 3000,
    });
    expect(body.warnings.map(({ code }) => code)).toContain("z_low_reduced_temperature");
  });

  it("refuses a temperature below absolute zero, at its field", async () => {
    const problem = await refused("z-factor", {
      gasGravity: 0.7,
      temperatureDegF: -500,
      pressurePsia: 3000,
    });
    expect(problem.errors?.[0].pointer).toBe("#/temperatureDegF");
  });
});

describe("POST /api/v1/calculations/in-place", () => {
  const question = {
    areaAcres: 2500,
    netThicknessFt: 80,
    porosity: 0.15,
    waterSaturation: 0.25,
    pressurePsia: 6500,
    temperatureDegF: 260,
    zFactor: 1.12,
    separatorTest: measuredTest,
  };

  it("follows the volumetric chain from a separator test to barrels", async () => {
    const body = await ask<InPlaceResponse>("in-place", question);
    inPlaceResponseSchema.parse(body);
    // G = 43,560 A h phi (1 - Sw) / Bg with Bg = 0.0282795 z T / p, worked out independently.
    expect(body.wetGasInPlaceScf / 279_486_500_000).toBeCloseTo(1, 5);
    expect(body.dryGasInPlaceScf / 262_101_900_000).toBeCloseTo(1, 5);
    expect(body.condensateInPlaceStb / 21_052_360).toBeCloseTo(1, 5);
  });

  it("keeps dry gas and the vapour of the condensate equal to wet gas at any yield", async () => {
    const { vapourEquivalentScfPerStb } = await ask<WellstreamResponse>("wellstream", {
      separatorTest: measuredTest,
    });
    for (const condensateYieldStbPerMmscf of [20, 80, 250]) {
      const body = await ask<InPlaceResponse>("in-place", {
        ...question,
        condensateYieldStbPerMmscf,
      });
      const sum = body.dryGasInPlaceScf + vapourEquivalentScfPerStb * body.condensateInPlaceStb;
      expect(sum / body.wetGasInPlaceScf).toBeCloseTo(1, 12);
    }
  });

  it("refuses a porosity above that of loose spheres, at its field", async () => {
    const problem = await refused("in-place", { ...question, porosity: 0.6 });
    expect(problem.errors?.[0].pointer).toBe("#/porosity");
  });
});

describe("POST /api/v1/calculations/distribution", () => {
  it("gives the closed form of a lognormal through P90 and P10", async () => {
    const body = distributionResponseSchema.parse(
      await ask("distribution", { distribution: { kind: "lognormalP90P10", p90: 50, p10: 500 } }),
    );
    // mu = (ln 50 + ln 500) / 2, sigma = ln 10 / 2.5631: median exp(mu), mean exp(mu + sigma2 / 2)
    expect(body.range.p50).toBeCloseTo(158.113883, 5);
    expect(body.range.mean).toBeCloseTo(236.710864, 5);
    expect(body.standardDeviation).toBeCloseTo(263.726214, 5);
    expect(body.curve.values).toHaveLength(80);
  });

  it("refuses a P10 below P90, at its field", async () => {
    const problem = await refused("distribution", {
      distribution: { kind: "normalP90P10", p90: 0.2, p10: 0.1 },
    });
    expect(problem.errors?.[0].pointer).toBe("#/distribution/p10");
  });
});

describe("POST /api/v1/calculations/distribution of what was given", () => {
  const askRange = async (distribution: unknown) =>
    distributionResponseSchema.parse(await ask("distribution", { distribution }));

  it("gives the limits behind a P90 and a P10", async () => {
    // PERT(10, 20, 50) has its P90 and P10 there (SciPy 1.17.1)
    const distribution = {
      kind: "pert",
      low: 14.48939834,
      mode: 20,
      high: 33.35561498,
      ends: "p90p10",
    };
    const { fit, support } = await askRange(distribution);
    expect(fit?.kind === "limits" && fit.limits.high).toBeCloseTo(50, 5);
    expect(support.low).toBeCloseTo(10, 5);
  });

  it("gives the residual at each percentile", async () => {
    const points = [
      { exceedance: 0.9, value: 10 },
      { exceedance: 0.5, value: 14 },
      { exceedance: 0.1, value: 22 },
    ];
    const normal = await askRange({ kind: "percentiles", family: "normal", points });
    // Least squares against the normal quantiles: mean 46 / 3, slope 12 / 2.5631
    if (normal.fit?.kind !== "percentiles") throw new Error("Not a fit of percentiles.");
    const given = normal.fit.points.map((point) => point.given);
    [28 / 3, 46 / 3, 64 / 3].forEach((value, i) => expect(given[i]).toBeCloseTo(value, 9));
    expect(normal.fit.largestResidual).toBeCloseTo(4 / 3 / 12, 9);
    const shifted = await askRange({ kind: "percentiles", family: "shiftedLognormal", points });
    expect(shifted.fit?.kind === "percentiles" && shifted.fit.largestResidual).toBeCloseTo(0, 9);
  });

  it("gives both tests of measured values and their stairs", async () => {
    const values = [12, 15, 15, 16, 18, 21, 24, 30, 41, 66, 90, 180];
    const { fit } = await askRange({ kind: "data", shape: "lognormal", values });
    if (fit?.kind !== "data") throw new Error("Not a fit of data.");
    // ad.test and lillie.test of nortest 1.0-4 in R 4.2.2
    expect(fit.tests.normal.andersonDarling.pValue).toBeCloseTo(0.000312520910313, 9);
    expect(fit.tests.lognormal?.andersonDarling.pValue).toBeCloseTo(0.116755228715, 9);
    expect(fit.tests.lognormal?.lilliefors.pValue).toBeCloseTo(0.293920749793, 9);
    expect([fit.sampleSize, fit.stairs.values.length]).toEqual([12, 11]);
  });

  it("gives each case and the values with chances of their own", async () => {
    const { cases, atoms, range } = await askRange({
      kind: "scenarios",
      scenarios: [
        { name: "Dry", weight: 0.3, distribution: { kind: "constant", value: 100 } },
        { name: "Wet", weight: 0.7, distribution: { kind: "uniform", low: 100, high: 200 } },
      ],
    });
    expect(atoms).toEqual([{ value: 100, probability: 0.3 }]);
    expect(cases?.map(({ name, range: own }) => [name, own.mean])).toEqual([
      ["Dry", 100],
      ["Wet", 150],
    ]);
    expect(range.mean).toBeCloseTo(135, 10);
  });

  const percentiles = (exceedance: number) => ({
    kind: "percentiles",
    family: "normal",
    points: [
      { exceedance: 0.9, value: 1 },
      { exceedance, value: 2 },
    ],
  });
  const data = (shape: string, ...values: number[]) => ({ kind: "data", shape, values });

  it.each([
    ["a chance of 1e-17", percentiles(1e-17), "/points/1/exceedance"],
    ["a chance of 1e-300", percentiles(1e-300), "/points/1/exceedance"],
    ["values of 1e200", data("normal", 1e200, 2e200, 3e200, 4e200, 5e200), "/values/0"],
    ["opposite ends", data("empirical", 1e308, -1e308, 1e308, -1e308, 0), "/values/0"],
    ["a last digit", data("lognormal", 1e8, 1e8, 1e8, 1e8, 1e8 + 2 ** -26), "/values"],
    ["a last bit", data("normal", 2, 2, 2, 2, 2.0000000000000004), "/values"],
    ["a sigma of 50", { kind: "lognormal", mu: 7, sigma: 50 }, "/sigma"],
    ["a mu of 700", { kind: "lognormal", mu: 700, sigma: 1 }, "/mu"],
    ["a mean of 1e308", { kind: "normal", mean: 1e308, standardDeviation: 1e308 }, "/mean"],
    ["a width of 2e308", { kind: "uniform", low: -1e308, high: 1e308 }, "/low"],
  ])("refuses %s rather than answer with null", async (_, distribution, pointer) => {
    const problem = await refused("distribution", { distribution });
    expect(problem.errors?.[0].pointer).toBe(`#/distribution${pointer}`);
    expect(JSON.stringify(problem)).not.toMatch(/NaN|Infinity/);
  });

  it("refuses weights that do not add up, and a case by its place", async () => {
    const scenarios = (weight: number, high: number) => ({
      distribution: {
        kind: "scenarios",
        scenarios: [
          { name: "A", weight: 0.3, distribution: { kind: "constant", value: 1 } },
          { name: "B", weight, distribution: { kind: "uniform", low: 2, high } },
        ],
      },
    });
    const weights = await refused("distribution", scenarios(0.6, 3));
    expect(weights.errors?.[0]).toMatchObject({
      pointer: "#/distribution/scenarios",
      detail: expect.stringContaining("add up to 0.9"),
    });
    const high = await refused("distribution", scenarios(0.7, 1));
    expect(high.errors?.[0].pointer).toBe("#/distribution/scenarios/1/distribution/high");
  });
});

describe("POST /api/v1/calculations/correlations", () => {
  it("proposes the nearest possible set, and finds it possible when asked again", async () => {
    const correlations = [
      { a: "areaAcres", b: "netThicknessFt", rank: 0.9 },
      { a: "areaAcres", b: "porosity", rank: 0.7 },
      { a: "netThicknessFt", b: "porosity", rank: -0.9 },
    ];
    const first = correlationsResponseSchema.parse(await ask("correlations", { correlations }));
    expect(first.possible).toBe(false);
    expect(first.reason).toContain("contradict each other");
    const again = await ask("correlations", { correlations: first.nearest?.correlations });
    expect(again).toMatchObject({ possible: true, nearest: null });
  });

  it("refuses a pair that is given twice, at its place", async () => {
    const pair = { a: "porosity", b: "waterSaturation", rank: -0.5 };
    const problem = await refused("correlations", { correlations: [pair, pair] });
    expect(problem.errors?.[0].pointer).toBe("#/correlations/1");
  });
});

describe("POST /api/v1/calculations/simulation", () => {
  it("answers the same question with the same figures", async () => {
    const question = { inputs: estimateInputs(), trials: 1000, seed: 7 };
    const first = await ask<SimulationResponse>("simulation", question);
    simulationResponseSchema.parse(first);
    expect(await ask<SimulationResponse>("simulation", question)).toEqual(first);
    const other = await ask<SimulationResponse>("simulation", { ...question, seed: 8 });
    expect(other.results.wetGasInPlaceScf.mean).not.toBe(first.results.wetGasInPlaceScf.mean);
  });

  it("runs 2,000 trials unless asked otherwise", async () => {
    const body = await ask<SimulationResponse>("simulation", { inputs: estimateInputs() });
    expect(body.trials).toBe(2000);
  });

  it("refuses more trials than a preview may take", async () => {
    const problem = await refused("simulation", { inputs: estimateInputs(), trials: 20_001 });
    expect(problem.errors?.[0].pointer).toBe("#/trials");
  });

  it("refuses an impossible input, at its field", async () => {
    const inputs = withConstant(estimateInputs(), "porosity", 0.6);
    const problem = await refused("simulation", { inputs });
    expect(problem.errors?.[0].pointer).toMatch(/^#\/inputs\/uncertain\/porosity/);
  });
});

describe.each(["wellstream", "z-factor", "in-place", "distribution", "correlations", "simulation"])(
  "POST /api/v1/calculations/%s",
  (name) => {
    it("answers 401 to a visitor", async () => {
      expect((await visitor().post(path(name), {})).status).toBe(401);
    });
  },
);
