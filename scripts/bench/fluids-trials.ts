/** The trials of an estimate with a recovery plan, against the same estimate without. Imported by the fluids bench. */
import type { RecoveryPlan } from "@/analytics/recovery/recovery-plan-schema";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import { simulate } from "@/analytics/volumetrics/simulate";
import { createWorkspace } from "@/analytics/volumetrics/workspace";
import { makeReservoirs } from "./workload";

const TRIALS = 10_000;
const REPEATS = 15;

const uncertain = (distribution: Distribution) => ({ distribution, source: "" });

/** A made-up rich gas, smooth in shape: the work depends on the number of points, not on their values. */
function makePlan(concept: RecoveryPlan["concept"], pressurePsia: number): RecoveryPlan {
  const dewPointPsia = 0.7 * pressurePsia;
  const points = Array.from({ length: 11 }, (_, i) => {
    const fallen = i / 12;
    const left = 1 - fallen;
    const condensateProduced = 0.35 * fallen * left + 0.3 * fallen * fallen;
    return {
      pressurePsia: dewPointPsia * left,
      wellstreamProduced: 0.95 * fallen,
      gasProduced: 0.98 * fallen,
      condensateProduced,
      condensateInGas: (1 - condensateProduced) * left ** 3,
      liquidSaturation: 0.25 * (1 - left ** 4) * (0.6 + 0.4 * left),
      gasZ: 0.85,
      twoPhaseZ: 0.8,
      producingYieldStbPerMmscf: 90 * (0.2 + 0.8 * left ** 2),
    };
  });
  return {
    concept,
    curve: { route: "laboratory", temperatureDegF: 230, dewPointPsia, points },
    abandonmentPressurePsia: uncertain({
      kind: "uniform",
      low: 0.17 * dewPointPsia,
      high: 0.35 * dewPointPsia,
    }),
    condensateCurveFactor: uncertain({ kind: "normalP90P10", p90: 0.85, p10: 1.15 }),
    criticalSaturation: { low: 0.1, high: 0.3 },
    waterDrive: { kind: "none" },
    cycling:
      concept === "cycling"
        ? {
            pressurePsia: 0.9 * pressurePsia,
            pressure: "declining",
            sweepEfficiency: uncertain({ kind: "pert", low: 0.3, mode: 0.5, high: 0.7 }),
            displacementEfficiency: uncertain({ kind: "uniform", low: 0.8, high: 0.95 }),
            injectedPoreVolumes: 1,
            fuelFraction: 0.05,
          }
        : null,
  };
}

/** Best of several runs: the machine's other work only ever adds time. */
function bestMilliseconds(run: () => void): number {
  let best = Infinity;
  for (let i = 0; i < REPEATS; i += 1) {
    const start = performance.now();
    run();
    best = Math.min(best, performance.now() - start);
  }
  return best;
}

export interface TrialTimes {
  trials: number;
  withoutPlan: number;
  depletion: number;
  cycling: number;
}

/** Milliseconds of one estimate of 10,000 trials, with its percentiles, drivers and swings. */
export function measureTrials(): TrialTimes {
  const workspace = createWorkspace(TRIALS);
  const [{ inputs }] = makeReservoirs(1);
  const { pressurePsia } = inputs.uncertain;
  const pressure =
    pressurePsia.distribution.kind === "normal" ? pressurePsia.distribution.mean : 6500;
  const time = (recoveryPlan: EstimateInputs["recoveryPlan"]) =>
    bestMilliseconds(() => {
      simulate({ ...inputs, recoveryPlan }, { trials: TRIALS, seed: 1, workspace });
    });
  return {
    trials: TRIALS,
    withoutPlan: time(null),
    depletion: time(makePlan("depletion", pressure)),
    cycling: time(makePlan("cycling", pressure)),
  };
}
