"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { useEffect, useState } from "react";
import { ProblemError, request } from "@/app/_client/request";
import { runItemsSchema, runSchema, type RunView } from "@/app/api/v1/runs/schema";
import type { SettleWish } from "@/components/estimate/settle-words";
import { reservoirKeys, type Place } from "./reservoir-page";

const POLL_MS = 1_000;

interface Kept extends SettleWish {
  runId: string;
}

const keyOf = (estimateId: string) => `dewledger.settle.${estimateId}`;

/** The run that this browser began for an estimate, so that a reload finds it again. */
function readKept(estimateId: string): Kept | null {
  try {
    const kept = JSON.parse(sessionStorage.getItem(keyOf(estimateId)) ?? "null") as Kept | null;
    return typeof kept?.runId === "string" ? kept : null;
  } catch {
    return null;
  }
}

function keep(estimateId: string, kept: Kept | null): void {
  try {
    if (kept) sessionStorage.setItem(keyOf(estimateId), JSON.stringify(kept));
    else sessionStorage.removeItem(keyOf(estimateId));
  } catch {
    // Without storage a reload loses sight of the run; the list of runs still has it.
  }
}

const isUnderWay = (run: RunView | undefined) =>
  run?.state === "waiting" || run?.state === "running";

/** A run under way is answered with its id when the same is asked for again. */
const runningId = (error: unknown) =>
  error instanceof ProblemError && error.code === "already_running"
    ? (error.existingId ?? null)
    : null;

/** Begins, follows and cancels a run that goes on until the percentiles of an estimate are settled. */
export function useUntilSettled(place: Place, estimateId: string) {
  const client = useQueryClient();
  const [kept, setKept] = useState<Kept | null>(() => readKept(estimateId));
  const runId = kept?.runId ?? null;

  const run = useQuery({
    queryKey: ["run", runId],
    queryFn: ({ signal }) => request(`/api/v1/runs/${runId}`, { schema: runSchema, signal }),
    enabled: runId !== null,
    refetchInterval: ({ state }) => (isUnderWay(state.data) ? POLL_MS : false),
  });
  const items = useQuery({
    queryKey: ["run", runId, "items", run.data?.state],
    queryFn: ({ signal }) =>
      request(`/api/v1/runs/${runId}/items?limit=1`, { schema: runItemsSchema, signal }),
    enabled: runId !== null && run.data !== undefined,
    placeholderData: (previous) => previous,
    refetchInterval: isUnderWay(run.data) ? POLL_MS : false,
  });

  function follow(next: Kept | null) {
    keep(estimateId, next);
    setKept(next);
  }

  const begin = useMutation({
    mutationFn: async (wish: SettleWish) => {
      try {
        const begun = await request("/api/v1/runs", {
          method: "POST",
          body: { kind: "untilSettled", estimateId, ...wish },
          idempotencyKey: crypto.randomUUID(),
          schema: runSchema,
        });
        return { ...wish, runId: begun.id };
      } catch (error) {
        const id = runningId(error);
        if (id === null) throw error;
        return { ...wish, runId: id };
      }
    },
    onSuccess: follow,
  });
  const cancel = useMutation({
    mutationFn: (current: RunView) =>
      request(`/api/v1/runs/${current.id}/cancel`, {
        method: "POST",
        schema: runSchema,
      }),
    onSettled: () => client.invalidateQueries({ queryKey: ["run", runId] }),
  });

  const state = run.data?.state;
  const hasEnded = state === "finished" || state === "cancelled";
  const { field, reservoir } = place;
  useEffect(() => {
    if (hasEnded) {
      void client.invalidateQueries({ queryKey: reservoirKeys.page(field, reservoir) });
    }
  }, [hasEnded, client, field, reservoir]);

  const startedAt = run.data?.startedAt;
  return {
    wish: kept,
    run: run.data ?? null,
    item: items.data?.items[0] ?? null,
    elapsedSeconds: startedAt ? (run.dataUpdatedAt - Date.parse(startedAt)) / 1000 : 0,
    begin,
    cancel,
    error: run.error,
    forget: () => follow(null),
  };
}
