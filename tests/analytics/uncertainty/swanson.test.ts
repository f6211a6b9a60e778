import { describe, expect, it } from "vitest";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import { swansonMean } from "@/analytics/uncertainty/swanson";

describe("swansonMean", () => {
  it("weighs three percentiles by 30, 40 and 30 %", () => {
    expect(swansonMean({ p90: 10, p50: 20, p10: 50 })).toBeCloseTo(26, 12);
  });

  // Closed forms of the lognormal distribution; that the rule falls short the more skewed it is agrees with J. E. Bickel,
  // L. W. Lake, J. Lehman, SPE Econ. Manag. 3 (2011) 128-140.
  it.each([
    [2, -0.08],
    [3, -0.31],
    [4, -0.65],
    [5, -1.06],
    [10, -3.58],
    [20, -8.64],
    [50, -20.01],
    [100, -31.72],
  ])("misses the mean of a lognormal of P10/P90 = %i by %f %", (ratio, percent) => {
    const { range, mean } = compileDistribution({ kind: "lognormalP90P10", p90: 1, p10: ratio });
    expect(100 * (swansonMean(range) / mean - 1)).toBeCloseTo(percent, 2);
  });
});
