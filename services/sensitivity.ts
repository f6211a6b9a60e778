/**
 * What drives an estimate and what explains a change from one to another, worked out anew from inputs, seed and method:
 * nothing is stored, and the same question has the same answer.
 */
import { DomainError } from "@/analytics/errors";
import type { ChangeQuestion } from "@/analytics/sensitivity/explain-change";
import type { SensitivityOptions } from "@/analytics/sensitivity/sensitivity";
import type {
  ChangeExplanation,
  SensitivityAnswer,
} from "@/analytics/sensitivity/sensitivity-schema";
import { requirePossibleInputs } from "@/analytics/volumetrics/check-inputs";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import { DEFAULT_TRIALS, samplingFor } from "@/analytics/volumetrics/trial-counts";
import { runChange, runSensitivity, type ComputeOptions } from "./compute/pool";
import { InvalidInputError, refuseImpossible, toPointer } from "./errors";

export interface SensitivityQuestion extends Omit<SensitivityOptions, "trials" | "sampling"> {
  inputs: EstimateInputs;
  trials?: number;
  sampling?: SensitivityOptions["sampling"];
}

/**
 * What drives one result of an estimate.
 *
 * @param options.signal  gives it up
 * @throws {InvalidInputError} with the place in the question
 * @throws {ServiceBusyError}
 */
export async function calculateSensitivity(
  { inputs, trials = DEFAULT_TRIALS, sampling = samplingFor(trials), ...rest }: SensitivityQuestion,
  options: ComputeOptions = {},
): Promise<SensitivityAnswer> {
  refuseImpossible("inputs", () => requirePossibleInputs(inputs));
  return refuseLater(["seed", "trials", "chosen"], "inputs", () =>
    runSensitivity(inputs, { ...rest, trials, sampling }, options),
  );
}

/**
 * How much each difference between two estimates explains of the move of one percentile.
 *
 * @param options.signal  gives it up
 * @throws {InvalidInputError} with the place in the question; its root when the two cannot be mixed
 * @throws {ServiceBusyError}
 */
export async function calculateChange(
  question: ChangeQuestion,
  options: ComputeOptions = {},
): Promise<ChangeExplanation> {
  for (const side of ["from", "to"] as const) {
    refuseImpossible(`${side}.inputs`, () => requirePossibleInputs(question[side].inputs));
  }
  return refuseLater(["from", "to"], "", () => runChange(question, options));
}

/** As `refuseImpossible` for work on a thread: names in `own` are the question's, others lie under one of its parts. */
async function refuseLater<Answer>(
  own: readonly string[],
  under: string,
  work: () => Promise<Answer>,
): Promise<Answer> {
  try {
    return await work();
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    const { input } = error.details;
    const isOwn = input !== undefined && own.includes(input.split(".")[0]);
    const pointer = isOwn ? toPointer(input) : under === "" ? "#" : toPointer(input, under);
    throw new InvalidInputError([{ pointer, detail: error.message }]);
  }
}
