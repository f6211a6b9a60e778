/**
 * Ranks of large arrays by counting, without comparing elements with one another but for the few that share a key.
 */

/** Ranking sorts by the upper and the lower half of a 22-bit key: two passes over 2,048 bins that stay in cache. */
const RADIX_BITS = 11;
const RADIX = 1 << RADIX_BITS;
/** Up to this many values are ranked in a single pass over bins that stay in cache. */
const SHORT_RANKING = 1_024;

/** Scratch arrays, made once and used for every array of up to `capacity` values. */
export interface RankingWorkspace {
  readonly low: Uint32Array;
  readonly high: Uint32Array;
  readonly half: Uint32Array;
  readonly wideKeys: Uint32Array;
}

export function createRankingWorkspace(capacity: number): RankingWorkspace {
  return {
    low: new Uint32Array(4 * SHORT_RANKING),
    high: new Uint32Array(RADIX),
    half: new Uint32Array(capacity),
    wideKeys: new Uint32Array(capacity),
  };
}

/**
 * Writes the rank (0 for the smallest) of each value to `ranks`, and the positions of the values from smallest to
 * largest to `order`. Equal values are ranked in the order in which they stand.
 *
 * One or two counting passes over the value's position between the extremes put nearly everything in place; an insertion
 * pass settles values that share a key.
 *
 * @param values finite numbers; not changed
 */
export function rankByCounting(
  values: ArrayLike<number>,
  count: number,
  workspace: RankingWorkspace,
  ranks: Uint32Array,
  order: Uint32Array,
): void {
  const { minimum, maximum } = extremes(values, count);
  if (minimum === maximum) {
    for (let i = 0; i < count; i += 1) ranks[i] = order[i] = i;
    return;
  }
  if (count <= SHORT_RANKING) {
    rankInOnePass(values, count, minimum, maximum, workspace, order);
  } else rankInTwoPasses(values, count, minimum, maximum, workspace, order);
  settle(order, count, values);
  for (let rank = 0; rank < count; rank += 1) ranks[order[rank]] = rank;
}

/** About four bins to a value, so that hardly two share one. */
function rankInOnePass(
  values: ArrayLike<number>,
  count: number,
  minimum: number,
  maximum: number,
  { low, wideKeys }: RankingWorkspace,
  order: Uint32Array,
): void {
  const bins = Math.min(4 * count, low.length);
  low.fill(0, 0, bins);
  const scale = (bins - 1) / (maximum - minimum);
  for (let i = 0; i < count; i += 1) {
    const key = ((values[i] - minimum) * scale) | 0;
    wideKeys[i] = key;
    low[key] += 1;
  }
  toStarts(low, bins);
  for (let i = 0; i < count; i += 1) order[low[wideKeys[i]]++] = i;
}

function rankInTwoPasses(
  values: ArrayLike<number>,
  count: number,
  minimum: number,
  maximum: number,
  { low, high, half, wideKeys }: RankingWorkspace,
  order: Uint32Array,
): void {
  low.fill(0, 0, RADIX);
  high.fill(0);
  const scale = (RADIX * RADIX - 1) / (maximum - minimum);
  for (let i = 0; i < count; i += 1) {
    const key = ((values[i] - minimum) * scale) | 0;
    wideKeys[i] = key;
    low[key & (RADIX - 1)] += 1;
    high[key >>> RADIX_BITS] += 1;
  }
  toStarts(low, RADIX);
  toStarts(high, RADIX);
  for (let i = 0; i < count; i += 1) half[low[wideKeys[i] & (RADIX - 1)]++] = i;
  for (let i = 0; i < count; i += 1) {
    const index = half[i];
    order[high[wideKeys[index] >>> RADIX_BITS]++] = index;
  }
}

/** Counts to the positions at which their bins start. */
function toStarts(counts: Uint32Array, bins: number): void {
  let start = 0;
  for (let bin = 0; bin < bins; bin += 1) {
    const size = counts[bin];
    counts[bin] = start;
    start += size;
  }
}

/** Insertion sort of an order that is nearly right; a sort with a comparator should it turn out not to be. */
function settle(order: Uint32Array, count: number, values: ArrayLike<number>): void {
  let moves = 8 * count;
  let before = values[order[0]];
  for (let i = 1; i < count; i += 1) {
    const index = order[i];
    const value = values[index];
    if (value >= before) {
      before = value;
      continue;
    }
    let j = i - 1;
    while (j >= 0 && values[order[j]] > value) {
      order[j + 1] = order[j];
      j -= 1;
      moves -= 1;
    }
    order[j + 1] = index;
    if (moves < 0) {
      order.subarray(0, count).sort((a, b) => values[a] - values[b] || a - b);
      return;
    }
  }
}

/** Smallest, largest and sum of at least one finite number. */
export function extremes(values: ArrayLike<number>, count: number) {
  let minimum = values[0];
  let maximum = minimum;
  let sum = 0;
  for (let i = 0; i < count; i += 1) {
    const value = values[i];
    sum += value;
    if (value < minimum) minimum = value;
    if (value > maximum) maximum = value;
  }
  return { minimum, maximum, sum };
}
