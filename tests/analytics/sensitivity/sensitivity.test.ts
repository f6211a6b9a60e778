import { describe, expect, it } from "vitest";
import { computeSensitivity } from "@/analytics/sensitivity/sensitivity";
import { sensitivitySchema } from "@/analytics/sensitivity/sensitivity-schema";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { simulate } from "@/analytics/volumetrics/simulate";
import { buildCycling, buildPlan, psia } from "../recovery/published-curve";
import { buildInputs, withoutSpread } from "../volumetrics/estimate-inputs";

const options = {
  seed: 11,
  trials: 10_000,
  sampling: "latinHypercube",
  result: "condensateRecoverableStb",
  chosen: { from: 0.9, to: 1 },
} as const;

/** Area times thickness times what is constant: a product of two lognormals. */
const area: Distribution = { kind: "lognormalP90P10", p90: 1400, p10: 4200 };
const thickness: Distribution = { kind: "lognormalP90P10", p90: 50, p10: 120 };
const product = buildInputs(
  { ...withoutSpread, areaAcres: area, netThicknessFt: thickness },
  { correlations: [] },
);
const variances = [area, thickness].map((distribution) => {
  const { mean, standardDeviation } = compileDistribution(distribution);
  return Math.log(1 + (standardDeviation / mean) ** 2);
});

