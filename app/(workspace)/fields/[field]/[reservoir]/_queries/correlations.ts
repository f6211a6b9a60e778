"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import { correlationsResponseSchema } from "@/app/api/v1/calculations/correlations/schema";
import type { Correlation } from "@/components/estimate/estimate-text";
import { useSettled } from "../_editor/use-live-results";

/** Whether the correlations are possible together, and the nearest that are, a moment after the last key. */
export function useCorrelationCheck(pairs: readonly Correlation[]) {
  const asked = JSON.stringify(pairs);
  const settled = useSettled(asked);
  const query = useQuery({
    queryKey: ["correlations", settled],
    queryFn: ({ signal }) =>
      request("/api/v1/calculations/correlations", {
        method: "POST",
        body: { correlations: JSON.parse(settled) as Correlation[] },
        schema: correlationsResponseSchema,
        signal,
      }),
    enabled: settled !== "[]",
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    gcTime: 60_000,
    retry: false,
  });
  const isCurrent = asked === settled && !query.isPlaceholderData;
  return {
    /** of exactly these pairs; `null` while that is not known, or nothing is correlated */
    check: pairs.length > 0 && isCurrent ? (query.data ?? null) : null,
    error: query.error,
  };
}
