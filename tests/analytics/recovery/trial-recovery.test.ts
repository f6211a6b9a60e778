import { describe, expect, it } from "vitest";
import { compilePlan } from "@/analytics/recovery/compile-plan";
import {
  createRecoveryColumns,
  fillRecoveries,
  type RecoveryTrials,
} from "@/analytics/recovery/trial-recovery";
import { buildCycling, buildPlan, psia } from "./published-curve";

const one = (value: number) => Float64Array.of(value);

/** One trial of the published fluid at its dew point. */
function trial(injectedGas: RecoveryTrials["injectedGas"]): RecoveryTrials {
  return {
    pressurePsia: one(psia(3428)),
    temperatureDegF: one(200),
    zFactor: one(0.803),
    reducedPressure: one(psia(3428) / 650),
    reducedTemperature: one(1.5),
    dryGasFraction: one(0.88),
    dryGasInPlaceScf: one(1e9),
    condensateInPlaceStb: one(1e5),
    plan: {
      abandonmentPressurePsia: one(psia(700)),
      condensateCurveFactor: one(1),
      sweepEfficiency: one(0.6),
      displacementEfficiency: one(0.9),
    },
    injectedGas,
  };
}

describe("fillRecoveries", () => {
  const plan = compilePlan(buildPlan({ concept: "cycling", cycling: buildCycling() }));

  it("refuses an injected gas that has no z for what it is, not for burning too much", () => {
    const columns = createRecoveryColumns(1);
    const dense = { temperatureDegR: 1e6, pressurePsia: 670 };
    expect(fillRecoveries(plan, trial(dense), 1, columns).refused).toEqual({ noState: 1 });
    expect(columns.gasRecovery[0]).toBeNaN();
    const light = { temperatureDegR: 390, pressurePsia: 670 };
    expect(fillRecoveries(plan, trial(light), 1, columns).refused).toEqual({});
    expect(columns.gasRecovery[0]).toBeGreaterThan(0.6);
  });
});
