import { describe, expect, it } from "vitest";
import type { QuantitySummary } from "@/analytics/volumetrics/results-schema";
import { movedStandardErrors } from "@/services/runs/moved";

function quantity(p90: number, p50: number, p10: number, error: number): QuantitySummary {
  const standardErrors = { p90: error, p50: error, p10: error, mean: error };
  return { p90, p50, p10, standardErrors } as QuantitySummary;
}

describe("movedStandardErrors(before, after)", () => {
  it("divides the largest change by the error of the difference", () => {
    // 10 / sqrt(3^2 + 4^2) = 2, by hand
    const before = quantity(100, 200, 300, 3);
    expect(movedStandardErrors(before, quantity(101, 210, 299, 4))).toBeCloseTo(2, 12);
  });

  it("is 0 for the same figures, even when they do not vary", () => {
    expect(movedStandardErrors(quantity(5, 5, 5, 0), quantity(5, 5, 5, 0))).toBe(0);
    expect(movedStandardErrors(quantity(0, 0, 0, 0), quantity(0, 0, 0, 0))).toBe(0);
  });

  it("stays finite when a quantity that does not vary is another one", () => {
    const moved = movedStandardErrors(quantity(5, 5, 5, 0), quantity(6, 6, 6, 0));
    expect(moved).toBeGreaterThan(1e6);
    expect(Number.isFinite(moved)).toBe(true);
  });
});
