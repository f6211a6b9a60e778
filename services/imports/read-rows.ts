import { nameKey } from "./name-key";
import type { Problem } from "./problem";
import { readRow, type ReadRow, type ReservoirRow, type RowFieldData } from "./read-row";
import type { Table } from "./read-table";

/** What two rows of one field may not disagree on, with the column that says it. */
export const fieldDataColumns = {
  operator: "operator",
  workingInterest: "working_interest",
  netRevenueInterest: "net_revenue_interest",
  prmsClass: "prms_class",
  prmsSubClass: "prms_sub_class",
  chanceOfCommerciality: "chance_of_commerciality",
} as const satisfies Record<keyof RowFieldData, string>;

export const fieldDataKeys = Object.keys(fieldDataColumns) as (keyof RowFieldData)[];

/** Good rows read so far, so that each new one is compared with those it could contradict and no others. */
class EarlierRows {
  private readonly reservoirs = new Map<string, ReservoirRow>();
  private readonly fields = new Map<string, ReservoirRow[]>();

  add(row: ReservoirRow): void {
    this.reservoirs.set(this.reservoirKey(row), row);
    const field = nameKey(row.field);
    this.fields.set(field, [...(this.fields.get(field) ?? []), row]);
  }

  /** Why this row contradicts an earlier one: the same reservoir twice, or one field with two values. */
  conflicts(row: ReservoirRow): Problem[] {
    const at = (column: string, value: unknown, reason: string): Problem => ({
      line: row.line,
      column,
      value: String(value),
      reason,
    });
    const siblings = this.fields.get(nameKey(row.field)) ?? [];
    const elsewhere = siblings.find((other) => nameKey(other.basin) !== nameKey(row.basin));
    if (elsewhere) {
      const reason = `Line ${elsewhere.line} puts this field in ${elsewhere.basin}.`;
      return [at("basin", row.basin, reason)];
    }
    const twin = this.reservoirs.get(this.reservoirKey(row));
    if (twin) {
      return [at("reservoir", row.reservoir, `Line ${twin.line} has this reservoir already.`)];
    }
    return fieldDataKeys.flatMap((key) => {
      const value = row.fieldData[key];
      const other = siblings.find(
        ({ fieldData }) => value !== null && fieldData[key] !== null && fieldData[key] !== value,
      );
      if (!other) return [];
      const reason = `Line ${other.line} says ${String(other.fieldData[key])} for the same field.`;
      return [at(fieldDataColumns[key], value, reason)];
    });
  }

  private reservoirKey(row: ReservoirRow): string {
    return `${nameKey(row.field)}/${nameKey(row.reservoir)}`;
  }
}

/** Reads every row of a table; a row that contradicts an earlier good one is bad. */
export function readRows(table: Table, today: string): ReadRow[] {
  const earlier = new EarlierRows();
  return table.rows.map((tableRow) => {
    const read = readRow(tableRow, table.units, today);
    if (read.kind === "bad") return read;
    const problems = earlier.conflicts(read.row);
    if (problems.length > 0) {
      const { line, basin, field, reservoir } = read.row;
      return { kind: "bad", row: { line, basin, field, reservoir, problems } };
    }
    earlier.add(read.row);
    return read;
  });
}
