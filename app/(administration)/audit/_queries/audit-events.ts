"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import { auditPageSchema } from "@/app/api/v1/audit-events/schema";
import { pageOf } from "@/app/api/v1/common-schema";
import { userSchema } from "@/app/api/v1/users/schema";

/** One page of the trail; `filter` as the API has it. */
export function useAuditEvents(filter: URLSearchParams, limit: number, offset: number) {
  const search = new URLSearchParams(filter);
  search.set("limit", String(limit));
  search.set("offset", String(offset));
  return useQuery({
    queryKey: ["audit-events", search.toString()],
    queryFn: ({ signal }) =>
      request(`/api/v1/audit-events?${search}`, { schema: auditPageSchema, signal }),
    placeholderData: keepPreviousData,
    staleTime: 5_000,
  });
}

const peopleSchema = pageOf(userSchema);

/** Everybody there ever was, to filter by: inactive people acted too. */
export function useEverybody() {
  return useQuery({
    queryKey: ["users", "for-audit"],
    queryFn: ({ signal }) => request("/api/v1/users?limit=200", { schema: peopleSchema, signal }),
    select: ({ items }) => items.map(({ id, name }) => ({ value: id, label: name })),
  });
}
