import fc from "fast-check";
import { describe, expect, it } from "vitest";
import "../../support/property-seed";
import { recombine } from "@/analytics/fluid/wellstream";
import {
  contentsAtMoles,
  contentsBelowDewPoint,
  createContents,
  producedAboveDewPoint,
  type Reservoir,
} from "@/analytics/recovery/depletion";
import { fineCurve } from "@/analytics/recovery/fine-curve";
import { pressureOverZLine, wellstreamProducedScf } from "@/analytics/recovery/pressure-over-z";
import { sweptByWater } from "@/analytics/recovery/water-drive";
import { inPlace } from "@/analytics/volumetrics/in-place";
import { simulate } from "@/analytics/volumetrics/simulate";
import { buildInputs, constants } from "../volumetrics/estimate-inputs";
import { buildPlan, constant, psia, publishedCurve } from "./published-curve";

const curve = fineCurve(publishedCurve);
const DEW_POINT_OVER_Z = psia(3428) / 0.803;

/** Just saturated, unless told. */
function reservoir(changes: Partial<Reservoir> = {}): Reservoir {
  return {
    initialPressurePsia: psia(3428),
    initialPressureOverZ: DEW_POINT_OVER_Z,
    dewPointPressureOverZ: DEW_POINT_OVER_Z,
    condensateCurveFactor: 1,
    ...changes,
  };
}

function contents(one: Reservoir, pressurePsia: number) {
  const into = createContents();
  contentsBelowDewPoint(curve, one, pressurePsia, into);
  return into;
}

describe("contentsBelowDewPoint", () => {
  it("has the published recoveries of a reservoir that begins at its dew point", () => {
    // Kenyon and Behie (1987): 29.25 of 131.0 STB and 74.019 % of the moles at 700 psig.
    const at700 = contents(reservoir(), psia(700));
    expect(at700.condensateProduced).toBeCloseTo(0.2233, 4);
    expect(1 - at700.wellstreamLeft).toBeCloseTo(0.74019, 5);
    // At 1,800 psig, in between: 20.43 of 131.0 and 42.026 %. The grid's straight lines pass a point by a millionth.
    const at1800 = contents(reservoir(), psia(1800));
    expect(at1800.condensateProduced).toBeCloseTo(0.15595, 4);
    expect(1 - at1800.wellstreamLeft).toBeCloseTo(0.42026, 4);
  });

  it("adds the expansion above the dew point, worked by hand", () => {
    // 6,000 psia with z 1.10: p/z 5,454.55. At the dew point 3,442.7 / 0.803 = 4,287.30. n0 = 1 - 0.78600 = 0.21400.
    const one = reservoir({ initialPressurePsia: 6000, initialPressureOverZ: 6000 / 1.1 });
    expect(producedAboveDewPoint(curve, one)).toBeCloseTo(0.214, 4);
    const at700 = contents(one, psia(700));
    // 0.21400 + 0.78600 x 0.22328 = 0.38950; gas 0.21400 + 0.78600 x 0.80449 = 0.84633
    expect(at700.condensateProduced).toBeCloseTo(0.3895, 4);
    expect(at700.gasProduced).toBeCloseTo(0.84633, 4);
  });

  it("multiplies the condensate of the curve, and splits what is left as the curve does", () => {
    const plain = contents(reservoir(), 2000);
    const more = contents(reservoir({ condensateCurveFactor: 1.2 }), 2000);
    expect(more.condensateProduced).toBeCloseTo(1.2 * plain.condensateProduced, 12);
    expect(more.gasProduced).toBe(plain.gasProduced);
    expect(more.condensateInRock / more.condensateInGas).toBeCloseTo(
      plain.condensateInRock / plain.condensateInGas,
      12,
    );
  });

  it("takes a reservoir below the dew point as saturated at its own pressure", () => {
    const own = reservoir({ initialPressurePsia: 3000, initialPressureOverZ: 3000 / 0.8 });
    expect(contents(own, 3000).wellstreamLeft).toBeCloseTo(1, 9);
    // Half the initial pressure reads the curve at half the dew point.
    expect(contents(own, 1500).condensateProduced).toBeCloseTo(
      contents(reservoir(), psia(3428) / 2).condensateProduced,
      12,
    );
  });

  it("goes over from one to the other without a step", () => {
    const below = contents(reservoir({ initialPressurePsia: psia(3428) - 1e-6 }), 1000);
    const above = contents(reservoir({ initialPressurePsia: psia(3428) + 1e-6 }), 1000);
    expect(below.condensateProduced).toBeCloseTo(above.condensateProduced, 8);
  });

  it("is never a number outside the curve", () => {
    expect(contents(reservoir(), 600).condensateProduced).toBeNaN();
    expect(contents(reservoir(), 3600).condensateProduced).toBeNaN();
  });

  it("keeps shares between 0 and 1 that add up to 1, and recovers more at lower pressure", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 3443, max: 9000, noNaN: true }),
        fc.double({ min: 715, max: 3442, noNaN: true }),
        fc.double({ min: 1, max: 400, noNaN: true }),
        fc.double({ min: 0.5, max: 2, noNaN: true }),
        (initialPressurePsia, pressure, fall, condensateCurveFactor) => {
          const one = reservoir({
            initialPressurePsia,
            initialPressureOverZ: DEW_POINT_OVER_Z * (1 + (initialPressurePsia - 3442.7) / 6000),
            condensateCurveFactor,
          });
          const now = contents(one, pressure);
          const { condensateProduced, condensateInGas, condensateInRock, gasProduced } = now;
          for (const share of [
            condensateProduced,
            condensateInGas,
            condensateInRock,
            gasProduced,
          ]) {
            expect(share).toBeGreaterThanOrEqual(0);
            expect(share).toBeLessThanOrEqual(1);
          }
          expect(condensateProduced + condensateInGas + condensateInRock).toBeCloseTo(1, 12);
          expect(gasProduced + now.gasInGas).toBeLessThanOrEqual(1 + 1e-12);
          const later = contents(one, Math.max(714.7, pressure - fall));
          expect(later.condensateProduced).toBeGreaterThanOrEqual(condensateProduced - 1e-12);
          expect(later.gasProduced).toBeGreaterThanOrEqual(gasProduced - 1e-12);
        },
      ),
      { numRuns: 200 },
    );
  });
});

