import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { compileDistribution, densityCurve } from "@/analytics/uncertainty/distribution";
import type { Distribution, Scenario } from "@/analytics/uncertainty/distribution-schema";
import { compilePossible } from "@/analytics/uncertainty/possible-range";
import { usualRanges } from "@/analytics/volumetrics/usual-ranges";

const scenario = (
  name: string,
  weight: number,
  distribution: Scenario["distribution"],
): Scenario => ({ name, weight, distribution });
const of = (...scenarios: Scenario[]): Distribution => ({ kind: "scenarios", scenarios });
const constant = (value: number) => ({ kind: "constant" as const, value });

function refusal(act: () => unknown): DomainError {
  try {
    act();
  } catch (error) {
    if (error instanceof DomainError) return error;
  }
  throw new Error("It was accepted.");
}

describe("compileScenarios", () => {
  const contacts = of(
    scenario("Shallow", 0.3, constant(100)),
    scenario("Middle", 0.5, { kind: "uniform", low: 100, high: 200 }),
    scenario("Deep", 0.2, { kind: "uniform", low: 300, high: 400 }),
  );

  it("mixes chances, moments and ranges in closed form", () => {
    const compiled = compileDistribution(contacts);
    // mean 0.3 x 100 + 0.5 x 150 + 0.2 x 350; E[x^2] of a uniform is mean^2 + width^2 / 12
    expect(compiled.mean).toBeCloseTo(175, 12);
    const second =
      0.3 * 100 ** 2 + 0.5 * (150 ** 2 + 100 ** 2 / 12) + 0.2 * (350 ** 2 + 100 ** 2 / 12);
    expect(compiled.standardDeviation).toBeCloseTo(Math.sqrt(second - 175 ** 2), 10);
    expect(compiled.range).toEqual({ p90: 100, p50: 140, p10: 350 });
    expect(compiled.support).toEqual({ minimum: 100, maximum: 400 });
    expect([99.9, 100, 150, 200, 250, 400].map(compiled.cdf)).toEqual([0, 0.3, 0.55, 0.8, 0.8, 1]);
    expect(compiled.pdf(150)).toBeCloseTo(0.005, 12);
  });

  it("takes the lower end of a gap between cases at the chance of all before it", () => {
    const { quantile } = compileDistribution(contacts);
    expect(quantile(0.8)).toBeCloseTo(200, 6);
    expect(quantile(0.8001)).toBeCloseTo(300.05, 6);
  });

  it("keeps constants as values with chances of their own, the same value once", () => {
    const compiled = compileDistribution(
      of(
        scenario("A", 0.25, constant(2)),
        scenario("B", 0.25, constant(5)),
        scenario("C", 0.5, constant(2)),
      ),
    );
    expect(compiled.atoms).toEqual([
      { value: 2, probability: 0.75 },
      { value: 5, probability: 0.25 },
    ]);
    expect([0, 0.3, 0.75, 0.76, 1].map(compiled.quantile)).toEqual([2, 2, 2, 5, 5]);
    const out = new Float64Array(4);
    compiled.fillQuantiles(Float64Array.from([0.1, 0.6, 0.8, 0.9]), 4, out);
    expect([...out]).toEqual([2, 2, 5, 5]);
    expect(compiled.standardDeviation).toBeCloseTo(Math.sqrt(0.75 * 0.25) * 3, 12);
  });

  it("gives each case, with weights that add up to exactly 1", () => {
    const { cases, caseSet } = compileDistribution({
      kind: "scenarios",
      caseSet: "Contacts",
      scenarios: [
        scenario("One", 0.333333, constant(1)),
        scenario("Two", 0.333333, constant(2)),
        scenario("Three", 0.333334, constant(3)),
      ],
    });
    expect(caseSet).toBe("Contacts");
    expect(cases?.map(({ name }) => name)).toEqual(["One", "Two", "Three"]);
    expect(cases?.reduce((sum, { weight }) => sum + weight, 0)).toBeCloseTo(1, 15);
  });

  const part = fc
    .record({
      low: fc.double({ min: 1, max: 100, noNaN: true }),
      width: fc.double({ min: 0.5, max: 60, noNaN: true }),
      kind: fc.constantFrom("pert", "triangular", "lognormal", "constant"),
    })
    .map(({ low, width, kind }): Scenario["distribution"] => {
      if (kind === "constant") return constant(low);
      if (kind === "lognormal") return { kind: "lognormalP90P10", p90: low, p10: low + width };
      return {
        kind: kind === "pert" ? "pert" : "triangular",
        low,
        mode: low + 0.3 * width,
        high: low + width,
      };
    });
  const mixture = fc
    .record({ parts: fc.array(part, { minLength: 2, maxLength: 4 }) })
    .map(({ parts }) =>
      of(...parts.map((distribution, i) => scenario(`Case ${i}`, 1 / parts.length, distribution))),
    );

  it(
    "has a quantile function that rises and that cdf undoes, jumps apart",
    { timeout: 60_000 },
    () => {
      const probability = fc.double({ min: 1e-4, max: 1 - 1e-4, noNaN: true });
      fc.assert(
        fc.property(mixture, probability, probability, (definition, p, q) => {
          const { quantile, cdf, atoms } = compileDistribution(definition);
          const x = quantile(p);
          const atom = atoms.find(({ value }) => value === x);
          expect(cdf(x)).toBeGreaterThanOrEqual(p - 1e-9);
          if (!atom) expect(cdf(x)).toBeCloseTo(p, 8);
          else expect(cdf(x) - atom.probability).toBeLessThanOrEqual(p + 1e-9);
          if (p < q) expect(x).toBeLessThanOrEqual(quantile(q) * (1 + 1e-9));
        }),
      );
    },
  );

  it("samples as its quantile function has it", { timeout: 60_000 }, () => {
    const n = 400;
    fc.assert(
      fc.property(mixture, (definition) => {
        const { quantile, fillQuantiles, cdf } = compileDistribution(definition);
        const out = new Float64Array(n);
        fillQuantiles(
          Float64Array.from({ length: n }, (_, i) => (i + 0.37) / n),
          n,
          out,
        );
        const width = quantile(0.999) - quantile(0.001);
        for (let i = 0; i < n; i += 1) {
          const p = (i + 0.37) / n;
          const wanted = quantile(p);
          // In a gap between cases a rounding of p spans the gap.
          const isGap = Math.abs(cdf(wanted) - cdf(out[i])) < 1e-9;
          if (!isGap) expect(Math.abs(out[i] - wanted)).toBeLessThan(1e-6 * width + 1e-9);
          if (i > 0) expect(out[i]).toBeGreaterThanOrEqual(out[i - 1]);
        }
      }),
      { numRuns: 40 },
    );
  });

  it("is drawn over all its cases", () => {
    const { x } = densityCurve(contacts, 31);
    expect([x[0], x[30]]).toEqual([100, 400]);
  });

  it.each<[string, Distribution, string, string]>([
    [
      "weights that do not add up",
      of(scenario("A", 0.3, constant(1)), scenario("B", 0.6, constant(2))),
      "scenarios",
      "add up to 0.9 (0.3 + 0.6)",
    ],
    [
      "a name twice",
      of(scenario("A", 0.5, constant(1)), scenario("A", 0.5, constant(2))),
      "scenarios.1.name",
      "Two cases are called “A”",
    ],
    [
      "a case that makes no distribution",
      of(scenario("A", 0.5, constant(1)), scenario("B", 0.5, { kind: "uniform", low: 3, high: 2 })),
      "scenarios.1.distribution.high",
      "In the case “B”: The high value, 2, must be greater than the low value, 3.",
    ],
  ])("refuses %s", (_, definition, input, message) => {
    const error = refusal(() => compileDistribution(definition));
    expect(error.details.input).toBe(input);
    expect(error.message).toContain(message);
  });
});

describe("compilePossible", () => {
  it("finds each case possible by itself", () => {
    const error = refusal(() =>
      compilePossible(
        usualRanges.porosity,
        of(
          scenario("Clean", 0.5, constant(0.2)),
          scenario("Per cent", 0.5, { kind: "uniform", low: 12, high: 20 }),
        ),
      ),
    );
    expect(error.details.input).toBe("scenarios.1.distribution.maximum");
    expect(error.message).toContain("In the case “Per cent”");
    expect(error.message).toContain("Is it in per cent?");
  });

  it("refuses a case that is an impossible constant", () => {
    const error = refusal(() =>
      compilePossible(
        usualRanges.areaAcres,
        of(scenario("Dry", 0.5, constant(0)), scenario("Wet", 0.5, constant(900))),
      ),
    );
    expect(error.details.input).toBe("scenarios.0.distribution.value");
  });
});
