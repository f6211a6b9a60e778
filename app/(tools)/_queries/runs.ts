"use client";

import { keepPreviousData, useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import {
  runItemsSchema,
  runSchema,
  runsSchema,
  type NewRunRequest,
  type RunItemView,
  type RunView,
} from "@/app/api/v1/runs/schema";
import { MOVED_BEYOND, compareOutcomes, type Comparison } from "@/components/runs/run-words";
import type { RunItemState } from "@/models/vocabulary";

const keys = {
  all: ["runs"] as const,
  list: (offset: number) => [...keys.all, "list", offset] as const,
  one: (id: string) => [...keys.all, id] as const,
  items: (id: string, show: ItemFilter, offset: number) =>
    [...keys.one(id), "items", show, offset] as const,
};

export const RUNS_PER_PAGE = 20;
export const ITEMS_PER_PAGE = 50;

/** What of a run is listed: everything, items of one state, or those whose figures moved. */
export type ItemFilter = "all" | "moved" | RunItemState;

/** Work goes on until it has finished or was cancelled. */
export const isUnderWay = (run: Pick<RunView, "state"> | undefined): boolean =>
  run?.state === "waiting" || run?.state === "running";

const LOOK_EVERY_MS = 1_000;

/** Runs of everybody, newest first; looked at while one of them goes on. */
export function useRuns(offset: number) {
  return useQuery({
    queryKey: keys.list(offset),
    queryFn: ({ signal }) =>
      request(`/api/v1/runs?limit=${RUNS_PER_PAGE}&offset=${offset}`, {
        schema: runsSchema,
        signal,
      }),
    placeholderData: keepPreviousData,
    refetchInterval: ({ state }) =>
      state.data?.items.some(isUnderWay) ? 2 * LOOK_EVERY_MS : false,
  });
}

/** One run; looked at every second while it goes on. Without an id nothing is asked. */
export function useRun(id: string | null) {
  return useQuery({
    queryKey: keys.one(id ?? ""),
    queryFn: ({ signal }) => request(`/api/v1/runs/${id}`, { schema: runSchema, signal }),
    enabled: id !== null,
    refetchInterval: ({ state }) => (isUnderWay(state.data) ? LOOK_EVERY_MS : false),
  });
}

/** What a query that is looked at again and again says of its last answer. */
interface Listened {
  dataUpdatedAt: number;
  error: Error | null;
  failureCount: number;
  fetchStatus: string;
}

/** When the server last answered, once a later look got no answer; null while all is well, or nothing was heard yet. */
export function lastHeardOf({
  dataUpdatedAt,
  error,
  failureCount,
  fetchStatus,
}: Listened): Date | null {
  const isSilent = error !== null || failureCount > 0 || fetchStatus === "paused";
  return isSilent && dataUpdatedAt > 0 ? new Date(dataUpdatedAt) : null;
}

function itemSearch(show: ItemFilter, offset: number, limit: number): string {
  const search = new URLSearchParams({ limit: String(limit), offset: String(offset) });
  if (show === "moved") search.set("movedBeyond", String(MOVED_BEYOND));
  else if (show !== "all") search.set("state", show);
  return search.toString();
}

/** A page of a run's estimates. */
export function useRunItems(id: string, show: ItemFilter, offset: number, live: boolean) {
  return useQuery({
    queryKey: keys.items(id, show, offset),
    queryFn: ({ signal }) =>
      request(`/api/v1/runs/${id}/items?${itemSearch(show, offset, ITEMS_PER_PAGE)}`, {
        schema: runItemsSchema,
        signal,
      }),
    placeholderData: keepPreviousData,
    refetchInterval: live ? 2 * LOOK_EVERY_MS : false,
  });
}

const WHOLE_PAGE = 200;

/** Looks through every estimate of a finished recalculation, page by page. */
export function useComparison(run: RunView | undefined) {
  const id = run?.id ?? "";
  return useQuery({
    queryKey: [...keys.one(id), "comparison", run?.version],
    enabled: run?.kind === "recalculation" && !isUnderWay(run),
    staleTime: Infinity,
    queryFn: async ({ signal }): Promise<Comparison> => {
      const outcomes: RunItemView["outcome"][] = [];
      let offset = 0;
      let total = 1;
      while (offset < total) {
        const search = itemSearch("done", offset, WHOLE_PAGE);
        const page = await request(`/api/v1/runs/${id}/items?${search}`, {
          schema: runItemsSchema,
          signal,
        });
        outcomes.push(...page.items.map(({ outcome }) => outcome));
        total = page.total;
        offset += WHOLE_PAGE;
      }
      return compareOutcomes(outcomes);
    },
  });
}

/** After a run began, stopped or was taken up again. */
function useRunChange<Input>(change: (input: Input) => Promise<RunView>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: change,
    onSettled: () => client.invalidateQueries({ queryKey: keys.all }),
  });
}

export function useStartRun() {
  return useRunChange((body: NewRunRequest) =>
    request("/api/v1/runs", {
      method: "POST",
      body,
      idempotencyKey: crypto.randomUUID(),
      schema: runSchema,
    }),
  );
}

const act = (action: "cancel" | "retry") => (id: string) =>
  request(`/api/v1/runs/${id}/${action}`, { method: "POST", schema: runSchema });

/** What is done stays done; what waits is passed over. */
export const useCancelRun = () => useRunChange(act("cancel"));

/** Failed items go back to the queue; what is done is not done again. */
export const useRetryRun = () => useRunChange(act("retry"));
