import type { SampleText } from "@/components/fluid/sample-text";

/** A fluid sample's sheets that were not saved yet, as they stood in the fields. */
export interface SampleBackup {
  /** version of the sample when the work began; `null` for a new one */
  version: number | null;
  text: SampleText;
  /** ISO moment of the last change */
  at: string;
}

const keyOf = (sheet: string) => `dewledger.sample.${sheet}`;

/**
 * What this tab kept, or `null`: nothing, or something this version cannot read.
 *
 * @param sheet  names the sample, or the reservoir and what the sheet is
 */
export function readSampleBackup(sheet: string): SampleBackup | null {
  try {
    const kept = sessionStorage.getItem(keyOf(sheet));
    const backup = kept === null ? null : (JSON.parse(kept) as Partial<SampleBackup>);
    return backup?.text?.separator?.fields && backup.text.composition?.cells
      ? (backup as SampleBackup)
      : null;
  } catch {
    // Storage that is closed to us, or holds something else, is no backup.
    return null;
  }
}

export function writeSampleBackup(sheet: string, backup: SampleBackup): void {
  try {
    sessionStorage.setItem(keyOf(sheet), JSON.stringify(backup));
  } catch {
    // Storage may be full or closed; the fields still hold what was typed.
  }
}

export function dropSampleBackup(sheet: string): void {
  try {
    sessionStorage.removeItem(keyOf(sheet));
  } catch {
    // Nothing was kept where nothing can be.
  }
}

const chosenKey = (reservoirId: string) => `dewledger.sample-chosen.${reservoirId}`;

/** The sheet that was last looked at in this tab; `null` when none was chosen. */
export function readChosenSample(reservoirId: string): string | null {
  try {
    return sessionStorage.getItem(chosenKey(reservoirId));
  } catch {
    return null;
  }
}

export function writeChosenSample(reservoirId: string, chosen: string): void {
  try {
    sessionStorage.setItem(chosenKey(reservoirId), chosen);
  } catch {
    // The page opens with the estimate's own sample next time.
  }
}
