import { describe, expect, it } from "vitest";
import type { QuantitySummary } from "@/analytics/volumetrics/results-schema";
import { simulate } from "@/analytics/volumetrics/simulate";
import { movedShare, movedStandardErrors } from "@/services/runs/moved";
import { buildInputs } from "../../analytics/volumetrics/estimate-inputs";

function quantity(p90: number, p50: number, p10: number, error: number): QuantitySummary {
  const standardErrors = { p90: error, p50: error, p10: error, mean: error };
  return { p90, p50, p10, standardErrors } as QuantitySummary;
}

describe("movedStandardErrors(before, after)", () => {
  it("divides the largest change by the larger standard error of the two", () => {
    // 10 / 4, by hand
    const before = quantity(100, 200, 300, 3);
    expect(movedStandardErrors(before, quantity(101, 210, 299, 4))).toBeCloseTo(2.5, 12);
    expect(movedStandardErrors(quantity(101, 210, 299, 4), before)).toBeCloseTo(2.5, 12);
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

describe("movedShare(before, after)", () => {
  it("is the largest relative change of the three, with its sign", () => {
    // 1 %, -5 % and 0 %, by hand
    const before = { p90: 100, p50: 200, p10: 300, mean: 200 };
    expect(movedShare(before, { p90: 101, p50: 190, p10: 300, mean: 999 })).toBeCloseTo(-0.05, 12);
  });

  it("is 0 for the same figures, and no share of 0", () => {
    const nil = { p90: 0, p50: 0, p10: 5, mean: 1 };
    expect(movedShare(nil, nil)).toBe(0);
    expect(movedShare(nil, { ...nil, p50: 1 })).toBeNull();
  });
});

describe("a simulation again with the same inputs, trials, method and seed", () => {
  it("repeats every percentile exactly, so that a move can only be the engine's", () => {
    const again = () =>
      simulate(buildInputs(), { trials: 1_024, sampling: "latinHypercube", seed: 7 }).summary
        .results.condensateRecoverableStb;
    expect(movedStandardErrors(again(), again())).toBe(0);
    expect(movedShare(again(), again())).toBe(0);
  });
});
