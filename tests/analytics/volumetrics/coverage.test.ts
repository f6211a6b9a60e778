import { describe, expect, it } from "vitest";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import { simulate } from "@/analytics/volumetrics/simulate";
import { createWorkspace } from "@/analytics/volumetrics/workspace";
import { buildInputs, oneAcreFoot } from "./estimate-inputs";

const SEEDS = 200;
const LEVELS = ["p90", "p50", "p10", "mean"] as const;

const ranges = { areaAcres: [1000, 4000], netThicknessFt: [30, 120], porosity: [0.12, 0.2] };
const lognormals = Object.fromEntries(
  Object.entries(ranges).map(([name, [p90, p10]]) => [
    name,
    { kind: "lognormalP90P10" as const, p90, p10 },
  ]),
);
const inputs = buildInputs({ ...oneAcreFoot, ...lognormals }, { correlations: [] });

/** Area, thickness and porosity enter as a product, so gas in place is lognormal: means and variances of logarithms add up. */
function closedForm() {
  const { deterministic } = simulate(buildInputs(oneAcreFoot, { correlations: [] }), {
    trials: 100,
    seed: 1,
  }).summary;
  let mu = Math.log(deterministic.wetGasInPlaceScf / 0.1);
  let variance = 0;
  for (const [p90, p10] of Object.values(ranges)) {
    mu += Math.log(p90 * p10) / 2;
    variance += (Math.log(p10 / p90) / 2.5631031310892007) ** 2;
  }
  const { range, mean } = compileDistribution({
    kind: "lognormal",
    mu,
    sigma: Math.sqrt(variance),
  });
  return { ...range, mean };
}

/** Three standard deviations of a share of 200 either side of the chance. */
const band = (chance: number) => 3 * Math.sqrt((chance * (1 - chance)) / SEEDS);

/**
 * Chances that Student's t with 15 degrees of freedom lies within 1 and within 1.96: 0.6669 and 0.9312 (SciPy 1.17,
 * scipy.stats.t.cdf). Standard errors from 16 replicates cannot do better, and normal ones would give 0.683 and 0.950.
 */
const WITHIN_ONE = 0.6669;
const WITHIN_TWO = 0.9312;
/**
 * Means of scrambled nets have longer tails than normal ones: 0.90 in 1,600 runs of 1,024 to 16,384 trials (our own
 * count; the direction as in P. L'Ecuyer, M. K. Nakayama, A. B. Owen, B. Tuffin, Confidence intervals for randomized
 * quasi-Monte Carlo estimators, Proc. Winter Simulation Conference 2023).
 */
const SOBOL_MEAN_WITHIN_TWO = 0.9;

describe("the standard errors that a run states", () => {
  it.each([
    ["latinHypercube", 2048],
    ["sobol", 2048],
    ["latinHypercube", 1000],
  ] as const)(
    "hold the closed form as often as they should, by %s with %i trials",
    { timeout: 120_000 },
    (sampling, trials) => {
      const truth = closedForm();
      const workspace = createWorkspace(trials);
      const inside = { one: [0, 0, 0, 0], two: [0, 0, 0, 0] };
      for (let seed = 1; seed <= SEEDS; seed += 1) {
        const { wetGasInPlaceScf: result } = simulate(inputs, { trials, seed, sampling, workspace })
          .summary.results;
        LEVELS.forEach((level, i) => {
          const errors = Math.abs(result[level] - truth[level]) / result.standardErrors[level];
          if (errors < 1) inside.one[i] += 1;
          if (errors < 1.959964) inside.two[i] += 1;
        });
      }
      LEVELS.forEach((level, i) => {
        const [one, two] = [inside.one[i] / SEEDS, inside.two[i] / SEEDS];
        expect(Math.abs(one - WITHIN_ONE), `${level}: ${one}`).toBeLessThan(band(WITHIN_ONE));
        const wanted =
          sampling === "sobol" && level === "mean" ? SOBOL_MEAN_WITHIN_TWO : WITHIN_TWO;
        expect(Math.abs(two - wanted), `${level}: ${two}`).toBeLessThan(band(wanted));
      });
    },
  );
});
