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

/** Trials of all evaluations together: some seven seconds of one thread. */
const MOST_TRIALS = 16_000_000;
const FEWEST_TRIALS = 1_024;

/**
 * How much each difference between two estimates explains of the move of one percentile of one result, averaged over the
 * orders of making the changes (see `shapley`). Effects add up to the move, to rounding.
 *
 * Every set of changes is a simulation of its own on the same random numbers: an input that did not change has the same
 * draws throughout, so what moves is the change. Estimates of more trials than the evaluations allow are both computed
 * anew with fewer, and `from` and `to` are then those of the fewer trials.
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
  const limit = trialLimit(steps.length);
  const workspaces = new Map<number, SimulationWorkspace>();
  const valueOf = (made: readonly boolean[]) => {
    const mixed = steps.reduce((run, { make }, i) => (made[i] ? make(run) : run), from);
    const trials = Math.min(mixed.trials, limit);
    const workspace = workspaces.get(trials) ?? createWorkspace(trials);
    workspaces.set(trials, workspace);
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
  return {
    from: attribution.from,
    to: attribution.to,
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

/** A power of two, which both methods of sampling can have. */
function trialLimit(changes: number): number {
  const each = MOST_TRIALS / evaluationsFor(changes);
  return Math.max(FEWEST_TRIALS, 2 ** Math.floor(Math.log2(each)));
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
