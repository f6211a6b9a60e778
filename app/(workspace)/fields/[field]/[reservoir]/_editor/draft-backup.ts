import type { EstimateText } from "@/components/estimate/estimate-text";

/** Work that the server does not have yet, as it stood in the fields. */
export interface Backup {
  /** the draft it belongs to; `null` for a first estimate that has not been saved */
  estimateId: string | null;
  /** version of the draft when the work began */
  version: number | null;
  text: EstimateText;
  /** ISO moment of the last change */
  at: string;
}

const keyOf = (reservoirId: string) => `dewledger.draft.${reservoirId}`;

/** What was kept in this browser, or `null`: nothing, or something this version cannot read. */
export function readBackup(reservoirId: string): Backup | null {
  try {
    const kept = localStorage.getItem(keyOf(reservoirId));
    const backup = kept === null ? null : (JSON.parse(kept) as Partial<Backup>);
    if (!backup?.text?.inputs) return null;
    // Work of before there were recovery plans has none.
    const text = { ...backup.text, plan: backup.text.plan ?? null };
    return { ...(backup as Backup), text: { ...text, usesPlan: text.usesPlan ?? false } };
  } catch {
    // Storage that is closed to us, or holds something else, is no backup.
    return null;
  }
}

/** @returns whether it could be kept: storage may be full or closed */
export function writeBackup(reservoirId: string, backup: Backup): boolean {
  try {
    localStorage.setItem(keyOf(reservoirId), JSON.stringify(backup));
    return true;
  } catch {
    return false;
  }
}

export function dropBackup(reservoirId: string): void {
  try {
    localStorage.removeItem(keyOf(reservoirId));
  } catch {
    // Nothing was kept where nothing can be.
  }
}
