"use client";

import { useMutation, useQueries, useQuery, useQueryClient } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { z } from "zod";
import { request } from "@/app/_client/request";
import { basinsSchema } from "@/app/api/v1/basins/schema";
import {
  dependenceSetSchema,
  dependenceSetsSchema,
  type DependenceSetPatchRequest,
  type DependenceSetView,
  type NewDependenceSetRequest,
} from "@/app/api/v1/dependence-sets/schema";
import { rankingSchema, type Ranking } from "@/app/api/v1/fields/ranking-schema";
import type { PlacedField } from "@/analytics/portfolio/factor-model";
import { basisParams, type Basis } from "@/components/basis/basis";

/** Every named answer to how fields move together, the book's own first. There are a few. */
export function useDependenceSets() {
  return useQuery({
    queryKey: ["dependence-sets"],
    queryFn: ({ signal }) =>
      request("/api/v1/dependence-sets", { schema: dependenceSetsSchema, signal }),
    select: ({ items }) => items,
  });
}

export function useBasins() {
  return useQuery({
    queryKey: ["basins"],
    queryFn: ({ signal }) => request("/api/v1/basins", { schema: basinsSchema, signal }),
    select: ({ items }) => items,
  });
}

/** Every field of the book with its basin, by name. */
export function useBookFields() {
  return useQuery({
    queryKey: ["fields", "places"],
    queryFn: ({ signal }) =>
      request("/api/v1/fields?limit=1000&sort=name&direction=ascending", {
        schema: rankingSchema,
        signal,
      }),
    select: ({ items }): PlacedField[] =>
      items.map(({ id, name, basin }) => ({
        id,
        name,
        basinId: basin.id,
        basinName: basin.name,
      })),
  });
}

/** What a set makes of the portfolio on a basis. */
export type SetTotals = Pick<Ranking, "totals" | "prices">;

/** The totals under each of these sets, everything else of the basis being the same. */
export function useSetTotals(basis: Basis, sets: readonly DependenceSetView[]) {
  return useQueries({
    queries: sets.map((set) => {
      const params = basisParams({ ...basis, dependence: set.id });
      params.set("limit", "1");
      return {
        // Another version of a set is another total.
        queryKey: ["fields", "set-totals", params.toString(), set.version],
        queryFn: ({ signal }: { signal: AbortSignal }) =>
          request(`/api/v1/fields?${params}`, { schema: rankingSchema, signal }),
        staleTime: 60_000,
      };
    }),
    combine: (results) =>
      new Map<string, SetTotals | undefined>(
        sets.map(({ id }, index) => [id, results[index].data]),
      ),
  });
}

/** Totals stand on sets and the basis strip lists them, so the shell and whatever a page shows are read anew. */
function useRefresh() {
  const client = useQueryClient();
  const router = useRouter();
  return () => {
    router.refresh();
    return client.invalidateQueries();
  };
}

export function useCreateSet() {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: (body: NewDependenceSetRequest) =>
      request("/api/v1/dependence-sets", {
        method: "POST",
        body,
        idempotencyKey: crypto.randomUUID(),
        schema: dependenceSetSchema,
      }),
    onSuccess: refresh,
  });
}

export function useSaveSet(id: string) {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: ({ version, body }: { version: number; body: DependenceSetPatchRequest }) =>
      request(`/api/v1/dependence-sets/${id}`, {
        method: "PATCH",
        version,
        body,
        schema: dependenceSetSchema,
      }),
    onSuccess: refresh,
  });
}

export function useRemoveSet(id: string) {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: (version: number) =>
      request(`/api/v1/dependence-sets/${id}`, {
        method: "DELETE",
        version,
        schema: z.undefined(),
      }),
    onSuccess: refresh,
  });
}
