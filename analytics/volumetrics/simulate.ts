import { DomainError } from "../errors";
import { rankByCounting } from "../numerics/order-statistics";
import { recoveryWarnings } from "../recovery/plan-warnings";
import { planInputNames } from "../recovery/recovery-plan-schema";
import { refusals, summariseRecovery, type RefusalName } from "../recovery/recovery-totals";
import { createRecoveryColumns } from "../recovery/trial-recovery";
import type { CompiledDistribution } from "../uncertainty/distribution";
import type { SamplingMethod } from "../uncertainty/sampling-schema";
import { rankDrivers, swingColumns } from "../uncertainty/drivers";
import { spearman } from "../uncertainty/rank-correlation";
import { rangeOfSample, summariseSample } from "../uncertainty/summary";
import type { Warning } from "../warnings";
import { warningsOf } from "./check-inputs";
import { inputNames, type EstimateInputs } from "./inputs-schema";
import { prepareInputs, type PreparedInputs } from "./prepare-inputs";
import {
  derivedNames,
  recoveryNames,
  resultNames,
  vectorNames,
  type DerivedName,
  type Driver,
  type DriverName,
  type QuantitySummary,
  type ResultName,
  type SimulationSummary,
  type TrialVectors,
} from "./results-schema";
import { sampleInputs, samplePlanInputs } from "./sample-inputs";
import { checkTrials, DEFAULT_TRIALS } from "./trial-counts";
import {
  evaluateTrials,
  fluidConstants,
  type EvaluatedTrials,
  type FluidConstants,
  type TrialColumns,
} from "./trials";
import { columns, createWorkspace, planWorkspace, type SimulationWorkspace } from "./workspace";

/** Changes whenever the same inputs and seed would give other numbers. Stored with every result. */
export const ENGINE_VERSION = "1.0.0";

export { DEFAULT_SAMPLING, DEFAULT_TRIALS } from "./trial-counts";

export interface SimulationOptions {
  /** 100 to 1,048,576; `DEFAULT_TRIALS` unless given */
  trials?: number;
  /** a Latin hypercube unless given, because that takes any number of trials */
  sampling?: SamplingMethod;
  /** a safe integer, 0 or more. The same seed, inputs and engine version give the same bytes */
  seed: number;
  /** made by `createWorkspace(trials)`, to reuse between runs on one thread */
  workspace?: SimulationWorkspace;
}

export interface Simulation {
  summary: SimulationSummary;
  /** freshly made, so a thread can transfer them */
  vectors: TrialVectors;
}

/**
 * The range of gas and condensate in place and recoverable of one reservoir, by Monte Carlo: the ten inputs as a
 * Latin hypercube with the rank correlations asked for, the in-place equations on every trial, percentiles of what
 * comes out.
 *
 * In every trial dry gas plus vapour equivalent times condensate equals wet gas, to rounding.
 *
 * @param inputs   see `estimateInputsSchema`
 * @throws {DomainError} when an input is impossible, or a trial has no possible result (with the number of such
 *   trials); never a NaN
 */
export function simulate(inputs: EstimateInputs, options: SimulationOptions): Simulation {
  const { seed } = options;
  const { trials = DEFAULT_TRIALS, sampling = "latinHypercube" } = options;
  checkTrials(trials, sampling);
  const workspace = options.workspace ?? createWorkspace(trials);
  checkOptions(trials, seed, workspace);
  const prepared = prepareInputs(inputs);
  const fluid = fluidConstants(prepared.wellstream, inputs.fluid);

  const sampled = sampleInputs(prepared.distributions, prepared.blocks, seed, workspace);
  const sampledByPlan = prepared.plan && samplePlanInputs(prepared.plan, seed, workspace);
  const plan = prepared.plan && { compiled: prepared.plan, ...planWorkspace(workspace) };
  const evaluated = evaluateTrials(
    fluid,
    workspace.inputs,
    plan,
    trials,
    workspace,
    workspace.outputs,
  );
  refuseImpossible(evaluated, trials);

  const swings = evaluateSwings(prepared, fluid);
  const results = columns(resultNames, (name) =>
    summariseSample(workspace.outputs[name], trials, workspace.counting),
  );
  const recoveries = columns(recoveryNames, (name) =>
    plan ? rangeOfSample(plan.columns[name], trials, workspace.counting) : sampled[name],
  );
  return {
    summary: {
      engineVersion: ENGINE_VERSION,
      seed,
      trials,
      sampling,
      inputs: { ...sampled, ...recoveries },
      results,
      derived: {
        ...columns(derivedNames, (name) =>
          rangeOfSample(workspace.outputs[name], trials, workspace.counting),
        ),
        ...recoveries,
      },
      drivers: {
        wetGasInPlaceScf: driversOf("wetGasInPlaceScf", swings, prepared, workspace),
        condensateRecoverableStb: driversOf(
          "condensateRecoverableStb",
          swings,
          prepared,
          workspace,
        ),
      },
      deterministic: columns(resultNames, (name) => swings[name][0]),
      recovery:
        plan && evaluated.recovery
          ? summariseRecovery(plan.compiled, evaluated.recovery, sampledByPlan ?? {})
          : null,
      warnings: [
        ...warningsOf(inputs, prepared),
        ...(plan ? recoveryWarnings(plan.compiled, recoveries) : []),
        ...resultWarnings(results),
      ],
    },
    vectors: columns(vectorNames, (name) => workspace.outputs[name].slice(0, trials)),
  };
}

