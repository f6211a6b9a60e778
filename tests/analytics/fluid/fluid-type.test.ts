import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import {
  fluidTypeFromGasOilRatio,
  fluidTypeLabels,
  fluidTypes,
} from "@/analytics/fluid/fluid-type";

describe("fluidTypeFromGasOilRatio", () => {
  it.each([
    // limits 3,300 and 50,000: McCain, The Properties of Petroleum Fluids (1990); the others are common practice
    [Infinity, "wet-gas"],
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
