"use client";

import { keepPreviousData, useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import type { SampleStudy } from "@/analytics/fluid/sample-study-schema";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { request } from "@/app/_client/request";
import { wellstreamResponseSchema } from "@/app/api/v1/calculations/schema";
import { fluidSampleSchema } from "@/app/api/v1/fluid-samples/schema";
import { useSettled } from "../_editor/use-live-results";
import { reservoirKeys, type Place } from "./reservoir-page";

/** The wellstream of what stands in the sheet, a moment after the last key; the last one stays meanwhile. */
export function useWellstream(
  test: SeparatorTest | null,
  reservoir: { pressurePsia: number; temperatureDegF: number } | null,
) {
  const question = useSettled(
    test === null ? null : JSON.stringify({ separatorTest: test, reservoir }),
  );
  return useQuery({
    queryKey: ["wellstream", question],
    queryFn: ({ signal }) =>
      request("/api/v1/calculations/wellstream", {
        method: "POST",
        body: JSON.parse(question ?? "null") as unknown,
        schema: wellstreamResponseSchema,
        signal,
      }),
    enabled: question !== null,
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    retry: false,
  });
}

export interface SampleChange {
  /** `null` makes a new one */
  id: string | null;
  version?: number;
  reservoirId: string;
  name: string;
  sampledOn: string;
  laboratory: string;
  separatorTest: SeparatorTest;
  study: SampleStudy;
}

/** Saves a sample, new or changed, and reads the page anew. */
export function useSaveSample({ field, reservoir }: Place) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ id, version, reservoirId, ...sample }: SampleChange) =>
      request(id === null ? "/api/v1/fluid-samples" : `/api/v1/fluid-samples/${id}`, {
        method: id === null ? "POST" : "PATCH",
        version,
        body: id === null ? { reservoirId, ...sample } : sample,
        schema: fluidSampleSchema,
      }),
    onSuccess: () => client.invalidateQueries({ queryKey: reservoirKeys.page(field, reservoir) }),
  });
}
