"use client";

import { keepPreviousData, useQueries, useQuery } from "@tanstack/react-query";
import type { ProducingConcept, RecoveryPlan } from "@/analytics/recovery/recovery-plan-schema";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import { request } from "@/app/_client/request";
import {
  nearWellResponseSchema,
  recoveryResponseSchema,
  type NearWellRequest,
  type RecoveryRequest,
} from "@/app/api/v1/calculations/recovery-schema";
import { useSettled } from "../_editor/use-live-results";

const PAUSE_MS = 500;
/** Few enough to answer while assumptions are typed. */
const TRIALS = 4_000;

/**
 * What each way of producing brings, on the same draws: the seed is the estimate's, so a difference between two is the
 * concepts'. Asked one by one, so that a plan that cannot be leaves the others standing.
 *
 * @param inputs  `null` while something of the estimate is missing or impossible
 * @param plans   `null` for a concept whose assumptions cannot be read
 */
export function useConcepts(
  inputs: EstimateInputs | null,
  plans: Record<ProducingConcept, RecoveryPlan | null>,
  seed: number,
) {
  const questions = (["depletion", "compression", "cycling"] as const).map((concept) => {
    const plan = plans[concept];
    const body: RecoveryRequest | null = inputs &&
      plan && { inputs: { ...inputs, recoveryPlan: null }, plans: [plan], seed, trials: TRIALS };
    return { concept, question: body && JSON.stringify(body) };
  });
  const now = JSON.stringify(questions);
  const settledText = useSettled(now, PAUSE_MS);
  const settled = JSON.parse(settledText) as typeof questions;
  const answers = useQueries({
    queries: settled.map(({ concept, question }) => ({
      queryKey: ["calculation", "recovery", concept, question],
      queryFn: ({ signal }: { signal: AbortSignal }) =>
        request("/api/v1/calculations/recovery", {
          method: "POST",
          body: JSON.parse(question ?? "null") as unknown,
          schema: recoveryResponseSchema,
          signal,
        }),
      enabled: question !== null,
      placeholderData: keepPreviousData,
      staleTime: Infinity,
      gcTime: 10 * 60_000,
      retry: false,
    })),
  });
  return {
    concepts: answers.flatMap(({ data, error }, index) =>
      questions[index].question !== null && !error && data ? data.concepts : [],
    ),
    errors: answers.flatMap(({ error }, index) =>
      error && questions[index].question !== null
        ? [{ concept: questions[index].concept, error }]
        : [],
    ),
    isPending: answers.some(({ isFetching }) => isFetching),
    isStale: now !== settledText || answers.some(({ isPlaceholderData }) => isPlaceholderData),
  };
}

/** How much a well loses to the liquid around it, a moment after the last key; `null` asks nothing. */
export function useNearWell(body: NearWellRequest | null) {
  const question = useSettled(body && JSON.stringify(body), PAUSE_MS);
  return useQuery({
    queryKey: ["calculation", "near-well", question],
    queryFn: ({ signal }) =>
      request("/api/v1/calculations/near-well", {
        method: "POST",
        body: JSON.parse(question ?? "null") as unknown,
        schema: nearWellResponseSchema,
        signal,
      }),
    enabled: question !== null,
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    retry: false,
  });
}
