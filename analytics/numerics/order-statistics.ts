import { createRankingWorkspace, extremes, rankByCounting, type RankingWorkspace } from "./ranking";

/**
 * Order statistics of large arrays without comparing elements with one another: values are put into equal bins in one
 * pass, and only the bins that hold a wanted rank are sorted. About twenty times faster than sorting with a
 * comparator, and the histogram falls out of the same pass.
 */

/** Bins of the finest histogram a summary can ask for; every bin count used here is a multiple of it. */
const HISTOGRAM_BINS = 40;
/** Keys are stored in 16 bits. */
const MAXIMUM_BINS = 65_000;
/** Quantiles that can be asked for in one pass. */
const MAXIMUM_QUANTILES = 256;
/** Below this length an insertion sort beats the built-in sort. */
const SHORT = 24;

/** Scratch arrays, made once and used for every array of up to `capacity` values. */
export interface OrderWorkspace extends RankingWorkspace {
  readonly capacity: number;
  readonly keys: Uint16Array;
  readonly counts: Uint32Array;
  readonly cursors: Int32Array;
  readonly middles: Float64Array;
  readonly picked: Float64Array;
  readonly binOfRank: Int32Array;
  readonly placeOfRank: Int32Array;
}

export function createOrderWorkspace(capacity: number): OrderWorkspace {
  const bins = quantileBins(capacity);
  return {
    capacity,
    keys: new Uint16Array(capacity),
    counts: new Uint32Array(bins + 1),
    cursors: new Int32Array(bins + 1),
    middles: new Float64Array(bins),
    picked: new Float64Array(capacity),
    binOfRank: new Int32Array(2 * MAXIMUM_QUANTILES),
    placeOfRank: new Int32Array(2 * MAXIMUM_QUANTILES),
    ...createRankingWorkspace(capacity),
  };
}

/** What one pass over the values yields besides the quantiles. */
export interface CountedSample {
  minimum: number;
  maximum: number;
  mean: number;
  /** with n - 1 in the denominator; 0 for a single value */
  standardDeviation: number;
  /** quantiles, in the order of the probabilities that were asked for */
  quantiles: number[];
  /** counts in 40 equal bins from minimum to maximum; all in the first when the two are equal */
  histogram: number[];
}

/**
 * Quantile of values that are already in ascending order, by the R-7 rule: linear between the order statistics of
 * ranks floor(h) and floor(h) + 1, with h = (n - 1) p.
 *
 * @param sorted  ascending
 * @param p       0 to 1
 * @param count   how many of `sorted` to use, > 0
 * @example quantileSorted([2, 4, 4, 5, 7, 9, 11, 15, 20, 31], 0.9) // => 21.1
 * @see R. J. Hyndman, Y. Fan, Sample quantiles in statistical packages, Am. Stat. 50 (1996) 361-365, definition 7
 */
export function quantileSorted(
  sorted: ArrayLike<number>,
  p: number,
  count = sorted.length,
): number {
  const h = (count - 1) * p;
  const k = Math.min(Math.floor(h), count - 1);
  const below = sorted[k];
  return k + 1 < count ? below + (h - k) * (sorted[k + 1] - below) : below;
}

/**
 * Extremes, moments, histogram and R-7 quantiles of unordered values.
 *
 * @param values         finite numbers; not changed
 * @param count          how many of them to use, 1 to `workspace.capacity`
 * @param probabilities  ascending, each 0 to 1; at most 256 of them
 */
export function countSample(
  values: ArrayLike<number>,
  count: number,
  probabilities: ArrayLike<number>,
  workspace: OrderWorkspace,
): CountedSample {
  const { minimum, maximum, sum } = extremes(values, count);
  const mean = sum / count;
  const quantiles = new Array<number>(probabilities.length).fill(minimum);
  const histogram = new Array<number>(HISTOGRAM_BINS).fill(0);
  if (minimum === maximum) {
    histogram[0] = count;
    return { minimum, maximum, mean: minimum, standardDeviation: 0, quantiles, histogram };
  }
  const bins = quantileBins(count);
  const squares = fillKeys(values, count, minimum, maximum, bins, mean, workspace);
  const perBar = bins / HISTOGRAM_BINS;
  for (let bar = 0; bar < HISTOGRAM_BINS; bar += 1) {
    let total = 0;
    for (let bin = bar * perBar; bin < (bar + 1) * perBar; bin += 1) total += workspace.counts[bin];
    histogram[bar] = total;
  }
  pickQuantiles(values, count, bins, probabilities, workspace, quantiles);
  const standardDeviation = count > 1 ? Math.sqrt(squares / (count - 1)) : 0;
  return { minimum, maximum, mean, standardDeviation, quantiles, histogram };
}

/**
 * How many of the values from `from` up to `to` lie below a bound, for the array that `countSample` counted last. By their
 * keys: whole numbers compare without a branch, which half of the time a processor would foresee wrongly, and only the
 * few values in the bound's own bin are looked at themselves.
 *
 * @param sample  what that call returned
 * @param count   its number of values
 * @param bound   from the sample's minimum to its maximum
 */
