import { createOrderWorkspace, type OrderWorkspace } from "../numerics/order-statistics";
import { planInputNames, type PlanInputName } from "../recovery/recovery-plan-schema";
import { createRecoveryColumns, type RecoveryColumns } from "../recovery/trial-recovery";
import type { PointsWorkspace } from "../uncertainty/points";
import { replicateStarts } from "../uncertainty/replicates";
import { inputNames, type InputName } from "./inputs-schema";
import {
  derivedNames,
  resultNames,
  type DerivedName,
  type DriverName,
  type ResultName,
} from "./results-schema";
import { checkTrials } from "./trial-counts";
import type { TrialColumns, TrialScratch } from "./trials";

/**
 * Every array that a simulation of a given number of trials needs, so that a thread runs any number of reservoirs
 * without allocating per trial or per reservoir. Not to be shared between runs that overlap in time.
 *
 * Trials are drawn and evaluated replicate by replicate. What only a replicate needs is as long as a replicate, which
 * keeps it in a processor's cache and a run of a million trials at about 200 MB; what all trials need is as long as
 * the run. About 2 MB for 10,000 trials.
 */
export interface SimulationWorkspace extends PointsWorkspace, TrialScratch {
  readonly trials: number;
  /** where each replicate begins, and the number of trials last */
  readonly starts: readonly number[];
  readonly replicates: readonly Replicate[];
  readonly counting: OrderWorkspace;
  readonly sorted: Float64Array;
  readonly caseProbabilities: Float64Array;
  /** which case of a set each trial takes */
  readonly cases: Uint8Array;
  /** of every trial; see `Replicate` */
  readonly strata: Record<InputName, Uint16Array>;
  readonly outputs: TrialColumns<ResultName | DerivedName>;
  /** of every trial when asked for, else of the replicate drawn last */
  readonly inputs: TrialColumns<InputName>;
  /** whether inputs are kept for every trial */
  readonly keepsInputs: boolean;
  readonly pooled: OrderWorkspace;
  readonly grades: Float64Array;
  /** made by `planWorkspace` on the first run with a recovery plan */
  plan: PlanWorkspace | null;
}

/** Views of one replicate's part of the arrays. */
export interface Replicate {
  /** the first trial */
  readonly start: number;
  readonly count: number;
  readonly inputs: TrialColumns<InputName>;
  /** the stratum of each trial's input, 0 to count - 1: its rank in the replicate, unless a set of cases decides */
  readonly strata: Record<InputName, Uint16Array>;
  readonly outputs: TrialColumns<ResultName | DerivedName>;
}

/** What one replicate fills for one input. */
export interface InputColumn {
  readonly values: Float64Array;
  readonly strata: Uint16Array;
}

/** What trials with a recovery plan need besides. */
export interface PlanWorkspace {
  readonly replicates: readonly PlanReplicate[];
  readonly inputs: TrialColumns<PlanInputName>;
  readonly strata: Record<PlanInputName, Uint16Array>;
  /** the recoveries of every trial */
  readonly recoveries: Pick<RecoveryColumns, "gasRecovery" | "condensateRecovery">;
}

export interface PlanReplicate {
  readonly inputs: TrialColumns<PlanInputName>;
  readonly strata: Record<PlanInputName, Uint16Array>;
  readonly columns: RecoveryColumns;
}

export function planWorkspace(workspace: SimulationWorkspace): PlanWorkspace {
  workspace.plan ??= createPlanWorkspace(workspace);
  return workspace.plan;
}

function createPlanWorkspace({
  trials,
  replicates,
  keepsInputs,
}: SimulationWorkspace): PlanWorkspace {
  const longest = longestOf(replicates);
  const inputs = columns(planInputNames, () => new Float64Array(keepsInputs ? trials : longest));
  const strata = columns(planInputNames, () => new Uint16Array(trials));
  const recoveries = {
    gasRecovery: new Float64Array(trials),
    condensateRecovery: new Float64Array(trials),
  };
  const scratch = createRecoveryColumns(longest);
  return {
    inputs,
    strata,
    recoveries,
    replicates: replicates.map(({ start, count }) => ({
      inputs: part(inputs, keepsInputs ? start : 0, count),
      strata: part(strata, start, count),
      columns: { ...scratch, ...part(recoveries, start, count) },
    })),
  };
}

/**
 * @param options.keepInputs  whether the sampled inputs of every trial are wanted, not only the results
 * @throws {DomainError} when the number of trials is not a whole number from 100 to 1,048,576
 */
export function createWorkspace(
  trials: number,
  { keepInputs = false }: { keepInputs?: boolean } = {},
): SimulationWorkspace {
  checkTrials(trials, "latinHypercube");
  const starts = replicateStarts(trials);
  const spans = starts.slice(1).map((end, r) => ({ start: starts[r], count: end - starts[r] }));
  const longest = longestOf(spans);
  const numbers = () => new Float64Array(longest);
  const integers = () => new Uint32Array(longest);
  const inputs = columns(inputNames, () => new Float64Array(keepInputs ? trials : longest));
  const strata = columns(inputNames, () => new Uint16Array(trials));
  const outputs = columns([...resultNames, ...derivedNames], () => new Float64Array(trials));
  return {
    trials,
    starts,
    replicates: spans.map(({ start, count }) => ({
      start,
      count,
      inputs: part(inputs, keepInputs ? start : 0, count),
      strata: part(strata, start, count),
      outputs: part(outputs, start, count),
    })),
    words: integers(),
    order: integers(),
    ranks: integers(),
    points: integers(),
    cases: new Uint8Array(longest),
    scoreColumns: inputNames.map(numbers),
    counting: createOrderWorkspace(longest),
    reducedPressure: numbers(),
    reducedTemperature: numbers(),
    probabilities: numbers(),
    sorted: numbers(),
    caseProbabilities: numbers(),
    strata,
    outputs,
    inputs,
    keepsInputs: keepInputs,
    pooled: createOrderWorkspace(trials),
    grades: new Float64Array(trials),
    plan: null,
  };
}

/** The strata that an input of the estimate, or of its plan, drew over all trials. */
export function strataOf(workspace: SimulationWorkspace, name: DriverName): Uint16Array {
  return isPlanInput(name) ? planWorkspace(workspace).strata[name] : workspace.strata[name];
}

/** The part of one replicate in the column of an input, of the estimate or of its plan. */
export function columnOf(
  workspace: SimulationWorkspace,
  index: number,
  name: DriverName,
): InputColumn {
  if (isPlanInput(name)) {
    const { inputs, strata } = planWorkspace(workspace).replicates[index];
    return { values: inputs[name], strata: strata[name] };
  }
  const { inputs, strata } = workspace.replicates[index];
  return { values: inputs[name], strata: strata[name] };
}

function isPlanInput(name: DriverName): name is PlanInputName {
  return (planInputNames as readonly string[]).includes(name);
}

const longestOf = (spans: readonly { count: number }[]) =>
  Math.max(...spans.map(({ count }) => count));

/** A record with one freshly made value per name. */
export function columns<Name extends string, Value>(
  names: readonly Name[],
  make: (name: Name) => Value,
): Record<Name, Value> {
  return Object.fromEntries(names.map((name) => [name, make(name)])) as Record<Name, Value>;
}

/** Views of `count` elements of every array, from `start` on. */
function part<Name extends string, Values extends Float64Array | Uint16Array>(
  arrays: Readonly<Record<Name, Values>>,
  start: number,
  count: number,
): Record<Name, Values> {
  return columns(Object.keys(arrays) as Name[], (name) =>
    arrays[name].subarray(start, start + count),
  ) as Record<Name, Values>;
}
