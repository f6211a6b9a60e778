import { CsvError } from "csv-parse/sync";
import { readRecords, type CsvRecord } from "../csv-records";
import { columns, findColumn, resolveUnit, unitsOf, type Column } from "./columns";
import { echo, firstProblems, type Problem } from "./problem";

export const MAX_FILE_BYTES = 5 * 1024 * 1024;
export const MAX_ROWS = 2000;
export const MAX_COLUMNS = 300;
export const MAX_HEADING_LENGTH = 200;
const MAX_CELLS = MAX_ROWS * MAX_COLUMNS;

/** Names longer than this are no slip of a column's name, and comparing them takes long. */
const LONGEST_MISSPELT_NAME = 64;

/** A row of figures as the person typed them, with the line of the file it begins on. */
export interface TableRow {
  line: number;
  /** by column name, trimmed; a column that the file does not have is "" */
  cells: Record<string, string>;
  /** cells to the right of the last heading: in a row that does not read well, the sign of a split cell */
  surplusCells: number;
}

export interface Table {
  delimiter: "," | ";" | "\t";
  encoding: "utf-8" | "utf-16le" | "windows-1252";
  /** unit of row 2 for each number column of the file, in the spelling of `columns.ts` */
  units: Record<string, string>;
  rows: TableRow[];
  /** rows that begin with # in their first cell: examples and remarks, left alone */
  remarkLines: number[];
  /** what makes the whole file unreadable; when there is one, no row is read */
  problems: Problem[];
  warnings: Problem[];
}

const names = (values: readonly string[]): string => values.join(", ");

/** Text of the file. Spreadsheets save UTF-8, UTF-16 ("Unicode text") and, on Windows, the code page of the country. */
function decode(bytes: Uint8Array): { text: string; encoding: Table["encoding"] } {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) {
    return { text: new TextDecoder("utf-16le").decode(bytes), encoding: "utf-16le" };
  }
  try {
    return { text: new TextDecoder("utf-8", { fatal: true }).decode(bytes), encoding: "utf-8" };
  } catch (error) {
    if (!(error instanceof TypeError)) throw error;
    return { text: new TextDecoder("windows-1252").decode(bytes), encoding: "windows-1252" };
  }
}

/** The separator that makes most columns of the first line; a tie goes to the comma. */
function detectDelimiter(headerLine: string): Table["delimiter"] {
  const candidates = [",", ";", "\t"] as const;
  const score = (delimiter: string): number =>
    headerLine.split(delimiter, MAX_COLUMNS).filter((cell) => findColumn(normaliseName(cell)))
      .length;
  return candidates.reduce((best, next) => (score(next) > score(best) ? next : best));
}

function normaliseName(cell: string): string {
  return cell
    .replace(/^\s*"|"\s*$/g, "")
    .trim()
    .toLowerCase();
}

/** Edits needed to turn one word into the other (Levenshtein), for "did you mean". */
function editDistance(a: string, b: string): number {
  let previous = Array.from({ length: b.length + 1 }, (_, index) => index);
  for (let i = 1; i <= a.length; i++) {
    const current = [i];
    for (let j = 1; j <= b.length; j++) {
      const cost = a[i - 1] === b[j - 1] ? 0 : 1;
      current[j] = Math.min(previous[j] + 1, current[j - 1] + 1, previous[j - 1] + cost);
    }
    previous = current;
  }
  return previous[b.length];
}

function nearestColumn(name: string): string | null {
  if (name.length > LONGEST_MISSPELT_NAME) return null;
  const [best] = columns
    .map((column) => ({ name: column.name, distance: editDistance(name, column.name) }))
    .sort((a, b) => a.distance - b.distance);
  return best.distance <= Math.max(2, Math.floor(name.length / 4)) ? best.name : null;
}

const HOW_TO_SAVE = "Save the sheet as CSV (comma delimited) and choose that file.";

function fileProblem(reason: string, at: Partial<Problem> = {}): Problem {
  const { line = null, column = null, value = null } = at;
  return { line, column: column && echo(column), value: value && echo(value), reason };
}

function refused(problems: Problem[]): Table {
  return {
    delimiter: ",",
    encoding: "utf-8",
    units: {},
    rows: [],
    remarkLines: [],
    problems: firstProblems(problems),
    warnings: [],
  };
}

