import { describe, expect, it } from "vitest";
import { createOrderWorkspace } from "@/analytics/numerics/order-statistics";
import { createRandom, fillPermutation } from "@/analytics/numerics/random";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import { fillByRank, fillStrata } from "@/analytics/uncertainty/latin-hypercube";
import { summariseSample } from "@/analytics/uncertainty/summary";

describe("fillStrata", () => {
  it("draws once from each stratum, inside it", () => {
    const n = 1000;
    const p = new Float64Array(n);
    fillStrata(createRandom(1, 0), n, p, new Uint32Array(n));
    p.forEach((value, i) => {
      expect(value).toBeGreaterThan(i / n);
      expect(value).toBeLessThan((i + 1) / n);
    });
  });
});

describe("a Latin hypercube of lognormals", () => {
  it(
    "has the product's closed form: means and variances of logarithms add up",
    { timeout: 60_000 },
    () => {
      // 43,560 A h phi Sg E with P90/P10 of 1000/4000, 30/120, .12/.20, .65/.80, 200/280: mu 25.65188, sigma 0.80535.
      const ranges = [
        [1000, 4000],
        [30, 120],
        [0.12, 0.2],
        [0.65, 0.8],
        [200, 280],
      ];
      const n = 100_000;
      const words = new Uint32Array(n);
      const ranks = new Uint32Array(n);
      const p = new Float64Array(n);
      const sorted = new Float64Array(n);
      const column = new Float64Array(n);
      const product = new Float64Array(n).fill(43_560);
      ranges.forEach(([p90, p10], i) => {
        fillStrata(createRandom(3, 2 * i), n, p, words);
        compileDistribution({ kind: "lognormalP90P10", p90, p10 }).fillQuantiles(p, n, sorted);
        fillPermutation(createRandom(3, 2 * i + 1), ranks, n, words);
        fillByRank(sorted, ranks, n, column);
        for (let t = 0; t < n; t += 1) product[t] *= column[t];
      });
      const summary = summariseSample(product, n, createOrderWorkspace(n));
      const closedForm = { p90: 49.23076e9, p50: 138.188e9, p10: 387.8862e9, mean: 191.1214e9 };
      for (const level of ["p90", "p50", "p10", "mean"] as const) {
        const error = Math.abs(summary[level] - closedForm[level]);
        expect(error).toBeLessThan(3 * summary.standardErrors[level]);
        expect(error / closedForm[level]).toBeLessThan(0.01);
      }
    },
  );
});
