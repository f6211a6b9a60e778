import { DomainError } from "@/analytics/errors";
import { recombine } from "@/analytics/fluid/wellstream";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import { checkInputs } from "@/analytics/volumetrics/check-inputs";
import type { EstimateInputs, InputName } from "@/analytics/volumetrics/inputs-schema";
import { usualRanges } from "@/analytics/volumetrics/usual-ranges";
import type { Warning } from "@/analytics/warnings";
import { prmsSubClasses, type PrmsClass, type PrmsSubClass } from "@/models/vocabulary";
import { rangeColumns } from "./columns";
import { columnOfPath, inputOfPath } from "./columns-of-paths";
import { nameKey } from "./name-key";
import type { Problem } from "./problem";
import { CellReader } from "./read-cells";
import { isRangeGiven, readRange } from "./read-range";
import { readSeparatorTest } from "./read-separator-test";
import type { TableRow } from "./read-table";

/** What a row says of its field; `null` where the cell is blank and the book's value stands. */
export interface RowFieldData {
  operator: string | null;
  workingInterest: number | null;
  netRevenueInterest: number | null;
  prmsClass: PrmsClass | null;
  prmsSubClass: PrmsSubClass | null;
  chanceOfCommerciality: number | null;
}

/** A row that makes sense by itself. */
export interface ReservoirRow {
  line: number;
  basin: string;
  field: string;
  reservoir: string;
  fieldData: RowFieldData;
  depthFt: number | null;
  sample: { name: string; sampledOn: string; laboratory: string; separatorTest: SeparatorTest };
  inputs: EstimateInputs;
  note: string;
  warnings: Problem[];
}

/** A row that does not, with everything that is wrong in it. */
export interface RefusedRow {
  line: number;
  basin: string;
  field: string;
  reservoir: string;
  problems: Problem[];
}

export type ReadRow = { kind: "good"; row: ReservoirRow } | { kind: "bad"; row: RefusedRow };

function readFieldData(reader: CellReader): RowFieldData {
  const prmsClass = reader.choice("prms_class") as PrmsClass | null;
  const prmsSubClass = reader.choice("prms_sub_class") as PrmsSubClass | null;
  if (prmsSubClass !== null && prmsClass === null && reader.isBlank("prms_class")) {
    reader.refuse("prms_class", "A sub-class needs its class.");
  }
  if (prmsClass !== null && prmsSubClass === null && reader.isBlank("prms_sub_class")) {
    reader.refuse("prms_sub_class", "A class needs its sub-class.");
  }
  if (prmsClass !== null && prmsSubClass !== null) {
    const belonging: readonly string[] = prmsSubClasses[prmsClass];
    if (!belonging.includes(prmsSubClass)) {
      reader.refuse("prms_sub_class", `Not a sub-class of ${prmsClass}: ${belonging.join(", ")}.`);
    }
  }
  const share = (name: string): number | null => {
    const value = reader.number(name);
    if (value !== null && !(value >= 0 && value <= 1)) {
      reader.refuse(name, "Must lie between 0 and 1 (0 and 100 %). Check the unit in row 2.");
    }
    return value;
  };
  const operator = reader.text("operator");
  return {
    operator: operator === "" ? null : operator,
    workingInterest: share("working_interest"),
    netRevenueInterest: share("net_revenue_interest"),
    prmsClass,
    prmsSubClass,
    chanceOfCommerciality: share("chance_of_commerciality"),
  };
}

type Uncertain = EstimateInputs["uncertain"];

/**
 * The ranges that could be read; a blank condensate yield is taken from the separator test, and the row says so.
 *
 * @returns what was read; an input whose cells were refused is not in it
 */
function readUncertain(reader: CellReader, fluid: SeparatorTest | null): Partial<Uncertain> {
  const uncertain: Partial<Uncertain> = {};
  for (const range of rangeColumns) {
    const source = reader.text(`${range.stem}_source`, { maximum: 500 });
    if (isRangeGiven(reader, range)) {
      const distribution = readRange(reader, range);
      if (distribution) uncertain[range.input] = { distribution, source };
    } else if (range.input === "condensateYieldStbPerMmscf") {
      const value = fluid && yieldOf(fluid);
      if (value === null) continue;
      uncertain[range.input] = {
        distribution: { kind: "constant", value },
        source: source === "" ? "Separator test" : source,
      };
      reader.warn(
        `${range.stem}_best`,
        `Blank, so the separator test's ${value.toPrecision(4)} STB/MMscf is taken, without a range.`,
      );
    } else {
      reader.refuse(
        `${range.stem}_best`,
        `Nothing is given for the ${usualRanges[range.input].label}. Fill low and high, or best alone.`,
      );
    }
  }
  return uncertain;
}

/** The test's own yield, or `null` when the test is impossible, which the check of the whole row reports. */
function yieldOf(fluid: SeparatorTest): number | null {
  try {
    return recombine(fluid).condensateYieldStbPerMmscf;
  } catch (error) {
    if (error instanceof DomainError) return null;
    throw error;
  }
}

