import { describe, expect, it } from "vitest";
import { createRandom } from "@/analytics/numerics/random";
import { alignFields, alignPieces, rollUp } from "@/analytics/portfolio/roll-up";
import { bytesOfFieldTrials, viewFieldTrials } from "@/analytics/portfolio/field-trials";
import { computeLedger } from "@/analytics/portfolio/ledger";
import { loadingsOf } from "@/analytics/portfolio/factor-model";
import { fieldOf, independent, optionsOf, rankOf, reservoirOf, sampleOf } from "./book";

const lognormal = { kind: "lognormalP90P10", p90: 50, p10: 200 } as const;
const ten = (trials: number) =>
  Array.from({ length: 10 }, (_, i) => fieldOf(`f${i}`, sampleOf(lognormal, trials, i + 1)));

describe("rollUp(fields, options)", () => {
  /**
   * Ten identical lognormals, P90 50 and P10 200, under a one-factor normal copula. Mean and standard deviation are
   * exact (moments of lognormals); P90s from 400,000 plain draws, confirmed by the sum-of-lognormals approximation of
   * Fenton, IRE Trans. Commun. Syst. 8 (1960) 57-67 to 0.3 %, whose P10s these are.
   */
  const published = [
    { rho: 0, p90: 902.5, p10: 1438.83, standardDeviation: 213.3772 },
    { rho: 0.3, p90: 715.5, p10: 1676.39, standardDeviation: 395.1425 },
    { rho: 0.7, p90: 574.5, p10: 1881.43, standardDeviation: 565.2921 },
    { rho: 1, p90: 500, p10: 2000, standardDeviation: 674.758 },
  ];

  it.each(published)(
    "adds ten lognormals of score correlation $rho as theory does",
    { timeout: 60_000 },
    ({ rho, p90, p10, standardDeviation }) => {
      const ledger = rollUp(ten(50_000), optionsOf(50_000, { otherBasinsRank: rankOf(rho) }));
      const { condensateRecoverableStb: total } = ledger.total;
      expect(total.mean / 1157.506).toBeCloseTo(1, 3);
      expect(Math.abs(total.p90 / p90 - 1)).toBeLessThan(0.01);
      expect(Math.abs(total.p10 / p10 - 1)).toBeLessThan(0.015);
      expect(Math.abs(ledger.condensate.standardDeviation / standardDeviation - 1)).toBeLessThan(
        0.02,
      );
    },
  );

  it("finds the published mean and P90 also from estimates with fewer and more trials than the total", () => {
    const fields = Array.from({ length: 10 }, (_, i) =>
      fieldOf(`f${i}`, sampleOf(lognormal, [2500, 10_000, 37_000][i % 3], i + 1)),
    );
    const { total } = rollUp(fields, optionsOf(10_000, { otherBasinsRank: rankOf(0.3) }));
    expect(total.condensateRecoverableStb.mean / 1157.506).toBeCloseTo(1, 2);
    expect(Math.abs(total.condensateRecoverableStb.p90 / 715.5 - 1)).toBeLessThan(0.02);
  });

  /**
   * One standard error should hold the truth in at least 68 % of runs, and two in 95 %. The truth is the mean of many
   * runs, whose members are plain random draws made afresh each time: what a Latin hypercube would do better.
   */
  it(
    "states standard errors that hold over many runs, on the safe side",
    { timeout: 60_000 },
    () => {
      const runs = 100;
      const trials = 1000;
      const values = sampleOf(lognormal, 20_000).sort();
      const words = new Uint32Array(trials);
      const found = Array.from({ length: runs }, (_, run) => {
        const fields = Array.from({ length: 4 }, (_, i) => {
          createRandom(run, i).fill(words);
          const drawn = Float64Array.from(words, (word) => values[word % values.length]);
          return fieldOf(`f${i}`, drawn);
        });
        const options = optionsOf(trials, { otherBasinsRank: 0.3 }, { seed: run });
        const ledger = rollUp(fields, options);
        return { range: ledger.total.condensateRecoverableStb, ...ledger.condensate };
      });
      for (const name of ["p90", "p50", "p10", "mean"] as const) {
        const truth = found.reduce((sum, { range }) => sum + range[name], 0) / runs;
        const within = (times: number) =>
          found.filter(
            ({ range, standardErrors }) =>
              Math.abs(range[name] - truth) <= times * standardErrors[name],
          ).length / runs;
        // 68 % and 95 %, less two of their own errors in 100 runs.
        expect(within(1), name).toBeGreaterThan(0.68 - 2 * 0.047);
        expect(within(2), name).toBeGreaterThan(0.95 - 2 * 0.022);
        expect(within(1), `${name} is not wide of the mark`).toBeLessThan(0.95);
      }
    },
  );

  it("accepts trials in single precision", () => {
    const double = sampleOf(lognormal, 300);
    const [one, other] = [double, Float32Array.from(double)].map(
      (values) =>
        rollUp([fieldOf("a", values)], optionsOf(300)).total.condensateRecoverableStb.mean,
    );
    expect(one).toBe(other);
  });
});

describe("alignPieces(pieces, options)", () => {
  it("gives the same bytes whether a field comes whole or reservoir by reservoir", () => {
    const dependence = { ...independent, otherBasinsRank: 0.3 };
    const reservoirs = ["a/x", "a/y", "a/z"].map((id, i) =>
      reservoirOf(id, sampleOf(lognormal, 200, i + 1)),
    );
    const field = { ...fieldOf("a", new Float64Array(1)), chance: 0.6, reservoirs };
    const [whole] = alignFields([field], { trials: 200, seed: 9, dependence });

    const buffer = new SharedArrayBuffer(bytesOfFieldTrials(200));
    const loadings = loadingsOf(dependence, {
      fieldId: field.id,
      basinId: field.basinId,
      basinSlug: field.basinSlug,
    });
    const figures = reservoirs.flatMap((reservoir, i) =>
      alignPieces(
        [{ slug: "a", chance: 0.6, loadings, buffer, reservoirs: [reservoir], isLast: i === 2 }],
        { trials: 200, seed: 9 },
      ),
    );
    expect(figures.slice(0, 2)).toEqual([null, null]);
    expect(figures[2]).toEqual(whole.figures);
    const pieced = { ...whole, trials: viewFieldTrials(buffer, 200) };
    const options = { risk: "yesNo", withRanks: true } as const;
    expect(computeLedger([pieced], options)).toEqual(computeLedger([whole], options));
  });
});
