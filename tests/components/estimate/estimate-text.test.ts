import { describe, expect, it } from "vitest";
import {
  conflictingParts,
  inputDifferences,
  isSameInputs,
  mergeDrafts,
} from "@/components/estimate/differences";
import { readEstimate } from "@/components/estimate/estimate-reading";
import { emptyText, textOfInputs, withCorrelation } from "@/components/estimate/estimate-text";
import { readInput } from "@/components/estimate/input-reading";
import { startingBounds, textOfDistribution, withShape } from "@/components/estimate/input-text";
import { convertShape } from "@/components/estimate/shapes";
import { readSheet, textOfTest } from "@/components/estimate/sheet-text";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import { buildInputs } from "../../analytics/volumetrics/estimate-inputs";

describe("textOfInputs(inputs)", () => {
  it("reads back as the same inputs, so that opening a draft changes nothing", () => {
    const inputs = buildInputs();
    const { estimate, impossible, incomplete } = readEstimate(textOfInputs(inputs));
    expect({ impossible, incomplete }).toEqual({ impossible: [], incomplete: [] });
    expect(estimate && isSameInputs(estimate, inputs)).toBe(true);
  });
});

describe("readEstimate(text)", () => {
  it("is not ready while anything is empty, and proposes no figure", () => {
    const { estimate, incomplete, impossible } = readEstimate(
      emptyText(12_000, buildInputs().fluid),
    );
    expect(estimate).toBeNull();
    expect(incomplete).toHaveLength(10);
    expect(impossible).toEqual([]);
  });

  it("puts the engine's refusal at the input it is about", () => {
    const text = textOfInputs(buildInputs());
    text.inputs.porosity = textOfDistribution({ kind: "constant", value: 0.6 });
    const { estimate, impossible, inputs } = readEstimate(text);
    expect(estimate).toBeNull();
    expect(impossible).toEqual(["porosity"]);
    const reasons = [inputs.porosity.problem, inputs.porosity.fields.value?.problem];
    expect(reasons.join(" ")).toMatch(/porosity/i);
  });
});

describe("readInput(name, text)", () => {
  it("says at P10 that it must be above P90", () => {
    const text = { ...textOfDistribution({ kind: "normalP90P10", p90: 0.1, p10: 0.2 }) };
    text.fields.p10 = "0.05";
    expect(readInput("porosity", text).fields.p10.problem).toMatch(/must be greater/);
  });

  it("takes a spread of temperatures as a difference, not as a temperature", () => {
    const text = textOfDistribution({ kind: "normal", mean: 260, standardDeviation: 6 });
    expect(readInput("temperatureDegF", text).distribution).toMatchObject({ standardDeviation: 6 });
  });
});

describe("readInput(name, text) of a figure that no reservoir can have", () => {
  it("refuses it at once, at the figure, while the other inputs are still empty", () => {
    const text = emptyText(12_000, null);
    text.inputs.porosity = textOfDistribution({ kind: "normalP90P10", p90: 0.1, p10: 0.6 });
    const { impossible, incomplete, inputs } = readEstimate(text);
    expect(impossible).toEqual(["porosity"]);
    expect(incomplete).toHaveLength(9);
    expect(inputs.porosity.fields.p10.problem).toMatch(/above 0\.47/);
    expect(inputs.porosity.fields.p90.problem).toBeNull();
  });

  it("offers to cut off a tail, and is content once it is", () => {
    const text = textOfDistribution({ kind: "normalP90P10", p90: 0.08, p10: 0.24 });
    const refused = readInput("porosity", text);
    // The mean, 0.16, is 2.563 standard deviations of 0.0624 above 0: 0.52 % by the normal table.
    expect(refused.fields.p90.problem).toContain("0.52 %");
    expect(refused.cutOff).toEqual({ key: "minimum", value: 0 });
    const cut = readInput("porosity", { ...text, minimum: "0" });
    expect(cut).toMatchObject({ cutOff: null, problem: null });
    expect(cut.distribution).toMatchObject({ minimum: 0 });
  });

  it("offers no cut where most of the curve is impossible: it is a slip of units", () => {
    const text = textOfDistribution({ kind: "normalP90P10", p90: 12, p10: 18 });
    const { fields, cutOff } = readInput("porosity", text);
    expect(fields.p10.problem).toContain("Is it in per cent?");
    expect(cutOff).toBeNull();
  });
});

describe("startingBounds(name, kind)", () => {
  it("cuts curves without ends off where a fraction or a yield ends", () => {
    expect(startingBounds("waterSaturation", "normal")).toEqual({ minimum: "0", maximum: "1" });
    expect(startingBounds("condensateYieldStbPerMmscf", "normalP90P10")).toEqual({
      minimum: "0",
      maximum: "",
    });
    const none = { minimum: "", maximum: "" };
    expect(startingBounds("areaAcres", "lognormalP90P10")).toEqual(none);
    expect(startingBounds("gasRecovery", "pert")).toEqual(none);
  });

  it("lets an ordinary porosity and water saturation be typed into a first estimate", () => {
    const text = emptyText(12_000, null);
    text.inputs.porosity.fields = { p90: "0.08", p10: "0.24" };
    text.inputs.waterSaturation.fields = { p90: "0.20", p10: "0.35" };
    const { impossible, incomplete } = readEstimate(text);
    expect(impossible).toEqual([]);
    expect(incomplete).toHaveLength(8);
  });
});