describe("contentsAtMoles", () => {
  it("finds the pressure at which so many moles are left", () => {
    const one = reservoir({ initialPressurePsia: 5000, initialPressureOverZ: 5000 });
    for (const pressure of [3300, 2415, 1800.5, 900]) {
      const direct = contents(one, pressure);
      const found = createContents();
      contentsAtMoles(curve, one, direct.wellstreamLeft, found);
      expect(found.pressurePsia).toBeCloseTo(pressure, 6);
      expect(found.condensateInGas).toBeCloseTo(direct.condensateInGas, 9);
    }
    const past = createContents();
    contentsAtMoles(curve, one, 0.01, past);
    expect(past.pressurePsia).toBeNaN();
  });
});

describe("sweptByWater", () => {
  it("makes the known recovery of a dry gas under water drive", () => {
    // p/z fell from 5,000 to 3,000: 40 % without water. Water took 60 % of the pores and left 0.35 of the gas space:
    // 1 - 0.6 [1 - 0.6 + 0.6 x 0.35] = 0.634 (Agarwal, Al-Hussainy and Ramey 1965, the form from memory).
    const swept = sweptByWater(
      { kind: "influx", invadedFraction: 0.6, trappedGasSaturation: 0.35 },
      { gasSaturation: 1 },
    );
    expect(0.4 + 0.6 * swept).toBeCloseTo(0.634, 12);
  });

  it("passes by the gas when liquid leaves less of it than is trapped", () => {
    const drive = { kind: "influx", invadedFraction: 0.5, trappedGasSaturation: 0.6 } as const;
    expect(sweptByWater(drive, { gasSaturation: 0.55 })).toBe(0);
    expect(sweptByWater({ kind: "none" }, { gasSaturation: 1 })).toBe(0);
  });

  it("recovers more gas at the same abandonment pressure", () => {
    const run = (waterDrive: Parameters<typeof sweptByWater>[0]) =>
      simulate(
        buildInputs(
          { pressurePsia: { kind: "constant", value: 4000 } },
          {
            recoveryPlan: buildPlan({ abandonmentPressurePsia: constant(2000), waterDrive }),
            correlations: [],
          },
        ),
        { trials: 200, seed: 1 },
      ).summary;
    const closed = run({ kind: "none" });
    const wet = run({ kind: "influx", invadedFraction: 0.5, trappedGasSaturation: 0.3 });
    expect(wet.inputs.gasRecovery.p50).toBeGreaterThan(closed.inputs.gasRecovery.p50);
    expect(wet.recovery?.shares.leftInRock).toBeCloseTo(
      closed.recovery?.shares.leftInRock ?? 0,
      12,
    );
    const { toTank, leftInRock, leftInGas } = wet.recovery?.shares ?? {
      toTank: 0,
      leftInRock: 0,
      leftInGas: 0,
    };
    expect(toTank + leftInRock + leftInGas).toBeCloseTo(1, 12);
  });
});

