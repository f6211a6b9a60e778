import {
  separatorStagesSchema,
  type CompositionSheet,
  type SeparatorStage,
} from "@/analytics/composition/composition-schema";
import { separatorTestSchema, type SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { CANONICAL_BASE } from "@/analytics/units/standard-conditions";
import type { CsvRecord } from "../csv-records";
import {
  findNamed,
  separatorLines,
  stageColumns,
  type SeparatorLine,
  type StageColumn,
} from "./layout";
import { bare, hasFigures, isUnitsRow, type SheetReader } from "./sheet-reader";
import { readLabel } from "./sheet-text";
import type { SheetUnit } from "./units";

const MOST_STAGES = 6;

type Stage = { record: CsvRecord } & Record<StageColumn, number | null>;

/** Reads the separators: a table of stages, stock tank last, and lines with what was measured of the condensate. */
export class SeparatorReader {
  private readonly stages: Stage[] = [];
  private readonly lines: Partial<Record<SeparatorLine, number | null>> = {};
  private header: CsvRecord | null = null;
  private units: string[] = [];
  private columns: { index: number; key: StageColumn; unit: SheetUnit }[] | null = null;
  private first: CsvRecord | null = null;

  constructor(private readonly reader: SheetReader) {}

  take(record: CsvRecord): void {
    this.first ??= record;
    const label = readLabel(record.cells[0]);
    if (!hasFigures(record) && record.cells.filter((cell) => cell !== "").length > 1) {
      if (this.header && isUnitsRow(record)) this.units = record.cells;
      else {
        this.header = record;
        this.units = [];
        this.columns = null;
      }
      return;
    }
    const line = findNamed(separatorLines, label.name);
    if (line) {
      this.lines[line.key] = this.reader.scalar(record, label, line.unit, `The ${line.label}`);
    } else if (this.header) this.takeStage(record, this.header);
    else {
      this.reader.problem(
        record.line,
        0,
        record.cells[0],
        "No line of a separator test, and no table of stages before it. Left out.",
      );
    }
  }

  private takeStage(record: CsvRecord, header: CsvRecord): void {
    this.columns ??= header.cells.flatMap((cell, index) => {
      const { name, unit } = readLabel(cell);
      const named = findNamed(stageColumns, name);
      if (!named) {
        if (index > 0 && cell !== "") {
          this.reader.problem(header.line, index, cell, "No column of a separator. Left out.");
        }
        return [];
      }
      const written = unit ?? (bare(this.units[index] ?? "") || null);
      const what = `The ${named.label}`;
      return [
        { index, key: named.key, unit: this.reader.unit(header, index, written, named.unit, what) },
      ];
    });
    if (this.stages.length === MOST_STAGES) {
      this.reader.problem(
        record.line,
        null,
        record.cells[0],
        `There are up to ${MOST_STAGES} stages, stock tank included. The row was left out.`,
      );
      return;
    }
    const stage: Stage = {
      record,
      pressurePsia: null,
      temperatureDegF: null,
      gasOilRatio: null,
      gasGravity: null,
    };
    for (const { index, key, unit } of this.columns) {
      stage[key] = this.reader.figure(record, index, unit);
    }
    this.stages.push(stage);
  }

  finish(composition: CompositionSheet | null): {
    stages: SeparatorStage[] | null;
    separatorTest: SeparatorTest | null;
  } {
    if (!this.first) return { stages: null, separatorTest: null };
    const stages = this.finishStages();
    return { stages, separatorTest: stages && this.finishTest(stages, composition) };
  }

  private finishStages(): SeparatorStage[] | null {
    const stages: SeparatorStage[] = [];
    for (const { record, pressurePsia, temperatureDegF } of this.stages) {
      if (pressurePsia === null || temperatureDegF === null || pressurePsia <= 0) {
        this.reader.problem(
          record.line,
          null,
          record.cells[0],
          "A stage needs a pressure above zero and a temperature. No stages were read.",
        );
        return null;
      }
      stages.push({ pressurePsia, temperatureDegF });
    }
    const parsed = separatorStagesSchema.safeParse(stages);
    if (!parsed.success) {
      this.reader.problem(
        this.first?.line ?? 1,
        null,
        "",
        `${stages.length === 0 ? "There is no stage with pressure and temperature" : parsed.error.issues[0].message}. No separators were read.`,
      );
      return null;
    }
    this.reader.note(`Separators: ${stages.length} stages, the stock tank last.`);
    return parsed.data;
  }

  /** A separator test needs measured gas; a sheet that only names the stages has none, and that is no fault. */
  private finishTest(
    stages: readonly SeparatorStage[],
    composition: CompositionSheet | null,
  ): SeparatorTest | null {
    const gases = this.stages.map(({ gasOilRatio, gasGravity }) =>
      gasOilRatio !== null && gasGravity !== null
        ? { gasOilRatioScfPerStb: gasOilRatio, gasGravity }
        : null,
    );
    const [primary] = gases;
    const hasTest = this.stages.some(({ gasOilRatio }) => gasOilRatio !== null);
    if (!hasTest) return null;
    const impurities = this.impurities(composition);
    const { condensateApi = null } = this.lines;
    const missing = [
      ...(stages.length !== 2 && stages.length !== 3 ? ["two or three stages"] : []),
      ...(primary === null ? ["the gas-oil ratio and gas gravity of its first stage"] : []),
      ...(condensateApi === null ? ["the condensate gravity"] : []),
      ...(impurities === null
        ? ["nitrogen, carbon dioxide and hydrogen sulphide (0 where there is none)"]
        : []),
    ];
    if (missing.length > 0 || !primary || !impurities) {
      this.reader.problem(
        this.first?.line ?? 1,
        null,
        "",
        `A separator test needs ${missing.join(", ")}. No separator test was read.`,
      );
      return null;
    }
    const basePressurePsia = this.lines.basePressurePsia ?? null;
    if (basePressurePsia === null) {
      this.reader.note(
        `Gas of the separator test at ${CANONICAL_BASE.pressurePsia} psia: no base pressure is given.`,
      );
    }
    const parsed = separatorTestSchema.safeParse({
      basePressurePsia: basePressurePsia ?? CANONICAL_BASE.pressurePsia,
      primarySeparator: { ...stages[0], ...primary },
      secondSeparator: stages.length === 3 ? { ...stages[1], gas: gases[1] } : null,
      stockTankGas: gases[gases.length - 1],
      condensateApi,
      condensateMolecularWeight: this.lines.condensateMolecularWeight ?? null,
      ...impurities,
      dewPointPsia: this.lines.dewPointPsia ?? null,
    } satisfies Record<keyof SeparatorTest, unknown>);
    if (parsed.success) {
      this.reader.note(`Separator test of ${stages.length} stages.`);
      return parsed.data;
    }
    const [issue] = parsed.error.issues;
    this.reader.problem(
      this.first?.line ?? 1,
      null,
      "",
      `The separator test has an impossible ${issue.path.join(" ")}. No separator test was read.`,
    );
    return null;
  }

  /** Mole fractions of the lines, else of the wellstream's composition in the same sheet. */
  private impurities(composition: CompositionSheet | null) {
    const { nitrogen, carbonDioxide, hydrogenSulphide } = this.lines;
    if (
      nitrogen !== undefined &&
      nitrogen !== null &&
      carbonDioxide !== undefined &&
      carbonDioxide !== null &&
      hydrogenSulphide !== undefined &&
      hydrogenSulphide !== null
    ) {
      return {
        nitrogen: nitrogen / 100,
        carbonDioxide: carbonDioxide / 100,
        hydrogenSulphide: hydrogenSulphide / 100,
      };
    }
    if (composition?.kind !== "wellstream") return null;
    const { light } = composition.stream;
    if (light.N2 === undefined || light.CO2 === undefined || light.H2S === undefined) return null;
    this.reader.note("Nitrogen, carbon dioxide and hydrogen sulphide from the composition.");
    return {
      nitrogen: light.N2 / 100,
      carbonDioxide: light.CO2 / 100,
      hydrogenSulphide: light.H2S / 100,
    };
  }
}
