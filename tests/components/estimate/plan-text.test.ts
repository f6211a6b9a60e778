import { describe, expect, it } from "vitest";
import type { RecoveryPlan } from "@/analytics/recovery/recovery-plan-schema";
import { submitChecklist } from "@/components/estimate/checklist";
import {
  conflictingParts,
  inputDifferences,
  isSameInputs,
  mergeDrafts,
  planDifferences,
  recoveryDifferences,
} from "@/components/estimate/differences";
import { readEstimate } from "@/components/estimate/estimate-reading";
import { emptyText, NOT_TYPED, textOfInputs, withInput } from "@/components/estimate/estimate-text";
import { inputOfPath, listedInputs } from "@/components/estimate/input-catalogue";
import { textOfDistribution } from "@/components/estimate/input-text";
import { readPlan } from "@/components/estimate/plan-reading";
import { textOfPlan } from "@/components/estimate/plan-text";
import { planInWords } from "@/components/estimate/plan-words";
import { simulate } from "@/analytics/volumetrics/simulate";
import { publishedCurve } from "../../analytics/recovery/published-curve";
import { buildInputs } from "../../analytics/volumetrics/estimate-inputs";

const depletion: RecoveryPlan = {
  concept: "depletion",
  curve: publishedCurve,
  abandonmentPressurePsia: {
    distribution: { kind: "pert", low: 800, mode: 1_000, high: 1_500 },
    source: "Line pressure",
  },
  condensateCurveFactor: {
    distribution: { kind: "pert", low: 0.9, mode: 1, high: 1.1 },
    source: "Third comparative project",
  },
  criticalSaturation: { low: 0.1, high: 0.2 },
  waterDrive: { kind: "none" },
  cycling: null,
};

const cycling: RecoveryPlan = {
  ...depletion,
  concept: "cycling",
  cycling: {
    pressurePsia: 3_450,
    pressure: "declining",
    sweepEfficiency: {
      distribution: { kind: "pert", low: 0.4, mode: 0.6, high: 0.8 },
      source: "Pattern study",
    },
    displacementEfficiency: { distribution: { kind: "constant", value: 0.9 }, source: "" },
    injectedPoreVolumes: 0.9,
    fuelFraction: 0.07,
  },
};

const planned = (recoveryPlan: RecoveryPlan | null) =>
  buildInputs({ temperatureDegF: { kind: "constant", value: 200 } }, { recoveryPlan });

describe("textOfPlan(plan)", () => {
  it("reads back as the same plan, whatever the concept and the water", () => {
    const influx: RecoveryPlan = {
      ...depletion,
      waterDrive: { kind: "influx", invadedFraction: 0.3, trappedGasSaturation: 0.25 },
    };
    const takingUp: RecoveryPlan = {
      ...cycling,
      cycling: cycling.cycling && { ...cycling.cycling, revaporisation: 0.4 },
    };
    for (const plan of [depletion, cycling, influx, takingUp]) {
      expect(readPlan(textOfPlan(plan)).plan).toEqual(plan);
    }
  });
});

describe("readPlan(text)", () => {
  it("says which figures are to be filled in, and only those that the concept uses", () => {
    const text = { ...textOfPlan(depletion), concept: "cycling" as const };
    const { incomplete, open, plan } = readPlan(text);
    expect(incomplete).toEqual(["sweepEfficiency", "displacementEfficiency"]);
    expect(open).toEqual(["cyclingPressurePsia", "injectedPoreVolumes", "fuelFraction"]);
    expect(plan).toBeNull();
  });

  it("refuses abandonment below the end of the curve, at the figure", () => {
    const text = textOfPlan(depletion);
    text.inputs.abandonmentPressurePsia = textOfDistribution({ kind: "constant", value: 400 });
    const { impossible, inputs } = readPlan(text);
    expect(impossible).toEqual(["abandonmentPressurePsia"]);
    // The published table ends at 700 psig.
    expect(inputs.abandonmentPressurePsia.fields.value.problem).toMatch(
      /curve ends at 714\.7 psia/,
    );
  });

  it("puts a contradiction at the figure that it is about", () => {
    const text = textOfPlan(cycling);
    text.fields.injectedPoreVolumes = "0.3";
    const { open, fields, plan } = readPlan(text);
    expect(plan).toBeNull();
    expect(open).toEqual(["injectedPoreVolumes"]);
    expect(fields.injectedPoreVolumes.problem).toMatch(/cannot displace/);
  });

  it("refuses a single figure outside its ends", () => {
    const text = textOfPlan(cycling);
    text.fields.fuelFraction = "7";
    expect(readPlan(text).fields.fuelFraction.problem).toBe("It has to be from 0 to 0.5.");
  });
});

