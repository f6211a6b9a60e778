import { describe, expect, it } from "vitest";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { alignedCases, caseSetsOf, joined, sharingWords } from "@/components/estimate/case-sets";
import { addsUp, scaledTo100, totalPercent } from "@/components/estimate/case-weights";
import { isSameInputs } from "@/components/estimate/differences";
import { readEstimate } from "@/components/estimate/estimate-reading";
import { emptyText, textOfInputs, withInput } from "@/components/estimate/estimate-text";
import { residualFinding, residualsOf, testsInWords } from "@/components/estimate/fit-words";
import { readInput } from "@/components/estimate/input-reading";
import { textOfDistribution, type CaseText } from "@/components/estimate/input-text";
import { readCells, refusedWords } from "@/components/estimate/pasted-cells";
import { percentileName, percentText, readPercent } from "@/components/estimate/percent-text";
import { reshaped, singleValue, withEnds } from "@/components/estimate/reshape";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import { buildInputs } from "../../analytics/volumetrics/estimate-inputs";

const contactCases = (values: readonly [number, number]): Distribution => ({
  kind: "scenarios",
  caseSet: "Gas-water contact",
  scenarios: [
    { name: "Shallow", weight: 0.4, distribution: { kind: "constant", value: values[0] } },
    { name: "Deep", weight: 0.6, distribution: { kind: "constant", value: values[1] } },
  ],
});

const withCases = () => {
  const text = textOfInputs(buildInputs());
  text.correlations = [];
  text.inputs.areaAcres = textOfDistribution(contactCases([1_900, 2_600]));
  text.inputs.netThicknessFt = textOfDistribution(contactCases([80, 130]));
  return text;
};

describe("textOfInputs(inputs) of detailed ranges", () => {
  it("reads back as the same inputs, whatever the kind", () => {
    const inputs = buildInputs();
    inputs.correlations = [];
    inputs.uncertain.porosity = {
      distribution: {
        kind: "percentiles",
        family: "pert",
        points: [
          { exceedance: 0.95, value: 0.09 },
          { exceedance: 0.5, value: 0.15 },
          { exceedance: 1 / 3, value: 0.17 },
        ],
        minimum: 0.05,
      },
      source: "Core, wells 1 to 3",
      reason: "The crest is not drilled.",
    };
    inputs.uncertain.waterSaturation.distribution = {
      kind: "data",
      shape: "lognormal",
      values: [0.21, 0.24, 0.19, 0.31, 0.27, 0.22],
      maximum: 1,
    };
    inputs.uncertain.pressurePsia.distribution = {
      kind: "triangular",
      low: 5_300,
      mode: 5_400,
      high: 5_500,
      ends: "p95p05",
    };
    inputs.uncertain.areaAcres.distribution = contactCases([1_900, 2_600]);
    inputs.uncertain.netThicknessFt.distribution = contactCases([80, 130]);
    const { estimate, impossible, incomplete, problem } = readEstimate(textOfInputs(inputs));
    expect({ impossible, incomplete, problem }).toEqual({
      impossible: [],
      incomplete: [],
      problem: null,
    });
    expect(estimate && isSameInputs(estimate, inputs)).toBe(true);
  });
});

describe("percentText(chance) and readPercent(text)", () => {
  it("write a chance in its fewest digits and read it back exactly", () => {
    expect(percentText(0.9)).toBe("90");
    expect(percentText(0.07)).toBe("7");
    for (const chance of [1 / 3, 0.29, 0.57, 0.142857142857, 2 / 7]) {
      expect(readPercent(percentText(chance), "")).toBe(chance);
    }
  });

  it("take a percentile as people write it, and say what is none", () => {
    expect(["90", "P90", "p 90", "90 %", "90,5"].map((text) => readPercent(text, ""))).toEqual([
      0.9, 0.9, 0.9, 0.9, 0.905,
    ]);
    expect(readPercent("100", "Less.")).toBe("100 is not between 0 and 100. Less.");
    expect(readPercent("deep", "A number.")).toContain("“deep” is not a number");
    expect(readPercent(" ", "")).toBeNull();
    expect(percentileName(0.05)).toBe("P05");
  });
});

describe("readCells(cells, name)", () => {
  it("counts values and names what is none, leaving it out", () => {
    const cells = readCells("Porosity\r\n0.12\r\n14 %\r\n\r\nn/a\r\n0.16", "porosity");
    expect(cells.values).toEqual([0.12, 0.14, 0.16]);
    expect(cells.count).toBe(5);
    expect(refusedWords(cells.refused)).toBe(
      "Cell 1, “Porosity” and cell 4, “n/a” are no numbers and are left out.",
    );
  });

  it("parts a single line at its commas or spaces, and keeps grouped thousands whole", () => {
    expect(readCells("0.12, 0.13, 0.15", "porosity").values).toEqual([0.12, 0.13, 0.15]);
    expect(readCells("0.12 0.13 0.15", "porosity").values).toEqual([0.12, 0.13, 0.15]);
    expect(readCells("1,250\n2,400", "areaAcres").values).toEqual([1_250, 2_400]);
  });

  it("needs five values before there is a shape, and says so", () => {
    const text = reshaped(
      "porosity",
      textOfDistribution({ kind: "constant", value: 0.1 }),
      null,
      "data",
    );
    const few = { ...text, data: { shape: "empirical" as const, cells: "0.1\n0.2" } };
    expect(readInput("porosity", few)).toMatchObject({
      distribution: null,
      problem: "2 values say nothing of a shape; at least 5 are needed.",
    });
  });
});

