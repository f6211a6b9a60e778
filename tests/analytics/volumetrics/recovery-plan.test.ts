import { createHash } from "node:crypto";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import type { RecoveryPlan } from "@/analytics/recovery/recovery-plan-schema";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { checkInputs } from "@/analytics/volumetrics/check-inputs";
import {
  estimateInputsSchema,
  inputNames,
  type EstimateInputs,
  type InputName,
} from "@/analytics/volumetrics/inputs-schema";
import { simulationSummarySchema, vectorNames } from "@/analytics/volumetrics/results-schema";
import { ENGINE_VERSION, simulate } from "@/analytics/volumetrics/simulate";
import { createWorkspace } from "@/analytics/volumetrics/workspace";
import { buildCycling, buildPlan, constant, psia } from "../recovery/published-curve";
import { buildInputs } from "./estimate-inputs";

const uncertain = (distribution: Distribution) => ({ distribution, source: "" });

/** A reservoir of the published fluid. */
function reservoir(
  plan: RecoveryPlan | null,
  distributions: Partial<Record<InputName, Distribution>> = {},
  changes: Partial<EstimateInputs> = {},
): EstimateInputs {
  return buildInputs(
    {
      pressurePsia: { kind: "normal", mean: 4500, standardDeviation: 120 },
      temperatureDegF: { kind: "normal", mean: 200, standardDeviation: 3 },
      condensateYieldStbPerMmscf: { kind: "uniform", low: 130, high: 165 },
      ...distributions,
    },
    { depthFt: null, recoveryPlan: plan, ...changes },
  );
}

const spread = buildPlan({
  abandonmentPressurePsia: uncertain({ kind: "uniform", low: 750, high: 1300 }),
  condensateCurveFactor: uncertain({ kind: "normalP90P10", p90: 0.85, p10: 1.15 }),
});
const cycled = buildPlan({
  ...spread,
  concept: "cycling",
  cycling: buildCycling({
    sweepEfficiency: uncertain({ kind: "pert", low: 0.35, mode: 0.55, high: 0.75 }),
    displacementEfficiency: uncertain({ kind: "uniform", low: 0.85, high: 1 }),
  }),
});

const codes = (inputs: EstimateInputs) => checkInputs(inputs).map(({ code }) => code);

function refusal(run: () => unknown): DomainError {
  try {
    run();
  } catch (error) {
    if (error instanceof DomainError) return error;
  }
  throw new Error("The plan was accepted.");
}

describe("simulate without a recovery plan", () => {
  it("gives the bytes that engine 2.0.0 gave when it was new", () => {
    const { summary, vectors } = simulate(buildInputs(), { trials: 1000, seed: 5 });
    const bytes = createHash("sha256");
    for (const name of vectorNames) bytes.update(new Uint8Array(vectors[name].buffer));
    // Another digest needs another version.
    expect(ENGINE_VERSION).toBe("2.0.0");
    expect(bytes.digest("hex")).toBe(
      "c948917c4b0d05250e626dd2171650db31e5ea1d27c598751abd0a108f4022c6",
    );
    const { engineVersion, inputs, results, drivers, deterministic, warnings } = summary;
    const figures = { engineVersion, inputs, results, drivers, deterministic, warnings };
    expect(createHash("sha256").update(JSON.stringify(figures)).digest("hex")).toBe(
      "aa579da03ab497e688f995371cf3c3f8374bba670bbdbb1ab8f0e84451df71de",
    );
  });

  it("is what inputs stored before plans get, and their summaries still parse", () => {
    const { recoveryPlan, ...stored } = buildInputs();
    expect(recoveryPlan).toBeNull();
    expect(estimateInputsSchema.parse(stored)).toEqual(buildInputs());
    const { summary } = simulate(stored as EstimateInputs, { trials: 100, seed: 1 });
    const { recovery, ...before } = summary;
    expect(recovery).toBeNull();
    const { gasRecovery, condensateRecovery, ...derived } = before.derived;
    expect(gasRecovery).toEqual(before.inputs.gasRecovery);
    expect(condensateRecovery).toEqual(before.inputs.condensateRecovery);
    expect(simulationSummarySchema.parse({ ...before, derived }).recovery).toBeNull();
  });
});

