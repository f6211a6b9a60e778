import { describe, expect, it } from "vitest";
import { createOrderWorkspace, rankByCounting } from "@/analytics/numerics/order-statistics";
import { createRandom, fillPermutation } from "@/analytics/numerics/random";
import {
  rollUp,
  summariseTotal,
  type RollUpMember,
  type RollUpOptions,
} from "@/analytics/portfolio/roll-up";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import { spearman } from "@/analytics/uncertainty/rank-correlation";

const options: RollUpOptions = {
  quantities: { condensate: "condensateRecoverableStb" },
  seed: 12,
  dependence: 0,
};

/** Trials of a lognormal in a random order, with a second vector tied to the first row by row. */
function member(id: string, trials: number, changes: Partial<RollUpMember> = {}): RollUpMember {
  const p = Float64Array.from({ length: trials }, (_, i) => (i + 0.5) / trials);
  const sorted = new Float64Array(trials);
  compileDistribution({ kind: "lognormalP90P10", p90: 50, p10: 200 }).fillQuantiles(
    p,
    trials,
    sorted,
  );
  const order = new Uint32Array(trials);
  fillPermutation(createRandom(99, Number(id.slice(1))), order, trials, new Uint32Array(trials));
  const condensate = Float64Array.from(order, (rank) => sorted[rank]);
  return {
    id,
    group: "basin",
    vectors: { condensateRecoverableStb: condensate, salesGasScf: condensate.map((v) => 1000 * v) },
    factors: { condensate: 1, gas: 1 },
    ...changes,
  };
}

const ten = (trials: number, changes: Partial<RollUpMember> = {}) =>
  Array.from({ length: 10 }, (_, i) => member(`r${i}`, trials, changes));

