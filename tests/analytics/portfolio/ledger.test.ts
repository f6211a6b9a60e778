import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { quantileSorted } from "@/analytics/numerics/order-statistics";
import { scoreCorrelation } from "@/analytics/portfolio/factor-model";
import { computeLedger, type Ledger } from "@/analytics/portfolio/ledger";
import { rankTrials } from "@/analytics/portfolio/rank-trials";
import { alignFields, rollUp, type RollUpField } from "@/analytics/portfolio/roll-up";
import { normalScores } from "@/analytics/uncertainty/rank-correlation";
import { fieldOf, optionsOf, rankOf, sampleOf } from "./book";

const TRIALS = 20_000;

/** Standard normal quantile of 0.9 (NIST/SEMATECH e-Handbook of Statistical Methods, table 1.3.6.7.1: 1.282). */
const Z90 = 1.2815515655446004;

/** A field of the normal distribution N(mean, sd). */
const normalField = (slug: string, mean: number, sd: number, changes: Partial<RollUpField> = {}) =>
  fieldOf(
    slug,
    Float64Array.from(normalScores(TRIALS), (z) => mean + sd * z),
    changes,
  );

const pair = (changes: Partial<RollUpField> = {}) => [
  normalField("one", 100, 10, changes),
  normalField("two", 100, 10, changes),
];
const southern = { basinId: "id-south", basinSlug: "south" };

const condensate = (ledger: Ledger) => ledger.total.condensateRecoverableStb;
const sumOf = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0);

