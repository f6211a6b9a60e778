import { describe, expect, it } from "vitest";
import { createOrderWorkspace } from "@/analytics/numerics/order-statistics";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { summariseSample } from "@/analytics/uncertainty/summary";

const N = 10_000;

/** The mode of one value from the middle of each of n strata: no sampling error, only the estimator's own. */
function modeOf(distribution: Distribution): number {
  const { quantile } = compileDistribution(distribution);
  const values = Float64Array.from({ length: N }, (_, i) => quantile((i + 0.5) / N));
  return summariseSample(values, N, createOrderWorkspace(N)).mode;
}

describe("modeOfCurve", () => {
  // exp(mu - sigma^2), the mode of a lognormal distribution.
  it.each([0.1, 0.4, 0.8, 1.2])("finds the mode of a lognormal of sigma %f", (sigma) => {
    const mode = modeOf({ kind: "lognormal", mu: 3, sigma });
    expect(mode / Math.exp(3 - sigma ** 2)).toBeCloseTo(1, 2);
  });

  it("finds the mode of a normal that reaches below zero, and of a PERT", () => {
    expect(modeOf({ kind: "normal", mean: 1, standardDeviation: 2 })).toBeCloseTo(1, 1);
    // By construction the most likely value; a kernel rounds its skew off by about 1 % of the range.
    const pert = modeOf({ kind: "pert", low: 10, mode: 20, high: 50 });
    expect(Math.abs(pert - 20)).toBeLessThan(0.02 * 40);
  });

  it("takes the higher of two peaks", () => {
    const side = (mean: number) => ({ kind: "normal", mean, standardDeviation: 3 }) as const;
    const scenarios = [
      { name: "shallow", weight: 0.35, distribution: side(40) },
      { name: "deep", weight: 0.65, distribution: side(90) },
    ];
    expect(Math.abs(modeOf({ kind: "scenarios", scenarios }) - 90)).toBeLessThan(3);
  });

  it("is the value of a constant, and the value that most trials share", () => {
    const flat = new Float64Array(200).fill(5);
    expect(summariseSample(flat, 200, createOrderWorkspace(200)).mode).toBe(5);
    const mostly = flat.map((value, i) => (i < 1 ? 7 : value));
    expect(summariseSample(mostly, 200, createOrderWorkspace(200)).mode).toBeCloseTo(5, 1);
  });
});
