import { describe, expect, it } from "vitest";
import {
  basinRankWords,
  effectWords,
  isIndependent,
  upperHalfTogether,
} from "@/app/(workspace)/portfolio/dependence/_components/rank-words";
import {
  readRank,
  readSetText,
  setTextOf,
  type SetText,
} from "@/app/(workspace)/portfolio/dependence/_components/set-text";

const saltmarrow = "0198f0aa-5c1e-7000-8000-0000000000b1";
const corrith = "0198f0aa-5c1e-7000-8000-0000000000b2";
const basins = [{ id: saltmarrow }, { id: corrith }];
const fields = [
  { id: "f1", name: "Pellow North", basinId: saltmarrow, basinName: "Saltmarrow" },
  { id: "f2", name: "Pellow South", basinId: saltmarrow, basinName: "Saltmarrow" },
  { id: "f3", name: "Hollin Deep", basinId: corrith, basinName: "Corrith" },
];
const dependence = {
  portfolioRank: 0.05,
  basinRanks: { [saltmarrow]: 0.28 },
  otherBasinsRank: 0.1,
  sharedFactors: [{ name: "Survey", note: "One depth map.", rank: 0.2, fieldIds: ["f1", "f3"] }],
};
const typed = (change: Partial<SetText> = {}): SetText => ({
  ...setTextOf({ name: "View", note: "", dependence }),
  ...change,
});

describe("upperHalfTogether(rank)", () => {
  it("is twice the orthant probability of SciPy 1.17.1's bivariate normal", () => {
    // 2 * scipy.stats.multivariate_normal([0, 0], [[1, rho], [rho, 1]]).cdf([0, 0]), rho = 2 sin(pi rank / 6)
    expect(upperHalfTogether(0.1)).toBeCloseTo(0.5333792465, 9);
    expect(upperHalfTogether(0.3)).toBeCloseTo(0.6012900605, 9);
    expect(upperHalfTogether(0.7)).toBeCloseTo(0.7543646867, 9);
  });

  it("is a half for nothing in common and one for always together", () => {
    expect(upperHalfTogether(0)).toBe(0.5);
    expect(upperHalfTogether(1)).toBeCloseTo(1, 7);
  });
});

describe("readRank(text)", () => {
  it("takes a decimal point or comma", () => {
    expect(readRank(" 0.3 ")).toEqual({ rank: 0.3 });
    expect(readRank("0,25")).toEqual({ rank: 0.25 });
    expect(readRank("0")).toEqual({ rank: 0 });
  });

  it("says why something is no rank correlation", () => {
    expect(readRank("")).toEqual({ fault: "Give a number, such as 0.3." });
    expect(readRank("-0.2")).toEqual({ fault: "Give a number, such as 0.3." });
    expect(readRank("1")).toEqual({ fault: "At most 0.99: at 1 no two could ever differ." });
    expect(readRank("0", 0.01)).toEqual({ fault: "At least 0.01." });
  });
});

describe("readSetText(text, basins, fields)", () => {
  it("comes back as the set it was typed from", () => {
    const { body, faults } = readSetText(typed(), basins, fields);
    expect(faults).toEqual({});
    expect(body).toEqual({ name: "View", note: "", dependence });
  });

  it("lets a basin without a figure follow the other basins", () => {
    const { body } = readSetText(typed({ basinRanks: { [saltmarrow]: " " } }), basins, fields);
    expect(body.dependence.basinRanks).toEqual({});
  });

  it("names what is missing at its place", () => {
    const factor = { key: "k", name: " ", note: "", rank: "2", fieldIds: ["f1"] };
    const { faults } = readSetText(
      typed({ name: "", otherBasinsRank: "half", sharedFactors: [factor] }),
      basins,
      fields,
    );
    expect(Object.keys(faults).sort()).toEqual([
      "name",
      "otherBasinsRank",
      "sharedFactors.0.fieldIds",
      "sharedFactors.0.name",
      "sharedFactors.0.rank",
    ]);
  });

  it("refuses a basin below the portfolio, by its name", () => {
    const { faults } = readSetText(typed({ portfolioRank: "0.3" }), basins, fields);
    expect(faults[`basinRanks.${saltmarrow}`]).toMatch(/^Saltmarrow has 0.28, below the 0.3/);
  });

  it("refuses a field that would share more than all of its spread, naming it and its factors", () => {
    const factor = (key: string) => ({
      key,
      name: key,
      note: "",
      rank: "0.5",
      fieldIds: ["f1", "f2"],
    });
    const { faults } = readSetText(
      typed({ sharedFactors: [factor("Survey"), factor("Plant")] }),
      basins,
      fields,
    );
    expect(faults["sharedFactors.1.fieldIds"]).toMatch(
      /Pellow North.*Survey \(0.5\), Plant \(0.5\)/,
    );
    // 2 sin(pi r / 6) of 0.28 and 0.5: 0.2921 + 2 x 0.5176 = 1.3274 (Pearson 1907).
    expect(faults["sharedFactors.1.fieldIds"]).toMatch(
      /comes to 1.33, and 1 is the most.*0.28 counts 0.29, 0.5 counts 0.52/,
    );
  });
});

describe("words about a set", () => {
  it("give the ranks within basins as one figure or from the least to the most", () => {
    expect(basinRankWords(dependence, [saltmarrow, corrith])).toBe("0.10 to 0.28");
    expect(basinRankWords(dependence, [saltmarrow])).toBe("0.28");
  });

  it("call a set independent when nothing in it moves together", () => {
    expect(isIndependent(dependence)).toBe(false);
    expect(
      isIndependent({
        portfolioRank: 0,
        basinRanks: { [corrith]: 0 },
        otherBasinsRank: 0,
        sharedFactors: [],
      }),
    ).toBe(true);
  });

  it("say what one set does against another, and nothing below half a percent", () => {
    expect(effectWords({ p90: 100, p10: 200 }, { p90: 92, p10: 212 })).toBe(
      "P90 8\u00a0% lower and P10 6\u00a0% higher",
    );
    expect(effectWords({ p90: 100, p10: 200 }, { p90: 100.3, p10: 199.5 })).toBe(
      "the same within half a percent",
    );
  });
});