describe("readEstimate(text) with a recovery plan", () => {
  it("reads back as the same inputs", () => {
    const inputs = planned(cycling);
    const { estimate } = readEstimate(textOfInputs(inputs));
    expect(estimate && isSameInputs(estimate, inputs)).toBe(true);
  });

  it("asks for no recovery, and reads one that nobody typed as an empty field", () => {
    const text = textOfInputs(planned(depletion));
    text.inputs.gasRecovery.fields = {};
    const { estimate, incomplete } = readEstimate(text);
    expect(incomplete).toEqual([]);
    expect(estimate?.uncertain.gasRecovery.distribution).toEqual(NOT_TYPED);
    const again = estimate && textOfInputs(estimate);
    expect(again?.inputs.gasRecovery.fields).toEqual({});
    expect(again?.inputs.condensateRecovery.fields).not.toEqual({});
  });

  it("goes back to typed recoveries with their ranges, and to the plan with its figures", () => {
    const inputs = planned(depletion);
    const byHand = { ...textOfInputs(inputs), usesPlan: false };
    const read = readEstimate(byHand).estimate;
    expect(read && isSameInputs(read, planned(null))).toBe(true);
    const back = readEstimate({ ...byHand, usesPlan: true }).estimate;
    expect(back && isSameInputs(back, inputs)).toBe(true);
  });
});

describe("withInput(text, name, input)", () => {
  it("puts an input of the plan into the plan", () => {
    const typed = textOfDistribution({ kind: "constant", value: 900 });
    const text = withInput(textOfInputs(planned(depletion)), "abandonmentPressurePsia", typed);
    expect(text.plan?.inputs.abandonmentPressurePsia).toEqual(typed);
    expect(withInput(emptyText(null, null), "sweepEfficiency", typed).plan).toBeNull();
  });
});

describe("listedInputs(planInputs)", () => {
  it("lists a plan's inputs where the two recoveries would stand", () => {
    expect(listedInputs(null)).toHaveLength(10);
    const listed = listedInputs(["abandonmentPressurePsia", "condensateCurveFactor"]);
    expect(listed.slice(6)).toEqual([
      "condensateYieldStbPerMmscf",
      "abandonmentPressurePsia",
      "condensateCurveFactor",
      "salesGasFraction",
    ]);
  });
});

describe("inputOfPath(path)", () => {
  it("tells a pressure of the plan or of the sheet from the reservoir's", () => {
    expect(inputOfPath("uncertain.pressurePsia.distribution.p90")).toBe("pressurePsia");
    expect(inputOfPath("recoveryPlan.cycling.sweepEfficiency.minimum")).toBe("sweepEfficiency");
    expect(inputOfPath("recoveryPlan.cycling.pressurePsia")).toBeNull();
    expect(inputOfPath("recoveryPlan.curve.points.2.pressurePsia")).toBeNull();
    expect(inputOfPath("fluid.primarySeparator.pressurePsia")).toBeNull();
  });
});

describe("inputDifferences(now, before) with recovery plans", () => {
  it("lists the plan's inputs as new against typed recoveries, and no recovery", () => {
    const differences = inputDifferences(planned(depletion), planned(null));
    const names = differences.map(({ name }) => name);
    expect(names).toContain("abandonmentPressurePsia");
    expect(names).not.toContain("gasRecovery");
    const abandonment = differences.find(({ name }) => name === "abandonmentPressurePsia");
    expect(abandonment).toMatchObject({ before: null, isSame: false, source: "Line pressure" });
  });

  it("compares a plan's inputs that both have", () => {
    const differences = inputDifferences(planned(cycling), planned(depletion));
    const of = (wanted: string) => differences.find(({ name }) => name === wanted);
    expect(of("abandonmentPressurePsia")?.isSame).toBe(true);
    expect(of("sweepEfficiency")?.before).toBeNull();
  });
});

