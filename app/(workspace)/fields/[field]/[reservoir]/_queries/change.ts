"use client";

import { changeResponseSchema, type ChangeRequest } from "@/app/api/v1/calculations/change/schema";
import { useAnswer } from "./answer";

/** How much each difference explains of the move of P50. @param question  `null` while a side is not complete */
export function useChange(question: Omit<ChangeRequest, "percentile"> | null) {
  const { answer, ...state } = useAnswer("change", question, changeResponseSchema);
  return { ...state, explanation: answer };
}
