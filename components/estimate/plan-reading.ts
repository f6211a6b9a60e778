import { DomainError } from "@/analytics/errors";
import { compilePlan, planPaths } from "@/analytics/recovery/compile-plan";
import { planRanges } from "@/analytics/recovery/plan-ranges";
import {
  planInputNames,
  type PlanInputName,
  type RecoveryPlan,
} from "@/analytics/recovery/recovery-plan-schema";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { planInputsOf } from "./input-catalogue";
import { placeProblem, readDistribution, type InputReading } from "./input-reading";
import { saidOf } from "./input-text";
import {
  hasInflux,
  optionalPlanFields,
  planFieldNames,
  shownFields,
  type PlanFieldName,
  type PlanText,
} from "./plan-text";
import { readPlain, readQuantity, type FieldReading } from "./quantities-of-inputs";

/** What the fields of a recovery plan read as. */
export interface PlanReading {
  /** also of inputs that the concept does not use, as far as they can be read */
  inputs: Record<PlanInputName, InputReading>;
  /** inputs that the concept uses */
  used: readonly PlanInputName[];
  fields: Record<PlanFieldName, FieldReading>;
  /** inputs of the concept with a figure to fill in */
  incomplete: PlanInputName[];
  /** inputs of the concept with an impossible figure */
  impossible: PlanInputName[];
  /** single figures that count and are empty or cannot be */
  open: PlanFieldName[];
  /** what is impossible about the whole */
  problem: string | null;
  /** ready for the engine; `null` while anything is missing or impossible */
  plan: RecoveryPlan | null;
}

/** Where a single figure stands in a plan. */
const fieldPaths: Record<PlanFieldName, string> = {
  criticalLow: "criticalSaturation.low",
  criticalHigh: "criticalSaturation.high",
  invadedFraction: "waterDrive.invadedFraction",
  trappedGasSaturation: "waterDrive.trappedGasSaturation",
  cyclingPressurePsia: "cycling.pressurePsia",
  injectedPoreVolumes: "cycling.injectedPoreVolumes",
  fuelFraction: "cycling.fuelFraction",
  revaporisation: "cycling.revaporisation",
};

/** Ends of a single figure, in its own unit; the engine's schema has the same. */
const possible: Record<PlanFieldName, readonly [number, number]> = {
  criticalLow: [0, 1],
  criticalHigh: [0, 1],
  invadedFraction: [0, 0.95],
  trappedGasSaturation: [0, 0.6],
  cyclingPressurePsia: [0, Infinity],
  injectedPoreVolumes: [0, 5],
  fuelFraction: [0, 0.5],
  revaporisation: [0, 1],
};

function readPlanField(name: PlanFieldName, text: string): FieldReading {
  const reading =
    name === "cyclingPressurePsia"
      ? readQuantity(text, "pressure", "psia")
      : name === "injectedPoreVolumes"
        ? readPlain(text)
        : readQuantity(text, "fraction", "");
  const [low, high] = possible[name];
  const isZeroOut = name === "cyclingPressurePsia" || name === "injectedPoreVolumes";
  const { value, problem } = reading;
  if (value === null || problem !== null) return reading;
  if (value > high || value < low || (isZeroOut && value === 0)) {
    const range = high === Infinity ? "more than 0" : `from ${low} to ${high}`;
    return { ...reading, problem: `It has to be ${range}.` };
  }
  return reading;
}

/** Reads a plan, and asks the engine whether it can be. */
export function readPlan(text: PlanText): PlanReading {
  const ranges = planRanges(text);
  const used = planInputsOf(text.concept);
  const inputs = mapPlanInputs((name) => readDistribution(name, text.inputs[name], ranges[name]));
  const fields = Object.fromEntries(
    // Work that this browser kept from before a figure was added has no text for it.
    planFieldNames.map((name) => [name, readPlanField(name, text.fields[name] ?? "")]),
  ) as PlanReading["fields"];
  const incomplete = used.filter((name) => !inputs[name].isComplete);
  const impossible = used.filter(
    (name) => inputs[name].isComplete && inputs[name].distribution === null,
  );
  const isMissing = (name: PlanFieldName) =>
    fields[name].value === null && !optionalPlanFields.includes(name);
  const open = shownFields(text).filter((name) => isMissing(name) || fields[name].problem !== null);
  const partial = { inputs, used, fields, incomplete, impossible, open, problem: null, plan: null };
  if (incomplete.length > 0 || impossible.length > 0 || open.length > 0) return partial;
  const plan = planOf(text, partial);
  try {
    compilePlan(plan);
    return { ...partial, plan };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return { ...partial, ...placed(text, partial, error) };
  }
}

export function mapPlanInputs<Value>(
  make: (name: PlanInputName) => Value,
): Record<PlanInputName, Value> {
  return Object.fromEntries(planInputNames.map((name) => [name, make(name)])) as Record<
    PlanInputName,
    Value
  >;
}

function planOf(text: PlanText, { inputs, fields }: Pick<PlanReading, "inputs" | "fields">) {
  const input = (name: PlanInputName) => ({
    distribution: inputs[name].distribution as Distribution,
    ...saidOf(text.inputs[name]),
  });
  const value = (name: PlanFieldName) => fields[name].value as number;
  const plan: RecoveryPlan = {
    concept: text.concept,
    curve: text.curve,
    abandonmentPressurePsia: input("abandonmentPressurePsia"),
    condensateCurveFactor: input("condensateCurveFactor"),
    criticalSaturation: { low: value("criticalLow"), high: value("criticalHigh") },
    waterDrive: hasInflux(text)
      ? {
          kind: "influx",
          invadedFraction: value("invadedFraction"),
          trappedGasSaturation: value("trappedGasSaturation"),
        }
      : { kind: "none" },
    cycling:
      text.concept === "cycling"
        ? {
            pressurePsia: value("cyclingPressurePsia"),
            pressure: text.pressure,
            sweepEfficiency: input("sweepEfficiency"),
            displacementEfficiency: input("displacementEfficiency"),
            injectedPoreVolumes: value("injectedPoreVolumes"),
            fuelFraction: value("fuelFraction"),
            ...(fields.revaporisation.value === null
              ? {}
              : { revaporisation: fields.revaporisation.value }),
          }
        : null,
  };
  return plan;
}

/** Puts the engine's refusal at the figure or the input that it names, or above all of them. */
function placed(
  text: PlanText,
  reading: Pick<PlanReading, "inputs" | "fields" | "used">,
  error: DomainError,
): Partial<PlanReading> {
  const path = error.details.input ?? "";
  const field = shownFields(text).find((name) => path === fieldPaths[name]);
  if (field) {
    const problem = { ...reading.fields[field], problem: error.message };
    return { fields: { ...reading.fields, [field]: problem }, open: [field] };
  }
  const name = reading.used.find((candidate) => path.startsWith(planPaths[candidate]));
  if (!name) return { problem: error.message };
  const { inputs } = reading;
  const at = placeProblem(inputs[name].fields, error, text.inputs[name]);
  return {
    inputs: { ...inputs, [name]: { ...inputs[name], ...at, distribution: null } },
    impossible: [name],
  };
}
