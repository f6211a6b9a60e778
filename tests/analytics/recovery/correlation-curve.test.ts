import { describe, expect, it } from "vitest";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { compilePlan } from "@/analytics/recovery/compile-plan";
import {
  condensateByCorrelationStbPerBarrel,
  correlationCurve,
} from "@/analytics/recovery/correlation-curve";
import { recoveryCurveSchema } from "@/analytics/recovery/recovery-curve-schema";
import { buildPlan, constant, psia, publishedCurve } from "./published-curve";

/** The third comparative study's fluid at the surface: 884.76 Mscf and 131.0 STB per MMscf, from memory. */
const sheet: SeparatorTest = {
  basePressurePsia: 14.696,
  primarySeparator: {
    pressurePsia: 814.7,
    temperatureDegF: 80,
    gasOilRatioScfPerStb: 750460 / 131,
    gasGravity: 0.69,
  },
  secondSeparator: {
    pressurePsia: 64.7,
    temperatureDegF: 80,
    gas: { gasOilRatioScfPerStb: 107050 / 131, gasGravity: 0.88 },
  },
  stockTankGas: { gasOilRatioScfPerStb: 27250 / 131, gasGravity: 1.3 },
  condensateApi: 60,
  condensateMolecularWeight: null,
  nitrogen: 0.0194,
  carbonDioxide: 0.0121,
  hydrogenSulphide: 0,
  dewPointPsia: psia(3428),
};

describe("condensateByCorrelationStbPerBarrel", () => {
  it("has the arithmetic of the correlation as remembered", () => {
    // -0.061743 + 143.55 / 6754 + 0.00012184 x 200 + 0.0010114 x 60
    //   = -0.061743 + 0.021254 + 0.024368 + 0.060684 = 0.044563
    expect(condensateByCorrelationStbPerBarrel(6754, 200, 60)).toBeCloseTo(0.044563, 6);
  });
});

describe("correlationCurve", () => {
  const { curve, warnings } = correlationCurve(sheet, { temperatureDegF: 200, dewPointPsia: null });
  const last = curve.points[curve.points.length - 1];

  it("is a curve that a plan can use, marked for what it is", () => {
    expect(recoveryCurveSchema.parse(curve)).toEqual(curve);
    expect(curve.route).toBe("correlation");
    expect(() =>
      compilePlan(buildPlan({ curve, abandonmentPressurePsia: constant(700) })),
    ).not.toThrow();
    expect(warnings.map(({ code }) => code)).toEqual(
      expect.arrayContaining(["correlation_recovery", "single_phase_z"]),
    );
  });

  it("recovers within its error of the published study's condensate", () => {
    // Published 29.25 of 131.0 STB at 700 psig; straight on to 500 psig 30.9: 0.236. The correlation is 12 % off.
    expect(Math.abs(last.condensateProduced / 0.2359 - 1)).toBeLessThan(0.15);
    expect(last.pressurePsia).toBeCloseTo(514.7, 9);
  });

  it("overrates gas below the dew point, by as much as it says", () => {
    // Published moles at 700 psig: 0.740.
    const at700 = curve.points[5];
    expect(at700.pressurePsia).toBeCloseTo(psia(700), 0);
    expect(at700.wellstreamProduced - 0.74).toBeGreaterThan(0.05);
    expect(at700.wellstreamProduced - 0.74).toBeLessThan(0.1);
  });

  it("keeps the published shape over pressure", () => {
    publishedCurve.points.forEach((point, i) => {
      const own = curve.points[i];
      expect(own.pressurePsia).toBeCloseTo(point.pressurePsia, -1);
      expect(own.condensateProduced / last.condensateProduced).toBeCloseTo(
        point.condensateProduced / 0.23586,
        3,
      );
      const inRock = 1 - point.condensateInGas / (1 - point.condensateProduced);
      expect(1 - own.condensateInGas / (1 - own.condensateProduced)).toBeCloseTo(inRock, 3);
    });
  });

  it("balances: gas and condensate recovered make up the moles produced", () => {
    // Dry fraction of the sheet: moles of surface gas over moles of wellstream.
    const fractions = curve.points
      .slice(1)
      .map(
        ({ wellstreamProduced, gasProduced, condensateProduced }) =>
          (wellstreamProduced - condensateProduced) / (gasProduced - condensateProduced),
      );
    for (const fraction of fractions) expect(fraction).toBeCloseTo(fractions[0], 9);
    expect(fractions[0]).toBeGreaterThan(0.86);
    expect(fractions[0]).toBeLessThan(0.9);
  });

  it.each<[string, Partial<SeparatorTest>, number | null, string]>([
    ["no dew point", { dewPointPsia: null }, null, "needs a dew point"],
    ["a low one", {}, 900, "a dew point of 900 psia is too low"],
    [
      "a heavy condensate",
      {
        condensateApi: 30,
        primarySeparator: { ...sheet.primarySeparator, gasOilRatioScfPerStb: 30_000 },
      },
      null,
      "gives no recovery for",
    ],
    [
      "a very rich gas",
      { primarySeparator: { ...sheet.primarySeparator, gasOilRatioScfPerStb: 3_300 } },
      6_000,
      "The fluid is too rich for it",
    ],
    [
      "a lean gas",
      { primarySeparator: { ...sheet.primarySeparator, gasOilRatioScfPerStb: 60_000 } },
      null,
      "the fluid is too lean for it",
    ],
  ])("refuses %s", (_, changes, dewPointPsia, message) => {
    expect(() =>
      correlationCurve({ ...sheet, ...changes }, { temperatureDegF: 200, dewPointPsia }),
    ).toThrow(message);
  });
});
