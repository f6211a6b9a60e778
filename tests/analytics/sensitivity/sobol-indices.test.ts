import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { fillUniforms } from "@/analytics/sensitivity/base-samples";
import { sobolIndices, type ColumnModel } from "@/analytics/sensitivity/sobol-indices";

/** Indices of a function of independent uniform numbers between 0 and 1. */
function study(
  dimensions: number,
  f: (x: readonly number[]) => number,
  options: { factors?: number[][]; seed?: number; runs?: number } = {},
) {
  const { factors = Array.from({ length: dimensions }, (_, i) => [i]), seed = 1 } = options;
  const model: ColumnModel = (columns, count) =>
    Float64Array.from({ length: count }, (_, t) => f(columns.map((column) => column[t])));
  return sobolIndices({
    columns: dimensions,
    factors,
    model,
    fillSamples: (replicate, a, b) => fillUniforms(seed, replicate, [...a, ...b]),
    runsPerReplicate: options.runs ?? 1024,
    replicates: 16,
  });
}

const ishigami = (x: readonly number[]) => {
  const [a, b, c] = x.map((u) => Math.PI * (2 * u - 1));
  return Math.sin(a) + 7 * Math.sin(b) ** 2 + 0.1 * c ** 4 * Math.sin(a);
};

/** Within four of its own standard errors of the closed form, and those no larger than `error`. */
function expectNear(
  estimated: { value: number; standardError: number },
  expected: number,
  error: number,
) {
  expect(estimated.standardError).toBeLessThan(error);
  expect(Math.abs(estimated.value - expected)).toBeLessThanOrEqual(
    4 * estimated.standardError + 1e-12,
  );
}

describe("sobolIndices", () => {
  it("finds the shares of the function of Ishigami and Homma", () => {
    // T. Ishigami, T. Homma, Proc. ISUMA (1990) 398-403, a = 7 and b = 0.1; closed forms.
    const { indices, baseRuns, evaluations } = study(3, ishigami);
    expect({ baseRuns, evaluations }).toEqual({ baseRuns: 16_384, evaluations: 81_920 });
    [0.3139, 0.4424, 0].forEach((first, i) => expectNear(indices[i].first, first, 0.02));
    [0.5576, 0.4424, 0.2437].forEach((total, i) => expectNear(indices[i].total, total, 0.02));
  });

  it("finds the shares of the g-function of Sobol'", () => {
    // I. M. Sobol', closed forms with V_i = 1 / (3 (1 + a_i)^2); a as in Saltelli et al. (2010).
    const a = [0, 1, 4.5, 9, 99, 99, 99, 99];
    const v = a.map((one) => 1 / (3 * (1 + one) ** 2));
    const product = v.reduce((all, one) => all * (1 + one), 1);
    const { indices } = study(8, (x) =>
      x.reduce((all, u, i) => (all * (Math.abs(4 * u - 2) + a[i])) / (1 + a[i]), 1),
    );
    v.forEach((one, i) => {
      expectNear(indices[i].first, one / (product - 1), 0.02);
      expectNear(indices[i].total, (one * product) / (1 + one) / (product - 1), 0.02);
    });
    // Published to three digits in the same paper's first case.
    expect(indices[0].first.value).toBeCloseTo(0.716, 1);
  });

  it("gives a linear model's shares of variance, first and total alike", () => {
    const weights = [1, 2, 3];
    const { indices } = study(3, (x) => 50 + x.reduce((sum, u, i) => sum + weights[i] * u, 0));
    weights.forEach((weight, i) => {
      expectNear(indices[i].first, weight ** 2 / 14, 0.02);
      expectNear(indices[i].total, weight ** 2 / 14, 0.02);
    });
  });

  it("takes columns of one factor together", () => {
    // Of Ishigami's function: x1 with x3 have S13 = S1 + S13 = 0.5576, and x2 the rest.
    const { indices } = study(3, ishigami, { factors: [[0, 2], [1]] });
    expectNear(indices[0].first, 0.5576, 0.02);
    expectNear(indices[0].total, 0.5576, 0.02);
    expectNear(indices[1].first, 0.4424, 0.02);
  });

  it("states standard errors that cover", () => {
    const seeds = Array.from({ length: 100 }, (_, i) => i);
    const misses = seeds.flatMap((seed) => {
      const { indices } = study(3, ishigami, { seed, runs: 64 });
      return [0.3139, 0.4424, 0].map(
        (truth, i) => (indices[i].first.value - truth) / indices[i].first.standardError,
      );
    });
    const within = (width: number) =>
      misses.filter((miss) => Math.abs(miss) < width).length / misses.length;
    expect(within(1)).toBeGreaterThan(0.58);
    expect(within(1)).toBeLessThan(0.78);
    expect(within(2)).toBeGreaterThan(0.9);
  });

  it("gives nothing but zeros for a model that does not vary", () => {
    const zero = { value: 0, standardError: 0 };
    expect(study(2, () => 7).indices).toEqual([
      { first: zero, total: zero },
      { first: zero, total: zero },
    ]);
  });

  it("leaves out rare trials without a value, in every sample", () => {
    const { indices, baseRuns } = study(2, ([u, v]) => (u > 0.9999 ? NaN : u + v));
    expect(baseRuns).toBeLessThan(16_384);
    expect(baseRuns).toBeGreaterThan(16_370);
    expectNear(indices[0].first, 0.5, 0.01);
  });

  it("refuses a model without a value in many places", () => {
    expect(() => study(1, ([u]) => Math.log(u - 0.5))).toThrow(DomainError);
  });
});
