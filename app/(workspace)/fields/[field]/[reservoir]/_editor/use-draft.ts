"use client";

import { useCallback, useEffect, useMemo, useRef, useState } from "react";
import { useLeaveWarning } from "@/app/_client/use-leave-warning";
import type { EstimateInputs, InputName } from "@/analytics/volumetrics/inputs-schema";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import { errorWords, ProblemError } from "@/app/_client/request";
import { estimateSchema, type EstimateView } from "@/app/api/v1/estimates/schema";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { isSameInputs } from "@/components/estimate/differences";
import { readEstimate } from "@/components/estimate/estimate-reading";
import {
  emptyText,
  textOfInputs,
  withCorrelation,
  withInput,
  type Correlation,
  type EstimateText,
} from "@/components/estimate/estimate-text";
import type { InputText } from "@/components/estimate/input-text";
import type { PlanText } from "@/components/estimate/plan-text";
import { saveDraft, type DraftChange, type SamplingChoice } from "../_queries/reservoir-page";
import { dropBackup, readBackup, writeBackup, type Backup } from "./draft-backup";

const SAVE_PAUSE_MS = 1_200;
const BACKUP_PAUSE_MS = 250;

/** What the server has of the draft. */
interface Base {
  estimateId: string | null;
  version: number | null;
  inputs: EstimateInputs | null;
}

export type SaveState =
  | { kind: "saved" }
  | { kind: "waiting" }
  | { kind: "saving" }
  /** something is missing or impossible, so it is kept in this browser only */
  | { kind: "kept" }
  | { kind: "conflict" }
  | { kind: "failed"; words: string };

export interface DraftStart {
  reservoirId: string;
  depthFt: number | null;
  fluid: SeparatorTest | null;
  /** the open estimate when it may be changed; `null` for a first estimate */
  open: Pick<EstimateView, "id" | "version" | "inputs"> | null;
  /** hands what the server answered to the page */
  onSaved: (estimate: EstimateView) => void;
}

const baseOf = (open: DraftStart["open"]): Base => ({
  estimateId: open?.id ?? null,
  version: open?.version ?? null,
  inputs: open?.inputs ?? null,
});

/** Text to start with: what this browser kept, or what the server has, or nothing. */
function startingPoint(start: DraftStart): {
  base: Base;
  text: EstimateText;
  restored: Backup | null;
} {
  const backup = readBackup(start.reservoirId);
  const base = baseOf(start.open);
  if (backup && backup.estimateId === base.estimateId) {
    // Saving under the version it began from finds out whether somebody else was faster.
    return { base: { ...base, version: backup.version }, text: backup.text, restored: backup };
  }
  const text = start.open ? textOfInputs(start.open.inputs) : emptyText(start.depthFt, start.fluid);
  return { base, text, restored: null };
}

/**
 * A draft being typed: text, what it reads as, and its way to the server. Every change is kept in this browser at once
 * and saved a moment after the last key; if somebody else saved first, both versions stay until the person has chosen.
 */
