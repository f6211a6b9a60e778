import { createOrderWorkspace } from "../numerics/order-statistics";
import { planInputNames, type PlanInputName } from "../recovery/recovery-plan-schema";
import { createRecoveryColumns, type RecoveryColumns } from "../recovery/trial-recovery";
import { normalScores, type RankWorkspace } from "../uncertainty/rank-correlation";
import { inputNames, type InputName } from "./inputs-schema";
import { derivedNames, resultNames, type DerivedName, type ResultName } from "./results-schema";
import { checkTrials } from "./trial-counts";
import type { TrialColumns, TrialScratch } from "./trials";

/**
 * Every array that a simulation of a given number of trials needs, so that a thread runs any number of reservoirs
 * without allocating per trial or per reservoir. About 3 MB for 10,000 trials. Not to be shared between runs that
 * overlap in time.
 */
export interface SimulationWorkspace extends RankWorkspace, TrialScratch {
  readonly trials: number;
  readonly probabilities: Float64Array;
  readonly sorted: Float64Array;
  readonly resultRanks: Uint32Array;
  readonly inputRanks: Record<InputName, Uint32Array>;
  readonly inputs: TrialColumns<InputName>;
  readonly outputs: TrialColumns<ResultName | DerivedName>;
  /** made by `planWorkspace` on the first run with a recovery plan */
  plan: PlanWorkspace | null;
}

/** What trials with a recovery plan need besides. */
export interface PlanWorkspace {
  readonly inputs: TrialColumns<PlanInputName>;
  readonly inputRanks: Record<PlanInputName, Uint32Array>;
  readonly columns: RecoveryColumns;
}

export function planWorkspace(workspace: SimulationWorkspace): PlanWorkspace {
  const { trials } = workspace;
  workspace.plan ??= {
    inputs: columns(planInputNames, () => new Float64Array(trials)),
    inputRanks: columns(planInputNames, () => new Uint32Array(trials)),
    columns: createRecoveryColumns(trials),
  };
  return workspace.plan;
}

/** @throws {DomainError} when the number of trials is not a whole number from 100 to 1,048,576 */
export function createWorkspace(trials: number): SimulationWorkspace {
  checkTrials(trials, "latinHypercube");
  const numbers = () => new Float64Array(trials);
  const integers = () => new Uint32Array(trials);
  return {
    trials,
    words: integers(),
    order: integers(),
    scores: normalScores(trials),
    scoreColumns: inputNames.map(numbers),
    counting: createOrderWorkspace(trials),
    reducedPressure: numbers(),
    reducedTemperature: numbers(),
    probabilities: numbers(),
    sorted: numbers(),
    resultRanks: integers(),
    inputRanks: columns(inputNames, integers),
    inputs: columns(inputNames, numbers),
    outputs: columns([...resultNames, ...derivedNames], numbers),
    plan: null,
  };
}

/** A record with one freshly made value per name. */
export function columns<Name extends string, Value>(
  names: readonly Name[],
  make: (name: Name) => Value,
): Record<Name, Value> {
  return Object.fromEntries(names.map((name) => [name, make(name)])) as Record<Name, Value>;
}