describe("computeLedger(fields, options)", () => {
  // The sum of two normals with correlation rho is N(m1 + m2, s1^2 + s2^2 + 2 rho s1 s2), whatever is simulated.
  it.each([0, 0.3, 0.7])("gives the closed form for two normals of rank correlation %s", (rank) => {
    const ledger = rollUp(pair(), optionsOf(TRIALS, { otherBasinsRank: rank }));
    const total = condensate(ledger);
    const sd = Math.sqrt(2 * 10 ** 2 * (1 + scoreCorrelation(rank)));
    expect(total.mean).toBeCloseTo(200, 5);
    expect(Math.abs(ledger.condensate.standardDeviation / sd - 1)).toBeLessThan(0.015);
    // Half a per cent of 200 is the sampling error of 20,000 trials several times over.
    expect(Math.abs(total.p90 - (200 - Z90 * sd))).toBeLessThan(0.5);
    expect(Math.abs(total.p10 - (200 + Z90 * sd))).toBeLessThan(0.5);
  });

  /**
   * Under the factor model of normal scores, four normals have Var = sum of s_i s_j rho_ij, with rho_ij the sum of the
   * shares in common: basins 0.3 and 0.5, any two 0.2, and one shared factor of 0.25 across basins (all as scores).
   */
  it("has the closed form's variance and shares with a portfolio, basins and a shared factor", () => {
    const fields = [
      normalField("a", 100, 10),
      normalField("b", 50, 20),
      normalField("c", 80, 5, southern),
      normalField("d", 60, 15, southern),
    ];
    const ledger = rollUp(
      fields,
      optionsOf(TRIALS, {
        portfolioRank: rankOf(0.2),
        basinRanks: { "id-north": rankOf(0.3), "id-south": rankOf(0.5) },
        otherBasinsRank: rankOf(0.2),
        sharedFactors: [
          { name: "Plant", note: "", rank: rankOf(0.25), fieldIds: ["id-b", "id-d"] },
        ],
      }),
    );
    const sd = [10, 20, 5, 15];
    const rho = [
      [1, 0.3, 0.2, 0.2],
      [0.3, 1, 0.2, 0.45],
      [0.2, 0.2, 1, 0.5],
      [0.2, 0.45, 0.5, 1],
    ];
    const covariance = sd.map((s, i) => sumOf(sd.map((other, j) => s * other * rho[i][j])));
    const variance = sumOf(covariance);
    expect(Math.abs(ledger.condensate.standardDeviation ** 2 / variance - 1)).toBeLessThan(0.03);
    ["a", "b", "c", "d"].forEach((slug, i) => {
      const { contribution } = ledger.fields[`id-${slug}`];
      expect(Math.abs(contribution.shareOfVariance - covariance[i] / variance)).toBeLessThan(0.015);
      // Euler's allocation for jointly normal members: mu_i + Cov(X_i, S) / Var(S) (q - mu_S) (Tasche 1999).
      const mean = [100, 50, 80, 60][i];
      const at = (q: number) => mean + (covariance[i] / variance) * (q - 290);
      const total = condensate(ledger);
      // 2,000 trials around each percentile leave an error of about 3 % of the field's own deviation.
      expect(Math.abs(contribution.p90 - at(total.p90))).toBeLessThan(0.1 * sd[i]);
      expect(Math.abs(contribution.p50 - at(total.p50))).toBeLessThan(0.1 * sd[i]);
      expect(Math.abs(contribution.p10 - at(total.p10))).toBeLessThan(0.1 * sd[i]);
    });
    const north = ledger.basins["id-north"].shareOfVariance;
    expect(Math.abs(north - (covariance[0] + covariance[1]) / variance)).toBeLessThan(0.015);
  });

  /**
   * Four normals by the factor model, whose contributions are known in closed form (Tasche 1999, above). Over 60 seeds,
   * 95 % of 720 contributions would lie within 1.96 standard errors if these were exact; evenly spread trials know the
   * percentile of the total better than that.
   */
  it("has standard errors that cover the closed form of contributions", () => {
    const trials = 4000;
    const sd = [10, 20, 5, 15];
    const rho = scoreCorrelation(0.3);
    const fields = sd.map((s, i) =>
      fieldOf(
        `f${i}`,
        Float64Array.from(normalScores(trials), (z) => 100 + s * z),
      ),
    );
    const covariance = sd.map((s, i) =>
      sumOf(sd.map((other, j) => s * other * (i === j ? 1 : rho))),
    );
    const variance = sumOf(covariance);
    const quantile = { p90: -Z90, p50: 0, p10: Z90 };
    let [covered, all] = [0, 0];
    const ratios: number[] = [];
    for (let seed = 1; seed <= 60; seed += 1) {
      const ledger = rollUp(fields, optionsOf(trials, { otherBasinsRank: 0.3 }, { seed }));
      sd.forEach((_, i) => {
        const { contribution, contributionErrors: errors } = ledger.fields[`id-f${i}`];
        for (const key of ["p90", "p50", "p10"] as const) {
          const truth = 100 + (covariance[i] / Math.sqrt(variance)) * quantile[key];
          const miss = (contribution[key] - truth) / errors[key];
          ratios.push(miss ** 2);
          if (Math.abs(miss) < 1.96) covered += 1;
          all += 1;
        }
      });
    }
    expect(covered / all).toBeGreaterThan(0.93);
    // Nor are they idle: the root mean square miss is more than half of one.
    expect(Math.sqrt(sumOf(ratios) / all)).toBeGreaterThan(0.5);
  });

  it("gives a lone field's contribution the errors of the total, and widens them with repeated rows", () => {
    const [alone] = alignFields([normalField("one", 100, 10)], optionsOf(TRIALS));
    const options = { risk: "unrisked", withRanks: false } as const;
    const { condensate: total, fields } = computeLedger([alone], options);
    const errors = fields["id-one"].contributionErrors;
    expect(errors.p90 / total.standardErrors.p90).toBeCloseTo(1, 6);
    expect(errors.mean / total.standardErrors.mean).toBeCloseTo(1, 6);
    const both = alignFields(pair(), optionsOf(TRIALS));
    const of = (sourceTrials: number) =>
      computeLedger(
        both.map((field) => ({ ...field, sourceTrials })),
        options,
      ).fields["id-one"].contributionErrors;
    expect(of(TRIALS / 4).p10 / of(TRIALS).p10).toBeCloseTo(2, 6);
  });

  it.each(["unrisked", "risked", "yesNo"] as const)(
    "has contributions that add up to the total's own figures when %s",
    (risk) => {
      const fields = Array.from({ length: 7 }, (_, i) =>
        fieldOf(`f${i}`, sampleOf({ kind: "lognormalP90P10", p90: 10 + i, p10: 80 }, 2000, i + 1), {
          chance: 0.3 + 0.1 * i,
          interest: 0.5,
          ...(i % 2 ? southern : {}),
        }),
      );
      const dependence = { portfolioRank: 0.1, otherBasinsRank: 0.3 };
      const ledger = rollUp(fields, optionsOf(2000, dependence, { risk }));
      const contributions = Object.values(ledger.fields).map(({ contribution }) => contribution);
      for (const name of ["p90", "p50", "p10", "mean"] as const) {
        const sum = sumOf(contributions.map((one) => one[name]));
        expect(sum / condensate(ledger)[name]).toBeCloseTo(1, 9);
      }
      const shares = contributions.map(({ shareOfVariance }) => shareOfVariance);
      expect(sumOf(shares)).toBeCloseTo(1, 9);
      for (const groups of [ledger.basins, ledger.classes]) {
        const shareOf = Object.values(groups).map(({ shareOfVariance }) => shareOfVariance);
        expect(sumOf(shareOf)).toBeCloseTo(1, 9);
      }
    },
  );

  it("gives a field of one reservoir that reservoir's own percentiles, times the interest", () => {
    const { fields } = rollUp(
      [normalField("one", 100, 10, { interest: 0.4 })],
      optionsOf(TRIALS, { otherBasinsRank: 0.2 }),
    );
    const { p90, p50, p10, mean } = fields["id-one"].ranges.condensateRecoverableStb;
    expect(p50).toBeCloseTo(40, 5);
    expect(mean).toBeCloseTo(40, 5);
    expect(p90).toBeCloseTo(0.4 * (100 - Z90 * 10), 2);
    expect(p10).toBeCloseTo(0.4 * (100 + Z90 * 10), 2);
  });

  it("has the chance times the mean as risked mean, for fields and for the total", () => {
    const options = optionsOf(TRIALS, { otherBasinsRank: 0.2 });
    const unrisked = rollUp(pair(), options);
    const risked = rollUp(pair({ chance: 0.35 }), { ...options, risk: "risked" });
    expect(condensate(risked).mean / condensate(unrisked).mean).toBeCloseTo(0.35, 12);
    expect(risked.chanceOfNothing).toBeNull();
  });

  /**
   * A field of mean m and deviation s that comes with chance p, independently: mean p m, variance
   * p s^2 + p (1 - p) m^2 (law of total variance); of two, nothing comes with chance (1 - p)^2.
   */
  it("draws each field's coming by itself: means, variances and the chance of nothing of the mixture", () => {
    const chance = 0.35;
    const ledger = rollUp(pair({ chance }), optionsOf(TRIALS, {}, { risk: "yesNo" }));
    const variance = 2 * (chance * 10 ** 2 + chance * (1 - chance) * 100 ** 2);
    const error = Math.sqrt(variance / TRIALS);
    expect(Math.abs(condensate(ledger).mean - 2 * chance * 100)).toBeLessThan(3 * error);
    expect(Math.abs(ledger.condensate.standardDeviation ** 2 / variance - 1)).toBeLessThan(0.03);
    expect(ledger.chanceOfNothing).toBeCloseTo(0.65 ** 2, 12);
    const { exceedance } = ledger.condensate;
    const nothing = 1 - exceedance.probabilities[exceedance.values.findIndex((value) => value > 0)];
    // The curve has steps of 0.01; the sampling error of 0.4225 is 0.0035.
    expect(Math.abs(nothing - 0.65 ** 2)).toBeLessThan(0.02);
    // With a chance of 35 % there is nothing in P90 and P50, and P10 is the field's own: 1 - 0.1 / 0.35 of the way up.
    const own = ledger.fields["id-one"].ranges.condensateRecoverableStb;
    expect([own.p90, own.p50]).toEqual([0, 0]);
    // Standard normal quantile of 0.7142857: 0.5659 (tables).
    expect(Math.abs(own.p10 - 105.659)).toBeLessThan(0.5);
  });

  it("has the R-7 percentiles of a field's draws, zeros and all", () => {
    const share = 0.47;
    const [field] = alignFields(
      [fieldOf("one", sampleOf({ kind: "uniform", low: 10, high: 20 }, 501), { chance: share })],
      optionsOf(501),
    );
    const { volumes, comes } = field.trials;
    const drawn = volumes.condensateRecoverableStb.map((value, t) => value * comes[t]).sort();
    const { yesNo } = field.figures;
    // `quantileSorted` is checked against published values in its own test.
    expect(yesNo.condensateRecoverableStb.p10).toBeCloseTo(quantileSorted(drawn, 0.9), 5);
    expect(yesNo.condensateRecoverableStb.p50).toBe(0);
    expect(yesNo.condensateRecoverableStb.mean).toBeCloseTo(sumOf([...drawn]) / 501, 5);
    const [even] = alignFields(
      [fieldOf("one", Float64Array.of(4, 6, 8, 10, 12, 14), { chance: 0.5 })],
      optionsOf(6),
    );
    const six = even.trials.volumes.condensateRecoverableStb
      .map((value, t) => value * even.trials.comes[t])
      .sort();
    // Half of an even number of trials: the median lies midway between the last zero and the smallest success.
    expect(even.figures.yesNo.condensateRecoverableStb.p50).toBeCloseTo(six[3] / 2, 6);
  });

  it("has the sum of the fields' means as mean, a P90 above the sum of their P90s and a P10 below theirs", () => {
    const ledger = rollUp(pair(), optionsOf(TRIALS, { otherBasinsRank: 0.3 }));
    const sum = (of: "mean" | "p90" | "p10") =>
      sumOf(Object.values(ledger.fields).map(({ ranges }) => ranges.salesGasScf[of]));
    expect(ledger.total.salesGasScf.mean / sum("mean")).toBeCloseTo(1, 9);
    // Summed percentiles are conservative at P90 and optimistic at P10 (Guidelines for Application of the Petroleum
    // Resources Management System, 2011, chapter 6; the direction, from memory).
    expect(ledger.total.salesGasScf.p90).toBeGreaterThan(sum("p90"));
    expect(ledger.total.salesGasScf.p10).toBeLessThan(sum("p10"));
  });

  it("adds classes across basins", () => {
    const [one, two] = pair();
    const fields = [
      one,
      { ...two, ...southern },
      normalField("3", 100, 10, { classId: "contingent" }),
    ];
    const { classes, basins } = rollUp(fields, optionsOf(TRIALS));
    expect(classes.reserves.ranges.condensateRecoverableStb.mean).toBeCloseTo(200, 4);
    expect(classes.contingent.ranges.condensateRecoverableStb.mean).toBeCloseTo(100, 4);
    expect(basins["id-north"].ranges.condensateRecoverableStb.mean).toBeCloseTo(200, 4);
  });

  it("gives the same bytes whatever the order of the fields, and a field the same in any company", () => {
    const options = optionsOf(TRIALS, { portfolioRank: 0.1, otherBasinsRank: 0.4 });
    const all = rollUp(pair(), { ...options, withRanks: true });
    expect(rollUp(pair().reverse(), { ...options, withRanks: true })).toEqual(all);
    const alone = rollUp([pair()[1]], options);
    expect(alone.fields["id-two"].ranges).toEqual(all.fields["id-two"].ranges);
  });

  it("says how sure the sum of the P90s is", () => {
    const { chanceOfSummedP90 } = rollUp(pair(), optionsOf(TRIALS));
    // 200 - 2 x 12.816 lies 25.63 / 14.14 = 1.812 standard deviations down: 96.5 % (standard normal tables).
    expect(chanceOfSummedP90).toBeCloseTo(0.965, 2);
  });

  it("widens its standard errors where a field has fewer trials behind it than the total", () => {
    const fields = pair();
    const aligned = alignFields(fields, optionsOf(TRIALS));
    const errors = (sourceTrials: number) =>
      computeLedger(
        aligned.map((field) => ({ ...field, sourceTrials })),
        { risk: "unrisked", withRanks: false },
      ).condensate.standardErrors;
    expect(errors(TRIALS / 4).p50 / errors(TRIALS).p50).toBeCloseTo(2, 6);
    expect(errors(TRIALS / 4).mean / errors(TRIALS).mean).toBeCloseTo(2, 6);
    // Two fields of deviation 10 and 20,000 independent trials: 10 sqrt(2 / 20,000).
    expect(errors(TRIALS).mean).toBeCloseTo(0.1, 3);
    expect(errors(TRIALS * 4)).toEqual(errors(TRIALS));
  });

  it("refuses nothing at all, a field twice, and an interest below 0", () => {
    const options = optionsOf(TRIALS);
    expect(() => rollUp([], options)).toThrow(DomainError);
    expect(() => rollUp([pair()[0], pair()[0]], options)).toThrow("one is in the sum twice");
    expect(() => rollUp(pair({ interest: -1 }), options)).toThrow("The interest in one");
  });
});