function checkOptions(trials: number, seed: number, workspace: SimulationWorkspace): void {
  if (!Number.isSafeInteger(seed) || seed < 0) {
    throw new DomainError(`The seed is a whole number, 0 or more; ${seed} is not.`, {
      input: "seed",
      value: seed,
    });
  }
  if (workspace.trials !== trials) {
    throw new DomainError(
      `The workspace was made for ${workspace.trials} trials, not for ${trials}.`,
      { input: "workspace", value: workspace.trials },
    );
  }
}

function refuseImpossible({ impossible, recovery }: EvaluatedTrials, trials: number): void {
  if (impossible > 0) {
    throw new DomainError(
      `${impossible} of ${trials} trials have no possible result: their pressure, temperature and gravity lie where the ` +
        "z factor has no value. Narrow the ranges of pressure, temperature or condensate yield.",
      { input: "uncertain", value: impossible, trials },
    );
  }
  const [refusal] = Object.entries(recovery?.refused ?? {}).sort(([, a], [, b]) => b - a);
  if (!refusal) return;
  const [name, count] = refusal;
  const { input, message } = refusals[name as RefusalName];
  throw new DomainError(`${count} of ${trials} trials ${message}`, { input, value: count, trials });
}

/** A driver's name with its distribution and, over the trials, its ranks. */
interface DriverInput {
  readonly name: DriverName;
  readonly distribution: CompiledDistribution;
  readonly ranks: (workspace: SimulationWorkspace) => Uint32Array;
}

/** The sampled inputs that count, then those of the plan. */
function driverInputs({ inputNames: names, distributions, plan }: PreparedInputs): DriverInput[] {
  const ofPlan = (plan?.inputNames ?? []).flatMap((name): DriverInput[] => {
    const distribution = plan?.distributions[name];
    if (!distribution) return [];
    return [
      { name, distribution, ranks: (workspace) => planWorkspace(workspace).inputRanks[name] },
    ];
  });
  return [
    ...names.map((name) => ({
      name,
      distribution: distributions[name],
      ranks: ({ inputRanks }: SimulationWorkspace) => inputRanks[name],
    })),
    ...ofPlan,
  ];
}

/** Results with every input at P50 (row 0), and with one at a time at P90 and P10. */
function evaluateSwings(
  prepared: PreparedInputs,
  fluid: FluidConstants,
): TrialColumns<ResultName | DerivedName> {
  const drivers = driverInputs(prepared);
  const cases = swingColumns(drivers.map(({ distribution }) => distribution.range));
  const rows = cases[0].length;
  const row = () => new Float64Array(rows);
  const column = (name: DriverName) =>
    cases[drivers.findIndex((driver) => driver.name === name)] ?? row();
  const outputs = columns([...resultNames, ...derivedNames], row);
  const scratch = { reducedPressure: row(), reducedTemperature: row() };
  const plan = prepared.plan && {
    compiled: prepared.plan,
    inputs: columns(planInputNames, column),
    columns: createRecoveryColumns(rows),
  };
  const inputs = columns(inputNames, column);
  refuseImpossible(evaluateTrials(fluid, inputs, plan, rows, scratch, outputs), rows);
  return outputs;
}

function driversOf(
  result: ResultName,
  swings: TrialColumns<ResultName | DerivedName>,
  prepared: PreparedInputs,
  workspace: SimulationWorkspace,
): Driver[] {
  const { outputs, counting, resultRanks, order, trials } = workspace;
  rankByCounting(outputs[result], trials, counting, resultRanks, order);
  return rankDrivers(
    driverInputs(prepared).map(({ name, distribution, ranks }, i) => ({
      input: name,
      // The ranks of a constant are an arbitrary order, not a rank.
      rankCorrelation:
        distribution.standardDeviation === 0 ? 0 : spearman(ranks(workspace), resultRanks, trials),
      swing: { atP90: swings[result][1 + 2 * i], atP10: swings[result][2 + 2 * i] },
    })),
  );
}

/** A P10 this many times the P90 is beyond what one reservoir's data support. Common practice, no source. */
const WIDEST_RATIO = 20;
/** Relative standard error of a P90 or P10 from which more trials are worth their time. */
const COARSEST_ERROR = 0.03;

function resultWarnings(results: Record<ResultName, QuantitySummary>): Warning[] {
  const warnings: Warning[] = [];
  const { p90, p10 } = results.wetGasInPlaceScf;
  if (p10 > WIDEST_RATIO * p90) {
    warnings.push({
      code: "very_wide_result",
      severity: "warning",
      message:
        `P10 of wet gas in place is ${Math.round(p10 / p90)} times its P90; above ${WIDEST_RATIO} times the inputs ` +
        "probably mix scenarios that should be estimated apart.",
    });
  }
  const coarse = Object.values(results).some(
    ({ p90: low, p10: high, standardErrors }) =>
      standardErrors.p90 > COARSEST_ERROR * low || standardErrors.p10 > COARSEST_ERROR * high,
  );
  if (coarse) {
    warnings.push({
      code: "few_trials",
      severity: "warning",
      message:
        "The sampling error of P90 or P10 is above 3 % of its value. Run more trials before quoting it.",
    });
  }
  return warnings;
}
