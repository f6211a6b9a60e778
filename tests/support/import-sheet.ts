import { stringify } from "csv-stringify/sync";
import { columns } from "@/services/imports/columns";

/** Cells of one row of a sheet, by column; what is left out is blank. */
export type SheetRow = Record<string, string>;

const unitsOfTemplate: SheetRow = Object.fromEntries(
  columns.map((column, index) => [column.name, index === 0 ? "units" : (column.units[0] ?? "")]),
);

/** A row that is good in every cell, of a field of its own. */
export function goodRow(changes: SheetRow = {}): SheetRow {
  const example = Object.fromEntries(columns.map(({ name, examples }) => [name, examples[0]]));
  return { ...example, basin: "Test basin", field: "Test field", ...changes };
}

/** A CSV as a spreadsheet saves it: header, units, rows. */
export function sheet(
  rows: readonly SheetRow[],
  {
    units = {},
    delimiter = ",",
    newline = "\r\n",
  }: {
    units?: SheetRow;
    delimiter?: string;
    newline?: "\r\n" | "\n";
  } = {},
): string {
  const names = columns.map(({ name }) => name);
  const lines = [
    Object.fromEntries(names.map((name) => [name, name])),
    { ...unitsOfTemplate, ...units },
    ...rows,
  ];
  return stringify(
    lines.map((line) => names.map((name) => line[name] ?? "")),
    { delimiter, record_delimiter: newline },
  );
}

/** A form with one file, as a browser sends it. */
export function formOf(
  text: string | Uint8Array<ArrayBuffer>,
  name = "reservoirs.csv",
  type = "text/csv",
) {
  const form = new FormData();
  form.set("file", new File([text], name, { type }));
  return form;
}
