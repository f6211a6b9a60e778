"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import {
  comparisonSchema,
  type ComparisonRequest,
  type ComparisonSide,
} from "@/app/api/v1/comparisons/schema";
import { estimateSchema } from "@/app/api/v1/estimates/schema";
import { basisParams, type Basis } from "@/components/basis/basis";

/**
 * Two sides beside each other; the last answer stays while another result is explained. The basis says which revisions
 * stand for a field.
 */
export function useComparison(question: ComparisonRequest | null, basis: Basis) {
  const search = basisParams(basis).toString();
  return useQuery({
    queryKey: ["comparison", question, search],
    queryFn: ({ signal }) =>
      request(`/api/v1/comparisons${search && `?${search}`}`, {
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
