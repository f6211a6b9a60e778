import type { CompositionSheet, SeparatorStage } from "@/analytics/composition/composition-schema";
import type { DepletionTable } from "@/analytics/depletion/depletion-table-schema";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import type { CsvRecord } from "../csv-records";
import { componentOf } from "./component-names";
import { blockOf, depletionColumns, findNamed, stageColumns, type BlockKind } from "./layout";
import { CompositionReader } from "./read-composition";
import { DepletionReader } from "./read-depletion";
import { SeparatorReader } from "./read-separators";
import { SheetReader } from "./sheet-reader";
import { readLabel, readSheetText, type LabProblem } from "./sheet-text";

export interface LabSheet {
  composition: CompositionSheet | null;
  depletion: DepletionTable | null;
  stages: SeparatorStage[] | null;
  separatorTest: SeparatorTest | null;
  /** what was read with which unit, in words */
  read: string[];
  problems: LabProblem[];
}

/**
 * Reads a laboratory's sheet from a CSV file or from cells pasted out of a spreadsheet, in the layout of the template.
 * Whatever could not be read is named with its line, cell and reason; the rest is read all the same.
 */
export function readLabSheet(text: string): LabSheet {
  const { records, problems } = readSheetText(text);
  const reader = new SheetReader();
  const blocks = {
    composition: new CompositionReader(reader),
    depletion: new DepletionReader(reader),
    separators: new SeparatorReader(reader),
  };
  let block: BlockKind | null = null;
  for (const record of records) {
    const begins = blockOf(record.cells);
    if (begins) {
      block = begins;
      continue;
    }
    block ??= guessBlock(record, reader);
    if (block) blocks[block].take(record);
    else {
      reader.problem(
        record.line,
        null,
        record.cells[0],
        "Stands before the first heading (composition, depletion or separator test). Left out.",
      );
    }
  }
  const composition = blocks.composition.finish();
  const wellstream = composition?.kind === "wellstream" ? composition.stream : null;
  const depletion = blocks.depletion.finish(wellstream);
  const separators = blocks.separators.finish(composition);
  if (records.length > 0 && !composition && !depletion && !separators.stages) {
    reader.note("Nothing in it could be read as a composition, a depletion table or separators.");
  }
  return {
    composition,
    depletion,
    ...separators,
    read: reader.read,
    problems: [...problems, ...reader.problems],
  };
}

/** A table that was pasted alone has no heading; its first line tells what it is. */
function guessBlock(record: CsvRecord, reader: SheetReader): BlockKind | null {
  const [first, ...others] = record.cells;
  if (others.every((cell) => cell === "")) return null;
  const names = record.cells.map((cell) => readLabel(cell).name);
  const isStages =
    names.some((name) => findNamed(stageColumns, name)?.key === "pressurePsia") &&
    names.some((name) => findNamed(stageColumns, name)?.key === "temperatureDegF");
  const isDepletion = names.some(
    (name) => findNamed(depletionColumns, name)?.key === "pressurePsia",
  );
  const isComposition = /^components?$/i.test(first) || componentOf(names[0]) !== null;
  const guess = isStages
    ? "separators"
    : isDepletion
      ? "depletion"
      : isComposition
        ? "composition"
        : null;
  if (guess) {
    reader.note(`There is no heading; the table was read as ${blockWords[guess]}.`);
  }
  return guess;
}

const blockWords: Record<BlockKind, string> = {
  composition: "a composition",
  depletion: "a depletion",
  separators: "separators",
};