describe("residualsOf(percentiles, quantile)", () => {
  it("shows what a curve with two parameters misses of three percentiles", () => {
    const asked = {
      kind: "percentiles" as const,
      family: "normal" as const,
      points: [
        { exceedance: 0.9, value: 150 },
        { exceedance: 0.5, value: 200 },
        { exceedance: 0.1, value: 310 },
      ],
    };
    const residuals = residualsOf(asked, compileDistribution(asked).quantile);
    // The least squares line on scores −z, 0, z has the mean of the values, 220, at 0, whatever z is: P50 misses by 20.
    expect(residuals[1]).toMatchObject({ name: "P50", asked: 200 });
    expect(residuals[1].difference).toBeCloseTo(20, 9);
    // Its slope is (310 − 150) / 2z, so the ends are 220 ∓ 80: 140 and 300.
    expect(residuals[0].given).toBeCloseTo(140, 9);
    expect(residuals[2].given).toBeCloseTo(300, 9);
    expect(residualFinding("normal", residuals)).toMatch(
      /^The normal curve misses P50 by 10\.0\s%, the most of the three\.$/,
    );
  });

  it("says that two percentiles are met", () => {
    const asked = {
      kind: "percentiles" as const,
      family: "lognormal" as const,
      points: [
        { exceedance: 0.95, value: 10 },
        { exceedance: 0.2, value: 70 },
      ],
    };
    expect(
      residualFinding("lognormal", residualsOf(asked, compileDistribution(asked).quantile)),
    ).toBe("The lognormal curve goes through both percentiles.");
  });
});

describe("testsInWords(shape, values)", () => {
  it("gives both tests with their p-values, and says when the values contradict the curve", () => {
    const skew = [1, 1.1, 1.2, 1.2, 1.3, 1.3, 1.4, 1.5, 9, 14, 22, 40];
    const tests = testsInWords("normal", skew);
    expect(tests?.map(({ name }) => name)).toEqual(["Anderson–Darling", "Lilliefors"]);
    expect(tests?.every(({ isContradicted }) => isContradicted)).toBe(true);
    expect(tests?.[0].text).toContain("The values contradict the curve.");
  });

  it("has nothing to test for the values themselves, or for a lognormal of values below 0", () => {
    expect(testsInWords("empirical", [1, 2, 3, 4, 5])).toBeNull();
    expect(testsInWords("lognormal", [-1, 2, 3, 4, 5])).toBeNull();
  });

  it("says that few values are too few for a test of the tails", () => {
    const [andersonDarling] = testsInWords("normal", [1, 2, 3, 4, 5.5]) ?? [];
    expect(andersonDarling).toMatchObject({ figure: null, isContradicted: false });
    expect(andersonDarling.text).toContain("below 8 values");
  });
});

describe("scaledTo100(cases)", () => {
  const cases = (...weights: string[]): CaseText[] =>
    weights.map((weight, index) => ({ name: `Case ${index}`, weight, range: singleValue("1") }));

  it("keeps the proportions and adds up to exactly 100 %", () => {
    const scaled = scaledTo100(cases("25", "40", "30"));
    expect(scaled.map(({ weight }) => weight)).toEqual(["26.32", "42.1", "31.58"]);
    expect(addsUp(totalPercent(scaled) ?? 0)).toBe(true);
    const thirds = scaledTo100(cases("1", "1", "1"));
    expect(thirds.map(({ weight }) => weight)).toEqual(["33.34", "33.33", "33.33"]);
  });

  it("leaves chances that cannot be read as they are", () => {
    expect(scaledTo100(cases("", "40")).map(({ weight }) => weight)).toEqual(["", "40"]);
    expect(totalPercent(cases("", "40"))).toBeNull();
  });
});

