import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { goldThreeStage, goldTwoStage } from "@/analytics/fluid/gold-mccain-jennings";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import {
  dryGasFractionAtYield,
  recombine,
  wellstreamGravityAtYield,
  yieldConstants,
} from "@/analytics/fluid/wellstream";

const twoStage: SeparatorTest = {
  basePressurePsia: 14.696,
  primarySeparator: {
    pressurePsia: 514.696,
    temperatureDegF: 80,
    gasOilRatioScfPerStb: 12000,
    gasGravity: 0.68,
  },
  secondSeparator: null,
  stockTankGas: { gasOilRatioScfPerStb: 450, gasGravity: 1.15 },
  condensateApi: 56,
  condensateMolecularWeight: null,
  nitrogen: 0,
  carbonDioxide: 0,
  hydrogenSulphide: 0,
  dewPointPsia: null,
};

const threeStage: SeparatorTest = {
  ...twoStage,
  primarySeparator: {
    pressurePsia: 814.7,
    temperatureDegF: 80,
    gasOilRatioScfPerStb: 7500,
    gasGravity: 0.7,
  },
  secondSeparator: {
    pressurePsia: 64.7,
    temperatureDegF: 75,
    gas: { gasOilRatioScfPerStb: 620, gasGravity: 0.93 },
  },
  stockTankGas: { gasOilRatioScfPerStb: 140, gasGravity: 1.35 },
  condensateApi: 54,
};

const gasStage = (low: number, high: number, lightest: number, heaviest: number) =>
  fc.record({
    gasOilRatioScfPerStb: fc.double({ min: low, max: high, noNaN: true }),
    gasGravity: fc.double({ min: lightest, max: heaviest, noNaN: true }),
  });

const anyTest = fc
  .record({
    base: fc.constantFrom(14.65, 14.696, 14.73, 15.025),
    first: gasStage(4000, 60000, 0.6, 0.85),
    second: fc.option(gasStage(50, 1500, 0.7, 1.1)),
    tank: gasStage(0, 600, 0.9, 1.6),
    api: fc.double({ min: 40, max: 65, noNaN: true }),
    molecularWeight: fc.option(fc.double({ min: 95, max: 200, noNaN: true })),
  })
  .map(
    ({ base, first, second, tank, api, molecularWeight }): SeparatorTest => ({
      ...twoStage,
      basePressurePsia: base,
      primarySeparator: { pressurePsia: 700, temperatureDegF: 80, ...first },
      secondSeparator: second && { pressurePsia: 100, temperatureDegF: 75, gas: second },
      stockTankGas: tank,
      condensateApi: api,
      condensateMolecularWeight: molecularWeight,
    }),
  );

