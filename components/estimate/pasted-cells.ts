/** A column of a spreadsheet, as it arrives in a text field. */
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import { driverCatalogue } from "./input-catalogue";
import { readField } from "./quantities-of-inputs";

export interface RefusedCell {
  /** number of the cell among those that are not empty, from 1 */
  row: number;
  text: string;
  reason: string;
}

export interface PastedCells {
  /** cells that are not empty */
  count: number;
  /** in the input's own unit, in the order in which they were pasted */
  values: number[];
  refused: RefusedCell[];
}

/**
 * Reads pasted values, one a line or a cell; units and arithmetic are understood as in any field. What is no number, a
 * heading or a "n/a", is refused by name and left out; nothing is taken for 0.
 */
export function readCells(cells: string, name: DriverName): PastedCells {
  const texts = splitCells(cells);
  const { unit } = driverCatalogue[name];
  const values: number[] = [];
  const refused: RefusedCell[] = [];
  texts.forEach((text, index) => {
    const { value, problem } = readField(text, name, true, unit);
    if (value === null) refused.push({ row: index + 1, text, reason: problem ?? "It is empty." });
    else values.push(value);
  });
  return { count: texts.length, values, refused };
}

/** Cells lie on lines or behind tabs and semicolons; a single line of figures is parted at its commas or spaces. */
function splitCells(cells: string): string[] {
  const filled = (parts: string[]) =>
    parts.map((part) => part.trim()).filter((part) => part !== "");
  const parts = filled(cells.split(/[\n\r\t;]+/));
  if (parts.length !== 1) return parts;
  const byComma = filled(parts[0].split(/,\s+/));
  if (byComma.length > 1) return byComma;
  const bySpace = filled(parts[0].split(/\s+/));
  return bySpace.length > 2 ? bySpace : parts;
}

/** "Cell 1, “Porosity”, and cell 14, “n/a”, are no numbers and are left out." Nothing to say gives `null`. */
export function refusedWords(refused: readonly RefusedCell[]): string | null {
  if (refused.length === 0) return null;
  const shown = refused.slice(0, 4).map(({ row, text }) => `cell ${row}, “${shortened(text)}”`);
  const more = refused.length - shown.length;
  const list =
    more > 0
      ? `${shown.join(", ")} and ${more} more`
      : shown.length === 1
        ? shown[0]
        : `${shown.slice(0, -1).join(", ")} and ${shown.at(-1)}`;
  const verb = refused.length === 1 ? "is no number and is" : "are no numbers and are";
  return `${list[0].toUpperCase()}${list.slice(1)} ${verb} left out.`;
}

const shortened = (text: string) => (text.length > 24 ? `${text.slice(0, 23)}…` : text);
