import { DomainError } from "../errors";
import { rankByCounting } from "../numerics/order-statistics";
import { rankDrivers, swingColumns } from "../uncertainty/drivers";
import { spearman } from "../uncertainty/rank-correlation";
import { rangeOfSample, summariseSample } from "../uncertainty/summary";
import type { Warning } from "../warnings";
import { warningsOf } from "./check-inputs";
import { inputNames, type EstimateInputs } from "./inputs-schema";
import { prepareInputs, type PreparedInputs } from "./prepare-inputs";
import {
  derivedNames,
  resultNames,
  vectorNames,
  type DerivedName,
  type Driver,
  type QuantitySummary,
  type ResultName,
  type SimulationSummary,
  type TrialVectors,
} from "./results-schema";
import { sampleInputs } from "./sample-inputs";
import { evaluateTrials, fluidConstants, type FluidConstants, type TrialColumns } from "./trials";
import { columns, createWorkspace, type SimulationWorkspace } from "./workspace";

/** Changes whenever the same inputs and seed would give other numbers. Stored with every result. */
export const ENGINE_VERSION = "1.0.0";

export const DEFAULT_TRIALS = 10_000;

export interface SimulationOptions {
  /** 100 to 1,000,000; 10,000 unless given */
  trials?: number;
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
  const trials = options.trials ?? DEFAULT_TRIALS;
  const workspace = options.workspace ?? createWorkspace(trials);
  checkOptions(trials, seed, workspace);
  const prepared = prepareInputs(inputs);
  const fluid = fluidConstants(prepared.wellstream, inputs.fluid);

  const sampled = sampleInputs(prepared.distributions, prepared.blocks, seed, workspace);
  const impossible = evaluateTrials(fluid, workspace.inputs, trials, workspace, workspace.outputs);
  if (impossible > 0) throw impossibleTrials(impossible, trials);

  const swings = evaluateSwings(prepared, fluid);
  const results = columns(resultNames, (name) =>
    summariseSample(workspace.outputs[name], trials, workspace.counting),
  );
  return {
    summary: {
      engineVersion: ENGINE_VERSION,
      seed,
      trials,
      inputs: sampled,
      results,
      derived: columns(derivedNames, (name) =>
        rangeOfSample(workspace.outputs[name], trials, workspace.counting),
      ),
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
      recovery: null,
      warnings: [...warningsOf(inputs, prepared), ...resultWarnings(results)],
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

function impossibleTrials(count: number, trials: number): DomainError {
  return new DomainError(
    `${count} of ${trials} trials have no possible result: their pressure, temperature and gravity lie where the ` +
      "z factor has no value. Narrow the ranges of pressure, temperature or condensate yield.",
    { input: "uncertain", value: count, trials },
  );
}

/** Results with every input at P50 (row 0), and with one at a time at P90 and P10. */
function evaluateSwings(
  { distributions }: PreparedInputs,
  fluid: FluidConstants,
): TrialColumns<ResultName | DerivedName> {
  const cases = swingColumns(inputNames.map((name) => distributions[name].range));
  const rows = cases[0].length;
  const row = () => new Float64Array(rows);
  const outputs = columns([...resultNames, ...derivedNames], row);
  const inputs = columns(inputNames, (name) => cases[inputNames.indexOf(name)]);
  const scratch = { reducedPressure: row(), reducedTemperature: row() };
  const impossible = evaluateTrials(fluid, inputs, rows, scratch, outputs);
  if (impossible > 0) throw impossibleTrials(impossible, rows);
  return outputs;
}

function driversOf(
  result: ResultName,
  swings: TrialColumns<ResultName | DerivedName>,
  { distributions }: PreparedInputs,
  workspace: SimulationWorkspace,
): Driver[] {
  const { outputs, counting, resultRanks, order, inputRanks, trials } = workspace;
  rankByCounting(outputs[result], trials, counting, resultRanks, order);
  return rankDrivers(
    inputNames.map((input, i) => ({
      input,
      // The ranks of a constant are an arbitrary order, not a rank.
      rankCorrelation:
        distributions[input].standardDeviation === 0
          ? 0
          : spearman(inputRanks[input], resultRanks, trials),
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
