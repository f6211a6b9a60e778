import { stringify } from "csv-stringify/browser/esm/sync";

/** Rows as CSV (RFC 4180, a BOM so that spreadsheets read UTF-8); formulas in text are defused. */
export function csvOf(header: readonly string[], rows: readonly (readonly unknown[])[]): string {
  const body = stringify(
    rows.map((row) => row.map((cell) => cell ?? "")),
    {
      header: true,
      columns: [...header],
      record_delimiter: "windows",
      // Only text can be a formula: a negative number stays a number.
      cast: { string: (text) => (/^[=+\-@\t\r]/.test(text) ? `'${text}` : text) },
    },
  );
  return `\ufeff${body}`;
}

/** Hands a text to the browser as a file. */
export function downloadText(fileName: string, text: string, type: string) {
  const url = URL.createObjectURL(new Blob([text], { type: `${type};charset=utf-8` }));
  const link = document.createElement("a");
  link.href = url;
  link.download = fileName;
  link.click();
  URL.revokeObjectURL(url);
}
