import { describe, expect, it } from "vitest";
import type { RecoveryCurve } from "@/analytics/recovery/recovery-curve-schema";
import { producedBeforeDewPoint } from "@/components/fluid/above-dew-point";
import { availableCurves } from "@/components/fluid/available-curves";
import {
  fineStates,
  gainPer100Psi,
  mostLiquid,
  revaporised,
  stateAt,
} from "@/components/fluid/curve-reading";

const point = (
  pressurePsia: number,
  condensateProduced: number,
  condensateInGas: number,
  liquidSaturation: number,
  producingYieldStbPerMmscf: number,
) => ({
  pressurePsia,
  wellstreamProduced: (4000 - pressurePsia) / 4500,
  gasProduced: (4000 - pressurePsia) / 4400,
  condensateProduced,
  condensateInGas,
  liquidSaturation,
  gasZ: 0.9,
  twoPhaseZ: 0.85,
  producingYieldStbPerMmscf,
});

const curve: RecoveryCurve = {
  route: "laboratory",
  temperatureDegF: 250,
  dewPointPsia: 4000,
  points: [
    point(4000, 0, 1, 0, 150),
    point(3000, 0.13, 0.5, 0.15, 90),
    point(2000, 0.22, 0.25, 0.2, 60),
    point(1000, 0.29, 0.1, 0.18, 50),
  ],
};
const states = fineStates(curve);

describe("stateAt(states, pressure)", () => {
  it("goes through the curve's own points", () => {
    for (const { pressurePsia, condensateProduced, producingYieldStbPerMmscf } of curve.points) {
      const state = stateAt(states, pressurePsia);
      expect(state?.condensateProduced).toBeCloseTo(condensateProduced, 4);
      expect(state?.producingYieldStbPerMmscf).toBeCloseTo(producingYieldStbPerMmscf, 1);
    }
  });

  it("is the untouched fluid above the dew point, and nothing below the last pressure", () => {
    expect(stateAt(states, 5000)).toMatchObject({ condensateProduced: 0, liquidSaturation: 0 });
    expect(stateAt(states, 999)).toBeNull();
  });

  it("never overshoots: production rises all the way down", () => {
    const produced = states.map(({ condensateProduced }) => condensateProduced);
    expect(produced.every((share, i) => i === 0 || share <= produced[i - 1])).toBe(true);
  });
});

describe("gainPer100Psi(states, pressure)", () => {
  it("is what the next 100 psi bring, and the last 100 psi at the end of the curve", () => {
    const at = (pressure: number) => stateAt(states, pressure)?.condensateProduced ?? NaN;
    expect(gainPer100Psi(states, 2500)).toBeCloseTo(at(2400) - at(2500), 10);
    expect(gainPer100Psi(states, 1000)).toBeCloseTo(at(1000) - at(1100), 10);
  });
});

describe("mostLiquid(curve) and revaporised(curve)", () => {
  it("find the largest share of liquid and what turns to vapour again", () => {
    expect(mostLiquid(curve).pressurePsia).toBe(2000);
    expect(revaporised(curve)).toBeCloseTo(0.02, 10);
    expect(revaporised({ ...curve, points: curve.points.slice(0, 3) })).toBeNull();
  });
});

describe("availableCurves(curves)", () => {
  it("puts the most trusted first and leaves out what is not there", () => {
    const untuned = { ...curve, route: "untunedEquationOfState" as const };
    expect(availableCurves([untuned, null, curve]).map(({ route }) => route)).toEqual([
      "laboratory",
      "untunedEquationOfState",
    ]);
  });
});

describe("producedBeforeDewPoint(pseudocritical, reservoir, dewPoint)", () => {
  const pseudocritical = { temperatureDegR: 420, pressurePsia: 660 };

  it("is nothing for a reservoir at or below its dew point", () => {
    const reservoir = { pressurePsia: 4000, temperatureDegF: 250 };
    expect(producedBeforeDewPoint(pseudocritical, reservoir, 4000)).toBe(0);
    expect(producedBeforeDewPoint(pseudocritical, reservoir, 4500)).toBe(0);
  });

  it("is less than the pressure alone would give, because z falls with the pressure there", () => {
    const reservoir = { pressurePsia: 6000, temperatureDegF: 250 };
    const share = producedBeforeDewPoint(pseudocritical, reservoir, 4500);
    expect(share).toBeGreaterThan(0);
    expect(share).toBeLessThan(1 - 4500 / 6000);
  });

  it("is unknown without the reservoir", () => {
    expect(producedBeforeDewPoint(pseudocritical, null, 4000)).toBeNull();
  });
});
