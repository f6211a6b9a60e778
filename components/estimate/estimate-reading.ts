import { DomainError } from "@/analytics/errors";
import { checkInputs } from "@/analytics/volumetrics/check-inputs";
import {
  inputNames,
  type EstimateInputs,
  type InputName,
} from "@/analytics/volumetrics/inputs-schema";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import type { Warning } from "@/analytics/warnings";
import { isWorkedOut, mapInputs, NOT_TYPED, type EstimateText } from "./estimate-text";
import { inputOfPath } from "./input-catalogue";
import { placeProblem, readInput, type InputReading } from "./input-reading";
import { saidOf } from "./input-text";
import { readPlan, type PlanReading } from "./plan-reading";

/** What all fields read as. */
export interface EstimateReading {
  inputs: Record<InputName, InputReading>;
  /** of the plan in use; `null` where recoveries are typed */
  plan: PlanReading | null;
  /** ready for the engine; `null` while anything is missing or impossible */
  estimate: EstimateInputs | null;
  /** names of inputs with a field to fill in; recoveries that a plan works out are not among them */
  incomplete: DriverName[];
  /** names of inputs with an impossible figure */
  impossible: DriverName[];
  /** what is impossible about the whole, such as correlations that contradict each other */
  problem: string | null;
  warnings: Warning[];
}

/** Reads everything, and asks the engine what it thinks of it. */
export function readEstimate(text: EstimateText): EstimateReading {
  const inputs = mapInputs((name) => readInput(name, text.inputs[name]));
  const plan = text.usesPlan && text.plan ? readPlan(text.plan) : null;
  const counted = inputNames.filter((name) => plan === null || !isWorkedOut(name));
  const incomplete: DriverName[] = counted.filter((name) => !inputs[name].isComplete);
  const impossible: DriverName[] = counted.filter(
    (name) => inputs[name].isComplete && inputs[name].distribution === null,
  );
  if (plan) {
    incomplete.push(...plan.incomplete);
    impossible.push(...plan.impossible);
  }
  const partial = {
    inputs,
    plan,
    incomplete,
    impossible,
    estimate: null,
    problem: plan?.problem ?? null,
    warnings: [],
  };
  const isOpen = incomplete.length > 0 || impossible.length > 0 || (plan && !plan.plan);
  if (isOpen || text.fluid === null) return partial;

  const estimate: EstimateInputs = {
    schemaVersion: 1,
    uncertain: mapInputs((name) => ({
      distribution: inputs[name].distribution ?? NOT_TYPED,
      ...saidOf(text.inputs[name]),
    })),
    correlations: text.correlations.map((pair) => ({ ...pair })),
    fluid: text.fluid,
    depthFt: text.depthFt,
    recoveryPlan: plan?.plan ?? null,
  };
  try {
    return { ...partial, estimate, warnings: checkInputs(estimate) };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    const name = inputNames.find((candidate) => candidate === inputOfPath(error.details.input));
    if (!name) return { ...partial, problem: error.message };
    const placed = placeProblem(inputs[name].fields, error, text.inputs[name]);
    return {
      ...partial,
      impossible: [name],
      inputs: { ...inputs, [name]: { ...inputs[name], ...placed, distribution: null } },
    };
  }
}
