"use client";

import { useMemo } from "react";
import { submitChecklist, type ChecklistItem } from "@/components/estimate/checklist";
import { sampleOfEstimate } from "@/components/fluid/estimate-sample";
import { useReservoir } from "./reservoir-context";

/** What stands between this draft and a reviewer; empty when nothing is being typed. */
export function useChecklist(): ChecklistItem[] {
  const { page, shown, draft, text, reading, warnings, results } = useReservoir();
  return useMemo(() => {
    if (!draft || !text || !reading) return [];
    const used = sampleOfEstimate(page.fluidSamples, shown, text.fluid);
    return submitChecklist({
      text,
      reading,
      warnings,
      sampleName: used?.sample.name ?? null,
      isSampleNewer: used?.isNewer ?? false,
      trials: results.isFull ? (results.summary?.trials ?? null) : null,
    });
  }, [page, shown, draft, text, reading, warnings, results]);
}
