import { describe, expect, it } from "vitest";
import { recoveryResponseSchema } from "@/app/api/v1/calculations/recovery-schema";
import { DomainError } from "@/analytics/errors";
import { compareConcepts } from "@/analytics/recovery/compare-concepts";
import { simulate } from "@/analytics/volumetrics/simulate";
import { buildInputs } from "../volumetrics/estimate-inputs";
import { buildCycling, buildPlan, constant, psia } from "./published-curve";

const inputs = buildInputs(
  {
    pressurePsia: { kind: "normal", mean: 4500, standardDeviation: 120 },
    temperatureDegF: { kind: "normal", mean: 200, standardDeviation: 3 },
    condensateYieldStbPerMmscf: { kind: "uniform", low: 130, high: 165 },
  },
  { depthFt: null },
);
const depletion = buildPlan({ abandonmentPressurePsia: constant(1200) });
const compression = buildPlan({ concept: "compression" });
const cycling = buildPlan({ concept: "cycling", cycling: buildCycling() });
const options = { trials: 1000, seed: 4 };

describe("compareConcepts", () => {
  const concepts = compareConcepts(inputs, [depletion, compression, cycling], options);
  const [depleted, compressed, cycled] = concepts;

  it("answers in the form of the calculation's response", () => {
    expect(recoveryResponseSchema.parse({ concepts }).concepts).toEqual(concepts);
  });

  it("has the same condensate in place for every concept, from the same draws", () => {
    expect(compressed.condensateInPlaceStb).toEqual(depleted.condensateInPlaceStb);
    expect(cycled.condensateInPlaceStb).toEqual(depleted.condensateInPlaceStb);
  });

  it("gives each concept what an estimate with its plan gives", () => {
    const { summary } = simulate({ ...inputs, recoveryPlan: cycling }, options);
    expect(cycled.condensateRecoverableStb.p50).toBe(summary.results.condensateRecoverableStb.p50);
    expect(cycled.salesGasScf.mean).toBe(summary.results.salesGasScf.mean);
  });

  it("recovers more by compression than by depletion, and most condensate by cycling", () => {
    expect(compressed.gasRecovery.p50).toBeGreaterThan(depleted.gasRecovery.p50);
    expect(compressed.condensateRecovery.p90).toBeGreaterThan(depleted.condensateRecovery.p90);
    expect(cycled.condensateRecovery.p90).toBeGreaterThan(compressed.condensateRecovery.p10);
    expect(cycled.phases.map(({ name }) => name)).toEqual([
      "aboveDewPoint",
      "belowDewPoint",
      "cycling",
      "blowdown",
    ]);
  });

  it("names the plan in warnings and refusals by its place", () => {
    expect(cycled.warnings.map(({ input }) => input)).toContain("plans.2.curve.dewPointPsia");
    const wrong = buildPlan({ abandonmentPressurePsia: constant(psia(100)) });
    try {
      compareConcepts(inputs, [depletion, wrong], options);
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(DomainError);
      expect((error as DomainError).details.input).toBe("plans.1.abandonmentPressurePsia.value");
    }
  });
});
