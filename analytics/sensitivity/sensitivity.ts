import { createOrderWorkspace } from "../numerics/order-statistics";
import { planRanges } from "../recovery/plan-ranges";
import { planInputNames } from "../recovery/recovery-plan-schema";
import type { SamplingMethod } from "../uncertainty/sampling-schema";
import { inputNames, type EstimateInputs } from "../volumetrics/inputs-schema";
import { isRecovery } from "../volumetrics/prepare-inputs";
import type { DriverName, ResultName } from "../volumetrics/results-schema";
import { simulate } from "../volumetrics/simulate";
import { usualRanges } from "../volumetrics/usual-ranges";
import { createWorkspace, planWorkspace, type SimulationWorkspace } from "../volumetrics/workspace";
import { averageRanks } from "./average-ranks";
import { fillUniforms } from "./base-samples";
import { conditionalView, type RankedInput } from "./conditional";
import { estimateModel } from "./estimate-model";
import { valueOfKnowing } from "./knowing";
import { rankRegression } from "./rank-regression";
import { sensitivityParts, type Sensitivity, type SensitivityPart } from "./sensitivity-schema";
import { sobolIndices } from "./sobol-indices";

export interface SensitivityOptions<Part extends SensitivityPart = SensitivityPart> {
  /** with seed, trials and method of a revision, the trials looked at are that revision's */
  seed: number;
  trials: number;
  sampling: SamplingMethod;
  result: ResultName;
  /** cumulative probabilities of the result that the conditional view lies between */
  chosen: { from: number; to: number };
  /** what is wanted; all of it unless said */
  parts?: readonly Part[];
}

/** Trials of one replicate and replicates of the variance-based study: 8,192 base trials. */
const RUNS_PER_REPLICATE = 512;
const REPLICATES = 16;

/**
 * What drives one result of an estimate: rank regression, variance-based shares, what it is worth to know each input, and
 * what the trials between two chances have in common.
 *
 * All but the variance-based shares are read off the estimate's own trials; those need two independent samples of the
 * inputs, made from the same seed. Inputs without spread do not appear. A part that is not asked for takes no time: other
 * chosen trials need no second study of the variance.
 *
 * @throws {DomainError} as `simulate`, or when no trial lies between the two chances
 */
export function computeSensitivity<Part extends SensitivityPart = SensitivityPart>(
  inputs: EstimateInputs,
  options: SensitivityOptions<Part>,
): Pick<Sensitivity, "trials" | Part> {
  const { seed, trials, sampling, result, chosen, parts = sensitivityParts } = options;
  const workspace = createWorkspace(trials, { keepInputs: true });
  const { summary } = simulate(inputs, { seed, trials, sampling, workspace });
  const counting = createOrderWorkspace(trials);
  const values = workspace.outputs[result];
  const ranking = averageRanks(values, counting);
  const drivers = sampledColumns(inputs, workspace).flatMap(
    ({ name, values: column }): RankedInput<DriverName>[] =>
      column.some((value) => value !== column[0])
        ? [{ name, values: column, ranking: averageRanks(column, counting) }]
        : [],
  );
  const compute: { [Name in SensitivityPart]: () => Sensitivity[Name] } = {
    rankRegression: () =>
      rankRegression(
        drivers.map(({ name, ranking: { ranks } }) => ({ name, ranks })),
        ranking.ranks,
        labelsOf(inputs),
      ),
    varianceShares: () => varianceShares(inputs, result, seed),
    knowing() {
      const { p90, p10 } = summary.results[result];
      return drivers
        .map(({ name, values: column, ranking: order }) => ({
          input: name,
          ...valueOfKnowing(column, order, values, p10 - p90, workspace.starts),
        }))
        .sort((a, b) => b.varianceRemoved - a.varianceRemoved);
    },
    conditional: () => conditionalView(drivers, values, ranking, chosen),
  };
  const wanted = parts.map((part) => [part, compute[part]()]);
  return { trials, ...Object.fromEntries(wanted) } as Pick<Sensitivity, "trials" | Part>;
}

/** The columns that the trials of a simulation were evaluated on. */
function sampledColumns(inputs: EstimateInputs, workspace: SimulationWorkspace) {
  const plan = inputs.recoveryPlan ? planWorkspace(workspace).inputs : null;
  const used = inputNames.filter((name) => !plan || !isRecovery(name));
  return [
    ...used.map((name) => ({ name: name as DriverName, values: workspace.inputs[name] })),
    ...(plan ? planInputNames.map((name) => ({ name, values: plan[name] })) : []),
  ];
}

function varianceShares(
  inputs: EstimateInputs,
  result: ResultName,
  seed: number,
): Sensitivity["varianceShares"] {
  const { drivers, factors, dimensions, fillInputs, evaluate } = estimateModel(
    inputs,
    result,
    RUNS_PER_REPLICATE,
  );
  const uniforms = Array.from(
    { length: 2 * dimensions },
    () => new Float64Array(RUNS_PER_REPLICATE),
  );
  const { baseRuns, evaluations, indices } = sobolIndices({
    columns: drivers.length,
    factors,
    model: evaluate,
    fillSamples(replicate, a, b) {
      fillUniforms(seed, replicate, uniforms);
      fillInputs(uniforms.slice(0, dimensions), a);
      fillInputs(uniforms.slice(dimensions), b);
    },
    runsPerReplicate: RUNS_PER_REPLICATE,
    replicates: REPLICATES,
  });
  return {
    baseRuns,
    evaluations,
    factors: factors
      .map((factor, i) => ({ inputs: factor.map((column) => drivers[column]), ...indices[i] }))
      .sort((a, b) => b.total.value - a.total.value),
  };
}

/** What reasons call a driver. */
function labelsOf({ recoveryPlan }: EstimateInputs): (name: DriverName) => string {
  const labels = new Map<DriverName, string>(
    inputNames.map((name) => [name, usualRanges[name].label]),
  );
  if (recoveryPlan) {
    const ranges = planRanges(recoveryPlan);
    planInputNames.forEach((name) => labels.set(name, ranges[name].label));
  }
  return (name) => labels.get(name) ?? name;
}
