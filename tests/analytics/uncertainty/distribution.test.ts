import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { compileDistribution, densityCurve } from "@/analytics/uncertainty/distribution";
import {
  distributionSchema,
  type Distribution,
  type SimpleDistribution,
} from "@/analytics/uncertainty/distribution-schema";
import reference from "../../fixtures/distributions.json";

const cases = reference.distributions.map(({ definition, ...expected }) => ({
  name: JSON.stringify(definition),
  definition: distributionSchema.parse(definition),
  expected,
}));

function refusal(definition: Distribution): DomainError {
  try {
    compileDistribution(definition);
  } catch (error) {
    if (error instanceof DomainError) return error;
  }
  throw new Error("The distribution was accepted.");
}

describe("compileDistribution", () => {
  it.each(cases)("agrees with SciPy on $name", ({ definition, expected }) => {
    const compiled = compileDistribution(definition);
    const scale = expected.sd;
    reference.probabilities.forEach((p, i) => {
      expect(Math.abs(compiled.quantile(p) - expected.quantiles[i])).toBeLessThan(1e-9 * scale);
      expect(compiled.cdf(expected.quantiles[i])).toBeCloseTo(p, 11);
    });
    expect(Math.abs(compiled.mean - expected.mean)).toBeLessThan(1e-8 * scale);
    expect(Math.abs(compiled.standardDeviation / expected.sd - 1)).toBeLessThan(1e-7);
    expect(compiled.lostMass).toBeCloseTo(expected.lostMass, 12);
    expect(compiled.range.p90).toBe(compiled.quantile(0.1));
    expect(compiled.range.p10).toBe(compiled.quantile(0.9));
  });

  it.each(cases)(
    "samples $name as its quantile function has it, to 1e-7 of the range",
    ({ definition }) => {
      const compiled = compileDistribution(definition);
      const n = 5000;
      const probabilities = Float64Array.from({ length: n }, (_, i) => (i + 0.41) / n);
      const out = new Float64Array(n);
      compiled.fillQuantiles(probabilities, n, out);
      const width = compiled.quantile(0.999) - compiled.quantile(0.001);
      for (let i = 0; i < n; i += 13) {
        expect(Math.abs(out[i] - compiled.quantile((i + 0.41) / n))).toBeLessThan(1e-7 * width);
      }
    },
  );

  it.each(cases)(
    "has a density that is the slope of the distribution function for $name",
    ({ definition }) => {
      const compiled = compileDistribution(definition);
      // Not 0.2 and 0.8: those are exactly the 4th and the 13th of 16 values, where a density of data has a step.
      for (const p of [0.21, 0.45, 0.83]) {
        const x = compiled.quantile(p);
        const h = 1e-5 * compiled.standardDeviation;
        const slope = (compiled.cdf(x + h) - compiled.cdf(x - h)) / (2 * h);
        expect(compiled.pdf(x) / slope).toBeCloseTo(1, 5);
      }
    },
  );

  it("keeps the digits of a narrow lognormal's standard deviation", () => {
    // exp(mu + sigma^2 / 2) sqrt(expm1(sigma^2)), which is sigma to ten digits for mu = 0 and sigma = 1e-7
    const { standardDeviation } = compileDistribution({ kind: "lognormal", mu: 0, sigma: 1e-7 });
    expect(standardDeviation / 1e-7).toBeCloseTo(1, 10);
  });

  it("gives the mean of a lognormal from its P90 and P10 in closed form", () => {
    // mu = (ln P90 + ln P10) / 2, sigma = ln(P10 / P90) / 2.5631031, mean = exp(mu + sigma^2 / 2).
    const { mean, standardDeviation, range } = compileDistribution({
      kind: "lognormalP90P10",
      p90: 50,
      p10: 500,
    });
    expect(mean).toBeCloseTo(236.710864, 6);
    expect(standardDeviation).toBeCloseTo(263.726214, 6);
    expect(range.p50).toBeCloseTo(158.113883, 6);
  });

  it("gives the mean of a PERT distribution by the three-point rule", () => {
    expect(compileDistribution({ kind: "pert", low: 10, mode: 20, high: 50 }).mean).toBeCloseTo(
      (10 + 4 * 20 + 50) / 6,
      12,
    );
  });

  it("treats a constant as a value without spread", () => {
    const compiled = compileDistribution({ kind: "constant", value: 3 });
    expect(compiled.range).toEqual({ p90: 3, p50: 3, p10: 3 });
    expect([compiled.cdf(2.9), compiled.cdf(3), compiled.standardDeviation]).toEqual([0, 1, 0]);
  });

  it.each<[Distribution, string, string]>([
    [
      { kind: "uniform", low: 5, high: 3 },
      "high",
      "The high value, 3, must be greater than the low value, 5.",
    ],
    [
      { kind: "uniform", low: 5, high: 5 },
      "high",
      "For a value without uncertainty use a constant.",
    ],
    [
      { kind: "triangular", low: 1, mode: 9, high: 5 },
      "mode",
      "The most likely value, 9, must lie between the low value, 1, and the high value, 5.",
    ],
    [{ kind: "pert", low: 1, mode: 0, high: 5 }, "mode", "must lie between"],
    [
      { kind: "normal", mean: 1, standardDeviation: 0 },
      "standardDeviation",
      "The standard deviation must be greater than 0",
    ],
    [{ kind: "lognormal", mu: 1, sigma: -1 }, "sigma", "Sigma"],
    [
      { kind: "lognormalP90P10", p90: 0, p10: 5 },
      "p90",
      "The P90 of a lognormal distribution must be greater than 0",
    ],
    [
      { kind: "lognormalP90P10", p90: 500, p10: 50 },
      "p10",
      "P10 (the high case), 50, must be greater than the P90 (the low case), 500",
    ],
    [{ kind: "normalP90P10", p90: 2, p10: 1 }, "p10", "must be greater than"],
    [
      { kind: "normal", mean: 0, standardDeviation: 1, minimum: 2, maximum: 1 },
      "maximum",
      "The maximum, 1, must be greater than the minimum, 2",
    ],
    [
      { kind: "normal", mean: 0, standardDeviation: 1, minimum: 5 },
      "minimum",
      "leave out all but 0.000029 % of the distribution",
    ],
    [
      { kind: "normal", mean: 0, standardDeviation: 1, minimum: 60 },
      "minimum",
      "leave out all of the distribution",
    ],
    [{ kind: "lognormal", mu: 7, sigma: 50 }, "sigma", "a standard deviation of 50"],
    [{ kind: "lognormal", mu: 700, sigma: 1 }, "mu", "beyond what any quantity"],
    [{ kind: "lognormal", mu: -700, sigma: 1 }, "mu", "beyond what any quantity"],
    [{ kind: "lognormalP90P10", p90: 1, p10: 170 }, "p10", "a standard deviation of 2.004"],
    [{ kind: "normal", mean: 1e308, standardDeviation: 1e308 }, "mean", "beyond what any quantity"],
    [{ kind: "normal", mean: 5, standardDeviation: 1e21 }, "standardDeviation", "beyond"],
    [{ kind: "uniform", low: -1e308, high: 1e308 }, "low", "beyond"],
    [{ kind: "pert", low: 1, mode: 2, high: 1e308, ends: "p90p10" }, "high", "beyond"],
    [{ kind: "constant", value: 1e300 }, "value", "beyond"],
    [{ kind: "uniform", low: 0, high: 1e-200 }, "high", "too narrow"],
    [{ kind: "normal", mean: 1, standardDeviation: 1e-200 }, "mean", "too narrow"],
    [{ kind: "uniform", low: 0, high: 1, maximum: -1 }, "maximum", "contradict each other"],
    [{ kind: "normal", mean: NaN, standardDeviation: 1 }, "mean", "The mean must be a number"],
  ])("refuses %j", (definition, input, message) => {
    const error = refusal(definition);
    expect(error.details.input).toBe(input);
    expect(error.message).toContain(message);
  });

  it("refuses a probability that is none", () => {
    const { quantile } = compileDistribution({ kind: "uniform", low: 0, high: 1 });
    expect(() => quantile(-0.1)).toThrow("A probability lies between 0 and 1");
    expect(() => quantile(NaN)).toThrow(DomainError);
  });

  const probability = fc.double({ min: 1e-6, max: 1 - 1e-6, noNaN: true });
  const anyDistribution = fc.oneof(
    fc
      .record({
        low: fc.double({ min: -100, max: 100, noNaN: true }),
        a: fc.double({ min: 0, max: 1, noNaN: true }),
        width: fc.double({ min: 0.1, max: 50, noNaN: true }),
        kind: fc.constantFrom("triangular" as const, "pert" as const),
      })
      .map(
        ({ low, a, width, kind }): Exclude<SimpleDistribution, { kind: "constant" }> => ({
          kind,
          low,
          mode: low + a * width,
          high: low + width,
        }),
      ),
    fc
      .record({
        p90: fc.double({ min: 0.01, max: 100, noNaN: true }),
        ratio: fc.double({ min: 1.05, max: 30, noNaN: true }),
        kind: fc.constantFrom("lognormalP90P10" as const, "normalP90P10" as const),
      })
      .map(
        ({ p90, ratio, kind }): Exclude<SimpleDistribution, { kind: "constant" }> => ({
          kind,
          p90,
          p10: p90 * ratio,
        }),
      ),
  );

  it("has a quantile function that rises, and that cdf undoes", { timeout: 60_000 }, () => {
    fc.assert(
      fc.property(anyDistribution, probability, probability, (definition, p, q) => {
        const { quantile, cdf } = compileDistribution(definition);
        expect(cdf(quantile(p))).toBeCloseTo(p, 8);
        // Two chances a rounding apart may come out in either order of their last digits.
        const size = Math.max(Math.abs(quantile(0.001)), Math.abs(quantile(0.999)));
        const rounding = 1e-14 * size;
        if (p < q) expect(quantile(p)).toBeLessThanOrEqual(quantile(q) + rounding);
      }),
    );
  });

  it("stays inside its bounds when truncated", { timeout: 60_000 }, () => {
    fc.assert(
      fc.property(
        anyDistribution,
        fc.double({ min: 0.01, max: 0.4, noNaN: true }),
        (definition, share) => {
          const whole = compileDistribution(definition);
          const [minimum, maximum] = [whole.quantile(share), whole.quantile(1 - share)];
          const compiled = compileDistribution({ ...definition, minimum, maximum });
          expect(compiled.lostMass).toBeCloseTo(2 * share, 6);
          const out = new Float64Array(200);
          compiled.fillQuantiles(
            Float64Array.from({ length: 200 }, (_, i) => (i + 0.5) / 200),
            200,
            out,
          );
          for (const value of out) {
            expect(value).toBeGreaterThanOrEqual(minimum);
            expect(value).toBeLessThanOrEqual(maximum);
          }
        },
      ),
    );
  });
});

describe("densityCurve", () => {
  it("spans the bounds of a bounded distribution", () => {
    const { x, density } = densityCurve({ kind: "pert", low: 10, mode: 20, high: 50 }, 41);
    expect([x[0], x[40], x.length]).toEqual([10, 50, 41]);
    const area = density.reduce((sum, value) => sum + value * (x[1] - x[0]), 0);
    expect(area).toBeCloseTo(1, 2);
  });

  it("starts a lognormal at its P99.9 and ends it at its P0.1", () => {
    const { x } = densityCurve({ kind: "lognormal", mu: 0, sigma: 0.5 });
    expect(x[0]).toBeCloseTo(Math.exp(-0.5 * 3.0902323), 5);
    expect(x.at(-1)).toBeCloseTo(Math.exp(0.5 * 3.0902323), 5);
  });

  it("gives a constant as one point", () => {
    expect(densityCurve({ kind: "constant", value: 4 })).toEqual({ x: [4], density: [0] });
  });
});
