"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { request } from "@/app/_client/request";
import { estimateSchema, type EstimateView } from "@/app/api/v1/estimates/schema";
import { reservoirPageSchema, type ReservoirPageView } from "@/app/api/v1/fields/file-schema";

export const reservoirKeys = {
  page: (field: string, reservoir: string) => ["reservoir", field, reservoir] as const,
};

export interface Place {
  field: string;
  reservoir: string;
}

/** The reservoir with its estimates, samples and revisions. Looked at again when the person comes back to the window. */
export function useReservoirPage({ field, reservoir }: Place) {
  return useQuery({
    queryKey: reservoirKeys.page(field, reservoir),
    queryFn: ({ signal }) =>
      request(
        `/api/v1/fields/${encodeURIComponent(field)}/reservoirs/${encodeURIComponent(reservoir)}`,
        { schema: reservoirPageSchema, signal },
      ),
    refetchOnWindowFocus: true,
  });
}

const post = (path: string, version: number | undefined, body?: unknown) =>
  request(path, { method: "POST", version, body, schema: estimateSchema });

/** How the trials of an estimate are drawn. */
export type SamplingChoice = Pick<EstimateView, "sampling" | "trials" | "seed">;

export interface DraftChange extends SamplingChoice {
  inputs: EstimateView["inputs"];
  fluidSampleId?: string | null;
  note?: string;
}

/** Saves a draft under the version it was read at. */
export const saveDraft = (id: string, version: number, change: Partial<DraftChange>) =>
  request(`/api/v1/estimates/${id}`, {
    method: "PATCH",
    version,
    body: change,
    schema: estimateSchema,
  });

export const createDraft = (reservoirId: string, start: Partial<DraftChange> = {}) =>
  request(`/api/v1/reservoirs/${reservoirId}/estimates`, {
    method: "POST",
    body: start,
    schema: estimateSchema,
  });

export const runDraft = (id: string, version: number) =>
  post(`/api/v1/estimates/${id}/run`, version);

export const submitDraft = (id: string, version: number, note: string) =>
  post(`/api/v1/estimates/${id}/submit`, version, { note });

export const decide = (decision: "approve" | "return", id: string, version: number, note: string) =>
  post(`/api/v1/estimates/${id}/${decision}`, version, note === "" ? {} : { note });

/** Puts a revision that the server answered with into the page, and lets lists and totals be read anew. */
export function useTakeEstimate({ field, reservoir }: Place) {
  const client = useQueryClient();
  return (estimate: EstimateView) => {
    client.setQueryData<ReservoirPageView>(reservoirKeys.page(field, reservoir), (page) =>
      page && isOpen(estimate) ? { ...page, open: withoutPlace(estimate) } : page,
    );
    void client.invalidateQueries({ queryKey: reservoirKeys.page(field, reservoir) });
    if (!isOpen(estimate) || estimate.state === "submitted") void client.invalidateQueries();
  };
}

const isOpen = ({ state }: EstimateView) =>
  state === "draft" || state === "submitted" || state === "returned";

function withoutPlace(estimate: EstimateView): ReservoirPageView["open"] {
  const { place, ...body } = estimate;
  void place;
  return body;
}

/** A step of an estimate's life, with the page brought up to date after it. */
export function useEstimateStep<Input>(
  place: Place,
  step: (input: Input) => Promise<EstimateView>,
) {
  const take = useTakeEstimate(place);
  return useMutation({ mutationFn: step, onSuccess: take });
}
