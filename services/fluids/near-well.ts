import type { CompositionSheet } from "@/analytics/composition/composition-schema";
import {
  isTuned,
  untouched,
  type Characterisation,
} from "@/analytics/equation-of-state/characterisation-schema";
import { characterise } from "@/analytics/equation-of-state/characterise";
import { nearWell, type NearWellConditions } from "@/analytics/recovery/near-well";
import type { Warning } from "@/analytics/warnings";
import { characteriseSheet } from "./characterised-sheet";

export interface NearWellQuestion extends NearWellConditions {
  sheet: CompositionSheet;
  characterisation: Characterisation;
}

const UNTUNED: Warning = {
  code: "untuned_equation_of_state",
  severity: "warning",
  input: "characterisation.adjustments",
  message:
    "The equation of state is not tuned, and its liquid can be wrong by half. What a well keeps of its rate is an " +
    "indication until it is tuned to a depletion study.",
};

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
  return {
    productivityRatio,
    points,
    warnings: [...(isTuned(characterisation) ? [] : [UNTUNED]), ...warnings, ...well.warnings],
  };
}
