import type { CsvRecord } from "../csv-records";
import { readNumber } from "../imports/read-cells";
import { problemAt, type Label, type LabProblem } from "./sheet-text";
import { findUnit, firstUnit, isUnit, unitSymbols, type SheetUnit, type UnitKind } from "./units";

/** More problems say nothing new. */
const MOST_PROBLEMS = 100;

const emptyMarks = /^(-+|–|—|nil|n\/?a|n\.a\.|nd|n\.d\.|not reported|not measured)$/i;

/** Whether a cell says that there is nothing, in one of the ways laboratories write it. */
export function isEmptyCell(cell: string | undefined): boolean {
  return cell === undefined || cell === "" || emptyMarks.test(cell);
}

export function isFigure(cell: string | undefined): boolean {
  return cell !== undefined && "value" in readNumber(cell);
}

/** A line that names columns or units: no figure in it beyond the first cell. */
export function hasFigures({ cells }: CsvRecord): boolean {
  return cells.slice(1).some((cell) => isFigure(cell));
}

/** A line of units under a header: every cell that is filled is one, or says so. */
export function isUnitsRow({ cells }: CsvRecord): boolean {
  const [first, ...others] = cells;
  const saysSo = /^\(?units?\)?$/i.test(first);
  const filled = others.filter((cell) => cell !== "");
  return (
    (saysSo || first === "" || isUnit(bare(first))) &&
    filled.length > 0 &&
    filled.every((cell) => isUnit(bare(cell)))
  );
}

/** A unit without the brackets it may stand in. */
export const bare = (unit: string) => unit.replace(/^[[(]\s*|\s*[\])]$/g, "");

/** Gathers what was read and what was not, so that a person sees every fault at once. */
export class SheetReader {
  private readonly found: LabProblem[] = [];
  private unlisted = 0;
  readonly read: string[] = [];

  get problems(): LabProblem[] {
    return this.unlisted === 0
      ? this.found
      : [...this.found, problemAt(1, null, "", `And ${this.unlisted} more.`)];
  }

  problem(
    line: number,
    index: number | null,
    value: string,
    message: string,
    place?: string,
  ): void {
    if (this.found.length >= MOST_PROBLEMS) this.unlisted += 1;
    else this.found.push(problemAt(line, index === null ? null : index + 1, value, message, place));
  }

  /**
   * The figure of a cell in the first unit of its kind, or null when the cell is empty or cannot be read; the latter is
   * a problem.
   *
   * @param done   what happens instead, as the end of the message: "left empty"
   * @param place  where the figure belongs in what is read, so that a screen can mark its cell
   */
  figure(
    record: CsvRecord,
    index: number,
    unit: SheetUnit,
    done = "Left empty.",
    place?: string,
  ): number | null {
    const cell = record.cells[index];
    if (isEmptyCell(cell)) return null;
    const read = readNumber(cell);
    if ("reason" in read) {
      this.problem(record.line, index, cell, `${reasonOf(cell, read.reason)} ${done}`, place);
      return null;
    }
    const value = unit.convert(read.value);
    if (Number.isFinite(value)) return value;
    this.problem(record.line, index, cell, `Not a possible figure. ${done}`, place);
    return null;
  }

  /**
   * The unit of a heading or a row. One that is unknown, or none where there should be one, is said; nothing is assumed
   * without a word.
   *
   * @param what  the quantity in words, as the beginning of a sentence
   */
  unit(
    record: CsvRecord,
    index: number,
    written: string | null,
    kind: UnitKind,
    what: string,
  ): SheetUnit {
    const assumed = firstUnit(kind);
    if (written === null || written === "") {
      if (kind !== "none" && kind !== "molecularWeight" && kind !== "api") {
        this.problem(
          record.line,
          index,
          record.cells[index] ?? "",
          `No unit stands with it. ${what} was read in ${assumed.symbol}.`,
        );
      }
      return assumed;
    }
    const unit = findUnit(bare(written), kind);
    if (unit) {
      if (kind !== "none") {
        this.note(`${what} in ${unit.symbol}${unit.remark ? `: ${unit.remark}` : ""}.`);
      }
      return unit;
    }
    this.problem(
      record.line,
      index,
      written,
      `Not a unit of ${what.charAt(0).toLowerCase()}${what.slice(1)}; it takes ${unitSymbols(kind).join(", ")}. It was read in ${assumed.symbol}.`,
    );
    return assumed;
  }

  /** A line such as `Dew point [psia], 6750` or `Dew point, 6750, psia`: its figure in the first unit of its kind. */
  scalar(record: CsvRecord, label: Label, kind: UnitKind, what: string): number | null {
    const { cells } = record;
    const index = cells.findIndex((cell, at) => at > 0 && cell !== "" && !isUnit(bare(cell)));
    const at = index === -1 && isFigure(cells[1]) ? 1 : index;
    if (at === -1) return null;
    const beside = cells.find((cell, other) => other > 0 && other !== at && isUnit(bare(cell)));
    return this.figure(
      record,
      at,
      this.unit(record, 0, label.unit ?? beside ?? null, kind, what),
      "Left out.",
    );
  }

  /** Something that was read and how, once. */
  note(sentence: string): void {
    if (!this.read.includes(sentence)) this.read.push(sentence);
  }
}

function reasonOf(cell: string, reason: string): string {
  if (/^[=@]/.test(cell) || /^[+-][a-z(]/i.test(cell)) {
    return "A formula is not computed here; paste or save its value.";
  }
  if (/^(trace|tr\.?|<\s*[\d.]+)$/i.test(cell)) return "Not a figure; write 0 or the amount.";
  return reason;
}
