import type { CompositionSheet } from "@/analytics/composition/composition-schema";
import { readComposition } from "@/analytics/composition/read-sheet";
import type { DepletionTable } from "@/analytics/depletion/depletion-table-schema";
import { tune, type Fit, type TuningProblem } from "@/analytics/depletion/tune";
import { tuningKey } from "@/analytics/depletion/tuning-record";
import { DomainError, underPath } from "@/analytics/errors";
import type {
  Characterisation,
  TunableName,
} from "@/analytics/equation-of-state/characterisation-schema";
import { warningsUnder } from "./warnings-under";

export interface TuningQuestion {
  sheet: CompositionSheet;
  characterisation: Characterisation;
  table: DepletionTable;
  tunables: TunableName[];
}

/**
 * Adjustments that bring the equation of state to a laboratory's dew point and depletion: a proposal with its fit before
 * and after. Nothing is applied.
 *
 * @throws {DomainError} with a path into the question
 * @throws {ConvergenceError}
 */
export function proposeTuning({ sheet, ...problem }: TuningQuestion) {
  const { stream, warnings } = underPath("sheet", () => readComposition(sheet));
  const { before, after, changes, ...proposal } = propose({ ...problem, stream });
  const { characterisation } = proposal;
  return {
    characterisation,
    record: {
      measuredDewPointPsia: problem.table.dewPointPsia,
      fittedDewPointPsia: after.dewPointPsia,
      averageLiquidErrorPoints: after.averageLiquidErrorPoints,
      fittedTo: tuningKey({ sheet, characterisation, table: problem.table }),
    },
    before: plainFit(before),
    after: plainFit(after),
    changes: [...changes],
    iterations: proposal.iterations,
    warnings: [...warningsUnder("sheet", warnings), ...proposal.warnings],
  };
}

/** A depletion knows its temperature by itself; here it stands in the table. */
function propose(problem: TuningProblem) {
  try {
    return tune(problem);
  } catch (error) {
    const { input } = error instanceof DomainError ? error.details : {};
    if (!(error instanceof DomainError) || input !== "temperatureDegF") throw error;
    throw new DomainError(error.message, { ...error.details, input: `table.${input}` });
  }
}

const plainFit = ({ rows, ...fit }: Fit) => ({ ...fit, rows: [...rows] });
