/**
 * A constant-volume depletion study as it stands in its grid: text by the place of each figure in the table
 * (`rows.3.producedGas.light.C1`), beside the table that it reads as. Rows without a figure are passed over.
 */
import {
  depletionTableSchema,
  type DepletionTable,
} from "@/analytics/depletion/depletion-table-schema";
import {
  readPlain,
  readQuantity,
  typedFigure,
  type FieldReading,
} from "@/components/estimate/quantities-of-inputs";
import {
  aboveZero,
  cellsOfStream,
  plusFromOf,
  readStreamCells,
  streamPlaces,
} from "./composition-text";
import type { Cells, Grid } from "./grid-paste";

export const MOST_ROWS = 40;

export const depletionColumns = {
  pressurePsia: { label: "Pressure", unit: "psia" },
  liquidPercent: { label: "Liquid", unit: "% of the cell" },
  cumulativeProducedMolePercent: { label: "Produced so far", unit: "mol %" },
  gasZ: { label: "z of the gas", unit: "" },
  twoPhaseZ: { label: "Two-phase z", unit: "" },
  viscosityCp: { label: "Gas viscosity", unit: "cp" },
} as const;
export type DepletionColumn = keyof typeof depletionColumns;
export const depletionColumnNames = Object.keys(depletionColumns) as DepletionColumn[];

export interface DepletionText {
  /** rows of the grid, filled or not */
  rowCount: number;
  /** first carbon number of the produced gas's plus fraction */
  plusFrom: number;
  cells: Cells;
}

export interface DepletionReading {
  fields: Readonly<Record<string, FieldReading>>;
  table: DepletionTable | null;
  incomplete: readonly string[];
  /** rows of the grid that the rows of the table stand in */
  rowsOfTable: readonly number[];
  isEmpty: boolean;
}

/** Room for ten steps. The temperature is the reservoir's, the dew point the separator sheet's, where they are known. */
export const emptyDepletion = (
  temperatureDegF: number | null = null,
  dewPointPsia: number | null = null,
): DepletionText => ({
  rowCount: 10,
  plusFrom: 7,
  cells: {
    temperatureDegF: temperatureDegF === null ? "" : typedFigure(temperatureDegF),
    dewPointPsia: dewPointPsia === null ? "" : typedFigure(dewPointPsia),
  },
});

/** Text of a stored table. Reading it back gives the same table. */
export function textOfDepletion(table: DepletionTable): DepletionText {
  const written = (value: number | null) => (value === null ? "" : typedFigure(value));
  const gas = table.rows.find(({ producedGas }) => producedGas !== null)?.producedGas;
  return {
    rowCount: table.rows.length,
    plusFrom: gas ? plusFromOf(gas) : 7,
    cells: Object.assign(
      {
        temperatureDegF: written(table.temperatureDegF),
        dewPointPsia: written(table.dewPointPsia),
      },
      ...table.rows.map((row, index) => ({
        ...Object.fromEntries(
          depletionColumnNames.map((name) => [`rows.${index}.${name}`, written(row[name])]),
        ),
        ...(row.producedGas && cellsOfStream(`rows.${index}.producedGas`, row.producedGas)),
      })),
    ) as Cells,
  };
}

/** Places of the produced gas of one row, in the order of the grid's columns. */
export const gasPlaces = (row: number, plusFrom: number) => [
  ...streamPlaces(`rows.${row}.producedGas`, plusFrom),
  { symbol: "M", place: `rows.${row}.producedGas.plus.molecularWeight` },
  { symbol: "SG", place: `rows.${row}.producedGas.plus.specificGravity` },
];

/** The grid of figures, or that of the produced gas; with room below for what is pasted. */
export function depletionGrid(text: DepletionText, part: "figures" | "gas"): Grid {
  return Array.from({ length: MOST_ROWS }, (_, row) =>
    part === "figures"
      ? depletionColumnNames.map((name) => `rows.${row}.${name}`)
      : [`rows.${row}.pressurePsia`, ...gasPlaces(row, text.plusFrom).map(({ place }) => place)],
  );
}

