import { emptyRecords, type RecordsText } from "@/components/recovery/pressure-over-z/records-text";

const keyOf = (reservoirId: string) => `dewledger.pressure-records.${reservoirId}`;

/** Pressures and production that this tab kept; nothing entered when it kept none that can be read. */
export function readRecordsBackup(reservoirId: string): RecordsText {
  try {
    const kept = sessionStorage.getItem(keyOf(reservoirId));
    const backup = kept === null ? null : (JSON.parse(kept) as Partial<RecordsText>);
    return typeof backup?.rowCount === "number" && backup.cells
      ? { rowCount: backup.rowCount, cells: backup.cells }
      : emptyRecords;
  } catch {
    // Storage that is closed to us, or holds something else, is no backup.
    return emptyRecords;
  }
}

export function writeRecordsBackup(reservoirId: string, text: RecordsText): void {
  try {
    sessionStorage.setItem(keyOf(reservoirId), JSON.stringify(text));
  } catch {
    // Storage may be full or closed; the fields still hold what was typed.
  }
}
