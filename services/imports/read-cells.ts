import { findColumn, fromEngineUnit, toEngineUnit, type Column } from "./columns";
import { echo, type Problem } from "./problem";
import type { TableRow } from "./read-table";

const PLAIN_NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

/** More than any spreadsheet writes; the patterns below take long over a cell without end. */
const LONGEST_FIGURE = 64;

/**
 * A figure as typed. Whatever could be read in two ways is refused rather than guessed: 1,250 is a thousand and a
 * quarter to one reader and one and a quarter to another.
 *
 * @returns the figure, or the reason why the cell is none
 */
export function readNumber(cell: string): { value: number } | { reason: string } {
  if (cell.length > LONGEST_FIGURE) return { reason: "Too long to be a figure." };
  const text = cell.replace(/^\u2212/, "-");
  if (PLAIN_NUMBER.test(text)) {
    const value = Number(text);
    return Number.isFinite(value) ? { value } : { reason: "Too large to be a figure." };
  }
  if (/^[+-]?0,\d+$/.test(text)) {
    return { reason: `Write decimals with a point: ${text.replace(",", ".")}.` };
  }
  if (/^[+-]?\d+,\d+$/.test(text)) {
    return {
      reason: `A comma in a figure can mean thousands or decimals. Write ${text.replace(",", ".")} or ${text.replace(",", "")}.`,
    };
  }
  if (/^[+-]?\d{1,3}([ \u00a0\u202f'’]\d{3})+(\.\d+)?$/.test(text)) {
    return {
      reason: `Write figures without separators between thousands: ${text.replace(/[ \u00a0\u202f'’]/g, "")}.`,
    };
  }
  if (/^[+-]?\d{1,3}([.,]\d{3})+([.,]\d+)?$/.test(text)) {
    return {
      reason: "Write figures without separators between thousands, and decimals with a point.",
    };
  }
  if (/^#(N\/A|REF!|VALUE!|DIV\/0!|NAME\?|NUM!|NULL!)$/i.test(text)) {
    return {
      reason: "The spreadsheet could not compute this cell; repair its formula and save again.",
    };
  }
  if (/^[+-]?[\d.]+\s*\D+$/.test(text)) {
    return { reason: "Only the figure belongs here; its unit stands in row 2." };
  }
  return { reason: "Not a figure." };
}

/** A calendar date written as 2025-03-18, or the reason why it is none. */
export function readDate(cell: string): { value: string } | { reason: string } {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(cell)) {
    return { reason: "Write the date as year-month-day, such as 2025-03-18." };
  }
  const date = new Date(`${cell}T00:00:00Z`);
  if (Number.isNaN(date.getTime()) || date.toISOString().slice(0, 10) !== cell) {
    return { reason: "There is no such day." };
  }
  return { value: cell };
}

/** Reads the cells of one row and gathers what is wrong with them, so that a person sees every fault at once. */
export class CellReader {
  readonly problems: Problem[] = [];
  readonly warnings: Problem[] = [];

  constructor(
    private readonly row: TableRow,
    private readonly units: Record<string, string>,
  ) {}

  raw(name: string): string {
    return this.row.cells[name] ?? "";
  }

  isBlank(name: string): boolean {
    return this.raw(name) === "";
  }

  refuse(name: string | null, reason: string): void {
    this.problems.push(this.at(name, reason));
  }

  warn(name: string | null, reason: string): void {
    this.warnings.push(this.at(name, reason));
  }

  /** Text, or "" (reported when it is needed). */
  text(name: string, { needed = false, maximum = 200 } = {}): string {
    const cell = this.raw(name);
    if (cell === "" && needed) this.refuse(name, "This cell is needed.");
    if (cell.length > maximum) this.refuse(name, `Longer than ${maximum} characters.`);
    // Control characters have no place in a name, and break lists and exports.
    if (/[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f]/.test(cell)) {
      this.refuse(name, "Holds a control character.");
    }
    return cell.slice(0, maximum).replace(/\s+/g, " ");
  }

  /** A figure in the engine's unit; `null` when blank or wrong (reported when it is wrong, or needed). */
  number(name: string, { needed = false } = {}): number | null {
    const cell = this.raw(name);
    if (cell === "") {
      if (needed) this.refuse(name, "This cell is needed.");
      return null;
    }
    const read = readNumber(cell);
    if ("reason" in read) {
      this.refuse(name, read.reason);
      return null;
    }
    const column = this.column(name);
    const value = toEngineUnit(column, read.value, this.units[name] ?? column.units[0]);
    if (!Number.isFinite(value)) {
      this.refuse(name, "Not a possible figure.");
      return null;
    }
    return value;
  }

  /** A figure of the engine as the person would write it in this column: four digits, with the unit of row 2. */
  inOwnUnit(name: string, value: number): string {
    const column = this.column(name);
    const symbol = this.units[name] ?? column.units[0];
    const figure = Number(fromEngineUnit(column, value, symbol).toPrecision(4));
    return symbol === "fraction" || symbol === "air=1" ? `${figure}` : `${figure} ${symbol}`;
  }

  /** One of the column's words, whatever its capitals; spaces and hyphens count as underscores. */
  choice(name: string): string | null {
    const cell = this.raw(name);
    if (cell === "") return null;
    const choices = this.column(name).choices ?? [];
    const word = cell.toLowerCase().replace(/[\s-]+/g, "_");
    if (choices.includes(word)) return word;
    this.refuse(name, `Not one of ${choices.join(", ")}.`);
    return null;
  }

  date(name: string): string | null {
    const cell = this.raw(name);
    if (cell === "") {
      this.refuse(name, "This cell is needed.");
      return null;
    }
    const read = readDate(cell);
    if ("value" in read) return read.value;
    this.refuse(name, read.reason);
    return null;
  }

  private column(name: string): Column {
    const column = findColumn(name);
    if (!column) throw new RangeError(`there is no column ${name}`);
    return column;
  }

  private at(name: string | null, reason: string): Problem {
    return {
      line: this.row.line,
      column: name,
      value: name === null || this.raw(name) === "" ? null : echo(this.raw(name)),
      reason,
    };
  }
}
