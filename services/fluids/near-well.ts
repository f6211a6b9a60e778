import type { CompositionSheet } from "@/analytics/composition/composition-schema";
import {
  untouched,
  type Characterisation,
} from "@/analytics/equation-of-state/characterisation-schema";
import { characterise } from "@/analytics/equation-of-state/characterise";
import { nearWell, type NearWellConditions } from "@/analytics/recovery/near-well";
import { characteriseSheet } from "./characterised-sheet";

export interface NearWellQuestion extends NearWellConditions {
  sheet: CompositionSheet;
  characterisation: Characterisation;
}

/**
 * How much of its rate a well loses to the liquid around it.
 *
 * @throws {DomainError} with a path into the question
 * @throws {ConvergenceError}
 */
export function describeNearWell({ sheet, characterisation, ...conditions }: NearWellQuestion) {
  const { stream, characterised, warnings } = characteriseSheet(sheet, characterisation);
  const before = characterise(stream, { ...characterisation, adjustments: untouched });
  const { productivityRatio, points, ...well } = nearWell(
    characterised,
    conditions,
    before.mixture,
  );
  return { productivityRatio, points, warnings: [...warnings, ...well.warnings] };
}
