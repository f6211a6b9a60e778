import { materialBalance, type MaterialBalanceInput } from "@/analytics/recovery/material-balance";

export type MaterialBalanceQuestion = MaterialBalanceInput;

/**
 * Gas and condensate in place from pressures and production.
 *
 * @throws {DomainError} with a path into the question
 * @throws {ConvergenceError}
 */
export function describeMaterialBalance(question: MaterialBalanceQuestion) {
  const { points, warnings, ...balance } = materialBalance(question);
  return { ...balance, points: [...points], warnings: [...warnings] };
}