/**
 * Whether the text has more cells than a sheet can use. Separators are counted before any cell is read, because
 * reading millions of empty cells would hold up everyone else for seconds.
 */
function checkSize(text: string, delimiter: string, firstLine: number): Problem | null {
  let quoted = false;
  let line = firstLine;
  let inRecord = 1;
  let total = 0;
  for (const char of text) {
    if (char === '"') quoted = !quoted;
    else if (char === "\n") {
      line += 1;
      if (!quoted) inRecord = 1;
    } else if (char === delimiter && !quoted) {
      inRecord += 1;
      total += 1;
      if (inRecord > MAX_COLUMNS) {
        return fileProblem(
          `This row has more than ${MAX_COLUMNS} columns, which is the most that is read. Delete the columns that are not for the import.`,
          { line },
        );
      }
      if (total > MAX_CELLS) {
        return fileProblem(
          "The file has more cells than are read at a time. Delete its empty rows and columns, or split it.",
        );
      }
    }
  }
  return null;
}

/** A first row with a heading no column could have is no header; its names are not compared. */
function longHeading({ line, cells }: CsvRecord): Problem | null {
  const long = cells.find((cell) => cell.length > MAX_HEADING_LENGTH);
  if (long === undefined) return null;
  return fileProblem(
    `A heading has ${long.length} characters; up to ${MAX_HEADING_LENGTH} are read. Is the first row the header?`,
    { line, value: long },
  );
}

function checkHeader(header: CsvRecord): Problem[] {
  const tooLong = longHeading(header);
  if (tooLong) return [tooLong];
  const problems: Problem[] = [];
  const seen = new Map<string, number>();
  header.cells.forEach((cell, index) => {
    const name = normaliseName(cell);
    if (name === "" || name.startsWith("#")) return;
    const at = { line: header.line, column: name, value: cell };
    if (!findColumn(name)) {
      const nearest = nearestColumn(name);
      problems.push(
        fileProblem(
          nearest
            ? `No column has this name. Did you mean ${nearest}?`
            : "No column has this name. Begin the heading with # to keep a column of your own out of the import.",
          at,
        ),
      );
    } else if (seen.has(name)) {
      problems.push(fileProblem("This column is there twice; keep one of them.", at));
    }
    seen.set(name, index);
  });
  const missing = columns.filter((column) => column.needed === "always" && !seen.has(column.name));
  if (missing.length > 0) {
    problems.push(
      fileProblem(`The header misses ${names(missing.map((column) => column.name))}.`, {
        line: header.line,
      }),
    );
  }
  return problems;
}

function unitProblem(column: Column, line: number, cell: string): Problem {
  const allowed = names(unitsOf(column.quantity ?? "gasGravity"));
  const gauge = /^(psig|barg|kpag|psi)$/i.test(cell.replace(/\s/g, ""));
  const reason =
    cell === ""
      ? `This column needs its unit in row 2: one of ${allowed}.`
      : gauge
        ? `Pressures are absolute here, and ${cell} does not say so: add the atmospheric pressure and write psia, or use one of ${allowed}.`
        : `Not a unit of this column; use one of ${allowed}.`;
  return fileProblem(reason, { line, column: column.name, value: cell });
}

function readUnits(
  present: { column: Column; index: number }[],
  unitsRecord: CsvRecord,
  rows: CsvRecord[],
): { units: Record<string, string>; problems: Problem[] } {
  const units: Record<string, string> = {};
  const problems: Problem[] = [];
  for (const { column, index } of present) {
    if (column.kind !== "number") continue;
    const cell = unitsRecord.cells[index] ?? "";
    const symbol = resolveUnit(column, cell);
    if (symbol !== null) {
      units[column.name] = symbol;
      continue;
    }
    // A gravity has one unit only, and a column nobody filled needs none.
    if (cell === "" && column.units.length === 1) units[column.name] = column.units[0];
    else if (cell !== "" || rows.some((row) => (row.cells[index] ?? "") !== "")) {
      problems.push(unitProblem(column, unitsRecord.line, cell));
    }
  }
  return { units, problems };
}

