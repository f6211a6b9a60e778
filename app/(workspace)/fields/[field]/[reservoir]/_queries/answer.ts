"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import type { z } from "zod";
import { request } from "@/app/_client/request";

/**
 * The answer to a calculation's question, which is the same whenever it is asked. The last answer stays while another is
 * worked out.
 *
 * @param path      under /api/v1/calculations/
 * @param question  `null` while it is not complete
 */
export function useAnswer<Answer>(
  path: string,
  question: object | null,
  schema: z.ZodType<Answer>,
) {
  const query = useQuery({
    queryKey: [path, question],
    queryFn: ({ signal }) =>
      request(`/api/v1/calculations/${path}`, { method: "POST", body: question, schema, signal }),
    enabled: question !== null,
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    gcTime: 10 * 60_000,
    retry: false,
  });
  return {
    answer: query.data ?? null,
    isStale: query.isPlaceholderData,
    isPending: query.isPending && question !== null,
    error: query.error,
    refetch: () => void query.refetch(),
  };
}
