import { DomainError } from "../errors";
import { createRankingWorkspace, rankByCounting } from "../numerics/ranking";
import { createRandom, fillPermutation, streamOf } from "../numerics/random";
import { normalScores } from "../uncertainty/rank-correlation";
import { vectorNames, type VectorName } from "../volumetrics/results-schema";
import type { FactorLoading } from "./factor-model";

export type TrialVector = Float32Array | Float64Array;

/** One reservoir with the stored trials of the revision that stands for it. */
export interface ReservoirTrials {
  /**
   * The reservoir's address rather than a random id: it picks the draws, which then stay the same when a revision or a
   * neighbour changes, and on every installation that holds the same book.
   */
  id: string;
  /** element t of each belongs to the same trial, and rows stay whole */
  vectors: Readonly<Record<VectorName, TrialVector>>;
}

/**
 * A field's trials in the order of the portfolio: element t of every field belongs to trial t, so that any filter of
 * fields is nothing but a sum. Gross and unrisked.
 */
export interface FieldTrials {
  volumes: Record<VectorName, Float32Array>;
  /** 1 where the field comes, 0 where there is nothing, by its chance of commerciality */
  comes: Uint8Array;
}

const BYTES_PER_TRIAL = vectorNames.length * Float32Array.BYTES_PER_ELEMENT + 1;

/** Memory of one field's trials, bytes. */
export const bytesOfFieldTrials = (trials: number): number => trials * BYTES_PER_TRIAL;

/** Views on a buffer of `bytesOfFieldTrials(trials)` bytes, which threads may share. */
export function viewFieldTrials(buffer: ArrayBufferLike, trials: number): FieldTrials {
  const volumes = Object.fromEntries(
    vectorNames.map((name, index) => [
      name,
      new Float32Array(buffer, index * trials * Float32Array.BYTES_PER_ELEMENT, trials),
    ]),
  ) as Record<VectorName, Float32Array>;
  const comes = new Uint8Array(
    buffer,
    vectorNames.length * trials * Float32Array.BYTES_PER_ELEMENT,
    trials,
  );
  return { volumes, comes };
}

export interface AlignmentOptions {
  /** of the total, at least 1; reservoirs may have another number */
  trials: number;
  /** a safe integer, 0 or more */
  seed: number;
}

export interface Aligner {
  /**
   * Adds a reservoir's trials to its field's, each in the place where its common factors and its own draw put it.
   *
   * @throws {DomainError} when it has no trials, or vectors of different lengths
   */
  addReservoir: (
    reservoir: ReservoirTrials,
    loadings: readonly FactorLoading[],
    field: FieldTrials,
  ) => void;
  /**
   * Writes where a field comes: in round(chance x trials) of the trials, by a random order of its own that has nothing
   * to do with its volumes or with other fields. Each trial is a yes with the field's chance, to within half a trial.
   *
   * @throws {DomainError} when the chance is no share
   */
  drawSuccess: (fieldSlug: string, chance: number, field: FieldTrials) => void;
}

/**
 * Puts reservoirs' trials in the order of a total. A reservoir's rows are re-ordered, whole, so that the rank of its
 * recoverable condensate follows the normal score of `loadingsOf`: a Gauss copula with common factors, under which two
 * reservoirs whose scores correlate by rho have the rank correlation (6 / pi) asin(rho / 2). A reservoir's own
 * distribution does not change, nor does its place depend on who else is in the book.
 *
 * A reservoir with m trials joins a total of n by its ranks: rank r of n takes its row of rank floor((r + 1/2) m / n),
 * so that every row is used about n / m times, or every (m / n)th row once.
 *
 * @throws {DomainError} when the number of trials or the seed is none
 * @see A. J. McNeil, R. Frey, P. Embrechts, Quantitative Risk Management, 2nd ed. (2015), section 7.3 (Gauss copula)
 */
