"use client";

import { useQuery } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import { pageOf } from "@/app/api/v1/common-schema";
import { estimateListItemSchema } from "@/app/api/v1/estimates/schema";

const schema = pageOf(estimateListItemSchema);

/** How many estimates wait for a reviewer; `undefined` until it is known. */
export function useWaitingCount(): number | undefined {
  const { data } = useQuery({
    queryKey: ["estimates", "waiting-count"],
    queryFn: ({ signal }) =>
      request("/api/v1/estimates?state=submitted&limit=1", { schema, signal }),
    select: ({ total }) => total,
    refetchInterval: 60_000,
  });
  return data;
}
