import { describe, expect, it } from "vitest";
import { describeFit } from "@/analytics/uncertainty/describe-fit";
import { isContradicted, testNormality } from "@/analytics/uncertainty/goodness-of-fit";

const core = [
  0.121, 0.134, 0.142, 0.149, 0.151, 0.155, 0.158, 0.162, 0.163, 0.167, 0.171, 0.174, 0.178, 0.183,
  0.19, 0.204,
];
const skew = [12, 15, 15, 16, 18, 21, 24, 30, 41, 66, 90, 180];
const outlier = [4.1, 4.4, 4.4, 4.6, 4.9, 5.0, 5.2, 9.8];
const even = Array.from({ length: 150 }, (_, i) => (((i + 1) * 37) % 151) / 151);
const log = (values: number[]) => values.map(Math.log);

describe("testNormality", () => {
  // ad.test and lillie.test of nortest 1.0-4 in R 4.2.2
  it.each([
    ["core", core, 0.0754418347861, 0.998886384922, 0.0722189079843, 0.999935700519],
    ["ln core", log(core), 0.114912040858, 0.988428533397, 0.0873199830917, 0.986124766417],
    ["skew", skew, 1.52966742643, 0.000312520910313, 0.279149272091, 0.0104384250646],
    ["ln skew", log(skew), 0.560219679348, 0.116755228715, 0.186851506603, 0.293920749793],
    ["outlier", outlier, 1.44506836955, 0.000345624249364, 0.396508034591, 0.000524769033753],
    ["ln outlier", log(outlier), 1.10081921726, 0.00311267401685, 0.346177405204, 0.00539743215408],
    ["even", even, 1.63740780582, 0.000318605381747, 0.0597649474574, 0.211603787152],
    ["ln even", log(even), 6.50043797284, 5.09769306567e-16, 0.150506179788, 7.38375391793e-9],
  ])("agrees with R on %s", (_, values, a, aChance, d, dChance) => {
    const { andersonDarling, lilliefors } = testNormality(values);
    expect(andersonDarling.statistic).toBeCloseTo(a, 10);
    expect((andersonDarling.pValue ?? NaN) / aChance).toBeCloseTo(1, 8);
    expect(lilliefors.statistic).toBeCloseTo(d, 11);
    expect((lilliefors.pValue ?? NaN) / dChance).toBeCloseTo(1, 8);
  });

  it.each([
    // Shares of 200,000 normal samples of the same size with a larger statistic (NumPy 2, seed 7)
    ["ln skew", log(skew), 0.1188, 0.2875, 0.008],
    ["ln outlier", log(outlier), 0.0024, 0.0055, 0.001],
    ["core", core, 1, 0.9992, 0.002],
  ])("gives p-values that simulation confirms for %s", (_, values, aChance, dChance, tolerance) => {
    const { andersonDarling, lilliefors } = testNormality(values);
    expect(Math.abs((andersonDarling.pValue ?? NaN) - aChance)).toBeLessThan(tolerance);
    expect(Math.abs((lilliefors.pValue ?? NaN) - dChance)).toBeLessThan(tolerance);
  });

  it("gives no p-value by Anderson and Darling for fewer than 8 values", () => {
    const { andersonDarling, lilliefors } = testNormality([1, 2, 4, 4, 9]);
    expect(andersonDarling.pValue).toBeNull();
    expect(lilliefors.pValue).not.toBeNull();
  });

  it("stays finite for an outlier beyond the range of the distribution function", () => {
    const values = [...Array.from({ length: 1999 }, (_, i) => i / 1999), 1e6];
    const { andersonDarling, lilliefors } = testNormality(values);
    expect(andersonDarling.statistic).toBeGreaterThan(100);
    expect(andersonDarling.statistic).toBeLessThan(1e4);
    expect([andersonDarling.pValue, lilliefors.pValue]).toEqual([0, expect.closeTo(0, 12)]);
  });

  it("counts a fit as contradicted when either test does", () => {
    expect(isContradicted(testNormality(core))).toBe(false);
    expect(isContradicted(testNormality(even))).toBe(true);
  });
});

describe("describeFit", () => {
  it("reports both tests of data whichever shape was chosen, with the stairs of the values", () => {
    const fit = describeFit({ kind: "data", shape: "empirical", values: skew });
    if (fit?.kind !== "data") throw new Error("Not a fit of data.");
    expect(fit.sampleSize).toBe(12);
    expect(fit.parameters).toBeNull();
    expect(fit.mean).toBeCloseTo(44, 12);
    // sd() of R
    expect(fit.standardDeviation).toBeCloseTo(48.986083367, 8);
    expect(fit.tests.normal.contradicted).toBe(true);
    expect(fit.tests.normal.meaning).toContain("contradict a normal distribution");
    expect(fit.tests.lognormal?.contradicted).toBe(false);
    expect(fit.tests.lognormal?.meaning).toContain("not proof");
    expect(fit.stairs.values.slice(0, 3)).toEqual([12, 15, 16]);
    expect(fit.stairs.shares.slice(0, 3)).toEqual([1 / 12, 3 / 12, 4 / 12]);
  });

  it("draws 2,000 values with 200 stairs, the ends among them and each where it was", () => {
    const values = Array.from({ length: 2000 }, (_, i) => i + 1);
    const fit = describeFit({ kind: "data", shape: "empirical", values });
    if (fit?.kind !== "data") throw new Error("Not a fit of data.");
    const { values: stairs, shares } = fit.stairs;
    expect(stairs).toHaveLength(200);
    expect([stairs[0], stairs[199]]).toEqual([1, 2000]);
    stairs.forEach((value, i) => expect(shares[i]).toBe(value / 2000));
  });

  it("has no test of a lognormal for data that reach 0", () => {
    const fit = describeFit({ kind: "data", shape: "normal", values: [0, 1, 2, 3, 5] });
    expect(fit?.kind === "data" && fit.tests.lognormal).toBeNull();
  });

  it("gives the fit of maximum likelihood, divisor n", () => {
    const fit = describeFit({ kind: "data", shape: "normal", values: [2, 4, 4, 4, 5, 5, 7, 9] });
    // The textbook sample with a population standard deviation of exactly 2
    expect(fit).toMatchObject({ parameters: { mean: 5, standardDeviation: 2 } });
  });
});
