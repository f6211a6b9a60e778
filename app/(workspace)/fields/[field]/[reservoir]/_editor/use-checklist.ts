"use client";

import { useMemo } from "react";
import { submitChecklist, type ChecklistItem } from "@/components/estimate/checklist";
import { isSameFluid } from "@/components/estimate/differences";
import { useReservoir } from "./reservoir-context";

/** What stands between this draft and a reviewer; empty when nothing is being typed. */
export function useChecklist(): ChecklistItem[] {
  const { page, draft, text, reading, warnings, results } = useReservoir();
  return useMemo(() => {
    if (!draft || !text || !reading) return [];
    const sample = page.fluidSamples.find((candidate) =>
      isSameFluid(candidate.separatorTest, text.fluid),
    );
    return submitChecklist({
      text,
      reading,
      warnings,
      sampleName: sample?.name ?? null,
      trials: results.isFull ? (results.summary?.trials ?? null) : null,
    });
  }, [page, draft, text, reading, warnings, results]);
}