describe("simulate with a recovery plan", () => {
  const options = { trials: 2000, seed: 3 };
  const depletion = simulate(reservoir(spread), options);
  const cycling = simulate(reservoir(cycled), options);

  it.each([
    ["depletion", depletion],
    ["cycling", cycling],
  ])("returns a summary of %s that its schema accepts, and that adds up", (concept, run) => {
    const { summary } = run;
    expect(simulationSummarySchema.parse(summary)).toEqual(summary);
    const { recovery, results, derived, inputs } = summary;
    if (!recovery) throw new Error("no recovery");
    expect(recovery).toMatchObject({ concept, route: "laboratory", saturatedShare: 0 });
    const { toTank, leftInRock, leftInGas } = recovery.shares;
    expect(toTank + leftInRock + leftInGas).toBeCloseTo(1, 12);
    expect(toTank).toBeCloseTo(
      results.condensateRecoverableStb.mean / results.condensateInPlaceStb.mean,
      12,
    );
    const gas = recovery.phases.reduce((sum, { gasShare }) => sum + gasShare, 0);
    // Sales take a fraction of it that is independent: the mean of the product is near the product of the means.
    expect(
      results.salesGasScf.mean / (results.dryGasInPlaceScf.mean * inputs.salesGasFraction.mean),
    ).toBeCloseTo(gas, 3);
    expect(inputs.gasRecovery).toEqual(derived.gasRecovery);
    expect(derived.condensateRecovery?.p50).toBeCloseTo(toTank, 1);
  });

  it("closes the gas balance of cycling: what is injected was produced or bought", () => {
    const balance = cycling.summary.recovery?.gasBalance;
    if (!balance) throw new Error("no balance");
    const { injectedScf, producedWhileCyclingScf, fuelScf, makeUpScf } = balance;
    const sold =
      (cycling.summary.recovery?.phases.find(({ name }) => name === "cycling")?.gasShare ?? 0) *
      cycling.summary.results.dryGasInPlaceScf.mean;
    expect((producedWhileCyclingScf - fuelScf - injectedScf) / sold).toBeCloseTo(1, 9);
    expect(makeUpScf).toBeGreaterThanOrEqual(-sold - 1);
    expect(depletion.summary.recovery?.gasBalance).toBeNull();
  });

  it("draws the ten inputs as without a plan, and the plan's from streams of their own", () => {
    const workspace = createWorkspace(500);
    const draws = (plan: RecoveryPlan | null) => {
      simulate(reservoir(plan), { trials: 500, seed: 5, workspace });
      return {
        inputs: inputNames.map((name) => workspace.inputs[name].slice()),
        ranks: workspace.plan?.strata.abandonmentPressurePsia.slice(),
      };
    };
    const without = draws(null);
    const first = draws(spread);
    const second = draws(cycled);
    inputNames.forEach((name, i) => {
      if (name === "gasRecovery" || name === "condensateRecovery") return;
      expect(first.inputs[i]).toEqual(without.inputs[i]);
      expect(second.inputs[i]).toEqual(without.inputs[i]);
    });
    expect(second.ranks).toEqual(first.ranks);
  });

  it("names the plan's inputs among the drivers, in the place of the two recoveries", () => {
    const names = cycling.summary.drivers.condensateRecoverableStb.map(({ input }) => input);
    expect(names).toHaveLength(12);
    expect(names).toContain("sweepEfficiency");
    expect(names).not.toContain("gasRecovery");
    expect(names).not.toContain("condensateRecovery");
    const abandonment = depletion.summary.drivers.condensateRecoverableStb.find(
      ({ input }) => input === "abandonmentPressurePsia",
    );
    // Higher abandonment, less condensate.
    expect(abandonment?.rankCorrelation).toBeLessThan(0);
    expect(abandonment?.swing.atP10).toBeLessThan(abandonment?.swing.atP90 ?? 0);
    expect(Object.keys(depletion.summary.recovery?.inputs ?? {})).toEqual([
      "abandonmentPressurePsia",
      "condensateCurveFactor",
    ]);
  });

  it("does not look at the two recoveries it replaces, nor at their correlations", () => {
    const run = simulate(
      reservoir(
        spread,
        { gasRecovery: { kind: "constant", value: 3 } },
        { correlations: [{ a: "gasRecovery", b: "condensateRecovery", rank: 0.9 }] },
      ),
      options,
    ).summary;
    expect(run.results.salesGasScf).toEqual(
      simulate(reservoir(spread, {}, { correlations: [] }), options).summary.results.salesGasScf,
    );
    expect(run.warnings).toContainEqual({
      code: "correlation_without_effect",
      severity: "warning",
      input: "correlations",
      message: "The gas recovery follows from the recovery plan, so its correlation has no effect.",
    });
    expect(run.warnings.filter(({ input }) => input === "uncertain.gasRecovery")).toEqual([]);
  });

  it("gives the same bytes for the same inputs, whatever ran before on its workspace", () => {
    const workspace = createWorkspace(300);
    const run = (plan: RecoveryPlan | null) =>
      JSON.stringify(simulate(reservoir(plan), { trials: 300, seed: 5, workspace }).summary);
    const first = run(cycled);
    run(null);
    run(spread);
    expect(run(cycled)).toBe(first);
  });

  it.each<[string, EstimateInputs, string, string]>([
    [
      "an abandonment pressure below the end of the curve",
      reservoir(buildPlan({ abandonmentPressurePsia: constant(500) })),
      "recoveryPlan.abandonmentPressurePsia.value",
      "The abandonment pressure cannot be 500 psia: the depletion curve ends at 714.7 psia. Raise it, or extend the " +
        "depletion study to lower pressures.",
    ],
    [
      "one that reaches below it",
      reservoir(
        buildPlan({
          abandonmentPressurePsia: uncertain({ kind: "uniform", low: 600, high: 1100 }),
        }),
      ),
      "recoveryPlan.abandonmentPressurePsia.minimum",
      "would be below 714.7 psia with a chance of 23 %, but the depletion curve ends at 714.7 psia. Give it a minimum " +
        "of 714.7 or a narrower range.",
    ],
    [
      "one above the dew point",
      reservoir(buildPlan({ abandonmentPressurePsia: constant(4000) })),
      "recoveryPlan.abandonmentPressurePsia.value",
      "worked out for abandonment below it",
    ],
    [
      "cycling without its figures",
      reservoir(buildPlan({ concept: "cycling" })),
      "recoveryPlan.cycling",
      "Cycling needs its pressure",
    ],
    [
      "cycling with water influx",
      reservoir({
        ...cycled,
        waterDrive: { kind: "influx", invadedFraction: 0.2, trappedGasSaturation: 0.3 },
      }),
      "recoveryPlan.waterDrive.kind",
      "is not modelled",
    ],
    [
      "more swept than injected",
      reservoir({ ...cycled, cycling: buildCycling({ injectedPoreVolumes: 0.3 }) }),
      "recoveryPlan.cycling.injectedPoreVolumes",
      "0.3 pore volumes of injected gas cannot displace 0.54 of one.",
    ],
    [
      "a sweep above one",
      reservoir({ ...cycled, cycling: buildCycling({ sweepEfficiency: constant(60) }) }),
      "recoveryPlan.cycling.sweepEfficiency.value",
      "Is it in per cent? Enter 0.6 for 60 %.",
    ],
    [
      "a band of saturations upside down",
      reservoir(buildPlan({ criticalSaturation: { low: 0.3, high: 0.2 } })),
      "recoveryPlan.criticalSaturation.low",
      "runs from 0.3 to 0.2",
    ],
  ])("refuses %s before any trial", (_, inputs, input, message) => {
    const error = refusal(() => checkInputs(inputs));
    expect(error.message).toContain(message);
    expect(error.details.input).toBe(input);
  });

  it.each<[string, EstimateInputs, string, RegExp]>([
    [
      "abandoned above their initial pressure",
      reservoir(
        buildPlan({
          abandonmentPressurePsia: uncertain({ kind: "uniform", low: 800, high: 1100 }),
        }),
        { pressurePsia: { kind: "uniform", low: 900, high: 3000 } },
      ),
      "recoveryPlan.abandonmentPressurePsia",
      /^\d+ of 2000 trials are abandoned above their initial pressure\./,
    ],
    [
      "that recover more than there is",
      reservoir({
        ...buildPlan(),
        condensateCurveFactor: uncertain({ kind: "uniform", low: 0.5, high: 3 }),
        curve: {
          ...buildPlan().curve,
          points: buildPlan().curve.points.map((point) => ({
            ...point,
            condensateProduced: 0.9 * point.gasProduced,
            condensateInGas: 0.9 * (1 - point.gasProduced),
            producingYieldStbPerMmscf: 148,
          })),
        },
      }),
      "recoveryPlan.condensateCurveFactor",
      /^\d+ of 2000 trials recover more condensate than there is/,
    ],
    [
      "whose pressure falls below abandonment while gas goes back",
      reservoir({
        ...cycled,
        cycling: buildCycling({
          pressure: "declining",
          fuelFraction: 0.45,
          injectedPoreVolumes: 1.2,
        }),
      }),
      "recoveryPlan.cycling.injectedPoreVolumes",
      /trials fall below their abandonment pressure, or past the end of the curve/,
    ],
  ])("refuses trials %s, with their number", (_, inputs, input, message) => {
    const error = refusal(() => simulate(inputs, options));
    expect(error.message).toMatch(message);
    expect(error.details.input).toBe(input);
  });

  it.each<[string, EstimateInputs]>([
    ["untuned_recovery", withRoute("untunedEquationOfState")],
    ["correlation_recovery", withRoute("correlation")],
    [
      "doubtful_curve",
      reservoir({
        ...spread,
        curve: { ...spread.curve, doubts: ["Components balance: propane is created."] },
      }),
    ],
    [
      "saturated_trials",
      reservoir(spread, { pressurePsia: { kind: "uniform", low: 3000, high: 4000 } }),
    ],
    [
      "plan_temperature_differs",
      reservoir(spread, { temperatureDegF: { kind: "constant", value: 240 } }),
    ],
    [
      "plan_yield_differs",
      reservoir(spread, { condensateYieldStbPerMmscf: { kind: "uniform", low: 60, high: 90 } }),
    ],
    ["plan_dew_point_differs", reservoir(spread)],
    [
      "dropout_reaches_critical_saturation",
      reservoir({ ...spread, criticalSaturation: { low: 0.1, high: 0.2 } }),
    ],
    [
      "cycling_below_dew_point",
      reservoir({ ...cycled, cycling: buildCycling({ pressurePsia: psia(3000) }) }),
    ],
    [
      "cycling_begins_at_once",
      reservoir({ ...cycled, cycling: buildCycling({ pressurePsia: 4500 }) }),
    ],
    ["unusual_value", reservoir({ ...cycled, cycling: buildCycling({ fuelFraction: 0.2 }) })],
  ])("warns of %s", (code, inputs) => {
    const found = checkInputs(inputs).find(
      (warning) => warning.code === code && warning.input?.startsWith("recoveryPlan."),
    );
    expect(found?.severity).toBe("warning");
  });

  function withRoute(route: RecoveryPlan["curve"]["route"]): EstimateInputs {
    return reservoir({ ...spread, curve: { ...spread.curve, route } });
  }

  it("has nothing to say about a measured curve of the same fluid", () => {
    const about = checkInputs(
      reservoir(spread, {}, { fluid: { ...buildInputs().fluid, dewPointPsia: psia(3428) } }),
    ).filter(({ input }) => input?.startsWith("recoveryPlan"));
    expect(about).toEqual([]);
    expect(codes(reservoir(spread))).not.toContain("saturated_trials");
  });

  it("counts the trials that begin below the dew point, as their warning says", () => {
    const inputs = reservoir(spread, { pressurePsia: { kind: "uniform", low: 3000, high: 4000 } });
    const { recovery, warnings } = simulate(inputs, options).summary;
    // (3442.7 - 3000) / 1000 of 125 trials is 55.3: each of 16 replicates has 55 or 56, their mean scatters by 0.00095.
    expect(Math.abs((recovery?.saturatedShare ?? 0) - 0.4427)).toBeLessThan(1 / 500);
    expect(warnings.find(({ code }) => code === "saturated_trials")?.message).toContain(
      "44 % of the trials",
    );
  });

  it("warns when condensate comes out above gas by depletion", () => {
    const optimistic = { ...spread, condensateCurveFactor: constant(2.9) };
    const wet = reservoir({
      ...optimistic,
      curve: {
        ...spread.curve,
        points: spread.curve.points.map((point) => ({
          ...point,
          condensateProduced: 0.34 * (point.condensateProduced / 0.2233),
        })),
      },
    });
    const { warnings } = simulate(wet, options).summary;
    expect(warnings.map(({ code }) => code)).toContain("condensate_recovery_above_gas");
  });
});
