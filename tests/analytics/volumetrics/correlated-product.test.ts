import { describe, expect, it } from "vitest";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import { halfWidth95 } from "@/analytics/uncertainty/replicates";
import type { SamplingMethod } from "@/analytics/uncertainty/sampling-schema";
import { simulate } from "@/analytics/volumetrics/simulate";
import { createWorkspace } from "@/analytics/volumetrics/workspace";
import { buildInputs, oneAcreFoot } from "./estimate-inputs";

const MU = { area: 7, thickness: 4 };
const SIGMA = { area: 0.5, thickness: 0.35 };
const LEVELS = ["p90", "p50", "p10", "mean"] as const;

function reservoir(rank: number) {
  return buildInputs(
    {
      ...oneAcreFoot,
      areaAcres: { kind: "lognormal", mu: MU.area, sigma: SIGMA.area },
      netThicknessFt: { kind: "lognormal", mu: MU.thickness, sigma: SIGMA.thickness },
    },
    { correlations: rank === 0 ? [] : [{ a: "areaAcres", b: "netThicknessFt", rank }] },
  );
}

/**
 * A product of two correlated lognormals is lognormal: its logarithm has variance s1^2 + s2^2 + 2 r s1 s2, with r the
 * correlation of normal scores that a rank correlation stands for, 2 sin(pi rank / 6) (Pearson 1907).
 */
function closedForm(rank: number) {
  const unit = simulate(buildInputs(oneAcreFoot, { correlations: [] }), { trials: 100, seed: 1 })
    .summary.deterministic.wetGasInPlaceScf;
  const r = 2 * Math.sin((Math.PI * rank) / 6);
  const variance = SIGMA.area ** 2 + SIGMA.thickness ** 2 + 2 * r * SIGMA.area * SIGMA.thickness;
  const product = compileDistribution({
    kind: "lognormal",
    mu: Math.log(unit) + MU.area + MU.thickness,
    sigma: Math.sqrt(variance),
  });
  return { ...product.range, mean: product.mean, standardDeviation: product.standardDeviation };
}

function repeat(rank: number, trials: number, sampling: SamplingMethod, seeds: number) {
  const truth = closedForm(rank);
  const inputs = reservoir(rank);
  const workspace = createWorkspace(trials);
  const inside = { p90: 0, p50: 0, p10: 0, mean: 0 };
  let [mean, squares, spread] = [0, 0, 0];
  for (let seed = 1; seed <= seeds; seed += 1) {
    const { results, replicates } = simulate(inputs, { trials, seed, sampling, workspace }).summary;
    const result = results.wetGasInPlaceScf;
    const error = result.mean / truth.mean - 1;
    mean += error / seeds;
    squares += error ** 2 / seeds;
    spread += (result.standardDeviation / truth.standardDeviation - 1) / seeds;
    for (const level of LEVELS) {
      const reach = halfWidth95(replicates ?? 1) * result.standardErrors[level];
      if (Math.abs(result[level] - truth[level]) <= reach) inside[level] += 1 / seeds;
    }
  }
  return { mean, errorOfMean: Math.sqrt(squares / seeds), spread, inside };
}

describe("a product of correlated lognormals", () => {
  it.each([
    ["latinHypercube", 0.9, 1000, 400],
    ["latinHypercube", 0.6, 4096, 200],
    ["latinHypercube", -0.6, 1000, 400],
    ["sobol", 0.9, 1024, 400],
    ["sobol", 0.6, 4096, 200],
  ] as const)(
    "has its closed form without bias, by %s at rank %d with %i trials",
    { timeout: 120_000 },
    (sampling, rank, trials, seeds) => {
      const { mean, errorOfMean, spread, inside } = repeat(rank, trials, sampling, seeds);
      expect(Math.abs(mean), `mean ${mean}`).toBeLessThan(3 * errorOfMean);
      expect(Math.abs(mean)).toBeLessThan(0.0015);
      // The root of a sample's variance is low by itself, most where few far trials decide it.
      expect(Math.abs(spread), `spread ${spread}`).toBeLessThan(0.01);
      for (const level of LEVELS) {
        // Three standard deviations of a share of so many; errors of a mean in a long tail are stated a little small.
        const [wanted, slack] = [level === "mean" ? 0.92 : 0.95, 3 * Math.sqrt(0.0475 / seeds)];
        expect(inside[level], level).toBeGreaterThan(wanted - slack);
      }
    },
  );

  it.each([
    [100, 0],
    [200, 0],
    [320, 0.6],
  ])(
    "has intervals that hold it in short runs too, with %i trials at rank %d",
    { timeout: 60_000 },
    (trials, rank) => {
      const { inside } = repeat(rank, trials, "latinHypercube", 400);
      for (const level of LEVELS) {
        expect(inside[level], level).toBeGreaterThan(0.9);
        // Not by being wide: errors of independent trials would hold the mean in every run.
        expect(inside[level], level).toBeLessThan(0.985);
      }
    },
  );
});
