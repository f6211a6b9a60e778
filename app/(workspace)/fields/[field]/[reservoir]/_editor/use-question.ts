"use client";

import type { ResultName } from "@/analytics/volumetrics/results-schema";
import type { SensitivityQuestion } from "../_queries/sensitivity";
import { useReservoir } from "./reservoir-context";
import { useSettled } from "./use-live-results";

/** Looking for drivers takes a pause, and more of one than a preview of the results. */
const PAUSE_MS = 800;
/** Drivers are not known better with more trials than this, and take memory. */
const MOST_TRIALS = 65_536;

/** The trials that are looked at unless others are chosen: those above P10. */
export const ABOVE_P10 = { from: 0.9, to: 1 };

/** The estimate on show as a question about what drives it; `null` while it is not complete. */
export function useQuestion(
  result: ResultName,
  chosen: SensitivityQuestion["chosen"] = ABOVE_P10,
): SensitivityQuestion | null {
  const { shown, draft } = useReservoir();
  const inputs = useSettled((draft ? draft.reading.estimate : shown?.inputs) ?? null, PAUSE_MS);
  if (!inputs) return null;
  if (!shown) return { inputs, seed: 1, result, chosen };
  const { seed, trials, sampling } = shown;
  return { inputs, seed, trials: Math.min(trials, MOST_TRIALS), sampling, result, chosen };
}
