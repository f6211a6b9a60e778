import { DomainError } from "../errors";
import { gradesOfCounted } from "../numerics/order-statistics";
import type { CompiledPlan } from "../recovery/compile-plan";
import { recoveryWarnings } from "../recovery/plan-warnings";
import { planInputNames } from "../recovery/recovery-plan-schema";
import { refusals, summariseRecovery, type RefusalName } from "../recovery/recovery-totals";
import { createRecoveryColumns } from "../recovery/trial-recovery";
import { gradeCorrelation, rankDrivers, swingColumns } from "../uncertainty/drivers";
import type { SamplingMethod } from "../uncertainty/sampling-schema";
import { rangeOfSample, summariseSample, type SampleRange } from "../uncertainty/summary";
import type { Warning } from "../warnings";
import { warningsOf } from "./check-inputs";
import { drawTrials, type DrawnTrials } from "./draw-trials";
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
import { sampledInputs } from "./sample-inputs";
import { checkTrials, DEFAULT_TRIALS } from "./trial-counts";
import {
  evaluateTrials,
  fluidConstants,
  type EvaluatedTrials,
  type FluidConstants,
  type TrialColumns,
} from "./trials";
import {
  columns,
  createWorkspace,
  planWorkspace,
  strataOf,
  type SimulationWorkspace,
} from "./workspace";

/** Changes whenever the same inputs and seed would give other numbers. Stored with every result. */
export const ENGINE_VERSION = "2.0.0";

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
 * The range of gas and condensate in place and recoverable of one reservoir, by Monte Carlo: the ten inputs as Latin
 * hypercubes or scrambled Sobol points with the rank correlations asked for, in replicates that are independent of each
 * other; the in-place equations on every trial; percentiles of what comes out, with standard errors from the replicates.
 *
 * In every trial dry gas plus vapour equivalent times condensate equals wet gas, to rounding.
 *
 * @param inputs   see `estimateInputsSchema`
 * @throws {DomainError} when an input is impossible, or a trial has no possible result (with the number of such
 *   trials); never a NaN
 */
export function simulate(inputs: EstimateInputs, options: SimulationOptions): Simulation {
  const { trials = DEFAULT_TRIALS, sampling = "latinHypercube", seed } = options;
  checkTrials(trials, sampling);
  const workspace = options.workspace ?? createWorkspace(trials);
  checkOptions(trials, seed, workspace);
  const prepared = prepareInputs(inputs);
  const fluid = fluidConstants(prepared.wellstream, inputs.fluid);
  const drawn = drawTrials(prepared, fluid, { seed, sampling }, workspace);
  refuseImpossible(drawn, trials);

  const swings = evaluateSwings(prepared, fluid);
  const { plan } = prepared;
  const { outputs, pooled, starts } = workspace;
  const drivers: Partial<Record<ResultName, Driver[]>> = {};
  const results = columns(resultNames, (name) => {
    const summary = summariseSample(outputs[name], trials, pooled, starts);
    if (isDriven(name)) drivers[name] = driversOf(name, swings, prepared, workspace);
    return summary;
  });
  const recoveries = columns(recoveryNames, (name) =>
    plan
      ? rangeOfSample(planWorkspace(workspace).recoveries[name], trials, pooled)
      : sampledRange(drawn, name),
  );
  return {
    summary: {
      engineVersion: ENGINE_VERSION,
      seed,
      trials,
      sampling,
      replicates: workspace.replicates.length,
      inputs: { ...columns(inputNames, (name) => sampledRange(drawn, name)), ...recoveries },
      results,
      derived: {
        ...columns(derivedNames, (name) => rangeOfSample(outputs[name], trials, pooled)),
        ...recoveries,
      },
      drivers: columns(drivenNames, (name) => drivers[name] ?? []),
      deterministic: columns(resultNames, (name) => swings[name][0]),
      recovery:
        plan && drawn.recovery
          ? summariseRecovery(plan, drawn.recovery, planRanges(plan, drawn))
          : null,
      warnings: [
        ...warningsOf(inputs, prepared),
        ...(plan ? recoveryWarnings(plan, recoveries) : []),
        ...resultWarnings(results),
      ],
    },
    vectors: columns(vectorNames, (name) => outputs[name].slice(0, trials)),
  };
}

/** Results whose spread is traced to the inputs. */
const drivenNames = ["wetGasInPlaceScf", "condensateRecoverableStb"] as const;
type DrivenName = (typeof drivenNames)[number];

function isDriven(name: ResultName): name is DrivenName {
  return drivenNames.some((driven) => driven === name);
}

/** Inputs that a recovery plan replaces are not drawn; their place is taken by what it worked out. */
function sampledRange({ sampler }: DrawnTrials, name: DriverName): SampleRange {
  return sampler.rangeOf(name) ?? { p90: 0, p50: 0, p10: 0, mean: 0 };
}

function planRanges(plan: CompiledPlan, drawn: DrawnTrials) {
  return Object.fromEntries(plan.inputNames.map((name) => [name, sampledRange(drawn, name)]));
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

/** Results with every input at P50 (row 0), and with one at a time at P90 and P10. */
function evaluateSwings(
  prepared: PreparedInputs,
  fluid: FluidConstants,
): TrialColumns<ResultName | DerivedName> {
  const inputs = sampledInputs(prepared);
  const cases = swingColumns(inputs.map(({ distribution }) => distribution.range));
  const rows = cases[0].length;
  const row = () => new Float64Array(rows);
  const column = (name: DriverName) => cases[inputs.findIndex((one) => one.name === name)] ?? row();
  const outputs = columns([...resultNames, ...derivedNames], row);
  const scratch = { reducedPressure: row(), reducedTemperature: row() };
  const plan = prepared.plan && {
    compiled: prepared.plan,
    inputs: columns(planInputNames, column),
    columns: createRecoveryColumns(rows),
  };
  const sampled = columns(inputNames, column);
  refuseImpossible(evaluateTrials(fluid, sampled, plan, rows, scratch, outputs), rows);
  return outputs;
}

/** Of the result that was summarised last, whose counts the workspace still holds. */
function driversOf(
  result: DrivenName,
  swings: TrialColumns<ResultName | DerivedName>,
  prepared: PreparedInputs,
  workspace: SimulationWorkspace,
): Driver[] {
  const { outputs, pooled, grades, starts, trials } = workspace;
  gradesOfCounted(outputs[result], trials, pooled, grades);
  return rankDrivers(
    sampledInputs(prepared).map(({ name, distribution }, i) => ({
      input: name,
      // A constant has no rank.
      rankCorrelation:
        distribution.standardDeviation === 0
          ? 0
          : gradeCorrelation(strataOf(workspace, name), grades, starts),
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
