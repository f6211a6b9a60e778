"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import { changeResponseSchema, type ChangeRequest } from "@/app/api/v1/calculations/change/schema";

/** How much each difference explains of the move of P50. @param question  `null` while a side is not complete */
export function useChange(question: Omit<ChangeRequest, "percentile"> | null) {
  const query = useQuery({
    queryKey: ["change", question],
    queryFn: ({ signal }) =>
      request("/api/v1/calculations/change", {
        method: "POST",
        body: question,
        schema: changeResponseSchema,
        signal,
      }),
    enabled: question !== null,
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    gcTime: 10 * 60_000,
    retry: false,
  });
  return {
    explanation: query.data ?? null,
    isStale: query.isPlaceholderData,
    isPending: query.isPending && question !== null,
    error: query.error,
    refetch: () => void query.refetch(),
  };
}
