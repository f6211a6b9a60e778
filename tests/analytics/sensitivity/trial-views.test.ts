import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { createOrderWorkspace, quantileSorted } from "@/analytics/numerics/order-statistics";
import { averageRanks } from "@/analytics/sensitivity/average-ranks";
import { conditionalView } from "@/analytics/sensitivity/conditional";
import { valueOfKnowing } from "@/analytics/sensitivity/knowing";
import { rankRegression } from "@/analytics/sensitivity/rank-regression";
import reference from "../../fixtures/sensitivity.json";
import { combine, normalColumns } from "./normal-columns";

const ranked = (values: Float64Array) => averageRanks(values, createOrderWorkspace(values.length));
const ranksOf = (values: ArrayLike<number>) => ranked(Float64Array.from(values)).ranks;

describe("averageRanks", () => {
  it("gives equal values the mean of their ranks, as scipy.stats.rankdata does", () => {
    const { inputs, ranksOfThird } = reference.regression;
    expect([...ranksOf(inputs[2])]).toEqual(ranksOfThird);
  });
});

describe("rankRegression", () => {
  const { inputs, result, coefficients, rSquared } = reference.regression;
  const names = ["first", "second", "third", "fourth"] as const;
  const columns = inputs.map((values, i) => ({ name: names[i], ranks: ranksOf(values) }));

  it("gives the coefficients and R squared of numpy.linalg.lstsq, with correlated inputs and ties", () => {
    const found = rankRegression(columns, ranksOf(result));
    expect(found.rSquared).toBeCloseTo(rSquared, 12);
    names.forEach((name, i) => {
      const { coefficient } = found.coefficients.find(({ input }) => input === name) ?? {};
      expect(coefficient).toBeCloseTo(coefficients[i], 12);
    });
    expect(found.leftOut).toEqual([]);
  });

  it("has no coefficient for an input without spread", () => {
    const constant = { name: "fifth" as const, ranks: ranksOf(new Array(60).fill(3)) };
    const found = rankRegression([...columns, constant], ranksOf(result));
    expect(found.coefficients.map(({ input }) => input)).not.toContain("fifth");
    expect(found.rSquared).toBeCloseTo(rSquared, 12);
  });

  it("leaves out an input whose ranks follow from another's, and says so", () => {
    const twice = { name: "twice" as const, ranks: ranksOf(inputs[0].map((x) => 2 * x + 1)) };
    const found = rankRegression([...columns, twice], ranksOf(result));
    expect(found.coefficients).toHaveLength(4);
    expect(found.rSquared).toBeCloseTo(rSquared, 9);
    expect(found.leftOut).toEqual([
      {
        input: "twice",
        reason: "Its ranks follow from those of first, so that their effects cannot be told apart.",
      },
    ]);
  });

  it("counts two inputs that all but follow from each other as one, and keeps those merely correlated", () => {
    const [a, b, noise] = normalColumns(3, 10_000);
    const tied = (rho: number) => combine([rho, a], [Math.sqrt(1 - rho * rho), b]);
    const regression = (rho: number) => {
      const c = tied(rho);
      return rankRegression(
        [
          { name: "a", ranks: ranksOf(a) },
          { name: "c", ranks: ranksOf(c) },
        ],
        ranksOf(combine([1, a], [1, c], [0.5, noise])),
      );
    };
    const near = regression(0.99);
    // 1 - 0.99^2 is 2 % of own variance; corr(a + c + noise/2, a) = 1.99 / sqrt(2 + 2 x 0.99 + 0.25) = 0.968.
    expect(near.coefficients).toHaveLength(1);
    expect(near.coefficients[0].coefficient).toBeCloseTo(0.967, 2);
    expect(near.leftOut[0].reason).toMatch(/^Its ranks follow to 9[78] % from those of/);
    const merely = regression(0.9);
    expect(merely.leftOut).toEqual([]);
    const [first, second] = merely.coefficients.map(({ coefficient }) => coefficient);
    expect(first / second).toBeLessThan(1.15);
  });

  it("explains nothing of a result that does not vary", () => {
    const found = rankRegression(columns, ranksOf(new Array(60).fill(1)));
    expect(found.rSquared).toBe(0);
    expect(found.coefficients.every(({ coefficient }) => coefficient === 0)).toBe(true);
  });

  it("refuses fewer trials than it can tell inputs apart with", () => {
    const few = columns.map(({ name, ranks }) => ({ name, ranks: ranks.slice(0, 6) }));
    expect(() => rankRegression(few, ranksOf(result).slice(0, 6))).toThrow(DomainError);
  });
});

