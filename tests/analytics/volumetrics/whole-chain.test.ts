import { describe, expect, it } from "vitest";
import { recombine } from "@/analytics/fluid/wellstream";
import { inPlace } from "@/analytics/volumetrics/in-place";
import fixture from "../../fixtures/whole-chain.json";

describe("separator test to condensate in place", () => {
  it("agrees, step by step, with the arithmetic written out here", () => {
    // Two stages, gas volumes at 14.65 psia; every line below is done by hand from first principles.
    const Vm = (10.731577 * 519.67) / 14.65; // 380.6743 scf/lbmol at the base of the sheet
    const separatorMoles = 15000 / Vm; // 39.4038 lbmol per STB
    const tankMoles = 400 / Vm; // 1.0508
    const oilSpecificGravity = 141.5 / (131.5 + 54); // 0.762803
    const oilPounds = 350.162 * oilSpecificGravity; // 267.1047
    const oilMoles = oilPounds / (6084 / (54 - 5.9)); // 267.1047 / 126.4865 = 2.11173
    const moles = separatorMoles + tankMoles + oilMoles; // 42.5663
    const pounds = separatorMoles * 0.67 * 28.9647 + tankMoles * 1.1 * 28.9647 + oilPounds;
    const gravity = pounds / moles / 28.9647; // 1065.267 / 42.5663 / 28.9647
    expect(gravity).toBeCloseTo(0.86402, 6);

    // Sutton 2007 for a gas condensate without impurities
    const Tpc = 164.3 + 357.7 * gravity - 67.7 * gravity ** 2;
    const Ppc = 744 - 125.4 * gravity + 5.9 * gravity ** 2;
    const Tpr = (240 + 459.67) / Tpc;
    const Ppr = 5500 / Ppc;
    // Dranchuk and Abou-Kassem by repeated substitution, damped
    let z = 1;
    for (let i = 0; i < 400; i += 1) {
      const r = (0.27 * Ppr) / (z * Tpr);
      const next =
        1 +
        (0.3265 - 1.07 / Tpr - 0.5339 / Tpr ** 3 + 0.01569 / Tpr ** 4 - 0.05165 / Tpr ** 5) * r +
        (0.5475 - 0.7361 / Tpr + 0.1844 / Tpr ** 2) * r ** 2 -
        0.1056 * (-0.7361 / Tpr + 0.1844 / Tpr ** 2) * r ** 5 +
        0.6134 * (1 + 0.721 * r ** 2) * (r ** 2 / Tpr ** 3) * Math.exp(-0.721 * r ** 2);
      z = 0.8 * z + 0.2 * next;
    }

    // 1,800 acres x 70 ft, porosity 0.16, water saturation 0.28: pore space of the gas, then moles, then barrels
    const cubicFeet = 43560 * 1800 * 70 * 0.16 * 0.72; // 632,282,112
    expect(cubicFeet).toBeCloseTo(632282112, 0);
    const molesInPlace = (5500 * cubicFeet) / (z * 10.731577 * 699.67);
    const barrels = molesInPlace / moles;
    const dryGasScf = barrels * (separatorMoles + tankMoles) * ((10.731577 * 519.67) / 14.696);

    const wellstream = recombine({
      basePressurePsia: 14.65,
      primarySeparator: {
        pressurePsia: 600,
        temperatureDegF: 85,
        gasOilRatioScfPerStb: 15000,
        gasGravity: 0.67,
      },
      secondSeparator: null,
      stockTankGas: { gasOilRatioScfPerStb: 400, gasGravity: 1.1 },
      condensateApi: 54,
      condensateMolecularWeight: null,
      nitrogen: 0,
      carbonDioxide: 0,
      hydrogenSulphide: 0,
      dewPointPsia: null,
    });
    const result = inPlace({
      areaAcres: 1800,
      netThicknessFt: 70,
      porosity: 0.16,
      waterSaturation: 0.28,
      pressurePsia: 5500,
      temperatureDegF: 240,
      wellstream,
      impurities: { nitrogen: 0, carbonDioxide: 0, hydrogenSulphide: 0 },
    });
    expect(wellstream.wellstreamGravity).toBeCloseTo(gravity, 7);
    expect(result.zFactor).toBeCloseTo(z, 9);
    // R to seven digits above, to all its digits in the product
    expect(result.condensateInPlaceStb / barrels).toBeCloseTo(1, 7);
    expect(result.dryGasInPlaceScf / dryGasScf).toBeCloseTo(1, 7);
  });

  for (const { input, expected } of fixture.cases) {
    it(`agrees with the recorded Python calculation: ${input.name}`, () => {
      const [first, second, third] = input.stages;
      const wellstream = recombine({
        basePressurePsia: input.basePressurePsia,
        primarySeparator: { pressurePsia: 615, temperatureDegF: 85, ...first },
        secondSeparator: third ? { pressurePsia: 65, temperatureDegF: 80, gas: second } : null,
        stockTankGas: third ?? second,
        condensateApi: input.condensateApi,
        condensateMolecularWeight: input.condensateMolecularWeight,
        nitrogen: input.nitrogen,
        carbonDioxide: input.carbonDioxide,
        hydrogenSulphide: input.hydrogenSulphide,
        dewPointPsia: null,
      });
      const actual = {
        ...wellstream,
        ...inPlace({ ...input, wellstream, impurities: input }),
      };
      for (const [name, value] of Object.entries(expected)) {
        // both sides work in double precision with exact factors; the 1e-10 of the z iteration is the largest error
        expect(Number(actual[name as keyof typeof actual]) / value, name).toBeCloseTo(1, 9);
      }
    });
  }
});
