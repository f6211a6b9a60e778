import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { fitData } from "@/analytics/uncertainty/data-fit";
import { describeFit } from "@/analytics/uncertainty/describe-fit";
import { compileDistribution, densityCurve } from "@/analytics/uncertainty/distribution";
import {
  distributionSchema,
  percentileFamilies,
  type Distribution,
} from "@/analytics/uncertainty/distribution-schema";
import { fitPercentiles } from "@/analytics/uncertainty/percentile-fit";
import { limitsOf } from "@/analytics/uncertainty/range-ends";
import reference from "../../fixtures/distributions.json";

function refusal(definition: Distribution): DomainError {
  try {
    compileDistribution(definition);
  } catch (error) {
    if (error instanceof DomainError) return error;
  }
  throw new Error("The distribution was accepted.");
}

const points = (...values: [exceedance: number, value: number][]) =>
  values.map(([exceedance, value]) => ({ exceedance, value }));

describe("limitsOf", () => {
  const solved = reference.distributions.flatMap((entry) =>
    "limits" in entry && entry.limits ? [{ ...entry.definition, limits: entry.limits }] : [],
  );

  it.each(solved)("finds SciPy's limits for $kind $low, $mode, $high with ends $ends", (entry) => {
    const { kind, low, mode, high, ends, limits } = entry as unknown as Parameters<
      typeof limitsOf
    >[0] & { limits: number[] };
    const found = limitsOf({ kind, low, mode, high, ends });
    expect(found.mode).toBe(mode);
    expect(Math.abs(found.low - limits[0])).toBeLessThan(1e-8 * (high - low));
    expect(Math.abs(found.high - limits[1])).toBeLessThan(1e-8 * (high - low));
  });

  it("gives back the limits whose percentiles it is told", () => {
    // PERT(10, 20, 50) and triangular (10, 20, 50): P90 and P10 from SciPy 1.17.1
    expect(
      limitsOf({ kind: "pert", low: 14.48939834, mode: 20, high: 33.35561498, ends: "p90p10" }),
    ).toEqual({ low: expect.closeTo(10, 6), mode: 20, high: expect.closeTo(50, 5) });
    expect(
      limitsOf({
        kind: "triangular",
        low: 16.32455532,
        mode: 20,
        high: 39.04554885,
        ends: "p90p10",
      }),
    ).toEqual({ low: expect.closeTo(10, 6), mode: 20, high: expect.closeTo(50, 6) });
  });

  it(
    "has its percentiles where they were put, for any mode between them",
    { timeout: 60_000 },
    () => {
      fc.assert(
        fc.property(
          fc.constantFrom("triangular" as const, "pert" as const),
          fc.constantFrom(["p90p10" as const, 0.1] as const, ["p95p05" as const, 0.05] as const),
          fc.double({ min: 0, max: 1, noNaN: true }),
          fc.double({ min: -50, max: 50, noNaN: true }),
          (kind, [ends, tail], share, low) => {
            const high = low + 7;
            const mode = Math.min(high, low + 7 * share);
            const { quantile } = compileDistribution({ kind, low, mode, high, ends });
            expect(quantile(tail)).toBeCloseTo(low, 9);
            expect(quantile(1 - tail)).toBeCloseTo(high, 9);
          },
        ),
      );
    },
  );

  it("refuses a mode that no distribution with these ends has, and says where it may lie", () => {
    const error = refusal({ kind: "pert", low: 10, mode: 5, high: 50, ends: "p90p10" });
    expect(error.details.input).toBe("mode");
    expect(error.message).toContain("No PERT distribution with its most likely value at 5");
    expect(error.message).toContain("its P90 at 10 and its P10 at 50");
    expect(error.message).toMatch(/must lie between [0-9.]+ and [0-9.]+\.$/);
  });

  it("says nothing about limits that were given as such", () => {
    expect(describeFit({ kind: "pert", low: 1, mode: 2, high: 3, ends: "limits" })).toBeNull();
  });
});

