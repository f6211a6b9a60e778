import { describe, expect, it } from "vitest";
import { createOrderWorkspace, quantileSorted } from "@/analytics/numerics/order-statistics";
import { createRandom } from "@/analytics/numerics/random";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import { rankDrivers, swingColumns } from "@/analytics/uncertainty/drivers";
import { rangeOfSample, rangeOfSorted, summariseSample } from "@/analytics/uncertainty/summary";

const N = 10_000;
const lognormal = compileDistribution({ kind: "lognormal", mu: 0, sigma: 0.7 });

/** Independent draws (not stratified). */
function sample(stream: number): Float64Array {
  const words = new Uint32Array(N);
  createRandom(21, stream).fill(words);
  return Float64Array.from(words, (word) => lognormal.quantile((word + 0.5) / 2 ** 32));
}

describe("summariseSample", () => {
  const workspace = createOrderWorkspace(N);
  const values = sample(0);
  const sorted = values.slice().sort();
  const summary = summariseSample(values, N, workspace);

  it("gives R-7 percentiles, P90 being the low one", () => {
    expect(summary.p90).toBe(quantileSorted(sorted, 0.1));
    expect(summary.p50).toBe(quantileSorted(sorted, 0.5));
    expect(summary.p10).toBe(quantileSorted(sorted, 0.9));
    expect([summary.minimum, summary.maximum]).toEqual([sorted[0], sorted[N - 1]]);
  });

  it("runs its exceedance curve from certainty at the minimum to nothing at the maximum", () => {
    const { values: x, probabilities } = summary.exceedance;
    expect([x.length, probabilities[0], probabilities[100]]).toEqual([101, 1, 0]);
    expect([x[0], x[10], x[90], x[100]]).toEqual([
      summary.minimum,
      summary.p90,
      summary.p10,
      summary.maximum,
    ]);
    expect(probabilities[10]).toBeCloseTo(0.9, 12);
  });

  it("has the standard errors that theory has for independent draws", () => {
    // sqrt(p (1 - p)) / (f q sqrt n) for a lognormal of sigma 0.7 and n = 10,000.
    const theory = { p90: 0.011966, p50: 0.008773, p10: 0.011966 };
    for (const level of ["p90", "p50", "p10"] as const) {
      // The density comes from some 400 values of the sample, so it is good to about a tenth.
      const ratio = summary.standardErrors[level] / summary[level] / theory[level];
      expect(Math.abs(ratio - 1)).toBeLessThan(0.15);
    }
  });

  it("covers the truth as often as one standard error should", { timeout: 60_000 }, () => {
    const truth = {
      p90: lognormal.quantile(0.1),
      p50: 1,
      p10: lognormal.quantile(0.9),
      mean: lognormal.mean,
    };
    let squares = 0;
    let inside = 0;
    const seeds = 40;
    for (let seed = 1; seed <= seeds; seed += 1) {
      const result = summariseSample(sample(seed), N, workspace);
      for (const level of ["p90", "p50", "p10", "mean"] as const) {
        const error = (result[level] - truth[level]) / result.standardErrors[level];
        squares += error ** 2;
        if (Math.abs(error) < 2) inside += 1;
      }
    }
    // 160 standardised errors, correlated within a seed: mean square near 1, about 95 % within two.
    expect(squares / (4 * seeds)).toBeGreaterThan(0.6);
    expect(squares / (4 * seeds)).toBeLessThan(1.5);
    expect(inside / (4 * seeds)).toBeGreaterThan(0.9);
  });

  it("counts every value in its histogram", () => {
    expect(summary.histogram.counts.reduce((a, b) => a + b, 0)).toBe(N);
    expect(summary.histogram.counts).toHaveLength(40);
  });

  it("summarises equal values without spread or error", () => {
    const flat = summariseSample(new Float64Array(200).fill(5), 200, createOrderWorkspace(200));
    expect(flat).toMatchObject({ p90: 5, p10: 5, mean: 5, standardDeviation: 0 });
    expect(flat.standardErrors).toEqual({ p90: 0, p50: 0, p10: 0, mean: 0 });
  });

  it("agrees with the shorter summaries", () => {
    const { p90, p50, p10, mean } = summary;
    expect(rangeOfSample(values, N, workspace)).toEqual({ p90, p50, p10, mean });
    const fromSorted = rangeOfSorted(sorted, N);
    expect(fromSorted).toMatchObject({ p90, p50, p10 });
    expect(fromSorted.mean).toBeCloseTo(mean, 12);
  });
});

describe("rankDrivers", () => {
  const swing = { atP90: 1, atP10: 2 };

  it("shares the spread by squared rank correlation, largest first", () => {
    const drivers = rankDrivers([
      { input: "a", rankCorrelation: 0.3, swing },
      { input: "b", rankCorrelation: -0.4, swing },
    ]);
    expect(drivers.map(({ input }) => input)).toEqual(["b", "a"]);
    expect(drivers[0].shareOfSpread).toBeCloseTo(0.16 / 0.25, 12);
  });

  it("gives no share where nothing varies", () => {
    expect(rankDrivers([{ input: "a", rankCorrelation: 0, swing }])[0].shareOfSpread).toBe(0);
  });
});

describe("swingColumns", () => {
  it("moves one input at a time from a row of P50s", () => {
    const columns = swingColumns([
      { p90: 1, p50: 2, p10: 3 },
      { p90: 10, p50: 20, p10: 30 },
    ]);
    expect(columns.map((column) => [...column])).toEqual([
      [2, 1, 3, 2, 2],
      [20, 20, 20, 10, 30],
    ]);
  });
});
