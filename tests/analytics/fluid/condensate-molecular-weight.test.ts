import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import {
  condensateMolecularWeight,
  molecularWeightWarnings,
  specificGravityFromApi,
} from "@/analytics/fluid/condensate-molecular-weight";

describe("specificGravityFromApi", () => {
  it("answers its example, and gives water 10 API", () => {
    expect(specificGravityFromApi(56)).toBeCloseTo(0.754667, 6);
    expect(specificGravityFromApi(10)).toBe(1);
  });

  it("refuses what is no liquid", () => {
    expect(() => specificGravityFromApi(-131.5)).toThrow(DomainError);
    expect(() => specificGravityFromApi(Number.NaN)).toThrow(DomainError);
  });
});

describe("condensateMolecularWeight", () => {
  it.each([
    // Cragoe (1929): formula from memory, evaluated separately
    [40, 178.4164],
    [50, 137.9592],
    [60, 112.4584],
  ])("gives a condensate of %d API by Cragoe", (api, expected) => {
    expect(condensateMolecularWeight(api)).toBeCloseTo(expected, 4);
  });

  it("agrees with the other printed form of Cragoe, 44.29 go / (1.03 - go), to 0.06 %", () => {
    for (const api of [40, 50, 60, 70]) {
      const gravity = specificGravityFromApi(api);
      const other = (44.29 * gravity) / (1.03 - gravity);
      expect(Math.abs(condensateMolecularWeight(api) / other - 1)).toBeLessThan(6e-4);
    }
  });

  it("differs from the form of Gold, McCain and Jennings by 4 to 7 % from 40 to 55 API", () => {
    // 5954 / (API - 8.811), JPT July 1989
    expect(condensateMolecularWeight(50, "gold-mccain-jennings")).toBeCloseTo(5954 / 41.189, 9);
    for (const api of [40, 45, 50, 55]) {
      const ratio =
        condensateMolecularWeight(api, "gold-mccain-jennings") / condensateMolecularWeight(api);
      expect(ratio).toBeGreaterThan(1.035);
      expect(ratio).toBeLessThan(1.075);
    }
  });

  it("refuses a gravity below the beginning of the correlation", () => {
    expect(() => condensateMolecularWeight(5.9)).toThrow(DomainError);
    expect(() => condensateMolecularWeight(8.8, "gold-mccain-jennings")).toThrow(DomainError);
  });
});

describe("molecularWeightWarnings", () => {
  it("asks for a laboratory value outside 35 to 75 API", () => {
    expect(molecularWeightWarnings(55)).toEqual([]);
    expect(molecularWeightWarnings(34)[0].code).toBe("molecular_weight_outside_range");
    expect(molecularWeightWarnings(76)).toHaveLength(1);
  });
});
