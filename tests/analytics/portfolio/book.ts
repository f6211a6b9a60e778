import { createRandom, fillPermutation } from "@/analytics/numerics/random";
import type { Dependence } from "@/analytics/portfolio/dependence-schema";
import type { ReservoirTrials, TrialVector } from "@/analytics/portfolio/field-trials";
import type { RollUpField, RollUpOptions } from "@/analytics/portfolio/roll-up";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";

/** Quantiles of a distribution in the middles of n equal steps, in a random order of their own. */
export function sampleOf(distribution: Distribution, trials: number, stream = 1): Float64Array {
  const p = Float64Array.from({ length: trials }, (_, i) => (i + 0.5) / trials);
  const sorted = new Float64Array(trials);
  compileDistribution(distribution).fillQuantiles(p, trials, sorted);
  const order = new Uint32Array(trials);
  fillPermutation(createRandom(99, stream), order, trials, new Uint32Array(trials));
  return Float64Array.from(order, (rank) => sorted[rank]);
}

/** A reservoir whose recoverable condensate has these trials; its other volumes are fixed multiples, row by row. */
export function reservoirOf(id: string, condensate: TrialVector): ReservoirTrials {
  const times = (factor: number) => condensate.map((value: number) => factor * value);
  return {
    id,
    vectors: {
      wetGasInPlaceScf: times(40),
      dryGasInPlaceScf: times(32),
      condensateInPlaceStb: times(2),
      salesGasScf: times(16),
      condensateRecoverableStb: condensate,
    },
  };
}

/** A field of one reservoir in the basin "north". */
export function fieldOf(
  slug: string,
  condensate: TrialVector,
  changes: Partial<RollUpField> = {},
): RollUpField {
  return {
    id: `id-${slug}`,
    slug,
    basinId: "id-north",
    basinSlug: "north",
    classId: "reserves",
    interest: 1,
    chance: 1,
    reservoirs: [reservoirOf(`${slug}/sand`, condensate)],
    ...changes,
  };
}

export const independent: Dependence = {
  portfolioRank: 0,
  basinRanks: {},
  otherBasinsRank: 0,
  sharedFactors: [],
};

/** The rank correlation that goes with a correlation of normal scores (Pearson 1907): (6 / pi) asin(rho / 2). */
export const rankOf = (rho: number) => (6 / Math.PI) * Math.asin(rho / 2);

export const optionsOf = (
  trials: number,
  dependence: Partial<Dependence> = {},
  rest: Partial<RollUpOptions> = {},
): RollUpOptions => ({
  trials,
  seed: 12,
  dependence: { ...independent, ...dependence },
  risk: "unrisked",
  withRanks: false,
  ...rest,
});