/** Takes new texts in, with as many rows as they need. */
export function withCells(text: DepletionText, changes: Cells): DepletionText {
  const lastRow = Object.keys(changes).reduce(
    (last, place) => Math.max(last, Number(/^rows\.(\d+)\./.exec(place)?.[1] ?? -1)),
    -1,
  );
  return {
    ...text,
    rowCount: Math.max(text.rowCount, lastRow + 1),
    cells: { ...text.cells, ...changes },
  };
}

/** Another row is opened, or one is taken out and those below it move up. */
export function withoutRow(text: DepletionText, row: number): DepletionText {
  const cells = Object.fromEntries(
    Object.entries(text.cells).flatMap(([place, value]) => {
      const [, number, rest] = /^rows\.(\d+)\.(.+)$/.exec(place) ?? [];
      if (number === undefined || Number(number) < row) return [[place, value]];
      return Number(number) === row ? [] : [[`rows.${Number(number) - 1}.${rest}`, value]];
    }),
  );
  return { ...text, rowCount: Math.max(2, text.rowCount - 1), cells };
}

function readColumn(name: DepletionColumn, text: string): FieldReading {
  if (name === "pressurePsia") {
    return aboveZero(readQuantity(text, "pressure", "psia"), "A pressure");
  }
  if (name === "liquidPercent" || name === "cumulativeProducedMolePercent") {
    const reading = readQuantity(text, "fraction", "%", "%");
    return reading.value === null
      ? reading
      : { ...reading, value: Number((reading.value * 100).toPrecision(12)) };
  }
  return readPlain(text);
}

const SCALAR_FIELDS = ["temperatureDegF", "dewPointPsia"] as const;

/** Reads every field, and all of them as a table. */
export function readDepletion(text: DepletionText): DepletionReading {
  const at = (place: string) => text.cells[place] ?? "";
  const fields: Record<string, FieldReading> = {
    temperatureDegF: readQuantity(at("temperatureDegF"), "temperature", "°F"),
    dewPointPsia: aboveZero(readQuantity(at("dewPointPsia"), "pressure", "psia"), "A dew point"),
  };
  const incomplete: string[] = SCALAR_FIELDS.filter((name) => at(name) === "");
  const rowsOfTable: number[] = [];
  const rows = Array.from({ length: text.rowCount }, (_, row) => {
    for (const name of depletionColumnNames) {
      fields[`rows.${row}.${name}`] = readColumn(name, at(`rows.${row}.${name}`));
    }
    const gas = readStreamCells(`rows.${row}.producedGas`, text.plusFrom, text.cells);
    Object.assign(fields, gas.fields);
    const isBlank =
      gas.isEmpty && depletionColumnNames.every((name) => at(`rows.${row}.${name}`) === "");
    if (isBlank) return null;
    rowsOfTable.push(row);
    if (at(`rows.${row}.pressurePsia`) === "") incomplete.push(`rows.${row}.pressurePsia`);
    incomplete.push(...gas.incomplete);
    return {
      ...Object.fromEntries(
        depletionColumnNames.map((name) => [name, fields[`rows.${row}.${name}`].value]),
      ),
      producedGas: gas.stream,
    };
  }).filter((row) => row !== null);

  const isReadable = Object.values(fields).every(({ problem }) => problem === null);
  const parsed = depletionTableSchema.safeParse({
    temperatureDegF: fields.temperatureDegF.value,
    dewPointPsia: fields.dewPointPsia.value,
    rows,
  });
  return {
    fields,
    table: isReadable && incomplete.length === 0 && parsed.success ? parsed.data : null,
    incomplete,
    rowsOfTable,
    isEmpty: rows.length === 0,
  };
}
