import { describe, expect, it } from "vitest";
import {
  changeFinding,
  differenceFinding,
  driverFinding,
  rangeFinding,
} from "@/components/estimate/findings";
import type { Driver } from "@/analytics/volumetrics/results-schema";

const driver = (input: Driver["input"], shareOfSpread: number): Driver => ({
  input,
  shareOfSpread,
  rankCorrelation: 0,
  swing: { atP90: 0, atP10: 0 },
});
const range = (p90: number, p10: number) => ({
  p90,
  p50: (p90 + p10) / 2,
  p10,
  mean: (p90 + p10) / 2,
});

describe("driverFinding(drivers)", () => {
  it("names one input when it makes most of the spread, else the first two", () => {
    expect(driverFinding([driver("areaAcres", 0.7), driver("porosity", 0.2)])).toMatch(
      /^Area makes 70.% of the spread$/,
    );
    expect(driverFinding([driver("netThicknessFt", 0.5), driver("areaAcres", 0.42)])).toMatch(
      /^Net thickness and area make 92.% of the spread$/,
    );
  });

  it("says so when every input is a constant", () => {
    expect(driverFinding([driver("areaAcres", 0)])).toMatch(/every input is a constant/);
  });
});

describe("changeFinding(now, before, unit)", () => {
  it("names the end that moved and the one that did not", () => {
    expect(changeFinding(range(6.4, 112), range(11.3, 111), "MMSTB")).toBe(
      "The low case fell from 11.3 to 6.40 MMSTB; the high case barely moved",
    );
  });

  it("does not call sampling noise a change", () => {
    expect(changeFinding(range(10.1, 100), range(10, 101), "MMSTB")).toMatch(
      /stands where it stood/,
    );
  });
});

describe("rangeFinding(now, unit)", () => {
  it("reads P90 and P10 as chances", () => {
    expect(rangeFinding(range(6.58, 22), "MMSTB")).toBe(
      "Nine chances in ten of at least 6.58 MMSTB, one in ten of 22.0 or more",
    );
  });
});

describe("differenceFinding(changed, total, revision)", () => {
  it("counts in words", () => {
    expect(differenceFinding(1, 10, 4)).toBe("One of ten inputs differs from r4");
    expect(differenceFinding(3, 10, 4)).toBe("Three of ten inputs differ from r4");
    expect(differenceFinding(10, 10, 4)).toBe("All inputs differ from r4");
  });
});