/** Stands in for a refused input, so that the check can go on to the next; its own figures are never shown. */
function ordinary(name: InputName): Uncertain[InputName] {
  const [low, high] = usualRanges[name].usual;
  return { distribution: { kind: "constant", value: (low + high) / 2 }, source: "" };
}

function isComplete(uncertain: Partial<Uncertain>): uncertain is Uncertain {
  return rangeColumns.every(({ input }) => uncertain[input] !== undefined);
}

/**
 * What the engine says of the row as a whole. It stops at the first impossible input; a person wants to hear of all of
 * them, so each refused one is replaced by an ordinary one and the rest is checked again.
 *
 * @returns the warnings, or `null` when something was refused
 */
function checkWithEngine(
  reader: CellReader,
  read: Partial<Uncertain>,
  fluid: SeparatorTest,
  depthFt: number | null,
): Warning[] | null {
  const before = reader.problems.length;
  const uncertain = { ...read };
  for (const { input } of rangeColumns) uncertain[input] ??= ordinary(input);
  while (isComplete(uncertain)) {
    try {
      const warnings = checkInputs({
        schemaVersion: 1,
        uncertain,
        correlations: [],
        fluid,
        depthFt,
        recoveryPlan: null,
      });
      return reader.problems.length > before ? null : warnings;
    } catch (error) {
      if (!(error instanceof DomainError)) throw error;
      const name = inputOfPath(error.details.input);
      reader.refuse(columnOfPath(error.details.input), error.message);
      if (name === null) return null;
      uncertain[name] = ordinary(name);
    }
  }
  return null;
}

/** Warnings about P10, or about how far it lies from P90. */
const ABOUT_HIGH: ReadonlySet<string> = new Set([
  "wide_range",
  "narrow_range",
  "high_pressure_high_temperature",
]);

/** The column to look at for a warning: of a range, the filled cell that its percentile comes from. */
function columnOfWarning(
  reader: CellReader,
  { code, input }: Warning,
  uncertain: Uncertain,
): string | null {
  const name = inputOfPath(input);
  const best = columnOfPath(input);
  if (name === null || best === null) return best;
  const { distribution } = uncertain[name];
  if (distribution.kind === "constant") return best;
  if (code === "unusual_value") {
    const isLow = compileDistribution(distribution).range.p90 < usualRanges[name].usual[0];
    return columnOfPath(`${name}.${isLow ? "low" : "high"}`);
  }
  return ABOUT_HIGH.has(code) || reader.isBlank(best) ? columnOfPath(`${name}.high`) : best;
}

/** A name that can stand in an address, as every name of the book must. */
function readName(reader: CellReader, column: string): string {
  const name = reader.text(column, { needed: true, maximum: 100 });
  if (name !== "" && nameKey(name) === "") {
    reader.refuse(column, "A name needs a Latin letter or a digit.");
  }
  return name;
}

/**
 * Reads and checks one row: its cells, its ranges, its separator test, and what the engine says of them together.
 *
 * @param today  `YYYY-MM-DD`; a sample cannot be of a later day
 */
export function readRow(tableRow: TableRow, units: Record<string, string>, today: string): ReadRow {
  const reader = new CellReader(tableRow, units);
  const basin = readName(reader, "basin");
  const field = readName(reader, "field");
  const reservoir = readName(reader, "reservoir");
  const fieldData = readFieldData(reader);
  const depthFt = reader.number("depth");
  if (depthFt !== null && depthFt <= 0) reader.refuse("depth", "A depth is above zero.");
  const separatorTest = readSeparatorTest(reader, units);
  const uncertain = readUncertain(reader, separatorTest);
  const sampleName = reader.text("sample_name", { needed: true, maximum: 100 });
  const sampledOn = reader.date("sampled_on");
  if (sampledOn !== null && sampledOn > today) {
    reader.refuse("sampled_on", "Lies in the future.");
  }
  const laboratory = reader.text("laboratory");
  const note = reader.text("note", { maximum: 2000 });
  const warnings =
    separatorTest &&
    checkWithEngine(
      reader,
      uncertain,
      separatorTest,
      depthFt !== null && depthFt > 0 ? depthFt : null,
    );

  const { line } = tableRow;
  if (
    reader.problems.length > 0 ||
    separatorTest === null ||
    sampledOn === null ||
    warnings === null ||
    !isComplete(uncertain)
  ) {
    return { kind: "bad", row: { line, basin, field, reservoir, problems: reader.problems } };
  }
  for (const warning of warnings) {
    reader.warn(columnOfWarning(reader, warning, uncertain), warning.message);
  }
  return {
    kind: "good",
    row: {
      line,
      basin,
      field,
      reservoir,
      fieldData,
      depthFt,
      sample: { name: sampleName, sampledOn, laboratory, separatorTest },
      inputs: {
        schemaVersion: 1,
        uncertain,
        correlations: [],
        fluid: separatorTest,
        depthFt,
        recoveryPlan: null,
      },
      note,
      warnings: reader.warnings,
    },
  };
}
