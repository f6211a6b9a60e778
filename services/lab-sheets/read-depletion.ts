import type { ReportedStream } from "@/analytics/composition/composition-schema";
import {
  depletionTableSchema,
  type DepletionRow,
  type DepletionTable,
} from "@/analytics/depletion/depletion-table-schema";
import type { CsvRecord } from "../csv-records";
import { componentOf, type NamedComponent } from "./component-names";
import {
  depletionColumns,
  depletionLines,
  findNamed,
  type DepletionColumn,
  type Named,
} from "./layout";
import {
  bare,
  hasFigures,
  isEmptyCell,
  isFigure,
  isUnitsRow,
  type SheetReader,
} from "./sheet-reader";
import { readLabel } from "./sheet-text";
import { componentAt, figure, placeOfComponent, StreamAmounts } from "./streams";
import { findUnit, isUnit, type SheetUnit } from "./units";

const MOST_ROWS = 40;
/** psi within which two tables mean the same step; laboratories repeat a pressure with its digits */
const SAME_PRESSURE = 0.5;

type Column =
  | { kind: "value"; named: Named<DepletionColumn>; unit: SheetUnit }
  | { kind: "plus"; property: "molecularWeight" | "specificGravity" }
  | { kind: "component"; component: NamedComponent; scale: number | null };

interface Step {
  record: CsvRecord;
  index: number;
  pressurePsia: number;
  values: Partial<Record<DepletionColumn, number>>;
  gas: StreamAmounts;
  gasScale: number | null;
}

/** A table with pressures down its rows: what each column is, and where the pressures stand. */
interface Downwards {
  header: CsvRecord;
  pressureIndex: number;
  /** set with the first row of figures, when the row of units is known to be there or not */
  columns: { index: number; column: Column }[] | null;
  pressureUnit: SheetUnit | null;
  units: string[];
}

/**
 * Reads a depletion study: tables with pressures down the rows or across the columns, and lines with the temperature and
 * the dew point. Several tables of one study are joined at their pressures.
 */
export class DepletionReader {
  private readonly steps: Step[] = [];
  private readonly lines: { temperatureDegF: number | null; dewPointPsia: number | null } = {
    temperatureDegF: null,
    dewPointPsia: null,
  };
  private down: Downwards | null = null;
  /** the step of each column, while a table runs across */
  private across: (Step | null)[] | null = null;
  private first: CsvRecord | null = null;

  constructor(private readonly reader: SheetReader) {}

  take(record: CsvRecord): void {
    this.first ??= record;
    const label = readLabel(record.cells[0]);
    const line = findNamed(depletionLines, label.name);
    const figures = record.cells.slice(1).filter((cell) => isFigure(cell)).length;
    if (line && figures <= 1 && !this.isHeader(record)) {
      if (figures === 0) return;
      this.lines[line.key] = this.reader.scalar(record, label, line.unit, `The ${line.label}`);
    } else if (!hasFigures(record) && this.down && isUnitsRow(record)) {
      this.down.units = record.cells;
    } else if (this.isHeader(record)) this.beginDown(record);
    else if (findNamed(depletionColumns, label.name)?.key === "pressurePsia") {
      this.beginAcross(record);
    } else if (this.across) this.takeAcross(record, this.across);
    else if (this.down) this.takeDown(record, this.down);
    else {
      this.reader.problem(
        record.line,
        null,
        record.cells[0],
        "A table needs its pressures first: a heading “pressure” or a row of pressures. Left out.",
      );
    }
  }

  /** Names in every cell, one of them the pressure's. */
  private isHeader(record: CsvRecord): boolean {
    return (
      !hasFigures(record) &&
      record.cells.filter((cell) => cell !== "").length > 1 &&
      record.cells.some(
        (cell) => findNamed(depletionColumns, readLabel(cell).name)?.key === "pressurePsia",
      )
    );
  }

  private beginDown(header: CsvRecord): void {
    this.across = null;
    const pressureIndex = header.cells.findIndex(
      (cell) => findNamed(depletionColumns, readLabel(cell).name)?.key === "pressurePsia",
    );
    this.down = { header, pressureIndex, columns: null, pressureUnit: null, units: [] };
  }

