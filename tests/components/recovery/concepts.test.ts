import { describe, expect, it } from "vitest";
import { compareConcepts, type ConceptResult } from "@/analytics/recovery/compare-concepts";
import { recoveryRoutes, type RecoveryRoute } from "@/analytics/recovery/recovery-curve-schema";
import { producingConcepts } from "@/analytics/recovery/recovery-plan-schema";
import {
  planForConcept,
  startingPlan,
  type ConceptStart,
} from "@/analytics/recovery/starting-plan";
import { readPlan } from "@/components/estimate/plan-reading";
import { textOfPlan } from "@/components/estimate/plan-text";
import {
  conceptText,
  editsOfPlan,
  isEdited,
  noEdits,
  withEdit,
} from "@/components/recovery/concept-assumptions";
import { conceptFinding, gasBalanceFinding } from "@/components/recovery/concept-findings";
import { warningsByConcept } from "@/components/recovery/concept-warnings";
import { readNearWell, startingNearWell } from "@/components/recovery/near-well-text";
import { publishedCurve } from "../../analytics/recovery/published-curve";
import { buildInputs } from "../../analytics/volumetrics/estimate-inputs";

const start: ConceptStart = {
  curve: publishedCurve,
  sampleName: "A/1",
  pressurePsia: { p90: 6_300, p50: 6_500 },
  depthFt: 12_500,
  criticalSaturation: { low: 0.1, high: 0.2 },
};

describe("planForConcept(concept, plan, start)", () => {
  const plan = {
    ...startingPlan("cycling", start),
    condensateCurveFactor: {
      distribution: { kind: "constant", value: 1.1 } as const,
      source: "A/1",
    },
  };

  it("leaves a plan alone that has the concept already", () => {
    expect(planForConcept("cycling", plan, start)).toBe(plan);
  });

  it("starts from the concept's own abandonment pressure and keeps the rest", () => {
    const compressed = planForConcept("compression", plan, start);
    expect(compressed).toEqual({
      ...startingPlan("compression", start),
      condensateCurveFactor: plan.condensateCurveFactor,
    });
    expect(planForConcept("cycling", compressed, start).cycling).toEqual(
      startingPlan("cycling", start).cycling,
    );
  });
});

describe("startingPlan(concept, start)", () => {
  it("starts with plans that can be, for deep and shallow reservoirs and for ones that begin saturated", () => {
    for (const concept of producingConcepts) {
      for (const depthFt of [5_000, 12_500, 30_000, null]) {
        for (const pressurePsia of [null, start.pressurePsia, { p90: 3_300, p50: 3_400 }]) {
          const plan = startingPlan(concept, { ...start, depthFt, pressurePsia });
          expect(readPlan(textOfPlan(plan)).plan).toEqual(plan);
        }
      }
    }
  });

  it("compresses to about half, no lower than the curve goes", () => {
    const mode = (concept: "depletion" | "compression") => {
      const { distribution } = startingPlan(concept, start).abandonmentPressurePsia;
      return distribution.kind === "pert" ? distribution.mode : NaN;
    };
    // 100 psi for every 1,000 ft of 12,500 ft.
    expect(mode("depletion")).toBe(1_250);
    expect(mode("compression")).toBeGreaterThanOrEqual(715);
    expect(mode("compression")).toBeLessThan(900);
  });

  it("says of every figure that it is common practice without a source", () => {
    const { abandonmentPressurePsia, condensateCurveFactor, cycling } = startingPlan(
      "cycling",
      start,
    );
    const sources = [
      abandonmentPressurePsia,
      condensateCurveFactor,
      cycling?.sweepEfficiency,
      cycling?.displacementEfficiency,
    ];
    for (const input of sources) expect(input?.source).toMatch(/common practice/i);
    expect(condensateCurveFactor.source).toMatch(/^Sample A\/1, laboratory curve/);
  });

  it("begins injection where liquid is about to drop out, or where the reservoir begins", () => {
    expect(startingPlan("cycling", start).cycling?.pressurePsia).toBe(3_450);
    const saturated = { ...start, pressurePsia: { p90: 3_330, p50: 3_400 } };
    expect(startingPlan("cycling", saturated).cycling?.pressurePsia).toBe(3_300);
  });
});

