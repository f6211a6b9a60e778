import type { CompositionSheet, SeparatorStage } from "@/analytics/composition/composition-schema";
import type { DepletionTable } from "@/analytics/depletion/depletion-table-schema";
import { tuningKey } from "@/analytics/depletion/tuning-record";
import {
  untouched,
  type Characterisation,
} from "@/analytics/equation-of-state/characterisation-schema";
import { noStudy, type SampleStudy } from "@/analytics/fluid/sample-study-schema";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { correlationCurve } from "@/analytics/recovery/correlation-curve";
import type { RecoveryCurve, RecoveryRoute } from "@/analytics/recovery/recovery-curve-schema";
import type {
  Cycling,
  ProducingConcept,
  RecoveryPlan,
  WaterDrive,
} from "@/analytics/recovery/recovery-plan-schema";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { calculateOnFluid } from "@/services/calculations-of-fluids";
import { demoStudies, type DemoStudy } from "./fluid-studies";
import type { DemoReservoir } from "./reservoirs";

type Triple = [low: number, mode: number, high: number];

/** How a reservoir's recoveries follow from its fluid in the revision that is approved now. */
interface DemoPlan {
  route: RecoveryRoute;
  concept: ProducingConcept;
  /** psia, by concept; a revision may look at another one than the approved */
  abandonmentPsia: Partial<Record<ProducingConcept, Triple>>;
  waterDrive?: WaterDrive;
  cycling?: Cycling;
}

const triangular = ([low, mode, high]: Triple): Distribution => ({
  kind: "triangular",
  low,
  mode,
  high,
});

const demoPlans: Readonly<Record<string, DemoPlan>> = {
  "Pellow North / Marrow sand, main": {
    route: "laboratory",
    concept: "depletion",
    abandonmentPsia: { depletion: [850, 1050, 1400] },
  },
  "Otterhythe / Hythe channel": {
    route: "laboratory",
    concept: "depletion",
    abandonmentPsia: { depletion: [950, 1200, 1600] },
  },
  "Umberlow / Umber shoreface": {
    route: "laboratory",
    concept: "depletion",
    abandonmentPsia: { depletion: [1100, 1400, 1900] },
    waterDrive: { kind: "influx", invadedFraction: 0.12, trappedGasSaturation: 0.28 },
  },
  "Tallowgate / Gate sand": {
    route: "laboratory",
    concept: "compression",
    abandonmentPsia: { depletion: [1100, 1350, 1700], compression: [720, 800, 1000] },
  },
  "Hollin Deep / Upper Corrith sand": {
    route: "tunedEquationOfState",
    concept: "depletion",
    abandonmentPsia: { depletion: [1000, 1300, 1800], compression: [550, 700, 950] },
  },
  "Pellow North / Marrow sand, lower": {
    route: "tunedEquationOfState",
    concept: "depletion",
    abandonmentPsia: { depletion: [850, 1050, 1400] },
  },
  "Larkhaven / Haven sand": {
    route: "tunedEquationOfState",
    concept: "cycling",
    abandonmentPsia: { depletion: [1000, 1300, 1700], cycling: [900, 1150, 1500] },
    cycling: {
      pressurePsia: 6000,
      pressure: "maintained",
      sweepEfficiency: {
        distribution: triangular([0.45, 0.58, 0.7]),
        source: "Layered sector model, five-spot of the LH-2 block",
      },
      displacementEfficiency: {
        distribution: triangular([0.82, 0.9, 0.96]),
        source: "Vaporisation by lean gas, laboratory forward contacts",
      },
      injectedPoreVolumes: 0.8,
      fuelFraction: 0.05,
    },
  },
  "Quernside / Quern sand": {
    route: "tunedEquationOfState",
    concept: "depletion",
    abandonmentPsia: { depletion: [800, 1000, 1350] },
  },
  "Otterhythe / Hythe levee": {
    route: "untunedEquationOfState",
    concept: "depletion",
    abandonmentPsia: { depletion: [950, 1200, 1600] },
  },
  "Ravelsand / Ravel bar": {
    route: "correlation",
    concept: "depletion",
    abandonmentPsia: { depletion: [900, 1150, 1500] },
  },
  "Candlewyke / Wyke sand": {
    route: "correlation",
    concept: "depletion",
    abandonmentPsia: { depletion: [950, 1200, 1600] },
  },
  "Fenwhistle / Whistle sand": {
    route: "correlation",
    concept: "depletion",
    abandonmentPsia: { depletion: [1100, 1400, 1800], compression: [560, 700, 900] },
  },
  "Merrin Spit / Spit sand": {
    route: "untunedEquationOfState",
    concept: "depletion",
    abandonmentPsia: { depletion: [900, 1150, 1500] },
  },
};

