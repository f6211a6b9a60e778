"use client";

import { keepPreviousData, useMutation, useQuery } from "@tanstack/react-query";
import type { z } from "zod";
import { ProblemError, request } from "@/app/_client/request";
import {
  compositionResponseSchema,
  depletionResponseSchema,
  equationOfStateResponseSchema,
  labSheetResponseSchema,
  tuningResponseSchema,
  type CompositionRequest,
  type DepletionRequest,
  type EquationOfStateRequest,
  type LabSheetRequest,
  type TuningRequest,
} from "@/app/api/v1/calculations/fluid-schema";
import { useSettled } from "../_editor/use-live-results";

/** Longer than between two keys of a figure: an equation of state is not asked for every digit. */
const PAUSE_MS = 500;

/**
 * A calculation of what stands in the fields, a moment after the last key; the last answer stays meanwhile.
 *
 * @param body  `null` while something is missing: the last answer then goes
 */
function useCalculation<Schema extends z.ZodType>(
  name: string,
  body: unknown,
  schema: Schema,
): { data: z.output<Schema> | null; error: Error | null; isFetching: boolean; isStale: boolean } {
  const question = body === null ? null : JSON.stringify(body);
  const settled = useSettled(question, PAUSE_MS);
  const query = useQuery({
    queryKey: ["calculation", name, settled],
    queryFn: ({ signal }) =>
      request(`/api/v1/calculations/${name}`, {
        method: "POST",
        body: JSON.parse(settled ?? "null") as unknown,
        schema,
        signal,
      }),
    enabled: settled !== null && question !== null,
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    gcTime: 10 * 60_000,
    retry: false,
  });
  const isKnown = question !== null && !query.error;
  return {
    data: isKnown ? (query.data ?? null) : null,
    error: question === null ? null : query.error,
    isFetching: query.isFetching,
    isStale: question !== settled || query.isPlaceholderData,
  };
}

export const useComposition = (body: CompositionRequest | null) =>
  useCalculation("composition", body, compositionResponseSchema);

export const useEquationOfState = (body: EquationOfStateRequest | null) =>
  useCalculation("equation-of-state", body, equationOfStateResponseSchema);

export const useDepletion = (body: DepletionRequest | null) =>
  useCalculation("depletion", body, depletionResponseSchema);

/** Fits the equation of state, when asked; nothing is kept. */
export function useTuning() {
  return useMutation({
    mutationFn: ({ body, signal }: { body: TuningRequest; signal: AbortSignal }) =>
      request("/api/v1/calculations/tuning", {
        method: "POST",
        body,
        schema: tuningResponseSchema,
        signal,
      }),
  });
}

/** Reads a laboratory's file; nothing is kept. */
export function useLabSheet() {
  return useMutation({
    mutationFn: (body: LabSheetRequest) =>
      request("/api/v1/calculations/lab-sheet", {
        method: "POST",
        body,
        schema: labSheetResponseSchema,
      }),
  });
}

/** What the server refuses, by its pointers; empty for any other error. */
export const refusalsOf = (error: Error | null) =>
  error instanceof ProblemError && error.status === 422 ? error.errors : [];
