import type { Warning } from "@/analytics/warnings";

/** Warnings that say where their input stands in the request, not where it stands in the part handed to analytics. */
export function warningsUnder(part: string, warnings: readonly Warning[]): Warning[] {
  return warnings.map((warning) => ({
    ...warning,
    input: [part, warning.input ?? ""].filter((name) => name !== "").join("."),
  }));
}