describe("fitPercentiles", () => {
  it.each(percentileFamilies)(
    "goes through any three points in order as far as a %s can",
    (family) => {
      const ascending = points([0.1, 22], [0.9, 10], [0.5, 15]);
      const { given } = fitPercentiles(family, ascending);
      const exact = family !== "normal" && family !== "lognormal";
      ascending.forEach(({ value }, i) => {
        expect(Math.abs(given[i] - value)).toBeLessThan(exact ? 1e-8 : 1);
        if (!exact) expect(given[i]).not.toBe(value);
      });
    },
  );

  it("meets two points exactly with a normal and a lognormal", () => {
    fc.assert(
      fc.property(
        fc.constantFrom("normal" as const, "lognormal" as const),
        fc.double({ min: 0.5, max: 0.99, noNaN: true }),
        fc.double({ min: 0.01, max: 0.4, noNaN: true }),
        fc.double({ min: 1, max: 100, noNaN: true }),
        (family, often, seldom, value) => {
          const { given } = fitPercentiles(family, points([often, value], [seldom, 1.5 * value]));
          expect(given[0]).toBeCloseTo(value, 8);
          expect(given[1]).toBeCloseTo(1.5 * value, 8);
        },
      ),
    );
  });

  it("meets any three points with a shifted lognormal, of either skew", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -100, max: 100, noNaN: true }),
        fc.double({ min: 0.1, max: 50, noNaN: true }),
        fc.double({ min: 1 / 12.9, max: 12.9, noNaN: true }),
        (low, first, ratio) => {
          const values = [low, low + first, low + first + first * ratio];
          const { given } = fitPercentiles(
            "shiftedLognormal",
            points([0.9, values[0]], [0.5, values[1]], [0.1, values[2]]),
          );
          values.forEach((value, i) =>
            expect(Math.abs(given[i] - value)).toBeLessThan(1e-9 * (values[2] - values[0]) + 1e-9),
          );
        },
      ),
    );
  });

  it("turns a shifted lognormal through evenly spaced points into the normal", () => {
    const compiled = compileDistribution({
      kind: "percentiles",
      family: "shiftedLognormal",
      points: points([0.9, 10], [0.5, 14], [0.1, 18]),
    });
    // sd = 8 / (2 x 1.2815515655)
    expect(compiled.standardDeviation).toBeCloseTo(3.1212165843, 8);
    expect(compiled.support).toEqual({ minimum: -Infinity, maximum: Infinity });
  });

  it("ends a shifted lognormal where its closed form does", () => {
    // Points in geometric progression from the end: (x - 6) = 4, 8, 16
    const compiled = compileDistribution({
      kind: "percentiles",
      family: "shiftedLognormal",
      points: points([0.9, 10], [0.5, 14], [0.1, 22]),
    });
    expect(compiled.support.minimum).toBeCloseTo(6, 9);
    // exp(mu + sigma^2 / 2) + 6 with mu = ln 8 and sigma = ln 2 / 1.2815515655
    expect(compiled.mean).toBeCloseTo(6 + 8 * Math.exp((Math.LN2 / 1.2815515655446) ** 2 / 2), 8);
  });

  it("comes as near as it can where no triangle goes through the points, and reports the residuals", () => {
    const asked = points([0.9, 10], [0.5, 14], [0.1, 40]);
    const fit = describeFit({ kind: "percentiles", family: "triangular", points: asked });
    if (fit?.kind !== "percentiles") throw new Error("Not a fit of percentiles.");
    expect(fit.limits?.mode).toBe(fit.limits?.low);
    const misses = fit.points.map(({ asked: value, given }) => Math.abs(given - value));
    expect(fit.largestResidual).toBeCloseTo(Math.max(...misses) / 30, 12);
    expect(fit.largestResidual).toBeGreaterThan(0.05);
  });

  it.each<[string, Distribution, string, string]>([
    [
      "values in the wrong order",
      { kind: "percentiles", family: "normal", points: points([0.9, 20], [0.1, 10]) },
      "points.1.value",
      "P10 is 10 and P90 is 20. A value that is exceeded less often is greater",
    ],
    [
      "one value twice",
      { kind: "percentiles", family: "normal", points: points([0.5, 10], [0.9, 10]) },
      "points.0.value",
      "P50 is 10 and P90 is 10",
    ],
    [
      "one percentile twice",
      { kind: "percentiles", family: "normal", points: points([0.9, 10], [0.9, 11]) },
      "points.1.exceedance",
      "P90 is given twice",
    ],
    [
      "two points for three parameters",
      { kind: "percentiles", family: "pert", points: points([0.9, 10], [0.1, 20]) },
      "points",
      "A PERT distribution has three parameters and needs three percentiles; 2 are given.",
    ],
    [
      "a lognormal at 0",
      { kind: "percentiles", family: "lognormal", points: points([0.1, 10], [0.95, 0]) },
      "points.1.value",
      "lies above 0 throughout; P95 is 0",
    ],
    [
      "points too skew",
      {
        kind: "percentiles",
        family: "shiftedLognormal",
        points: points([0.9, 1], [0.5, 1.001], [0.1, 2]),
      },
      "points",
      "too skew for a distribution: one of the two gaps is 999 times the other",
    ],
    [
      "points that only a lognormal with a mean of 1,215 meets",
      {
        kind: "percentiles",
        family: "shiftedLognormal",
        points: points([0.9, 3], [0.5, 3.03], [0.1, 14]),
      },
      "points",
      "one of the two gaps is 366 times the other",
    ],
    [
      "a lognormal over four orders of magnitude",
      { kind: "percentiles", family: "lognormal", points: points([0.9, 1], [0.1, 10_000]) },
      "points",
      "a standard deviation of 3.593",
    ],
    [
      "a chance that nobody knows",
      { kind: "percentiles", family: "normal", points: points([0.9, 1], [1e-17, 2]) },
      "points.1.exceedance",
      "must lie between 0.0001 and 0.9999; 1e-17 does not",
    ],
    [
      "values that are a billionth apart",
      { kind: "data", shape: "lognormal", values: [1e8, 1e8, 1e8, 1e8, 1e8 + 2 ** -26] },
      "values",
      "differ by less than a billionth",
    ],
    [
      "values that differ in their last bit",
      { kind: "data", shape: "empirical", values: [2, 2, 2, 2, 2.0000000000000004] },
      "values",
      "differ by less than a billionth",
    ],
    [
      "values beyond everything",
      { kind: "data", shape: "normal", values: [1e200, 2e200, 3e200, 4e200, 5e200] },
      "values.0",
      "beyond what any quantity",
    ],
    [
      "values over many orders of magnitude as a lognormal",
      { kind: "data", shape: "lognormal", values: [1, 10, 100, 1000, 10_000] },
      "values",
      "a standard deviation of 3.256",
    ],
    [
      "data without spread",
      { kind: "data", shape: "normal", values: [3, 3, 3, 3, 3] },
      "values",
      "All 5 values are 3",
    ],
    [
      "a lognormal of data that reach 0",
      { kind: "data", shape: "lognormal", values: [3, 2, 0, 3, 3] },
      "values.2",
      "value 3 is 0",
    ],
    [
      "bounds that contradict the data",
      { kind: "data", shape: "empirical", values: [1, 2, 3, 4, 5], minimum: 6 },
      "minimum",
      "contradict each other",
    ],
  ])("refuses %s", (_, definition, input, message) => {
    const error = refusal(definition);
    expect(error.details.input).toBe(input);
    expect(error.message).toContain(message);
  });
});

