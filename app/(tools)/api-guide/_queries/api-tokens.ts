"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import {
  apiTokenSchema,
  apiTokensSchema,
  newApiTokenAnswerSchema,
} from "@/app/api/v1/api-tokens/schema";

const key = ["api-tokens"];

/** The person's own tokens, newest first. */
export function useApiTokens() {
  return useQuery({
    queryKey: key,
    queryFn: ({ signal }) => request("/api/v1/api-tokens", { schema: apiTokensSchema, signal }),
  });
}

/** Makes a token; the answer is the only one that carries the secret. */
export function useCreateToken() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (name: string) =>
      request("/api/v1/api-tokens", {
        method: "POST",
        body: { name },
        schema: newApiTokenAnswerSchema,
      }),
    onSuccess: () => client.invalidateQueries({ queryKey: key }),
  });
}

/** Makes a token useless at once. */
export function useRevokeToken() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (id: string) =>
      request(`/api/v1/api-tokens/${id}`, { method: "DELETE", schema: apiTokenSchema }),
    onSuccess: () => client.invalidateQueries({ queryKey: key }),
  });
}
