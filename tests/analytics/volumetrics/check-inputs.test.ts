import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { checkInputs, requirePossibleInputs } from "@/analytics/volumetrics/check-inputs";
import {
  inputNames,
  type EstimateInputs,
  type InputName,
} from "@/analytics/volumetrics/inputs-schema";
import { simulate } from "@/analytics/volumetrics/simulate";
import { usualRanges } from "@/analytics/volumetrics/usual-ranges";
import { buildInputs } from "./estimate-inputs";

const fluid = (changes: Partial<EstimateInputs["fluid"]>): Partial<EstimateInputs> => ({
  fluid: { ...buildInputs().fluid, ...changes },
});

const warningOf = (inputs: EstimateInputs, code: string) =>
  checkInputs(inputs).find((warning) => warning.code === code);

function refusal(inputs: EstimateInputs): DomainError {
  try {
    checkInputs(inputs);
  } catch (error) {
    if (error instanceof DomainError) return error;
  }
  throw new Error("The inputs were accepted.");
}

describe("requirePossibleInputs", () => {
  it("refuses what checkInputs refuses, in the same words", () => {
    const impossible = [
      buildInputs({ porosity: { kind: "constant", value: 0.6 } }),
      buildInputs({}, { correlations: [{ a: "porosity", b: "porosity", rank: 0.2 }] }),
      buildInputs({ areaAcres: { kind: "lognormal", mu: 7, sigma: 50 } }),
    ];
    for (const inputs of impossible) {
      expect(() => requirePossibleInputs(inputs)).toThrow(refusal(inputs).message);
    }
    expect(() => requirePossibleInputs(buildInputs())).not.toThrow();
  });
});

