import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { recombine } from "@/analytics/fluid/wellstream";
import { gasProperties } from "@/analytics/gas/gas-properties";
import { materialBalance, type ProductionRecord } from "@/analytics/recovery/material-balance";
import { reservoirZ } from "@/analytics/recovery/reservoir-z";
import { psia, publishedCurve } from "./published-curve";

/**
 * The published fluid of `published-curve` at the surface: 884.76 Mscf in three streams and 131 STB make 1 MMscf of
 * wellstream, so a barrel is 115,240 / 131 = 879.7 scf of vapour. The molecular weight is the one of a 50 degAPI liquid
 * that gives it, 132,880 x 0.7796 / 879.7; gravities are invented, and no figure below depends on them.
 */
const separatorTest: SeparatorTest = {
  basePressurePsia: 14.696,
  primarySeparator: {
    pressurePsia: 815,
    temperatureDegF: 80,
    gasOilRatioScfPerStb: 750_460 / 131,
    gasGravity: 0.7,
  },
  secondSeparator: {
    pressurePsia: 315,
    temperatureDegF: 80,
    gas: { gasOilRatioScfPerStb: 107_050 / 131, gasGravity: 0.78 },
  },
  stockTankGas: { gasOilRatioScfPerStb: 27_250 / 131, gasGravity: 1.1 },
  condensateApi: 50,
  condensateMolecularWeight: 117.76,
  nitrogen: 0,
  carbonDioxide: 0,
  hydrogenSulphide: 0,
  dewPointPsia: psia(3428),
};
const HUNDRED_BSCF = 1e11;
/** Surface products of the same table, of 100 Bscf of wellstream at the dew point. */
const records: ProductionRecord[] = publishedCurve.points.map((point) => ({
  pressurePsia: point.pressurePsia,
  surfaceGasScf: point.gasProduced * 0.88476 * HUNDRED_BSCF,
  condensateStb: point.condensateProduced * 131e-6 * HUNDRED_BSCF,
}));
const input = {
  records,
  separatorTest,
  temperatureDegF: 200,
  curve: publishedCurve,
  depthFt: null,
};
const codesOf = ({ warnings }: ReturnType<typeof materialBalance>) =>
  warnings.map(({ code }) => code);

/** 50 Bscf of one gas at 260 degF, without condensate, produced down these pressures. */
function history(pressures: number[], expansion = (_: number) => 1): ProductionRecord[] {
  const { wellstreamGravity } = recombine(separatorTest);
  const at = (pressurePsia: number) =>
    (expansion(pressurePsia) * pressurePsia) /
    gasProperties({
      ...separatorTest,
      gasGravity: wellstreamGravity,
      pressurePsia,
      temperatureDegF: 260,
    }).zFactor;
  return pressures.map((pressurePsia) => ({
    pressurePsia,
    surfaceGasScf: 5e10 * (1 - at(pressurePsia) / at(pressures[0])),
    condensateStb: 0,
  }));
}