describe("fitData", () => {
  it.each([
    ["too large", [1e200, 2e200, 3e200, 4e200, 5e200]],
    ["as far apart as numbers are", [1e308, -1e308, 1e308, -1e308, 0]],
    ["too small", [0, 0, 0, 0, 5e-324]],
  ])("refuses values that are %s for a deviation", (_, values) => {
    expect(() => fitData("normal", values)).toThrow("too large or too small to be measured");
  });

  it("finds logarithms that vary for all values that vary enough", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-6, max: 1e12, noNaN: true }),
        fc.double({ min: 3e-9, max: 0.9, noNaN: true }),
        (value, change) => {
          const values = [value, value, value, value, value * (1 + change)];
          const { parameters } = fitData("lognormal", values);
          // Of one value in five: sqrt(1/5 x 4/5) = 0.4 of its distance from the others
          expect((parameters?.standardDeviation ?? NaN) / (0.4 * Math.log1p(change))).toBeCloseTo(
            1,
            4,
          );
        },
      ),
    );
  });
});

describe("empirical data", () => {
  // 4 values equal: three of the nine gaps between ten values have no width
  const values = [5, 3, 3, 3, 3, 8, 1, 2, 9, 7];
  const compiled = compileDistribution({ kind: "data", shape: "empirical", values });

  it("has quantiles of type 7", () => {
    // quantile(x, p, type = 7) of R 4.2.2
    expect([0, 0.1, 0.25, 0.5, 0.9, 1].map(compiled.quantile)).toEqual([
      1,
      expect.closeTo(1.9, 12),
      3,
      3,
      expect.closeTo(8.1, 12),
      9,
    ]);
  });

  it("keeps a chance for values that are equal", () => {
    expect(compiled.atoms).toEqual([{ value: 3, probability: 3 / 9 }]);
    expect(compiled.cdf(3)).toBeCloseTo(5 / 9, 12);
    expect(compiled.cdf(3 - 1e-9)).toBeCloseTo(2 / 9, 8);
  });

  it("keeps what is at a bound and leaves out what is below", () => {
    const bounded = compileDistribution({ kind: "data", shape: "empirical", values, minimum: 3 });
    expect(bounded.lostMass).toBeCloseTo(2 / 9, 12);
    expect(bounded.quantile(0)).toBe(3);
    expect(bounded.atoms[0].probability).toBeCloseTo(3 / 7, 12);
  });

  it("is drawn as a density that an eye can follow, of area 1", () => {
    const { x, density } = densityCurve({ kind: "data", shape: "empirical", values }, 400);
    const area = density.reduce((sum, value) => sum + value * (x[1] - x[0]), 0);
    expect(area).toBeGreaterThan(0.75);
    expect(area).toBeLessThan(1.01);
  });
});

describe("distributionSchema", () => {
  const half = (name: string, count: number) => ({
    name,
    weight: 0.5,
    distribution: {
      kind: "data",
      shape: "empirical",
      values: Array.from({ length: count }, (_, i) => i),
    },
  });

  it("takes 2,000 measured values of all cases together, and no more", () => {
    const parse = (count: number) =>
      distributionSchema.safeParse({
        kind: "scenarios",
        scenarios: [half("A", 1_000), half("B", count)],
      });
    expect(parse(1_000).success).toBe(true);
    const { error } = parse(1_001);
    expect(error?.issues[0]).toMatchObject({
      path: ["scenarios"],
      message: expect.stringContaining("2,000 measured values in all their cases together"),
    });
  });

  it.each([0.0001, 0.9999, 0.00009, 0.99991])("judges a chance of %d", (exceedance) => {
    const { success } = distributionSchema.safeParse({
      kind: "percentiles",
      family: "normal",
      points: points([0.5, 1], [exceedance, 2]),
    });
    expect(success).toBe(exceedance === 0.0001 || exceedance === 0.9999);
  });
});
