import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { shapley, type ValueOf } from "@/analytics/sensitivity/shapley";

const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);

describe("shapley", () => {
  it("divides the gloves as the textbook does", () => {
    // One left glove and two right ones; a pair is worth 1: 2/3, 1/6 and 1/6 (Shapley 1953; any textbook on games).
    const gloves: ValueOf = ([left, right, third]) => Number(left && (right || third));
    const { effects, orders, standardErrors } = shapley(3, gloves, 1);
    [2 / 3, 1 / 6, 1 / 6].forEach((share, i) => expect(effects[i]).toBeCloseTo(share, 12));
    expect({ orders, standardErrors }).toEqual({ orders: "all", standardErrors: null });
  });

  it("shares the costs of a runway as Littlechild and Owen do", () => {
    // Costs 1, 2, 4: 1/3, 1/3 + 1/2, 1/3 + 1/2 + 2 (Management Science 20 (1973) 370-372, the airport game's rule).
    const costs = [1, 2, 4];
    const runway: ValueOf = (landing) => Math.max(0, ...costs.filter((_, i) => landing[i]));
    const { effects } = shapley(3, runway, 1);
    [1 / 3, 5 / 6, 17 / 6].forEach((share, i) => expect(effects[i]).toBeCloseTo(share, 12));
  });

  it.each([4, 9])(
    "adds up, ignores a dummy and treats equals equally, with %i changes",
    (count) => {
      // A product in which change 1 does nothing and the last two do the same.
      const factor = [1.7, 1, ...new Array(count - 4).fill(0.6), 1.3, 1.3];
      const value: ValueOf = (made) => factor.reduce((all, f, i) => (made[i] ? all * f : all), 100);
      const { from, to, effects, standardErrors } = shapley(count, value, 7);
      expect(from).toBe(100);
      expect(sum(effects)).toBeCloseTo(to - from, 9);
      expect(effects[1]).toBe(0);
      const error = Math.hypot(...(standardErrors ?? [0]).slice(-2));
      expect(Math.abs(effects[count - 1] - effects[count - 2])).toBeLessThanOrEqual(
        3 * error + 1e-9,
      );
    },
  );

  it("is exact in every order for changes that add up, and says that it has no error", () => {
    const worth = [5, -3, 0, 8, 1, 1, -7, 2];
    const value: ValueOf = (made) => sum(worth.filter((_, i) => made[i]));
    const { effects, standardErrors, orders } = shapley(8, value, 3);
    expect(effects).toEqual(worth.map((one) => expect.closeTo(one, 12)));
    expect(standardErrors?.every((error) => error < 1e-12)).toBe(true);
    expect(orders).toBe(64);
  });

  it("states errors of drawn orders that cover the exact effects", () => {
    // A symmetric game of eight has 1/8 of the move for each, whatever its shape.
    const value: ValueOf = (made) => made.filter(Boolean).length ** 3;
    const truth = 8 ** 3 / 8;
    const misses = Array.from({ length: 60 }, (_, seed) => shapley(8, value, seed)).flatMap(
      ({ effects, standardErrors }) =>
        effects.map((effect, i) => Math.abs(effect - truth) / (standardErrors?.[i] ?? 0)),
    );
    const within = (width: number) => misses.filter((miss) => miss < width).length / misses.length;
    expect(within(1)).toBeGreaterThan(0.6);
    expect(within(2)).toBeGreaterThan(0.92);
  });

  it("asks for each set of changes once", () => {
    const asked = new Map<string, number>();
    const value: ValueOf = (made) => {
      const key = made.join();
      asked.set(key, (asked.get(key) ?? 0) + 1);
      return made.filter(Boolean).length;
    };
    shapley(6, value, 1);
    expect(asked.size).toBe(64);
    expect(Math.max(...asked.values())).toBe(1);
  });

  it("has nothing to share without changes, and refuses values that are none", () => {
    expect(shapley(0, () => 4, 1)).toMatchObject({ from: 4, to: 4, effects: [] });
    expect(() => shapley(2, () => NaN, 1)).toThrow(DomainError);
  });
});