/** How far the truth may lie from a curve, as a factor on its condensate: by where the curve comes from. */
const curveFactors: Record<RecoveryRoute, [p90: number, p10: number, source: string]> = {
  laboratory: [0.94, 1.06, "Repeatability of the depletion study"],
  tunedEquationOfState: [0.9, 1.1, "Fit of the tuned equation of state"],
  untunedEquationOfState: [0.75, 1.25, "Untuned equation of state against analogues"],
  correlation: [0.75, 1.25, "Correlation of surface figures against analogues"],
};

const keyOf = ({ field, name }: Pick<DemoReservoir, "field" | "name">) => `${field} / ${name}`;

function characterisationOf({ tuned }: DemoStudy): Characterisation {
  return {
    split: { kind: "gamma", fractions: 3, shape: 1 },
    criticals: "keslerLee",
    adjustments: { ...untouched, ...tuned?.adjustments },
  };
}

function stagesOf({ primarySeparator, secondSeparator }: SeparatorTest): SeparatorStage[] {
  const stage = ({ pressurePsia, temperatureDegF }: SeparatorStage) => ({
    pressurePsia,
    temperatureDegF,
  });
  return [
    stage(primarySeparator),
    ...(secondSeparator ? [stage(secondSeparator)] : []),
    { pressurePsia: 14.7, temperatureDegF: 60 },
  ];
}

/** What the laboratory found beside the separator test, with the equation of state that was accepted for it. */
export function studyOf(demo: DemoReservoir, test: SeparatorTest): SampleStudy {
  const study = demoStudies[keyOf(demo)];
  if (!study) return noStudy;
  const { composition, table, tuned } = study;
  return {
    composition,
    depletion: table,
    stages: stagesOf(test),
    characterisation: characterisationOf(study),
    tuning: tuned &&
      table && {
        measuredDewPointPsia: table.dewPointPsia,
        fittedDewPointPsia: tuned.fittedDewPointPsia,
        averageLiquidErrorPoints: tuned.averageLiquidErrorPoints,
        fittedTo: tuningKey({
          sheet: composition,
          characterisation: characterisationOf(study),
          table,
        }),
      },
    separatorTestOrigin: "measured",
  };
}

export interface DemoRecovery {
  plan: DemoPlan;
  curve: RecoveryCurve;
}

/** The depletion curve of a reservoir whose recoveries follow from its fluid; null for one where they were entered. */
export async function recoveryOf(
  demo: DemoReservoir,
  test: SeparatorTest,
): Promise<DemoRecovery | null> {
  const plan = demoPlans[keyOf(demo)];
  if (!plan) return null;
  if (plan.route === "correlation") {
    const state = { temperatureDegF: temperatureOf(demo), dewPointPsia: null };
    return { plan, curve: correlationCurve(test, state).curve };
  }
  const study = demoStudies[keyOf(demo)];
  if (!study) throw new Error(`the demo has no study of ${keyOf(demo)}`);
  const question = {
    sheet: study.composition,
    stages: stagesOf(test),
    characterisation: characterisationOf(study),
  };
  const curve =
    plan.route === "laboratory" && study.table
      ? await laboratoryCurve({ ...question, table: study.table })
      : await simulatedCurve(question, demo, studyOf(demo, test));
  if (!curve) throw new Error(`the demo's study of ${keyOf(demo)} carries no recovery curve`);
  return { plan, curve };
}

interface Question {
  sheet: CompositionSheet;
  stages: SeparatorStage[];
  characterisation: Characterisation;
}

async function laboratoryCurve(question: Question & { table: DepletionTable }) {
  return (await calculateOnFluid("depletion", question)).curve;
}

const temperatureOf = ({ temperatureDegF: [low, high] }: DemoReservoir) =>
  Math.round((low + high) / 2);

async function simulatedCurve(
  question: Question,
  demo: DemoReservoir,
  { tuning, depletion }: SampleStudy,
) {
  const { curve } = await calculateOnFluid("equationOfState", {
    ...question,
    temperatureDegF: temperatureOf(demo),
    measuredDewPointPsia: demo.fluid.dewPointPsia,
    depletionPressuresPsia: null,
    tuning,
    table: depletion,
  });
  return curve;
}

/** The plan of a revision, with the approved concept unless it looks at another. */
export function planOf(
  { plan, curve }: DemoRecovery,
  concept: ProducingConcept = plan.concept,
): RecoveryPlan {
  const abandonment = plan.abandonmentPsia[concept];
  if (!abandonment) throw new Error(`the demo has no abandonment pressure for ${concept}`);
  const [p90, p10, source] = curveFactors[plan.route];
  return {
    concept,
    curve,
    abandonmentPressurePsia: {
      distribution: triangular(abandonment),
      source:
        concept === "compression"
          ? "Suction pressure of the compressor study"
          : "Delivery pressure and lift at the last rate",
    },
    condensateCurveFactor: {
      distribution: { kind: "normalP90P10", p90, p10, minimum: 0.3, maximum: 1.5 },
      source,
    },
    criticalSaturation: { low: 0.1, high: 0.2 },
    waterDrive: plan.waterDrive ?? { kind: "none" },
    cycling: concept === "cycling" ? (plan.cycling ?? null) : null,
  };
}
