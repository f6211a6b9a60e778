import { describe, expect, it } from "vitest";
import { binsOf, thickestFinding } from "@/components/estimate/histogram-section";

describe("thickestFinding", () => {
  const bins = binsOf({ histogram: { low: 2e6, high: 10e6, counts: [20, 50, 20, 10] } }, 1e-6);

  it("names the mode that the table has, not the middle of the fullest bar", () => {
    expect(thickestFinding({ mode: 3.77e6, mean: 5.9e6 }, bins, 1e-6)).toBe(
      "Trials lie thickest near 3.77; the long high side lifts the mean to 5.90",
    );
  });

  it("takes the middle of the fullest bar for a summary without a mode", () => {
    expect(thickestFinding({ mean: 5.5e6 }, bins, 1e-6)).toBe(
      "Trials lie thickest near 5.00, where the mean of 5.50 is too",
    );
  });

  it("says when the low side is the long one", () => {
    expect(thickestFinding({ mode: 8e6, mean: 6e6 }, bins, 1e-6)).toMatch(
      /long low side draws the mean down to 6\.00$/,
    );
  });
});