describe("recombine", () => {
  it("answers its example: two stages, worked out separately from moles and masses", () => {
    const result = recombine(twoStage);
    expect(result.wellstreamGravity).toBeCloseTo(0.914422, 6);
    expect(result.wellstreamScfPerStb).toBeCloseTo(13275.781, 3);
    expect(result.dryGasFraction).toBeCloseTo(0.937798, 6);
    expect(result.condensateYieldStbPerMmscf).toBeCloseTo(80.3213, 4);
    expect(result.condensateYieldStbPerMmscfWellstream).toBeCloseTo(75.3251, 4);
    expect(result.unmeasuredVapourScfPerStb).toBeNull();
    expect(result.fluidType).toBe("condensate");
    expect(result.warnings).toEqual([]);
  });

  it("gives a condensate of 55 API a vapour equivalent of 813.6 scf/STB", () => {
    // 132,880 x 0.758713 / 123.9104: Kv of 14.696 psia, Cragoe
    const { vapourEquivalentScfPerStb } = recombine({ ...twoStage, condensateApi: 55 });
    expect(vapourEquivalentScfPerStb / 813.638).toBeCloseTo(1, 5);
  });

  it("conserves moles and mass, counted one pound-mole at a time, at any base and number of stages", () => {
    fc.assert(
      fc.property(anyTest, (test) => {
        const molarVolume = (10.731577089 * 519.67) / test.basePressurePsia;
        const stages = [test.primarySeparator, test.secondSeparator?.gas, test.stockTankGas];
        let moles = 0;
        let pounds = 0;
        for (const stage of stages) {
          if (!stage) continue;
          const stageMoles = stage.gasOilRatioScfPerStb / molarVolume;
          moles += stageMoles;
          pounds += stageMoles * stage.gasGravity * 28.9647;
        }
        const gasMoles = moles;
        const liquidPounds = (350.162 * 141.5) / (131.5 + test.condensateApi);
        const result = recombine(test);
        moles += liquidPounds / result.condensateMolecularWeight;
        pounds += liquidPounds;

        const canonicalVolume = (10.731577089 * 519.67) / 14.696;
        expect(result.wellstreamScfPerStb / (moles * canonicalVolume)).toBeCloseTo(1, 9);
        expect(result.surfaceGasOilRatioScfPerStb / (gasMoles * canonicalVolume)).toBeCloseTo(1, 9);
        expect(result.wellstreamGravity / (pounds / moles / 28.9647)).toBeCloseTo(1, 9);
        expect(result.dryGasFraction / (gasMoles / moles)).toBeCloseTo(1, 12);
      }),
    );
  });

  it("keeps the two yields, the dry-gas fraction and the vapour equivalent consistent", () => {
    fc.assert(
      fc.property(anyTest, (test) => {
        const result = recombine(test);
        const barrelsPerWetMmscf = result.condensateYieldStbPerMmscf * result.dryGasFraction;
        expect(barrelsPerWetMmscf / result.condensateYieldStbPerMmscfWellstream).toBeCloseTo(1, 12);
        expect(
          result.dryGasFraction +
            (result.condensateYieldStbPerMmscfWellstream * result.vapourEquivalentScfPerStb) / 1e6,
        ).toBeCloseTo(1, 12);
      }),
    );
  });

  it("closes the published surface split of a rich condensate", () => {
    // Kenyon and Behie (1987), from memory: 1 MMscf of wellstream gives 131.00 STB and 750.46, 107.05 and 27.25 Mscf.
    // What is missing from 1 MMscf is the vapour of 131 STB: 879.7 scf/STB. A condensate of 60 API by Cragoe has 873.
    const result = recombine({
      ...threeStage,
      primarySeparator: {
        ...threeStage.primarySeparator,
        gasOilRatioScfPerStb: 750460 / 131,
      },
      secondSeparator: {
        pressurePsia: 64.7,
        temperatureDegF: 80,
        gas: { gasOilRatioScfPerStb: 107050 / 131, gasGravity: 0.95 },
      },
      stockTankGas: { gasOilRatioScfPerStb: 27250 / 131, gasGravity: 1.4 },
      condensateApi: 60,
    });
    expect(result.condensateYieldStbPerMmscf).toBeCloseTo(148.06, 2);
    expect(Math.abs(result.condensateYieldStbPerMmscfWellstream / 131 - 1)).toBeLessThan(0.002);
    expect(Math.abs(result.dryGasFraction - 0.88476)).toBeLessThan(0.001);
  });

  it("restates gas volumes reported at another base", () => {
    const atLouisiana = recombine({ ...twoStage, basePressurePsia: 15.025 });
    expect(atLouisiana.surfaceGasOilRatioScfPerStb).toBeCloseTo((12450 * 15.025) / 14.696, 6);
    expect(atLouisiana.primarySeparatorGasOilRatioScfPerStb).toBeCloseTo(
      (12000 * 15.025) / 14.696,
      6,
    );
  });

  it("uses a laboratory molecular weight where there is one", () => {
    const result = recombine({ ...twoStage, condensateMolecularWeight: 130 });
    expect(result.condensateMolecularWeight).toBe(130);
    expect(result.vapourEquivalentScfPerStb).toBeCloseTo((132880.443 * 141.5) / 187.5 / 130, 3);
  });

  describe("where the stock-tank gas was not measured", () => {
    it("takes the wellstream of Gold, McCain and Jennings, restated from 14.65 psia", () => {
      const test = { ...twoStage, stockTankGas: null };
      const gold = goldTwoStage({
        primarySeparatorPressurePsia: 514.696,
        primarySeparatorTemperatureDegF: 80,
        primarySeparatorGasGravity: 0.68,
        condensateApi: 56,
      });
      const result = recombine(test);
      const restated = 14.65 / 14.696;
      expect(result.wellstreamScfPerStb).toBeCloseTo(
        12000 + gold.vapourEquivalentScfPerStb * restated,
        8,
      );
      expect(result.unmeasuredVapourScfPerStb).toBeCloseTo(
        gold.vapourEquivalentScfPerStb * restated - result.vapourEquivalentScfPerStb,
        8,
      );
      expect(result.surfaceGasOilRatioScfPerStb).toBeCloseTo(
        12000 + result.unmeasuredVapourScfPerStb!,
        8,
      );
      // their own form of the wellstream gravity, with R at 14.65 psia and the constant of that base
      const ratio = 12000 / restated;
      const published =
        (ratio * 0.68 + 4602.07 * (141.5 / 187.5) + gold.additionalGasScfPerStb) /
        (ratio + gold.vapourEquivalentScfPerStb);
      expect(result.wellstreamGravity).toBeCloseTo(published, 6);
    });

    it("finds close to what was measured where it was measured", () => {
      // 450 scf/STB of gravity 1.15 measured in the example
      const result = recombine({ ...twoStage, stockTankGas: null });
      expect(result.unmeasuredVapourScfPerStb).toBeCloseTo(473, 0);
      expect(Math.abs(result.wellstreamGravity / 0.914422 - 1)).toBeLessThan(0.01);
    });

    it("takes off what was measured at the second separator", () => {
      const result = recombine({ ...threeStage, stockTankGas: null });
      const gold = goldThreeStage({
        primarySeparatorPressurePsia: 814.7,
        primarySeparatorTemperatureDegF: 80,
        primarySeparatorGasGravity: 0.7,
        condensateApi: 54,
        secondSeparatorTemperatureDegF: 75,
      });
      expect(result.wellstreamScfPerStb).toBeCloseTo(
        7500 + (gold.vapourEquivalentScfPerStb * 14.65) / 14.696,
        8,
      );
      const both = recombine({
        ...threeStage,
        secondSeparator: { ...threeStage.secondSeparator!, gas: null },
        stockTankGas: null,
      });
      expect(both.unmeasuredVapourScfPerStb! - result.unmeasuredVapourScfPerStb!).toBeCloseTo(
        620,
        8,
      );
      expect(both.wellstreamGravity).toBeCloseTo(result.wellstreamGravity, 12);
    });

    it("counts the gas as nil, and says so, where the correlation leaves less than nothing", () => {
      const result = recombine({
        ...twoStage,
        primarySeparator: { ...twoStage.primarySeparator, pressurePsia: 120, gasGravity: 0.6 },
        stockTankGas: null,
        condensateApi: 62,
      });
      expect(result.unmeasuredVapourScfPerStb).toBe(0);
      expect(result.surfaceGasOilRatioScfPerStb).toBe(12000);
      expect(result.warnings.map(({ code }) => code)).toContain("unmeasured_gas_not_resolved");
    });
  });

  it("warns about unusual fluids", () => {
    const codesOf = (change: Partial<SeparatorTest>) =>
      recombine({ ...twoStage, ...change }).warnings.map(({ code }) => code);
    const gas = (gasOilRatioScfPerStb: number) => ({
      primarySeparator: { ...twoStage.primarySeparator, gasOilRatioScfPerStb },
    });
    expect(codesOf({ condensateApi: 38 })).toEqual(["unusual_value"]);
    expect(codesOf({ nitrogen: 0.12 })).toEqual(["unusual_value"]);
    expect(codesOf(gas(150000))).toEqual(["unusual_value"]);
    expect(codesOf(gas(3900))).toEqual(["near_critical"]);
    // a yield of 339 STB/MMscf and a wellstream gravity of 1.44 are unusual as well
    expect(codesOf(gas(2500))).toEqual(["unusual_value", "unusual_value", "probably_oil"]);
    expect(codesOf({ hydrogenSulphide: 0.01 })).toEqual(["sour_gas"]);
    expect(codesOf({ stockTankGas: { gasOilRatioScfPerStb: 450, gasGravity: 0.66 } })).toEqual([
      "light_low_pressure_gas",
    ]);
  });

  it.each<[string, Partial<SeparatorTest>]>([
    ["condensateApi", { condensateApi: 25 }],
    ["basePressurePsia", { basePressurePsia: 101.325 }],
    [
      "primarySeparator.pressurePsia",
      { primarySeparator: { ...twoStage.primarySeparator, pressurePsia: 5 } },
    ],
    [
      "primarySeparator.gasGravity",
      { primarySeparator: { ...twoStage.primarySeparator, gasGravity: 0.5 } },
    ],
    [
      "primarySeparator.gasOilRatioScfPerStb",
      { primarySeparator: { ...twoStage.primarySeparator, gasOilRatioScfPerStb: 900 } },
    ],
    [
      "secondSeparator.pressurePsia",
      { secondSeparator: { pressurePsia: 600, temperatureDegF: 80, gas: null } },
    ],
    ["stockTankGas.gasGravity", { stockTankGas: { gasOilRatioScfPerStb: 450, gasGravity: 3.5 } }],
    ["hydrogenSulphide", { hydrogenSulphide: 1.01 }],
    ["condensateMolecularWeight", { condensateMolecularWeight: 30 }],
  ])("refuses an impossible %s", (input, change) => {
    let caught: unknown;
    try {
      recombine({ ...twoStage, ...change });
    } catch (error) {
      caught = error;
    }
    expect(caught).toBeInstanceOf(DomainError);
    expect((caught as DomainError).details.input).toBe(input);
  });
});

describe("dryGasFractionAtYield and wellstreamGravityAtYield", () => {
  it("reproduce the wellstream at its own yield", () => {
    fc.assert(
      fc.property(anyTest, (test) => {
        const result = recombine(test);
        const constants = yieldConstants(result);
        const condensateYield = result.condensateYieldStbPerMmscf;
        expect(dryGasFractionAtYield(condensateYield, constants)).toBeCloseTo(
          result.dryGasFraction,
          12,
        );
        expect(wellstreamGravityAtYield(condensateYield, constants)).toBeCloseTo(
          result.wellstreamGravity,
          12,
        );
      }),
    );
  });

  it("give the surface gas itself where there is no condensate", () => {
    const constants = yieldConstants(recombine(twoStage));
    expect(dryGasFractionAtYield(0, constants)).toBe(1);
    expect(wellstreamGravityAtYield(0, constants)).toBe(constants.surfaceGasGravity);
  });

  it("refuse a fluid without a vapour equivalent", () => {
    expect(() => yieldConstants({ ...recombine(twoStage), vapourEquivalentScfPerStb: 0 })).toThrow(
      DomainError,
    );
  });
});
