"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import {
  comparisonSchema,
  type ComparisonRequest,
  type ComparisonSide,
} from "@/app/api/v1/comparisons/schema";
import { estimateSchema } from "@/app/api/v1/estimates/schema";

/** Two sides beside each other; the last answer stays while another result is explained. */
export function useComparison(question: ComparisonRequest | null) {
  return useQuery({
    queryKey: ["comparison", question],
    queryFn: ({ signal }) =>
      request("/api/v1/comparisons", {
        method: "POST",
        body: question,
        schema: comparisonSchema,
        signal,
      }),
    enabled: question !== null,
    placeholderData: keepPreviousData,
    staleTime: 60_000,
    retry: false,
  });
}

/** Where the revision of a side belongs; nothing for a field. */
export function usePlaceOfSide(side: ComparisonSide | null) {
  const id = side === null || side.kind === "field" ? null : side.estimateId;
  return useQuery({
    queryKey: ["estimate", id],
    queryFn: ({ signal }) => request(`/api/v1/estimates/${id}`, { schema: estimateSchema, signal }),
    enabled: id !== null,
  });
}
