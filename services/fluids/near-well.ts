import type { CompositionSheet } from "@/analytics/composition/composition-schema";
import type { Characterisation } from "@/analytics/equation-of-state/characterisation-schema";
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
  const { characterised, warnings } = characteriseSheet(sheet, characterisation);
  const { productivityRatio, points, ...well } = nearWell(characterised, conditions);
  return { productivityRatio, points, warnings: [...warnings, ...well.warnings] };
}
