import type { TrialVector } from "./field-trials";

/** Where a field stands among the others, over the trials. */
export interface RankSpread {
  /** the best and worst rank of the middle 80 % of trials; 1 is the largest */
  low: number;
  high: number;
  /** share of trials in which it is the largest, 0 to 1 */
  chanceFirst: number;
}

/** One of those that are ranked; element t of all belongs to one trial. */
export interface RankedTrials {
  id: string;
  values: TrialVector;
  /** what its values are multiplied by */
  factor: number;
  /** 1 where it is there at all; null when always */
  comes: Uint8Array | null;
}

/** Room for the place of a member in a key, above which its value stands: 2^32 of one times 2^20 of the other is exact. */
const PLACES = 2 ** 20;

/**
 * Ranks every member in every trial, and says between which ranks each lies in the middle 80 % of trials.
 *
 * Equals in single precision share the better places in the order of their ids, so that the ranks of a trial are always
 * 1 to n.
 *
 * @param members  values of 0 or more; each with as many trials as the first
 * @example rankTrials([of("a", [3, 1]), of("b", [2, 2])]).a // => { low: 1, high: 2, chanceFirst: 0.5 }
 */
export function rankTrials(members: readonly RankedTrials[]): Record<string, RankSpread> {
  const sorted = [...members].sort((a, b) => (a.id < b.id ? -1 : 1));
  const count = sorted.length;
  const trials = sorted[0]?.values.length ?? 0;
  /** count x count, row = member, column = rank - 1 */
  const tally = new Uint32Array(count * count);
  // The bits of floats of 0 or more stand in the order of their values, so value and member make one number, and
  // numbers sort without a comparator.
  const keys = new Float64Array(count);
  const value = new Float32Array(1);
  const bits = new Uint32Array(value.buffer);
  for (let trial = 0; trial < trials; trial += 1) {
    for (let index = 0; index < count; index += 1) {
      const { values, factor, comes } = sorted[index];
      value[0] = comes !== null && comes[trial] === 0 ? 0 : factor * values[trial];
      keys[index] = bits[0] * PLACES + (count - 1 - index);
    }
    keys.sort();
    for (let place = 0; place < count; place += 1) {
      const index = count - 1 - (keys[count - 1 - place] % PLACES);
      tally[index * count + place] += 1;
    }
  }
  return Object.fromEntries(
    sorted.map(({ id }, index) => {
      const row = tally.subarray(index * count, (index + 1) * count);
      return [
        id,
        {
          low: rankReachedBy(row, 0.1 * trials),
          high: rankReachedBy(row, 0.9 * trials),
          chanceFirst: trials === 0 ? 0 : row[0] / trials,
        },
      ];
    }),
  );
}

/** The first rank at which so many trials are reached. */
function rankReachedBy(row: Uint32Array, wanted: number): number {
  let reached = 0;
  for (let place = 0; place < row.length; place += 1) {
    reached += row[place];
    if (reached >= wanted) return place + 1;
  }
  return row.length;
}
