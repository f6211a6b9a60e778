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

/**
 * Ranks every member in every trial, and says between which ranks each lies in the middle 80 % of trials.
 *
 * Equals share the better places in the order of their ids, so that the ranks of a trial are always 1 to n.
 *
 * @param members  each with as many trials as the first
 * @example rankTrials([of("a", [3, 1]), of("b", [2, 2])]).a // => { low: 1, high: 2, chanceFirst: 0.5 }
 */
export function rankTrials(members: readonly RankedTrials[]): Record<string, RankSpread> {
  const sorted = [...members].sort((a, b) => (a.id < b.id ? -1 : 1));
  const count = sorted.length;
  const trials = sorted[0]?.values.length ?? 0;
  /** count x count, row = member, column = rank - 1 */
  const tally = new Uint32Array(count * count);
  const usual = usualOrder(sorted, trials);
  const order = new Uint32Array(count);
  const values = new Float64Array(count);
  for (let trial = 0; trial < trials; trial += 1) {
    for (let index = 0; index < count; index += 1) {
      const member = sorted[index];
      const value = member.factor * member.values[trial];
      values[index] = member.comes === null ? value : value * member.comes[trial];
    }
    // The usual order is nearly that of any trial, which an insertion sort is quick at.
    order.set(usual);
    for (let place = 1; place < count; place += 1) {
      const index = order[place];
      let gap = place;
      for (; gap > 0 && isBefore(values, index, order[gap - 1]); gap -= 1) {
        order[gap] = order[gap - 1];
      }
      order[gap] = index;
    }
    for (let place = 0; place < count; place += 1) tally[order[place] * count + place] += 1;
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

/** Members from the largest mean to the smallest. */
function usualOrder(members: readonly RankedTrials[], trials: number): Uint32Array {
  const means = Float64Array.from(members, ({ values, factor }) => {
    let sum = 0;
    for (let trial = 0; trial < trials; trial += 1) sum += values[trial];
    return factor * sum;
  });
  return Uint32Array.from(members.keys()).sort((a, b) => means[b] - means[a] || a - b);
}

const isBefore = (values: Float64Array, member: number, other: number) =>
  values[member] > values[other] || (values[member] === values[other] && member < other);

/** The first rank at which so many trials are reached. */
function rankReachedBy(row: Uint32Array, wanted: number): number {
  let reached = 0;
  for (let place = 0; place < row.length; place += 1) {
    reached += row[place];
    if (reached >= wanted) return place + 1;
  }
  return row.length;
}
