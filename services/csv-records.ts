import { parse } from "csv-parse/sync";

/** A record of a CSV text, with the line it begins on. */
export interface CsvRecord {
  line: number;
  /** trimmed */
  cells: string[];
}

/**
 * Records with the line each begins on; a quoted cell may hold line breaks, so records and lines differ.
 *
 * @throws {CsvError} when a quotation mark is opened and not closed, or stands inside a cell
 */
export function readRecords(text: string, delimiter: string, firstLine: number): CsvRecord[] {
  const parsed: unknown = parse(text, {
    delimiter,
    info: true,
    relax_column_count: true,
    record_delimiter: ["\r\n", "\n", "\r"],
    skip_empty_lines: false,
  });
  const records = parsed as { record: string[]; info: { lines: number } }[];
  // `info.lines` counts the lines up to the end of the record, so each begins where the one before ended.
  let previousEnd = 0;
  return records.map(({ record }) => {
    const breaks = record.reduce((sum, cell) => sum + (cell.match(/\r\n|\n|\r/g)?.length ?? 0), 0);
    const line = firstLine + previousEnd;
    previousEnd += 1 + breaks;
    return { line, cells: record.map((cell) => cell.trim()) };
  });
}
