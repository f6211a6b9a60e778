import "server-only";
import {
  compositionRequestSchema,
  depletionRequestSchema,
  equationOfStateRequestSchema,
  labSheetRequestSchema,
  tuningRequestSchema,
} from "@/app/api/v1/calculations/fluid-schema";
import {
  nearWellRequestSchema,
  recoveryRequestSchema,
} from "@/app/api/v1/calculations/recovery-schema";
import { materialBalanceRequestSchema } from "@/app/api/v1/calculations/material-balance-schema";
import { changeRequestSchema } from "@/app/api/v1/calculations/change/schema";
import { correlationsRequestSchema } from "@/app/api/v1/calculations/correlations/schema";
import { sensitivityRequestSchema } from "@/app/api/v1/calculations/sensitivity/schema";
import { distributionRequestSchema } from "@/app/api/v1/calculations/distribution/schema";
import {
  inPlaceRequestSchema,
  simulationRequestSchema,
  wellstreamRequestSchema,
  zFactorRequestSchema,
} from "@/app/api/v1/calculations/schema";
import {
  calculateCorrelations,
  calculateDistribution,
  calculateInPlace,
  calculateSimulation,
  calculateWellstream,
  calculateZFactor,
} from "@/services/calculations";
import {
  calculateComposition,
  calculateMaterialBalance,
  calculateOnFluid,
} from "@/services/calculations-of-fluids";
import { calculateChange, calculateSensitivity } from "@/services/sensitivity";
import {
  changeExample,
  correlationsExample,
  distributionExample,
  inPlaceExample,
  sensitivityExample,
  simulationExample,
  wellstreamExample,
  zFactorExample,
} from "../_components/examples";
import {
  compositionExample,
  depletionExample,
  equationOfStateExample,
  labSheetExample,
  materialBalanceExample,
  nearWellExample,
  recoveryExample,
  tuningExample,
} from "../_components/fluid-examples";

const LIST_ENTRIES_SHOWN = 3;

/** Long lists cut short, so that an answer fits on a page. */
function abridged(value: unknown): unknown {
  if (Array.isArray(value)) {
    const shown = value.slice(0, LIST_ENTRIES_SHOWN).map(abridged);
    const left = value.length - shown.length;
    return left > 0 ? [...shown, `… and ${left} more`] : shown;
  }
  if (typeof value !== "object" || value === null) return value;
  return Object.fromEntries(Object.entries(value).map(([key, part]) => [key, abridged(part)]));
}

async function calculateFluids(): Promise<Record<string, unknown>> {
  const [labSheet, equationOfState, depletion, tuning, recovery, nearWell] = await Promise.all([
    calculateOnFluid("labSheet", labSheetRequestSchema.parse(labSheetExample)),
    calculateOnFluid("equationOfState", equationOfStateRequestSchema.parse(equationOfStateExample)),
    calculateOnFluid("depletion", depletionRequestSchema.parse(depletionExample)),
    calculateOnFluid("tuning", tuningRequestSchema.parse(tuningExample)),
    calculateOnFluid("recovery", recoveryRequestSchema.parse(recoveryExample)),
    calculateOnFluid("nearWell", nearWellRequestSchema.parse(nearWellExample)),
  ]);
  return {
    "lab-sheet": labSheet,
    composition: calculateComposition(compositionRequestSchema.parse(compositionExample)),
    "equation-of-state": equationOfState,
    depletion,
    tuning,
    recovery,
    "material-balance": calculateMaterialBalance(
      materialBalanceRequestSchema.parse(materialBalanceExample),
    ),
    "near-well": nearWell,
  };
}

async function calculate(): Promise<Record<string, unknown>> {
  const simulation = await calculateSimulation(simulationRequestSchema.parse(simulationExample));
  const { engineVersion, seed, trials, results, drivers } = simulation;
  return {
    wellstream: calculateWellstream(wellstreamRequestSchema.parse(wellstreamExample)),
    "z-factor": calculateZFactor(zFactorRequestSchema.parse(zFactorExample)),
    "in-place": calculateInPlace(inPlaceRequestSchema.parse(inPlaceExample)),
    distribution: calculateDistribution(distributionRequestSchema.parse(distributionExample)),
    correlations: calculateCorrelations(correlationsRequestSchema.parse(correlationsExample)),
    simulation: {
      engineVersion,
      seed,
      trials,
      results: { condensateRecoverableStb: results.condensateRecoverableStb },
      drivers: { condensateRecoverableStb: drivers.condensateRecoverableStb.slice(0, 1) },
    },
    sensitivity: await calculateSensitivity(sensitivityRequestSchema.parse(sensitivityExample)),
    change: await calculateChange(changeRequestSchema.parse(changeExample)),
    ...(await calculateFluids()),
  };
}

let answers: Promise<Record<string, unknown>> | undefined;

/** What the examples of the guide come to, by calculation: computed by this very engine, once a process. */
export async function exampleAnswers(): Promise<Record<string, unknown>> {
  answers ??= calculate().catch((error: unknown) => {
    answers = undefined;
    throw error;
  });
  const whole = await answers;
  return Object.fromEntries(Object.entries(whole).map(([name, value]) => [name, abridged(value)]));
}