  private takeDown(record: CsvRecord, table: Downwards): void {
    const { header, pressureIndex, units } = table;
    const unitAt = (index: number) =>
      readLabel(header.cells[index]).unit ?? (bare(units[index] ?? "") || null);
    table.pressureUnit ??= this.reader.unit(
      header,
      pressureIndex,
      unitAt(pressureIndex),
      "pressure",
      "The pressure",
    );
    table.columns ??= header.cells.flatMap((cell, index) => {
      if (index === pressureIndex || cell === "" || /^(step|stage|no\.?|#)$/i.test(cell)) return [];
      const column = this.columnOf(header, index, readLabel(cell).name, unitAt(index));
      return column ? [{ index, column }] : [];
    });
    const pressure = this.reader.figure(
      record,
      pressureIndex,
      table.pressureUnit,
      "The row was left out.",
    );
    const step = pressure === null ? null : this.stepAt(record, pressureIndex, pressure);
    if (!step) {
      if (isEmptyCell(record.cells[pressureIndex])) {
        this.reader.problem(record.line, pressureIndex, "", "No pressure. The row was left out.");
      }
      return;
    }
    for (const { index, column } of table.columns) this.put(step, column, record, index);
  }

  private beginAcross(record: CsvRecord): void {
    this.down = null;
    const { unit, from } = unitAndStart(record);
    const pressureUnit = this.reader.unit(record, 0, unit, "pressure", "The pressure");
    this.across = record.cells.map((cell, index) => {
      if (index < from || isEmptyCell(cell)) return null;
      const pressure = this.reader.figure(record, index, pressureUnit, "The column was left out.");
      return pressure === null ? null : this.stepAt(record, index, pressure);
    });
  }

  private takeAcross(record: CsvRecord, steps: readonly (Step | null)[]): void {
    if (!hasFigures(record)) return;
    const { name, unit } = unitAndStart(record);
    const column = this.columnOf(record, 0, name, unit);
    if (!column) return;
    steps.forEach((step, index) => {
      if (step) this.put(step, column, record, index);
    });
  }

  private columnOf(
    record: CsvRecord,
    index: number,
    name: string,
    unit: string | null,
  ): Column | null {
    const component = componentOf(name);
    if (component) {
      const found = unit === null ? null : findUnit(bare(unit), "percent");
      if (unit !== null && !found) {
        this.reader.unit(record, index, unit, "percent", "The composition");
      }
      return { kind: "component", component, scale: found && found.convert(1) };
    }
    const named = findNamed(depletionColumns, name);
    if (!named) {
      componentAt(this.reader, record, index, name);
      return null;
    }
    const { key } = named;
    if (key === "pressurePsia") return null;
    if (key === "plusMolecularWeight" || key === "plusSpecificGravity") {
      const property = key === "plusMolecularWeight" ? "molecularWeight" : "specificGravity";
      return { kind: "plus", property };
    }
    const what = `The ${named.label}`;
    return {
      kind: "value",
      named: named as Named<DepletionColumn>,
      unit: this.reader.unit(record, index, unit, named.unit, what),
    };
  }

  private put(step: Step, column: Column, record: CsvRecord, index: number): void {
    const unit = column.kind === "value" ? column.unit : plainUnit;
    const place = `depletion.rows.${this.steps.indexOf(step)}.${placeOf(column)}`;
    const value = this.reader.figure(record, index, unit, undefined, place);
    if (value === null) return;
    if (column.kind === "value") step.values[column.named.key] = value;
    else if (column.kind === "plus") step.gas.properties[column.property] = value;
    else {
      step.gasScale ??= column.scale;
      step.gas.add(column.component, { record, index, value });
    }
  }

  private stepAt(record: CsvRecord, index: number, pressurePsia: number): Step | null {
    const known = this.steps.find(
      (step) => Math.abs(step.pressurePsia - pressurePsia) <= SAME_PRESSURE,
    );
    if (known) return known;
    if (pressurePsia <= 0 || this.steps.length === MOST_ROWS) {
      this.reader.problem(
        record.line,
        index,
        record.cells[index],
        pressurePsia <= 0
          ? "A pressure is above zero. The step was left out."
          : `A study has up to ${MOST_ROWS} pressures. The step was left out.`,
      );
      return null;
    }
    const gas = new StreamAmounts(this.reader, `the gas produced at ${figure(pressurePsia)} psia`);
    const step: Step = { record, index, pressurePsia, values: {}, gas, gasScale: null };
    this.steps.push(step);
    return step;
  }

  /**
   * The table, or null when there is none or it cannot be one.
   *
   * @param wellstream  gives heptanes plus its weight and gravity where the produced gas has none of its own
   */
  finish(wellstream: ReportedStream | null): DepletionTable | null {
    if (!this.first) return null;
    const { temperatureDegF } = this.lines;
    if (this.steps.length < 2) {
      this.refuse("A depletion needs at least two pressures.");
      return null;
    }
    if (temperatureDegF === null) {
      this.refuse("A depletion needs a line with its temperature.");
      return null;
    }
    this.borrowPlus(wellstream);
    const [start] = this.steps;
    if (this.lines.dewPointPsia === null) {
      this.reader.problem(
        start.record.line,
        start.index,
        start.record.cells[start.index],
        `No line gives the dew point; the first pressure, ${figure(start.pressurePsia)} psia, was taken for it.`,
      );
    }
    const rows = this.steps.map((step): DepletionRow => {
      const { values, gas } = step;
      return {
        pressurePsia: step.pressurePsia,
        liquidPercent: values.liquidPercent ?? null,
        cumulativeProducedMolePercent: values.cumulativeProducedMolePercent ?? null,
        gasZ: values.gasZ ?? null,
        twoPhaseZ: values.twoPhaseZ ?? null,
        viscosityCp: values.viscosityCp ?? null,
        producedGas: gas.isEmpty ? null : gas.finish(step.gasScale),
      };
    });
    const table = {
      temperatureDegF,
      dewPointPsia: this.lines.dewPointPsia ?? start.pressurePsia,
      rows,
    };
    const parsed = depletionTableSchema.safeParse(table);
    if (!parsed.success) {
      this.refuse(`${parsed.error.issues[0].message}.`);
      return null;
    }
    this.say(rows);
    return parsed.data;
  }

  private refuse(reason: string): void {
    this.reader.problem(this.first?.line ?? 1, null, "", `${reason} No table was read.`);
  }

  /** Laboratories often leave the plus fraction's weight out of the steps; the wellstream's is taken, and said. */
  private borrowPlus(wellstream: ReportedStream | null): void {
    const lent = wellstream?.plus;
    const without = this.steps.filter(
      ({ gas }) =>
        gas.plus &&
        gas.plus.amount.value !== 0 &&
        (gas.properties.molecularWeight === null || gas.properties.specificGravity === null),
    );
    if (without.length === 0 || !lent) return;
    for (const { gas } of without) {
      gas.properties.molecularWeight ??= lent.molecularWeight;
      gas.properties.specificGravity ??= lent.specificGravity;
    }
    const [{ gas, record }] = without;
    this.reader.problem(
      gas.plus?.amount.record.line ?? record.line,
      null,
      "",
      `The produced gas has no molecular weight and gravity of its C${gas.plus?.carbonNumber}+ at ${without.length} of ${this.steps.length} pressures; the wellstream's were taken.`,
    );
  }

  private say(rows: readonly DepletionRow[]): void {
    const present = reportedColumns.filter((key) => rows.some((row) => row[key] !== null));
    const labels = depletionColumns.flatMap(({ key, label }) =>
      present.some((name) => name === key) ? [label] : [],
    );
    const gases = rows.filter(({ producedGas }) => producedGas !== null).length;
    const also = gases > 0 ? [`composition of the produced gas at ${gases}`] : [];
    const what = [...labels, ...also].join(", ");
    this.reader.note(
      `Depletion table of ${rows.length} pressures${what === "" ? "" : `: ${what}`}.`,
    );
  }
}

/** Where a column's figure belongs in a row of the table. */
function placeOf(column: Column): string {
  if (column.kind === "value") return column.named.key;
  if (column.kind === "plus") return `producedGas.plus.${column.property}`;
  return `producedGas.${placeOfComponent(column.component)}`;
}

const reportedColumns: readonly DepletionColumn[] = [
  "liquidPercent",
  "cumulativeProducedMolePercent",
  "gasZ",
  "twoPhaseZ",
  "viscosityCp",
];

const plainUnit: SheetUnit = { symbol: "", spellings: [], convert: (value) => value };

/** The name and unit of a row that runs across, whether the unit stands with the name or in the next cell. */
function unitAndStart({ cells }: CsvRecord): { name: string; unit: string | null; from: number } {
  const { name, unit } = readLabel(cells[0]);
  const second = cells[1] ?? "";
  // "1" is a figure there, not a unit.
  const isBeside = unit === null && !isFigure(second) && isUnit(bare(second));
  return { name, unit: isBeside ? bare(second) : unit, from: isBeside ? 2 : 1 };
}