export function createAligner({ trials, seed }: AlignmentOptions): Aligner {
  requireWhole("trials", trials, 1);
  requireWhole("seed", seed, 0);
  const integers = () => new Uint32Array(trials);
  const [words, permutation, ranks, scratch] = [integers(), integers(), integers(), integers()];
  const scores = normalScores(trials);
  const mixed = new Float64Array(trials);
  const factors = new Map<string, Float64Array>();
  const counting = createRankingWorkspace(trials);
  /** for members with more trials than the total; grows with the largest */
  let sorting = { counting, ranks: integers(), ascending: integers() };

  function shuffle(stream: string): void {
    fillPermutation(createRandom(seed, streamOf(stream)), permutation, trials, words);
  }

  function factorOf(name: string): Float64Array {
    const known = factors.get(name);
    if (known) return known;
    shuffle(name);
    const factor = Float64Array.from(permutation, (rank) => scores[rank]);
    factors.set(name, factor);
    return factor;
  }

  /** The rank that the reservoir's condensate must have, trial by trial. */
  function targetRanks(id: string, loadings: readonly FactorLoading[]): Uint32Array {
    const followed = loadings.map(({ factor, share }) => ({
      values: factorOf(factor),
      weight: Math.sqrt(share),
    }));
    shuffle(`member ${id}`);
    if (followed.length === 0) return permutation;
    const shared = loadings.reduce((sum, { share }) => sum + share, 0);
    const own = Math.sqrt(Math.max(0, 1 - shared));
    for (let t = 0; t < trials; t += 1) mixed[t] = own * scores[permutation[t]];
    for (const { values, weight } of followed) {
      for (let t = 0; t < trials; t += 1) mixed[t] += weight * values[t];
    }
    rankByCounting(mixed, trials, counting, ranks, scratch);
    return ranks;
  }

  /** The reservoir's rows from the smallest condensate to the largest. */
  function sortRows({ vectors }: ReservoirTrials, count: number): Uint32Array {
    if (sorting.ascending.length < count) {
      sorting = {
        counting: createRankingWorkspace(count),
        ranks: new Uint32Array(count),
        ascending: new Uint32Array(count),
      };
    }
    rankByCounting(
      vectors.condensateRecoverableStb,
      count,
      sorting.counting,
      sorting.ranks,
      sorting.ascending,
    );
    return sorting.ascending;
  }

  return {
    addReservoir(reservoir, loadings, { volumes }) {
      const count = trialsOf(reservoir);
      const target = targetRanks(reservoir.id, loadings);
      const ascending = sortRows(reservoir, count);
      const step = count / trials;
      const rows = scratch;
      for (let t = 0; t < trials; t += 1) {
        rows[t] = ascending[Math.floor((target[t] + 0.5) * step)];
      }
      for (const name of vectorNames) {
        const sum = volumes[name];
        const values = reservoir.vectors[name];
        for (let t = 0; t < trials; t += 1) sum[t] += values[rows[t]];
      }
    },
    drawSuccess(fieldSlug, chance, { comes }) {
      if (!(chance >= 0 && chance <= 1)) {
        throw new DomainError(
          `The chance of ${fieldSlug} lies between 0 and 1; ${chance} does not.`,
          { input: "chance", value: chance },
        );
      }
      shuffle(`success ${fieldSlug}`);
      for (let t = 0; t < trials; t += 1) {
        comes[t] = permutation[t] + 0.5 < chance * trials ? 1 : 0;
      }
    },
  };
}

/** @returns the number of trials that all of its vectors have */
function trialsOf({ id, vectors }: ReservoirTrials): number {
  const count = vectors.condensateRecoverableStb.length;
  for (const name of vectorNames) {
    if (count > 0 && vectors[name].length === count) continue;
    throw new DomainError(
      `${id} has ${vectors[name].length} trials of ${name} and ${count} of its recoverable condensate.`,
      { input: name, member: id },
    );
  }
  return count;
}

function requireWhole(input: string, value: number, least: number): void {
  if (Number.isSafeInteger(value) && value >= least) return;
  throw new DomainError(
    `The ${input} of a total: a whole number, ${least} or more; not ${value}.`,
    {
      input,
      value,
    },
  );
}
