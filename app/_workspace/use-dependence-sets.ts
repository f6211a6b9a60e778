"use client";

import { useQuery } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import { dependenceSetsSchema } from "@/app/api/v1/dependence-sets/schema";

export const dependenceSetsKey = ["dependence-sets"] as const;

/** Every named answer to how fields move together, the book's own first. There are a few. */
export function useDependenceSets({ enabled = true }: { enabled?: boolean } = {}) {
  return useQuery({
    queryKey: dependenceSetsKey,
    queryFn: ({ signal }) =>
      request("/api/v1/dependence-sets", { schema: dependenceSetsSchema, signal }),
    select: ({ items }) =>
      [...items].sort(
        (a, b) => Number(b.isDefault) - Number(a.isDefault) || a.name.localeCompare(b.name),
      ),
    enabled,
  });
}
