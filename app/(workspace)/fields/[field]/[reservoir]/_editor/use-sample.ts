"use client";

import { useCallback, useEffect, useMemo, useState } from "react";
import { canonical } from "@/components/fluid/sample-differences";
import { readSample, type SampleText } from "@/components/fluid/sample-text";
import { dropSampleBackup, readSampleBackup, writeSampleBackup } from "./sample-backup";

const BACKUP_PAUSE_MS = 250;

/**
 * A fluid sample being typed: its text and what it reads as. Every change is kept in this tab until it is saved, so
 * leaving the page or reloading it loses nothing.
 *
 * @param sheet    names it in this tab's storage
 * @param stored   what the server has, or the text of an empty sample
 * @param version  of the stored sample; `null` for a new one
 */
export function useSample(sheet: string, stored: SampleText, version: number | null) {
  const [kept] = useState(() => readSampleBackup(sheet));
  const [text, setText] = useState(kept?.text ?? stored);
  // What was typed on top of an older version is saved as such: the server finds out.
  const [base, setBase] = useState({ stored, version: kept ? kept.version : version });
  const [restoredAt, setRestoredAt] = useState(kept?.at ?? null);
  const reading = useMemo(() => readSample(text), [text]);
  const isChanged = useMemo(() => canonical(text) !== canonical(base.stored), [text, base.stored]);

  useEffect(() => {
    if (!isChanged) {
      dropSampleBackup(sheet);
      return;
    }
    const timer = setTimeout(
      () => writeSampleBackup(sheet, { version: base.version, text, at: new Date().toISOString() }),
      BACKUP_PAUSE_MS,
    );
    return () => clearTimeout(timer);
  }, [sheet, isChanged, text, base.version]);

  useEffect(() => {
    if (!isChanged) return;
    const warn = (event: BeforeUnloadEvent) => event.preventDefault();
    addEventListener("beforeunload", warn);
    return () => removeEventListener("beforeunload", warn);
  }, [isChanged]);

  return {
    text,
    reading,
    isChanged,
    restoredAt,
    version: base.version,
    change: useCallback(
      (next: Partial<SampleText> | ((now: SampleText) => Partial<SampleText>)) =>
        setText((now) => ({ ...now, ...(typeof next === "function" ? next(now) : next) })),
      [],
    ),
    /** goes back to what the server has */
    revert: useCallback(() => {
      dropSampleBackup(sheet);
      setText(stored);
      setBase({ stored, version });
      setRestoredAt(null);
    }, [sheet, stored, version]),
    /** goes on from the text, on top of what somebody else saved */
    rebase: useCallback((theirs: SampleText, theirVersion: number, next: SampleText) => {
      setBase({ stored: theirs, version: theirVersion });
      setText(next);
    }, []),
    forget: useCallback(() => dropSampleBackup(sheet), [sheet]),
  };
}

export type SampleDraft = ReturnType<typeof useSample>;
