import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { createRandom } from "@/analytics/numerics/random";
import { createRankingWorkspace, rankByCounting } from "@/analytics/numerics/ranking";

describe("rankByCounting", () => {
  const rank = (values: ArrayLike<number>) => {
    const n = values.length;
    const ranks = new Uint32Array(n);
    const order = new Uint32Array(n);
    rankByCounting(values, n, createRankingWorkspace(n), ranks, order);
    return { ranks, order };
  };

  it("ranks from 0 and lists positions from smallest to largest", () => {
    const { ranks, order } = rank([30, 10, 20]);
    expect([...ranks]).toEqual([2, 0, 1]);
    expect([...order]).toEqual([1, 2, 0]);
  });

  it("agrees with sorting, ties in the order in which they stand", () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -1e6, max: 1e6, noNaN: true }), { minLength: 1, maxLength: 200 }),
        (values) => {
          const expected = values.map((_, i) => i).sort((a, b) => values[a] - values[b] || a - b);
          expect([...rank(values).order]).toEqual(expected);
        },
      ),
    );
  });

  it("survives values so skewed that nearly all share a key", () => {
    const words = new Uint32Array(5000);
    createRandom(11, 2).fill(words);
    const values = Float64Array.from(words, (word) => (word + 0.5) / 2 ** 32);
    values[17] = 1e15;
    const { order } = rank(values);
    for (let i = 1; i < 5000; i += 1)
      expect(values[order[i]]).toBeGreaterThanOrEqual(values[order[i - 1]]);
  });
});
