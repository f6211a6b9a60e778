import type { DepletionTable } from "./depletion-table-schema";
import type { Finding } from "./finding-schema";

export interface Check {
  readonly code: string;
  readonly title: string;
}

/** Where a finding is: row of the table (0-based) and column; null for the whole. */
export interface Place {
  readonly row?: number | null;
  readonly column?: string | null;
}

/** A pressure as the findings write it: `1,814.7 psia`. */
export function psia(pressurePsia: number): string {
  return `${pressurePsia.toLocaleString("en-GB", { maximumFractionDigits: 1 })} psia`;
}

/** A figure of the table in six digits, which is more than a laboratory gives and less than a simulation. */
export function asReported(value: number): string {
  return String(Number(value.toPrecision(6)));
}

/** A row as the findings name it, counted from one: `row 4 (1,814.7 psia)`. */
export function rowName(table: DepletionTable, row: number): string {
  return `row ${row + 1} (${psia(table.rows[row].pressurePsia)})`;
}

/** The same at the head of a sentence. */
export function rowAtStart(table: DepletionTable, row: number): string {
  return `Row ${row + 1} (${psia(table.rows[row].pressurePsia)})`;
}

/** Collects the findings of one check; it has passed when nothing was found. */
export class CheckReport {
  readonly findings: Finding[] = [];

  constructor(private readonly check: Check) {}

  fail(message: string, place: Place = {}): void {
    this.add("failed", message, place);
  }

  warn(message: string, place: Place = {}): void {
    this.add("warning", message, place);
  }

  /** What the check would have needed. */
  missing(message: string, place: Place = {}): void {
    this.add("warning", `Not checked: ${message}`, place);
  }

  /** The findings, or the one that says that all is well. */
  conclude(passedMessage: string): Finding[] {
    if (this.findings.length === 0) this.add("passed", passedMessage, {});
    return this.findings;
  }

  private add(severity: Finding["severity"], message: string, place: Place): void {
    this.findings.push({
      ...this.check,
      severity,
      message,
      row: place.row ?? null,
      column: place.column ?? null,
    });
  }
}