describe("rollUp", () => {
  /**
   * Ten identical lognormals, P90 50 and P10 200, under a one-factor normal copula. Mean and standard deviation are
   * exact (moments of lognormals); P90s from 400,000 plain draws, confirmed by the sum-of-lognormals approximation of
   * Fenton, IRE Trans. Commun. Syst. 8 (1960) 57-67 to 0.3 %.
   */
  const published = [
    { dependence: 0, p90: 902.5, standardDeviation: 213.3772 },
    { dependence: 0.3, p90: 715.5, standardDeviation: 395.1425 },
    { dependence: 0.7, p90: 574.5, standardDeviation: 565.2921 },
    { dependence: 1, p90: 500, standardDeviation: 674.758 },
  ];

  it.each(published)(
    "adds ten lognormals with dependence $dependence as theory does",
    { timeout: 60_000 },
    ({ dependence, p90, standardDeviation }) => {
      const { total } = rollUp(ten(50_000), { ...options, dependence });
      const summary = summariseTotal(total.vectors.condensate);
      expect(summary.mean / 1157.506).toBeCloseTo(1, 2);
      expect(Math.abs(summary.p90 / p90 - 1)).toBeLessThan(0.01);
      expect(Math.abs(summary.standardDeviation / standardDeviation - 1)).toBeLessThan(0.02);
    },
  );

  it("keeps the arithmetic sum of percentiles apart from the percentiles of the sum", () => {
    const { total } = rollUp(ten(20_000), options);
    expect(total.arithmeticSums.condensate.p90).toBeCloseTo(500, 0);
    expect(total.arithmeticSums.condensate.p10).toBeCloseTo(2000, 0);
    const { p90, mean } = summariseTotal(total.vectors.condensate);
    expect(p90).toBeGreaterThan(880);
    expect(total.arithmeticSums.condensate.mean).toBeCloseTo(mean, 6);
  });

  it("ties members of a group by (6 / pi) asin(rho / 2) in rank, and other groups not at all", () => {
    const n = 20_000;
    const alone = (id: string, group: string) =>
      rollUp([member(id, n, { group })], { ...options, dependence: 0.5 }).total.vectors.condensate;
    const ranks = (values: Float64Array) => {
      const out = new Uint32Array(n);
      rankByCounting(values, n, createOrderWorkspace(n), out, new Uint32Array(n));
      return out;
    };
    const first = ranks(alone("r1", "north"));
    const expected = (6 / Math.PI) * Math.asin(0.25);
    expect(Math.abs(spearman(first, ranks(alone("r2", "north")), n) - expected)).toBeLessThan(0.02);
    expect(Math.abs(spearman(first, ranks(alone("r2", "south")), n))).toBeLessThan(0.03);
  });

  it("keeps the rows of a member whole", () => {
    const { total } = rollUp([member("r1", 500)], {
      ...options,
      quantities: { condensate: "condensateRecoverableStb", gas: "salesGasScf" },
      dependence: 0.4,
    });
    total.vectors.condensate.forEach((value, t) => expect(total.vectors.gas[t]).toBe(1000 * value));
  });

  it("multiplies by each quantity's own factor", () => {
    const half = member("r1", 400, { factors: { condensate: 0.5, value: 30 } });
    const { total } = rollUp([half], {
      ...options,
      quantities: { condensate: "condensateRecoverableStb", value: "condensateRecoverableStb" },
    });
    total.vectors.condensate.forEach((value, t) =>
      expect(total.vectors.value[t]).toBeCloseTo(60 * value, 9),
    );
  });

  it("multiplies every trial by the chance when risked by expectation, and not otherwise", () => {
    const risky = ten(1000, { chance: 0.4 });
    const mean = (risking: RollUpOptions["risking"]) =>
      summariseTotal(rollUp(risky, { ...options, risking }).total.vectors.condensate).mean;
    expect(mean("expectation") / mean("unrisked")).toBeCloseTo(0.4, 12);
  });

  it("totals by tag in the same pass", () => {
    const members = ten(300).map((one, i) => ({
      ...one,
      tags: { class: i < 4 ? "reserves" : "contingent" },
    }));
    const { total, groups } = rollUp(members, { ...options, groupBy: ["class"] });
    const { reserves, contingent } = groups.class;
    expect([reserves.members, contingent.members, total.members]).toEqual([4, 6, 10]);
    total.vectors.condensate.forEach((value, t) =>
      expect(reserves.vectors.condensate[t] + contingent.vectors.condensate[t]).toBeCloseTo(
        value,
        8,
      ),
    );
  });

  it("gives the same bytes whatever the order of the members", () => {
    const members = ten(300);
    const there = rollUp(members, { ...options, dependence: 0.3 });
    const back = rollUp([...members].reverse(), { ...options, dependence: 0.3 });
    expect(back.total.vectors.condensate).toEqual(there.total.vectors.condensate);
  });

  it("accepts trials in single precision", () => {
    const double = member("r1", 300);
    const single = {
      ...double,
      vectors: {
        condensateRecoverableStb: Float32Array.from(double.vectors.condensateRecoverableStb),
      },
    };
    const sums = [double, single].map(
      (one) => summariseTotal(rollUp([one], options).total.vectors.condensate).mean,
    );
    expect(sums[1] / sums[0]).toBeCloseTo(1, 6);
  });

  it("gives an empty total for no members", () => {
    const { trials, total } = rollUp([], options);
    expect([trials, total.members, total.vectors.condensate.length]).toEqual([0, 0, 0]);
  });

  it("does not change what it is given", () => {
    const one = member("r1", 300);
    const before = one.vectors.condensateRecoverableStb.slice();
    rollUp([one], { ...options, dependence: 0.5 });
    expect(one.vectors.condensateRecoverableStb).toEqual(before);
  });

  it.each<[string, RollUpMember[], Partial<RollUpOptions>]>([
    [
      "r1 has 200 trials and r0 has 100; trials are added one by one",
      [member("r0", 100), member("r1", 200)],
      {},
    ],
    ["r0 is in the sum twice", [member("r0", 100), member("r0", 100)], {}],
    ["r0 has no trials of oil", [member("r0", 100)], { quantities: { condensate: "oil" } }],
    [
      "r0 needs a factor of 0 or more for condensate",
      [member("r0", 100, { factors: { condensate: -1 } })],
      {},
    ],
    [
      "The chance of r0 lies between 0 and 1; 1.2 does not",
      [member("r0", 100, { chance: 1.2 })],
      {},
    ],
    [
      "The dependence within a group lies between 0 and 1",
      [member("r0", 100)],
      { dependence: -0.1 },
    ],
    ["The seed is a whole number", [member("r0", 100)], { seed: 0.5 }],
    ["Member r0 has no class to be grouped by", [member("r0", 100)], { groupBy: ["class"] }],
  ])("refuses: %s", (message, members, changes) => {
    expect(() => rollUp(members, { ...options, ...changes })).toThrow(message);
  });
});
