import type { CompositionSheet, SeparatorStage } from "@/analytics/composition/composition-schema";
import type { DepletionTable } from "@/analytics/depletion/depletion-table-schema";
import {
  untouched,
  type Characterisation,
} from "@/analytics/equation-of-state/characterisation-schema";
import type { RecoveryCurve } from "@/analytics/recovery/recovery-curve-schema";
import type { RecoveryPlan } from "@/analytics/recovery/recovery-plan-schema";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { readLabSheet } from "@/services/lab-sheets/read-lab-sheet";
import { labSheetTemplate } from "@/services/lab-sheets/template";

/** The invented rich gas of the laboratory sheet's template. */
export function templateFluid(): {
  sheet: CompositionSheet;
  table: DepletionTable;
  stages: SeparatorStage[];
} {
  const { composition, depletion, stages } = readLabSheet(labSheetTemplate());
  if (!composition || !depletion || !stages) throw new Error("the template does not read");
  return { sheet: composition, table: depletion, stages };
}

export const untunedCharacterisation: Characterisation = {
  split: { kind: "gamma", fractions: 3, shape: 1 },
  criticals: "keslerLee",
  adjustments: untouched,
};

const given = (distribution: Distribution) => ({ distribution, source: "made for a test" });

export function depletionPlan(curve: RecoveryCurve): RecoveryPlan {
  return {
    concept: "depletion",
    curve,
    abandonmentPressurePsia: given({ kind: "triangular", low: 900, mode: 1100, high: 1500 }),
    condensateCurveFactor: given({ kind: "uniform", low: 0.9, high: 1.1 }),
    criticalSaturation: { low: 0.1, high: 0.2 },
    waterDrive: { kind: "none" },
    cycling: null,
  };
}
