"use client";

import { createContext, useContext, useMemo, useState, type ReactNode } from "react";
import type { SimulationSummary } from "@/analytics/volumetrics/results-schema";
import { DEFAULT_SAMPLING } from "@/analytics/volumetrics/trial-counts";
import type { Warning } from "@/analytics/warnings";
import { useCan } from "@/app/_client/use-session";
import type { EstimateBodyView } from "@/app/api/v1/estimates/schema";
import type { ReservoirPageView } from "@/app/api/v1/fields/file-schema";
import { useBasis } from "@/components/basis/use-basis";
import { previewWarnings } from "@/components/estimate/checklist";
import { readEstimate, type EstimateReading } from "@/components/estimate/estimate-reading";
import { textOfInputs, type EstimateText } from "@/components/estimate/estimate-text";
import { resultBasisOf, type ResultBasis } from "@/components/estimate/result-rows";
import { useTakeEstimate, type Place } from "../_queries/reservoir-page";
import { readBackup } from "./draft-backup";
import { useDraft, type Draft } from "./use-draft";
import { useLiveResults } from "./use-live-results";

/** What every tab of a reservoir's page stands on. */
export interface ReservoirContextValue {
  place: Place;
  page: ReservoirPageView;
  /** units and interest of the results */
  resultBasis: ResultBasis;
  withBasis: (href: string) => string;
  /** the revision on show; `null` for a first estimate that was not saved yet */
  shown: EstimateBodyView | null;
  /** typing; `null` when the revision is only read */
  draft: Draft | null;
  text: EstimateText | null;
  reading: EstimateReading | null;
  warnings: readonly Warning[];
  results: {
    /** of what stands in the fields, or of the revision on show */
    summary: SimulationSummary | null;
    /** all trials were run on exactly these inputs */
    isFull: boolean;
    isStale: boolean;
    error: Error | null;
  };
  /** the approved revision, when it is another than the one on show */
  before: EstimateBodyView | null;
  /** begins a first estimate, where none exists */
  startFirst: (() => void) | null;
}

const ReservoirContext = createContext<ReservoirContextValue | null>(null);

export function useReservoir(): ReservoirContextValue {
  const value = useContext(ReservoirContext);
  if (!value) throw new Error("useReservoir needs a ReservoirProvider above it");
  return value;
}

interface ProviderProps {
  place: Place;
  page: ReservoirPageView;
  children: ReactNode;
}

/** Decides whether the person types or reads here, and provides either to the tabs. */
export function ReservoirProvider({ place, page, children }: ProviderProps) {
  const can = useCan();
  const [isStarting, setStarting] = useState(() => readBackup(page.id)?.estimateId === null);
  const { open, approved } = page;
  const mayBegin = open === null && approved === null && can("estimate.create");
  const isTyping = (open?.can.update ?? false) || (mayBegin && isStarting);
  return isTyping ? (
    // Another draft is another person's work: start over with it.
    <TypingProvider key={open?.id ?? "first"} place={place} page={page}>
      {children}
    </TypingProvider>
  ) : (
    <ReadingProvider
      place={place}
      page={page}
      startFirst={mayBegin ? () => setStarting(true) : null}
    >
      {children}
    </ReadingProvider>
  );
}

function useShared(page: ReservoirPageView) {
  const { basis, withBasis } = useBasis();
  const { field } = page;
  const resultBasis = useMemo(() => resultBasisOf(basis, field), [basis, field]);
  return { basis, withBasis, resultBasis };
}

function TypingProvider({ place, page, children }: ProviderProps) {
  const { withBasis, resultBasis } = useShared(page);
  const take = useTakeEstimate(place);
  const open = page.open?.can.update ? page.open : null;
  const draft = useDraft({
    reservoirId: page.id,
    depthFt: page.depthFt,
    fluid: page.fluidSamples.at(0)?.separatorTest ?? null,
    open,
    onSaved: take,
  });
  const stored = draft.isSaved ? (open?.summary ?? null) : null;
  const live = useLiveResults(stored ? null : draft.reading.estimate, {
    seed: open?.seed ?? 1,
    sampling: open?.sampling ?? DEFAULT_SAMPLING,
  });
  const summary = stored ?? live.summary;
  const isStale = stored === null && live.isStale;

  const value: ReservoirContextValue = {
    place,
    page,
    resultBasis,
    withBasis,
    shown: open,
    draft,
    text: draft.text,
    reading: draft.reading,
    // The trials notice more than the inputs alone do, but only once they belong to these inputs.
    warnings:
      stored?.warnings ??
      (live.summary && !isStale ? previewWarnings(live.summary.warnings) : draft.reading.warnings),
    results: { summary, isFull: stored !== null, isStale, error: stored ? null : live.error },
    before: page.approved,
    startFirst: null,
  };
  return <ReservoirContext value={value}>{children}</ReservoirContext>;
}

function ReadingProvider({
  place,
  page,
  startFirst,
  children,
}: ProviderProps & { startFirst: (() => void) | null }) {
  const { basis, withBasis, resultBasis } = useShared(page);
  const { open, approved } = page;
  const isForDecision = open !== null && (open.can.approve || open.can.return);
  const prefersOpen = isForDecision || basis.estimates === "latest";
  const shown = (prefersOpen ? (open ?? approved) : (approved ?? open)) ?? null;
  const text = useMemo(() => shown && textOfInputs(shown.inputs), [shown]);
  const reading = useMemo(() => text && readEstimate(text), [text]);

  const value: ReservoirContextValue = {
    place,
    page,
    resultBasis,
    withBasis,
    shown,
    draft: null,
    text,
    reading,
    warnings: shown?.summary?.warnings ?? reading?.warnings ?? [],
    results: { summary: shown?.summary ?? null, isFull: true, isStale: false, error: null },
    before: approved && approved.id !== shown?.id ? approved : null,
    startFirst,
  };
  return <ReservoirContext value={value}>{children}</ReservoirContext>;
}