describe("readInput(name, text) of cases", () => {
  it("refuses chances that miss 100 %, keeping what was typed", () => {
    const text = textOfDistribution(contactCases([1_900, 2_600]));
    const { cases = { caseSet: "", cases: [] } } = text;
    cases.cases[0].weight = "30";
    const { distribution, problem, isComplete } = readInput("areaAcres", text);
    expect(isComplete).toBe(true);
    expect(distribution).toBeNull();
    expect(problem).toContain("add up to");
  });

  it("puts what is impossible in one case at the figure of that case", () => {
    const text = textOfDistribution({
      kind: "scenarios",
      scenarios: [
        { name: "Tight", weight: 0.5, distribution: { kind: "constant", value: 0.1 } },
        { name: "Open", weight: 0.5, distribution: { kind: "uniform", low: 0.2, high: 0.6 } },
      ],
    });
    const { fields, problem } = readInput("porosity", text);
    expect(problem).toBeNull();
    expect(fields["scenarios.1.distribution.high"].problem).toContain("Open");
    expect(fields["scenarios.0.distribution.value"].problem).toBeNull();
  });
});

describe("withInput(text, name, input) of a shared set of cases", () => {
  it("gives names and chances to the other inputs of the set, and leaves their ranges", () => {
    const text = withCases();
    const { cases } = text.inputs.areaAcres;
    if (!cases) throw new RangeError("no cases");
    const [shallow, deep] = cases.cases;
    const changed = withInput(text, "areaAcres", {
      ...text.inputs.areaAcres,
      cases: {
        ...cases,
        cases: [
          { ...shallow, name: "Upper", weight: "35" },
          { ...deep, weight: "65" },
        ],
      },
    });
    expect(changed.inputs.netThicknessFt.cases?.cases).toMatchObject([
      { name: "Upper", weight: "35", range: { fields: { value: "80" } } },
      { name: "Deep", weight: "65", range: { fields: { value: "130" } } },
    ]);
    expect(readEstimate(changed).estimate).not.toBeNull();
  });

  it("leaves other inputs alone when a case is added, but for a value to fill in", () => {
    const own = withCases().inputs.netThicknessFt.cases?.cases ?? [];
    const aligned = alignedCases(own, [
      { name: "Shallow", weight: "40" },
      { name: "Deep", weight: "50" },
      { name: "Deepest", weight: "10" },
    ]);
    expect(aligned.map(({ range }) => range.fields.value)).toEqual(["80", "130", ""]);
  });

  it("says in words what an input takes its case with", () => {
    const [set] = caseSetsOf(withCases().inputs);
    expect(set.inputs).toEqual(["areaAcres", "netThicknessFt"]);
    expect(sharingWords(set, "areaAcres")).toBe(
      "Takes the same case as net thickness in every trial.",
    );
    expect(joined({ caseSet: "", cases: [] }, set)).toMatchObject({
      caseSet: "Gas-water contact",
      cases: [{ name: "Shallow" }, { name: "Deep" }],
    });
  });
});

describe("reshaped(name, text, quantile, kind)", () => {
  const porosity = textOfDistribution({ kind: "lognormalP90P10", p90: 0.1, p10: 0.2 });
  const { quantile } = compileDistribution({ kind: "lognormalP90P10", p90: 0.1, p10: 0.2 });

  it("begins percentiles and cases from the present curve, and data from nothing", () => {
    expect(reshaped("porosity", porosity, quantile, "percentiles").percentiles).toMatchObject({
      family: "lognormal",
      points: [{ exceedance: "90", value: "0.1" }, {}, { exceedance: "10", value: "0.2" }],
    });
    const { cases } = reshaped("porosity", porosity, quantile, "scenarios");
    expect(cases?.cases.map(({ weight }) => weight)).toEqual(["30", "40", "30"]);
    expect(reshaped("porosity", porosity, quantile, "data").data?.cells).toBe("");
  });

  it("keeps what was typed in a shape that is tried again", () => {
    const tried = reshaped("porosity", porosity, quantile, "percentiles");
    const typed = {
      ...tried,
      percentiles: { family: "normal" as const, points: [{ exceedance: "95", value: "0.08" }] },
    };
    const back = reshaped(
      "porosity",
      reshaped("porosity", typed, quantile, "pert"),
      quantile,
      "percentiles",
    );
    expect(back.percentiles).toEqual(typed.percentiles);
  });

  it("leaves nothing to fill in where there was nothing", () => {
    const { inputs } = emptyText(12_000, null);
    const cases = reshaped("areaAcres", inputs.areaAcres, null, "scenarios");
    expect(readInput("areaAcres", cases)).toMatchObject({ isComplete: false, distribution: null });
  });
});

describe("withEnds(text, quantile, ends)", () => {
  it("asks the same curve for other ends: a triangle's P90 and P10", () => {
    const triangle = { kind: "triangular", low: 0, mode: 5, high: 10 } as const;
    const text = textOfDistribution(triangle);
    const next = withEnds(text, compileDistribution(triangle).quantile, "p90p10");
    // sqrt(0.1 x 10 x 5) = 2.236 from either end, by the formula of the triangle's quantile.
    expect(next).toMatchObject({
      ends: "p90p10",
      fields: { low: "2.24", mode: "5", high: "7.76" },
    });
  });
});
