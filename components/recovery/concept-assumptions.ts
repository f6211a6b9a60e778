/** What each way of producing is worked out with: figures to start from, and what a person put in their place. */
import type { RecoveryRoute } from "@/analytics/recovery/recovery-curve-schema";
import {
  planInputNames,
  type Cycling,
  type PlanInputName,
  type ProducingConcept,
  type RecoveryPlan,
} from "@/analytics/recovery/recovery-plan-schema";
import { startingPlan, type ConceptStart } from "@/analytics/recovery/starting-plan";
import type { InputText } from "@/components/estimate/input-text";
import { textOfPlan, type PlanFieldName, type PlanText } from "@/components/estimate/plan-text";

/** What was typed over the figures to start from. Only the abandonment pressure is each concept's own. */
export interface ConceptEdits {
  abandonment: Partial<Record<ProducingConcept, InputText>>;
  inputs: Partial<Record<PlanInputName, InputText>>;
  /** a curve factor belongs to the kind of curve that it was typed for */
  factorRoute?: RecoveryRoute;
  fields: Partial<Record<PlanFieldName, string>>;
  waterDrive?: RecoveryPlan["waterDrive"]["kind"];
  pressure?: Cycling["pressure"];
}

export const noEdits: ConceptEdits = { abandonment: {}, inputs: {}, fields: {} };

export const isEdited = ({ abandonment, inputs, fields, waterDrive, pressure }: ConceptEdits) =>
  [abandonment, inputs, fields].some((part) => Object.keys(part).length > 0) ||
  waterDrive !== undefined ||
  pressure !== undefined;

/** What stands in the fields of one concept: the figures to start from with what was typed over them. */
export function conceptText(
  concept: ProducingConcept,
  start: ConceptStart,
  edits: ConceptEdits,
): PlanText {
  const text = textOfPlan(startingPlan(concept, start));
  const { condensateCurveFactor, ...others } = edits.inputs;
  return {
    ...text,
    inputs: {
      ...text.inputs,
      ...others,
      ...(condensateCurveFactor &&
        edits.factorRoute === start.curve.route && { condensateCurveFactor }),
      abandonmentPressurePsia: edits.abandonment[concept] ?? text.inputs.abandonmentPressurePsia,
    },
    fields: { ...text.fields, ...startingInflux, ...edits.fields },
    waterDrive: edits.waterDrive ?? text.waterDrive,
    pressure: edits.pressure ?? text.pressure,
  };
}

/** What water takes and traps when somebody says that it comes in. Common practice, no source. */
const startingInflux = { invadedFraction: "0.3", trappedGasSaturation: "0.3" };

/** The edits with one more: whatever of `next` differs from `now`, which is one concept's text before it. */
export function withEdit(edits: ConceptEdits, now: PlanText, next: PlanText): ConceptEdits {
  const inputs = { ...edits.inputs };
  for (const name of planInputNames) {
    if (name !== "abandonmentPressurePsia" && next.inputs[name] !== now.inputs[name]) {
      inputs[name] = next.inputs[name];
    }
  }
  const fields = { ...edits.fields };
  for (const [name, value] of Object.entries(next.fields) as [PlanFieldName, string][]) {
    if (value !== now.fields[name]) fields[name] = value;
  }
  const abandonment = next.inputs.abandonmentPressurePsia;
  return {
    factorRoute: inputs.condensateCurveFactor && next.curve.route,
    abandonment:
      abandonment === now.inputs.abandonmentPressurePsia
        ? edits.abandonment
        : { ...edits.abandonment, [next.concept]: abandonment },
    inputs,
    fields,
    waterDrive: next.waterDrive === now.waterDrive ? edits.waterDrive : next.waterDrive,
    pressure: next.pressure === now.pressure ? edits.pressure : next.pressure,
  };
}

/**
 * A plan of the draft as edits, so that the comparison begins with what the draft has. Its band of critical saturation is
 * not among them: the comparison takes the one that is set at the curve.
 */
export function editsOfPlan(plan: PlanText): ConceptEdits {
  const used = plan.concept === "cycling" ? planInputNames : (["condensateCurveFactor"] as const);
  return {
    factorRoute: plan.curve.route,
    abandonment: { [plan.concept]: plan.inputs.abandonmentPressurePsia },
    inputs: Object.fromEntries(
      used
        .filter((name) => name !== "abandonmentPressurePsia")
        .map((name) => [name, plan.inputs[name]]),
    ),
    fields: Object.fromEntries(
      Object.entries(plan.fields).filter(
        ([name, value]) => value !== "" && name !== "criticalLow" && name !== "criticalHigh",
      ),
    ),
    waterDrive: plan.waterDrive,
    ...(plan.concept === "cycling" && { pressure: plan.pressure }),
  };
}
