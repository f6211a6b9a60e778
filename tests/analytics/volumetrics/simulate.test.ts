import { createHash } from "node:crypto";
import { sampleRankCorrelation } from "simple-statistics";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { recombine, wellstreamGravityAtYield, yieldConstants } from "@/analytics/fluid/wellstream";
import { zFactor } from "@/analytics/gas/z-factor";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import { inPlace } from "@/analytics/volumetrics/in-place";
import { inputNames, type InputName } from "@/analytics/volumetrics/inputs-schema";
import { simulationSummarySchema, vectorNames } from "@/analytics/volumetrics/results-schema";
import { ENGINE_VERSION, simulate } from "@/analytics/volumetrics/simulate";
import { fillZFactors } from "@/analytics/volumetrics/trial-z";
import { createWorkspace } from "@/analytics/volumetrics/workspace";
import chain from "../../fixtures/whole-chain.json";
import { buildInputs, constants, oneAcreFoot } from "./estimate-inputs";

const TRIALS = 4000;

describe("simulate", () => {
  const inputs = buildInputs();
  const workspace = createWorkspace(TRIALS, { keepInputs: true });
  const { summary, vectors } = simulate(inputs, { trials: TRIALS, seed: 7, workspace });
  const wellstream = recombine(inputs.fluid);

  it("returns a summary that its schema accepts, and vectors of one element per trial", () => {
    expect(simulationSummarySchema.parse(summary)).toEqual(summary);
    expect(summary).toMatchObject({ engineVersion: ENGINE_VERSION, seed: 7, trials: TRIALS });
    for (const name of vectorNames) expect(vectors[name]).toHaveLength(TRIALS);
  });

  it("agrees in every trial with the step-by-step equations of inPlace", () => {
    const { inputs: sampled, outputs } = workspace;
    const fluid = yieldConstants(wellstream);
    for (let t = 0; t < TRIALS; t += 7) {
      const condensateYieldStbPerMmscf = sampled.condensateYieldStbPerMmscf[t];
      const expected = inPlace({
        areaAcres: sampled.areaAcres[t],
        netThicknessFt: sampled.netThicknessFt[t],
        porosity: sampled.porosity[t],
        waterSaturation: sampled.waterSaturation[t],
        pressurePsia: sampled.pressurePsia[t],
        temperatureDegF: sampled.temperatureDegF[t],
        impurities: inputs.fluid,
        wellstream: {
          condensateYieldStbPerMmscf,
          vapourEquivalentScfPerStb: wellstream.vapourEquivalentScfPerStb,
          wellstreamGravity: wellstreamGravityAtYield(condensateYieldStbPerMmscf, fluid),
        },
      });
      for (const name of [
        "zFactor",
        "wetGasInPlaceScf",
        "dryGasInPlaceScf",
        "condensateInPlaceStb",
        "condensatePerAcreFootStb",
        "wetGasPerAcreFootScf",
      ] as const) {
        expect(Math.abs(outputs[name][t] / expected[name] - 1)).toBeLessThan(1e-8);
      }
    }
  });

  it("balances: dry gas and the vapour equivalent of condensate make wet gas, in every trial", () => {
    for (let t = 0; t < TRIALS; t += 1) {
      const sum =
        vectors.dryGasInPlaceScf[t] +
        wellstream.vapourEquivalentScfPerStb * vectors.condensateInPlaceStb[t];
      expect(Math.abs(sum / vectors.wetGasInPlaceScf[t] - 1)).toBeLessThan(1e-14);
    }
  });

  it("recovers no more than there is", () => {
    for (let t = 0; t < TRIALS; t += 1) {
      expect(vectors.condensateRecoverableStb[t]).toBeLessThan(vectors.condensateInPlaceStb[t]);
      expect(vectors.salesGasScf[t]).toBeLessThan(vectors.dryGasInPlaceScf[t]);
    }
    const { condensateLeftStb, condensateInPlaceStb, condensateRecoverableStb } = summary.results;
    expect(condensateLeftStb.mean + condensateRecoverableStb.mean).toBeCloseTo(
      condensateInPlaceStb.mean,
      3,
    );
  });

  it.each(chain.cases.map((one) => [one.input.name, one] as const))(
    "gives the independently computed figures of a whole chain: %s",
    (_, { input, expected }) => {
      const [first, ...later] = input.stages;
      const tank = later.at(-1) ?? null;
      const second = later.length === 2 ? later[0] : null;
      const run = simulate(
        buildInputs(
          constants({
            ...input,
            condensateYieldStbPerMmscf: expected.condensateYieldStbPerMmscf,
            gasRecovery: 0.7,
            condensateRecovery: 0.4,
            salesGasFraction: 0.9,
          }),
          {
            correlations: [],
            depthFt: null,
            fluid: {
              basePressurePsia: input.basePressurePsia,
              primarySeparator: { pressurePsia: 800, temperatureDegF: 80, ...first },
              secondSeparator: second && { pressurePsia: 100, temperatureDegF: 75, gas: second },
              stockTankGas: tank,
              condensateApi: input.condensateApi,
              condensateMolecularWeight: input.condensateMolecularWeight,
              nitrogen: input.nitrogen,
              carbonDioxide: input.carbonDioxide,
              hydrogenSulphide: input.hydrogenSulphide,
              dewPointPsia: null,
            },
          },
        ),
        { trials: 100, seed: 1 },
      ).summary;
      for (const name of [
        "wetGasInPlaceScf",
        "dryGasInPlaceScf",
        "condensateInPlaceStb",
      ] as const) {
        expect(run.results[name].p50 / expected[name]).toBeCloseTo(1, 7);
        expect(run.deterministic[name] / expected[name]).toBeCloseTo(1, 7);
      }
      expect(run.derived.zFactor.p50).toBeCloseTo(expected.zFactor, 7);
      expect(run.derived.wellstreamGravity.p50).toBeCloseTo(expected.wellstreamGravity, 9);
      expect(
        run.results.condensateRecoverableStb.p50 / (0.4 * expected.condensateInPlaceStb),
      ).toBeCloseTo(1, 7);
      expect(run.results.salesGasScf.p50 / (0.63 * expected.dryGasInPlaceScf)).toBeCloseTo(1, 7);
    },
  );

  it(
    "has the closed form of a product of lognormals when only those vary",
    { timeout: 60_000 },
    () => {
      // ln(A h phi) is normal: the means and variances of the logarithms of the three add up.
      const one = simulate(buildInputs(oneAcreFoot, { correlations: [] }), {
        trials: 100,
        seed: 1,
      }).summary;
      const perUnit = one.deterministic.wetGasInPlaceScf / 0.1;
      const { summary: run } = simulate(
        buildInputs(
          {
            ...oneAcreFoot,
            areaAcres: { kind: "lognormalP90P10", p90: 1000, p10: 4000 },
            netThicknessFt: { kind: "lognormalP90P10", p90: 30, p10: 120 },
            porosity: { kind: "lognormalP90P10", p90: 0.12, p10: 0.2 },
          },
          { correlations: [] },
        ),
        { trials: 40_000, seed: 3 },
      );
      const ranges = [
        [1000, 4000],
        [30, 120],
        [0.12, 0.2],
      ];
      const mu = ranges.reduce(
        (sum, [p90, p10]) => sum + Math.log(p90 * p10) / 2,
        Math.log(perUnit),
      );
      const sigma = Math.sqrt(
        ranges.reduce(
          (sum, [p90, p10]) => sum + (Math.log(p10 / p90) / 2.5631031310892007) ** 2,
          0,
        ),
      );
      const closed = compileDistribution({ kind: "lognormal", mu, sigma });
      const result = run.results.wetGasInPlaceScf;
      const expected = { ...closed.range, mean: closed.mean };
      for (const level of ["p90", "p50", "p10", "mean"] as const) {
        expect(Math.abs(result[level] - expected[level])).toBeLessThan(
          3 * result.standardErrors[level],
        );
      }
      // Shares of the variance of the logarithm: 0.476, 0.476 and 0.065 of what A, h and phi give together.
      const share = (input: string) =>
        run.drivers.wetGasInPlaceScf.find((d) => d.input === input)?.shareOfSpread;
      expect(share("areaAcres")).toBeCloseTo(0.468, 1);
      expect(share("porosity")).toBeCloseTo(0.064, 1);
      expect(share("gasRecovery")).toBe(0);
    },
  );

  it("gives the sampled inputs the percentiles of their distributions", () => {
    const tied = new Set(inputs.correlations.flatMap(({ a, b }) => [a, b]));
    for (const name of inputNames) {
      const { range, mean } = compileDistribution(inputs.uncertain[name].distribution);
      // A Latin hypercube of n draws is within about 1 / n of each percentile; scores mixed from two are less even.
      const within = tied.has(name) ? 0.003 : 0.0005;
      for (const level of ["p90", "p50", "p10"] as const) {
        expect(Math.abs(summary.inputs[name][level] / range[level] - 1)).toBeLessThan(within);
      }
      expect(summary.inputs[name].mean / mean).toBeCloseTo(1, 3);
    }
  });

  it("gives the inputs the rank correlations asked for, and none otherwise", () => {
    const column = (name: InputName) => [...workspace.inputs[name]];
    const spearman = (a: InputName, b: InputName) => sampleRankCorrelation(column(a), column(b));
    expect(spearman("porosity", "waterSaturation")).toBeCloseTo(-0.6, 2);
    expect(Math.abs(spearman("porosity", "areaAcres"))).toBeLessThan(4 / Math.sqrt(TRIALS));
  });

  it("has swings on both sides of the deterministic case, for the inputs that matter", () => {
    const area = summary.drivers.wetGasInPlaceScf[0];
    expect(area.input).toBe("areaAcres");
    expect(area.swing.atP90).toBeLessThan(summary.deterministic.wetGasInPlaceScf);
    expect(area.swing.atP10).toBeGreaterThan(summary.deterministic.wetGasInPlaceScf);
    expect(summary.drivers.condensateRecoverableStb).toHaveLength(10);
  });

  it("gives the same bytes for the same inputs, seed and version, whatever ran before on its workspace", () => {
    const digest = (run: ReturnType<typeof simulate>) => {
      const hash = createHash("sha256").update(JSON.stringify(run.summary));
      for (const name of vectorNames) hash.update(new Uint8Array(run.vectors[name].buffer));
      return hash.digest("hex");
    };
    const fresh = digest(simulate(inputs, { trials: 1000, seed: 5 }));
    const reused = createWorkspace(1000);
    simulate(buildInputs({ areaAcres: { kind: "constant", value: 900 } }), {
      trials: 1000,
      seed: 9,
      workspace: reused,
    });
    expect(digest(simulate(inputs, { trials: 1000, seed: 5, workspace: reused }))).toBe(fresh);
    expect(digest(simulate(inputs, { trials: 1000, seed: 6 }))).not.toBe(fresh);
  });

  it("leaves the draws of other inputs alone when one changes", () => {
    const before = createWorkspace(500);
    const after = createWorkspace(500);
    simulate(inputs, { trials: 500, seed: 5, workspace: before });
    simulate(buildInputs({ areaAcres: { kind: "uniform", low: 500, high: 900 } }), {
      trials: 500,
      seed: 5,
      workspace: after,
    });
    for (const name of inputNames) {
      if (name === "areaAcres") expect(after.inputs[name]).not.toEqual(before.inputs[name]);
      else expect(after.inputs[name]).toEqual(before.inputs[name]);
    }
    expect(after.strata.areaAcres).toEqual(before.strata.areaAcres);
  });

  it(
    "states standard errors that hold a long run's percentiles, on the safe side",
    { timeout: 60_000 },
    () => {
      const truth = simulate(inputs, { trials: 100_000, seed: 1 }).summary.results
        .condensateRecoverableStb;
      let squares = 0;
      const seeds = 12;
      for (let seed = 100; seed < 100 + seeds; seed += 1) {
        const run = simulate(inputs, { trials: 2000, seed }).summary.results
          .condensateRecoverableStb;
        for (const level of ["p90", "p50", "p10", "mean"] as const) {
          squares += ((run[level] - truth[level]) / run.standardErrors[level]) ** 2;
        }
      }
      // Independent trials would give 1; a Latin hypercube gives less, never much more.
      expect(squares / (4 * seeds)).toBeLessThan(1.2);
    },
  );

  it.each([
    [
      { trials: 50, seed: 1 },
      "The number of trials is a whole number from 100 to 1,048,576; 50 is not.",
    ],
    [{ trials: 1000.5, seed: 1 }, "whole number from 100"],
    [{ trials: 1000, seed: -1 }, "The seed is a whole number, 0 or more; -1 is not."],
    [
      { trials: 1000, seed: 1, workspace: createWorkspace(200) },
      "The workspace was made for 200 trials, not for 1000.",
    ],
  ])("refuses options %#", (options, message) => {
    expect(() => simulate(inputs, options)).toThrow(message);
  });

  it("says when the trials are too few or the result too wide", () => {
    const wide = buildInputs({
      areaAcres: { kind: "lognormalP90P10", p90: 500, p10: 15_000 },
      netThicknessFt: { kind: "lognormalP90P10", p90: 30, p10: 160 },
    });
    const codes = simulate(wide, { trials: 200, seed: 1 }).summary.warnings.map(({ code }) => code);
    expect(codes).toContain("very_wide_result");
    expect(codes).toContain("few_trials");
    expect(summary.warnings.map(({ code }) => code)).not.toContain("very_wide_result");
  });

  it("refuses what is impossible with the path of the input", () => {
    try {
      simulate(buildInputs({ porosity: { kind: "constant", value: 18 } }), { seed: 1 });
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(DomainError);
      expect((error as DomainError).details.input).toBe("uncertain.porosity.value");
      expect((error as DomainError).message).toContain("Is it in per cent? Enter 0.18 for 18 %.");
    }
  });
});

describe("fillZFactors", () => {
  it("agrees with zFactor to 1e-8 over the range of the correlation", () => {
    const pressures: number[] = [];
    const temperatures: number[] = [];
    for (let ppr = 0.21; ppr < 31; ppr += 0.37) {
      for (let tpr = 1.06; tpr < 3.1; tpr += 0.043) {
        pressures.push(ppr);
        temperatures.push(tpr);
      }
    }
    const n = pressures.length;
    const out = new Float64Array(n);
    fillZFactors(Float64Array.from(pressures), Float64Array.from(temperatures), n, out);
    const worst = out.reduce(
      (most, z, i) => Math.max(most, Math.abs(z / zFactor(pressures[i], temperatures[i]) - 1)),
      0,
    );
    expect(worst).toBeLessThan(1e-8);
  });

  it("marks a state without a z factor for its caller to refuse", () => {
    const out = new Float64Array(2);
    fillZFactors(Float64Array.from([-1, NaN]), Float64Array.from([1.5, 1.5]), 2, out);
    expect([...out]).toEqual([NaN, NaN]);
  });
});
