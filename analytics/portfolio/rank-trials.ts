/** Where a field stands among the others, over the trials. */
export interface RankSpread {
  /** the best and worst rank of the middle 80 % of trials; 1 is the largest */
  low: number;
  high: number;
  /** share of trials in which it is the largest, 0 to 1 */
  chanceFirst: number;
}

/**
 * Ranks every member in every trial, and says between which ranks each lies in the middle 80 % of trials.
 *
 * Equals share the better places in the order of their ids, so that the ranks of a trial are always 1 to n.
 *
 * @param vectors  by member, each of the same length; element t of all belongs to one trial
 * @example rankTrials({ a: new Float64Array([3, 1]), b: new Float64Array([2, 2]) }).a
 *   // => { low: 1, high: 2, chanceFirst: 0.5 }
 */
export function rankTrials(
  vectors: Readonly<Record<string, Float64Array>>,
): Record<string, RankSpread> {
  const ids = Object.keys(vectors).sort();
  const members = ids.map((id) => vectors[id]);
  const count = members.length;
  const trials = members[0]?.length ?? 0;
  /** count x count, row = member, column = rank - 1 */
  const tally = new Uint32Array(count * count);
  const order = Array.from({ length: count }, (_, member) => member);
  const values = new Float64Array(count);
  for (let trial = 0; trial < trials; trial += 1) {
    for (let member = 0; member < count; member += 1) values[member] = members[member][trial];
    // The order of the last trial is nearly that of this one, which an insertion sort is quick at.
    for (let place = 1; place < count; place += 1) {
      const member = order[place];
      let gap = place;
      for (; gap > 0 && isBefore(values, member, order[gap - 1]); gap -= 1) {
        order[gap] = order[gap - 1];
      }
      order[gap] = member;
    }
    for (let place = 0; place < count; place += 1) tally[order[place] * count + place] += 1;
  }
  return Object.fromEntries(
    ids.map((id, member) => {
      const row = tally.subarray(member * count, (member + 1) * count);
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
