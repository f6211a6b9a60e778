/** What each way of producing is worked out with: figures to start from, and what a person put in their place. */
import {
  recoveryRouteLabels,
  type RecoveryCurve,
  type RecoveryRoute,
} from "@/analytics/recovery/recovery-curve-schema";
import {
  planInputNames,
  type Cycling,
  type PlanInputName,
  type ProducingConcept,
  type RecoveryPlan,
} from "@/analytics/recovery/recovery-plan-schema";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import type { InputText } from "@/components/estimate/input-text";
import { textOfPlan, type PlanFieldName, type PlanText } from "@/components/estimate/plan-text";

/** The reservoir and the curve that assumptions start from. */
export interface ConceptStart {
  curve: RecoveryCurve;
  /** stands in the sources of what is started with; `null` for a sample that was not saved */
  sampleName: string | null;
  /** of the estimate; `null` while it is not known */
  pressurePsia: { p90: number; p50: number } | null;
  depthFt: number | null;
  /** liquid below it does not flow; fractions of pore space */
  criticalSaturation: { low: number; high: number };
}

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

const COMMON = "Common practice, no source";

/** Half-width of the curve factor by how the curve was found, no narrower with less trust. Common practice, no source. */
const curveUncertainty: Record<RecoveryRoute, number> = {
  laboratory: 0.1,
  tunedEquationOfState: 0.15,
  untunedEquationOfState: 0.4,
  correlation: 0.4,
};

/** Abandonment without compression: 100 psi for every 1,000 ft. Common practice, no source. */
const ABANDONMENT_PSI_PER_FT = 0.1;
/** The same without a depth, as a share of the initial pressure. Common practice, no source. */
const ABANDONMENT_SHARE = 0.15;
/** What compression halves it to. Common practice, no source. */
const COMPRESSED_SHARE = 0.5;

const toStep = (value: number, step = 50) => Math.max(step, Math.round(value / step) * step);

/**
 * A PERT around a pressure, 0.7 to 1.5 times it, inside what the curve knows: no lower than its last point, no higher
 * than nine tenths of the dew point.
 */
function abandonmentAround(middle: number, curve: RecoveryCurve): Distribution {
  const lowest = curve.points[curve.points.length - 1].pressurePsia;
  const highest = 0.9 * curve.dewPointPsia;
  const low = Math.max(toStep(0.7 * middle), lowest);
  const mode = Math.min(Math.max(toStep(middle), 1.15 * low), highest);
  const high = Math.min(Math.max(toStep(1.5 * middle), 1.3 * mode), curve.dewPointPsia);
  const tidy = (value: number) => Math.ceil(value);
  if (!(low < mode && mode < high)) return { kind: "constant", value: low };
  return { kind: "pert", low: tidy(low), mode: tidy(mode), high: Math.floor(high) };
}

function abandonmentOf(
  concept: ProducingConcept,
  start: ConceptStart,
): RecoveryPlan["abandonmentPressurePsia"] {
  const { curve, depthFt, pressurePsia } = start;
  const free =
    depthFt !== null
      ? { psia: ABANDONMENT_PSI_PER_FT * depthFt, words: "100 psi per 1,000 ft" }
      : {
          psia: ABANDONMENT_SHARE * (pressurePsia?.p50 ?? curve.dewPointPsia),
          words: "15 % of the initial pressure",
        };
  const isCompressed = concept === "compression";
  return {
    distribution: abandonmentAround(free.psia * (isCompressed ? COMPRESSED_SHARE : 1), curve),
    source: `${COMMON}: ${isCompressed ? `half of ${free.words}` : free.words}`,
  };
}

/** Injection begins as liquid is about to drop out, or where the reservoir begins when that is lower. */
function cyclingPressure({ curve, pressurePsia }: ConceptStart): number {
  const atDewPoint = Math.ceil(curve.dewPointPsia / 50) * 50;
  const initial = pressurePsia && Math.floor(pressurePsia.p90 / 50) * 50;
  return initial !== null && initial < atDewPoint ? initial : atDewPoint;
}

/**
 * A plan that nobody has changed yet. Every figure is common practice without a source, and its source line says so.
 */
export function startingPlan(concept: ProducingConcept, start: ConceptStart): RecoveryPlan {
  const { curve, sampleName } = start;
  const spread = curveUncertainty[curve.route];
  const percent = Math.round(spread * 100);
  const sample = sampleName ? `Sample ${sampleName}, ` : "";
  return {
    concept,
    curve,
    abandonmentPressurePsia: abandonmentOf(concept, start),
    condensateCurveFactor: {
      distribution: { kind: "pert", low: 1 - spread, mode: 1, high: 1 + spread },
      source: `${sample}${recoveryRouteLabels[curve.route].toLowerCase()} curve; ± ${percent} % is common practice, no source`,
    },
    criticalSaturation: start.criticalSaturation,
    waterDrive: { kind: "none" },
    cycling:
      concept === "cycling"
        ? {
            pressurePsia: cyclingPressure(start),
            pressure: "maintained",
            sweepEfficiency: {
              distribution: { kind: "pert", low: 0.4, mode: 0.6, high: 0.8 },
              source: COMMON,
            },
            displacementEfficiency: {
              distribution: { kind: "pert", low: 0.8, mode: 0.95, high: 1 },
              source: COMMON,
            },
            injectedPoreVolumes: 1,
            fuelFraction: 0.08,
          }
        : null,
  };
}

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
