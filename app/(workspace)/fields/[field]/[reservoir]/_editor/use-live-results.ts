"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { useEffect, useState } from "react";
import type { SamplingMethod } from "@/analytics/uncertainty/sampling-schema";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import { request } from "@/app/_client/request";
import { simulationResponseSchema } from "@/app/api/v1/calculations/schema";

/**
 * Few enough to answer while typing; P90 of a lognormal spread of 0.8 is known to about 3 %. A power of two, which
 * suits either way of drawing trials.
 */
const LIVE_TRIALS = 2_048;
const PAUSE_MS = 250;

/** The value once it has stood still for a while. */
export function useSettled<Value>(value: Value, pauseMs = PAUSE_MS): Value {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), pauseMs);
    return () => clearTimeout(timer);
  }, [value, pauseMs]);
  return settled;
}

/**
 * Results of what stands in the fields, a moment after the last key. The last figures stay while new ones are computed;
 * an older question is given up.
 *
 * @param inputs  `null` while something is missing or impossible
 * @param drawn   seed and method of the draft, so that the full run continues the preview rather than rolling new dice
 */
export function useLiveResults(
  inputs: EstimateInputs | null,
  { seed, sampling }: { seed: number; sampling: SamplingMethod },
) {
  const settled = useSettled(inputs);
  const query = useQuery({
    queryKey: ["simulation", settled, seed, sampling],
    queryFn: ({ signal }) =>
      request("/api/v1/calculations/simulation", {
        method: "POST",
        body: { inputs: settled, trials: LIVE_TRIALS, seed, sampling },
        schema: simulationResponseSchema,
        signal,
      }),
    enabled: settled !== null,
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    gcTime: 60_000,
    retry: false,
  });
  return {
    summary: query.data ?? null,
    error: query.error,
    /** the figures are of an earlier state of the fields */
    isStale: inputs !== settled || inputs === null || query.isPlaceholderData,
  };
}