export function useDraft(start: DraftStart) {
  const { reservoirId, open, onSaved } = start;
  const [initial] = useState(() => startingPoint(start));
  const [text, setText] = useState(initial.text);
  const [base, setBase] = useState(initial.base);
  const [restored, setRestored] = useState(initial.restored);
  const [theirs, setTheirs] = useState<EstimateView | null>(null);
  const [progress, setProgress] = useState<{ busy: boolean; failure: string | null }>({
    busy: false,
    failure: null,
  });
  const pendingSample = useRef<string | null | undefined>(undefined);

  const reading = useMemo(() => readEstimate(text), [text]);
  const isSaved =
    base.inputs !== null &&
    reading.estimate !== null &&
    isSameInputs(reading.estimate, base.inputs);

  // Another tab, or another person, saved while nothing was typed here: show theirs.
  if (open && open.id === base.estimateId && open.version > (base.version ?? 0)) {
    if (isSaved && !progress.busy) {
      setBase(baseOf(open));
      if (base.inputs && !isSameInputs(open.inputs, base.inputs))
        setText(textOfInputs(open.inputs));
    }
  }

  const send = useCallback(
    async (change: Partial<DraftChange>): Promise<EstimateView | null> => {
      if (!base.estimateId || base.version === null) return null;
      setProgress({ busy: true, failure: null });
      try {
        const saved = await saveDraft(base.estimateId, base.version, change);
        setBase(baseOf(saved));
        onSaved(saved);
        setProgress({ busy: false, failure: null });
        return saved;
      } catch (error) {
        const current = conflictOf(error);
        if (current) setTheirs(current);
        setProgress({ busy: false, failure: current ? null : errorWords(error) });
        return null;
      }
    },
    [base, onSaved],
  );

  const save = useCallback(async (): Promise<EstimateView | null> => {
    if (!reading.estimate) return null;
    const saved = await send({
      inputs: reading.estimate,
      ...(pendingSample.current !== undefined && { fluidSampleId: pendingSample.current }),
    });
    if (!saved) return null;
    pendingSample.current = undefined;
    setRestored(null);
    return saved;
  }, [reading.estimate, send]);

  const isReady = base.estimateId !== null && reading.estimate !== null && !isSaved && !theirs;
  useEffect(() => {
    if (!isReady || progress.busy || progress.failure !== null) return;
    const timer = setTimeout(() => void save(), SAVE_PAUSE_MS);
    return () => clearTimeout(timer);
  }, [isReady, progress, save]);

  useEffect(() => {
    if (isSaved) {
      dropBackup(reservoirId);
      return;
    }
    const { estimateId, version } = base;
    if (estimateId === null && text === initial.text) return;
    const timer = setTimeout(
      () => writeBackup(reservoirId, { estimateId, version, text, at: new Date().toISOString() }),
      BACKUP_PAUSE_MS,
    );
    return () => clearTimeout(timer);
  }, [isSaved, text, base, reservoirId, initial.text]);

  useLeaveWarning(!isSaved && text !== initial.text);

  const change = useCallback((next: (text: EstimateText) => EstimateText) => {
    setText(next);
    setProgress((state) => (state.failure === null ? state : { ...state, failure: null }));
  }, []);

  return {
    text,
    reading,
    base,
    restored,
    theirs,
    isSaved,
    saveState: saveStateOf({ isSaved, theirs, progress, canSave: isReady }),
    save,
    /** How the trials are drawn: saved by themselves, whatever stands in the fields. */
    saveSampling: useCallback((sampling: SamplingChoice) => send(sampling), [send]),
    setInput: useCallback(
      (name: DriverName, input: InputText) => change((now) => withInput(now, name, input)),
      [change],
    ),
    /** Puts a recovery plan in, and into use. */
    setPlan: useCallback(
      (plan: PlanText) => change((now) => ({ ...now, plan, usesPlan: true })),
      [change],
    ),
    /** Turns between the plan and recoveries typed by hand; both keep their figures. */
    setUsesPlan: useCallback(
      (usesPlan: boolean) => change((now) => ({ ...now, usesPlan: usesPlan && now.plan !== null })),
      [change],
    ),
    setCorrelation: useCallback(
      (a: InputName, b: InputName, rank: number) =>
        change((now) => ({ ...now, correlations: withCorrelation(now.correlations, a, b, rank) })),
      [change],
    ),
    setCorrelations: useCallback(
      (correlations: Correlation[]) => change((now) => ({ ...now, correlations })),
      [change],
    ),
    /** @param sampleId  `null` when the sheet is no laboratory's */
    setFluid: useCallback(
      (fluid: SeparatorTest, sampleId: string | null, condensateYield?: InputText) => {
        pendingSample.current = sampleId;
        change((now) => ({
          ...now,
          fluid,
          inputs: condensateYield
            ? { ...now.inputs, condensateYieldStbPerMmscf: condensateYield }
            : now.inputs,
        }));
      },
      [change],
    ),
    /** Goes on from the merged inputs, on top of what the other person saved. */
    resolveConflict: useCallback(
      (merged: EstimateInputs) => {
        if (!theirs) return;
        setBase(baseOf(theirs));
        setText(textOfInputs(merged));
        setTheirs(null);
      },
      [theirs],
    ),
    /** Keeps everything as it is typed, on top of what the other person saved. */
    keepMine: useCallback(() => {
      if (!theirs) return;
      setBase(baseOf(theirs));
      setTheirs(null);
    }, [theirs]),
    /** Goes back to what the server has. */
    revert: useCallback(() => {
      dropBackup(reservoirId);
      setText(open ? textOfInputs(open.inputs) : emptyText(start.depthFt, start.fluid));
      setBase(baseOf(open));
      setRestored(null);
      setProgress({ busy: false, failure: null });
    }, [open, reservoirId, start.depthFt, start.fluid]),
  };
}

export type Draft = ReturnType<typeof useDraft>;

function saveStateOf(state: {
  isSaved: boolean;
  theirs: EstimateView | null;
  progress: { busy: boolean; failure: string | null };
  canSave: boolean;
}): SaveState {
  if (state.theirs) return { kind: "conflict" };
  if (state.progress.busy) return { kind: "saving" };
  if (state.isSaved) return { kind: "saved" };
  if (state.progress.failure !== null) return { kind: "failed", words: state.progress.failure };
  return state.canSave ? { kind: "waiting" } : { kind: "kept" };
}

/** The other person's version, when that is why saving was refused. */
function conflictOf(error: unknown): EstimateView | null {
  if (!(error instanceof ProblemError) || error.status !== 412) return null;
  const current = estimateSchema.safeParse(error.current);
  return current.success ? current.data : null;
}
