import { nameKey } from "./name-key";
import { echo, type Problem } from "./problem";
import { readRow, type ReadRow, type ReservoirRow, type RowFieldData } from "./read-row";
import type { Table, TableRow } from "./read-table";

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
      value: echo(String(value)),
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

/** One reason for a row whose cells do not stand under their headings, instead of one a cell. */
function askew({ line, cells }: TableRow): ReadRow {
  const reason =
    "This row has more cells than the header, so its figures stand under the wrong headings. " +
    "Is there a comma in a figure or a name? Leave it out, or put the cell in quotation marks.";
  const { basin, field, reservoir } = cells;
  const problems = [{ line, column: null, value: null, reason }];
  return { kind: "bad", row: { line, basin, field, reservoir, problems } };
}

/** A field's data may stand in any of its rows: what a row leaves blank is taken from the others. */
function shareFieldData(rows: readonly ReservoirRow[]): ReservoirRow[] {
  const shared = new Map<string, RowFieldData>();
  for (const { field, fieldData } of rows) {
    const known = shared.get(nameKey(field)) ?? fieldData;
    shared.set(nameKey(field), filled(known, fieldData));
  }
  return rows.map((row) => ({
    ...row,
    fieldData: filled(row.fieldData, shared.get(nameKey(row.field)) ?? row.fieldData),
  }));
}

function filled(own: RowFieldData, other: RowFieldData): RowFieldData {
  return {
    operator: own.operator ?? other.operator,
    workingInterest: own.workingInterest ?? other.workingInterest,
    netRevenueInterest: own.netRevenueInterest ?? other.netRevenueInterest,
    prmsClass: own.prmsClass ?? other.prmsClass,
    prmsSubClass: own.prmsSubClass ?? other.prmsSubClass,
    chanceOfCommerciality: own.chanceOfCommerciality ?? other.chanceOfCommerciality,
  };
}

/**
 * Reads every row of a table; a row that contradicts an earlier good one is bad.
 *
 * @param today  `YYYY-MM-DD`; a sample cannot be of a later day
 */
export function readRows(table: Table, today: string): ReadRow[] {
  const earlier = new EarlierRows();
  const read = table.rows.map((tableRow): ReadRow => {
    const own = readRow(tableRow, table.units, today);
    if (own.kind === "bad") return tableRow.surplusCells > 0 ? askew(tableRow) : own;
    const problems = earlier.conflicts(own.row);
    if (problems.length > 0) {
      const { line, basin, field, reservoir } = own.row;
      return { kind: "bad", row: { line, basin, field, reservoir, problems } };
    }
    earlier.add(own.row);
    return own;
  });
  const good = shareFieldData(read.flatMap((entry) => (entry.kind === "good" ? [entry.row] : [])));
  const byLine = new Map(good.map((row) => [row.line, row]));
  return read.map((entry) => {
    const row = entry.kind === "good" ? byLine.get(entry.row.line) : undefined;
    return row ? { kind: "good", row } : entry;
  });
}
