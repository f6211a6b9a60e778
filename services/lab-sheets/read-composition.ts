import type { CompositionSheet, ReportedStream } from "@/analytics/composition/composition-schema";
import { CUBIC_FEET_PER_BARREL } from "@/analytics/units/conversions";
import { CANONICAL_BASE, WATER_POUNDS_PER_BARREL } from "@/analytics/units/standard-conditions";
import type { CsvRecord } from "../csv-records";
import { componentOf } from "./component-names";
import { compositionColumns, compositionLines, findNamed, type StreamName } from "./layout";
import { bare, hasFigures, isFigure, isUnitsRow, type SheetReader } from "./sheet-reader";
import { readLabel } from "./sheet-text";
import { componentAt, figure, placeOfComponent, StreamAmounts } from "./streams";
import { findUnit, isUnit, type SheetUnit } from "./units";

const POUNDS_PER_CUBIC_FOOT_OF_WATER = WATER_POUNDS_PER_BARREL / CUBIC_FEET_PER_BARREL;

const streamWords: Record<StreamName, string> = {
  wellstream: "the wellstream",
  gas: "the separator gas",
  liquid: "the separator liquid",
};

/** Where each stream stands in the sheet that is read. */
const placesOf: Record<StreamName, string> = {
  wellstream: "composition.stream",
  gas: "composition.gas",
  liquid: "composition.liquid",
};

type ColumnKey = (typeof compositionColumns)[number]["key"];

interface Column {
  key: ColumnKey;
  index: number;
  /** to per cent; null where the sheet does not say */
  unit: SheetUnit | null;
}

interface Scalars {
  ratio: number | null;
  liquidDensity: number | null;
  basePressure: number | null;
}

/** Reads a composition: names down the first column, one or several streams beside them. */
export class CompositionReader {
  private columns: Column[] | null = null;
  private readonly streams = new Map<StreamName, StreamAmounts>();
  private readonly scalars: Scalars = { ratio: null, liquidDensity: null, basePressure: null };
  private first: CsvRecord | null = null;

  constructor(private readonly reader: SheetReader) {}

  take(record: CsvRecord): void {
    this.first ??= record;
    const label = readLabel(record.cells[0]);
    const component = componentOf(label.name);
    const line = component ? null : findNamed(compositionLines, label.name);
    if (!hasFigures(record)) {
      if (isUnitsRow(record)) this.takeUnits(record);
      // A component whose only figure cannot be read is a fault to be named, not a line to be passed over.
      else if (component && this.columns) this.takeComponent(record, label.name, this.columns);
      else if (!component && !line) this.takeHeader(record);
      return;
    }
    const columns = (this.columns ??= this.withoutHeader(record));
    if (line) this.takeLine(record, label, line, columns);
    else this.takeComponent(record, label.name, columns);
  }

  private takeHeader(record: CsvRecord): void {
    this.columns = record.cells.flatMap((cell, index): Column[] => {
      if (index === 0 || cell === "") return [];
      const { name, unit } = readLabel(cell);
      const named = findNamed(compositionColumns, isUnit(bare(name)) ? "" : name);
      if (!named) {
        this.reader.problem(record.line, index, cell, "No column of a composition. Left out.");
        return [];
      }
      const found = unit === null ? null : findUnit(bare(unit), named.unit);
      if (unit !== null && !found) this.reader.unit(record, index, unit, named.unit, "The column");
      return [{ key: named.key, index, unit: found }];
    });
  }

  private takeUnits(record: CsvRecord): void {
    for (const column of this.columns ?? []) {
      const cell = bare(record.cells[column.index] ?? "");
      if (cell !== "") column.unit = findUnit(cell, kindOf(column.key));
    }
  }

  /** A list without a header is one stream. */
  private withoutHeader(record: CsvRecord): Column[] {
    const index = record.cells.findIndex((cell, at) => at > 0 && isFigure(cell));
    this.reader.note("The composition has no header; its first column of figures was read.");
    return [{ key: "wellstream", index, unit: null }];
  }

  private takeLine(
    record: CsvRecord,
    label: ReturnType<typeof readLabel>,
    line: (typeof compositionLines)[number],
    columns: readonly Column[],
  ): void {
    const { key } = line;
    if (key === "ratio" || key === "liquidDensity" || key === "basePressure") {
      this.scalars[key] = this.reader.scalar(record, label, line.unit, `The ${line.label}`);
      return;
    }
    const property = key === "plusMolecularWeight" ? "molecularWeight" : "specificGravity";
    const streams = columns.filter(isStreamColumn);
    const unitBeside = record.cells.find((cell, at) => at > 0 && isUnit(bare(cell))) ?? null;
    const unit = this.reader.unit(
      record,
      0,
      label.unit ?? unitBeside,
      line.unit,
      `The ${line.label}`,
    );
    const inOwnColumns = streams.filter(({ index }) => isFigure(record.cells[index]));
    const only = record.cells.findIndex((cell, at) => at > 0 && isFigure(cell));
    const places =
      inOwnColumns.length > 0
        ? inOwnColumns
        : streams.slice(0, 1).map((column) => ({ ...column, index: only }));
    for (const { key: stream, index } of places) {
      const place = `${placesOf[stream as StreamName]}.plus.${property}`;
      const value = this.reader.figure(record, index, unit, "Left out.", place);
      if (value === null) continue;
      this.amountsOf(stream as StreamName).properties[property] =
        key === "plusDensity" ? value / POUNDS_PER_CUBIC_FOOT_OF_WATER : value;
    }
  }

