import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import {
  classifyFluid,
  fluidTypeFromGasOilRatio,
  fluidTypeLabels,
  fluidTypes,
} from "@/analytics/fluid/fluid-type";

describe("fluidTypeFromGasOilRatio", () => {
  it.each([
    // limits 3,300 and 50,000: McCain, The Properties of Petroleum Fluids (1990); the others are common practice
    [Infinity, "dry-gas"],
    [100001, "dry-gas"],
    [100000, "wet-gas"],
    [50001, "wet-gas"],
    [50000, "lean-condensate"],
    [20000, "condensate"],
    [12450, "condensate"],
    [6754, "condensate"],
    [6666, "rich-condensate"],
    [5000, "near-critical"],
    [3300, "near-critical"],
    [3299, "volatile-oil"],
  ] as const)("calls a fluid with %d scf/STB %s", (ratio, type) => {
    expect(fluidTypeFromGasOilRatio(ratio)).toBe(type);
  });

  it("has words for every type", () => {
    expect(Object.keys(fluidTypeLabels)).toEqual([...fluidTypes]);
  });

  it("refuses a ratio that is not positive", () => {
    expect(() => fluidTypeFromGasOilRatio(0)).toThrow(DomainError);
    expect(() => fluidTypeFromGasOilRatio(Number.NaN)).toThrow(DomainError);
  });
});

describe("classifyFluid", () => {
  const byHeptanesPlus = (heptanesPlusMoleFraction: number) =>
    classifyFluid({ heptanesPlusMoleFraction, surfaceGasOilRatioScfPerStb: null });

  it.each([
    // 4 and 12.5 mol %: McCain (1990); 0.7 mol %: McCain, J. Pet. Technol. (Sept. 1994); from memory
    [0, "dry-gas"],
    [0.0069, "dry-gas"],
    [0.007, "wet-gas"],
    [0.0399, "wet-gas"],
    [0.04, "condensate"],
    [0.0659, "condensate"],
    [0.1249, "condensate"],
    [0.125, "volatile-oil"],
  ] as const)("calls a mole fraction of %d heptanes plus %s", (moleFraction, type) => {
    expect(byHeptanesPlus(moleFraction).type).toBe(type);
  });

  it("says the rule with its figure and its source", () => {
    expect(byHeptanesPlus(0.0659)).toEqual({
      type: "condensate",
      label: "Gas condensate",
      rule: "6.59 mol % heptanes plus: 4 to 12.5 % is a gas condensate",
      source: "W. D. McCain, The Properties of Petroleum Fluids, 2nd ed. (1990), ch. 5",
    });
  });

  it.each([
    // both agree that it is a condensate: the gas-oil ratio says how rich
    [0.0659, 6754, "condensate"],
    [0.09, 5500, "rich-condensate"],
    [0.11, 4000, "near-critical"],
    // they disagree: the richer counts
    [0.02, 30_000, "lean-condensate"],
    [0.05, 60_000, "lean-condensate"],
    [0.12, 3_000, "volatile-oil"],
    [0.13, 4_000, "volatile-oil"],
    [0.001, 60_000, "wet-gas"],
  ] as const)("sets %d heptanes plus beside %d scf/STB as %s", (moleFraction, ratio, type) => {
    const fluid = classifyFluid({
      heptanesPlusMoleFraction: moleFraction,
      surfaceGasOilRatioScfPerStb: ratio,
    });
    expect(fluid.type).toBe(type);
    expect(fluid.label).toBe(fluidTypeLabels[type]);
  });

  it("says what the other figure had said", () => {
    expect(
      classifyFluid({ heptanesPlusMoleFraction: 0.02, surfaceGasOilRatioScfPerStb: 30_000 }).rule,
    ).toContain("The other figure says wet gas (2 mol % heptanes plus");
  });

  it("takes a gas without liquid", () => {
    const { type, rule } = classifyFluid({
      heptanesPlusMoleFraction: null,
      surfaceGasOilRatioScfPerStb: Infinity,
    });
    expect(type).toBe("dry-gas");
    expect(rule).toContain("no liquid at the surface");
  });

  it("refuses to guess from nothing and from impossible figures", () => {
    const refused = [
      { heptanesPlusMoleFraction: null, surfaceGasOilRatioScfPerStb: null },
      { heptanesPlusMoleFraction: 1.2, surfaceGasOilRatioScfPerStb: null },
      { heptanesPlusMoleFraction: null, surfaceGasOilRatioScfPerStb: -5 },
    ];
    for (const evidence of refused) expect(() => classifyFluid(evidence)).toThrow(DomainError);
  });
});
