"use client";

import type { ResultName } from "@/analytics/volumetrics/results-schema";
import type { SensitivityQuestion } from "../_queries/sensitivity";
import { useReservoir } from "./reservoir-context";
import { useSettled } from "./use-live-results";

/** Looking for drivers takes a pause, and more of one than a preview of the results. */
const PAUSE_MS = 800;
/** Drivers are not known better with more trials than this, and take memory. */
const MOST_TRIALS = 65_536;

/** The estimate on show as a question about what drives it; `null` while it is not complete. */
export function useQuestion(result: ResultName): SensitivityQuestion | null {
  const { shown, draft } = useReservoir();
  const inputs = useSettled((draft ? draft.reading.estimate : shown?.inputs) ?? null, PAUSE_MS);
  if (!inputs) return null;
  if (!shown) return { inputs, seed: 1, result };
  const { seed, trials, sampling } = shown;
  return { inputs, seed, trials: Math.min(trials, MOST_TRIALS), sampling, result };
}