describe("withEdit(edits, now, next)", () => {
  it("keeps abandonment to its concept and shares the rest", () => {
    const now = conceptText("compression", start, noEdits);
    const typed = { ...now.inputs.abandonmentPressurePsia, source: "Compressor study" };
    const factor = { ...now.inputs.condensateCurveFactor, source: "Two samples" };
    const edits = withEdit(noEdits, now, {
      ...now,
      inputs: { ...now.inputs, abandonmentPressurePsia: typed, condensateCurveFactor: factor },
      fields: { ...now.fields, invadedFraction: "0.25" },
    });
    expect(isEdited(noEdits)).toBe(false);
    expect(isEdited(edits)).toBe(true);
    const [compression, depletion] = (["compression", "depletion"] as const).map((concept) =>
      conceptText(concept, start, edits),
    );
    expect(compression.inputs.abandonmentPressurePsia).toBe(typed);
    expect(depletion.inputs.abandonmentPressurePsia).not.toBe(typed);
    expect(depletion.inputs.condensateCurveFactor).toBe(factor);
    expect(depletion.fields.invadedFraction).toBe("0.25");
  });

  it("leaves a curve factor behind when the curve is of another kind", () => {
    const now = conceptText("depletion", start, noEdits);
    const factor = { ...now.inputs.condensateCurveFactor, source: "Two samples" };
    const inputs = { ...now.inputs, condensateCurveFactor: factor };
    const edits = withEdit(noEdits, now, { ...now, inputs });
    const curve = { ...publishedCurve, route: "correlation" as const };
    const other = conceptText("depletion", { ...start, curve }, edits);
    expect(other.inputs.condensateCurveFactor.source).toMatch(/correlation curve/);
    const back = conceptText("depletion", start, edits);
    expect(back.inputs.condensateCurveFactor).toBe(factor);
  });

  it("starts with a wider curve factor the less is measured", () => {
    const lowOf = (route: RecoveryRoute) => {
      const curve = { ...publishedCurve, route };
      const { distribution } = startingPlan("depletion", { ...start, curve }).condensateCurveFactor;
      return distribution.kind === "pert" ? distribution.low : NaN;
    };
    const lows = recoveryRoutes.map(lowOf);
    expect(lows).toEqual([...lows].sort((a, b) => b - a));
  });
});

describe("editsOfPlan(plan)", () => {
  it("begins the comparison with what the draft has", () => {
    const plan = startingPlan("cycling", start);
    const drafted = { ...plan, cycling: plan.cycling && { ...plan.cycling, fuelFraction: 0.12 } };
    const edits = editsOfPlan(textOfPlan(drafted));
    expect(readPlan(conceptText("cycling", start, edits)).plan).toEqual(drafted);
    expect(readPlan(conceptText("depletion", start, edits)).plan?.concept).toBe("depletion");
  });
});

describe("conceptFinding(concepts, factor, unit)", () => {
  const inputs = buildInputs({ temperatureDegF: { kind: "constant", value: 200 } });
  const concepts = compareConcepts(
    inputs,
    producingConcepts.map((concept) => startingPlan(concept, start)),
    { trials: 500, seed: 3 },
  );

  it("says how much more the best concept brings than depletion, by the means", () => {
    const [depletion, , cycling] = concepts;
    const gain = cycling.condensateRecoverableStb.mean - depletion.condensateRecoverableStb.mean;
    expect(gain).toBeGreaterThan(0);
    expect(conceptFinding(concepts, 1e-6, "MMSTB")).toBe(
      `Cycling brings ${(gain * 1e-6).toPrecision(3)} MMSTB more to the tank than depletion`,
    );
  });

  it("claims no gain where there is none", () => {
    const [depletion] = concepts;
    const same: ConceptResult = { ...depletion, concept: "compression" };
    expect(conceptFinding([depletion, same], 1e-6, "MMSTB")).toMatch(/^No concept brings more/);
  });

  it("names what stays in the rock when one concept stands alone, and nothing without any", () => {
    expect(conceptFinding([concepts[0]], 1e-6, "MMSTB")).toMatch(
      /^Depletion leaves \d+.% of the condensate in the rock$/,
    );
    expect(conceptFinding([], 1e-6, "MMSTB")).toBe("Where the liquid goes");
  });

  it("tells every warning once, with the concepts that it is about", () => {
    const warning = { code: "x", severity: "warning" as const, message: "Look." };
    const told = warningsByConcept([
      { ...concepts[0], warnings: [warning] },
      { ...concepts[2], warnings: [warning, { ...warning, message: "Here." }] },
    ]);
    expect(told).toEqual([
      { tone: "warning", title: undefined, text: "Look." },
      { tone: "warning", title: "Cycling", text: "Here." },
    ]);
  });
});

describe("gasBalanceFinding(balance, factor, unit)", () => {
  it("says what has to be bought, if anything", () => {
    const balance = {
      injectedScf: 210e9,
      producedWhileCyclingScf: 205e9,
      fuelScf: 7e9,
      makeUpScf: 12e9,
      pressureAtEndPsia: 4_000,
    };
    expect(gasBalanceFinding(balance, 1e-9, "Bscf")).toBe(
      "Cycling injects 210 Bscf; 12.0 of it has to be bought",
    );
    expect(gasBalanceFinding({ ...balance, makeUpScf: 0 }, 1e-9, "Bscf")).toBe(
      "Cycling injects 210 Bscf, all of it its own",
    );
  });
});

describe("readNearWell(text)", () => {
  it("starts at the dew point with a drawdown to half of it", () => {
    const { asked } = readNearWell(startingNearWell(4_424, 5_898));
    expect(asked).toMatchObject({ reservoirPressurePsia: 4_420, flowingPressurePsia: 2_210 });
  });

  it("refuses a flowing pressure that is no drawdown, in words", () => {
    const text = { ...startingNearWell(4_424, 5_898), flowingPressurePsia: "5,000" };
    const { asked, fields } = readNearWell(text);
    expect(asked).toBeNull();
    expect(fields.flowingPressurePsia.problem).toMatch(/below the reservoir/);
  });
});
