import { CsvError } from "csv-parse/sync";
import { readRecords, type CsvRecord } from "../csv-records";
import { isUnit } from "./units";

export const MAX_LINES = 2000;
export const MAX_COLUMNS = 100;
const MAX_CELLS = 40_000;
/** Names and figures are shorter; the patterns that read them take long over a cell without end. */
const LONGEST_CELL = 200;

/** What the reader could not do anything with, and what it did instead. */
export interface LabProblem {
  /** counted from 1 */
  line: number;
  /** counted from 1; null for a whole line */
  column: number | null;
  /** what stood there, cut to what a person needs to find it */
  value: string;
  message: string;
  /** where the figure belongs in what was read, such as `depletion.rows.3.gasZ`; absent when it has no place */
  place?: string;
}

export interface SheetText {
  /** lines with something in them, remarks left out */
  records: CsvRecord[];
  problems: LabProblem[];
}

const LONGEST_ECHO = 80;

export function problemAt(
  line: number,
  column: number | null,
  value: string,
  message: string,
  place?: string,
): LabProblem {
  const shown = value.length > LONGEST_ECHO ? `${value.slice(0, LONGEST_ECHO)}…` : value;
  return { line, column, value: shown, message, ...(place !== undefined && { place }) };
}

const nothing = (message: string, line = 1, value = ""): SheetText => ({
  records: [],
  problems: [problemAt(line, null, value, message)],
});

/**
 * A laboratory's text as records. Cells pasted from a spreadsheet come with tabs, files with commas or semicolons; the
 * separator that stands most often outside quotation marks is taken. Lines that begin with # are remarks.
 */
export function readSheetText(text: string): SheetText {
  const plain = text.replace(/^\uFEFF/, "");
  if (plain.includes("\0")) {
    return nothing("This is not a text file. Save the sheet as CSV, or copy its cells.");
  }
  // Some spreadsheets put the separator on a line of its own above the header.
  const declared = /^sep=(.)\r?\n/i.exec(plain);
  const body = declared ? plain.slice(declared[0].length) : plain;
  const firstLine = declared ? 2 : 1;
  const separatorCount = countSeparators(body);
  const delimiter = separatorOf(separatorCount);
  const hasTooManyLines = body.split(/\r\n|\n|\r/, MAX_LINES + 1).length > MAX_LINES;
  if (hasTooManyLines || separatorCount[delimiter] > MAX_CELLS) {
    const most = hasTooManyLines ? `${MAX_LINES} lines` : `${MAX_CELLS} cells`;
    return nothing(
      `The sheet has more than ${most}, which is the most that is read. Nothing was read.`,
    );
  }
  let records: CsvRecord[];
  try {
    records = readRecords(body, delimiter, firstLine);
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    const line = typeof error.lines === "number" ? error.lines + firstLine - 1 : 1;
    return nothing(
      "A quotation mark is opened and not closed, or stands inside a cell. Nothing was read.",
      line,
    );
  }
  const wide = records.find(({ cells }) => cells.length > MAX_COLUMNS);
  if (wide) {
    return nothing(
      `This line has more than ${MAX_COLUMNS} cells, which is the most that is read. Nothing was read.`,
      wide.line,
    );
  }
  const filled = records.filter(
    ({ cells }) => !cells[0].startsWith("#") && cells.some((cell) => cell !== ""),
  );
  if (filled.length === 0) return nothing("There is nothing in it.");
  const problems: LabProblem[] = [];
  const shortened = filled.map(({ line, cells }) => ({
    line,
    cells: cells.map((cell, index) => {
      if (cell.length <= LONGEST_CELL) return cell.replace(/\s+/g, " ");
      problems.push(
        problemAt(line, index + 1, cell, `Longer than ${LONGEST_CELL} characters. Left empty.`),
      );
      return "";
    }),
  }));
  return { records: shortened, problems };
}

type Separator = "\t" | ";" | ",";

function countSeparators(text: string): Record<Separator, number> {
  const count: Record<Separator, number> = { "\t": 0, ";": 0, ",": 0 };
  let quoted = false;
  for (const char of text) {
    if (char === '"') quoted = !quoted;
    else if (!quoted && char in count) count[char as Separator] += 1;
  }
  return count;
}

/** Tabs and semicolons stand in no figure and hardly in a name, so a few of them outweigh many commas. */
function separatorOf(count: Record<Separator, number>): Separator {
  if (count["\t"] > 0) return "\t";
  return count[";"] > count[","] / 4 ? ";" : ",";
}

export interface Label {
  name: string;
  /** as written beside the name; null when there is none */
  unit: string | null;
}

/**
 * A heading or the first cell of a row, with the unit that stands with it: `Pressure [psig]`, `Pressure (psig)`,
 * `Pressure, psig` or `Pressure psig`. Square brackets always hold a unit, known or not; elsewhere only known ones
 * count, so that `gravity (C7+)` keeps its bracket.
 */
export function readLabel(cell: string): Label {
  const square = /^(.*?)\s*\[([^\]]*)\]\s*$/.exec(cell);
  if (square) return { name: square[1], unit: square[2].trim() };
  for (const pattern of [/^(.*?)\s*\(([^)]*)\)\s*$/, /^(.*)[,:]\s*([^,:]+)$/]) {
    const found = pattern.exec(cell);
    if (found && isUnit(found[2])) return { name: found[1].trim(), unit: found[2].trim() };
  }
  const words = cell.split(" ");
  for (const taken of [3, 2, 1]) {
    if (words.length <= taken) continue;
    const unit = words.slice(-taken).join(" ");
    // Words that end names as well: with a word before them they are no units.
    const endsName = /^(1|ratio|api|c|f|k|r|pa)$/i.test(unit) || /plus fraction$/i.test(cell);
    if (isUnit(unit) && !endsName) {
      return { name: words.slice(0, -taken).join(" "), unit };
    }
  }
  return { name: cell, unit: isUnit(cell) && words.length === 1 ? cell : null };
}