describe("recoveryDifferences(now, before)", () => {
  it("sets worked-out recoveries beside typed ones, as the trials had them", () => {
    const run = (plan: RecoveryPlan | null) => {
      const inputs = planned(plan);
      return { inputs, summary: simulate(inputs, { trials: 500, seed: 7 }).summary };
    };
    const [gas, condensate] = recoveryDifferences(run(depletion), run(null));
    expect(gas).toMatchObject({ name: "gasRecovery", isWorkedOut: true, isSame: false });
    expect(condensate.before?.p50).toBeCloseTo(0.36, 1);
    expect(recoveryDifferences(run(null), run(null))).toEqual([]);
  });
});

describe("planDifferences(now, before)", () => {
  it("tells the concept, the injection and the curve in words", () => {
    const curve = { ...publishedCurve, route: "untunedEquationOfState" as const };
    const told = planDifferences({ ...cycling, curve }, depletion);
    expect(told.map(({ label }) => label)).toEqual(["Concept", "Depletion curve", "Injection"]);
    expect(told[0]).toEqual({
      label: "Concept",
      before: "Depletion",
      now: "Cycling, then blowdown",
    });
    expect(told[1].now).toMatch(/^Untuned equation of state/);
    expect(told[2]).toMatchObject({ before: "No injection" });
  });

  it("tells when recoveries were typed before, and when the curve has other figures", () => {
    expect(planDifferences(depletion, null)[0]).toEqual({
      label: "Recoveries",
      before: "Typed by hand",
      now: "Worked out by a plan",
    });
    const points = publishedCurve.points.map((point, index) =>
      index === 2 ? { ...point, liquidSaturation: 0.2 } : point,
    );
    const other = { ...depletion, curve: { ...publishedCurve, points } };
    expect(planDifferences(other, depletion)[0].now).toMatch(/other figures/);
    expect(planDifferences(depletion, depletion)).toEqual([]);
  });
});

describe("conflictingParts(mine, theirs) with recovery plans", () => {
  it("offers the plan as one part, and takes it whole", () => {
    const [mine, theirs] = [planned(depletion), planned(cycling)];
    expect(conflictingParts(mine, theirs)).toEqual(["recoveryPlan"]);
    expect(mergeDrafts(mine, theirs, ["recoveryPlan"]).recoveryPlan).toEqual(cycling);
    expect(mergeDrafts(mine, theirs, []).recoveryPlan).toEqual(depletion);
  });
});

describe("submitChecklist(draft) with a recovery plan", () => {
  const check = (plan: RecoveryPlan) => {
    const text = textOfInputs(planned(plan));
    const reading = readEstimate(text);
    return submitChecklist({ text, reading, warnings: [], sampleName: null, trials: null });
  };

  it("counts the plan's inputs and says what recoveries rest on", () => {
    const items = check(cycling);
    expect(items[0]).toEqual({
      tone: "done",
      text: "Twelve inputs complete, no impossible value",
    });
    expect(items).toContainEqual({
      tone: "done",
      text: "Recoveries worked out for cycling, then blowdown: laboratory",
    });
  });

  it("leaves an untuned equation of state for the reviewer to weigh", () => {
    const curve = { ...publishedCurve, route: "untunedEquationOfState" as const };
    expect(check({ ...depletion, curve })).toContainEqual({
      tone: "warning",
      text: "Recoveries worked out for depletion: untuned equation of state, no measured depletion behind it",
    });
  });
});

describe("planInWords(plan)", () => {
  it("names concept, curve and the range of every uncertain input", () => {
    const words = planInWords(cycling);
    expect(words).toMatch(/^Cycling, then blowdown, laboratory curve; abandonment /);
    expect(words).toContain("; displacement 0.900; ");
    expect(words).toContain("0.900 pore volumes from 3,450 psia");
    expect(words).toMatch(/critical saturation 10.% to 20.% of pore space$/);
  });
});
