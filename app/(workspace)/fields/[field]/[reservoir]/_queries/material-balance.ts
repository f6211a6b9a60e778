"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import {
  materialBalanceResponseSchema,
  type MaterialBalanceRequest,
} from "@/app/api/v1/calculations/material-balance-schema";
import { useSettled } from "../_editor/use-live-results";

/** Gas in place from pressures, a moment after the last key; `null` asks nothing. */
export function useMaterialBalance(body: MaterialBalanceRequest | null) {
  const question = useSettled(body && JSON.stringify(body));
  return useQuery({
    queryKey: ["calculation", "material-balance", question],
    queryFn: ({ signal }) =>
      request("/api/v1/calculations/material-balance", {
        method: "POST",
        body: JSON.parse(question ?? "null") as unknown,
        schema: materialBalanceResponseSchema,
        signal,
      }),
    enabled: question !== null,
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    retry: false,
  });
}
