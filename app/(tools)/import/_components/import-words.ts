import type { ImportDetail, ImportSummary } from "@/app/api/v1/imports/schema";

const counted = (count: number, one: string, many: string): string =>
  `${count.toLocaleString("en-GB")} ${count === 1 ? one : many}`;

export const rowsWords = (count: number): string => counted(count, "row", "rows");

/** The finding that heads an import's page. */
export function importTitle(file: ImportDetail): string {
  const { counts, rowsTotal, rowsApplied, state, runs } = file;
  switch (state) {
    case "failed":
      return "This file cannot be read";
    case "checking":
    case "checked":
      if (counts.refused === rowsTotal) return `None of ${rowsWords(rowsTotal)} can be taken`;
      if (counts.refused > 0) {
        return `${counts.refused.toLocaleString("en-GB")} of ${rowsWords(rowsTotal)} ${counts.refused === 1 ? "needs" : "need"} repair`;
      }
      if (counts.unchanged === rowsTotal) return "The book has all of this already";
      return rowsTotal === 1 ? "The row can be taken" : `All ${rowsWords(rowsTotal)} can be taken`;
    case "applying":
      return `${counted(runs.done, "reservoir", "reservoirs")} of ${runs.total} run`;
    case "applied":
      return rowsApplied === 0
        ? "Nothing had to be changed"
        : `${counted(rowsApplied, "reservoir is", "reservoirs are")} in the book`;
  }
}

/** What became of an import, in a few words for a list. */
export function outcomeWords({
  state,
  rowsTotal,
  rowsApplied,
  rowsBad,
  progress,
}: ImportSummary): string {
  switch (state) {
    case "failed":
      return "could not be read";
    case "checking":
    case "checked":
      return rowsBad > 0 ? `checked, ${rowsBad} of ${rowsTotal} refused` : "checked, not taken";
    case "applying":
      return `running, ${Math.floor(100 * progress)} %`;
    case "applied":
      return rowsApplied === 0 ? "nothing to change" : `${rowsApplied} of ${rowsTotal} taken`;
  }
}
