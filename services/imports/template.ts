import { stringify } from "csv-stringify/sync";
import { columns } from "./columns";

export const TEMPLATE_FILE_NAME = "dewledger-reservoirs-template.csv";

/**
 * The sheet to fill in: a row of column names, a row of units, and two example rows that the reader leaves alone
 * because their first cell begins with #. Units may be changed to any the column takes.
 */
export function templateCsv(): string {
  const names = columns.map((column) => column.name);
  const units = columns.map((column, index) => (index === 0 ? "units" : (column.units[0] ?? "")));
  const examples = ([0, 1] as const).map((at) => columns.map((column) => column.examples[at]));
  return stringify([names, units, ...examples], { record_delimiter: "\r\n" });
}
