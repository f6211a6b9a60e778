"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { z } from "zod";
import { request } from "@/app/_client/request";
import { pageOf } from "@/app/api/v1/common-schema";
import {
  priceDeckSchema,
  type NewPriceDeckRequest,
  type PriceDeckPatchRequest,
} from "@/app/api/v1/price-decks/schema";

const key = ["price-decks"] as const;
const listSchema = pageOf(priceDeckSchema);

/** Every deck with its prices, latest as-of date first. There are a few a year. */
export function usePriceDecks() {
  return useQuery({
    queryKey: [...key, "all"],
    queryFn: ({ signal }) =>
      request("/api/v1/price-decks?limit=200", { schema: listSchema, signal }),
    select: ({ items }) => items,
  });
}

/** One deck. */
export function usePriceDeck(id: string) {
  return useQuery({
    queryKey: [...key, id],
    queryFn: ({ signal }) =>
      request(`/api/v1/price-decks/${id}`, { schema: priceDeckSchema, signal }),
  });
}

/** After any change: lists and decks are read anew. */
function useRefresh() {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: key });
}

export function useCreateDeck() {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: (body: NewPriceDeckRequest) =>
      request("/api/v1/price-decks", {
        method: "POST",
        body,
        idempotencyKey: crypto.randomUUID(),
        schema: priceDeckSchema,
      }),
    onSuccess: refresh,
  });
}

export function useSaveDeck(id: string) {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: ({ version, body }: { version: number; body: PriceDeckPatchRequest }) =>
      request(`/api/v1/price-decks/${id}`, {
        method: "PATCH",
        version,
        body,
        schema: priceDeckSchema,
      }),
    onSuccess: refresh,
  });
}

/** Publishing changes the basis of every page, so the shell and all figures are read anew. */
export function usePublishDeck(id: string) {
  const client = useQueryClient();
  const router = useRouter();
  return useMutation({
    mutationFn: (version: number) =>
      request(`/api/v1/price-decks/${id}/publish`, {
        method: "POST",
        version,
        schema: priceDeckSchema,
      }),
    onSuccess: async () => {
      router.refresh();
      await client.invalidateQueries();
    },
  });
}

export function useDiscardDeck(id: string) {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: (version: number) =>
      request(`/api/v1/price-decks/${id}`, { method: "DELETE", version, schema: z.undefined() }),
    onSuccess: refresh,
  });
}
