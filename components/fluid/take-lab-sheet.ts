import { untouched } from "@/analytics/equation-of-state/characterisation-schema";
import type { LabSheetResponse } from "@/app/api/v1/calculations/fluid-schema";
import { textOfTest } from "@/components/estimate/sheet-text";
import { textOfComposition } from "./composition-text";
import { textOfDepletion, withCells } from "./depletion-text";
import type { Cells } from "./grid-paste";
import type { SampleText } from "./sample-text";
import { textOfStages } from "./stages-text";

/** Sheets of a sample, by which remarks on their cells are kept apart. */
export const sheetParts = ["separatorTest", "composition", "stages", "depletion"] as const;
export type SheetPart = (typeof sheetParts)[number];
export type SheetRemarks = Readonly<Record<SheetPart, Cells>>;

export const noRemarks: SheetRemarks = {
  separatorTest: {},
  composition: {},
  stages: {},
  depletion: {},
};

/** `depletion.rows.3.gasZ` is the depletion's `rows.3.gasZ`; `null` for a place that no sheet has. */
export function partAndPlace(place: string): { part: SheetPart; place: string } | null {
  const part = sheetParts.find((name) => place.startsWith(`${name}.`));
  return part ? { part, place: place.slice(part.length + 1) } : null;
}

/**
 * What a laboratory's file says, laid into the sheets. A cell that could not be read gets the file's own words, so that
 * they stand where they are to be put right, and a remark why.
 */
export function takeLabSheet(
  read: LabSheetResponse,
  now: SampleText,
): { change: Partial<SampleText>; remarks: SheetRemarks } {
  const remarks: Record<SheetPart, Record<string, string>> = {
    separatorTest: {},
    composition: {},
    stages: {},
    depletion: {},
  };
  const unread: Record<SheetPart, Record<string, string>> = {
    separatorTest: {},
    composition: {},
    stages: {},
    depletion: {},
  };
  for (const { line, value, message, place } of read.problems) {
    const at = place ? partAndPlace(place) : null;
    if (!at) continue;
    remarks[at.part][at.place] =
      `Line ${line} of the file${value ? ` has “${value}”` : ""}. ${value === "" ? message : message.replace(/ ?Left empty\.$/, "")}`.trim();
    if (value !== "") unread[at.part][at.place] = value;
  }
  const composition = read.composition && textOfComposition(read.composition);
  const depletion = read.depletion && textOfDepletion(read.depletion);
  const stages = read.stages && textOfStages(read.stages);
  const test = read.separatorTest && textOfTest(read.separatorTest);
  return {
    remarks,
    change: {
      ...(composition && {
        composition: { ...composition, cells: { ...composition.cells, ...unread.composition } },
      }),
      ...(depletion && { depletion: withCells(depletion, unread.depletion) }),
      // The separators of a test that came with it need no list of their own.
      ...(stages &&
        !test && { stages: { ...stages, cells: { ...stages.cells, ...unread.stages } } }),
      ...(test && {
        origin: "measured" as const,
        stages: null,
        separator: { ...test, fields: { ...test.fields, ...unread.separatorTest } },
      }),
      // A fit belongs to the figures it was made to.
      ...((composition || depletion) && { characterisation: untunedOf(now), tuning: null }),
    },
  };
}

const untunedOf = ({ characterisation }: SampleText) =>
  characterisation && { ...characterisation, adjustments: untouched };