describe("gas in place by three routes", () => {
  // 2,000 acres x 60 ft, porosity 0.16, water 0.22, just saturated with the published fluid at 200 degF.
  const rock = { areaAcres: 2000, netThicknessFt: 60, porosity: 0.16, waterSaturation: 0.22 };
  const inputs = buildInputs();
  const wellstream = recombine(inputs.fluid);
  const volumetric = inPlace({
    ...rock,
    pressurePsia: psia(3428),
    temperatureDegF: 200,
    wellstream,
    impurities: inputs.fluid,
    measuredZFactor: 0.803,
  });
  // Production by the published moles; pressures with the published two-phase z, which the moles did not use.
  const history = publishedCurve.points.map(({ pressurePsia, twoPhaseZ, wellstreamProduced }) => ({
    pressurePsia,
    z: twoPhaseZ,
    wellstreamProducedScf: wellstreamProduced * volumetric.wetGasInPlaceScf,
  }));

  it("agrees: volumetric, the p/z line with two-phase z, and the curve", () => {
    const line = pressureOverZLine(history);
    // Two-phase z is published with three figures: 0.1 %.
    expect(line.gasInPlaceScf / volumetric.wetGasInPlaceScf).toBeCloseTo(1, 2);
    expect(Math.abs(line.gasInPlaceScf / volumetric.wetGasInPlaceScf - 1)).toBeLessThan(0.002);
    expect(line.rSquared).toBeGreaterThan(0.9999);
    // One pressure and its production over the curve's recovery there.
    const now = history[3];
    const fromCurve =
      now.wellstreamProducedScf / (1 - contents(reservoir(), now.pressurePsia).wellstreamLeft);
    expect(fromCurve / line.gasInPlaceScf).toBeCloseTo(1, 2);
  });

  it("misses by the gas's own z below the dew point, which is why two-phase z is asked for", () => {
    const single = publishedCurve.points.map(({ gasZ }, i) => ({ ...history[i], z: gasZ }));
    const biased = pressureOverZLine(single).gasInPlaceScf / volumetric.wetGasInPlaceScf - 1;
    expect(biased).toBeLessThan(-0.03);
  });

  it("adds the vapour equivalent of condensate to gas", () => {
    expect(wellstreamProducedScf(9_000_000, 100, 800)).toBe(9_080_000);
  });

  it.each([
    [history.slice(0, 2), "records", "at least three pressures; there are 2."],
    [
      [history[0], history[2], history[1]],
      "records.2.wellstreamProducedScf",
      "Cumulative production rises",
    ],
    [
      [history[0], { ...history[1], z: 0 }, history[2]],
      "records.1.z",
      "A z factor is above zero, not 0.",
    ],
    [
      history.map((record) => ({ ...record, pressurePsia: 3000, z: 1 })),
      "records",
      "p/z does not fall",
    ],
  ])("refuses what gives no line %#", (records, input, message) => {
    expect(() => pressureOverZLine(records)).toThrow(
      expect.objectContaining({
        message: expect.stringContaining(message),
        details: expect.objectContaining({ input }),
      }),
    );
  });
});

describe("simulate of constants", () => {
  it("is the formula, in every percentile", () => {
    const { summary } = simulate(
      buildInputs(
        constants({
          areaAcres: 2000,
          netThicknessFt: 60,
          porosity: 0.16,
          waterSaturation: 0.22,
          pressurePsia: 5000,
          temperatureDegF: 200,
          condensateYieldStbPerMmscf: 148,
          gasRecovery: 0.7,
          condensateRecovery: 0.3,
          salesGasFraction: 0.9,
        }),
        { recoveryPlan: buildPlan({ condensateCurveFactor: constant(0.9) }), correlations: [] },
      ),
      { trials: 100, seed: 1 },
    );
    // zd from a run at the dew point itself: z of the same gas by the same method.
    const atDewPoint = simulate(
      buildInputs({
        pressurePsia: { kind: "constant", value: psia(3428) },
        temperatureDegF: { kind: "constant", value: 200 },
        condensateYieldStbPerMmscf: { kind: "constant", value: 148 },
      }),
      { trials: 100, seed: 1 },
    ).summary.derived.zFactor.p50;
    const n0 = 1 - psia(3428) / atDewPoint / (5000 / summary.derived.zFactor.p50);
    const condensate = n0 + (1 - n0) * 0.9 * (29.25 / 131);
    for (const level of ["p90", "p50", "p10", "mean"] as const) {
      expect(summary.inputs.condensateRecovery[level]).toBeCloseTo(condensate, 8);
    }
    expect(summary.deterministic.condensateRecoverableStb).toBeCloseTo(
      condensate * summary.deterministic.condensateInPlaceStb,
      0,
    );
    const [above, below] = summary.recovery?.phases ?? [];
    expect(above.gasShare).toBeCloseTo(n0, 8);
    expect(below.condensateShare).toBeCloseTo(condensate - n0, 8);
  });
});