describe("checkInputs", () => {
  it("asks about a mean that less than one trial in ten carries", () => {
    const cases = (high: number): Distribution => ({
      kind: "scenarios",
      scenarios: [
        { name: "Field", weight: 0.95, distribution: { kind: "uniform", low: 900, high: 1100 } },
        { name: "Basin", weight: 0.05, distribution: { kind: "constant", value: high } },
      ],
    });
    // mean = 0.95 x 1000 + 0.05 x 20,000 = 1950; P10 = 900 + 200 x 0.9 / 0.95 = 1089
    expect(warningOf(buildInputs({ areaAcres: cases(20_000) }), "heavy_tail")).toMatchObject({
      input: "uncertain.areaAcres",
      message: expect.stringContaining(
        "The mean of the area, 1,950 acres, is above its P10, 1,090",
      ),
    });
    expect(warningOf(buildInputs({ areaAcres: cases(2_000) }), "heavy_tail")).toBeUndefined();
  });

  it("has nothing to say about an ordinary reservoir", () => {
    expect(checkInputs(buildInputs())).toEqual([]);
  });

  it.each<[InputName, Distribution, string]>([
    [
      "areaAcres",
      { kind: "lognormalP90P10", p90: 3, p10: 9 },
      "Is it in square kilometres (1 km² is 247.1 acres)?",
    ],
    [
      "netThicknessFt",
      { kind: "lognormalP90P10", p90: 3, p10: 8 },
      "Is it in metres (1 m is 3.281 ft)?",
    ],
    [
      "porosity",
      { kind: "uniform", low: 0.28, high: 0.4 },
      "The porosity runs from 0.292 (P90) to 0.388 (P10) fraction; usual values lie between 0.05 and 0.3.",
    ],
    [
      "waterSaturation",
      { kind: "uniform", low: 0.4, high: 0.7 },
      "usual values lie between 0.1 and 0.5",
    ],
    [
      "pressurePsia",
      { kind: "uniform", low: 400, high: 460 },
      "Is it in bar (1 bar is 14.504 psi)?",
    ],
    ["temperatureDegF", { kind: "uniform", low: 110, high: 130 }, "Is it in degrees Celsius?"],
    [
      "condensateYieldStbPerMmscf",
      { kind: "uniform", low: 300, high: 380 },
      "usual values lie between 10 and 300",
    ],
    [
      "gasRecovery",
      { kind: "uniform", low: 0.3, high: 0.5 },
      "usual values lie between 0.6 and 0.9",
    ],
    [
      "condensateRecovery",
      { kind: "uniform", low: 0.05, high: 0.09 },
      "usual values lie between 0.15 and 0.6",
    ],
    [
      "salesGasFraction",
      { kind: "uniform", low: 0.4, high: 0.6 },
      "usual values lie between 0.7 and 1",
    ],
  ])("asks about an unusual %s", (name, distribution, message) => {
    const warning = warningOf(buildInputs({ [name]: distribution }), "unusual_value");
    expect(warning).toMatchObject({ severity: "warning", input: `uncertain.${name}` });
    expect(warning?.message).toContain(message);
  });

  it.each<[InputName, Distribution, string, string]>([
    [
      "areaAcres",
      { kind: "constant", value: 0 },
      "uncertain.areaAcres.value",
      "The area cannot be 0 acres: an area is greater than 0.",
    ],
    [
      "netThicknessFt",
      { kind: "normal", mean: 50, standardDeviation: 25 },
      "uncertain.netThicknessFt.minimum",
      "As described, the net thickness would be below 0 ft with a chance of 2.3 %, but a thickness is greater than 0. Give it a minimum of 0 or a narrower range.",
    ],
    [
      "porosity",
      { kind: "lognormalP90P10", p90: 12, p10: 20 },
      "uncertain.porosity.maximum",
      "Is it in per cent? Enter 0.18 for 18 %.",
    ],
    [
      "waterSaturation",
      { kind: "normalP90P10", p90: 0.3, p10: 0.8 },
      "uncertain.waterSaturation.maximum",
      "above 1 fraction",
    ],
    [
      "pressurePsia",
      { kind: "constant", value: 40 },
      "uncertain.pressurePsia.value",
      "Is it in bar",
    ],
    [
      "temperatureDegF",
      { kind: "constant", value: 600 },
      "uncertain.temperatureDegF.value",
      "limit of the correlations",
    ],
    [
      "condensateYieldStbPerMmscf",
      { kind: "uniform", low: 350, high: 450 },
      "uncertain.condensateYieldStbPerMmscf.maximum",
      "the fluid is an oil",
    ],
    [
      "gasRecovery",
      { kind: "normalP90P10", p90: 0.65, p10: 0.9 },
      "uncertain.gasRecovery.maximum",
      "some gas stays behind",
    ],
    [
      "condensateRecovery",
      { kind: "constant", value: 0.97 },
      "uncertain.condensateRecovery.value",
      "mostly stays in the rock",
    ],
    [
      "salesGasFraction",
      { kind: "constant", value: -0.1 },
      "uncertain.salesGasFraction.value",
      "between none and all",
    ],
    [
      "porosity",
      { kind: "pert", low: 0.2, mode: 0.1, high: 0.3 },
      "uncertain.porosity.mode",
      "The most likely value",
    ],
  ])("refuses an impossible %s: %j", (name, distribution, input, message) => {
    const error = refusal(buildInputs({ [name]: distribution }));
    expect(error.details.input).toBe(input);
    expect(error.message).toContain(message);
  });

  it("accepts a distribution truncated at the limit, and one that passes it by less than one in a million", () => {
    const truncated: Distribution = { kind: "normalP90P10", p90: 0.65, p10: 0.9, maximum: 0.95 };
    expect(() => checkInputs(buildInputs({ gasRecovery: truncated }))).not.toThrow();
    // Above 0.47 with a chance of 2e-8.
    const nearly: Distribution = { kind: "lognormalP90P10", p90: 0.12, p10: 0.2 };
    const { summary } = simulate(buildInputs({ porosity: nearly }), { trials: 1000, seed: 1 });
    expect(summary.inputs.porosity.p10).toBeCloseTo(0.2, 3);
  });

  it.each<[string, EstimateInputs, string]>([
    [
      "wide_range",
      buildInputs({ areaAcres: { kind: "lognormalP90P10", p90: 500, p10: 9000 } }),
      "P10 of the area is 18 times its P90; more than 10 times is unusual.",
    ],
    [
      "narrow_range",
      buildInputs({ areaAcres: { kind: "uniform", low: 2000, high: 2200 } }),
      "P10 of the area is only 1.08 times its P90",
    ],
    [
      "heavy_truncation",
      buildInputs({
        porosity: { kind: "normal", mean: 0.15, standardDeviation: 0.03, minimum: 0.12 },
      }),
      "The bounds of the porosity leave out 16 % of the distribution",
    ],
    [
      "correlation_without_effect",
      buildInputs({ porosity: { kind: "constant", value: 0.15 } }),
      "The porosity is a constant, so its correlation has no effect.",
    ],
    [
      "unusual_pressure_gradient",
      buildInputs({}, { depthFt: 5800 }),
      "6,500 psia at 5,800 ft is 1.12 psi/ft",
    ],
    [
      "unusual_temperature_gradient",
      buildInputs({}, { depthFt: 8000 }),
      "260 °F at 8,000 ft is 2.5 °F per 100 ft",
    ],
    [
      "condensate_recovery_above_gas",
      buildInputs({ condensateRecovery: { kind: "uniform", low: 0.6, high: 0.9 } }),
      "P50 of condensate recovery, 0.75, is above that of gas recovery",
    ],
    [
      "saturated_fluid",
      buildInputs({}, fluid({ dewPointPsia: 6800 })),
      "The dew point, 6,800 psia, is above the reservoir pressure, 6,500 psia",
    ],
    [
      "yield_differs_from_test",
      buildInputs({ condensateYieldStbPerMmscf: { kind: "uniform", low: 40, high: 60 } }),
      "P50 of the condensate yield is 50 STB/MMscf, but the separator test gives 80.3",
    ],
    [
      "z_low_reduced_temperature",
      buildInputs({
        temperatureDegF: { kind: "constant", value: 62 },
        condensateYieldStbPerMmscf: { kind: "constant", value: 190 },
      }),
      "Below 1.15 the z correlation is poor",
    ],
    [
      "unusual_z",
      buildInputs({ pressurePsia: { kind: "constant", value: 16_000 } }),
      "usual values lie between 0.6 and 1.8",
    ],
  ])("warns of %s", (code, inputs, message) => {
    expect(warningOf(inputs, code)?.message).toContain(message);
  });

  it("cautions where people can get hurt: pressure, temperature, hydrogen sulphide", () => {
    const hot = buildInputs({
      pressurePsia: { kind: "normal", mean: 12_000, standardDeviation: 200 },
    });
    expect(warningOf(hot, "high_pressure_high_temperature")).toMatchObject({
      severity: "caution",
      input: "uncertain.pressurePsia",
    });
    const hotter = buildInputs({
      temperatureDegF: { kind: "normal", mean: 380, standardDeviation: 5 },
    });
    expect(warningOf(hotter, "high_pressure_high_temperature")?.message).toContain(
      "Wells and equipment need that rating",
    );
    const sour = checkInputs(buildInputs({}, fluid({ hydrogenSulphide: 0.02 }))).filter(
      ({ code }) => code === "sour_gas",
    );
    expect(sour).toHaveLength(1);
    // 2 % of 6,500 psia.
    expect(sour[0].message).toContain("at reservoir pressure is 130 psia");
    expect(sour[0].severity).toBe("caution");
  });

  it("names an impossible value of the fluid by its path", () => {
    const error = refusal(buildInputs({}, fluid({ condensateApi: 10 })));
    expect(error.details.input).toBe("fluid.condensateApi");
  });

  it("names contradictory correlations in words", () => {
    const error = refusal(
      buildInputs(
        {},
        {
          correlations: [
            { a: "areaAcres", b: "netThicknessFt", rank: 0.9 },
            { a: "netThicknessFt", b: "porosity", rank: 0.9 },
            { a: "areaAcres", b: "porosity", rank: -0.6 },
          ],
        },
      ),
    );
    expect(error.details.input).toBe("correlations");
    expect(error.message).toContain(
      "area with net thickness 0.9; net thickness with porosity 0.9; area with porosity -0.6",
    );
  });
});

describe("usualRanges", () => {
  it.each(inputNames)("has the usual range of %s inside the possible one", (name) => {
    const { usual, possible, reason, slip } = usualRanges[name];
    expect(usual[0]).toBeGreaterThanOrEqual(possible[0]);
    expect(usual[1]).toBeLessThanOrEqual(possible[1]);
    expect(reason && slip).not.toBe("");
  });
});
