import { createHash } from "node:crypto";
import { sampleRankCorrelation } from "simple-statistics";
import { describe, expect, it } from "vitest";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import type { SamplingMethod } from "@/analytics/uncertainty/sampling-schema";
import {
  inputNames,
  type EstimateInputs,
  type InputName,
} from "@/analytics/volumetrics/inputs-schema";
import { vectorNames } from "@/analytics/volumetrics/results-schema";
import { simulate } from "@/analytics/volumetrics/simulate";
import { samplingFor } from "@/analytics/volumetrics/trial-counts";
import { createWorkspace } from "@/analytics/volumetrics/workspace";
import { buildInputs } from "./estimate-inputs";

const TRIALS = 4096;
const methods: SamplingMethod[] = ["latinHypercube", "sobol"];

function draw(inputs: EstimateInputs, sampling: SamplingMethod, seed = 5) {
  const workspace = createWorkspace(TRIALS, { keepInputs: true });
  const { summary } = simulate(inputs, { trials: TRIALS, seed, sampling, workspace });
  return { workspace, summary };
}

const rankCorrelation = (columns: Record<InputName, Float64Array>, a: InputName, b: InputName) =>
  sampleRankCorrelation([...columns[a]], [...columns[b]]);

/** A deeper contact is a larger area and a thicker column. */
const contact = (low: number, high: number): Distribution => ({
  kind: "scenarios",
  caseSet: "contact",
  scenarios: [
    { name: "shallow", weight: 0.3, distribution: { kind: "uniform", low, high: 1.2 * low } },
    { name: "deep", weight: 0.7, distribution: { kind: "uniform", low: high, high: 1.2 * high } },
  ],
});

describe.each(methods)("trials drawn by %s", (sampling) => {
  const inputs = buildInputs();
  const { workspace, summary } = draw(inputs, sampling);

  it("say what they are: 16 replicates of one method", () => {
    expect(summary).toMatchObject({ sampling, replicates: 16, trials: TRIALS });
  });

  it("have one draw of every input in each stratum of every replicate", () => {
    const tied = new Set(inputs.correlations.flatMap(({ a, b }) => [a, b]));
    for (const name of inputNames) {
      const { cdf, definition } = compileDistribution(inputs.uncertain[name].distribution);
      // Probabilities of correlated points are mixed from several dimensions, and a table is a hair off.
      if (definition.kind === "constant" || tied.has(name)) continue;
      for (const { inputs: part, count } of workspace.replicates) {
        const inOrder = part[name].slice(0, count).sort();
        const outside = inOrder.filter((x, i) => Math.abs(cdf(x) * count - i - 0.5) > 0.501);
        expect(outside, name).toHaveLength(0);
      }
    }
  });

  it("have the percentiles of the distributions and the rank correlations asked for", () => {
    for (const name of inputNames) {
      const { range } = compileDistribution(inputs.uncertain[name].distribution);
      for (const level of ["p90", "p50", "p10"] as const) {
        expect(summary.inputs[name][level] / range[level]).toBeCloseTo(1, 2);
      }
    }
    for (const { a, b, rank } of inputs.correlations) {
      expect(rankCorrelation(workspace.inputs, a, b)).toBeCloseTo(rank, 1);
    }
    expect(
      Math.abs(rankCorrelation(workspace.inputs, "areaAcres", "temperatureDegF")),
    ).toBeLessThan(0.05);
  });

  it("leave the draws of other inputs alone when one changes", () => {
    const changed = draw(
      buildInputs({ areaAcres: { kind: "uniform", low: 500, high: 900 } }),
      sampling,
    ).workspace;
    for (const name of inputNames) {
      if (name === "areaAcres") continue;
      expect(changed.inputs[name]).toEqual(workspace.inputs[name]);
    }
  });

  it("give the same bytes on a used workspace, with inputs kept or not, and others for another seed", () => {
    const digest = (options: { seed: number; keepInputs?: boolean; usedBefore?: boolean }) => {
      const { seed, keepInputs = false, usedBefore = false } = options;
      const own = createWorkspace(TRIALS, { keepInputs });
      const all = { trials: TRIALS, workspace: own };
      if (usedBefore) {
        for (const other of methods) simulate(inputs, { ...all, seed: 99, sampling: other });
      }
      const run = simulate(inputs, { ...all, seed, sampling });
      const hash = createHash("sha256").update(JSON.stringify(run.summary));
      for (const name of vectorNames) hash.update(new Uint8Array(run.vectors[name].buffer));
      return hash.digest("hex");
    };
    const fresh = digest({ seed: 5 });
    expect(digest({ seed: 5, usedBefore: true })).toBe(fresh);
    expect(digest({ seed: 5, keepInputs: true })).toBe(fresh);
    expect(digest({ seed: 6 })).not.toBe(fresh);
  });

  it("take the same case in every input of a set, as often as it weighs, and are independent within it", () => {
    const { workspace: drawn } = draw(
      buildInputs(
        { areaAcres: contact(1000, 2000), netThicknessFt: contact(50, 90) },
        { correlations: [] },
      ),
      sampling,
    );
    const { areaAcres, netThicknessFt } = drawn.inputs;
    const deep = Array.from(areaAcres, (area) => area >= 2000);
    expect(Array.from(netThicknessFt, (thickness) => thickness >= 90)).toEqual(deep);
    // Cases are strata too: to one trial a replicate.
    expect(Math.abs(deep.filter(Boolean).length / TRIALS - 0.7)).toBeLessThan(16 / TRIALS);
    const [areas, thicknesses] = [areaAcres, netThicknessFt].map((column) =>
      [...column].filter((_, t) => deep[t]),
    );
    expect(Math.abs(sampleRankCorrelation(areas, thicknesses))).toBeLessThan(0.05);
    // Uniform from 2,000 to 2,400: mean 2,200, standard deviation 400 / sqrt(12).
    const mean = areas.reduce((sum, area) => sum + area, 0) / areas.length;
    expect(Math.abs(mean - 2200)).toBeLessThan((4 * 400) / Math.sqrt(12 * areas.length));
  });
});

describe("a run by Sobol points", () => {
  it("refuses a number of trials that is no power of two from 1,024", () => {
    for (const trials of [1000, 10_000, 512]) {
      expect(() => simulate(buildInputs(), { trials, seed: 1, sampling: "sobol" })).toThrow(
        "Sobol points come in powers of two from 1,024",
      );
    }
  });

  it("is the default where the number of trials allows it", () => {
    expect([1024, 16_384].map(samplingFor)).toEqual(["sobol", "sobol"]);
    expect([1000, 10_000].map(samplingFor)).toEqual(["latinHypercube", "latinHypercube"]);
  });
});

describe("a short run", () => {
  it.each([
    [100, 5],
    [200, 10],
    [320, 16],
  ])("of %i trials is %i replicates of 20", (trials, replicates) => {
    expect(simulate(buildInputs(), { trials, seed: 1 }).summary.replicates).toBe(replicates);
  });
});