describe("computeSensitivity", () => {
  it("finds the variance shares of a product of lognormals", () => {
    const { varianceShares, knowing } = computeSensitivity(product, options);
    const whole = Math.exp(variances[0] + variances[1]) - 1;
    expect(varianceShares.factors.map(({ inputs }) => inputs)).toEqual([
      ["areaAcres"],
      ["netThicknessFt"],
    ]);
    variances.forEach((own, i) => {
      // Closed form: E[y | x_i] and E[y | the other] are lognormal too.
      const first = (Math.exp(own) - 1) / whole;
      const total = ((Math.exp(own) - 1) * Math.exp(variances[1 - i])) / whole;
      const factor = varianceShares.factors[i];
      expect(Math.abs(factor.first.value - first)).toBeLessThan(4 * factor.first.standardError);
      expect(Math.abs(factor.total.value - total)).toBeLessThan(4 * factor.total.standardError);
      expect(factor.first.standardError).toBeLessThan(0.02);
      // What the estimate's own trials say is the first-order share.
      expect(Math.abs(knowing[i].varianceRemoved - first)).toBeLessThan(0.04);
    });
  });

  it("leaves of the width what the unknown lognormal has", () => {
    const { knowing } = computeSensitivity(product, options);
    const sigma = variances.map(Math.sqrt);
    const z = 1.2815515655446004;
    const width = (s: number) => 2 * Math.sinh(z * s);
    // y given area is lognormal with thickness's sigma, around the mean over area of exp(mu).
    const both = Math.hypot(...sigma);
    const expected = (width(sigma[1]) * Math.exp(variances[0] / 2)) / width(both);
    const area = knowing.find(({ input }) => input === "areaAcres");
    expect(Math.abs((area?.remainingWidth ?? 0) - expected)).toBeLessThan(0.02);
  });

  it("looks at the very trials of the estimate", () => {
    const { summary } = simulate(product, { seed: 11, trials: 10_000 });
    const { conditional } = computeSensitivity(product, { ...options, chosen: { from: 0, to: 1 } });
    const { p90, p50, p10 } = summary.results.condensateRecoverableStb;
    expect(conditional.result).toMatchObject({ p90, p50, p10 });
    const thicknesses = conditional.inputs.find(({ input }) => input === "netThicknessFt");
    // The summary averages the percentiles of the replicates.
    expect(thicknesses?.all.p50).toBeCloseTo(summary.inputs.netThicknessFt.p50, 2);
  });

  it("works out the parts that are asked for alone, as they are with the rest", () => {
    const whole = computeSensitivity(product, options);
    const part = computeSensitivity(product, { ...options, parts: ["conditional"] });
    expect(part).toEqual({ trials: 10_000, conditional: whole.conditional });
  });

  it("has rank coefficients whose squares share the fit of a near product", () => {
    const { rankRegression } = computeSensitivity(product, options);
    // Normal scores of a product of lognormals are linear in those of its factors, and ranks nearly so.
    expect(rankRegression.rSquared).toBeGreaterThan(0.95);
    const [first, second] = rankRegression.coefficients.map(({ coefficient }) => coefficient);
    expect(first ** 2 + second ** 2).toBeCloseTo(rankRegression.rSquared, 2);
  });

  it("counts correlated inputs as one factor, and the inputs of a set of cases as another", () => {
    const contact = (low: number, high: number): Distribution => ({
      kind: "scenarios",
      caseSet: "gas-water contact",
      scenarios: [
        { name: "shallow", weight: 0.4, distribution: { kind: "constant", value: low } },
        {
          name: "deep",
          weight: 0.6,
          distribution: { kind: "uniform", low: high, high: 1.2 * high },
        },
      ],
    });
    const inputs = buildInputs({ areaAcres: contact(1500, 3000), netThicknessFt: contact(60, 90) });
    const sensitivity = computeSensitivity(inputs, options);
    sensitivitySchema.parse(sensitivity);
    const { factors } = sensitivity.varianceShares;
    const named = factors.map(({ inputs: names }) => names.join(" "));
    expect(named).toContain("areaAcres netThicknessFt");
    expect(named).toContain("porosity waterSaturation");
    const [contactFactor] = factors;
    expect(contactFactor.inputs).toEqual(["areaAcres", "netThicknessFt"]);
    // Within the factor everything of it is known: what it explains alone is at least what either input does.
    const best = Math.max(...sensitivity.knowing.map(({ varianceRemoved }) => varianceRemoved));
    expect(contactFactor.first.value).toBeGreaterThan(best - 0.05);
  });

  it("samples correlated inputs as the trials do", () => {
    const tied = {
      ...product,
      correlations: [{ a: "areaAcres", b: "netThicknessFt", rank: 0.7 } as const],
    };
    const { varianceShares, knowing } = computeSensitivity(tied, options);
    expect(varianceShares.factors).toHaveLength(1);
    const [{ first, total }] = varianceShares.factors;
    expect(Math.abs(first.value - 1)).toBeLessThan(4 * first.standardError);
    expect(Math.abs(total.value - 1)).toBeLessThan(4 * total.standardError);
    const alone = computeSensitivity(product, options).knowing;
    expect(knowing[0].varianceRemoved).toBeGreaterThan(alone[0].varianceRemoved + 0.1);
  });

  it("knows the inputs of a recovery plan, and not the recoveries it replaces", () => {
    const uncertain = (distribution: Distribution) => ({ distribution, source: "" });
    const plan = buildPlan({
      concept: "cycling",
      abandonmentPressurePsia: uncertain({ kind: "uniform", low: 750, high: 1300 }),
      cycling: buildCycling({
        sweepEfficiency: uncertain({ kind: "pert", low: 0.35, mode: 0.55, high: 0.75 }),
        displacementEfficiency: uncertain({ kind: "uniform", low: 0.85, high: 1 }),
      }),
    });
    const inputs = buildInputs(
      {
        pressurePsia: { kind: "normal", mean: psia(4000) + 500, standardDeviation: 100 },
        temperatureDegF: { kind: "normal", mean: 200, standardDeviation: 3 },
        condensateYieldStbPerMmscf: { kind: "uniform", low: 130, high: 165 },
      },
      { depthFt: null, recoveryPlan: plan },
    );
    const { knowing } = computeSensitivity(inputs, { ...options, trials: 2_000 });
    const names = knowing.map(({ input }) => input);
    expect(names).toContain("sweepEfficiency");
    expect(names).not.toContain("condensateRecovery");
    expect(names).not.toContain("condensateCurveFactor");
  });

  it("has nothing to say of an estimate that does not vary", () => {
    const sensitivity = computeSensitivity(
      buildInputs(withoutSpread, { correlations: [] }),
      options,
    );
    expect(sensitivity.knowing).toEqual([]);
    expect(sensitivity.varianceShares.factors).toEqual([]);
    expect(sensitivity.rankRegression).toEqual({ rSquared: 0, coefficients: [], leftOut: [] });
    sensitivitySchema.parse(sensitivity);
  });

  it("is the same every time", () => {
    expect(computeSensitivity(product, options)).toEqual(computeSensitivity(product, options));
  });
});
