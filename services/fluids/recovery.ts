import { compareConcepts } from "@/analytics/recovery/compare-concepts";
import type { RecoveryPlan } from "@/analytics/recovery/recovery-plan-schema";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";

export interface RecoveryQuestion {
  /** their own recovery plan is not looked at */
  inputs: EstimateInputs;
  plans: RecoveryPlan[];
  seed: number;
  trials: number;
}

/**
 * What each way of producing brings to the tank, on the same trials.
 *
 * @throws {DomainError} with a path into the question
 */
export function compareRecoveries({ inputs, plans, seed, trials }: RecoveryQuestion) {
  return { concepts: compareConcepts(inputs, plans, { trials, seed }) };
}