describe("withShape(name, text, kind)", () => {
  const { porosity } = emptyText(null, null).inputs;

  it("brings the bounds of the new shape where nobody has touched them", () => {
    const pert = withShape("porosity", porosity, "pert");
    expect(pert).toMatchObject({ kind: "pert", minimum: "", maximum: "" });
    expect(withShape("porosity", pert, "lognormal")).toMatchObject({ minimum: "0" });
  });

  it("keeps bounds that somebody typed or took away", () => {
    const typed = { ...porosity, maximum: "0.3" };
    expect(withShape("porosity", typed, "pert")).toMatchObject({ minimum: "0", maximum: "0.3" });
    const without = { ...porosity, minimum: "", maximum: "" };
    expect(withShape("porosity", without, "normal")).toMatchObject({ minimum: "", maximum: "" });
  });
});

describe("convertShape(quantile, to)", () => {
  const quantile = compileDistribution({ kind: "lognormalP90P10", p90: 50, p10: 500 }).quantile;

  it("keeps P90 and P10 where the new shape has them", () => {
    expect(convertShape(quantile, "normalP90P10")).toEqual({ p90: 50, p10: 500 });
    const { mu, sigma } = convertShape(quantile, "lognormal");
    // mu = (ln 50 + ln 500) / 2, sigma = ln 10 / 2.5631
    expect(mu).toBeCloseTo(5.0633, 4);
    expect(sigma).toBeCloseTo(0.89836, 5);
  });

  it("puts the ends of a uniform so that 10 % lie below P90 and 10 % above P10", () => {
    const { low, high } = convertShape(quantile, "uniform");
    const range = compileDistribution({ kind: "uniform", low, high }).range;
    expect(range.p90).toBeCloseTo(50, 0);
    expect(range.p10).toBeCloseTo(500, 0);
  });
});

describe("withCorrelation(pairs, a, b, rank)", () => {
  it("keeps one entry a pair, whichever way round, and none for 0", () => {
    const one = withCorrelation([], "porosity", "areaAcres", 0.3);
    const two = withCorrelation(one, "areaAcres", "porosity", 0.5);
    expect(two).toEqual([{ a: "areaAcres", b: "porosity", rank: 0.5 }]);
    expect(withCorrelation(two, "porosity", "areaAcres", 0)).toEqual([]);
  });
});

describe("inputDifferences(now, before)", () => {
  it("finds what changed and by how much, and calls a reworded source the same", () => {
    const before = buildInputs({ porosity: { kind: "constant", value: 0.1 } });
    const now = buildInputs({ porosity: { kind: "constant", value: 0.12 } });
    now.uncertain.areaAcres = { ...now.uncertain.areaAcres, source: "new map, same range" };
    const changed = inputDifferences(now, before).filter(({ isSame }) => !isSame);
    expect(changed.map(({ name }) => name)).toEqual(["porosity"]);
    expect(changed[0].medianChange).toBeCloseTo(0.2, 12);
  });
});

describe("mergeDrafts(mine, theirs, fromTheirs)", () => {
  it("takes the parts chosen from theirs and leaves the rest mine", () => {
    const base = buildInputs();
    const mine = buildInputs({ porosity: { kind: "constant", value: 0.14 } });
    const theirs = {
      ...buildInputs({ waterSaturation: { kind: "constant", value: 0.3 } }),
      depthFt: 9_000,
    };
    expect(conflictingParts(mine, theirs)).toEqual(["porosity", "waterSaturation", "depthFt"]);
    const merged = mergeDrafts(mine, theirs, ["waterSaturation", "depthFt"]);
    expect(merged.uncertain.porosity).toEqual(mine.uncertain.porosity);
    expect(merged.uncertain.waterSaturation).toEqual(theirs.uncertain.waterSaturation);
    expect(merged.depthFt).toBe(9_000);
    expect(mine.uncertain.waterSaturation).toEqual(base.uncertain.waterSaturation);
  });
});

describe("readSheet(sheet)", () => {
  it("reads a stored separator test back as itself", () => {
    const { fluid } = buildInputs({}, {});
    const sour = { ...fluid, hydrogenSulphide: 0.03, carbonDioxide: 0.005 };
    expect(readSheet(textOfTest(sour)).test).toEqual(sour);
  });

  it("asks for what is missing and leaves out the gas of a tank that was not measured", () => {
    const sheet = textOfTest(buildInputs().fluid);
    const unmeasured = readSheet({ ...sheet, tankMeasured: false });
    expect(unmeasured.test?.stockTankGas).toBeNull();
    const fields = { ...sheet.fields, "primarySeparator.gasGravity": "" };
    expect(readSheet({ ...sheet, fields }).incomplete).toEqual(["primarySeparator.gasGravity"]);
  });
});