describe("materialBalance(input)", () => {
  it("finds the gas and the condensate that the published depletion began with", () => {
    const result = materialBalance(input);
    expect(result.vapourEquivalentScfPerStb).toBeCloseTo(879.7, 0);
    // Published volumes of the streams miss the published moles by up to 0.4 %.
    expect(result.wellstreamInPlaceScf / HUNDRED_BSCF).toBeCloseTo(1, 2);
    expect(Math.abs(result.wellstreamInPlaceScf / HUNDRED_BSCF - 1)).toBeLessThan(0.005);
    expect(result.dryGasInPlaceScf / (0.88476 * HUNDRED_BSCF)).toBeCloseTo(1, 2);
    expect(result.condensateInPlaceStb / 13.1e6).toBeCloseTo(1, 2);
    expect(result.line.rSquared).toBeGreaterThan(0.9999);
    expect(result.producedFraction).toBeCloseTo(0.74, 2);
    expect(codesOf(result)).toEqual([]);
  });

  it("shows by how much the gas's own z would have missed", () => {
    const { withGasZ, wellstreamInPlaceScf } = materialBalance(input);
    expect(withGasZ?.bias).toBeLessThan(-0.03);
    const alone = materialBalance({ ...input, curve: null });
    expect(alone.wellstreamInPlaceScf).toBeLessThan(wellstreamInPlaceScf);
    expect(alone.withGasZ).toBeNull();
    expect(codesOf(alone)).toContain("gas_z_below_dew_point");
  });

  it("keeps one line through the dew point when the reservoir began above it", () => {
    // Above the dew point the gas leaves by p/z alone; below, by the published products of what is left.
    const z = reservoirZ({
      ...input,
      wellstream: recombine(separatorTest),
      impurities: separatorTest,
    });
    const [initial, between, dewPoint] = [5000, 4200, psia(3428)].map((p) => p / z.at(p).z);
    const above = (pressurePsia: number, pressureOverZ: number): ProductionRecord => {
      const share = 1 - pressureOverZ / initial;
      return {
        pressurePsia,
        surfaceGasScf: share * 0.88476 * HUNDRED_BSCF,
        condensateStb: share * 131e-6 * HUNDRED_BSCF,
      };
    };
    const first = [above(5000, initial), above(4200, between)];
    const { surfaceGasScf, condensateStb } = above(psia(3428), dewPoint);
    const left = dewPoint / initial;
    const rest = records.map((record) => ({
      ...record,
      surfaceGasScf: surfaceGasScf + left * record.surfaceGasScf,
      condensateStb: condensateStb + left * record.condensateStb,
    }));
    const result = materialBalance({ ...input, records: [...first, ...rest] });
    expect(Math.abs(result.wellstreamInPlaceScf / HUNDRED_BSCF - 1)).toBeLessThan(0.005);
    expect(result.line.rSquared).toBeGreaterThan(0.9999);
    expect(result.points.map(({ isBelowDewPoint }) => isBelowDewPoint)).toEqual([
      false,
      false,
      false,
      true,
      true,
      true,
      true,
      true,
    ]);
  });

  it("gives a dry reservoir's gas with z of the gas correlations", () => {
    const records = history([6000, 5400, 4900, 4300, 3800]);
    const result = materialBalance({
      ...input,
      records,
      temperatureDegF: 260,
      curve: null,
    });
    expect(result.wellstreamInPlaceScf / 5e10).toBeCloseTo(1, 9);
    expect(result.withGasZ).toBeNull();
    expect(codesOf(result)).not.toContain("gas_z_below_dew_point");
  });

  it("warns of few pressures, little depletion and an abnormal pressure", () => {
    const short = records.slice(0, 3).map((record) => ({
      ...record,
      surfaceGasScf: record.surfaceGasScf / 10,
      condensateStb: record.condensateStb / 10,
    }));
    expect(codesOf(materialBalance({ ...input, records: short, depthFt: 6000 }))).toEqual([
      "few_pressures",
      "abnormal_pressure",
    ]);
    const early = records.slice(0, 2);
    const middle = {
      ...early[1],
      pressurePsia: 3200,
      surfaceGasScf: early[1].surfaceGasScf / 2,
      condensateStb: early[1].condensateStb / 2,
    };
    const little = materialBalance({ ...input, records: [early[0], middle, early[1]] });
    expect(codesOf(little)).toContain("little_depletion");
  });

  it("says which way the line bends", () => {
    const pressuresHeld = records.map((record, i) => ({
      ...record,
      pressurePsia: Math.min(psia(3428), record.pressurePsia + i * i * 40),
    }));
    expect(codesOf(materialBalance({ ...input, records: pressuresHeld }))).toContain(
      "line_flattens",
    );
    // Rock and water that expand: p/z (1 - c (pi - p)) is what falls in a straight line (Hammerlindl 1971).
    const rockExpands = history([9000, 8200, 7400, 6600, 5800, 5000], (p) => 1 - 3e-5 * (9000 - p));
    expect(
      codesOf(
        materialBalance({ ...input, records: rockExpands, temperatureDegF: 260, curve: null }),
      ),
    ).toContain("line_steepens");
  });

  it("marks a z that no laboratory stands behind, and a curve of another fluid", () => {
    const untuned = { ...publishedCurve, route: "untunedEquationOfState" as const };
    expect(codesOf(materialBalance({ ...input, curve: untuned }))).toEqual(["untuned_two_phase_z"]);
    const correlation = { ...publishedCurve, route: "correlation" as const };
    expect(codesOf(materialBalance({ ...input, curve: correlation }))).toEqual([
      "gas_z_below_dew_point",
    ]);
    expect(codesOf(materialBalance({ ...input, temperatureDegF: 240 }))).toContain(
      "curve_temperature_differs",
    );
  });

  it.each([
    ["records", { records: records.slice(0, 2) }],
    ["records.2.surfaceGasScf", { records: [records[0], records[2], records[1]] }],
    ["records.1.surfaceGasScf", { records: [records[0], records[0], records[1]] }],
    [
      "records.1.condensateStb",
      { records: [records[0], { ...records[1], condensateStb: -1 }, records[2]] },
    ],
    [
      "records.0.pressurePsia",
      { records: [{ ...records[0], pressurePsia: 30_000 }, ...records.slice(1)] },
    ],
    ["records.6.pressurePsia", { records: [...records, { ...records[5], pressurePsia: 500 }] }],
    ["temperatureDegF", { temperatureDegF: 900 }],
    ["separatorTest.condensateApi", { separatorTest: { ...separatorTest, condensateApi: 500 } }],
    [
      "curve.points.1.pressurePsia",
      {
        curve: { ...publishedCurve, points: [publishedCurve.points[0], publishedCurve.points[0]] },
      },
    ],
  ])("refuses at %s what cannot be", (place, changes) => {
    let refused: unknown = null;
    try {
      materialBalance({ ...input, ...changes });
    } catch (error) {
      refused = error;
    }
    expect(refused).toBeInstanceOf(DomainError);
    expect((refused as DomainError).details.input).toBe(place);
  });
});

describe("reservoirZ(fluid)", () => {
  const fluid = {
    wellstream: recombine(separatorTest),
    impurities: separatorTest,
    temperatureDegF: 200,
  };

  it("is the published two-phase z at the published pressures", () => {
    const { at } = reservoirZ({ ...fluid, curve: publishedCurve });
    for (const { pressurePsia, twoPhaseZ, gasZ } of publishedCurve.points) {
      expect(at(pressurePsia).z).toBeCloseTo(twoPhaseZ, 4);
      expect(at(pressurePsia).gasZ).toBeCloseTo(gasZ, 4);
    }
  });

  it("has no step at the dew point", () => {
    const { at, curveOverCorrelation } = reservoirZ({ ...fluid, curve: publishedCurve });
    expect(at(psia(3428) + 1e-6).z).toBeCloseTo(at(psia(3428)).z, 8);
    expect(Math.abs(curveOverCorrelation - 1)).toBeLessThan(0.05);
  });
});
