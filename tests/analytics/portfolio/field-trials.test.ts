import { describe, expect, it } from "vitest";
import { createRankingWorkspace, rankByCounting } from "@/analytics/numerics/ranking";
import type { Dependence } from "@/analytics/portfolio/dependence-schema";
import {
  bytesOfFieldTrials,
  createAligner,
  viewFieldTrials,
} from "@/analytics/portfolio/field-trials";
import { alignFields } from "@/analytics/portfolio/roll-up";
import { spearman } from "../../support/spearman";
import { fieldOf, independent, rankOf, reservoirOf, sampleOf } from "./book";

const lognormal = { kind: "lognormalP90P10", p90: 50, p10: 200 } as const;
const TRIALS = 20_000;

const emptyField = (trials: number) =>
  viewFieldTrials(new ArrayBuffer(bytesOfFieldTrials(trials)), trials);

function ranksOf(values: ArrayLike<number>): Uint32Array {
  const count = values.length;
  const ranks = new Uint32Array(count);
  rankByCounting(values, count, createRankingWorkspace(count), ranks, new Uint32Array(count));
  return ranks;
}

/** Four fields: two in the north, two in the south; one of each follows a shared factor. */
function rankCorrelations(dependence: Dependence) {
  const at = (slug: string, basin: string, stream: number) =>
    fieldOf(slug, sampleOf(lognormal, TRIALS, stream), {
      basinId: `id-${basin}`,
      basinSlug: basin,
    });
  const fields = [
    at("a", "north", 1),
    at("b", "north", 2),
    at("c", "south", 3),
    at("d", "south", 4),
  ];
  const ranks = alignFields(fields, { trials: TRIALS, seed: 3, dependence }).map(({ trials }) =>
    ranksOf(trials.volumes.condensateRecoverableStb),
  );
  const between = (one: number, other: number) => spearman(ranks[one], ranks[other], TRIALS);
  return { ab: between(0, 1), cd: between(2, 3), ac: between(0, 2), bd: between(1, 3) };
}

describe("createAligner(options)", () => {
  /**
   * Two scores of correlation rho have the rank correlation (6 / pi) asin(rho / 2) (Pearson 1907), and rho is the sum
   * of the shares of the factors in common. The sampling error of a rank correlation of 20,000 trials is 0.007.
   */
  it("gives reservoirs the wanted rank correlation in a basin, across basins and through a shared factor", () => {
    const rho = (rank: number) => 2 * Math.sin((Math.PI * rank) / 6);
    const found = rankCorrelations({
      portfolioRank: 0.15,
      basinRanks: { "id-north": 0.4 },
      otherBasinsRank: 0.25,
      sharedFactors: [{ name: "Survey", note: "", rank: 0.3, fieldIds: ["id-a", "id-c"] }],
    });
    expect(Math.abs(found.ab - 0.4)).toBeLessThan(0.02);
    expect(Math.abs(found.cd - 0.25)).toBeLessThan(0.02);
    expect(Math.abs(found.bd - 0.15)).toBeLessThan(0.02);
    expect(Math.abs(found.ac - rankOf(rho(0.15) + rho(0.3)))).toBeLessThan(0.02);
  });

  it("leaves reservoirs alone that share nothing", () => {
    for (const correlation of Object.values(rankCorrelations(independent))) {
      expect(Math.abs(correlation)).toBeLessThan(0.02);
    }
  });

  it("keeps rows whole and a reservoir's distribution as it is", () => {
    const condensate = sampleOf(lognormal, 500);
    const [{ trials }] = alignFields([fieldOf("a", condensate)], {
      trials: 500,
      seed: 1,
      dependence: { ...independent, otherBasinsRank: 0.4 },
    });
    const { condensateRecoverableStb: own, salesGasScf: gas } = trials.volumes;
    own.forEach((value, t) => expect(gas[t] / value).toBeCloseTo(16, 5));
    expect(own.slice().sort()).toEqual(Float32Array.from(condensate).sort());
  });

  it("takes every row about equally often when a reservoir has fewer trials than the total, and every so many when more", () => {
    const rows = (count: number, trials: number) => {
      const field = emptyField(trials);
      const values = Float64Array.from({ length: count }, (_, i) => i);
      createAligner({ trials, seed: 1 }).addReservoir(reservoirOf("a/x", values), [], field);
      return field.volumes.condensateRecoverableStb.slice().sort();
    };
    expect([...rows(3, 9)]).toEqual([0, 0, 0, 1, 1, 1, 2, 2, 2]);
    expect([...rows(4, 6)]).toEqual([0, 1, 1, 2, 3, 3]);
    expect([...rows(9, 3)]).toEqual([1, 4, 7]);
    expect([...rows(5, 5)]).toEqual([0, 1, 2, 3, 4]);
  });

  it("puts a field in the same trials whoever else is in the book", () => {
    const [a, b] = [
      fieldOf("a", sampleOf(lognormal, 300)),
      fieldOf("b", sampleOf(lognormal, 300, 2)),
    ];
    const options = { trials: 300, seed: 1, dependence: { ...independent, otherBasinsRank: 0.3 } };
    expect(alignFields([b], options)[0]).toEqual(alignFields([a, b], options)[1]);
  });

  it("draws a success in the share of trials that the chance says, and not where the volumes are", () => {
    const [{ trials }] = alignFields([fieldOf("a", sampleOf(lognormal, TRIALS), { chance: 0.3 })], {
      trials: TRIALS,
      seed: 5,
      dependence: independent,
    });
    const yes = trials.comes.reduce((sum, one) => sum + one, 0);
    expect(yes).toBe(6000);
    const volumes = trials.volumes.condensateRecoverableStb;
    const mean = volumes.reduce((sum, value, t) => sum + value * trials.comes[t], 0) / yes;
    // The mean of a lognormal of these percentiles is 115.75 and its standard deviation 67.5: 0.9 is its error at 6,000.
    expect(Math.abs(mean - 115.7506)).toBeLessThan(2.7);
  });

  it("refuses a chance that is none, trials that are none, and vectors of different lengths", () => {
    const aligner = createAligner({ trials: 10, seed: 1 });
    expect(() => aligner.drawSuccess("a", 1.2, emptyField(10))).toThrow("lies between 0 and 1");
    expect(() => createAligner({ trials: 0, seed: 1 })).toThrow("whole number, 1 or more");
    expect(() => createAligner({ trials: 5, seed: 0.5 })).toThrow("seed");
    const whole = reservoirOf("a/x", new Float64Array(4));
    const torn = { ...whole, vectors: { ...whole.vectors, salesGasScf: new Float64Array(3) } };
    expect(() => aligner.addReservoir(torn, [], emptyField(10))).toThrow("3 trials of salesGasScf");
  });

  it("does not change what it is given", () => {
    const condensate = sampleOf(lognormal, 300);
    const before = condensate.slice();
    alignFields([fieldOf("a", condensate)], { trials: 100, seed: 1, dependence: independent });
    expect(condensate).toEqual(before);
  });
});
