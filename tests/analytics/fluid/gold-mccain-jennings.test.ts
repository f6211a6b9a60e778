import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { goldThreeStage, goldTwoStage } from "@/analytics/fluid/gold-mccain-jennings";

const twoStage = {
  primarySeparatorPressurePsia: 500,
  primarySeparatorTemperatureDegF: 75,
  primarySeparatorGasGravity: 0.7,
  condensateApi: 55,
};

const threeStage = {
  primarySeparatorPressurePsia: 900,
  primarySeparatorTemperatureDegF: 80,
  primarySeparatorGasGravity: 0.69,
  condensateApi: 54,
  secondSeparatorTemperatureDegF: 75,
};

/** gamma_w = (R g + 4,602 go + Gpa) / (R + Veq), the wellstream gravity as Gold, McCain and Jennings write it. */
const wellstreamGravity = (
  gasOilRatio: number,
  gasGravity: number,
  api: number,
  { vapourEquivalentScfPerStb, additionalGasScfPerStb }: ReturnType<typeof goldTwoStage>,
) =>
  (gasOilRatio * gasGravity + (4602 * 141.5) / (131.5 + api) + additionalGasScfPerStb) /
  (gasOilRatio + vapourEquivalentScfPerStb);

describe("goldTwoStage", () => {
  it("answers its example", () => {
    // JPT July 1989, 747-752: the equation evaluated separately, 1e-4
    const result = goldTwoStage(twoStage);
    expect(result.vapourEquivalentScfPerStb / 1402.841).toBeCloseTo(1, 6);
    expect(result.additionalGasScfPerStb / 796.428).toBeCloseTo(1, 6);
    expect(wellstreamGravity(15000, 0.7, 55, result)).toBeCloseTo(0.90155, 4);
  });

  it("warns for every argument outside the data, and for the result, without limiting anything", () => {
    expect(goldTwoStage({ ...twoStage, primarySeparatorPressurePsia: 300 }).warnings).toEqual([]);
    const result = goldTwoStage({
      primarySeparatorPressurePsia: 900,
      primarySeparatorTemperatureDegF: 130,
      primarySeparatorGasGravity: 0.85,
      condensateApi: 38,
    });
    expect(result.warnings.map(({ input }) => input)).toEqual([
      "fluid.primarySeparator.pressurePsia",
      "fluid.primarySeparator.gasGravity",
      "fluid.condensateApi",
      "fluid.primarySeparator.temperatureDegF",
      "fluid.stockTankGas",
    ]);
    expect(new Set(result.warnings.map(({ code }) => code))).toEqual(
      new Set(["unmeasured_gas_outside_range"]),
    );
    expect(result.vapourEquivalentScfPerStb).toBeGreaterThan(1300);
  });

  it("refuses a separator below atmospheric pressure or a temperature of nil", () => {
    expect(() => goldTwoStage({ ...twoStage, primarySeparatorPressurePsia: 10 })).toThrow(
      /gauge pressure/,
    );
    expect(() => goldTwoStage({ ...twoStage, primarySeparatorTemperatureDegF: 0 })).toThrow(
      DomainError,
    );
  });
});

describe("goldThreeStage", () => {
  it("answers its example", () => {
    // JPT July 1989, 747-752: the equation evaluated separately, 1e-4
    const result = goldThreeStage(threeStage);
    expect(result.vapourEquivalentScfPerStb / 1527.092).toBeCloseTo(1, 6);
    expect(result.additionalGasScfPerStb / 743.099).toBeCloseTo(1, 6);
    expect(wellstreamGravity(9500, 0.69, 54, result)).toBeCloseTo(0.98018, 4);
  });

  it("warns for the second separator's temperature as well", () => {
    const { warnings } = goldThreeStage({ ...threeStage, secondSeparatorTemperatureDegF: 50 });
    expect(warnings.map(({ input }) => input)).toContain("fluid.secondSeparator.temperatureDegF");
  });
});
