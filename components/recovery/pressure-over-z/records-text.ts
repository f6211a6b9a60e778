/**
 * Reservoir pressures and production as they stand in their grid: text by the place of each figure
 * (`records.3.pressurePsia`), beside the records that it reads as. Rows without a figure are passed over.
 */
import {
  MOST_RECORDS,
  type MaterialBalanceRequest,
} from "@/app/api/v1/calculations/material-balance-schema";
import type { QuantityName } from "@/analytics/units/conversions";
import { readQuantity, type FieldReading } from "@/components/estimate/quantities-of-inputs";
import { aboveZero } from "@/components/fluid/composition-text";
import type { Cells, Grid } from "@/components/fluid/grid-paste";

export type ProductionRecord = MaterialBalanceRequest["records"][number];
export type RecordColumn = keyof ProductionRecord;

interface Column {
  label: string;
  unit: string;
  quantity: QuantityName;
}

/** In the order of the grid. Gas is at 14.696 psia and 60 °F. */
export const recordColumns: Record<RecordColumn, Column> = {
  pressurePsia: { label: "Pressure", unit: "psia", quantity: "pressure" },
  surfaceGasScf: { label: "Gas produced", unit: "Bscf", quantity: "gasVolume" },
  condensateStb: { label: "Condensate produced", unit: "MSTB", quantity: "liquidVolume" },
};
export const recordColumnNames = Object.keys(recordColumns) as RecordColumn[];

export interface RecordsText {
  /** rows of the grid, filled or not */
  rowCount: number;
  cells: Cells;
}

export interface RecordsReading {
  fields: Readonly<Record<string, FieldReading>>;
  /** `null` while a figure is missing or cannot be read */
  records: ProductionRecord[] | null;
  /** rows of the grid that the records stand in */
  rowsOfRecords: readonly number[];
  /** rows, from 1, that lack a figure */
  incomplete: readonly number[];
}

export const emptyRecords: RecordsText = { rowCount: 5, cells: {} };

export const placeOf = (row: number, column: RecordColumn) => `records.${row}.${column}`;

/** The grid, with room below for what is pasted. */
export const recordsGrid: Grid = Array.from({ length: MOST_RECORDS }, (_, row) =>
  recordColumnNames.map((column) => placeOf(row, column)),
);

export const hasEntries = ({ cells }: RecordsText): boolean =>
  Object.values(cells).some((text) => text.trim() !== "");

const rowOf = (place: string): number => Number(/^records\.(\d+)\./.exec(place)?.[1] ?? -1);

/** Takes new texts in, with as many rows as they need. */
export function withRecordCells(text: RecordsText, changes: Cells): RecordsText {
  const last = Math.max(-1, ...Object.keys(changes).map(rowOf));
  return {
    rowCount: Math.max(text.rowCount, last + 1),
    cells: { ...text.cells, ...changes },
  };
}

/** A row is taken out, and those below it move up. */
export function withoutRecord(text: RecordsText, row: number): RecordsText {
  const cells = Object.fromEntries(
    Object.entries(text.cells).flatMap(([place, value]) => {
      const at = rowOf(place);
      if (at === row) return [];
      return [[at > row ? place.replace(`records.${at}.`, `records.${at - 1}.`) : place, value]];
    }),
  );
  return { rowCount: Math.max(3, text.rowCount - 1), cells };
}

function readCell(column: RecordColumn, text: string): FieldReading {
  const { quantity, unit } = recordColumns[column];
  const reading = readQuantity(text, quantity, unit, unit);
  return column === "pressurePsia" ? aboveZero(reading, "A pressure") : reading;
}

/** Reads every field, and all of them as records. */
export function readRecords(text: RecordsText): RecordsReading {
  const fields: Record<string, FieldReading> = {};
  const rowsOfRecords: number[] = [];
  const incomplete: number[] = [];
  const records: Record<string, number | null>[] = [];
  for (let row = 0; row < text.rowCount; row += 1) {
    const typed = recordColumnNames.map((column) => text.cells[placeOf(row, column)] ?? "");
    if (typed.every((cell) => cell.trim() === "")) continue;
    if (typed.some((cell) => cell.trim() === "")) incomplete.push(row + 1);
    const read = recordColumnNames.map((column, i) => readCell(column, typed[i]));
    recordColumnNames.forEach((column, i) => (fields[placeOf(row, column)] = read[i]));
    rowsOfRecords.push(row);
    records.push(Object.fromEntries(recordColumnNames.map((column, i) => [column, read[i].value])));
  }
  const isWhole = records.every((record) => Object.values(record).every((value) => value !== null));
  return {
    fields,
    records: isWhole ? (records as unknown as ProductionRecord[]) : null,
    rowsOfRecords,
    incomplete,
  };
}

/** The server's `#/records/2/surfaceGasScf` as a place of the grid; `null` for what is in no cell of it. */
export function placeOfRecord(pointer: string, rowsOfRecords: readonly number[]): string | null {
  const [, index, column] = /^#?\/records\/(\d+)\/(\w+)$/.exec(pointer) ?? [];
  const row = rowsOfRecords[Number(index)];
  return row === undefined || !(column in recordColumns)
    ? null
    : placeOf(row, column as RecordColumn);
}