export function countBelow(
  values: ArrayLike<number>,
  from: number,
  to: number,
  bound: number,
  { minimum, maximum }: Pick<CountedSample, "minimum" | "maximum">,
  count: number,
  { keys }: OrderWorkspace,
): number {
  if (minimum === maximum) return 0;
  const bins = quantileBins(count);
  const own = Math.min(((bound - minimum) * (bins / (maximum - minimum))) | 0, bins - 1);
  let below = 0;
  for (let i = from; i < to; i += 1) {
    const key = keys[i];
    below += (key - own) >>> 31;
    if (key === own && values[i] < bound) below += 1;
  }
  return below;
}

/** A bin of the last count with more than this share of the values is too coarse to rank by. */
const LARGEST_BIN = 0.02;

/**
 * Relative ranks, (rank + 1/2) / n, of the values that `countSample` counted last: those of one bin share the middle of
 * their ranks, for a rank correlation is the same to a few parts in 100,000. Values that crowd into few bins are ranked
 * one by one.
 *
 * @param values  the array and count of that call
 */
export function gradesOfCounted(
  values: ArrayLike<number>,
  count: number,
  workspace: OrderWorkspace,
  grades: Float64Array,
): void {
  const { keys, counts, middles } = workspace;
  const bins = quantileBins(count);
  let before = 0;
  let largest = 0;
  for (let bin = 0; bin < bins; bin += 1) {
    const size = counts[bin];
    middles[bin] = (before + 0.5 * size) / count;
    before += size;
    if (size > largest) largest = size;
  }
  if (before === count && largest <= LARGEST_BIN * count) {
    for (let i = 0; i < count; i += 1) grades[i] = middles[keys[i]];
    return;
  }
  const ranks = new Uint32Array(count);
  rankByCounting(values, count, workspace, ranks, new Uint32Array(count));
  for (let i = 0; i < count; i += 1) grades[i] = (ranks[i] + 0.5) / count;
}

function quantileBins(count: number): number {
  const perBar = Math.min(Math.floor(MAXIMUM_BINS / HISTOGRAM_BINS), Math.max(4, count >> 6));
  return perBar * HISTOGRAM_BINS;
}

/** Fills keys and counts; returns the sum of squared deviations from `centre`. */
function fillKeys(
  values: ArrayLike<number>,
  count: number,
  minimum: number,
  maximum: number,
  bins: number,
  centre: number,
  { keys, counts }: OrderWorkspace,
): number {
  counts.fill(0, 0, bins);
  const scale = bins / (maximum - minimum);
  const last = bins - 1;
  let squares = 0;
  for (let i = 0; i < count; i += 1) {
    const value = values[i];
    const deviation = value - centre;
    squares += deviation * deviation;
    let key = ((value - minimum) * scale) | 0;
    if (key > last) key = last;
    keys[i] = key;
    counts[key] += 1;
  }
  return squares;
}

function pickQuantiles(
  values: ArrayLike<number>,
  count: number,
  bins: number,
  probabilities: ArrayLike<number>,
  { keys, counts, cursors, picked, binOfRank, placeOfRank }: OrderWorkspace,
  quantiles: number[],
): void {
  // cursors: -1 for a bin nobody needs, else where its next value goes.
  cursors.fill(-1, 0, bins);
  const ranks = probabilities.length * 2;
  let bin = 0;
  let before = 0;
  let free = 0;
  for (let r = 0; r < ranks; r += 1) {
    const base = Math.floor((count - 1) * probabilities[r >> 1]);
    const rank = Math.min(base + (r & 1), count - 1);
    // A pair's second rank can lie past the next pair's first, so the walk may have to step back.
    while (rank < before) before -= counts[--bin];
    while (rank >= before + counts[bin]) before += counts[bin++];
    if (cursors[bin] < 0) {
      cursors[bin] = free;
      free += counts[bin];
    }
    binOfRank[r] = bin;
    placeOfRank[r] = rank - before;
  }
  for (let i = 0; i < count; i += 1) {
    const key = keys[i];
    const cursor = cursors[key];
    if (cursor >= 0) {
      picked[cursor] = values[i];
      cursors[key] = cursor + 1;
    }
  }
  let sortedTo = -1;
  for (let r = 0; r < ranks; r += 1) {
    const wanted = binOfRank[r];
    const end = cursors[wanted];
    const start = end - counts[wanted];
    if (wanted > sortedTo) {
      sortSegment(picked, start, end);
      sortedTo = wanted;
    }
    placeOfRank[r] += start;
  }
  for (let q = 0; q < quantiles.length; q += 1) {
    const h = (count - 1) * probabilities[q];
    const below = picked[placeOfRank[2 * q]];
    quantiles[q] = below + (h - Math.floor(h)) * (picked[placeOfRank[2 * q + 1]] - below);
  }
}

function sortSegment(values: Float64Array, from: number, to: number): void {
  if (to - from > SHORT) {
    values.subarray(from, to).sort();
    return;
  }
  for (let i = from + 1; i < to; i += 1) {
    const value = values[i];
    let j = i - 1;
    while (j >= from && values[j] > value) {
      values[j + 1] = values[j];
      j -= 1;
    }
    values[j + 1] = value;
  }
}
