"use client";

import { keepPreviousData, useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import {
  importListSchema,
  importSchema,
  type ImportDetail,
  type RowKind,
} from "@/app/api/v1/imports/schema";

const keys = {
  all: ["imports"] as const,
  list: () => [...keys.all, "list"] as const,
  detail: (id: string, show: RowKind, offset: number) =>
    [...keys.all, "detail", id, show, offset] as const,
};

export const ROWS_PER_PAGE = 50;

/** Imports of everybody, newest first. */
export function useImports() {
  return useQuery({
    queryKey: keys.list(),
    queryFn: ({ signal }) =>
      request("/api/v1/imports?limit=20", { schema: importListSchema, signal }),
  });
}

/** One import with a page of its rows; looked at every second while its runs are under way. */
export function useImport(id: string, show: RowKind, offset: number) {
  const search = new URLSearchParams({
    show,
    limit: String(ROWS_PER_PAGE),
    offset: String(offset),
  });
  return useQuery({
    queryKey: keys.detail(id, show, offset),
    queryFn: ({ signal }) =>
      request(`/api/v1/imports/${id}?${search}`, { schema: importSchema, signal }),
    placeholderData: keepPreviousData,
    refetchInterval: ({ state }) => (state.data?.state === "applying" ? 1_000 : false),
  });
}

/** Sends a file to be checked. */
export function useUpload(onChecked: (checked: ImportDetail) => void) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (file: File) => {
      const form = new FormData();
      form.set("file", file);
      return request("/api/v1/imports", { method: "POST", body: form, schema: importSchema });
    },
    onSuccess: async (checked) => {
      await client.invalidateQueries({ queryKey: keys.list() });
      onChecked(checked);
    },
  });
}

/** Takes the rows of a checked file into the book. */
export function useTake(id: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (rows: "all" | "good") =>
      request(`/api/v1/imports/${id}/commit`, {
        method: "POST",
        body: { rows },
        schema: importSchema,
      }),
    // Everything a screen shows may have changed.
    onSettled: () => client.invalidateQueries(),
  });
}