/**
 * Reads the file a person made in a spreadsheet: header row, units row, rows of figures. Takes commas, semicolons and
 * tabs, UTF-8 with or without byte order mark, UTF-16 and Windows-1252, any line ending, and quoted cells with line
 * breaks. Rows whose first cell begins with # are remarks.
 *
 * @param bytes  the file, up to 5 MB and 2,000 rows
 * @returns the table; `problems` says why when the file as a whole cannot be read
 */
export function readTable(bytes: Uint8Array): Table {
  if (bytes.length === 0) return refused([fileProblem(`The file is empty. ${HOW_TO_SAVE}`)]);
  if (bytes.length > MAX_FILE_BYTES) {
    return refused([fileProblem("The file is larger than 5 MB; split it.")]);
  }
  if (bytes[0] === 0x50 && bytes[1] === 0x4b) {
    return refused([fileProblem(`This is a spreadsheet workbook, not a CSV. ${HOW_TO_SAVE}`)]);
  }
  const { text: decoded, encoding } = decode(bytes);
  let text = decoded.replace(/^\uFEFF/, "");
  if (text.includes("\0")) {
    return refused([fileProblem(`This is not a text file. ${HOW_TO_SAVE}`)]);
  }

  // Some spreadsheets put the separator on a line of its own above the header.
  const declared = /^sep=(.)\r?\n/i.exec(text);
  const firstLine = declared ? 2 : 1;
  if (declared) text = text.slice(declared[0].length);
  const delimiter = detectDelimiter(text.split(/\r\n|\n|\r/, 1)[0]);
  const tooLarge = checkSize(text, delimiter, firstLine);
  if (tooLarge) return refused([tooLarge]);

  let records: CsvRecord[];
  try {
    records = readRecords(text, delimiter, firstLine);
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    const line = typeof error.lines === "number" ? error.lines + firstLine - 1 : null;
    return refused([
      fileProblem("A quotation mark is opened and not closed, or stands inside a cell.", { line }),
    ]);
  }

  const filled = records.filter((record) => record.cells.some((cell) => cell !== ""));
  const [header, unitsRecord, ...body] = filled;
  if (!header) return refused([fileProblem(`The file is empty. ${HOW_TO_SAVE}`)]);
  const headerProblems = checkHeader(header);
  if (headerProblems.length > 0) return refused(headerProblems);
  if (!unitsRecord || !/^\(?units\)?$/i.test(unitsRecord.cells[0] ?? "")) {
    return refused([
      fileProblem(
        "The row under the header must hold the units, with the word “units” in its first cell, as in the template.",
        { line: unitsRecord?.line ?? header.line + 1, value: unitsRecord?.cells[0] ?? null },
      ),
    ]);
  }

  const present = header.cells.flatMap((cell, index) => {
    const column = findColumn(normaliseName(cell));
    return column ? [{ column, index }] : [];
  });
  const isRemark = (record: CsvRecord): boolean => record.cells[0]?.startsWith("#") ?? false;
  const rows = body.filter((record) => !isRemark(record));
  if (rows.length > MAX_ROWS) {
    return refused([
      fileProblem(`The file has ${rows.length} rows; up to ${MAX_ROWS} are taken at a time.`),
    ]);
  }
  const { units, problems } = readUnits(present, unitsRecord, rows);
  if (rows.length === 0) {
    problems.push(
      fileProblem(
        body.length > 0
          ? "Every row under the units row begins with #, which makes it a remark. Take the # away from the rows to import."
          : "There is no row of figures under the units row.",
      ),
    );
  }

  return {
    delimiter,
    encoding,
    units,
    rows:
      problems.length > 0
        ? []
        : rows.map((record) => ({
            line: record.line,
            surplusCells: Math.max(0, record.cells.length - header.cells.length),
            cells: Object.fromEntries(
              columns.map((column) => {
                const index = present.find((entry) => entry.column === column)?.index;
                return [column.name, index === undefined ? "" : (record.cells[index] ?? "")];
              }),
            ),
          })),
    remarkLines: body.filter(isRemark).map((record) => record.line),
    problems: firstProblems(problems),
    warnings:
      encoding === "windows-1252"
        ? [
            fileProblem(
              "The file is not UTF-8 and was read as Windows-1252; check letters with accents.",
            ),
          ]
        : [],
  };
}
