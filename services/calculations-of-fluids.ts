/**
 * Calculations on compositions without a record behind them. What is impossible comes back as the place in the request
 * and the reason; an iteration that does not converge says what to try.
 */
import { refuseImpossible } from "./errors";
import { describeComposition, type CompositionQuestion } from "./fluids/composition";

/** A composition sheet normalised, with what follows from it without an equation of state. */
export function calculateComposition(question: CompositionQuestion) {
  return refuseImpossible("", () => describeComposition(question));
}