describe("valueOfKnowing", () => {
  function knowing(x: Float64Array, y: Float64Array) {
    const sorted = y.slice().sort();
    const width = quantileSorted(sorted, 0.9) - quantileSorted(sorted, 0.1);
    return valueOfKnowing(x, ranked(x), y, width);
  }
  const [a, b, noise, other] = normalColumns(4, 10_000);

  it("learns rho squared of the variance of a joint normal, and leaves sqrt(1 - rho^2) of the width", () => {
    for (const rho of [0, 0.3, 0.6, 0.9]) {
      const y = combine([rho, a], [Math.sqrt(1 - rho * rho), noise]);
      const { varianceRemoved, remainingWidth } = knowing(a, y);
      expect(Math.abs(varianceRemoved - rho * rho)).toBeLessThan(0.02);
      expect(Math.abs(remainingWidth - Math.sqrt(1 - rho * rho))).toBeLessThan(0.015);
    }
  });

  it("counts what is learned of a correlated input too", () => {
    // y = a + c, c correlated 0.8 with a: corr(y, a)^2 = (1 + 0.8)^2 / (1 + 1 + 2 x 0.8) = 0.9, though each has half.
    const c = combine([0.8, a], [0.6, b]);
    const { varianceRemoved, remainingWidth } = knowing(a, combine([1, a], [1, c]));
    expect(varianceRemoved).toBeCloseTo(0.9, 2);
    expect(remainingWidth).toBeCloseTo(Math.sqrt(0.1), 2);
  });

  it("learns from an input that no correlation shows", () => {
    // Var(a^2) = 2 and Var(noise) = 1, though a and a^2 + noise are uncorrelated: 2 / 3.
    const y = combine([1, a.map((x) => x * x)], [1, noise]);
    expect(knowing(a, y).varianceRemoved).toBeCloseTo(2 / 3, 1);
  });

  it("learns nothing from an input that does not matter, and all from the result itself", () => {
    expect(knowing(other, a).varianceRemoved).toBeLessThan(0.005);
    expect(knowing(a, a)).toEqual({
      varianceRemoved: expect.closeTo(1, 9),
      remainingWidth: expect.closeTo(0, 9),
    });
  });

  it("takes cases as they are", () => {
    // Two cases at -1 and 1 with noise of variance 1: half of the variance goes.
    const cases = a.map((x) => (x < 0 ? -1 : 1));
    expect(knowing(cases, combine([1, cases], [1, noise])).varianceRemoved).toBeCloseTo(0.5, 1);
  });

  it("refuses too few trials", () => {
    const short = a.slice(0, 50);
    expect(() => knowing(short, short)).toThrow(DomainError);
  });
});

describe("conditionalView", () => {
  const { correlation, meanOfInput, meanRank } = reference.abovePTen;
  const trials = 40_000;
  const [x, noise, other] = normalColumns(3, trials);
  const y = combine([correlation, x], [Math.sqrt(1 - correlation ** 2), noise]);
  const inputs = [
    { name: "other", values: other, ranking: ranked(other) },
    { name: "x", values: x, ranking: ranked(x) },
  ];
  const view = (from: number, to: number) => conditionalView(inputs, y, ranked(y), { from, to });

  it("has the conditional mean and mean rank of a bivariate normal above its P10", () => {
    // SciPy's multivariate_normal; the mean is rho phi(q) / 0.1.
    const { inputs: found, trials: chosen } = view(0.9, 1);
    expect(chosen).toBe(4_000);
    expect(found[0].input).toBe("x");
    expect(found[0].chosen.mean).toBeCloseTo(meanOfInput, 1);
    expect(Math.abs(found[0].meanRank - meanRank)).toBeLessThan(0.01);
    expect(found[0].all.mean).toBeCloseTo(0, 2);
    expect(Math.abs(found[1].meanRank - 0.5)).toBeLessThan(0.02);
  });

  it("chooses by the result: the lowest of the trials above P10 is at least P10", () => {
    const sorted = y.slice().sort();
    expect(view(0.9, 1).result.p90).toBeGreaterThanOrEqual(quantileSorted(sorted, 0.9));
    expect(view(0, 0.1).result.p10).toBeLessThanOrEqual(quantileSorted(sorted, 0.1));
  });

  it("takes every trial once in neighbouring intervals", () => {
    const counts = [0, 0.1, 0.3, 0.33, 0.9, 1].map((edge, i, edges) =>
      i === 0 ? 0 : view(edges[i - 1], edge).trials,
    );
    expect(counts.reduce((sum, n) => sum + n, 0)).toBe(trials);
    expect(view(0, 1).inputs.find(({ input }) => input === "x")?.meanRank).toBeCloseTo(0.5, 9);
  });

  it("refuses an interval without trials", () => {
    expect(() => view(0.5, 0.5)).toThrow(DomainError);
  });
});
