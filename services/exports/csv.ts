import { Readable } from "node:stream";
import { stringify } from "csv-stringify";

export type CsvCell = string | number | null;

export interface CsvFile {
  /** the header row */
  names: readonly string[];
  rows: Iterable<readonly CsvCell[]> | AsyncIterable<readonly CsvCell[]>;
  /** a byte-order mark, without which spreadsheets take UTF-8 for something else; programs do better without */
  byteOrderMark: boolean;
}

/**
 * A comma-separated file as RFC 4180 has it: CRLF, a header row, quotes where a cell needs them, UTF-8, written row by
 * row. Numbers have a point and no thousands separators, and all their digits.
 *
 * A text cell that a spreadsheet would run as a formula (it begins with = + - @, a tab, a carriage return or a
 * full-width form of these) gets an apostrophe in front. Numbers are never touched: -5 stays -5.
 */
export function csvStream({ names, rows, byteOrderMark }: CsvFile): ReadableStream<Uint8Array> {
  const stringifier = stringify({
    header: true,
    columns: [...names],
    record_delimiter: "windows",
    // Off by default once a delimiter is named; a lone line feed in a cell would then break its record.
    quote_record_delimiter: true,
    bom: byteOrderMark,
    escape_formulas: true,
  });
  const source = Readable.from(rows);
  source.on("error", (error) => stringifier.destroy(error));
  return Readable.toWeb(source.pipe(stringifier)) as ReadableStream<Uint8Array>;
}

/** An answer that a browser saves as a file of this name. */
export function csvResponse(file: CsvFile, fileName: string): Response {
  return new Response(csvStream(file), {
    headers: {
      "content-type": "text/csv; charset=utf-8; header=present",
      "content-disposition": `attachment; filename="${fileName}"`,
      "cache-control": "no-store",
    },
  });
}
