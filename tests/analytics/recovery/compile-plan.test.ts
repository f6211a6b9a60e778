import { describe, expect, it } from "vitest";
import { recoveryCurveOfTable } from "@/analytics/depletion/curve-from-table";
import { recoveryCurveOfSimulation } from "@/analytics/depletion/recovery-curve";
import { depleteCell } from "@/analytics/depletion/simulate-depletion";
import { characterise } from "@/analytics/equation-of-state/characterise";
import {
  untouched,
  type Characterisation,
} from "@/analytics/equation-of-state/characterisation-schema";
import { DomainError } from "@/analytics/errors";
import { compilePlan } from "@/analytics/recovery/compile-plan";
import type { RecoveryCurve } from "@/analytics/recovery/recovery-curve-schema";
import type { RecoveryPlan } from "@/analytics/recovery/recovery-plan-schema";
import { simulate } from "@/analytics/volumetrics/simulate";
import { fittedMixture } from "../depletion/fitted-mixture";
import { studyStages, studyStream, studyTable } from "../depletion/third-comparative-study";
import { buildInputs } from "../volumetrics/estimate-inputs";
import { buildCycling, buildPlan, constant, psia, publishedCurve } from "./published-curve";

const characterisation: Characterisation = {
  split: { kind: "single" },
  criticals: "keslerLee",
  adjustments: untouched,
};

function curveOfTable(): RecoveryCurve {
  const { curve } = recoveryCurveOfTable({
    table: studyTable(),
    stream: studyStream,
    stages: studyStages,
    characterisation,
    route: "laboratory",
  });
  if (!curve) throw new Error("no curve");
  return curve;
}

/** Recoveries of a reservoir just at the curve's dew point, depleted to a pressure. */
function recovered(curve: RecoveryCurve, abandonment: number) {
  const inputs = buildInputs(
    {
      pressurePsia: { kind: "constant", value: curve.dewPointPsia },
      temperatureDegF: { kind: "constant", value: 200 },
    },
    {
      recoveryPlan: buildPlan({ curve, abandonmentPressurePsia: constant(abandonment) }),
      correlations: [],
    },
  );
  const { gasRecovery, condensateRecovery } = simulate(inputs, { trials: 100, seed: 1 }).summary
    .inputs;
  return { gas: gasRecovery.p50, condensate: condensateRecovery.p50 };
}

function refusal(plan: RecoveryPlan): DomainError {
  try {
    compilePlan(plan);
  } catch (error) {
    if (error instanceof DomainError) return error;
  }
  throw new Error("The plan was accepted.");
}

describe("compilePlan", () => {
  it("takes the curves of every route, which recover alike where they are of the same fluid", () => {
    const laboratory = recovered(curveOfTable(), psia(700));
    // The published table, worked out with the separators of its day: 0.2233 of the condensate. The laboratory's
    // compositions through an equation of state: 0.2295 (see the tests of that curve).
    const { gas, condensate } = recovered(publishedCurve, psia(700));
    expect(condensate).toBeCloseTo(0.2233, 4);
    expect(laboratory.condensate).toBeCloseTo(0.2295, 2);
    expect(Math.abs(laboratory.gas - gas)).toBeLessThan(0.01);
    // Fitted to drop-out and moles, not to what the separators made of them: five points.
    const fitted = recoveryCurveOfSimulation(
      fittedMixture,
      depleteCell(fittedMixture, 200, null),
      studyStages,
      "tunedEquationOfState",
    );
    expect(Math.abs(recovered(fitted, psia(700)).condensate - condensate)).toBeLessThan(0.06);
    // Untuned it is another fluid's: never shown as fact.
    const untuned = characterise(studyStream, characterisation);
    const guessed = recoveryCurveOfSimulation(
      untuned,
      depleteCell(untuned, 200, null),
      studyStages,
      "untunedEquationOfState",
    );
    expect(() => recovered(guessed, psia(700))).not.toThrow();
  });

  it("knows the inputs that its concept uses, and ignores cycling kept for later", () => {
    expect(compilePlan(buildPlan()).inputNames).toEqual([
      "abandonmentPressurePsia",
      "condensateCurveFactor",
    ]);
    const kept = buildPlan({ cycling: buildCycling({ sweepEfficiency: constant(7) }) });
    expect(compilePlan(kept).cycling).toBeNull();
    expect(
      compilePlan(buildPlan({ concept: "cycling", cycling: buildCycling() })).inputNames,
    ).toHaveLength(4);
  });

  it("conditions a range that passes the end of the curve by a negligible chance", () => {
    const { distributions } = compilePlan(
      buildPlan({
        abandonmentPressurePsia: {
          // Below 714.7 psia with a chance of 2e-7.
          distribution: { kind: "normal", mean: 1220, standardDeviation: 100 },
          source: "",
        },
      }),
    );
    expect(distributions.abandonmentPressurePsia?.support.minimum).toBe(psia(700));
  });

  it.each<[string, RecoveryPlan, string, string]>([
    [
      "injection that begins below the end of the curve",
      buildPlan({ concept: "cycling", cycling: buildCycling({ pressurePsia: 600 }) }),
      "cycling.pressurePsia",
      "Injection cannot begin at 600 psia: the depletion curve ends at 714.7 psia.",
    ],
    [
      "abandonment above injection",
      buildPlan({
        concept: "cycling",
        abandonmentPressurePsia: constant(2500),
        cycling: buildCycling({ pressurePsia: 2000 }),
      }),
      "cycling.pressurePsia",
      "Injection begins at 2000 psia, but the reservoir is abandoned at 2500 psia.",
    ],
    [
      "a factor of nothing",
      buildPlan({ condensateCurveFactor: constant(0) }),
      "condensateCurveFactor.value",
      "a factor lies above 0",
    ],
    [
      "a factor in per cent",
      buildPlan({ condensateCurveFactor: constant(100) }),
      "condensateCurveFactor.value",
      "Is it in per cent? Enter 1",
    ],
  ])("refuses %s", (_, plan, input, message) => {
    const error = refusal(plan);
    expect(error.message).toContain(message);
    expect(error.details.input).toBe(input);
  });
});
