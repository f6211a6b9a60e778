"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import { rankingSchema, togetherSchema } from "@/app/api/v1/fields/ranking-schema";
import { basisParams, type Basis } from "@/components/basis/basis";

/** One page of the ranking; the last one stays while the next is computed. */
export function useRanking(search: string) {
  return useQuery({
    queryKey: ["fields", "ranking", search],
    queryFn: ({ signal }) =>
      request(`/api/v1/fields${search && `?${search}`}`, { schema: rankingSchema, signal }),
    placeholderData: keepPreviousData,
  });
}

/** What some fields come to together, trial by trial. */
export function useTogether(basis: Basis, ids: readonly string[]) {
  const params = basisParams(basis);
  params.set("ids", [...ids].sort().join(","));
  return useQuery({
    queryKey: ["fields", "together", params.toString()],
    queryFn: ({ signal }) =>
      request(`/api/v1/fields/together?${params}`, { schema: togetherSchema, signal }),
    enabled: ids.length > 0,
    placeholderData: keepPreviousData,
  });
}
