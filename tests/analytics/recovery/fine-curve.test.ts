import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { fineCurve } from "@/analytics/recovery/fine-curve";
import type { RecoveryCurve, RecoveryPoint } from "@/analytics/recovery/recovery-curve-schema";
import { psia, publishedCurve } from "./published-curve";

function changed(index: number, changes: Partial<RecoveryPoint>): RecoveryCurve {
  return {
    ...publishedCurve,
    points: publishedCurve.points.map((point, i) =>
      i === index ? { ...point, ...changes } : point,
    ),
  };
}

describe("fineCurve", () => {
  const curve = fineCurve(publishedCurve);

  it("ends exactly at the lowest pressure and at the dew point", () => {
    expect(curve.lowestPsia).toBe(psia(700));
    expect(curve.dewPointPsia).toBe(psia(3428));
    expect(curve.condensateProduced[0]).toBe(29.25 / 131);
    expect(curve.condensateProduced[curve.intervals]).toBe(0);
    expect(curve.gasPhaseShare[curve.intervals]).toBe(1);
  });

  it("produces more with every step down and never leaves the neighbours' range", () => {
    for (let i = 1; i <= curve.intervals; i += 1) {
      expect(curve.gasProduced[i]).toBeLessThanOrEqual(curve.gasProduced[i - 1]);
      expect(curve.condensateProduced[i]).toBeLessThanOrEqual(curve.condensateProduced[i - 1]);
      expect(curve.wellstreamProduced[i]).toBeLessThan(curve.wellstreamProduced[i - 1]);
    }
    expect(Math.max(...curve.liquidSaturation)).toBeCloseTo(0.199, 4);
    expect(Math.min(...curve.gasPhaseShare)).toBeGreaterThan(0.5);
  });

  it.each<[string, RecoveryCurve, string, string]>([
    [
      "a pressure that rises",
      changed(3, { pressurePsia: 2600 }),
      "curve.points.3.pressurePsia",
      "Pressures of a depletion curve fall from point to point; 2600 psia follows 2414.7.",
    ],
    [
      "a first point elsewhere than at the dew point",
      { ...publishedCurve, dewPointPsia: 3600 },
      "curve.points.0.pressurePsia",
      "begins at 3442.7 psia, not at its dew point of 3600 psia",
    ],
    [
      "production at the dew point",
      changed(0, { gasProduced: 0.01 }),
      "curve.points.0.gasProduced",
      "Nothing is produced yet",
    ],
    [
      "production that falls",
      changed(4, { condensateProduced: 0.1 }),
      "curve.points.4.condensateProduced",
      "never falls with the pressure; at 1214.7 psia it does",
    ],
    [
      "moles that stand still",
      changed(4, { wellstreamProduced: 0.42026 }),
      "curve.points.4.wellstreamProduced",
      "rises as the pressure falls",
    ],
    [
      "more condensate than there is",
      changed(1, { condensateInGas: 0.99 }),
      "curve.points.1.condensateInGas",
      "accounts for more condensate than there is at 3014.7 psia: 1.046",
    ],
    [
      "more gas than there is",
      // 0.646 produced; in the gas phase 0.0545 of the condensate at a tenth of the first yield would be 0.545 of the gas.
      changed(4, { producingYieldStbPerMmscf: 14.8 }),
      "curve.points.4.producingYieldStbPerMmscf",
      "accounts for more gas than there is at 1214.7 psia: 1.19",
    ],
  ])("refuses %s", (_, wrong, input, message) => {
    try {
      fineCurve(wrong);
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(DomainError);
      expect((error as DomainError).message).toContain(message);
      expect((error as DomainError).details.input).toBe(input);
    }
  });
});
