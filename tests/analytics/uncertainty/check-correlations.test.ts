import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { checkCorrelations } from "@/analytics/uncertainty/check-correlations";

const order = ["area", "thickness", "porosity", "water", "pressure"] as const;
type Name = (typeof order)[number];
const pair = (a: Name, b: Name, rank: number) => ({ a, b, rank });
const check = (pairs: { a: Name; b: Name; rank: number }[]) =>
  checkCorrelations(order, pairs, (name) => name);

describe("checkCorrelations", () => {
  it("accepts what is possible, with the smallest eigenvalue of the scores", () => {
    // One pair: eigenvalues 1 - rho and 1 + rho with rho = 2 sin(pi r / 6)
    expect(check([pair("area", "porosity", 0.5)])).toEqual({
      possible: true,
      smallestEigenvalue: expect.closeTo(1 - 2 * Math.sin(Math.PI / 12), 12),
      reason: null,
      nearest: null,
    });
    expect(check([])).toMatchObject({ possible: true, smallestEigenvalue: 1 });
  });

  it("says which pairs contradict each other and proposes the nearest set", () => {
    const { possible, reason, nearest, smallestEigenvalue } = check([
      pair("area", "thickness", 0.9),
      pair("area", "porosity", 0.7),
      pair("thickness", "porosity", -0.9),
    ]);
    expect([possible, smallestEigenvalue < 0]).toEqual([false, true]);
    expect(reason).toContain(
      "area with thickness 0.9; area with porosity 0.7; thickness with porosity -0.9",
    );
    expect(nearest?.correlations.map(({ a, b }) => `${a} ${b}`)).toEqual([
      "area thickness",
      "area porosity",
      "thickness porosity",
    ]);
    // By symmetry the two strong ones are changed alike.
    const [first, , third] = nearest?.correlations ?? [];
    expect(first.rank).toBe(-third.rank);
    expect(nearest?.largestChange).toBeCloseTo(0.9 - first.rank, 10);
    expect(nearest?.added).toBe(0);
  });

  it.each([1, -1])("proposes for a correlation of %d what its reason asks for", (rank) => {
    const { reason, nearest } = check([pair("area", "thickness", rank)]);
    expect(reason).toContain("use at most 0.999.");
    const proposed = Math.abs(nearest?.correlations[0].rank ?? NaN);
    expect(proposed).toBeLessThanOrEqual(0.999);
    expect(proposed).toBeGreaterThan(0.99);
    // What it asks for is possible.
    expect(check([pair("area", "thickness", 0.999 * rank)]).possible).toBe(true);
  });

  it("counts pairs that were not listed and would no longer be 0", () => {
    const { nearest } = check([pair("area", "thickness", 0.9), pair("area", "porosity", 0.9)]);
    expect(nearest?.added).toBe(1);
    expect(nearest?.correlations.at(-1)).toMatchObject({ a: "thickness", b: "porosity" });
  });

  it("proposes only what it then finds possible", () => {
    const rank = fc.integer({ min: -100, max: 100 }).map((hundredths) => hundredths / 100);
    fc.assert(
      fc.property(fc.array(rank, { minLength: 10, maxLength: 10 }), (ranks) => {
        const pairs = order.flatMap((a, i) => order.slice(i + 1).map((b) => ({ a, b })));
        const asked = pairs.map((names, i) => ({ ...names, rank: ranks[i] }));
        const { nearest } = check(asked);
        if (nearest) expect(check(nearest.correlations).possible).toBe(true);
      }),
    );
  });

  it.each([
    [[pair("area", "area", 0.5)], "ties an input to itself"],
    [[pair("area", "water", 0.5), pair("water", "area", 0.5)], "is given twice"],
  ])("refuses pairs that make no matrix", (pairs, message) => {
    expect(() => check(pairs)).toThrow(DomainError);
    expect(() => check(pairs)).toThrow(message);
  });
});