describe("rankTrials(members)", () => {
  const of = (id: string, ...values: number[]) => ({
    id,
    values: Float64Array.from(values),
    factor: 1,
    comes: null,
  });

  it("counts how often each comes first, and between which ranks it lies in 80 % of trials", () => {
    const ranks = rankTrials([
      of("a", 3, 1, 3, 3, 3, 3, 3, 3, 3, 3),
      of("b", 2, 2, 2, 2, 2, 2, 2, 2, 2, 2),
      of("c", 0, 0, 0, 0, 0, 0, 0, 0, 0, 0),
    ]);
    expect(ranks.a).toEqual({ low: 1, high: 1, chanceFirst: 0.9 });
    expect(ranks.b).toEqual({ low: 1, high: 2, chanceFirst: 0.1 });
    expect(ranks.c).toEqual({ low: 3, high: 3, chanceFirst: 0 });
  });

  it("ranks what is there, times its factor", () => {
    const ranks = rankTrials([
      { ...of("a", 3, 3), comes: Uint8Array.of(1, 0) },
      { ...of("b", 8, 8), factor: 0.25 },
    ]);
    expect([ranks.a.chanceFirst, ranks.b.chanceFirst]).toEqual([0.5, 0.5]);
  });

  it("gives equals the better place in the order of their ids, so that ranks are always 1 to n", () => {
    const ranks = rankTrials([of("b", 1, 1), of("a", 1, 1)]);
    expect([ranks.a.low, ranks.b.low]).toEqual([1, 2]);
  });
});
