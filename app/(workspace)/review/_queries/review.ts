"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import { reviewSchema } from "@/app/api/v1/review/schema";
import type { Basis } from "@/components/basis/basis";

/** What waits for a decision on this basis; looked at again every minute, since others decide too. */
export function useReview({ interest, units, base }: Basis) {
  const search = new URLSearchParams({ interest, units, base });
  return useQuery({
    queryKey: ["estimates", "review", interest, units, base],
    queryFn: ({ signal }) => request(`/api/v1/review?${search}`, { schema: reviewSchema, signal }),
    placeholderData: keepPreviousData,
    refetchInterval: 60_000,
  });
}
