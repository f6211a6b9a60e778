import type { RecoveryCurve } from "@/analytics/recovery/recovery-curve-schema";
import type {
  Cycling,
  PlanInputName,
  ProducingConcept,
  RecoveryPlan,
} from "@/analytics/recovery/recovery-plan-schema";
import { startingBounds, textOfInput, type InputText } from "./input-text";
import { typedFigure } from "./quantities-of-inputs";

/** Single figures of a plan, in the order in which screens list them. */
export const planFieldNames = [
  "criticalLow",
  "criticalHigh",
  "invadedFraction",
  "trappedGasSaturation",
  "cyclingPressurePsia",
  "injectedPoreVolumes",
  "fuelFraction",
  "revaporisation",
] as const;
export type PlanFieldName = (typeof planFieldNames)[number];

/** May stay empty: the plan then leaves it out, and the engine takes the safe side. */
export const optionalPlanFields: readonly PlanFieldName[] = ["revaporisation"];

/** What stands in the fields of a recovery plan. What its concept does not use is kept, so that trying one loses nothing. */
export interface PlanText {
  concept: ProducingConcept;
  curve: RecoveryCurve;
  inputs: Record<PlanInputName, InputText>;
  fields: Record<PlanFieldName, string>;
  waterDrive: RecoveryPlan["waterDrive"]["kind"];
  pressure: Cycling["pressure"];
}

const emptyInput = (name: PlanInputName): InputText => ({
  kind: "pert",
  fields: {},
  ...startingBounds(name, "pert"),
  source: "",
});

/** Text of a stored plan. Reading it back gives the same plan. */
export function textOfPlan(plan: RecoveryPlan): PlanText {
  const { waterDrive, cycling, criticalSaturation } = plan;
  const typed = (
    name: PlanInputName,
    input: RecoveryPlan["abandonmentPressurePsia"] | undefined,
  ) => (input ? textOfInput(input) : emptyInput(name));
  const written = (value: number | undefined) => (value === undefined ? "" : typedFigure(value));
  const influx = waterDrive.kind === "influx" ? waterDrive : undefined;
  return {
    concept: plan.concept,
    curve: plan.curve,
    inputs: {
      abandonmentPressurePsia: typed("abandonmentPressurePsia", plan.abandonmentPressurePsia),
      condensateCurveFactor: typed("condensateCurveFactor", plan.condensateCurveFactor),
      sweepEfficiency: typed("sweepEfficiency", cycling?.sweepEfficiency),
      displacementEfficiency: typed("displacementEfficiency", cycling?.displacementEfficiency),
    },
    fields: {
      criticalLow: written(criticalSaturation.low),
      criticalHigh: written(criticalSaturation.high),
      invadedFraction: written(influx?.invadedFraction),
      trappedGasSaturation: written(influx?.trappedGasSaturation),
      cyclingPressurePsia: written(cycling?.pressurePsia),
      injectedPoreVolumes: written(cycling?.injectedPoreVolumes),
      fuelFraction: written(cycling?.fuelFraction),
      revaporisation: written(cycling?.revaporisation),
    },
    waterDrive: waterDrive.kind,
    pressure: cycling?.pressure ?? "maintained",
  };
}

/** Whether water counts: with cycling it competes with the injected gas, and the engine takes the volume as closed. */
export const hasInflux = ({ concept, waterDrive }: Pick<PlanText, "concept" | "waterDrive">) =>
  waterDrive === "influx" && concept !== "cycling";

/** Single figures that a plan shows: those of its water drive and of cycling only where they count. */
export function shownFields(text: Pick<PlanText, "concept" | "waterDrive">): PlanFieldName[] {
  const { concept } = text;
  return [
    "criticalLow",
    "criticalHigh",
    ...(hasInflux(text) ? (["invadedFraction", "trappedGasSaturation"] as const) : []),
    ...(concept === "cycling"
      ? (["cyclingPressurePsia", "injectedPoreVolumes", "fuelFraction", "revaporisation"] as const)
      : []),
  ];
}
