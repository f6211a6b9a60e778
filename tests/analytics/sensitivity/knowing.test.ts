import { describe, expect, it } from "vitest";
import { createOrderWorkspace } from "@/analytics/numerics/order-statistics";
import { averageRanks } from "@/analytics/sensitivity/average-ranks";
import { valueOfKnowing } from "@/analytics/sensitivity/knowing";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { samplingMethods } from "@/analytics/uncertainty/sampling-schema";
import { simulate } from "@/analytics/volumetrics/simulate";
import { createWorkspace } from "@/analytics/volumetrics/workspace";
import { buildInputs, withoutSpread } from "../volumetrics/estimate-inputs";

/** The result is area times thickness times porosity times what is constant: a product of three lognormals. */
const names = ["areaAcres", "netThicknessFt", "porosity"] as const;
const distributions: Record<(typeof names)[number], Distribution> = {
  areaAcres: { kind: "lognormalP90P10", p90: 1400, p10: 4200 },
  netThicknessFt: { kind: "lognormalP90P10", p90: 50, p10: 120 },
  porosity: { kind: "lognormalP90P10", p90: 0.12, p10: 0.17 },
};
const inputs = buildInputs(
  {
    ...withoutSpread,
    ...distributions,
  },
  { correlations: [] },
);
const TRIALS = 1_024;
const SEEDS = 24;

describe.each(samplingMethods)("valueOfKnowing on %s trials", (sampling) => {
  const workspace = createWorkspace(TRIALS, { keepInputs: true });
  const counting = createOrderWorkspace(TRIALS);
  const found = Array.from({ length: SEEDS }, (_, seed) => {
    const { summary } = simulate(inputs, { seed, trials: TRIALS, sampling, workspace });
    const { p90, p10 } = summary.results.condensateRecoverableStb;
    return names.map((name) => {
      const column = workspace.inputs[name];
      return valueOfKnowing(
        column,
        averageRanks(column, counting),
        workspace.outputs.condensateRecoverableStb,
        p10 - p90,
        workspace.starts,
      );
    });
  });
  /** Mean over the seeds, with its standard error. */
  function meanOf(figures: number[]) {
    const mean = figures.reduce((sum, one) => sum + one, 0) / SEEDS;
    const squares = figures.reduce((sum, one) => sum + (one - mean) ** 2, 0);
    return { mean, error: Math.sqrt(squares / (SEEDS - 1) / SEEDS) };
  }

  const variances = names.map((name) => {
    const { mean, standardDeviation } = compileDistribution(distributions[name]);
    return Math.log(1 + (standardDeviation / mean) ** 2);
  });
  const whole = variances.reduce((sum, one) => sum + one, 0);

  it.each(names)("is the first-order share of %s in closed form on average", (name) => {
    // Var(E[y | x]) / Var(y) of a product of lognormals.
    const i = names.indexOf(name);
    const expected = Math.expm1(variances[i]) / Math.expm1(whole);
    const { mean, error } = meanOf(found.map((of) => of[i].varianceRemoved));
    expect(error).toBeLessThan(0.006);
    expect(Math.abs(mean - expected)).toBeLessThan(3.5 * error);
  });

  it.each(names)("leaves the width of the unknown two when %s is known", (name) => {
    // P10 less P90 of a lognormal of median m is 2 m sinh(1.2816 sigma), and E[m] = exp(variance of x / 2).
    const i = names.indexOf(name);
    const width = (variance: number) => Math.sinh(1.2815515655446004 * Math.sqrt(variance));
    const expected = (width(whole - variances[i]) * Math.exp(variances[i] / 2)) / width(whole);
    const { mean, error } = meanOf(found.map((of) => of[i].remainingWidth));
    expect(error).toBeLessThan(0.007);
    expect(Math.abs(mean - expected)).toBeLessThan(3.5 * error);
  });

  it("has an input of no importance at 0 on average, and so below it as often as above", () => {
    const column = new Float64Array(workspace.inputs.areaAcres);
    const idle = Array.from({ length: SEEDS }, (_, seed) => {
      simulate(inputs, { seed: seed + 100, trials: TRIALS, sampling, workspace });
      const { starts, outputs } = workspace;
      const y = outputs.condensateRecoverableStb;
      return valueOfKnowing(column, averageRanks(column, counting), y, 1, starts).varianceRemoved;
    });
    const { mean, error } = meanOf(idle);
    expect(Math.abs(mean)).toBeLessThan(3.5 * error);
    expect(idle.some((share) => share < 0)).toBe(true);
  });
});
