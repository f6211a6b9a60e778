import { DomainError } from "../errors";
import { refusals, type RefusalName } from "../recovery/recovery-totals";
import type { ResultName } from "../volumetrics/results-schema";
import { rangeOfSample, type SampleRange } from "../uncertainty/summary";
import { drawTrials } from "../volumetrics/draw-trials";
import { prepareInputs } from "../volumetrics/prepare-inputs";
import { simulate } from "../volumetrics/simulate";
import { fluidConstants } from "../volumetrics/trials";
import { createWorkspace, type SimulationWorkspace } from "../volumetrics/workspace";
import {
  changesBetween,
  withStateTogether,
  type ChangeStep,
  type EstimateRun,
} from "./estimate-changes";
import type { ChangeExplanation } from "./sensitivity-schema";
import { evaluationsFor, shapley } from "./shapley";

export interface ChangeQuestion {
  from: EstimateRun;
  to: EstimateRun;
  result: ResultName;
  percentile: "p90" | "p50" | "p10";
}

/** Trials of all evaluations together: some three seconds of one thread. Twelve changes of 10,000 trials fit. */
const MOST_TRIALS = 7_100_000;
const FEWEST_TRIALS = 1_024;

/**
 * How much each difference between two estimates explains of the move of one percentile of one result, averaged over the
 * orders of making the changes (see `shapley`). Effects add up to the move, to rounding.
 *
 * Every set of changes is a simulation of its own on the same random numbers: an input that did not change has the same
 * draws throughout, so what moves is the change. When the evaluations do not allow as many trials as the estimates have,
 * all are made with fewer, `from` and `to` too, so that effects add up; `own` is what the two say on all their trials.
 *
 * @returns  changes with the largest effect first
 * @throws {DomainError} when one of the two, or an estimate that mixes them, is impossible; the message says that the
 *   move cannot be split and why
 */
export function explainChange(question: ChangeQuestion): ChangeExplanation {
  const steps = changesBetween(question.from, question.to);
  try {
    return explainSteps(question, steps);
  } catch (error) {
    const together = withStateTogether(steps);
    if (!(error instanceof MixedError) || together.length === steps.length) throw error;
    return explainSteps(question, together);
  }
}

/** Both estimates are possible, but one between them is not. */
class MixedError extends DomainError {}

function explainSteps(
  { from, to, result, percentile }: ChangeQuestion,
  steps: readonly ChangeStep[],
): ChangeExplanation {
  const limit = trialLimit(steps.length, from.trials, to.trials);
  const workspaces = new Map<number, SimulationWorkspace>();
  const workspaceOf = (trials: number) => {
    const workspace = workspaces.get(trials) ?? createWorkspace(trials);
    workspaces.set(trials, workspace);
    return workspace;
  };
  const valueOf = (made: readonly boolean[]) => {
    const mixed = steps.reduce((run, { make }, i) => (made[i] ? make(run) : run), from);
    const trials = Math.min(mixed.trials, limit);
    const workspace = workspaceOf(trials);
    // The two ends by the whole simulation, which says best what is wrong with one.
    if (made.every((one) => one === made[0])) {
      const { inputs, seed, sampling } = mixed;
      return simulate(inputs, { seed, sampling, trials, workspace }).summary.results[result][
        percentile
      ];
    }
    return rangeOfMixed(mixed, workspace, result)[percentile];
  };
  const attribution = shapley(steps.length, valueOf, from.seed);
  const ownOf = (run: EstimateRun, found: number) =>
    run.trials <= limit ? found : rangeOfMixed(run, workspaceOf(run.trials), result)[percentile];
  return {
    from: attribution.from,
    to: attribution.to,
    own: { from: ownOf(from, attribution.from), to: ownOf(to, attribution.to) },
    trials: Math.min(to.trials, limit),
    orders: attribution.orders,
    changes: steps
      .map(({ change }, i) => ({
        change,
        effect: attribution.effects[i],
        standardError: attribution.standardErrors?.[i] ?? null,
      }))
      .sort((a, b) => Math.abs(b.effect) - Math.abs(a.effect)),
  };
}

/** All trials when they may be; else a power of two, which both methods of sampling can have, after the two ends' own. */
function trialLimit(changes: number, ...ends: readonly number[]): number {
  const evaluations = evaluationsFor(changes);
  const most = Math.max(...ends);
  if (most * evaluations <= MOST_TRIALS) return most;
  const left = MOST_TRIALS - ends.reduce((sum, trials) => sum + trials, 0);
  return Math.max(FEWEST_TRIALS, 2 ** Math.floor(Math.log2(left / evaluations)));
}

/** P90, P50 and P10 as `simulate` has them, without all that it summarises besides. */
function rangeOfMixed(
  { inputs, seed, sampling }: EstimateRun,
  workspace: SimulationWorkspace,
  result: ResultName,
): SampleRange {
  const { impossible, recovery } = refuseMixed(() => {
    const prepared = prepareInputs(inputs);
    const fluid = fluidConstants(prepared.wellstream, inputs.fluid);
    return drawTrials(prepared, fluid, { seed, sampling }, workspace);
  });
  const [refusal] = Object.keys(recovery?.refused ?? {}) as RefusalName[];
  if (refusal !== undefined) throw mixedError(`some trials ${refusals[refusal].message}`);
  if (impossible > 0) {
    throw mixedError("some trials lie where the z factor has no value.");
  }
  return rangeOfSample(workspace.outputs[result], workspace.trials, workspace.pooled);
}

function refuseMixed<Value>(draw: () => Value): Value {
  try {
    return draw();
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw mixedError(error.message);
  }
}

const mixedError = (reason: string) =>
  new MixedError(
    `The move cannot be split among the changes, for some of them without the others make no estimate: ${reason}`,
    { input: "to" },
  );
