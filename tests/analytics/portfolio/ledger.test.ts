import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { normalScores } from "@/analytics/uncertainty/rank-correlation";
import { computeLedger, scoreCorrelation, type LedgerMember } from "@/analytics/portfolio/ledger";
import { rankTrials } from "@/analytics/portfolio/rank-trials";

const TRIALS = 20_000;

/** Standard normal quantile of 0.9 (NIST/SEMATECH e-Handbook of Statistical Methods, table 1.3.6.7.1: 1.282). */
const Z90 = 1.2815515655446004;

/** A reservoir whose every quantity is the normal distribution N(mean, sd), in order of size. */
function member(values: Partial<LedgerMember> & { mean?: number; sd?: number }): LedgerMember {
  const { mean = 100, sd = 10, ...rest } = values;
  const volumes = Float64Array.from(normalScores(TRIALS), (z) => mean + sd * z);
  return {
    id: "one",
    fieldId: "field-one",
    basinId: "basin",
    basinSlug: "basin",
    classId: "reserves",
    interest: 1,
    chance: 1,
    vectors: {
      wetGasInPlaceScf: volumes,
      dryGasInPlaceScf: volumes,
      condensateInPlaceStb: volumes,
      salesGasScf: volumes,
      condensateRecoverableStb: volumes,
    },
    ...rest,
  };
}

const pair = (values: Partial<LedgerMember> = {}) => [
  member({ id: "one", fieldId: "field-one", ...values }),
  member({ id: "two", fieldId: "field-two", ...values }),
];

const options = (rank: number) => ({
  seed: 7,
  basinRankCorrelations: { basin: rank, other: rank },
});
const condensate = (ledger: ReturnType<typeof computeLedger>) =>
  ledger.total.ranges.condensateRecoverableStb;

describe("scoreCorrelation(rankCorrelation)", () => {
  it("is 2 sin(pi r / 6) (Pearson 1907), the identity at 0 and 1", () => {
    expect(scoreCorrelation(0)).toBe(0);
    expect(scoreCorrelation(0.5)).toBeCloseTo(0.517638, 6);
    expect(scoreCorrelation(1)).toBeCloseTo(1, 12);
  });

  it("refuses what is no share", () => {
    expect(() => scoreCorrelation(1.2)).toThrow(DomainError);
    expect(() => scoreCorrelation(Number.NaN)).toThrow(DomainError);
  });
});

describe("computeLedger(members, options)", () => {
  // The sum of two normals with correlation rho is N(m1 + m2, s1^2 + s2^2 + 2 rho s1 s2), whatever is simulated.
  it.each([0, 0.3, 0.7])("gives the closed form for two normals of rank correlation %s", (rank) => {
    const total = condensate(computeLedger(pair(), options(rank)));
    const sd = Math.sqrt(2 * 10 ** 2 * (1 + scoreCorrelation(rank)));
    expect(total.mean).toBeCloseTo(200, 6);
    // Half a per cent of 200 is the sampling error of 20,000 trials several times over.
    expect(Math.abs(total.p90 - (200 - Z90 * sd))).toBeLessThan(0.5);
    expect(Math.abs(total.p10 - (200 + Z90 * sd))).toBeLessThan(0.5);
  });

  it("keeps basins independent, so that their variances add up to the portfolio's", () => {
    const [one, two] = pair();
    const ledger = computeLedger(
      [one, { ...two, basinId: "other", basinSlug: "other" }],
      options(0.9),
    );
    const { basin, other } = ledger.basins;
    const sum = basin.condensateVariance + other.condensateVariance;
    expect(ledger.total.condensateVariance / sum).toBeCloseTo(1, 1);
    expect(ledger.total.condensateVariance).toBeLessThan(230);
  });

  it("gives a field of one reservoir that reservoir's own percentiles, times the interest", () => {
    const { fields } = computeLedger([member({ interest: 0.4 })], options(0.2));
    const { p90, p50, p10, mean } = fields["field-one"].ranges.condensateRecoverableStb;
    expect(p50).toBeCloseTo(40, 6);
    expect(mean).toBeCloseTo(40, 6);
    expect(p90).toBeCloseTo(0.4 * (100 - Z90 * 10), 2);
    expect(p10).toBeCloseTo(0.4 * (100 + Z90 * 10), 2);
  });

  it("has the chance times the mean as risked mean, for fields and for the total", () => {
    const unrisked = computeLedger(pair(), options(0.2));
    const risked = computeLedger(pair({ chance: 0.35 }), options(0.2));
    expect(condensate(risked).mean / condensate(unrisked).mean).toBeCloseTo(0.35, 12);
  });

  it("has the sum of the fields' means as mean, and a P90 above the sum of their P90s", () => {
    const ledger = computeLedger(pair(), options(0.3));
    const ranges = Object.values(ledger.fields).map((field) => field.ranges.salesGasScf);
    const sum = (of: "mean" | "p90") => ranges.reduce((total, range) => total + range[of], 0);
    expect(ledger.total.ranges.salesGasScf.mean).toBeCloseTo(sum("mean"), 6);
    expect(ledger.total.ranges.salesGasScf.p90).toBeGreaterThan(sum("p90"));
  });

  it("adds classes across basins", () => {
    const [one, two] = pair();
    const members = [
      one,
      { ...two, basinId: "other", basinSlug: "other" },
      member({ id: "3", classId: "contingent" }),
    ];
    const { classes } = computeLedger(members, options(0.2));
    expect(classes.reserves.ranges.salesGasScf.mean).toBeCloseTo(200, 6);
    expect(classes.contingent.ranges.salesGasScf.mean).toBeCloseTo(100, 6);
  });

  it("gives the same numbers whatever the order of the members, and a field the same in any company", () => {
    const all = computeLedger(pair(), options(0.4));
    expect(computeLedger(pair().reverse(), options(0.4))).toEqual(all);
    const alone = computeLedger([pair()[1]], options(0.4));
    expect(alone.fields["field-two"].ranges).toEqual(all.fields["field-two"].ranges);
  });

  it("says how sure the sum of the P90s is", () => {
    const { chanceOfSummedP90 } = computeLedger(pair(), options(0));
    // 200 - 2 x 12.816 lies 25.63 / 14.14 = 1.812 standard deviations down: 96.5 % (standard normal tables).
    expect(chanceOfSummedP90).toBeCloseTo(0.965, 2);
  });
});

describe("rankTrials(vectors)", () => {
  it("counts how often each comes first, and between which ranks it lies in 80 % of trials", () => {
    const ranks = rankTrials({
      a: Float64Array.of(3, 1, 3, 3, 3, 3, 3, 3, 3, 3),
      b: Float64Array.of(2, 2, 2, 2, 2, 2, 2, 2, 2, 2),
      c: Float64Array.of(0, 0, 0, 0, 0, 0, 0, 0, 0, 0),
    });
    expect(ranks.a).toEqual({ low: 1, high: 1, chanceFirst: 0.9 });
    expect(ranks.b).toEqual({ low: 1, high: 2, chanceFirst: 0.1 });
    expect(ranks.c).toEqual({ low: 3, high: 3, chanceFirst: 0 });
  });

  it("gives equals the better place in the order of their ids, so that ranks are always 1 to n", () => {
    const ranks = rankTrials({ b: Float64Array.of(1, 1), a: Float64Array.of(1, 1) });
    expect([ranks.a.low, ranks.b.low]).toEqual([1, 2]);
  });
});
