"use client";

import { keepPreviousData, useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import { basinSchema, basinsSchema } from "@/app/api/v1/basins/schema";
import { fieldFileSchema } from "@/app/api/v1/fields/file-schema";
import {
  fieldSchema,
  type FieldPatchRequest,
  type NewFieldRequest,
} from "@/app/api/v1/fields/schema";
import { peopleSchema } from "@/app/api/v1/people/schema";
import { reservoirSchema, type NewReservoirRequest } from "@/app/api/v1/reservoirs/schema";
import { basisParams, type Basis } from "@/components/basis/basis";

/** The field with its reservoirs, revisions and figures on the basis; the last figures stay while the basis changes. */
export function useFieldFile(slug: string, basis: Basis) {
  const search = basisParams(basis).toString();
  return useQuery({
    queryKey: ["field", slug, search],
    queryFn: ({ signal }) =>
      request(`/api/v1/fields/${encodeURIComponent(slug)}/file${search && `?${search}`}`, {
        schema: fieldFileSchema,
        signal,
      }),
    placeholderData: keepPreviousData,
  });
}

export function useBasins() {
  return useQuery({
    queryKey: ["basins"],
    queryFn: ({ signal }) => request("/api/v1/basins", { schema: basinsSchema, signal }),
  });
}

/** Engineers that a field may be given to. */
export function useEngineers() {
  return useQuery({
    queryKey: ["people", "engineer"],
    queryFn: ({ signal }) =>
      request("/api/v1/people?role=engineer", { schema: peopleSchema, signal }),
  });
}

export function useCreateBasin() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (name: string) =>
      request("/api/v1/basins", { method: "POST", body: { name }, schema: basinSchema }),
    onSuccess: () => client.invalidateQueries({ queryKey: ["basins"] }),
  });
}

/** A new field, or a change of one; every figure of the portfolio may follow from it. */
export function useSaveField() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (
      change:
        | { id: string; version: number; patch: FieldPatchRequest }
        | { field: NewFieldRequest },
    ) =>
      "id" in change
        ? request(`/api/v1/fields/${change.id}`, {
            method: "PATCH",
            version: change.version,
            body: change.patch,
            schema: fieldSchema,
          })
        : request("/api/v1/fields", { method: "POST", body: change.field, schema: fieldSchema }),
    onSuccess: () => client.invalidateQueries(),
  });
}

export function useCreateReservoir() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (reservoir: NewReservoirRequest) =>
      request("/api/v1/reservoirs", { method: "POST", body: reservoir, schema: reservoirSchema }),
    onSuccess: () => client.invalidateQueries(),
  });
}
