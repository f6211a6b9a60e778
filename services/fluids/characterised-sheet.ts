import type { CompositionSheet } from "@/analytics/composition/composition-schema";
import { readComposition } from "@/analytics/composition/read-sheet";
import type { Stream } from "@/analytics/composition/stream";
import { DomainError, underPath } from "@/analytics/errors";
import { characterise, characterisationWarnings } from "@/analytics/equation-of-state/characterise";
import type { Characterisation } from "@/analytics/equation-of-state/characterisation-schema";
import type { Characterised } from "@/analytics/equation-of-state/mixture";
import type { Warning } from "@/analytics/warnings";
import { warningsUnder } from "./warnings-under";

export interface CharacterisedSheet {
  stream: Stream;
  characterised: Characterised;
  warnings: Warning[];
}

/**
 * A composition sheet as the equation of state sees it.
 *
 * @throws {DomainError} with a path that begins with `sheet` or `characterisation`
 */
export function characteriseSheet(
  sheet: CompositionSheet,
  characterisation: Characterisation,
): CharacterisedSheet {
  const { stream, warnings } = underPath("sheet", () => readComposition(sheet));
  return {
    stream,
    characterised: ofStream(stream, characterisation),
    warnings: [
      ...warningsUnder("sheet", warnings),
      ...characterisationWarnings(stream, characterisation),
    ],
  };
}

/** What is wrong with a heavy fraction's properties is wrong with the sheet; analytics names only the property. */
function ofStream(stream: Stream, characterisation: Characterisation): Characterised {
  try {
    return characterise(stream, characterisation);
  } catch (error) {
    const { input } = error instanceof DomainError ? error.details : {};
    if (!(error instanceof DomainError) || input?.startsWith("characterisation")) throw error;
    throw new DomainError(error.message, { ...error.details, input: "sheet" });
  }
}
