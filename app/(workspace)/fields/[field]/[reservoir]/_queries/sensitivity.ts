"use client";

import {
  conditionalResponseSchema,
  wholeSensitivitySchema,
  type SensitivityRequest,
} from "@/app/api/v1/calculations/sensitivity/schema";
import { useAnswer } from "./answer";

export type SensitivityQuestion = SensitivityRequest;

/**
 * What drives a result of an estimate, from its own trials made again.
 *
 * @param question  for all parts; `null` while the inputs are not complete
 */
export function useSensitivity(question: Omit<SensitivityQuestion, "parts"> | null) {
  const { answer, ...state } = useAnswer("sensitivity", question, wholeSensitivitySchema);
  return { ...state, sensitivity: answer };
}

/** What the chosen trials have in common, without the study of the variance, which no choice of trials changes. */
export function useConditional(question: Omit<SensitivityQuestion, "parts"> | null) {
  const { answer, ...state } = useAnswer(
    "sensitivity",
    question && { ...question, parts: ["conditional"] },
    conditionalResponseSchema,
  );
  return { ...state, view: answer };
}
