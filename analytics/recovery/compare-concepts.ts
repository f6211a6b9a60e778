import { DomainError } from "../errors";
import type { EstimateInputs } from "../volumetrics/inputs-schema";
import type { Range, RecoverySummary } from "../volumetrics/results-schema";
import { simulate } from "../volumetrics/simulate";
import { createWorkspace } from "../volumetrics/workspace";
import type { Warning } from "../warnings";
import type { RecoveryPlan } from "./recovery-plan-schema";

/** What one way of producing a reservoir brings. */
export interface ConceptResult
  extends Pick<RecoverySummary, "concept" | "route" | "shares" | "phases" | "gasBalance"> {
  condensateInPlaceStb: Range;
  condensateRecoverableStb: Range;
  salesGasScf: Range;
  condensateRecovery: Range;
  gasRecovery: Range;
  /** about the plan; their `input` begins with `plans.0`, `plans.1`, … */
  warnings: Warning[];
}

/**
 * Ways of producing the same reservoir, side by side. Every concept sees the same draws of the same inputs, trial by
 * trial, so that a difference between two is the concepts'.
 *
 * @param inputs   its own recovery plan is not looked at
 * @param plans    one for each concept; results come in their order
 * @throws {DomainError} as `simulate`; the path of what is wrong in a plan begins with `plans.0`, `plans.1`, …
 */
export function compareConcepts(
  inputs: EstimateInputs,
  plans: readonly RecoveryPlan[],
  { trials, seed }: { trials: number; seed: number },
): ConceptResult[] {
  const workspace = createWorkspace(trials);
  return plans.map((recoveryPlan, i) => {
    const { summary } = withPath(i, () =>
      simulate({ ...inputs, recoveryPlan }, { trials, seed, workspace }),
    );
    const { recovery, results } = summary;
    if (!recovery) throw new DomainError("A concept needs a recovery plan.", { input: "plans" });
    const { concept, route, shares, phases, gasBalance } = recovery;
    return {
      concept,
      route,
      condensateInPlaceStb: rangeOf(results.condensateInPlaceStb),
      condensateRecoverableStb: rangeOf(results.condensateRecoverableStb),
      salesGasScf: rangeOf(results.salesGasScf),
      condensateRecovery: summary.inputs.condensateRecovery,
      gasRecovery: summary.inputs.gasRecovery,
      shares,
      phases,
      gasBalance,
      warnings: summary.warnings
        .filter(({ input }) => input?.startsWith("recoveryPlan"))
        .map((warning) => ({ ...warning, input: pathIn(i, warning.input) })),
    };
  });
}

const rangeOf = ({ p90, p50, p10, mean }: Range): Range => ({ p90, p50, p10, mean });

function pathIn(i: number, input: string | undefined): string | undefined {
  return input?.replace(/^recoveryPlan/, `plans.${i}`);
}

function withPath<Result>(i: number, run: () => Result): Result {
  try {
    return run();
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw new DomainError(error.message, {
      ...error.details,
      input: pathIn(i, error.details.input),
    });
  }
}
