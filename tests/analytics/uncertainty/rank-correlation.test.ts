import { describe, expect, it } from "vitest";
import { choleskyFactor } from "@/analytics/numerics/cholesky";
import { createRankingWorkspace, rankByCounting } from "@/analytics/numerics/ranking";
import {
  correlateScores,
  correlationBlocks,
  normalScores,
} from "@/analytics/uncertainty/rank-correlation";

const integers = (n: number) => new Uint32Array(n);

/**
 * The worked example of S. J. Mildenhall, Correlation and aggregate loss distributions with an emphasis on the
 * Iman-Conover method, CAS Forum, Winter 2006: twenty draws of four variables. Scores are given by the position of
 * each in the ascending list, results by the rank of each value of Y in its column.
 */
const MILDENHALL = {
  target: [1, 0.8, 0.4, 0, 0.8, 1, 0.3, -0.2, 0.4, 0.3, 1, 0.1, 0, -0.2, 0.1, 1],
  scores: [
    [0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14, 15, 16, 17, 18, 19],
    [17, 1, 19, 8, 15, 2, 5, 6, 3, 13, 7, 12, 9, 0, 11, 16, 4, 18, 10, 14],
    [3, 1, 15, 16, 12, 5, 17, 6, 11, 10, 2, 14, 8, 4, 19, 18, 0, 13, 9, 7],
    [6, 15, 5, 3, 19, 11, 7, 9, 14, 2, 13, 12, 17, 8, 0, 18, 16, 1, 10, 4],
  ],
  smallestScore: -1.92062,
  firstRowOfT: [-1.92062, -0.74213, -2.28105, -1.33232],
  ranksOfY: [
    [0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14, 15, 16, 17, 18, 19],
    [6, 0, 10, 2, 9, 1, 3, 7, 5, 12, 8, 14, 11, 4, 15, 17, 13, 18, 16, 19],
    [0, 1, 4, 16, 6, 7, 18, 5, 15, 8, 3, 14, 9, 12, 19, 17, 2, 11, 13, 10],
    [2, 14, 5, 6, 18, 12, 11, 7, 16, 1, 10, 13, 17, 8, 3, 19, 15, 0, 9, 4],
  ],
} as const;

describe("correlateScores", () => {
  const scores = normalScores(20);
  const columns = MILDENHALL.scores.map((positions) =>
    Float64Array.from(positions, (p) => scores[p]),
  );
  const factor = choleskyFactor(Float64Array.from(MILDENHALL.target), 4);
  if (!factor) throw new Error("The example's target is positive definite.");
  correlateScores(columns, 20, factor);

  it("starts from the scores of Mildenhall's example", () => {
    expect(scores[0]).toBeCloseTo(MILDENHALL.smallestScore, 5);
  });

  it("gives the first row of T of Mildenhall's example", () => {
    MILDENHALL.firstRowOfT.forEach((value, j) => expect(columns[j][0]).toBeCloseTo(value, 5));
  });

  it.each([0, 1, 2, 3])("puts column %d of Mildenhall's example in the published order", (j) => {
    const ranks = integers(20);
    rankByCounting(columns[j], 20, createRankingWorkspace(20), ranks, integers(20));
    expect([...ranks]).toEqual(MILDENHALL.ranksOfY[j]);
  });

  it("gives the scores exactly the target correlations", () => {
    for (let i = 0; i < 4; i += 1) {
      for (let j = 0; j < 4; j += 1) {
        const dot = columns[i].reduce((sum, value, t) => sum + value * columns[j][t], 0) / 20;
        expect(dot).toBeCloseTo(MILDENHALL.target[4 * i + j], 10);
      }
    }
  });

  it("refuses more inputs than the trials can tell apart", () => {
    const few = [0, 1].map(() => Float64Array.from([-1, 1]));
    expect(() => correlateScores(few, 2, Float64Array.from([1, 0, 0, 1]))).toThrow(
      "2 trials are too few to correlate 2 inputs",
    );
  });
});

describe("correlationBlocks", () => {
  const order = ["a", "b", "c", "d", "e"] as const;

  it("puts inputs that are tied through others in one block, in the given order", () => {
    const blocks = correlationBlocks(order, [
      { a: "c", b: "a", rank: 0.5 },
      { a: "e", b: "d", rank: -0.3 },
      { a: "a", b: "b", rank: 0.2 },
    ]);
    expect(blocks.map(({ names }) => names)).toEqual([
      ["a", "b", "c"],
      ["d", "e"],
    ]);
  });

  it("names the pairs that contradict each other", () => {
    expect(() =>
      correlationBlocks(order, [
        { a: "a", b: "b", rank: 0.9 },
        { a: "b", b: "c", rank: 0.9 },
        { a: "a", b: "c", rank: -0.5 },
        { a: "c", b: "d", rank: 0.1 },
      ]),
    ).toThrow(
      "contradict each other, no set of values can have them all: a with b 0.9; b with c 0.9; a with c -0.5.",
    );
  });

  it.each([
    [[{ a: "a", b: "a", rank: 0.5 }], "ties an input to itself"],
    [[{ a: "a", b: "b", rank: 1 }], "use at most 0.99"],
    [
      [
        { a: "a", b: "b", rank: 0.5 },
        { a: "b", b: "a", rank: 0.4 },
      ],
      "The correlation of b with a is given twice",
    ],
  ] as const)("refuses %j", (pairs, message) => {
    expect(() => correlationBlocks(order, pairs)).toThrow(message);
  });
});
