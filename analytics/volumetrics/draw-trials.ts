import { addTotals, type RecoveryTotals } from "../recovery/recovery-totals";
import type { SamplingMethod } from "../uncertainty/sampling-schema";
import type { PreparedInputs } from "./prepare-inputs";
import { createInputSampler, type InputSampler } from "./sample-inputs";
import { evaluateTrials, type EvaluatedTrials, type FluidConstants } from "./trials";
import { planWorkspace, type SimulationWorkspace } from "./workspace";

export interface DrawnTrials extends EvaluatedTrials {
  /** knows the percentiles of what was drawn */
  readonly sampler: InputSampler;
}

/**
 * Draws and evaluates the trials of a run, replicate by replicate, into the workspace: `outputs` and `strata` of every
 * trial, `inputs` of every trial too when the workspace was made to keep them.
 */
export function drawTrials(
  prepared: PreparedInputs,
  fluid: FluidConstants,
  points: { seed: number; sampling: SamplingMethod },
  workspace: SimulationWorkspace,
): DrawnTrials {
  const sampler = createInputSampler(prepared, points, workspace);
  let impossible = 0;
  let recovery: RecoveryTotals | null = null;
  workspace.replicates.forEach(({ count, inputs, outputs }, index) => {
    sampler.fill(index);
    const plan = prepared.plan && {
      compiled: prepared.plan,
      ...planWorkspace(workspace).replicates[index],
    };
    const evaluated = evaluateTrials(fluid, inputs, plan, count, workspace, outputs);
    impossible += evaluated.impossible;
    if (evaluated.recovery) {
      recovery = recovery ? addTotals(recovery, evaluated.recovery) : evaluated.recovery;
    }
  });
  return { impossible, recovery, sampler };
}