  private takeComponent(record: CsvRecord, name: string, columns: readonly Column[]): void {
    const component = componentAt(this.reader, record, 0, name);
    if (!component) return;
    for (const { key, index, unit } of columns) {
      if (isStream(key)) {
        const place = `${placesOf[key]}.${placeOfComponent(component)}`;
        const value = this.reader.figure(record, index, plainUnit, "Left out.", place);
        if (value !== null) this.amountsOf(key).add(component, { record, index, value });
      } else if (component.kind === "plus") {
        const value = this.reader.figure(record, index, unit ?? plainUnit, "Left out.");
        const property = key === "plusMolecularWeight" ? "molecularWeight" : "specificGravity";
        for (const stream of columns.filter(isStreamColumn)) {
          const { properties } = this.amountsOf(stream.key as StreamName);
          properties[property] ??= value;
        }
      }
    }
  }

  private amountsOf(stream: StreamName): StreamAmounts {
    const amounts = this.streams.get(stream) ?? new StreamAmounts(this.reader, streamWords[stream]);
    this.streams.set(stream, amounts);
    return amounts;
  }

  /** The sheet, or null when there is none or it cannot be one. */
  finish(): CompositionSheet | null {
    if (!this.first) return null;
    const wellstream = this.finishStream("wellstream");
    const hasStreams = this.streams.has("gas") && this.streams.has("liquid");
    if (wellstream) {
      if (hasStreams) {
        this.reader.note(
          "The sheet has a wellstream beside the separator gas and liquid; the wellstream was taken.",
        );
      }
      return { kind: "wellstream", stream: wellstream };
    }
    if (!hasStreams) {
      const lone = this.streams.has("gas") ? "gas" : "liquid";
      if (!this.streams.has(lone)) return null;
      this.reader.problem(
        this.first.line,
        null,
        "",
        `There is only ${streamWords[lone]}; a wellstream takes gas and liquid. No composition was read.`,
      );
      return null;
    }
    return this.recombination();
  }

  private recombination(): CompositionSheet | null {
    const gas = this.finishStream("gas");
    const liquid = this.finishStream("liquid");
    const { ratio, liquidDensity, basePressure } = this.scalars;
    const missing = [
      ...(ratio === null || ratio <= 0 ? ["gas-liquid ratio"] : []),
      ...(liquidDensity === null || liquidDensity <= 0 ? ["liquid density"] : []),
    ];
    if (missing.length > 0) {
      this.reader.problem(
        this.first?.line ?? 1,
        null,
        "",
        `To recombine gas and liquid the sheet needs a line for the ${missing.join(" and the ")}. No composition was read.`,
      );
    }
    if (!gas || !liquid || !ratio || !liquidDensity || missing.length > 0) return null;
    if (basePressure === null) {
      this.reader.note(
        `Gas of the ratio at ${CANONICAL_BASE.pressurePsia} psia: no base pressure is given.`,
      );
    }
    return {
      kind: "separatorStreams",
      gas,
      liquid,
      gasLiquidRatioScfPerSeparatorBarrel: ratio,
      liquidDensityLbPerCubicFoot: liquidDensity,
      basePressurePsia: basePressure ?? CANONICAL_BASE.pressurePsia,
    };
  }

  private finishStream(name: StreamName): ReportedStream | null {
    const amounts = this.streams.get(name);
    if (!amounts || amounts.isEmpty) return null;
    const unit = this.columns?.find(({ key }) => key === name)?.unit ?? null;
    const stream = amounts.finish(unit && unit.convert(1));
    if (stream) {
      this.reader.note(
        `Composition of ${streamWords[name]}: ${amounts.count} components, adding up to ${figure(totalPercentOf(stream))} mole per cent.`,
      );
    }
    return stream;
  }
}

const totalPercentOf = ({ light, carbonNumbers, plus }: ReportedStream) =>
  [...Object.values(light), ...carbonNumbers.map(({ molePercent }) => molePercent)].reduce(
    (sum, value) => sum + value,
    plus?.molePercent ?? 0,
  );

/** Amounts stay as they stand until their column is known to be per cent or fractions. */
const plainUnit: SheetUnit = { symbol: "", spellings: [], convert: (value) => value };

const isStream = (key: ColumnKey): key is StreamName =>
  key === "wellstream" || key === "gas" || key === "liquid";
const isStreamColumn = ({ key }: Column) => isStream(key);
const kindOf = (key: ColumnKey) =>
  isStream(key) ? "percent" : key === "plusMolecularWeight" ? "molecularWeight" : "none";
