import { describe, expect, it } from "vitest";
import { setDifferences } from "@/app/(workspace)/portfolio/dependence/_components/set-differences";
import { setTextOf } from "@/app/(workspace)/portfolio/dependence/_components/set-text";

const basins = [
  { id: "b1", name: "Saltmarrow" },
  { id: "b2", name: "Corrith" },
];
const fields = [
  { id: "f1", name: "Pellow North" },
  { id: "f2", name: "Pellow South" },
  { id: "f3", name: "Hollin Deep" },
];
const set = {
  name: "View",
  note: "",
  dependence: {
    portfolioRank: 0.05,
    basinRanks: { b1: 0.28 },
    otherBasinsRank: 0.1,
    sharedFactors: [{ name: "Survey", note: "One depth map.", rank: 0.2, fieldIds: ["f3", "f1"] }],
  },
};

describe("setDifferences(theirs, mine, basins, fields)", () => {
  it("finds none between a set and itself, whatever the order of its fields and the spaces typed", () => {
    const mine = setTextOf(set);
    mine.name = "View ";
    mine.sharedFactors[0].fieldIds = ["f1", "f3"];
    expect(setDifferences(set, mine, basins, fields)).toEqual([]);
  });

  it("names every place with both values, in the words of the form", () => {
    const mine = {
      ...setTextOf(set),
      portfolioRank: "0.15",
      basinRanks: { b1: "", b2: "0.3" },
    };
    expect(setDifferences(set, mine, basins, fields)).toEqual([
      { what: "Anywhere in the portfolio", theirs: "0.05", mine: "0.15" },
      { what: "Both in Saltmarrow", theirs: "0.28", mine: "as other basins" },
      { what: "Both in Corrith", theirs: "as other basins", mine: "0.3" },
    ]);
  });

  it("says of factors what they add and to which fields, and that one side has none", () => {
    const mine = setTextOf(set);
    mine.sharedFactors = [
      { key: "k", name: "Plant", note: "", rank: "0.4", fieldIds: ["f1", "f2", "gone"] },
    ];
    expect(setDifferences(set, mine, basins, fields)).toEqual([
      {
        what: "Survey",
        theirs: "adds 0.2 to Hollin Deep and Pellow North (One depth map.)",
        mine: "nothing",
      },
      {
        what: "Plant",
        theirs: "nothing",
        mine: "adds 0.4 to a field that is gone, Pellow North and Pellow South",
      },
    ]);
  });
});
