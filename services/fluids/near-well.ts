import type { CompositionSheet } from "@/analytics/composition/composition-schema";
import type { DepletionTable } from "@/analytics/depletion/depletion-table-schema";
import { tuningStanding, type TuningRecord } from "@/analytics/depletion/tuning-record";
import {
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
  /** what the adjustments come from, with the table that they were fitted to; null leaves the fluid untuned */
  tuning: TuningRecord | null;
  table: DepletionTable | null;
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
export function describeNearWell({
  sheet,
  characterisation,
  tuning,
  table,
  ...conditions
}: NearWellQuestion) {
  const { isTuned } = tuningStanding({ sheet, characterisation, table }, tuning);
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
    warnings: [...(isTuned ? [] : [UNTUNED]), ...warnings, ...well.warnings],
  };
}
