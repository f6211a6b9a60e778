/**
 * Calculations on compositions without a record behind them. What is impossible comes back as the place in the request
 * and the reason; an iteration that does not converge says what was kept and what to try.
 */
import { ConvergenceError, DomainError } from "@/analytics/errors";
import { runOnFluid, type ComputeOptions } from "./compute/pool";
import { InvalidInputError, refuseImpossible, toPointer } from "./errors";
import { describeComposition, type CompositionQuestion } from "./fluids/composition";
import { describeMaterialBalance, type MaterialBalanceQuestion } from "./fluids/material-balance";
import type { FluidAnswer, FluidQuestion, FluidTaskName } from "./fluids/tasks";

/** A composition sheet normalised, with what follows from it without an equation of state. */
export function calculateComposition(question: CompositionQuestion) {
  return refuseImpossible("", () => describeComposition(question));
}

/** Gas and condensate in place from pressures and production. */
export function calculateMaterialBalance(question: MaterialBalanceQuestion) {
  return refuseImpossible("", () => describeMaterialBalance(question));
}

/** What to try when an iteration does not converge, by the calculation that was asked for. */
const advice: Record<FluidTaskName, string> = {
  // Reading iterates nothing; a thread has one answer for every task.
  labSheet: "Try the sheet in parts.",
  equationOfState:
    "Try another split of heptanes plus or other adjustments, or a temperature farther from the critical point.",
  nearWell:
    "Try a flowing pressure farther from the reservoir's, or another split of heptanes plus.",
  recovery:
    "Try narrower ranges of pressure, or a depletion curve that goes down to a lower pressure.",
  depletion:
    "Try another split of heptanes plus, or separator stages that lie closer to common ones.",
  tuning:
    "Try other adjustments, fewer of them, or begin from the untouched ones; the characterisation is as it was.",
};

/** Deep in a calculation a name may be none of the question's; such a fault is about the whole of it. */
const placeIn = (question: object, input: string | undefined) =>
  input !== undefined && input.split(".")[0] in question ? input : undefined;

/**
 * One of the calculations that run on a thread.
 *
 * @param options.signal  gives it up: a screen asks anew with the next keystroke
 * @throws {InvalidInputError} with a pointer into the question
 * @throws {ConvergenceError} in words for a person
 * @throws {ServiceBusyError}
 */
export async function calculateOnFluid<Name extends FluidTaskName>(
  name: Name,
  question: FluidQuestion<Name>,
  options: ComputeOptions = {},
): Promise<FluidAnswer<Name>> {
  try {
    return await runOnFluid(name, question, options);
  } catch (error) {
    if (error instanceof DomainError) {
      const pointer = toPointer(placeIn(question, error.details.input));
      throw new InvalidInputError([{ pointer, detail: error.message }]);
    }
    if (error instanceof ConvergenceError) {
      const said = error.message.replace(/\.?$/, ".");
      throw new ConvergenceError(
        `${said} Nothing that was entered is changed or lost. ${advice[name]}`,
        error.details,
      );
    }
    throw error;
  }
}
