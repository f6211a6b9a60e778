import fc from "fast-check";
import * as statistics from "simple-statistics";
import { describe, expect, it } from "vitest";
import {
  countSample,
  createOrderWorkspace,
  quantileSorted,
} from "@/analytics/numerics/order-statistics";
import { createRandom } from "@/analytics/numerics/random";

/** R 4.2.2, quantile(c(2,4,4,5,7,9,11,15,20,31), c(.1,.25,.5,.9), type = 7) */
const SAMPLE = [2, 4, 4, 5, 7, 9, 11, 15, 20, 31];
const R_TYPE_7 = [
  [0.1, 3.8],
  [0.25, 4.25],
  [0.5, 8],
  [0.9, 21.1],
] as const;

const uniforms = (count: number, stream = 0) => {
  const words = new Uint32Array(count);
  createRandom(11, stream).fill(words);
  return Float64Array.from(words, (word) => (word + 0.5) / 2 ** 32);
};

describe("quantileSorted", () => {
  it.each(R_TYPE_7)("agrees with R's type 7 at %d", (p, expected) => {
    expect(quantileSorted(SAMPLE, p)).toBeCloseTo(expected, 12);
  });

  it("gives the extremes at 0 and 1", () => {
    expect(quantileSorted(SAMPLE, 0)).toBe(2);
    expect(quantileSorted(SAMPLE, 1)).toBe(31);
  });
});

describe("countSample", () => {
  const workspace = createOrderWorkspace(10_000);
  const shapes: Record<string, (u: number) => number> = {
    uniform: (u) => u,
    "very skewed": (u) => Math.exp(8 * u * u * u),
    "with one enormous value": (u) => (u > 0.9999 ? 1e12 : u),
    "with ties": (u) => Math.floor(u * 7),
    negative: (u) => Math.log(u),
  };

  it.each(Object.keys(shapes))("finds the quantiles of %s values that sorting finds", (shape) => {
    const values = uniforms(10_000).map(shapes[shape]);
    const probabilities = [0, 0.01, 0.1, 0.11, 0.5, 0.9, 0.999, 1];
    const { quantiles } = countSample(values, values.length, probabilities, workspace);
    const sorted = values.slice().sort();
    probabilities.forEach((p, i) => expect(quantiles[i]).toBe(quantileSorted(sorted, p)));
  });

  it("agrees with R's type 7 on a small sample", () => {
    const { quantiles } = countSample(
      [31, 4, 9, 2, 20, 4, 15, 5, 11, 7],
      10,
      [0.1, 0.25, 0.5, 0.9],
      workspace,
    );
    R_TYPE_7.forEach(([, expected], i) => expect(quantiles[i]).toBeCloseTo(expected, 12));
  });

  it("agrees with sorting whatever the values", () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -1e9, max: 1e9, noNaN: true }), { minLength: 1, maxLength: 300 }),
        (values) => {
          const probabilities = Array.from({ length: 21 }, (_, i) => i / 20);
          const { quantiles, histogram } = countSample(
            values,
            values.length,
            probabilities,
            workspace,
          );
          const sorted = Float64Array.from(values).sort();
          probabilities.forEach((p, i) => {
            // -0 and 0 are the same size.
            expect(quantiles[i] === quantileSorted(sorted, p)).toBe(true);
          });
          expect(histogram.reduce((a, b) => a + b, 0)).toBe(values.length);
        },
      ),
    );
  });

  it("counts a histogram of 40 equal bins from the smallest to the largest", () => {
    const values = Float64Array.from({ length: 4000 }, (_, i) => i + 0.5);
    const { histogram, minimum, maximum } = countSample(values, 4000, [], workspace);
    expect([minimum, maximum]).toEqual([0.5, 3999.5]);
    expect(histogram).toEqual(new Array(40).fill(100));
  });

  it("has the moments that simple-statistics has", () => {
    const values = uniforms(1000).map((u) => Math.exp(3 * u));
    const { mean, standardDeviation } = countSample(values, 1000, [], workspace);
    const list = [...values];
    expect(mean).toBeCloseTo(statistics.mean(list), 10);
    expect(standardDeviation).toBeCloseTo(statistics.sampleStandardDeviation(list), 10);
  });

  it("puts equal values in the first bin, with no spread", () => {
    const { quantiles, standardDeviation, histogram } = countSample(
      new Float64Array(50).fill(3),
      50,
      [0.1, 0.9],
      workspace,
    );
    expect([...quantiles]).toEqual([3, 3]);
    expect(standardDeviation).toBe(0);
    expect(histogram[0]).toBe(50);
  });
});
