"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import {
  sensitivityResponseSchema,
  type SensitivityRequest,
} from "@/app/api/v1/calculations/sensitivity/schema";

export type SensitivityQuestion = SensitivityRequest;

/**
 * What drives a result of an estimate, from its own trials made again. The last answer stays while another is worked
 * out.
 *
 * @param question  `null` while the inputs are not complete
 */
export function useSensitivity(question: SensitivityQuestion | null) {
  const query = useQuery({
    queryKey: ["sensitivity", question],
    queryFn: ({ signal }) =>
      request("/api/v1/calculations/sensitivity", {
        method: "POST",
        body: question,
        schema: sensitivityResponseSchema,
        signal,
      }),
    enabled: question !== null,
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    gcTime: 10 * 60_000,
    retry: false,
  });
  return {
    sensitivity: query.data ?? null,
    isStale: query.isPlaceholderData,
    isPending: query.isPending && question !== null,
    error: query.error,
    refetch: () => void query.refetch(),
  };
}
