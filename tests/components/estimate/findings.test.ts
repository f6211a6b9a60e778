import { describe, expect, it } from "vitest";
import {
  caseSetWords,
  changeFinding,
  differenceFinding,
  driverFinding,
  rangeFinding,
  swingFinding,
} from "@/components/estimate/findings";
import { buildInputs } from "../../analytics/volumetrics/estimate-inputs";
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

describe("swingFinding(drivers, factor, unit)", () => {
  it("gives both ends of the widest swing, the lower first", () => {
    const saturation = { ...driver("waterSaturation", 0.1), swing: { atP90: 50e6, atP10: 30e6 } };
    expect(swingFinding([saturation], 1e-6, "MMSTB")).toBe(
      "Water saturation alone swings it furthest: from 30.0 to 50.0 MMSTB",
    );
    expect(swingFinding([], 1, "MMSTB")).toMatch(/every input is a constant/);
  });
});

describe("caseSetWords(inputs)", () => {
  it("names the inputs that take the same case", () => {
    const cases = {
      kind: "scenarios",
      caseSet: "Contact",
      scenarios: [
        { name: "Low", weight: 0.3, distribution: { kind: "constant", value: 1500 } },
        { name: "High", weight: 0.7, distribution: { kind: "constant", value: 3000 } },
      ],
    } as const;
    const tied = (...names: ("areaAcres" | "netThicknessFt")[]) =>
      caseSetWords(
        buildInputs(
          Object.fromEntries(
            names.map((name) => [name, { ...cases, scenarios: [...cases.scenarios] }]),
          ),
        ),
      );
    expect(tied("areaAcres", "netThicknessFt")).toMatch(
      /^Area and net thickness take the same case in every trial/,
    );
    expect(tied("areaAcres")).toBeNull();
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
