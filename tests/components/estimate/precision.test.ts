import { describe, expect, it } from "vitest";
import { swansonMean } from "@/analytics/uncertainty/swanson";
import { swansonFinding, swansonReason } from "@/components/estimate/moment-findings";
import {
  enoughTrials,
  knownOf,
  precisionFinding,
  runWords,
} from "@/components/estimate/precision-words";

const plain = (text: string) => text.replace(/\s/g, " ");

/** Percentiles and mean of a lognormal with median 1 and the given spread of its logarithm. */
function lognormal(sigma: number) {
  // 1.2815516 is the 0.9 quantile of the standard normal distribution (Abramowitz and Stegun 1964, table 26.5).
  const half = Math.exp(1.2815516 * sigma);
  return { p90: 1 / half, p50: 1, p10: half, mean: Math.exp(sigma ** 2 / 2) };
}

describe("swansonMean", () => {
  it("is the mean of a normal distribution", () => {
    expect(swansonMean({ p90: 100 - 1.2815516 * 20, p50: 100, p10: 100 + 1.2815516 * 20 })).toBe(
      100,
    );
  });

  it("is within 1 % for a moderate lognormal and falls short of a wide one", () => {
    const moderate = lognormal(0.6);
    const wide = lognormal(1.5);
    expect(Math.abs(swansonMean(moderate) / moderate.mean - 1)).toBeLessThan(0.01);
    // by hand: (0.3 e^1.9223 + 0.4 + 0.3 e^-1.9223) / e^1.125 = 2.4948 / 3.0802
    expect(swansonMean(wide) / wide.mean).toBeCloseTo(0.81, 3);
  });
});

describe("swansonFinding", () => {
  it("says how far it is off, and which way", () => {
    expect(plain(swansonFinding(lognormal(0.5), 10, "MMSTB"))).toMatch(/agrees to 1 %$/);
    expect(plain(swansonFinding(lognormal(1.5), 10, "MMSTB"))).toMatch(
      /^Swanson’s mean falls 19 % short of the mean of 30\.8 MMSTB$/,
    );
    expect(swansonReason(lognormal(1.5))).toMatch(/P10 is 47 times P90/);
  });
});

describe("precisionFinding", () => {
  const quantity = {
    p90: 20,
    p50: 45,
    p10: 99,
    mean: 54,
    standardErrors: { p90: 0.01, p50: 0.02, p10: 1.2, mean: 0.01 },
  };

  it("names the percentile that is known least, with the digits that hold", () => {
    expect(knownOf(quantity, "p10", 1, 1_024)).toMatchObject({ digits: 1, enough: false });
    // 1.2 / 99 times 2.131, Student's t with 15 degrees of freedom
    expect(plain(precisionFinding(1_024, quantity, 1))).toBe(
      "1,024 trials are too few for three digits: P10 is known to ±2.6 %, one digit holds",
    );
  });

  it("is content when every digit shown holds", () => {
    const errors = { p90: 0.01, p50: 0.02, p10: 0.03, mean: 0.01 };
    expect(precisionFinding(65_536, { ...quantity, standardErrors: errors }, 1)).toBe(
      "65,536 trials hold all three digits of every percentile",
    );
  });
});

describe("enoughTrials", () => {
  const quantity = (error: number) => ({
    p90: 20,
    p50: 45,
    p10: 99,
    mean: 54,
    standardErrors: { p90: 0.01, p50: 0.02, p10: error, mean: 0.01 },
  });

  it("says how many would do, or that no run may have so many", () => {
    // by hand: an error of 0.2 has to fall to 0.05, so 16 times as many
    expect(enoughTrials({ trials: 1_000 }, quantity(0.2), 1)).toBe(
      "About 16,000 trials would be enough: P10 asks for the most.",
    );
    expect(enoughTrials({ trials: 1_000 }, quantity(5), 1)).toMatch(
      /^Three digits of P10 .* more than a run may have: read two/,
    );
    expect(enoughTrials({ trials: 1_000 }, quantity(0.01), 1)).toBeNull();
  });

  it("gives Sobol points a number that they can have", () => {
    // by hand: (0.158 / 0.05)^2 x 16,384 = 163,603, and the next power of two
    expect(enoughTrials({ trials: 16_384, sampling: "sobol" }, quantity(0.158), 1)).toMatch(
      /^About 262,144 trials/,
    );
  });
});

describe("runWords", () => {
  it("names the method, its replicates, the seed and the engine", () => {
    const run = { trials: 16_384, seed: 7, engineVersion: "2.0.0" };
    expect(runWords({ ...run, sampling: "sobol", replicates: 16 })).toBe(
      "Scrambled Sobol points in 16 independent replicates of 1,024, seed 7, engine 2.0.0",
    );
    expect(runWords({ ...run, engineVersion: "1.0.0" })).toBe(
      "Latin hypercube, seed 7, engine 1.0.0",
    );
  });
});
